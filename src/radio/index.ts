/** radio: published models as pure functions of numbers (SI, or decibels where the name says so). Imports base alone. */
export * from './noise';
export * from './cascade';
export * from './chain';
export * from './propagation';
export * from './capacity';
