/**
 * review: what lets other people check a worksheet: the working of a line, values recorded at the last save, and the cautions
 * that stand beside results. Reads evaluations; changes nothing.
 */
export * from './working';
export type * from './working-types';
export * from './recorded';
export * from './cautions';
export {
  levelDiagramOfChain,
  POINT_LEVELS,
  type LevelDiagram,
  type LevelPoint,
  type PointLevel,
  type PointLevelName,
  type PointLink,
} from './level-diagram';
export { levelDiagramOfLine } from './level-sum';
export * from './curve-uses';
export * from './pool-account';
