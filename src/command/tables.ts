/**
 * Results as tables: plain text, Markdown, and CSV (RFC 4180). In CSV, text that another program might take for a formula
 * gets an apostrophe in front; numbers are full precision and never touched.
 */
import type { Figure } from '../engine';
import { linearFigure, linearValue, writeQuantity } from '../quantity';
import { CAUTIONS } from '../review';
import { isLinesSection, type Line, type Worksheet } from '../worksheet';
import type { Selection } from './evaluate';
import { oneLine } from './plain-text';
import { boundText, standingText } from './requirement-text';

/** A figure in words, also when there is none. */
export function figureText(figure: Figure, line: Line, linear: boolean): string {
  switch (figure.state) {
    case 'value': {
      const text = writeQuantity(figure.value, figure.unit, {
        isFitted: figure.isFitted,
        minus: '-',
        ...(line.digits === undefined ? {} : { digits: line.digits }),
        ...(figure.digits === undefined ? {} : { typedDigits: figure.digits }),
      });
      const other = linear ? linearFigure(figure.value, figure.unit) : undefined;
      if (other === undefined) return text;
      return other.unit === '×' ? `${text} (× ${other.text})` : `${text} (${other.text} ${other.unit})`;
    }
    case 'withheld':
      return 'withheld';
    case 'waiting':
      return `waits for ${figure.roots.join(', ')}`;
    case 'empty':
      return '';
  }
}

interface Row {
  readonly line: Line;
  readonly cells: readonly string[];
}

function rowsOf(selection: Selection, lines: readonly Line[]): Row[] {
  const { evaluation, cases, linear } = selection;
  return lines.map((line) => ({
    line,
    cells: [
      line.symbol,
      line.off === true ? `${line.label} (switched off)` : line.label,
      ...cases.map(({ id }) => figureText(evaluation.reading(line.id, id).figure, line, linear)),
      requirementCell(selection, line),
    ].map(oneLine),
  }));
}

/** The requirement with how each case stands to it. */
function requirementCell(selection: Selection, line: Line): string {
  if (line.requirement === undefined) return '';
  const cases = selection.cases.map(
    ({ id, name }) =>
      `${selection.cases.length > 1 ? `${name}: ` : ''}${standingText(selection.evaluation.reading(line.id, id))}`,
  );
  return `${boundText(line.requirement)}; ${cases.join('; ')}`;
}

const headOf = ({ cases }: Selection): string[] =>
  ['Symbol', 'Line', ...cases.map(({ name }) => name), 'Requirement'].map(oneLine);

/** Lines by section, sections without chosen lines left out. */
function sectionsOf({ evaluation, lines }: Selection): { title: string; lines: readonly Line[] }[] {
  const bySection = new Map<string, Line[]>();
  const homes = new Map(allLinesWithSection(evaluation.worksheet));
  for (const line of lines) {
    const sectionId = homes.get(line.id) ?? evaluation.originOf(line.id)?.sectionId ?? '';
    const known = bySection.get(sectionId);
    if (known === undefined) bySection.set(sectionId, [line]);
    else known.push(line);
  }
  return evaluation.worksheet.sections.flatMap(({ id, title }) => {
    const own = bySection.get(id);
    return own === undefined ? [] : [{ title, lines: own }];
  });
}

const allLinesWithSection = ({ sections }: Worksheet): [string, string][] =>
  sections.flatMap((section) =>
    isLinesSection(section) ? section.lines.map(({ id }): [string, string] => [id, section.id]) : [],
  );

/** As `sectionsOf`, for people: what has come about behind each stage of a chain is left to other formats. */
function sectionsToRead(selection: Selection): { title: string; lines: readonly Line[] }[] {
  const isToRead = ({ id, entry }: Line): boolean => {
    const origin = selection.evaluation.originOf(id);
    return origin?.stageId === undefined || entry !== '' || selection.isByName;
  };
  return sectionsOf(selection)
    .map(({ title, lines }) => ({ title, lines: lines.filter(isToRead) }))
    .filter(({ lines }) => lines.length > 0);
}

function findingTexts({ evaluation, findings, cases }: Selection): string[] {
  return findings.map((finding) => {
    const line = evaluation.line(finding.lineId);
    const inCases = finding.caseIds.length === cases.length ? '' : ` (${finding.caseIds.join(', ')})`;
    const accepted = finding.accepted === undefined ? '' : ` Accepted: ${finding.accepted}`;
    const name = line?.symbol || line?.label || finding.lineId;
    return oneLine(`${finding.severity} ${finding.code}: ${name}${inCases}: ${finding.message}${accepted}`);
  });
}

/** How many columns of a terminal a text takes, by code points: figures and symbols hold none that take two. */
const columnsOf = (text: string): number => Array.from(text).length;

/** Columns padded to their widest cell; trailing blanks are dropped. */
export function writeText(selection: Selection): string {
  const head = headOf(selection);
  const sections = sectionsToRead(selection).map(({ title, lines }) => ({ title, rows: rowsOf(selection, lines) }));
  const all = [head, ...sections.flatMap(({ rows }) => rows.map(({ cells }) => cells))];
  const widths = head.map((_, column) => Math.max(...all.map((cells) => columnsOf(cells[column] ?? ''))));
  const isFigure = (column: number): boolean => column >= 2 && column < head.length - 1;
  const write = (cells: readonly string[]): string =>
    cells
      .map((cell, column) => {
        const blank = ' '.repeat(Math.max(0, (widths[column] ?? 0) - columnsOf(cell)));
        return isFigure(column) ? blank + cell : cell + blank;
      })
      .join('  ')
      .trimEnd();
  const findings = findingTexts(selection);
  return [
    oneLine(selection.evaluation.worksheet.title),
    '',
    write(head),
    ...sections.flatMap(({ title, rows }) => ['', oneLine(title), ...rows.map(({ cells }) => write(cells))]),
    ...(findings.length === 0 ? [] : ['', ...findings]),
    '',
    ...CAUTIONS,
    '',
  ].join('\n');
}

const escapeMarkdown = (text: string): string => oneLine(text).replace(/[\\`*_[\]<>|#&~$]/g, '\\$&');

/** A Markdown document: a table a section, findings and cautions as lists. */
export function writeMarkdown(selection: Selection): string {
  const head = headOf(selection);
  const row = (cells: readonly string[]): string => `| ${cells.map(escapeMarkdown).join(' | ')} |`;
  const rule = `| ${head.map((_, column) => (column >= 2 && column < head.length - 1 ? '---:' : '---')).join(' | ')} |`;
  const list = (items: readonly string[]): string[] => items.map((item) => `- ${escapeMarkdown(item)}`);
  const findings = findingTexts(selection);
  return [
    `# ${escapeMarkdown(selection.evaluation.worksheet.title)}`,
    ...sectionsToRead(selection).flatMap(({ title, lines }) => [
      '',
      `## ${escapeMarkdown(title)}`,
      '',
      row(head),
      rule,
      ...rowsOf(selection, lines).map(({ cells }) => row(cells)),
    ]),
    ...(findings.length === 0 ? [] : ['', '## Findings', '', ...list(findings)]),
    '',
    '## Cautions',
    '',
    ...list(CAUTIONS),
    '',
  ].join('\n');
}

// Blanks and characters that are not seen may stand ahead of the sign.
const LOOKS_LIKE_FORMULA = /^[\s\p{C}]*[=+\-@\t\r\n＝＋－＠]/u;

export const csvText = (text: string): string => csvCell(LOOKS_LIKE_FORMULA.test(text) ? `'${text}` : text);
const csvCell = (text: string): string => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** One row a line and case, values in full. */
export function writeCsv(selection: Selection): string {
  const { evaluation, cases, linear } = selection;
  const head = [
    'section',
    'symbol',
    'label',
    'case',
    'value',
    'unit',
    ...(linear ? ['linear', 'linear unit'] : []),
    'requirement',
    'met',
    'margin',
    'margin unit',
    'findings',
  ];
  const rows = sectionsOf(selection).flatMap(({ title, lines }) =>
    lines.flatMap((line) =>
      cases.map(({ id }) => {
        const { figure, requirement } = evaluation.reading(line.id, id);
        const isValue = figure.state === 'value';
        const other = isValue ? linearValue(figure.value, figure.unit) : undefined;
        const codes = selection.findings
          .filter(({ lineId, caseIds }) => lineId === line.id && caseIds.includes(id))
          .map(({ code }) => code);
        return [
          csvText(title),
          csvText(line.symbol),
          csvText(line.label),
          csvText(id),
          isValue && Number.isFinite(figure.value) ? String(figure.value) : '',
          csvText(isValue ? figure.unit.word : ''),
          ...(linear
            ? [
                other === undefined || !Number.isFinite(other.value) ? '' : String(other.value),
                csvText(other?.unit ?? ''),
              ]
            : []),
          csvText(line.requirement === undefined ? '' : boundText(line.requirement)),
          requirement === undefined ? '' : requirement.met ? 'yes' : 'no',
          requirement === undefined || !Number.isFinite(requirement.margin) ? '' : String(requirement.margin),
          csvText(requirement?.unit ?? ''),
          csvText(codes.join(' ')),
        ];
      }),
    ),
  );
  return [head, ...rows].map((cells) => `${cells.join(',')}\r\n`).join('');
}
