/** Dispatch: reads the arguments, runs the command, and turns refusals into exit code 2. */
import { parseArgs, type ParseArgsConfig } from 'node:util';
import { Refusal, type Answer, type World } from './answer';
import { checkFiles } from './check';
import { evaluateFile, FORMATS, type Format } from './evaluate';
import { explainLine } from './explain';
import { describeFunctions } from './functions';

const USAGE = `levelwright — radio budgets on the command line

  evaluate FILE [--case ID]… [--line SYMBOL]… [--format text|json|markdown|csv] [--linear]
      figures, requirements and findings
  check FILE…
      findings and requirements only, one a line
  explain FILE SYMBOL [--case ID]…
      the working of a line
  functions [NAME]
      the catalogue of functions

Exit 0: computed, no error finding, every requirement met. 1: computed, but an error finding or an unmet requirement.
2: bad usage or a bad file. Cases may be given by id or by name.
`;

/** Runs one command line (without program names). Never throws for anything that arguments or files can hold. */
export function run(words: readonly string[], world: World): Answer {
  const [command, ...rest] = words;
  const asksForHelp = rest.includes('--help') && !rest.includes('--');
  try {
    if (asksForHelp) return { results: USAGE, messages: '', exitCode: 0 };
    switch (command) {
      case 'evaluate':
        return evaluate(rest, world);
      case 'check':
        return check(rest, world);
      case 'explain':
        return explain(rest, world);
      case 'functions':
        return functions(rest);
      case 'help':
      case '--help':
      case '-h':
        return { results: USAGE, messages: '', exitCode: 0 };
      case undefined:
        throw new Refusal(USAGE);
      default:
        throw new Refusal(`There is no command “${command}”.\n\n${USAGE}`);
    }
  } catch (refusal) {
    if (!(refusal instanceof Refusal)) throw refusal;
    return {
      results: '',
      messages: refusal.message.endsWith('\n') ? refusal.message : `${refusal.message}\n`,
      exitCode: 2,
    };
  }
}

interface Parsed {
  readonly values: Readonly<Record<string, string | boolean | (string | boolean)[] | undefined>>;
  readonly positionals: readonly string[];
}

function parse(words: readonly string[], options: NonNullable<ParseArgsConfig['options']>): Parsed {
  try {
    return parseArgs({ args: [...words], options, allowPositionals: true, strict: true });
  } catch (error) {
    throw new Refusal(`${error instanceof Error ? error.message : String(error)}\n\n${USAGE}`);
  }
}

const listOf = (value: Parsed['values'][string]): string[] => (Array.isArray(value) ? value.map(String) : []);

function evaluate(words: readonly string[], world: World): Answer {
  const { values, positionals } = parse(words, {
    case: { type: 'string', multiple: true },
    line: { type: 'string', multiple: true },
    format: { type: 'string' },
    linear: { type: 'boolean' },
  });
  const [file, ...more] = positionals;
  if (file === undefined || more.length > 0) throw new Refusal(`evaluate takes one file.\n\n${USAGE}`);
  return evaluateFile(
    file,
    {
      cases: listOf(values['case']),
      lines: listOf(values['line']),
      format: formatOf(values['format']),
      linear: values['linear'] === true,
    },
    world,
  );
}

function formatOf(value: Parsed['values'][string]): Format {
  const wanted = value ?? 'text';
  const format = FORMATS.find((known) => known === wanted);
  if (format === undefined)
    throw new Refusal(`There is no format “${String(wanted)}”; there are ${FORMATS.join(', ')}.`);
  return format;
}

function check(words: readonly string[], world: World): Answer {
  const { positionals } = parse(words, {});
  if (positionals.length === 0) throw new Refusal(`check takes at least one file.\n\n${USAGE}`);
  return checkFiles(positionals, world);
}

function explain(words: readonly string[], world: World): Answer {
  const { values, positionals } = parse(words, { case: { type: 'string', multiple: true } });
  const [file, symbol, ...more] = positionals;
  if (file === undefined || symbol === undefined || more.length > 0)
    throw new Refusal(`explain takes a file and a symbol.\n\n${USAGE}`);
  return explainLine(file, symbol, listOf(values['case']), world);
}

function functions(words: readonly string[]): Answer {
  const { positionals } = parse(words, {});
  if (positionals.length > 1) throw new Refusal(`functions takes one name at most.\n\n${USAGE}`);
  return describeFunctions(positionals[0]);
}
