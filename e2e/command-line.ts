// The built command line beside the page: the figures that it gives for a file, compared with those that the page shows.
import { execFile } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';

import { expect } from './fixtures';
import { shownSymbol, type ReadLine } from './pages/account';

const run = promisify(execFile);

/** What `evaluate --format json` prints, as far as it is compared here. */
export interface Evaluated {
  readonly cases: readonly string[];
  readonly lines: Readonly<
    Record<
      string,
      {
        readonly label: string;
        readonly unit: string;
        readonly cases: Readonly<Record<string, { readonly value: number | null; readonly noPower?: boolean }>>;
      }
    >
  >;
  readonly findings: readonly unknown[];
}

/** Evaluates a file with the built command, which is built first when it is older than its sources. */
export async function evaluate(path: string): Promise<Evaluated> {
  const command = fileURLToPath(new URL('../src/command/start.mjs', import.meta.url));
  const { stdout } = await run(process.execPath, [command, 'evaluate', path, '--format', 'json']);
  return JSON.parse(stdout) as Evaluated;
}

/** Expects a figure as shown to be a value in a unit, to the last digit that is shown. */
function expectShown(shown: string, value: number, unit: string, place: string): void {
  const [, number = '', word = ''] = /^([−\d.]+) ?(.*)$/.exec(shown) ?? [];
  const digits = number.replace('−', '-');
  const decimals = digits.split('.')[1]?.length ?? 0;
  expect(word, `${place}: ${shown}`).toBe(unit === '1' ? '' : unit);
  // Half a unit of the last digit, and what the division itself may round.
  expect(Math.abs(Number(digits) - value), `${place}: ${shown} for ${String(value)}`).toBeLessThanOrEqual(
    0.5 * 10 ** -decimals + Math.abs(value) * 1e-12,
  );
}

/** A figure as shown, without what is said to listeners of a case's own entry. */
export function withoutOwnEntry(figure: string): string {
  return figure.replace(/\s*, own entry .*$/, '');
}

/** Expects that every figure of every line and case in the account is the one that the command gives. */
export function expectSameFigures(lines: readonly ReadLine[], evaluated: Evaluated): void {
  const entries = Object.entries(evaluated.lines);
  expect(lines.map(({ symbol }) => symbol)).toEqual(entries.map(([symbol]) => shownSymbol(symbol)));
  for (const [at, [symbol, line]] of entries.entries()) {
    const figures = lines[at]?.figures ?? [];
    expect(figures, symbol).toHaveLength(evaluated.cases.length);
    for (const [place, caseId] of evaluated.cases.entries()) {
      const shown = withoutOwnEntry(figures[place] ?? '');
      const { value, noPower } = line.cases[caseId] ?? { value: null };
      if (noPower === true) expect(shown, symbol).toBe('no power');
      else if (value === null) expect(shown, symbol).toMatch(/^(withheld|waits for .*)$/);
      else expectShown(shown, value, line.unit, `${symbol}, ${caseId}`);
    }
  }
}
