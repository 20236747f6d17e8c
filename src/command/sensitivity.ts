/** `sensitivity`: what a line owes to each figure that it rests on. */
import { inputsOf, sensitivityOf, type InputSensitivity, type Sensitivity } from '../analysis';
import type { Line } from '../worksheet';
import type { Answer, World } from './answer';
import { formatOf, listOf, needed, onlyFile, parse } from './arguments';
import {
  ask,
  asJson,
  assumedText,
  csvNumber,
  csvTable,
  exitCodeFor,
  finite,
  noTolerance,
  numberText,
  stepIn,
  textTable,
  troubleText,
  type Asked,
} from './asked';
import { nameOfLine } from './open';
import { oneLine } from './plain-text';
import { csvText } from './tables';

const FORMATS = ['text', 'json', 'csv'] as const;

export function runSensitivity(words: readonly string[], world: World): Answer {
  const parsed = parse(words, {
    line: { type: 'string' },
    case: { type: 'string', multiple: true },
    format: { type: 'string' },
  });
  const file = onlyFile(parsed, 'sensitivity');
  const symbol = needed(parsed, 'sensitivity', 'line');
  const format = formatOf(parsed.values['format'], FORMATS);
  const asked = ask(file, [symbol], listOf(parsed.values['case']), world);
  const { evaluation, inCase } = asked;
  const line = asked.lines[0] as Line;
  const found = sensitivityOf(evaluation, line.id, inCase.id);
  const told = noTolerance(asked, inputsOf(evaluation, line.id, inCase.id));
  const write = format === 'json' ? writeJson : format === 'csv' ? writeCsv : writeText;
  return {
    results: write(asked, line, found),
    messages: `${asked.messages}${troubleText(asked, found.troubles)}${told}${assumedText(asked, found.isDirectionAssumed)}`,
    exitCode: found.troubles.length > 0 ? 1 : exitCodeFor(asked, [line]),
  };
}

function nameOf({ evaluation }: Asked, { lineId }: InputSensitivity): string {
  const line = evaluation.line(lineId);
  return line === undefined ? lineId : nameOfLine(evaluation, line);
}

function writeJson(asked: Asked, line: Line, { unit, inputs }: Sensitivity): string {
  return asJson({
    line: nameOfLine(asked.evaluation, line),
    case: asked.inCase.id,
    unit: unit?.word ?? null,
    inputs: inputs.map((input) => ({
      symbol: nameOf(asked, input),
      slope: finite(input.slope),
      slopeUnit: input.slopeUnit,
      exact: input.exact,
      adverse: finite(input.adverse ?? NaN),
      favourable: finite(input.favourable ?? NaN),
      share: finite(input.share),
    })),
  });
}

function writeCsv(asked: Asked, _: Line, { unit, inputs }: Sensitivity): string {
  const step = csvText(unit?.form === 'decibel' ? 'dB' : (unit?.word ?? ''));
  return csvTable([
    ['symbol', 'slope', 'slope unit', 'exact', 'adverse', 'favourable', 'unit', 'share'],
    ...inputs.map((input) => [
      csvText(nameOf(asked, input)),
      csvNumber(input.slope),
      csvText(input.slopeUnit),
      input.exact ? 'yes' : 'no',
      csvNumber(input.adverse),
      csvNumber(input.favourable),
      step,
      csvNumber(input.share),
    ]),
  ]);
}

function writeText(asked: Asked, line: Line, { unit, inputs }: Sensitivity): string {
  const { evaluation, inCase } = asked;
  const label = line.label === '' ? '' : ` — ${line.label}`;
  const rows = inputs.map((input) => [
    nameOf(asked, input),
    `${input.exact ? '' : '≈ '}${numberText(input.slope)} ${input.slopeUnit}`,
    stepIn(input.adverse ?? NaN, unit),
    stepIn(input.favourable ?? NaN, unit),
    input.adverse === undefined ? '—' : `${(100 * input.share).toFixed(1)} %`,
  ]);
  return `${oneLine(`${nameOfLine(evaluation, line)}${label}, ${inCase.name}`)}\n${textTable([
    ['Figure', 'Slope', 'Adverse', 'Favourable', 'Share of variance'],
    ...rows,
  ])}`;
}
