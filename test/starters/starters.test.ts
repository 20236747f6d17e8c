/** The starters are complete and correct: their files are canonical, nothing is found, and every figure is the derived one. */
import { readFileSync } from 'node:fs';

import { describe, expect, it } from 'vitest';

import { Evaluation, type Figure } from '../../src/engine';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { STARTERS } from '../../src/starters';
import { allLines, isChainSection, isCurveSection, isPoolSection, type Worksheet } from '../../src/worksheet';

type Derived = number | 'no power';

interface Golden {
  readonly lines: Record<string, { readonly unit: string; readonly cases: Record<string, Derived> }>;
  readonly requirements: Record<
    string,
    { readonly bound: 'at least' | 'at most'; readonly limit: number; readonly margins: Record<string, number> }
  >;
}

const goldenText = (id: string, file: string): string =>
  readFileSync(new URL(`../golden/starters/${id}/${file}`, import.meta.url), 'utf8');

function opened(text: string): Worksheet {
  const read = readWorksheetFile(text);
  if (!read.ok) throw new Error(read.fault.sentence);
  expect(read.value.messages).toEqual([]);
  expect(read.value.readOnly).toBeUndefined();
  return read.value.worksheet;
}

const cases = STARTERS.map((starter) => {
  const worksheet = opened(starter.text);
  const golden = JSON.parse(goldenText(starter.id, 'expected.json')) as Golden;
  return { ...starter, worksheet, golden, evaluation: new Evaluation(worksheet) };
});

/** The figure as the golden files write it. */
const asDerived = (figure: Figure): Derived | undefined =>
  figure.state !== 'value' ? undefined : figure.value === -Infinity ? 'no power' : figure.value;

/** Equal to one part in 10⁹ of `scale`, and of one at least (decibels near nothing); words must be the same words. */
const agrees = (
  found: Derived | undefined,
  derived: Derived | undefined,
  scale: Derived | undefined = derived,
): boolean =>
  typeof found === 'number' && typeof derived === 'number' && typeof scale === 'number'
    ? Math.abs(found - derived) <= 1e-9 * Math.max(1, Math.abs(scale))
    : found !== undefined && found === derived;

it('has five starters, each with ids of its own', () => {
  expect(STARTERS.map(({ id }) => id)).toEqual([
    'harbour-buoy-uplink',
    'ridge-to-ridge-hop',
    'small-satellite-downlink',
    'two-conversion-receiver',
    'satellite-ground-station',
  ]);
  expect(new Set(cases.map(({ worksheet }) => worksheet.id)).size).toBe(5);
});

it('shows chains, a pool and a curve among them', () => {
  const sections = cases.flatMap(({ worksheet }) => worksheet.sections);
  expect(sections.filter(isChainSection).length).toBe(2);
  expect(sections.filter(isPoolSection).length).toBe(1);
  expect(sections.filter(isCurveSection).length).toBe(1);
});

it('comes close to breaking a requirement in an adverse case', () => {
  const adverse = cases.flatMap(({ worksheet, evaluation }) =>
    allLines(worksheet).flatMap((line) => {
      const margin = evaluation.reading(line.id, worksheet.cases[1]?.id ?? '').requirement?.margin;
      return margin === undefined ? [] : [margin];
    }),
  );
  expect(adverse.length).toBeGreaterThan(0);
  expect(Math.min(...adverse)).toBeLessThan(0.5);
});

describe.each(cases)('$title', ({ id, title, summary, text, worksheet, golden, evaluation }) => {
  const lines = allLines(worksheet);
  const chains = worksheet.sections.filter(isChainSection);
  const totals = worksheet.sections.filter(isPoolSection).map(({ symbol }) => symbol);
  /** What the derivation has a figure for: every line, and what chains and pools make. */
  const symbols = Object.keys(golden.lines);

  it('is kept as the canonical text of its file', () => {
    expect(writeWorksheetFile(worksheet)).toBe(text);
  });

  it('is listed under its own title and summary', () => {
    expect({ title: worksheet.title, summary: worksheet.summary }).toEqual({ title, summary });
  });

  it('has a UUID, two cases, four to six sections, and ids and symbols that name one thing', () => {
    expect(worksheet.id).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
    expect(new Set(worksheet.cases.map((one) => one.id)).size).toBe(2);
    expect(new Set(worksheet.sections.map((section) => section.id)).size).toBe(worksheet.sections.length);
    expect(worksheet.sections.length).toBeGreaterThanOrEqual(4);
    expect(worksheet.sections.length).toBeLessThanOrEqual(6);
    expect(new Set(lines.map((line) => line.id)).size).toBe(lines.length);
    expect(new Set(lines.map((line) => line.symbol)).size).toBe(lines.length);
  });

  it('gives every line a symbol, a label, an entry and a source', () => {
    const bare = lines.filter((line) => [line.symbol, line.label, line.entry, line.source].some((field) => !field));
    expect(bare).toEqual([]);
    const stages = chains.flatMap((chain) => chain.stages);
    expect(stages.filter((one) => [one.symbol, one.label, one.gain, one.source].some((field) => !field))).toEqual([]);
    expect(worksheet.sections.filter((section) => section.title === '')).toEqual([]);
  });

  it('says of everything typed in that it is invented or where it is from', () => {
    const typed = lines.filter((line) => evaluation.restsOn(line.id).length === 0);
    const parts = [...typed, ...chains.flatMap((chain) => chain.stages)];
    const unsaid = parts.filter(({ source }) => !/invented for this example|common practice/i.test(source ?? ''));
    expect(unsaid.map(({ symbol }) => symbol)).toEqual([]);
    const curves = worksheet.sections.filter(isCurveSection);
    expect(curves.filter(({ title }) => !title.includes('invented'))).toEqual([]);
  });

  it('overrides entries in its second case only, and some', () => {
    const overridden = new Set(lines.flatMap((line) => Object.keys(line.byCase ?? {})));
    expect([...overridden]).toEqual([worksheet.cases[1]?.id]);
  });

  it('has no errors and no warnings, and a reason for each note on a line', () => {
    const open = evaluation.sheetFindings().filter(({ severity, accepted }) => severity !== 'note' || !accepted);
    const chainNotes = open.filter(
      ({ severity, lineId }) => severity === 'note' && evaluation.originOf(lineId) !== undefined,
    );
    // A chain as a whole has no field for an answer. What is said of one here is that its source is cold.
    expect(new Set(chainNotes.map(({ code }) => code))).toEqual(
      new Set(id === 'satellite-ground-station' ? ['source-temperature'] : []),
    );
    expect(open.filter((one) => !chainNotes.includes(one)).map(({ code, lineId }) => ({ code, lineId }))).toEqual([]);
  });

  it('has no acceptance that answers nothing', () => {
    const answered = evaluation.sheetFindings().filter(({ accepted }) => accepted !== undefined);
    const given = lines.flatMap((line) => (line.accepted ?? []).map(({ code }) => ({ code, lineId: line.id })));
    expect(given).toEqual(answered.map(({ code, lineId }) => ({ code, lineId })));
  });

  it('has a derived figure for every line, every output of a chain and every total of a pool', () => {
    const own = new Set(lines.map(({ symbol }) => symbol));
    expect(symbols.filter((symbol) => own.has(symbol))).toEqual(lines.map(({ symbol }) => symbol));
    const outputs = evaluation
      .lines()
      .map(({ symbol }) => symbol)
      .filter((symbol) =>
        chains.some((chain) => symbol.startsWith(`${chain.symbol}.`) && symbol.split('.').length === 2),
      );
    expect(outputs.length).toBeGreaterThanOrEqual(15 * chains.length);
    expect([...outputs, ...totals].filter((symbol) => !symbols.includes(symbol))).toEqual([]);
  });

  it('gives every derived figure in every case', () => {
    const compared = symbols.flatMap((symbol) =>
      worksheet.cases.map((one) => {
        const { figure } = evaluation.reading(evaluation.lineOf(symbol)?.id ?? '', one.id);
        const derived = golden.lines[symbol];
        const found = { unit: figure.state === 'value' ? figure.unit.word : '', figure: asDerived(figure) };
        const wanted = { unit: derived?.unit, figure: derived?.cases[one.id] };
        const agree = found.unit === wanted.unit && agrees(found.figure, wanted.figure);
        return { symbol, case: one.id, found, wanted, agree };
      }),
    );
    expect(compared.length).toBe(2 * symbols.length);
    expect(compared.filter(({ agree }) => !agree)).toEqual([]);
  });

  it('has two requirements or more, all met, with the derived margins', () => {
    const required = lines.filter(({ requirement }) => requirement !== undefined);
    expect(required.length).toBeGreaterThanOrEqual(2);
    expect(required.map(({ symbol }) => symbol)).toEqual(Object.keys(golden.requirements));
    for (const line of required)
      for (const one of worksheet.cases) {
        const found = evaluation.reading(line.id, one.id).requirement;
        const wanted = golden.requirements[line.symbol];
        expect(found).toMatchObject({ bound: wanted?.bound, limit: wanted?.limit, met: true });
        // A margin is a difference, as exact as the figures that it comes from.
        const scale = Math.abs(wanted?.limit ?? 0) + Math.abs(wanted?.margins[one.id] ?? 0);
        expect(agrees(found?.margin, wanted?.margins[one.id], scale), `${line.symbol} in ${one.id}`).toBe(true);
      }
  });

  it('has notes of its derivation with the same figures', () => {
    const written = writtenFigures(goldenText(id, 'notes.md'), worksheet);
    const wanted = symbols.flatMap((symbol) =>
      worksheet.cases.map((one) => ({ symbol, case: one.id, figure: golden.lines[symbol]?.cases[one.id] })),
    );
    expect(written.map(({ symbol, case: caseId }) => ({ symbol, case: caseId }))).toEqual(
      wanted.map(({ symbol, case: caseId }) => ({ symbol, case: caseId })),
    );
    const apart = written.filter(({ figure }, i) => {
      const derived = wanted[i]?.figure;
      return typeof figure === 'number' && typeof derived === 'number'
        ? Math.abs(figure - derived) > 0.00005001
        : figure !== derived;
    });
    expect(apart).toEqual([]);
  });
});

interface WrittenFigure {
  readonly symbol: string;
  readonly case: string;
  readonly figure: Derived;
}

/** `5.59·10⁻¹²` as `5.59e-12`. */
const plainText = (figure: string): string =>
  figure
    .replace('−', '-')
    .replace('·10', 'e')
    .replace('⁻', '-')
    .replace(/[⁰¹²³⁴-⁹]/g, (digit) => String('⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(digit)));

/** The figures in bold type that the notes end each line's arithmetic with; one for all cases or one for each. */
function writtenFigures(notes: string, worksheet: Worksheet): WrittenFigure[] {
  const account = notes.slice(0, notes.indexOf('\n## Requirements'));
  const figures: WrittenFigure[] = [];
  let symbol = '';
  for (const row of account.split('\n')) {
    symbol = /^- `(.+?)`/.exec(row)?.[1] ?? symbol;
    const figure = /\*\*(no power|−?[0-9.]+(?:·10[⁻⁰¹²³⁴-⁹]+)?)[^*]*\*\*$/.exec(row)?.[1];
    if (figure === undefined) continue;
    const name = /^ {2}- (.+?): /.exec(row)?.[1];
    for (const one of worksheet.cases)
      if (name === undefined || name === one.name)
        figures.push({
          symbol,
          case: one.id,
          figure: figure === 'no power' ? figure : Number(plainText(figure)),
        });
  }
  return figures;
}
