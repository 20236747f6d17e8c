/**
 * Edits of chains: their stages, what the stages say, and where the chain takes its surroundings from.
 * Holds: each is one undoable step; an empty text takes a value away; stages that an edit does not concern keep their identity.
 */
import { assert, newShortId, present } from '../base';
import {
  stageEntryIn,
  stageOverrideIn,
  type ChainInput,
  type ChainSection,
  type InterceptAddition,
  type Stage,
  type StageField,
} from './chain';
import type { Change } from './changes';
import { isChainSection, type AcceptedFinding, type Tolerance, type Worksheet } from './document';
import type { Edit, Focus } from './edit';
import { chainChanges, rewriting } from './edit-symbols';
import { STAGE_KEYS, withKey } from './keys';
import { caseOf, sectionOf } from './lookup';
import { newStage } from './new';
import { freeSymbol, symbolFault } from './symbols';

/** The chain with this id. Throws when there is none. */
export function chainOf(worksheet: Worksheet, sectionId: string): ChainSection {
  const section = sectionOf(worksheet, sectionId);
  assert(isChainSection(section), `the section ${sectionId} is a chain`);
  return section;
}

function edit(label: string, chain: ChainSection, changes: readonly Change[]): Edit {
  const focus: Focus = { kind: 'section', sectionId: chain.id };
  return { label, changes, focus, focusBefore: focus };
}

function stagesEdit(label: string, chain: ChainSection, stages: readonly Stage[]): Edit {
  const isSame = stages.length === chain.stages.length && stages.every((stage, i) => stage === chain.stages[i]);
  return edit(
    label,
    chain,
    isSame ? [] : [{ kind: 'set-section', sectionId: chain.id, field: 'stages', value: stages }],
  );
}

const stageName = (stage: Stage): string =>
  stage.symbol !== '' ? stage.symbol : stage.label !== '' ? `“${stage.label}”` : 'stage';

const stageAt = (chain: ChainSection, stageId: string): Stage =>
  present(
    chain.stages.find(({ id }) => id === stageId),
    `the stage ${stageId}`,
  );

const withStage = (chain: ChainSection, stage: Stage): readonly Stage[] =>
  chain.stages.map((one) => (one.id === stage.id ? stage : one));

/** Inserts a stage at this place; its id is in the edit. */
export function insertStage(worksheet: Worksheet, sectionId: string, index: number, stage: Stage = newStage()): Edit {
  const chain = chainOf(worksheet, sectionId);
  assert(!chain.stages.some(({ id }) => id === stage.id), `the stage ${stage.id} is new`);
  const at = Math.max(0, Math.min(index, chain.stages.length));
  return stagesEdit('Insert stage', chain, chain.stages.toSpliced(at, 0, stage));
}

/** Puts a copy below the stage, under a symbol of its own. */
export function duplicateStage(worksheet: Worksheet, sectionId: string, stageId: string): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const symbol = freeSymbol(stage.symbol, new Set(chain.stages.map((one) => one.symbol)));
  const copy = { ...stage, id: newShortId(), symbol };
  return stagesEdit(
    `Duplicate ${stageName(stage)}`,
    chain,
    chain.stages.toSpliced(chain.stages.indexOf(stage) + 1, 0, copy),
  );
}

export function deleteStage(worksheet: Worksheet, sectionId: string, stageId: string): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  return stagesEdit(
    `Delete ${stageName(stage)}`,
    chain,
    chain.stages.filter(({ id }) => id !== stageId),
  );
}

/** Moves a stage to the place with this index, counted after it has been taken out. */
export function moveStageTo(worksheet: Worksheet, sectionId: string, stageId: string, index: number): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const others = chain.stages.filter(({ id }) => id !== stageId);
  const at = Math.max(0, Math.min(index, others.length));
  return stagesEdit(`Move ${stageName(stage)}`, chain, others.toSpliced(at, 0, stage));
}

/** Bypasses a stage, or puts it back. */
export function setStageOff(worksheet: Worksheet, sectionId: string, stageId: string, off: boolean): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const after = withKey(stage, 'off', off ? true : undefined, STAGE_KEYS);
  return stagesEdit(`${off ? 'Bypass' : 'Put back'} ${stageName(stage)}`, chain, withStage(chain, after));
}

/**
 * Sets what a stage says: its own value, or with `caseId` the one that stands in its place in that case. In a case, an empty
 * text lets the case use the stage's own value again, and typing what it has anyway makes no override.
 */
export function setStageValue(
  worksheet: Worksheet,
  sectionId: string,
  stageId: string,
  field: StageField,
  text: string,
  caseId?: string,
): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const value = text.trim();
  if (caseId === undefined) {
    const after = withKey(stage, field, value === '' ? undefined : value, STAGE_KEYS);
    return stagesEdit(`Change ${stageName(stage)}`, chain, withStage(chain, withCurrentAnswers(after, field)));
  }
  const one = caseOf(worksheet, caseId);
  const label = `Change ${stageName(stage)} for ${one.name}`;
  const overrides = new Map(Object.entries(stage.byCase?.[caseId] ?? {}));
  const before = stageOverrideIn(stage, field, caseId);
  if (value === '' || (before === undefined && value === stageEntryIn(stage, field))) overrides.delete(field);
  else overrides.set(field, value);
  const cases = new Map(Object.entries(stage.byCase ?? {}));
  if (overrides.size === 0) cases.delete(caseId);
  else cases.set(caseId, Object.fromEntries(overrides));
  const byCase = cases.size === 0 ? undefined : Object.fromEntries(cases);
  const after = before === undefined && overrides.size === 0 ? stage : withKey(stage, 'byCase', byCase, STAGE_KEYS);
  return stagesEdit(label, chain, withStage(chain, withCurrentAnswers(after, field)));
}

/** Answers last while one of the field's texts is the one that they were given for. */
function withCurrentAnswers(stage: Stage, field: StageField): Stage {
  const answers = stage.accepted?.[field];
  if (answers === undefined) return stage;
  const texts = new Set([stage[field], ...Object.values(stage.byCase ?? {}).map((values) => values[field])]);
  const kept = answers.filter(({ entry }) => texts.has(entry));
  return kept.length === answers.length ? stage : withAnswers(stage, field, kept);
}

function withAnswers(stage: Stage, field: StageField, answers: readonly AcceptedFinding[]): Stage {
  const accepted = new Map(Object.entries(stage.accepted ?? {}));
  if (answers.length === 0) accepted.delete(field);
  else accepted.set(field, answers);
  return withKey(stage, 'accepted', accepted.size === 0 ? undefined : Object.fromEntries(accepted), STAGE_KEYS);
}

/** Answers a finding on a stage's value with a reason, in place of an earlier answer to the same; or takes the answer back. */
export function answerStageFinding(
  worksheet: Worksheet,
  sectionId: string,
  stageId: string,
  field: StageField,
  answer: Pick<AcceptedFinding, 'code' | 'entry'> & { readonly reason?: string },
): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const { code, entry, reason } = answer;
  const others = (stage.accepted?.[field] ?? []).filter((one) => one.code !== code || one.entry !== entry);
  const answers = reason === undefined ? others : [...others, { code, entry, reason }];
  const verb = reason === undefined ? 'Take back an accepted finding' : 'Accept a finding';
  return stagesEdit(`${verb} on ${stageName(stage)}`, chain, withStage(chain, withAnswers(stage, field, answers)));
}

/** Says how far a stage's value may be off; undefined takes the tolerance away. */
export function setStageTolerance(
  worksheet: Worksheet,
  sectionId: string,
  stageId: string,
  field: StageField,
  tolerance: Tolerance | undefined,
): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const all = new Map(Object.entries(stage.tolerance ?? {}));
  const isSame = all.get(field) === tolerance;
  if (tolerance === undefined) all.delete(field);
  else all.set(field, tolerance);
  const after = isSame
    ? stage
    : withKey(stage, 'tolerance', all.size === 0 ? undefined : Object.fromEntries(all), STAGE_KEYS);
  return stagesEdit(`Change a tolerance of ${stageName(stage)}`, chain, withStage(chain, after));
}

/** Answers a finding on the chain, or on a stage as a whole, with a reason; or takes the answer back. */
export function answerChainFinding(
  worksheet: Worksheet,
  sectionId: string,
  answer: Pick<AcceptedFinding, 'code' | 'entry'> & { readonly reason?: string },
): Edit {
  const chain = chainOf(worksheet, sectionId);
  const { code, entry, reason } = answer;
  const others = (chain.accepted ?? []).filter((one) => one.code !== code || one.entry !== entry);
  const accepted = reason === undefined ? others : [...others, { code, entry, reason }];
  if (reason === undefined && others.length === (chain.accepted?.length ?? 0)) return edit('Nothing', chain, []);
  return edit(
    `${reason === undefined ? 'Take back an accepted finding' : 'Accept a finding'} on ${chain.symbol}`,
    chain,
    [{ kind: 'set-section', sectionId, field: 'accepted', value: accepted.length === 0 ? undefined : accepted }],
  );
}

/** Sets a stage's label, source or note. */
export function setStageText(
  worksheet: Worksheet,
  sectionId: string,
  stageId: string,
  field: 'label' | 'source' | 'note',
  text: string,
): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const kept = text === '' && field !== 'label' ? undefined : text;
  return stagesEdit(`Change ${stageName(stage)}`, chain, withStage(chain, withKey(stage, field, kept, STAGE_KEYS)));
}

/** What speaks against giving a stage this symbol, as a sentence, or undefined. Stages of other chains may have it. */
export function stageSymbolProblem(chain: ChainSection, stageId: string, symbol: string): string | undefined {
  const fault = symbolFault(symbol);
  if (fault !== undefined) return fault;
  return chain.stages.some((stage) => stage.symbol === symbol && stage.id !== stageId)
    ? `Another stage of this chain has the symbol ${symbol}; choose a free one.`
    : undefined;
}

/** Gives a stage another symbol; uses of its values, such as rx.lna.gain, are rewritten. */
export function setStageSymbol(worksheet: Worksheet, sectionId: string, stageId: string, symbol: string): Edit {
  const chain = chainOf(worksheet, sectionId);
  const stage = stageAt(chain, stageId);
  const to = symbol.trim();
  const label = `Rename ${stageName(stage)} to ${to === '' ? 'nothing' : to}`;
  const after = { ...chain, stages: withStage(chain, withKey(stage, 'symbol', to, STAGE_KEYS)) };
  if (to === stage.symbol) return edit(label, chain, []);
  const isAlone = chain.stages.every((one) => one.id === stageId || (one.symbol !== stage.symbol && one.symbol !== to));
  const isRewritable = isAlone && symbolFault(stage.symbol) === undefined && symbolFault(to) === undefined;
  if (!isRewritable) return edit(label, chain, chainChanges(chain, after));
  const sections = worksheet.sections.map((section) => (section.id === sectionId ? after : section));
  const from = `${chain.symbol}.${stage.symbol}`;
  const rewritten = rewriting({ ...worksheet, sections }, from, `${chain.symbol}.${to}`);
  // The rewriting of this very chain, if any, begins from its new stages.
  const isRewrittenToo = rewritten.some(
    (change) => change.kind === 'set-section' && change.sectionId === sectionId && change.field === 'stages',
  );
  return edit(label, chain, isRewrittenToo ? rewritten : [...chainChanges(chain, after), ...rewritten]);
}

/** Sets where the chain takes its signal, source temperature, bandwidth or interferer from. */
export function setChainInput(worksheet: Worksheet, sectionId: string, field: ChainInput, text: string): Edit {
  const chain = chainOf(worksheet, sectionId);
  const value = text.trim() === '' ? undefined : text.trim();
  const isSame = chain[field] === value;
  return edit(
    `Change the ${field} of ${chain.symbol}`,
    chain,
    isSame ? [] : [{ kind: 'set-section', sectionId, field, value }],
  );
}

export function setInterceptAddition(worksheet: Worksheet, sectionId: string, addition: InterceptAddition): Edit {
  const chain = chainOf(worksheet, sectionId);
  const isSame = (chain.intercept ?? 'coherent') === addition;
  return edit(
    `Add the intercepts of ${chain.symbol} ${addition === 'coherent' ? 'in phase' : 'as powers'}`,
    chain,
    isSame ? [] : [{ kind: 'set-section', sectionId, field: 'intercept', value: addition }],
  );
}
