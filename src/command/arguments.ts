/** Arguments of a command line: usage, options, and the refusals of what cannot be read. */
import { parseArgs, type ParseArgsConfig } from 'node:util';
import { Refusal } from './answer';

export const USAGE = `levelwright — radio budgets on the command line

  evaluate FILE [--case ID]… [--line SYMBOL]… [--format text|json|markdown|csv] [--linear]
      figures, requirements and findings
  check FILE…
      findings and requirements only, one a line
  explain FILE SYMBOL [--case ID]…
      the working of a line
  trials FILE --line SYMBOL [--case ID] [--count N] [--seed N] [--format text|json|csv]
      the line when everything it rests on deviates by chance within its tolerance
  sensitivity FILE --line SYMBOL [--case ID] [--format text|json|csv]
      what the line owes to each figure that it rests on
  sweep FILE --vary SYMBOL --from Q --to Q --steps N [--log] --line SYMBOL… [--case ID] [--format text|json|csv]
      lines while a figure runs through a range, in so many steps
  solve FILE --vary SYMBOL --line SYMBOL --for Q [--between Q Q] [--case ID] [--format text|json]
      every value of a figure at which the line has the value wanted
  functions [NAME]
      the catalogue of functions

Exit 0: computed, no error finding, every requirement met. 1: computed, but an error finding or an unmet requirement.
2: bad usage or a bad file. Cases may be given by id or by name; trials and what stands below it take the first when none is given.
`;

export interface Parsed {
  readonly values: Readonly<Record<string, string | boolean | (string | boolean)[] | undefined>>;
  readonly positionals: readonly string[];
}

/** Reads options and what else there is. Throws Refusal. */
export function parse(words: readonly string[], options: NonNullable<ParseArgsConfig['options']>): Parsed {
  try {
    return parseArgs({ args: joined(words, options), options, allowPositionals: true, strict: true });
  } catch (error) {
    throw new Refusal(`${error instanceof Error ? error.message : String(error)}\n\n${USAGE}`);
  }
}

/** A negative quantity behind an option (`--from "-10 dBm"`) is joined to it, since by itself it looks like another option. */
function joined(words: readonly string[], options: NonNullable<ParseArgsConfig['options']>): string[] {
  const result: string[] = [];
  for (const word of words) {
    const last = result.at(-1);
    const takesText = last?.startsWith('--') === true && options[last.slice(2)]?.type === 'string';
    if (takesText && /^[-−][\d.]/.test(word)) result[result.length - 1] = `${last}=${word}`;
    else result.push(word);
  }
  return result;
}

export const listOf = (value: Parsed['values'][string]): string[] => (Array.isArray(value) ? value.map(String) : []);

/** One of the formats that a command writes; text when none is asked for. Throws Refusal. */
export function formatOf<Format extends string>(value: Parsed['values'][string], formats: readonly Format[]): Format {
  const wanted = value ?? 'text';
  const format = formats.find((known) => known === wanted);
  if (format === undefined)
    throw new Refusal(`There is no format “${String(wanted)}”; there are ${formats.join(', ')}.`);
  return format;
}

/** An option that has to be given. Throws Refusal. */
export function needed({ values }: Parsed, command: string, option: string): string {
  const value = values[option];
  if (typeof value !== 'string') throw new Refusal(`${command} needs --${option}.\n\n${USAGE}`);
  return value;
}

/** The one file that a command takes. Throws Refusal. */
export function onlyFile({ positionals }: Parsed, command: string): string {
  const [file, ...more] = positionals;
  if (file === undefined || more.length > 0) throw new Refusal(`${command} takes one file.\n\n${USAGE}`);
  return file;
}

/** A whole number within bounds. Throws Refusal. */
export function wholeNumber(text: string, option: string, least: number, most: number): number {
  const value = /^\d+$/.test(text) ? Number(text) : NaN;
  if (!(value >= least && value <= most))
    throw new Refusal(`--${option} takes a whole number from ${String(least)} to ${String(most)}, not “${text}”.`);
  return value;
}
