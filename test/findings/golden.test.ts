/**
 * Every finding code has a golden example under test/golden/findings: a small worksheet, the line that has the finding, the
 * figures that its message must hold, the repair, and the figure once it is repaired. A code without one fails here.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { CATALOGUE, FINDING_CODES, type FindingCode, type Repair, type Severity } from '../../src/findings';
import { Evaluation, type LineFinding } from '../../src/engine';
import { applyAll, applyRepair, type Change, type Line, type Section, type Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

interface Golden {
  readonly severity: Severity;
  /** The worksheet in the notation of lines, or whole sections as a file holds them. */
  readonly lines?: readonly string[];
  readonly sections?: readonly Section[];
  /** The sections put right by hand, and the symbol whose figure then is `after`. */
  readonly mended?: readonly Section[];
  readonly of?: string;
  /** Symbol of the line that has the finding; `#2` is the second line. */
  readonly on: string;
  /** What the message must contain: both figures, where there are two. */
  readonly says: readonly string[];
  readonly derivation: string;
  /** The repair: of the line itself when it is offered; otherwise by hand, perhaps of another line. */
  readonly repair?: {
    readonly line?: string;
    readonly entry?: string;
    readonly unit?: string;
    readonly quantity?: string;
    readonly symbol?: string;
  };
  readonly offered?: boolean;
  readonly after: string;
}

const folder = new URL('../golden/findings/', import.meta.url);
const goldens = readdirSync(folder)
  .sort()
  .map((file) => ({
    code: file.replace('.json', '') as FindingCode,
    golden: JSON.parse(readFileSync(new URL(file, folder), 'utf8')) as Golden,
  }));

function lineOf(evaluation: Evaluation, symbol: string): Line {
  const lines = evaluation.lines();
  const line = symbol.startsWith('#') ? lines[Number(symbol.slice(1)) - 1] : lines.find((one) => one.symbol === symbol);
  if (line === undefined) throw new Error(`there is no line ${symbol}`);
  return line;
}

const worksheetOf = (lines: readonly string[] | undefined, sections: readonly Section[] | undefined): Worksheet =>
  lines === undefined
    ? { id: 'w', title: '', cases: [{ id: 'nominal', name: 'Nominal' }], sections: sections ?? [] }
    : sheetOf(lines.join('\n'));

/** The line, or what stands for one in a chain, on which a finding is, by its symbol or label. */
function itemOf(evaluation: Evaluation, code: FindingCode, on: string): Line {
  const found = evaluation.sheetFindings().filter((finding) => finding.code === code);
  const lines = found.flatMap(({ lineId }) => evaluation.line(lineId) ?? []);
  const line = lines.find(({ symbol, label }) => symbol === on || label === on);
  if (line === undefined) throw new Error(`${code} is on ${lines.map(({ label }) => label).join(', ')}, not on ${on}`);
  return line;
}

/** The changes that put other sections in the place of all. */
const replacing = (worksheet: Worksheet, sections: readonly Section[]): readonly Change[] => [
  ...worksheet.sections.map(({ id }): Change => ({ kind: 'remove-section', sectionId: id })),
  ...sections.map((section, index): Change => ({ kind: 'insert-section', index, section })),
];

const findingOf = (evaluation: Evaluation, lineId: string, code: FindingCode): LineFinding | undefined =>
  evaluation.findings(lineId).find((finding) => finding.code === code);

function isRepair(repair: Repair, wanted: NonNullable<Golden['repair']>): boolean {
  switch (repair.kind) {
    case 'entry':
      return repair.entry === wanted.entry;
    case 'unit':
      return repair.unit === wanted.unit;
    case 'quantity':
      return repair.quantity === wanted.quantity;
  }
}

/** The changes that put the worksheet right. */
function mending(
  worksheet: Worksheet,
  evaluation: Evaluation,
  code: FindingCode,
  { on, repair = {}, offered = false }: Golden,
): readonly Change[] {
  const line = lineOf(evaluation, offered ? on : (repair.line ?? on));
  if (offered) {
    const found = findingOf(evaluation, line.id, code)?.repairs.find((one) => isRepair(one, repair));
    if (found === undefined)
      throw new Error(`the repair is not offered: ${JSON.stringify(findingOf(evaluation, line.id, code)?.repairs)}`);
    return applyRepair(worksheet, line.id, found).changes;
  }
  return [
    ...(repair.entry === undefined
      ? []
      : [{ kind: 'set-line', lineId: line.id, field: 'entry', value: repair.entry } as const]),
    ...(repair.symbol === undefined
      ? []
      : [{ kind: 'set-line', lineId: line.id, field: 'symbol', value: repair.symbol } as const]),
  ];
}

function written(evaluation: Evaluation, lineId: string, like: string): string {
  const figure = evaluation.figure(lineId, 'nominal');
  if (figure.state !== 'value') return figure.state;
  const decimals = (/\.(\d+)/.exec(like)?.[1] ?? '').length;
  return `${figure.value.toFixed(decimals)} ${figure.unit.word}`.replace(/ 1$/, '');
}

describe('golden findings', () => {
  it('are there for every code, and for none that does not exist', () => {
    expect(goldens.map(({ code }) => code)).toEqual([...FINDING_CODES].sort());
  });

  describe.each(goldens)('$code', ({ code, golden }) => {
    const worksheet = worksheetOf(golden.lines, golden.sections);
    const evaluation = new Evaluation(worksheet);
    const line = golden.sections === undefined ? lineOf(evaluation, golden.on) : itemOf(evaluation, code, golden.on);
    const { id } = line;

    it('is found on its line, with its severity, once', () => {
      const found = evaluation.findings(id).filter((finding) => finding.code === code);
      expect(found.map(({ severity, lineId, caseIds }) => ({ severity, lineId, caseIds }))).toEqual([
        { severity: golden.severity, lineId: id, caseIds: ['nominal'] },
      ]);
      expect(CATALOGUE[code].severity).toBe(golden.severity);
    });

    it('withholds the figure only when it is an error', () => {
      const { state } = evaluation.figure(id, 'nominal');
      if (golden.severity !== 'error') expect(state).toBe('value');
      else expect(state).toBe(code === 'waiting' ? 'waiting' : 'withheld');
    });

    it('says what the line does and what was meant, with the figures', () => {
      const message = findingOf(evaluation, id, code)?.message ?? '';
      expect(golden.says.filter((part) => !message.includes(part))).toEqual([]);
      expect(message).not.toMatch(/undefined|NaN|\[object/);
      expect(message.endsWith('.') || message.endsWith('?') || /[).\w”]$/.test(message)).toBe(true);
    });

    it('stands at a place inside the entry, or nowhere', () => {
      const finding = findingOf(evaluation, id, code);
      const { entry } = line;
      if (finding?.place === undefined) return;
      expect(finding.place.start).toBeGreaterThanOrEqual(0);
      expect(finding.place.end).toBeLessThanOrEqual(entry.length);
      expect(finding.place.start).toBeLessThan(finding.place.end);
    });

    it(
      golden.offered === true
        ? 'is gone after the repair it offers, and the figure is right'
        : 'is gone once mended by hand, and the figure is right',
      () => {
        const { mended, of: result = golden.on } = golden;
        const changes =
          mended === undefined ? mending(worksheet, evaluation, code, golden) : replacing(worksheet, mended);
        const repaired = applyAll(worksheet, changes).worksheet;
        evaluation.edit(repaired, changes);
        expect(evaluation.sheetFindings().filter((finding) => finding.code === code)).toEqual([]);
        const after = golden.sections === undefined ? id : lineOf(evaluation, result).id;
        expect(written(evaluation, after, golden.after)).toBe(golden.after);
        expect(evaluation.findings(after).filter(({ severity }) => severity !== 'note')).toEqual([]);
      },
    );
  });
});
