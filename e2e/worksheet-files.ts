// Worksheet files made for tests, written as the published format has them and not by the program's own writer.
import type { NamedFile } from './pages/worksheet-page';

/** A line of a file; everything but the id may be left out. */
export interface FileLine {
  readonly id: string;
  readonly symbol?: string;
  readonly label?: string;
  readonly entry?: string;
  readonly [key: string]: unknown;
}

/** What a file is made from. */
export interface FileContent {
  readonly id: string;
  readonly title: string;
  readonly summary?: string;
  readonly cases?: readonly { readonly id: string; readonly name: string }[];
  readonly lines: readonly FileLine[];
  /** The title of the only section. */
  readonly section?: string;
}

/** A worksheet file with one section. */
export function worksheetFile({ id, title, summary, cases, lines, section = 'All' }: FileContent): NamedFile {
  const document = {
    format: 'levelwright-worksheet',
    version: 1,
    id,
    title,
    ...(summary === undefined ? {} : { summary }),
    cases: cases ?? [{ id: 'only', name: 'Only' }],
    sections: [
      {
        id: 'all',
        kind: 'lines',
        title: section,
        lines: lines.map((line) => ({ symbol: '', label: '', entry: '', ...line })),
      },
    ],
  };
  return { name: 'made-for-a-test.budget.json', text: `${JSON.stringify(document, null, 2)}\n` };
}

/**
 * A file of many lines: each tenth is a level of its own, the others take a loss off the line before, so that an edit in the
 * middle changes the lines of its ten alone.
 */
export function largeFile(count: number): NamedFile {
  const lines = Array.from({ length: count }, (_, at): FileLine => {
    const number = at + 1;
    const entry = at % 10 === 0 ? `${String(-40 - (at % 37))} dBm` : `P_${String(at)} - 0.25 dB`;
    return { id: `l${String(number)}`, symbol: `P_${String(number)}`, label: `Level ${String(number)}`, entry };
  });
  return worksheetFile({ id: '7f1f8a51-0000-4000-8000-000000010000', title: 'Long survey', lines });
}
