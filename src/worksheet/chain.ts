/**
 * Chains in the document: stages in signal order, each with what its data sheet says, as typed text.
 * Holds: every stage value is an entry like any line's; nothing computed stands here.
 */
import type { AcceptedFinding, Tolerance } from './document';

/** The values that a stage may have, in the order of the file. */
export const STAGE_FIELDS = [
  'gain',
  'noiseFigure',
  'outputIntercept',
  'inputIntercept',
  'outputIntercept2',
  'inputIntercept2',
  'outputCompression',
  'inputCompression',
  'temperature',
  'noiseBandwidth',
  'selectivity',
] as const;

export type StageField = (typeof STAGE_FIELDS)[number];

type StageValues = { readonly [Field in StageField]?: string };

/** One stage. A loss is a gain below 0 dB. An empty text is as good as none. */
export interface Stage extends StageValues {
  readonly id: string;
  readonly symbol: string;
  readonly label: string;
  /** True: bypassed, as if a piece of wire stood there. */
  readonly off?: boolean;
  /** Entries that stand in place of the stage's own in the named cases, by case id. */
  readonly byCase?: Readonly<Record<string, StageValues>>;
  readonly tolerance?: Readonly<Record<string, Tolerance>>;
  readonly source?: string;
  readonly note?: string;
  /** Answers to findings, by the field that they are about. */
  readonly accepted?: Readonly<Record<string, readonly AcceptedFinding[]>>;
}

/** The expressions that a chain takes its surroundings from. */
export const CHAIN_INPUTS = ['signal', 'noise', 'bandwidth', 'interferer'] as const;

export type ChainInput = (typeof CHAIN_INPUTS)[number];

/** How intermodulation of several stages adds: in phase (the worst case), or as powers. */
export const INTERCEPT_ADDITIONS = ['coherent', 'power'] as const;

export type InterceptAddition = (typeof INTERCEPT_ADDITIONS)[number];

export interface ChainSection {
  readonly id: string;
  readonly kind: 'chain';
  readonly symbol: string;
  readonly title: string;
  /** The wanted level at the chain's input. */
  readonly signal?: string;
  /** The noise temperature of what stands before the chain; 290 K where nothing is said. */
  readonly noise?: string;
  readonly bandwidth?: string;
  /** The level of a single interferer at the input, and of each of two that make third-order products. */
  readonly interferer?: string;
  readonly intercept?: InterceptAddition;
  /** Answers to findings on no single value; `entry` is what the finding rested on, as `basisOf` tells. */
  readonly accepted?: readonly AcceptedFinding[];
  readonly stages: readonly Stage[];
}

/** The text of a stage's value that counts in a case; without a case, the stage's own. Empty when nothing is said. */
export function stageEntryIn(stage: Stage, field: StageField, caseId?: string): string {
  const override = caseId === undefined ? undefined : stageOverrideIn(stage, field, caseId);
  return (override ?? stage[field] ?? '').trim();
}

/** The text that stands in place of a stage's own value in a case, or undefined. Safe for any case id. */
export function stageOverrideIn(stage: Stage, field: StageField, caseId: string): string | undefined {
  const { byCase } = stage;
  const text = byCase !== undefined && Object.hasOwn(byCase, caseId) ? byCase[caseId]?.[field] : undefined;
  return text === undefined || text.trim() === '' ? undefined : text;
}

/** True when the stage says something there, in any case. */
export function saysAnything(stage: Stage, field: StageField): boolean {
  if ((stage[field] ?? '').trim() !== '') return true;
  return (
    stage.byCase !== undefined && Object.values(stage.byCase).some((values) => (values[field] ?? '').trim() !== '')
  );
}

/** What a finding on a stage, or without one on the whole chain, rests on, as a text that changes when any of it does. */
export function basisOf(chain: ChainSection, stage?: Stage): string {
  const ofStage = (one: Stage): string =>
    JSON.stringify([one.id, one.off === true, STAGE_FIELDS.map((field) => one[field] ?? ''), one.byCase ?? {}]);
  const inputs = CHAIN_INPUTS.map((input) => chain[input] ?? '');
  return JSON.stringify(inputs) + (stage === undefined ? chain.stages.map(ofStage).join('') : ofStage(stage));
}
