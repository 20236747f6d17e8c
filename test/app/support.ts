// Small worksheets for the tests of the page's logic: lines whose id is their symbol, two cases.
import type { Line, Worksheet } from '../../src/worksheet';

/** A line as tests write it. */
export type LineSpec = readonly [symbol: string, label: string, entry: string, more?: Partial<Line>];

/** A worksheet with one section and the cases Calm and Storm. */
export function sheet(lines: readonly LineSpec[], title = 'Test sheet'): Worksheet {
  return sheetOf([{ title: 'Part', lines }], title);
}

/** A worksheet with the sections given; ids are `s1`, `s2`, …; lines have their symbols as ids. */
export function sheetOf(
  sections: readonly { readonly title: string; readonly lines: readonly LineSpec[] }[],
  title = 'Test sheet',
): Worksheet {
  return {
    id: '0b7c1a52-6a0e-4f39-9f57-6c5e8a1d2f33',
    title,
    cases: [
      { id: 'calm', name: 'Calm' },
      { id: 'storm', name: 'Storm' },
    ],
    sections: sections.map((section, i) => ({
      id: `s${String(i + 1)}`,
      kind: 'lines',
      title: section.title,
      lines: section.lines.map(([symbol, label, entry, more]) => ({ id: symbol, symbol, label, entry, ...more })),
    })),
  };
}
