/**
 * What the editor shows beside the cell: suggestions, the signature of the call that is being typed, and what the text would
 * give if it were kept.
 * Holds: nothing here changes the worksheet; an empty text has no preview.
 */
import type { Session } from '../../app/session.svelte';
import type { Finding } from '../../findings';
import { FUNCTIONS, type FunctionEntry } from '../../formula';
import { completionsAt, type Completion } from '../../formula/complete';
import type { Reading } from '../../engine';
import { isCurveSection, proposeSymbol, symbolsIn } from '../../worksheet';
import { callAt } from './call-at';
import { caseTyped, holdsEntry } from './cell-texts';
import type { CellName } from './columns';
import type { Row } from './rows';

/** What the editor shows. */
export interface EditorHelpContent {
  readonly completions: readonly Completion[];
  readonly call?: { readonly entry: FunctionEntry; readonly argument: number };
  readonly preview?: { readonly reading: Reading; readonly finding?: Finding; readonly digits?: number };
  /** What the first repair of the preview's finding would have stand there. */
  readonly repair?: string;
}

/** What is in the editor. */
export interface Typed {
  readonly text: string;
  readonly caret: number;
  /** Whether suggestions are wanted. */
  readonly suggesting: boolean;
}

const NOTHING: EditorHelpContent = { completions: [] };
const MOST_SUGGESTIONS = 12;

/** The help for what is typed in a cell. */
export function helpFor(session: Session, row: Row, cell: CellName, typed: Typed): EditorHelpContent {
  if (cell === 'symbol') return helpForSymbol(session, row, typed);
  if (!holdsEntry(cell)) return NOTHING;
  const { text, caret, suggesting } = typed;
  const completions = suggesting ? completionsAt(text, caret, symbolsFor(session, row)).slice(0, MOST_SUGGESTIONS) : [];
  const call = callAt(text, caret);
  const entry = call === undefined ? undefined : FUNCTIONS.find((one) => one.name === call.name);
  return {
    completions,
    ...(call === undefined || entry === undefined ? {} : { call: { entry, argument: call.argument } }),
    ...previewOf(session, row, cell, text),
  };
}

function previewOf(
  session: Session,
  row: Row,
  cell: CellName,
  text: string,
): Pick<EditorHelpContent, 'preview' | 'repair'> {
  const line = row.kind === 'line' ? row.line : undefined;
  const entry = text.trim();
  if (entry === '') return {};
  const caseId = caseTyped(session.worksheet, cell) ?? session.selectedCaseId;
  const { evaluation } = session;
  const { reading, findings } =
    line === undefined ? evaluation.previewNew(caseId, entry) : evaluation.preview(line.id, caseId, entry);
  const finding = findings.find((one) => one.code !== 'waiting');
  const repair = finding?.repairs.find((one) => one.kind === 'entry');
  const digits = line?.digits;
  return {
    preview: {
      reading,
      ...(finding === undefined ? {} : { finding }),
      ...(digits === undefined ? {} : { digits }),
    },
    ...(repair === undefined ? {} : { repair: repair.entry }),
  };
}

/** A line's own symbol is of no use in its entry. */
function symbolsFor(session: Session, row: Row): { symbol: string; label: string }[] {
  const own = row.kind === 'line' ? row.line.id : undefined;
  const curves = session.worksheet.sections
    .filter(isCurveSection)
    .map(({ symbol, title }) => ({ symbol, label: title }));
  return session.evaluation
    .lines()
    .filter((line) => line.symbol !== '' && line.id !== own)
    .map(({ symbol, label }) => ({ symbol, label }))
    .concat(curves);
}

/** For a line with a label and no symbol yet, one that fits. */
function helpForSymbol(session: Session, row: Row, { text }: Typed): EditorHelpContent {
  if (row.kind !== 'line' || row.line.label === '' || row.line.symbol !== '') return NOTHING;
  const proposal = proposeSymbol(row.line.label, symbolsIn(session.worksheet));
  if (proposal === '' || !proposal.toLowerCase().startsWith(text.toLowerCase()) || proposal === text) return NOTHING;
  const option: Completion = {
    kind: 'symbol',
    text: proposal,
    insert: proposal,
    caretAfter: proposal.length,
    detail: `for ${row.line.label}`,
    replace: { start: 0, end: text.length },
  };
  return { completions: [option] };
}
