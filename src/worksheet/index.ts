/**
 * worksheet: the document (lines, chains, pools, curves, cases) as plain immutable data, the changes that apply and invert, the edits that
 * people make of them, history, and symbols. Nothing is computed here, nothing is read from files, and nothing knows the page.
 */
export * from './document';
export * from './chain';
export * from './curve';
export * from './keys';
export * from './lookup';
export * from './changes';
export * from './history';
export * from './limits';
export * from './symbols';
export * from './symbol-proposal';
export * from './new';
export type { Edit, Focus } from './edit';
export * from './edit-fields';
export * from './edit-symbols';
export * from './edit-lines';
export * from './edit-sections';
export * from './edit-cases';
export * from './edit-chains';
export * from './edit-curves';
