import { cleanup, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';

import { itemRows } from '../../../src/app/item-rows';
import { Evaluation } from '../../../src/engine';
import { levelDiagramOfChain, workingOf } from '../../../src/review';
import { casesAbreast, entryStretches, printDocument, type PrintSource } from '../../../src/ui/panels/print-model';
import PrintView from '../../../src/ui/panels/PrintView.svelte';
import { evaluate, SHEET } from './sheet';

afterEach(cleanup);

const evaluation = evaluate();
const source: PrintSource = {
  reading: (lineId, caseId) => evaluation.reading(lineId, caseId),
  findings: () => evaluation.sheetFindings(),
  items: () => [],
  levels: () => undefined,
  lineOf: (lineId: string) => evaluation.line(lineId),
  working: (lineId, caseId) => workingOf(evaluation, lineId, caseId),
};

describe('a chain on paper', () => {
  const chain = {
    id: 'rx',
    kind: 'chain',
    symbol: 'rx',
    title: 'Receiver',
    signal: '-90 dBm',
    stages: [{ id: 's', symbol: 'lna', label: 'Amplifier', gain: '15 dB', noiseFigure: '1 dB' }],
  } as const;
  const cases = [
    { id: 'a', name: 'First' },
    { id: 'b', name: 'Second' },
  ];
  const worksheet = { id: 'w', title: 'W', cases, sections: [chain] };
  const chains = new Evaluation(worksheet);
  const printed = printDocument(worksheet, {
    reading: (lineId, caseId) => chains.reading(lineId, caseId),
    findings: () => chains.sheetFindings(),
    items: (section) => itemRows(chains, section),
    lineOf: (lineId) => chains.line(lineId),
    levels: (sectionId, caseId) => levelDiagramOfChain(chains, sectionId, caseId),
    working: (lineId, caseId) => workingOf(chains, lineId, caseId),
  });

  it('has its stages and outputs as lines, with what the stages say', () => {
    const lines = printed.sections[0]?.lines?.map(({ line }) => `${line.symbol}: ${line.entry}`);
    expect(lines?.[0]).toBe('lna: 15 dB, NF 1 dB');
    expect(lines).toContain('rx.gain: ');
  });

  it('says what the figure of a stage is of', () => {
    expect(printed.sections[0]?.lines?.[0]?.line.label).toBe('Amplifier: level');
  });

  it('says of a pool which lines are switched off, and of the total what it is of', () => {
    const lines = [
      { id: 'a', symbol: 'A', label: 'thermal', entry: '-100 dBm' },
      { id: 'b', symbol: 'B', label: 'image', entry: '-90 dBm', off: true },
    ];
    const pool = { id: 'p', kind: 'pool', symbol: 'N_I', title: 'Noise', lines } as const;
    const pools = new Evaluation({ ...worksheet, sections: [pool] });
    const paper = printDocument(pools.worksheet, { ...source, items: (section) => itemRows(pools, section) });
    const labels = paper.sections[0]?.lines?.map(({ line }) => line.label);
    expect(labels).toEqual(['thermal', 'image (switched off)', 'Total: Noise']);
  });

  it('has its levels once for cases in which they are alike', () => {
    expect(printed.levels.map(({ caseNames }) => caseNames)).toEqual([['First', 'Second']]);
    expect(printed.levels[0]?.diagram.points.map(({ wanted }) => wanted?.value)).toEqual([-90, -75]);
  });
});

describe('what is printed', () => {
  const print = printDocument(SHEET, source);

  it('holds every line in every case, in order', () => {
    const lines = print.sections.flatMap((section) => section.lines ?? []);
    expect(lines.map(({ line }) => line.id)).toEqual(['p', 'l', 'e', 'n', 'i', 'bad', 'good', 'w', 'r1', 'r2', 's']);
    expect(lines.every(({ readings }) => readings.length === SHEET.cases.length)).toBe(true);
    expect(lines[0]?.overrides).toEqual([{ caseName: 'Storm', entry: '13 dBm' }]);
  });

  it('names a section of a kind that is not evaluated, without lines', () => {
    expect(print.sections.at(-1)).toEqual({ id: 'pool', title: 'Other harbours' });
  });

  it('numbers sources and notes by their first mention, equal ones once', () => {
    expect(print.endnotes).toEqual(['Source: Invented.', 'Two metres.']);
    const notes = print.sections.flatMap((section) => section.lines ?? []).map((line) => line.notes);
    expect(notes.slice(0, 3)).toEqual([[1], [1, 2], []]);
  });

  it('marks what radiates', () => {
    expect(print.radiates).toBe(true);
    const marked = print.sections.flatMap((section) => section.lines ?? []).filter((line) => line.radiates);
    expect(marked.map(({ line }) => line.symbol)).toEqual(['EIRP']);
  });

  it('gives the working of required lines, once for cases that read the same', () => {
    expect(print.workings.map(({ working, caseNames }) => [working.symbol, caseNames])).toEqual([
      ['EIRP', ['Calm']],
      ['EIRP', ['Storm']],
      ['SINR', ['Calm']],
      ['SINR', ['Storm']],
    ]);
    const alike = printDocument(
      { ...SHEET, cases: SHEET.cases },
      { ...source, working: (id) => source.working(id, 'calm') },
    );
    expect(alike.workings.map(({ working, caseNames }) => [working.symbol, caseNames])).toEqual([
      ['EIRP', ['Calm', 'Storm']],
      ['SINR', ['Calm', 'Storm']],
    ]);
  });

  it('leaves out lines that only wait from the findings', () => {
    expect(print.findings.map(({ finding }) => finding.code)).toEqual(['levels-summed', 'ratios-summed']);
  });
});

describe('many cases', () => {
  it('stand in groups of five, each with its place among all', () => {
    const cases = Array.from({ length: 12 }, (_, i) => ({ id: `c${String(i)}`, name: `Case ${String(i)}` }));
    const groups = casesAbreast(cases);
    expect(groups.map((group) => group.length)).toEqual([5, 5, 2]);
    expect(groups.flat().map(({ index }) => index)).toEqual(cases.map((_, i) => i));
  });
});

describe('an entry that is too long for its column', () => {
  it('is broken after brackets and separators, not between a figure and its unit', () => {
    expect(entryStretches('passive_nf(L, 290 K) + 2')).toEqual(['passive_nf(', 'L,', ' 290\u00a0K) + 2']);
  });
});

describe('the page on paper', () => {
  const printing = () => window.dispatchEvent(new Event('beforeprint'));

  it('is there only while the page is being printed', async () => {
    const { container } = render(PrintView, { worksheet: SHEET, source, linear: false });
    expect(container.querySelector('table')).toBeNull();
    printing();
    expect(container.querySelectorAll('table')).toHaveLength(2);
    window.dispatchEvent(new Event('afterprint'));
    await Promise.resolve();
    expect(container.querySelector('table')).toBeNull();
  });

  it('holds title, cautions, requirements, lines, findings, workings and endnotes', () => {
    const { container } = render(PrintView, { worksheet: SHEET, source, linear: true });
    printing();
    expect(screen.getByRole('heading', { level: 1 }).textContent).toBe('Buoy');
    expect(screen.getAllByRole('heading', { level: 2 }).map((heading) => heading.textContent)).toEqual([
      'Requirements',
      'Lines',
      'Findings',
      'Working of the required lines',
      'Sources and notes',
    ]);
    const text = container.textContent.replace(/\s+/g, ' ');
    for (const words of [
      'Everything here is invented.',
      'Cases: Calm, Storm',
      'confirm them by measurement',
      'Exposure of people to radio-frequency fields is not assessed',
      'at most 14.5 dBm',
      'not met, 0.50 dB short',
      '31.62 mW',
      'withheld',
      'Not answered.',
      'this version does not evaluate it',
      'Two metres.',
    ])
      expect(text).toContain(words);
  });

  it('gives linear values only when they are shown', () => {
    render(PrintView, { worksheet: SHEET, source, linear: false });
    printing();
    const [, lines] = screen.getAllByRole('table');
    if (lines === undefined) throw new Error('the table of lines is the second');
    expect(within(lines).queryByText('31.62 mW')).toBeNull();
  });

  it('tells the margins of the paper the title', () => {
    render(PrintView, { worksheet: { ...SHEET, title: 'A "quoted" \\ title' }, source, linear: false });
    printing();
    expect(document.documentElement.style.getPropertyValue('--printed-title')).toBe('"A \\"quoted\\" \\\\ title"');
  });
});
