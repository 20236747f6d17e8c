/**
 * formula: from the text of an entry to a checked plan. Scanner, grammar, tree, function catalogue, checker, compiler for one
 * value. It knows symbols only through the scope it is given: no lines, no worksheet, no cases.
 */
export * from './tree';
export * from './scan';
export * from './grammar';
export * from './rename';
export * from './nearest';
export * from './plan';
export * from './types';
export * from './catalogue';
export { CONSTANTS, typeOfUnit, type Constant } from './atoms';
export { parameterAt } from './calls';
export * from './line';
export type { AttributedKind, AttributedSide, KindOrigin, LineSpec } from './attribution';
export * from './complete';
export { describeType, linearOf, decibelsOf, termsOf, fittingDecibelUnit, fittingLinearUnit } from './forms';
