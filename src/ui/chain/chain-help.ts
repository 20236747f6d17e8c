/**
 * What an editor of a chain shows beside it: suggestions, the signature of the call being typed, and what the text would give.
 * Holds: nothing here changes the worksheet; an empty text has no preview.
 */
import type { Session } from '../../app/session.svelte';
import { FUNCTIONS } from '../../formula';
import { completionsAt } from '../../formula/complete';
import { callAt } from '../grid/call-at';
import type { EditorHelpContent, Typed } from '../grid/editor-help';

export const NO_HELP: EditorHelpContent = { completions: [] };
const MOST_SUGGESTIONS = 12;

/** Which entry of a chain: `lineId` is that of its item, which is not there before something is typed. */
export interface EntryPlace {
  readonly sectionId: string;
  readonly lineId: string;
}

/** The help for an entry of a chain. */
export function helpForChainEntry(session: Session, place: EntryPlace, typed: Typed): EditorHelpContent {
  const { text, caret, suggesting } = typed;
  const { lineId } = place;
  const completions = suggesting
    ? completionsAt(text, caret, symbolsFor(session, place)).slice(0, MOST_SUGGESTIONS)
    : [];
  const call = callAt(text, caret);
  const entry = call === undefined ? undefined : FUNCTIONS.find((one) => one.name === call.name);
  return {
    completions,
    ...(call === undefined || entry === undefined ? {} : { call: { entry, argument: call.argument } }),
    ...previewOf(session, lineId, text.trim()),
  };
}

function previewOf(session: Session, lineId: string, entry: string): Pick<EditorHelpContent, 'preview' | 'repair'> {
  if (entry === '') return {};
  const { evaluation, selectedCaseId } = session;
  const { reading, findings } =
    evaluation.line(lineId) === undefined
      ? evaluation.previewNew(selectedCaseId, entry)
      : evaluation.preview(lineId, selectedCaseId, entry);
  const finding = findings.find((one) => one.code !== 'waiting');
  const repair = finding?.repairs.find((one) => one.kind === 'entry');
  return {
    preview: { reading, ...(finding === undefined ? {} : { finding }) },
    ...(repair === undefined ? {} : { repair: repair.entry }),
  };
}

/** What can be called there: of the chain itself only what is typed, since what it computes rests on this entry. */
function symbolsFor(session: Session, { sectionId, lineId }: EntryPlace): { symbol: string; label: string }[] {
  const { evaluation } = session;
  return evaluation.lines().flatMap(({ id, symbol, label }) => {
    const origin = evaluation.originOf(id);
    const isOwnFigure = origin?.sectionId === sectionId && origin.field === undefined;
    return symbol === '' || id === lineId || isOwnFigure ? [] : [{ symbol, label }];
  });
}
