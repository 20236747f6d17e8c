/** Every function of the catalogue: its description, its golden example, what it refuses, and where its domain ends. */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { CATALOGUE, type FindingCode } from '../../src/findings';
import {
  fewestArguments,
  findFunction,
  FUNCTION_GROUPS,
  FUNCTIONS,
  parameterAt,
  signatureOf,
  type FunctionEntry,
} from '../../src/formula';
import { sheetOf } from '../engine/notation';
import { FUNCTION_GOLDENS, type FunctionGolden } from './function-goldens';

const evaluate = (entry: string): Evaluation => new Evaluation(sheetOf(`x = ${entry}`));
const codesOf = (entry: string): readonly string[] =>
  evaluate(entry)
    .findings('l0')
    .map(({ code }) => code);

function figureOf(entry: string): unknown {
  const figure = evaluate(entry).figure('l0', 'nominal');
  return figure.state === 'value' ? { value: figure.value, unit: figure.unit.word } : figure;
}

const near = (value: number): unknown =>
  expect.closeTo(value, value === 0 ? 9 : 5 - Math.ceil(Math.log10(Math.abs(value)))) as unknown;

const isError = (code: string): boolean => CATALOGUE[code as FindingCode].severity === 'error';

const cases: readonly { name: string; entry: FunctionEntry; golden: FunctionGolden }[] = FUNCTIONS.map((entry) => ({
  name: entry.name,
  entry,
  golden: FUNCTION_GOLDENS[entry.name] ?? { example: [NaN, ''], derivation: '', refused: [], outside: [] },
}));

describe('the catalogue', () => {
  it('has a golden case for every function, and no golden case without one', () => {
    expect(Object.keys(FUNCTION_GOLDENS).sort()).toEqual(FUNCTIONS.map(({ name }) => name).sort());
  });

  it('has every function of this milestone', () => {
    const wanted =
      'abs min max sqrt exp ln log10 round floor ceil sin cos tan asin acos atan atan2 if and or not sum mean interpolate ' +
      'db lin powersum powerdiff fieldsum meanpower ratiosum rebase ' +
      'noise_density thermal_noise noise_temperature noise_figure cascade_nf passive_nf free_space_loss capacity';
    expect(wanted.split(' ').filter((name) => findFunction(name) === undefined)).toEqual([]);
  });

  it('has each name once', () => {
    expect(new Set(FUNCTIONS.map(({ name }) => name)).size).toBe(FUNCTIONS.length);
  });

  it.each(['toString', 'constructor', '__proto__', 'Powersum', ''])('knows no function “%s”', (name) => {
    expect(findFunction(name)).toBeUndefined();
  });
});

describe.each(cases)('$name', ({ name, entry, golden }) => {
  it('is described: one sentence, formula, source, result, parameters', () => {
    expect(entry.name).toMatch(/^[a-z][a-z0-9_]*$/);
    expect(entry.text).toMatch(/^[A-Z].*\.$/);
    expect([entry.formula, entry.source, entry.result].every((text) => text.length > 1)).toBe(true);
    expect(FUNCTION_GROUPS).toContain(entry.group);
    expect(entry.parameters.every(({ name: parameter, text }) => parameter.length > 0 && text.length > 0)).toBe(true);
    expect(signatureOf(entry)).toMatch(new RegExp(`^${name}\\(.+\\)$`));
    expect(fewestArguments(entry)).toBeLessThanOrEqual(entry.parameters.length);
    expect(parameterAt(entry, entry.parameters.length) === undefined).toBe(entry.repeats === 0);
  });

  it('gives in its example what was worked out by hand, without a warning', () => {
    const [value, unit] = golden.example;
    expect(entry.example).toContain(`${name}(`);
    expect(figureOf(entry.example)).toEqual({ value: near(value), unit });
    expect(codesOf(entry.example)).toEqual([]);
  });

  it('gives the further golden figures', () => {
    const found = (golden.more ?? []).map(([call]) => [call, figureOf(call)]);
    expect(found).toEqual((golden.more ?? []).map(([call, value, unit]) => [call, { value: near(value), unit }]));
  });

  it('refuses arguments that it cannot take', () => {
    expect(golden.refused.length).toBeGreaterThan(0);
    expect(golden.refused.map(([call]) => [call, ...codesOf(call)])).toEqual(golden.refused);
    expect(golden.refused.map(([call]) => evaluate(call).figure('l0', 'nominal').state)).toEqual(
      golden.refused.map(() => 'withheld'),
    );
  });

  it('tells what it does outside its domain', () => {
    for (const [call, code] of golden.outside) {
      expect([call, ...codesOf(call)]).toContain(code);
      expect([call, evaluate(call).figure('l0', 'nominal').state]).toEqual([
        call,
        isError(code) ? 'withheld' : 'value',
      ]);
    }
  });

  it('never gives NaN or infinity, but no power in decibels', () => {
    for (const call of [
      entry.example,
      ...(golden.more ?? []).map(([one]) => one),
      ...golden.outside.map(([one]) => one),
    ]) {
      const figure = evaluate(call).figure('l0', 'nominal');
      if (figure.state === 'value')
        expect([
          call,
          Number.isFinite(figure.value) || (figure.value === -Infinity && figure.unit.form === 'decibel'),
        ]).toEqual([call, true]);
    }
  });

  it('counts arguments: one too few and, where the list ends, one too many are refused', () => {
    const call = (count: number): string => `${name}(${Array.from({ length: count }, () => '1').join(', ')})`;
    const fewest = entry.form === 'ordinary' && entry.mayEndEarly === true ? 1 : fewestArguments(entry);
    if (fewest > 0) expect(codesOf(call(fewest - 1))).toEqual(['wrong-arguments']);
    if (entry.repeats === 0) expect(codesOf(call(entry.parameters.length + 1))).toEqual(['wrong-arguments']);
  });
});
