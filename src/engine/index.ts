/**
 * engine: worksheet in, evaluation out. The dependency graph, the recompute with cut-off, readings and findings. Pure: no
 * page, no storage, no clock. What is shown and how belongs to those who ask.
 */
export * from './reading';
export * from './pass';
export { Evaluation } from './evaluation';
export type { Preview } from './preview';
export type { Node } from './node';
export type { Item, ItemPlace } from './item';
export { itemId, itemsOf, stageItemId } from './item';
export { poolTotalId } from './pool-items';
export { STAGE_PARTS, type StagePart } from './chain-parts';
export { convertFigure, readBound } from './state';
