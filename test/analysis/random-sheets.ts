/** Random worksheets for properties: typed figures in decibels, numbers and hertz, and lines computed from them in many ways. */
import fc from 'fast-check';
import { compileColumns, type Varied } from '../../src/analysis';
import type { Evaluation } from '../../src/engine';

export interface RandomSheet {
  readonly text: string;
  readonly inputs: readonly { readonly symbol: string; readonly unit: string; readonly figure: number }[];
  readonly computed: readonly string[];
}

const INPUTS = [
  { symbol: 'P', unit: 'dBm', figure: -60 },
  { symbol: 'Q', unit: 'dBm', figure: -63 },
  { symbol: 'R', unit: 'dBm', figure: -72 },
  { symbol: 'G', unit: 'dB', figure: 12 },
  { symbol: 'L', unit: 'dB', figure: 8 },
  { symbol: 'n', unit: '', figure: 7.25 },
  { symbol: 'm', unit: '', figure: 9.5 },
  { symbol: 'f', unit: 'MHz', figure: 868 },
  { symbol: 'd', unit: 'km', figure: 12 },
  { symbol: 'T', unit: 'K', figure: 150 },
] as const;

/** Templates by what they give; # stands for something of the kind in front of it. */
const TEMPLATES: Readonly<Record<string, readonly string[]>> = {
  level: [
    'level# + ratio#',
    'level# - ratio# + ratio#',
    'powersum(level#, level#)',
    'powersum(level#, level#, level#)',
    'powersum(level#, level#, level#, -66 dBm)',
    'powersum(level#, -70 dBm)',
    'powerdiff(level# + 40 dB, level#)',
    'fieldsum(level#, level#)',
    'meanpower(level#, level#, level#)',
    'max(level#, level#)',
    'if(number# > number#, level#, level#)',
    'thermal_noise(T, f) + ratio#',
    'db(lin(level#) + lin(level#))',
  ],
  ratio: [
    'ratio# + ratio#',
    'ratiosum(ratio#, ratio#)',
    'ratiosum(ratio#, ratio#, 20 dB)',
    'level# - level#',
    'number# * ratio#',
    'db(number#^2 + 1)',
    'free_space_loss(d, f) - 100 dB',
    'min(ratio#, ratio#, 6 dB)',
    'abs(ratio#)',
    '10*log10(1 + number#^2)',
  ],
  number: [
    'number# * number#',
    'number# + number# - 2',
    'number# / (1 + number#^2)',
    'sqrt(1 + number#^2)',
    'lin(ratio#) / (1 + lin(ratio#))',
    'sin(number#) + atan(number#)',
    'log10(1 + number#^2) * exp(-number#^2/50)',
    'interpolate(sin(number#), -1.1, 3, 0, number#, 1.1, 5)',
    '(1 + number#^2)^0.25',
    'mean(number#, number#, 3)',
  ],
};

const LEAVES: Readonly<Record<string, readonly string[]>> = {
  level: ['P', 'Q', 'R'],
  ratio: ['G', 'L'],
  number: ['n', 'm'],
};

const UNITS: Readonly<Record<string, string>> = { level: 'dBm', ratio: 'dB', number: '1' };

export const randomSheet: fc.Arbitrary<RandomSheet> = fc
  .array(
    fc.tuple(
      fc.constantFrom('level', 'ratio', 'number'),
      fc.nat(1000),
      fc.array(fc.nat(1000), { minLength: 8, maxLength: 8 }),
    ),
    {
      minLength: 1,
      maxLength: 8,
    },
  )
  .map((picks) => {
    const known: Record<string, string[]> = Object.fromEntries(
      Object.entries(LEAVES).map(([kind, symbols]) => [kind, [...symbols]]),
    );
    const lines: string[] = INPUTS.map(({ symbol, unit, figure }) => `${symbol} = ${String(figure)} ${unit}`);
    const computed: string[] = [];
    picks.forEach(([kind, template, choices], at) => {
      const templates = TEMPLATES[kind] ?? [];
      let next = 0;
      const entry = (templates[template % templates.length] ?? '').replace(
        /(level|ratio|number)#/g,
        (_, of: string) => {
          const symbols = known[of] ?? [];
          return symbols[(choices[next++ % choices.length] ?? 0) % symbols.length] ?? '';
        },
      );
      const symbol = `c${String(at)}`;
      lines.push(`${symbol} | ${UNITS[kind] ?? ''} = ${entry}`);
      known[kind]?.push(symbol);
      computed.push(symbol);
    });
    return { text: lines.join('\n'), inputs: INPUTS, computed };
  });

/** The figure of a line with one input a little below, at, and a little above its figure. */
export function figuresNear(
  evaluation: Evaluation,
  varied: readonly Varied[],
  input: number,
  target: string,
  figure: number,
): { readonly below: number; readonly here: number; readonly above: number; readonly step: number } {
  const step = 1e-5 * Math.max(1, Math.abs(figure));
  const only = varied[input];
  if (only === undefined) throw new Error(`there is no input ${String(input)}`);
  const results = new Float64Array(3);
  compileColumns(evaluation, [target], 'nominal', [only]).run(
    0,
    3,
    (_, column) => column.set([figure - step, figure, figure + step]),
    [results],
  );
  return { below: results[0] ?? NaN, here: results[1] ?? NaN, above: results[2] ?? NaN, step };
}
