/** trials, sensitivity, sweep and solve: what they print, in every format, their exit codes, and what they say of what cannot be used. */
import { afterEach, describe, expect, it, vi } from 'vitest';
import { run } from '../../src/command/run';
import { writeWorksheetFile } from '../../src/exchange';
import type { Tolerance } from '../../src/worksheet';
import { both, withTolerances } from '../analysis/support';
import { sheetOf } from '../engine/notation';
import { runOn, worldOf } from './support';

const TEXT = `P | dBm | level | wanted = 14 dBm @ storm: 12 dBm
d = 10 km
f = 868 MHz
L_fade | dB | loss = 8 dB # Fading
C | dBm | level | wanted = P - free_space_loss(d, f) - L_fade
N = -117 dBm
SNR | dB | signal ratio = C - N # Signal-to-noise ratio require >= 11 dB`;

const TOLERANCES: Readonly<Record<string, Tolerance>> = {
  P: { favourable: '0.5 dB', adverse: '1 dB', shape: 'triangular' },
  L_fade: { favourable: '2 dB', adverse: '3 dB', shape: 'uniform' },
  d: both('5 %', 'uniform'),
};

const fileWith = (text: string, tolerances: Readonly<Record<string, Tolerance>>, ...cases: readonly string[]): string =>
  writeWorksheetFile(withTolerances(sheetOf(text, ...cases), tolerances));

const SHEET = fileWith(TEXT, TOLERANCES, 'calm', 'storm');
/** 14 dBm − 111.22 dB − 8 dB + 117 dBm. */
const NOMINAL = 14 - 20 * Math.log10((4 * Math.PI * 1e4 * 868e6) / 299792458) - 8 + 117;

interface TrialsJson {
  readonly [key: string]: unknown;
  readonly percentiles: Readonly<Record<string, number>>;
  readonly rootSumSquare: Readonly<Record<string, number>>;
}

afterEach(() => {
  vi.restoreAllMocks();
});

const json = (...words: readonly string[]): unknown => JSON.parse(runOn(SHEET, ...words, '--format', 'json').results);

describe('trials', () => {
  const words = ['trials', 'sheet', '--line', 'SNR', '--case', 'calm', '--count', '20000', '--seed', '3'];

  it('prints the object of the contract', () => {
    const found = json(...words) as TrialsJson;
    expect(Object.keys(found)).toEqual([
      'line',
      'case',
      'unit',
      'count',
      'seed',
      'withheld',
      'mean',
      'standardDeviation',
      'median',
      'percentiles',
      'met',
      'metLow',
      'metHigh',
      'nominal',
      'adverse',
      'favourable',
      'rootSumSquare',
    ]);
    expect(found).toMatchObject({ line: 'SNR', case: 'calm', unit: 'dB', count: 20_000, seed: 3, withheld: 0 });
    const spread = 20 * Math.log10(1.05);
    expect(found['nominal']).toBeCloseTo(NOMINAL, 9);
    expect(found['adverse']).toBeCloseTo(NOMINAL - 1 - 3 - spread, 9);
    expect(found['favourable']).toBeCloseTo(NOMINAL + 0.5 + 2 - 20 * Math.log10(0.95), 9);
    expect(Object.keys(found.percentiles).sort()).toEqual(['0.1', '1', '5', '50', '95', '99', '99.9']);
    expect(found.percentiles['50']).toBe(found['median']);
    // Means by the slopes: −½ dB of the fading, −⅙ dB of the power.
    const slope = 20 / Math.LN10 / 10;
    const variance = (1 + 0.25 + 0.5) / 18 + 25 / 12 + (slope * 0.5) ** 2 / 3;
    expect(found.rootSumSquare).toEqual({
      mean: expect.closeTo(NOMINAL - 0.5 - 1 / 6, 9) as number,
      standardDeviation: expect.closeTo(Math.sqrt(variance), 9) as number,
      lower: expect.closeTo(NOMINAL - 0.5 - 1 / 6 - 3 * Math.sqrt(variance), 9) as number,
      upper: expect.closeTo(NOMINAL - 0.5 - 1 / 6 + 3 * Math.sqrt(variance), 9) as number,
    });
    expect(found['standardDeviation']).toBeCloseTo(Math.sqrt(variance), 1);
    expect(found['met']).toBeGreaterThan(0.3);
    expect(found['metLow']).toBeLessThan(found['met'] as number);
    expect(found['metHigh']).toBeGreaterThan(found['met'] as number);
  });

  it('prints the same for the same seed, and other figures for another', () => {
    expect(json(...words)).toEqual(json(...words));
    expect(json(...words.slice(0, -1), '4')).not.toEqual(json(...words));
  });

  it('takes the first case when none is named, and says so', () => {
    const answer = runOn(SHEET, 'trials', 'sheet', '--line', 'SNR', '--count', '10', '--format', 'json');
    expect(JSON.parse(answer.results)).toMatchObject({ case: 'calm', seed: 1, count: 10 });
    expect(answer.messages).toBe('sheet: the case is calm; --case takes storm.\n');
    expect(
      JSON.parse(
        runOn(SHEET, 'trials', 'sheet', '--line', 'SNR', '--case', 'storm', '--count', '9', '--format', 'json').results,
      ),
    ).toMatchObject({
      case: 'storm',
      nominal: expect.closeTo(NOMINAL - 2, 9) as number,
    });
  });

  it('is 0 when the requirement is met without deviations, 1 when it is not', () => {
    expect(NOMINAL).toBeGreaterThan(11);
    expect(runOn(SHEET, ...words).exitCode).toBe(0);
    expect(runOn(SHEET, 'trials', 'sheet', '--line', 'SNR', '--case', 'storm', '--count', '9').exitCode).toBe(1);
  });

  it('writes a table for people', () => {
    const { results } = runOn(SHEET, ...words);
    expect(results).toMatch(
      /^SNR — Signal-to-noise ratio, calm: 20000 trials, seed 3\nnominal +\d+\.\d\d dB\nadverse +/,
    );
    expect(results).toMatch(/\nmedian +\d+\.\d\d dB\n/);
    expect(results).toMatch(/\n {2}mean - 3σ +-?\d+\.\d\d dB\n/);
    expect(results).toMatch(
      /\nrequirement at least 11 dB: met in \d+(\.\d+)? % of trials \(95 % interval \d+(\.\d+)? % to \d+(\.\d+)? %\)\n$/,
    );
  });

  it('writes CSV', () => {
    const { results } = runOn(SHEET, ...words, '--format', 'csv');
    expect(results.split('\r\n').slice(0, 5)).toEqual([
      'figure,value,unit',
      'count,20000,',
      'seed,3,',
      'withheld,0,',
      `nominal,${String((json(...words) as TrialsJson)['nominal'])},dB`,
    ]);
  });

  it('says which tolerances it cannot use, computes without them, and ends with 1', () => {
    const sheet = fileWith('x = 3 dBm\ny = 4 dB\nz | dBm | level | wanted = x + y', {
      x: { favourable: '1 dB', adverse: '1 dB' },
      y: both('1 dB', 'uniform'),
    });
    const answer = runOn(sheet, 'trials', 'sheet', '--line', 'z', '--count', '100', '--format', 'json');
    expect(answer.exitCode).toBe(1);
    expect(answer.messages).toBe(
      'sheet: x is taken as exact: its tolerance says favourable and adverse, but not whether the level is wanted or unwanted: say its side, or give below and above.\n',
    );
    expect(JSON.parse(answer.results)).toMatchObject({ adverse: 6, favourable: 8 });
  });

  it('says when nothing deviates, and when no direction is known to be good', () => {
    const answer = runOn(fileWith('z = 4 MHz', {}), 'trials', 'sheet', '--line', 'z', '--count', '100');
    expect(answer.exitCode).toBe(0);
    expect(answer.messages).toBe(
      'sheet: nothing that z rests on has a tolerance.\nsheet: higher is taken for better in z; a requirement, or a kind and side, would tell.\n',
    );
  });

  it('of a line that is withheld gives nulls and 1', () => {
    const answer = runOn(
      fileWith('z = 4 MHz + 1 dB', {}),
      'trials',
      'sheet',
      '--line',
      'z',
      '--count',
      '100',
      '--format',
      'json',
    );
    expect(answer.exitCode).toBe(1);
    expect(JSON.parse(answer.results)).toMatchObject({
      unit: null,
      withheld: 100,
      mean: null,
      median: null,
      nominal: null,
      met: null,
    });
    expect(runOn(fileWith('z = 4 MHz + 1 dB', {}), 'trials', 'sheet', '--line', 'z', '--count', '100').results).toMatch(
      /withheld in 100 trials\n$/,
    );
  });

  it('tells how far it has come only when it takes long', () => {
    const told: string[] = [];
    const world = { ...worldOf({ sheet: SHEET }), tellProgress: (sentence: string) => told.push(sentence) };
    const answer = run(['trials', 'sheet', '--line', 'SNR', '--count', '1000'], world);
    expect([answer.exitCode, told]).toEqual([0, []]);
  });

  it('tells it once a second', () => {
    const told: string[] = [];
    let now = 0;
    // Every look at the clock is 400 ms after the last: one block of 1024 trials.
    vi.spyOn(performance, 'now').mockImplementation(() => (now += 400));
    const world = { ...worldOf({ sheet: SHEET }), tellProgress: (sentence: string) => told.push(sentence) };
    run(['trials', 'sheet', '--line', 'SNR', '--count', '10240'], world);
    expect(told).toEqual(['trials: 30 %', 'trials: 60 %', 'trials: 90 %']);
  });
});

describe('sensitivity', () => {
  const words = ['sensitivity', 'sheet', '--line', 'SNR', '--case', 'calm'];

  it('prints the object of the contract, largest effect first', () => {
    const found = json(...words) as { readonly inputs: readonly Record<string, unknown>[] };
    expect(found).toMatchObject({ line: 'SNR', case: 'calm', unit: 'dB' });
    expect(found.inputs.map((input) => [input['symbol'], input['slopeUnit'], input['exact']])).toEqual([
      ['L_fade', 'dB/dB', true],
      ['P', 'dB/dB', true],
      ['d', 'dB/km', true],
      ['f', 'dB/MHz', true],
      ['N', 'dB/dB', true],
    ]);
    expect(found.inputs[0]).toMatchObject({
      slope: -1,
      adverse: expect.closeTo(-3, 9) as number,
      favourable: expect.closeTo(2, 9) as number,
    });
    expect(found.inputs[2]).toMatchObject({ slope: expect.closeTo(-20 / Math.LN10 / 10, 9) as number });
    expect(found.inputs[3]).toMatchObject({ adverse: null, favourable: null, share: 0 });
    expect(found.inputs.reduce((sum, { share }) => sum + Number(share), 0)).toBeCloseTo(1, 12);
  });

  it('writes tables', () => {
    const { results, exitCode } = runOn(SHEET, ...words);
    expect(exitCode).toBe(0);
    expect(results).toMatch(
      /^SNR — Signal-to-noise ratio, calm\nFigure +Slope +Adverse +Favourable +Share of variance\nL_fade +-1 dB\/dB +-3\.00 dB +2\.00 dB +\d\d\.\d %\n/,
    );
    expect(results).toMatch(/\nN +-1 dB\/dB +— +— +—\n$/);
    expect(runOn(SHEET, ...words, '--format', 'csv').results).toMatch(
      /^symbol,slope,slope unit,exact,adverse,favourable,unit,share\r\nL_fade,-1,dB\/dB,yes,-3(\.0+\d*)?,/,
    );
  });
});

describe('sweep', () => {
  const words = [
    'sweep',
    'sheet',
    '--vary',
    'd',
    '--from',
    '1 km',
    '--to',
    '100 km',
    '--steps',
    '2',
    '--line',
    'SNR',
    '--line',
    'C',
    '--case',
    'calm',
  ];

  it('prints the object of the contract, in so many steps', () => {
    const found = json(...words) as { readonly points: readonly { x: number; values: Record<string, number> }[] };
    expect(found).toMatchObject({ vary: 'd', unit: 'km' });
    expect(found.points.map(({ x }) => x)).toEqual([1, 50.5, 100]);
    expect(found.points[0]?.values).toEqual({
      SNR: expect.closeTo(NOMINAL + 20, 9) as number,
      C: expect.closeTo(NOMINAL + 20 - 117, 9) as number,
    });
    const log = json(...words, '--log') as typeof found;
    expect(log.points.map(({ x }) => x)).toEqual([1, expect.closeTo(10, 12), 100]);
    expect(log.points[1]?.values['SNR']).toBeCloseTo(NOMINAL, 9);
  });

  it('takes other units of the dimension, and negative figures', () => {
    const found = JSON.parse(
      runOn(
        SHEET,
        'sweep',
        'sheet',
        '--vary',
        'P',
        '--from',
        '-10 dBm',
        '--to',
        '1 mW',
        '--steps',
        '1',
        '--line',
        'SNR',
        '--format',
        'json',
      ).results,
    ) as { readonly points: readonly { x: number }[] };
    expect(found.points.map(({ x }) => x)).toEqual([-10, 0]);
  });

  it('writes tables', () => {
    expect(runOn(SHEET, ...words).results).toMatch(/^d +SNR +C\n1 km +\d\d\.\d\d dB +-\d\d\.\d\d dBm\n50\.5 km /);
    expect(runOn(SHEET, ...words, '--format', 'csv').results).toMatch(
      /^d \(km\),SNR \(dB\),C \(dBm\)\r\n1,\d+\.\d+,-\d+\.\d+\r\n50\.5,/,
    );
  });
});

describe('solve', () => {
  const words = ['solve', 'sheet', '--vary', 'd', '--line', 'SNR', '--for', '10 dB', '--case', 'calm'];
  const distance = 10 * 10 ** ((NOMINAL - 10) / 20);

  it('prints the value in the unit of the varied line', () => {
    const { results, messages, exitCode } = runOn(SHEET, ...words);
    expect([results, messages, exitCode]).toEqual([expect.stringMatching(/^\d+\.\d+ km\n$/) as string, '', 0]);
    expect(Number.parseFloat(results)).toBeCloseTo(distance, 9);
    expect(json(...words)).toEqual({
      vary: 'd',
      unit: 'km',
      line: 'SNR',
      case: 'calm',
      for: 10,
      between: [0.01, 10000],
      values: [expect.closeTo(distance, 9) as number],
    });
  });

  it('prints every value, one a line', () => {
    const sheet = fileWith('x = 1\nz = x^3 - 6*x^2 + 11*x', {});
    expect(
      runOn(sheet, 'solve', 'sheet', '--vary', 'x', '--line', 'z', '--for', '6', '--between', '-10', '10').results,
    ).toBe('1\n2\n3\n');
  });

  it('says that there is none, and ends with 1', () => {
    expect(runOn(SHEET, ...words, '--between', '1 m', '1 km')).toEqual({
      results: '',
      messages: 'sheet: no value of d between 0.001 km and 1 km gives SNR = 10.00 dB.\n',
      exitCode: 1,
    });
    expect(json(...words, '--between', '1 m', '1 km')).toMatchObject({ values: [], between: [0.001, 1] });
  });

  it('takes bounds in either order, also below zero', () => {
    const found = runOn(
      SHEET,
      'solve',
      'sheet',
      '--vary',
      'P',
      '--line',
      'SNR',
      '--for',
      '-3 dB',
      '--between',
      '20 dBm',
      '-20 dBm',
    );
    expect(Number.parseFloat(found.results)).toBeCloseTo(14 - NOMINAL - 3, 9);
  });
});

describe('bad usage', () => {
  const CURVE_FREE = fileWith('x = 1 dB\ny =\nn = 1\nP = 3 dBm\nQ | dBm = n * P\nz = x + 1 dB', {}, 'calm', 'storm');

  it.each<readonly [readonly string[], RegExp]>([
    [['trials', 'sheet'], /^trials needs --line\.\n\nlevelwright/],
    [['trials', '--line', 'z'], /^trials takes one file/],
    [['trials', 'sheet', '--line', 'z', '--count', '0'], /^--count takes a whole number from 1 to 10000000, not “0”/],
    [['trials', 'sheet', '--line', 'z', '--count', '1e3'], /^--count takes a whole number/],
    [['trials', 'sheet', '--line', 'z', '--seed', '-1'], /^--seed takes a whole number from 0/],
    [
      ['trials', 'sheet', '--line', 'z', '--format', 'markdown'],
      /^There is no format “markdown”; there are text, json, csv\./,
    ],
    [['trials', 'sheet', '--line', 'zz'], /^sheet: there is no line “zz”/],
    [['trials', 'sheet', '--line', 'z', '--case', 'fog'], /^sheet: there is no case “fog”/],
    [
      ['trials', 'sheet', '--line', 'z', '--case', 'calm', '--case', 'storm'],
      /^sheet: one case at a time; calm, storm are meant/,
    ],
    [['sensitivity', 'sheet'], /^sensitivity needs --line/],
    [['sensitivity', 'sheet', 'z'], /^sensitivity takes one file/],
    [['sweep', 'sheet', '--vary', 'x', '--from', '1', '--to', '2', '--steps', '3'], /^sweep needs --line/],
    [['sweep', 'sheet', '--vary', 'x', '--from', '1', '--to', '2', '--line', 'z'], /^sweep needs --steps/],
    [
      ['sweep', 'sheet', '--vary', 'x', '--from', '1 km', '--to', '2', '--steps', '3', '--line', 'z'],
      /^--from takes a quantity in dB, not “1 km”/,
    ],
    [
      ['sweep', 'sheet', '--vary', 'x', '--from', '1', '--to', '2', '--steps', '3', '--line', 'z', '--log'],
      /^--log is for linear quantities/,
    ],
    [
      ['sweep', 'sheet', '--vary', 'n', '--from', '0', '--to', '2', '--steps', '3', '--line', 'z', '--log'],
      /^--log goes from above zero/,
    ],
    [
      ['sweep', 'sheet', '--vary', 'y', '--from', '0', '--to', '2', '--steps', '3', '--line', 'z'],
      /^sheet: y has no unit yet/,
    ],
    [
      ['sweep', 'sheet', '--vary', 'n', '--from', '0', '--to', '2', '--steps', '3', '--line', 'Q'],
      /^sheet: n cannot be varied: it says how often/,
    ],
    [['solve', 'sheet', '--vary', 'x', '--line', 'z'], /^solve needs --for/],
    [
      ['solve', 'sheet', '--vary', 'x', '--line', 'z', '--for', '3 dB', '--between', '3'],
      /^--between takes two quantities/,
    ],
    [
      ['solve', 'sheet', '--vary', 'x', '--line', 'z', '--for', '3 dB', '--between', '3', '3'],
      /^--between takes two different/,
    ],
    [['solve', 'sheet', '--vary', 'x', '--line', 'z', '--for', '3 km'], /^--for takes a quantity in dB/],
    [['solve', 'sheet', '--vary', 'x', '--line', 'y', '--for', '3 km'], /^sheet: y has no unit/],
  ])('%j', (words, message) => {
    const answer = runOn(CURVE_FREE, ...words);
    expect([answer.exitCode, answer.results]).toEqual([2, '']);
    expect(answer.messages).toMatch(message);
  });

  it('of what a chain computes', () => {
    const sheet = sheetOf('z = rx.gain');
    const file = writeWorksheetFile({
      ...sheet,
      sections: [
        ...sheet.sections,
        {
          id: 'rx',
          kind: 'chain',
          symbol: 'rx',
          title: '',
          stages: [{ id: 's', symbol: 'a', label: '', gain: '3 dB' }],
        },
      ],
    });
    expect(runOn(file, 'solve', 'sheet', '--vary', 'rx.gain', '--line', 'z', '--for', '3').messages).toMatch(
      /^sheet: rx\.gain is computed, not entered/,
    );
    expect(runOn(file, 'solve', 'sheet', '--vary', 'rx.a.gain', '--line', 'z', '--for', '5').results).toBe('5 dB\n');
  });
});
