/** Worksheet files in memory, and a world that reads them, for the tests of the commands. */
import type { World } from '../../src/command/answer';
import { run } from '../../src/command/run';
import { writeWorksheetFile } from '../../src/exchange';
import type { Line, Worksheet } from '../../src/worksheet';
import { ONE_CASE, sheetOf } from '../engine/notation';

export type Files = Readonly<Record<string, string | Uint8Array>>;

/** A world with these files and no others. */
export function worldOf(files: Files): World {
  return {
    readFile: (path) => {
      const content = Object.hasOwn(files, path) ? files[path] : undefined;
      if (content === undefined) throw new Error(`ENOENT: no such file or directory, open '${path}'`);
      return typeof content === 'string' ? new TextEncoder().encode(content) : content;
    },
  };
}

/** The file of a worksheet that is written in the notation of the engine's tests. */
export const fileOf = (text: string, ...caseIds: readonly string[]): string =>
  writeWorksheetFile(sheetOf(text, ...caseIds));

/** The file of a worksheet of one section with lines that the notation cannot write. */
export function fileOfLines(
  lines: readonly (Partial<Line> & { readonly entry: string })[],
  more: Partial<Worksheet> = {},
): string {
  return writeWorksheetFile({
    id: 'w',
    title: 'test',
    cases: ONE_CASE,
    ...more,
    sections: more.sections ?? [
      {
        id: 's',
        kind: 'lines',
        title: 'all',
        lines: lines.map((line, at) => ({ id: `l${String(at)}`, symbol: '', label: '', ...line })),
      },
    ],
  });
}

/** Runs words on one file, named `sheet`. */
export const runOn = (content: string | Uint8Array, ...words: readonly string[]): ReturnType<typeof run> =>
  run(words, worldOf({ sheet: content }));

export interface CaseResult {
  readonly value: number | null;
  readonly linear: number | null;
  readonly linearUnit: string | null;
  readonly noPower?: boolean;
  readonly unit?: string;
  readonly waitsFor?: readonly string[];
  readonly requirement?: { readonly met: boolean | null; readonly margin: number | null; readonly unit: string | null };
}

/** The object of the contract. */
export interface Results {
  readonly title: string;
  readonly cases: readonly string[];
  readonly lines: Readonly<
    Record<
      string,
      {
        readonly label: string;
        readonly unit: string | null;
        readonly quantity: string | null;
        readonly side: string | null;
        readonly cases: Readonly<Record<string, CaseResult>>;
      }
    >
  >;
  readonly findings: readonly {
    readonly code: string;
    readonly severity: string;
    readonly line: string;
    readonly case: string;
    readonly message: string;
    readonly repair: string | null;
    readonly accepted: boolean;
  }[];
}

/** What `evaluate --format json` prints for a file. */
export function resultsOf(content: string, ...options: readonly string[]): Results {
  return JSON.parse(runOn(content, 'evaluate', 'sheet', '--format', 'json', ...options).results) as Results;
}

/** A line's figure in the first case. */
export function caseOf(results: Results, name: string, caseId = results.cases[0] ?? ''): CaseResult {
  const found = results.lines[name]?.cases[caseId];
  if (found === undefined) throw new Error(`there is no ${name} in ${caseId}`);
  return found;
}
