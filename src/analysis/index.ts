/**
 * analysis: what becomes of a figure when others deviate: tolerances, trials, extremes, sensitivity, sweeps and solving, over
 * columns of doubles. Pure, and runs anywhere: what is told to it is plain data, what it gives are figures and columns.
 */
export * from './shapes';
export * from './directions';
export * from './tolerances';
export * from './inputs';
export { compileColumns, BLOCK_LIMIT, type Fill, type Program, type Varied } from './columns';
export * from './random';
export { fillSample, type Sampler } from './sampling';
export * from './statistics';
export * from './trials';
export { extremesOf, type Extremes } from './extremes';
export { slopesOf, type Slopes } from './differentiate';
export * from './sensitivity';
export * from './sweep';
export * from './solve';
