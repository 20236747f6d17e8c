/** base: results, assertions and ids. Imports nothing; knows no radio, no worksheet and no page. */
export * from './result';
export * from './assert';
export * from './ids';
