/**
 * What the cells of a line-up hold as text, and the edits that typing there makes.
 * Holds: an entry is kept as typed, also when it cannot be read; only symbols may be refused, with a sentence. In a case,
 * typing changes the override that counts there; it makes one when a person has asked for entries of this case alone.
 */
import { fail, ok, type Result } from '../../base';
import {
  insertStage,
  newStage,
  setStageSymbol,
  setStageText,
  setStageValue,
  STAGE_FIELDS,
  stageEntryIn,
  stageOverrideIn,
  stageSymbolProblem,
  type ChainSection,
  type Edit,
  type Stage,
  type StageField,
  type Worksheet,
} from '../../worksheet';
import type { ChainColumnKey } from '../../app/chain-columns';

/** The cells of a row: what to do with the stage, whether it counts, its name, its columns. */
export type ChainCellName = 'place' | 'on' | 'symbol' | 'label' | ChainColumnKey;

/** The row below the stages, in which a new one begins. */
export const ADD_ROW = 'add';

/** What is typed where, and for which case. */
export interface TypedPlace {
  readonly row: string;
  readonly cell: ChainCellName;
  /** The case chosen, and whether entries are for it alone. */
  readonly caseId: string;
  readonly onlyThisCase: boolean;
}

/** The cell as a value of a stage, or undefined. */
export const fieldOf = (cell: ChainCellName): StageField | undefined => STAGE_FIELDS.find((field) => field === cell);

/** True for cells that a person can type in. */
export function isTypedIn(row: string, cell: ChainCellName): boolean {
  if (row === ADD_ROW) return cell === 'symbol';
  return cell === 'symbol' || cell === 'label' || fieldOf(cell) !== undefined;
}

export const stageIn = (chain: ChainSection, row: string): Stage | undefined =>
  chain.stages.find(({ id }) => id === row);

/** The case for which typing counts; undefined: the stage's own value, in all cases. */
export function caseConcerned(worksheet: Worksheet, stage: Stage, place: TypedPlace): string | undefined {
  const field = fieldOf(place.cell);
  if (field === undefined || worksheet.cases.length < 2) return undefined;
  const isOverridden = stageOverrideIn(stage, field, place.caseId) !== undefined;
  return place.onlyThisCase || isOverridden ? place.caseId : undefined;
}

/** The text with which an editor opens. */
export function textInStage(chain: ChainSection, { row, cell, caseId }: TypedPlace): string {
  const stage = stageIn(chain, row);
  if (stage === undefined) return '';
  const field = fieldOf(cell);
  if (field !== undefined) return stageEntryIn(stage, field, caseId);
  return cell === 'symbol' || cell === 'label' ? stage[cell] : '';
}

/** Why a text cannot be kept, as a sentence; undefined when it can. */
export function refusalInStage(chain: ChainSection, { row, cell }: TypedPlace, text: string): string | undefined {
  const symbol = text.trim();
  if (cell !== 'symbol' || symbol === '' || symbol === stageIn(chain, row)?.symbol) return undefined;
  return stageSymbolProblem(chain, row, symbol);
}

/** The edit that a text makes; a fault is the sentence that says why it cannot be kept. `stageId`: the row it is then in. */
export function editInStage(
  worksheet: Worksheet,
  chain: ChainSection,
  place: TypedPlace,
  text: string,
): Result<{ readonly edit: Edit; readonly stageId: string }, string> {
  const refused = refusalInStage(chain, place, text);
  if (refused !== undefined) return fail(refused);
  const { row, cell } = place;
  if (row === ADD_ROW) {
    const stage = newStage({ symbol: text.trim() });
    return ok({ edit: insertStage(worksheet, chain.id, chain.stages.length, stage), stageId: stage.id });
  }
  const stage = stageIn(chain, row);
  const field = fieldOf(cell);
  const kept = (edit: Edit): Result<{ edit: Edit; stageId: string }, string> => ok({ edit, stageId: row });
  if (stage === undefined) return kept({ label: 'Nothing', changes: [] });
  if (field !== undefined)
    return kept(setStageValue(worksheet, chain.id, row, field, text, caseConcerned(worksheet, stage, place)));
  if (cell === 'symbol') return kept(setStageSymbol(worksheet, chain.id, row, text));
  return kept(setStageText(worksheet, chain.id, row, 'label', text.trim()));
}
