/** Dispatch: reads the arguments, runs the command, and turns refusals into exit code 2. */
import { Refusal, type Answer, type World } from './answer';
import { formatOf, listOf, onlyFile, parse, USAGE } from './arguments';
import { checkFiles } from './check';
import { evaluateFile, FORMATS } from './evaluate';
import { explainLine } from './explain';
import { describeFunctions } from './functions';
import { runSensitivity } from './sensitivity';
import { runSolve } from './solve';
import { runSweep } from './sweep';
import { runTrialsCommand } from './trials';

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
      case 'trials':
        return runTrialsCommand(rest, world);
      case 'sensitivity':
        return runSensitivity(rest, world);
      case 'sweep':
        return runSweep(rest, world);
      case 'solve':
        return runSolve(rest, world);
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

function evaluate(words: readonly string[], world: World): Answer {
  const parsed = parse(words, {
    case: { type: 'string', multiple: true },
    line: { type: 'string', multiple: true },
    format: { type: 'string' },
    linear: { type: 'boolean' },
  });
  const { values } = parsed;
  return evaluateFile(
    onlyFile(parsed, 'evaluate'),
    {
      cases: listOf(values['case']),
      lines: listOf(values['line']),
      format: formatOf(values['format'], FORMATS),
      linear: values['linear'] === true,
    },
    world,
  );
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
