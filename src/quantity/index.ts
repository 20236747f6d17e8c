/**
 * quantity: dimensions, unit words, the three forms, meaning exponents, decibel sums, reading and writing of quantities.
 * What stands here knows figures and units, not entries, lines or worksheets.
 */
export * from './kinds';
export * from './dimension';
export * from './unit';
export { SI_PREFIXES, UNIT_WORDS } from './unit-table';
export * from './units';
export * from './meaning';
export * from './assume';
export * from './combine';
export * from './write';
export * from './curve';
