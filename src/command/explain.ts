/** `explain`: the working of a line, in words for a terminal. */
import type { LineFinding } from '../engine';
import { RADIATION_CAUTION, tellsRadiation, workingOf, type Piece, type Working, type WorkingTerm } from '../review';
import { isCurveSection, type Case, type Line, type Section } from '../worksheet';
import type { Answer, World } from './answer';
import { exitCodeOf } from './evaluate';
import { chooseCases, lineWithSymbol, nameOfLine, openFile } from './open';
import { oneLine } from './plain-text';
import { boundText, standingText } from './requirement-text';
import { figureText } from './tables';

/** The working of a line in the chosen cases, with its findings. Cases in which nothing differs are told together. */
export function explainLine(file: string, symbol: string, wanted: readonly string[], world: World): Answer {
  const opened = openFile(file, world);
  const { evaluation } = opened;
  const line = lineWithSymbol(opened, symbol);
  const cases = chooseCases(opened, wanted);
  const findings = evaluation.findings(line.id).filter(({ caseIds }) => cases.some(({ id }) => caseIds.includes(id)));
  const nameOf = (id: string): string => {
    const other = evaluation.line(id);
    return other === undefined ? id : nameOfLine(evaluation, other);
  };
  const withoutFigure =
    curveText(evaluation.worksheet.sections.find(({ id: sectionId }) => sectionId === line.id)) ?? 'no entry';
  const told = new Map<string, string[]>();
  for (const { id, name } of cases) {
    const working = workingOf(evaluation, line.id, id);
    if (working === undefined) continue;
    const text = writeWorking(working, line, withoutFigure).join('\n');
    told.set(text, [...(told.get(text) ?? []), name]);
  }
  const title = `${nameOf(line.id)}${line.label === '' ? '' : ` — ${line.label}`}`;
  const workings = [...told].map(([text, names]) => `${oneLine(`${title}, ${inWords(names)}`)}: ${text}\n`);
  const { figure } = evaluation.reading(line.id, cases[0]?.id ?? '');
  const users = evaluation.usedBy(line.id).map(nameOf);
  const notes = [
    ...findings.map((finding) => findingText(finding, cases)),
    ...(line.source === undefined ? [] : [`source: ${line.source}`]),
    ...(line.note === undefined ? [] : [`note: ${line.note}`]),
    ...(users.length === 0 ? [] : [`used by: ${users.join(', ')}`]),
    ...(tellsRadiation(line, figure.state === 'value' ? figure.unit : undefined)
      ? [`caution: ${RADIATION_CAUTION}`]
      : []),
  ];
  return {
    results: `${workings.join('\n')}${notes.map((note) => `${oneLine(note)}\n`).join('')}`,
    messages: opened.messages,
    exitCode: exitCodeOf({ evaluation, cases, lines: [line], findings }),
  };
}

/** What a curve is, in place of the figure that it does not have by itself. */
function curveText(section: Section | undefined): string | undefined {
  if (section === undefined || !isCurveSection(section)) return undefined;
  const { x, y, points, symbol } = section;
  const from = points.map(([at]) => at);
  const over = (label: string, unit: string): string => (unit === '' ? label : `${label} in ${unit}`);
  const range =
    points.length === 0
      ? 'no points yet'
      : `${String(points.length)} points, ${String(Math.min(...from))} to ${String(Math.max(...from))} ${x.unit}`;
  return `a curve, read as ${symbol}(x): ${over(y.label, y.unit)} over ${over(x.label, x.unit)}, ${range}`.trim();
}

/** `Calm`, `Calm and Storm`, `Calm, Storm and Ice`. */
const inWords = (names: readonly string[]): string =>
  names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;

function findingText({ severity, code, message, accepted, caseIds }: LineFinding, cases: readonly Case[]): string {
  const names = cases.filter(({ id }) => caseIds.includes(id)).map(({ name }) => name);
  const where = names.length === cases.length ? '' : ` in ${inWords(names)}`;
  return `${severity} ${code}${where}: ${message}${accepted === undefined ? '' : ` Accepted: ${accepted}`}`;
}

const pieceText = (piece: Piece): string => {
  switch (piece.type) {
    case 'text':
      return piece.text;
    case 'symbol':
      return piece.symbol;
    case 'figure':
      return piece.unit === '' ? piece.text : `${piece.text} ${piece.unit}`;
  }
};

/** The figure, and below it the lines of the working. */
function writeWorking(
  { steps, terms, shares, remarks, reading }: Working,
  line: Line,
  withoutFigure: string,
): string[] {
  const shown = steps.filter(({ title }) => title !== 'result');
  const width = Math.max(0, ...shown.map(({ title }) => title.length));
  const { kind, side } = reading;
  const lines = [
    reading.figure.state === 'empty' ? withoutFigure : figureText(reading.figure, line, true),
    ...shown.map(({ title, pieces }) => `${title.padEnd(width)}  ${pieces.map(pieceText).join('')}`),
    ...(terms.length === 0 ? [] : [shares ? 'contributions' : 'rests on', ...writeTerms(terms)]),
    ...(line.requirement === undefined
      ? []
      : [`requirement: ${boundText(line.requirement)}: ${standingText(reading)}`]),
    ...(kind === undefined
      ? []
      : [
          `kind: ${side === undefined ? '' : `${side.side} `}${kind.kind} (${kind.origin === 'declared' ? 'declared' : `assumed from the ${kind.origin}`})`,
        ]),
    ...remarks,
  ];
  return lines.map((text, index) => `${index === 0 ? '' : '  '}${oneLine(text)}`);
}

function writeTerms(terms: readonly WorkingTerm[]): string[] {
  const rows = terms.map(({ symbol, text, unit, share, label }) => ({
    symbol,
    figure: `${text} ${unit}`,
    share: share === undefined ? '' : shareText(share),
    label,
  }));
  const widest = (column: 'symbol' | 'figure' | 'share'): number => Math.max(...rows.map((row) => row[column].length));
  const [symbols, figures, shares] = [widest('symbol'), widest('figure'), widest('share')];
  const shareWidth = shares === 0 ? 0 : Math.max(9, shares + 2);
  return rows.map(({ symbol, figure, share, label }) =>
    `  ${symbol.padEnd(symbols)}  ${figure.padStart(figures)}${share.padStart(shareWidth)}  ${label}`.trimEnd(),
  );
}

/** A share in per cent; one that would read as none at all is said to be small. */
function shareText(share: number): string {
  const text = `${(share * 100).toFixed(1)} %`.replace('-', '−');
  return share !== 0 && /^−?0\.0 /.test(text) ? 'under 0.1 %' : text;
}
