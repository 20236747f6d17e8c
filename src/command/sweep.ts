/** `sweep`: lines while one figure runs through a range. */
import { figuresAt, placesIn } from '../analysis';
import type { Unit } from '../quantity';
import type { Line } from '../worksheet';
import { Refusal, type Answer, type World } from './answer';
import { formatOf, listOf, needed, onlyFile, parse, USAGE, wholeNumber } from './arguments';
import {
  ask,
  asJson,
  csvNumber,
  csvTable,
  exitCodeFor,
  figureIn,
  finite,
  numberText,
  quantityIn,
  textTable,
  varying,
} from './asked';
import { nameOfLine } from './open';
import { csvText } from './tables';

const FORMATS = ['text', 'json', 'csv'] as const;
const STEPS_LIMIT = 100_000;

/** What has been swept: places in the varied line's unit, and a column a line. */
interface Swept {
  readonly vary: string;
  readonly unit: Unit;
  readonly places: Float64Array;
  readonly columns: readonly {
    readonly name: string;
    readonly unit: Unit | undefined;
    readonly figures: Float64Array;
  }[];
}

export function runSweep(words: readonly string[], world: World): Answer {
  const parsed = parse(words, {
    vary: { type: 'string' },
    from: { type: 'string' },
    to: { type: 'string' },
    steps: { type: 'string' },
    log: { type: 'boolean' },
    line: { type: 'string', multiple: true },
    case: { type: 'string', multiple: true },
    format: { type: 'string' },
  });
  const file = onlyFile(parsed, 'sweep');
  const [vary, fromText, toText, stepsText] = ['vary', 'from', 'to', 'steps'].map((name) =>
    needed(parsed, 'sweep', name),
  );
  const symbols = listOf(parsed.values['line']);
  if (symbols.length === 0) throw new Refusal(`sweep needs --line.\n\n${USAGE}`);
  const steps = wholeNumber(stepsText ?? '', 'steps', 1, STEPS_LIMIT);
  const format = formatOf(parsed.values['format'], FORMATS);
  const asked = ask(file, symbols, listOf(parsed.values['case']), world);
  const { line, unit, evaluation } = varying(asked, vary ?? '', asked.lines);
  const from = quantityIn(fromText ?? '', unit, 'from');
  const to = quantityIn(toText ?? '', unit, 'to');
  const isLogarithmic = parsed.values['log'] === true;
  if (isLogarithmic && unit.form === 'decibel')
    throw new Refusal('--log is for linear quantities: decibels are logarithms already.');
  if (isLogarithmic && !(from > 0 && to > 0)) throw new Refusal('--log goes from above zero to above zero.');
  const places = placesIn({ from, to, isLogarithmic }, steps);
  const { inCase } = asked;
  const columns = figuresAt(
    evaluation,
    line.id,
    inCase.id,
    asked.lines.map(({ id }) => id),
    places,
  );
  const swept: Swept = {
    vary: nameOfLine(asked.evaluation, line),
    unit,
    places,
    columns: asked.lines.map((one: Line, at) => ({
      name: nameOfLine(asked.evaluation, one),
      unit: evaluation.node(one.id, inCase.id)?.result.unit,
      figures: columns[at] as Float64Array,
    })),
  };
  return {
    results: format === 'json' ? writeJson(swept) : format === 'csv' ? writeCsv(swept) : writeText(swept),
    messages: asked.messages,
    exitCode: exitCodeFor(asked, asked.lines),
  };
}

function writeJson({ vary, unit, places, columns }: Swept): string {
  return asJson({
    vary,
    unit: unit.word,
    points: Array.from(places, (x, at) => {
      // Symbols are text from a file: the map has no prototype.
      const values = Object.create(null) as Record<string, number | null>;
      for (const { name, figures } of columns) values[name] = finite(figures[at] as number);
      return { x, values };
    }),
  });
}

const headOf = (name: string, unit: Unit | undefined): string =>
  unit === undefined || unit.word === '1' ? name : `${name} (${unit.word})`;

function writeCsv({ vary, unit, places, columns }: Swept): string {
  return csvTable([
    [csvText(headOf(vary, unit)), ...columns.map((column) => csvText(headOf(column.name, column.unit)))],
    ...Array.from(places, (x, at) => [csvNumber(x), ...columns.map(({ figures }) => csvNumber(figures[at]))]),
  ]);
}

function writeText({ vary, unit, places, columns }: Swept): string {
  const wordOf = unit.word === '1' ? '' : ` ${unit.word}`;
  return textTable([
    [vary, ...columns.map(({ name }) => name)],
    ...Array.from(places, (x, at) => [
      unit.form === 'decibel' ? figureIn(x, unit) : `${numberText(x, 6)}${wordOf}`,
      ...columns.map((column) => figureIn(column.figures[at] as number, column.unit)),
    ]),
  ]);
}
