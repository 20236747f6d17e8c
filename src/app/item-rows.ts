/**
 * What the account shows of sections that are not lists of lines: a chain's stages and outputs, a pool's total, a curve.
 * Holds: every item that has a finding is told by one of these rows, so that none is out of sight.
 */
import { itemsOf, stageItemId, poolTotalId, type Evaluation } from '../engine';
import {
  isChainSection,
  isCurveSection,
  isPoolSection,
  stageEntryIn,
  STAGE_FIELDS,
  type ChainSection,
  type CurveSection,
  type Line,
  type Section,
  type Stage,
  type StageField,
} from '../worksheet';

/** A row about what is no line of the worksheet. */
export interface ItemRow {
  /** The item whose figures it shows; its id is the row's. */
  readonly line: Line;
  readonly symbol: string;
  readonly label: string;
  /** What stands in the place of an entry. */
  readonly summary: string;
  readonly stageId?: string;
  /** What its figure is of, where the row tells of several. */
  readonly figureOf?: string;
  /** True for a stage that is bypassed. */
  readonly isOff: boolean;
}

/** The rows of a section below its heading (of a pool: below its lines). */
export function itemRows(evaluation: Evaluation, section: Section): readonly ItemRow[] {
  if (isPoolSection(section)) return poolRows(evaluation, section.id);
  if (isChainSection(section)) return [...stageRows(evaluation, section), ...outputRows(evaluation, section)];
  return isCurveSection(section) ? curveRows(evaluation, section) : [];
}

/** How a pool's lines add: as powers, signal ratios by their reciprocals, temperatures as they are. */
export function poolRule(evaluation: Evaluation, sectionId: string): string {
  const [first] = evaluation.worksheet.cases;
  const { figure, kind } = evaluation.reading(poolTotalId(sectionId), first?.id ?? '');
  if (kind?.kind === 'signal ratio') return 'adds by reciprocals';
  return figure.state === 'value' && figure.unit.form === 'linear' ? 'adds up' : 'adds as power';
}

function poolRows(evaluation: Evaluation, sectionId: string): ItemRow[] {
  const line = evaluation.line(poolTotalId(sectionId));
  return line === undefined
    ? []
    : [{ line, symbol: line.symbol, label: 'Total', summary: poolRule(evaluation, sectionId), isOff: false }];
}

/** Figures that tell most of a stage, best first, and what they are called in a narrow column. */
const TELLING = [
  ['out.snr', 'S/N'],
  ['out.signal', 'level'],
  ['out.nf', 'NF so far'],
  ['out.gain', 'gain so far'],
] as const;

function stageRows(evaluation: Evaluation, chain: ChainSection): ItemRow[] {
  const { cases } = evaluation.worksheet;
  return chain.stages.flatMap((stage) => {
    const told = TELLING.flatMap(([part, figureOf]) => {
      const line = evaluation.line(stageItemId(chain.id, stage.id, part));
      const isThere = line !== undefined && cases.some((one) => evaluation.figure(line.id, one.id).state !== 'empty');
      return isThere ? [{ line, figureOf }] : [];
    })[0];
    if (told === undefined) return [];
    return [
      {
        ...told,
        symbol: stage.symbol,
        label: stage.label,
        summary: stageSummary(stage),
        stageId: stage.id,
        isOff: stage.off === true,
      },
    ];
  });
}

const SHORT: Readonly<Record<StageField, string>> = {
  gain: '',
  noiseFigure: 'NF ',
  outputIntercept: 'OIP3 ',
  inputIntercept: 'IIP3 ',
  outputIntercept2: 'OIP2 ',
  inputIntercept2: 'IIP2 ',
  outputCompression: 'OP1dB ',
  inputCompression: 'IP1dB ',
  temperature: 'T ',
  noiseBandwidth: 'B ',
  selectivity: 'selectivity ',
};

/** What a stage says, in one line: `15 dB, NF 0.8 dB`. */
export function stageSummary(stage: Stage): string {
  return STAGE_FIELDS.flatMap((field) => {
    const entry = stageEntryIn(stage, field);
    return entry === '' ? [] : [`${SHORT[field]}${entry}`];
  }).join(', ');
}

/** What the chain's own inputs say already. */
const isAtInput = (symbol: string): boolean => /\.in\.[a-z]+$/.test(symbol);

function outputRows(evaluation: Evaluation, chain: ChainSection): ItemRow[] {
  const cases = evaluation.worksheet.cases;
  return itemsOf(chain)
    .filter(
      ({ origin, derived, line }) =>
        origin?.stageId === undefined &&
        derived?.isCheck !== true &&
        derived?.unit !== '%' &&
        line.symbol !== '' &&
        !isAtInput(line.symbol),
    )
    .map(({ line }) => line)
    .filter(({ id, entry }) => entry !== '' || cases.some((one) => evaluation.figure(id, one.id).state !== 'empty'))
    .map((line) => ({ line, symbol: line.symbol, label: line.label, summary: line.entry, isOff: false }));
}

function curveRows(evaluation: Evaluation, curve: CurveSection): ItemRow[] {
  const line = evaluation.line(curve.id);
  const xs = curve.points.map(([x]) => x);
  const count = curve.points.length;
  const range =
    count === 0
      ? 'no points yet'
      : `${String(count)} ${count === 1 ? 'point' : 'points'}, ${String(Math.min(...xs))} to ${String(Math.max(...xs))} ${curve.x.unit}`;
  return line === undefined
    ? []
    : [{ line, symbol: curve.symbol, label: `${curve.y.label} over ${curve.x.label}`, summary: range, isOff: false }];
}

/** The row that tells a finding on an item: its own, its stage's, or the first of its section. */
export function rowOfItem(rows: readonly ItemRow[], evaluation: Evaluation, lineId: string): ItemRow | undefined {
  const origin = evaluation.originOf(lineId);
  return (
    rows.find(({ line }) => line.id === lineId) ??
    rows.find(({ stageId }) => stageId !== undefined && stageId === origin?.stageId) ??
    rows.find(({ stageId }) => stageId === undefined) ??
    rows[0]
  );
}
