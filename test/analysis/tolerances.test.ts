/** Tolerances as typed: units, per cent, directions by kind, and what is refused. */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import type { Tolerance } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';
import { inputsOfLine, toleranced } from './support';

function spreadOf(line: string, tolerance: Tolerance): readonly number[] | string {
  const evaluation = toleranced(`x${line}\nz = x`, { x: tolerance });
  const { inputs, troubles } = inputsOfLine(evaluation, 'z');
  const [input] = inputs;
  return input === undefined ? (troubles[0]?.why ?? 'exact') : [input.spread.below, input.spread.above];
}

const GOOD: Tolerance = { favourable: '1 dB', adverse: '2 dB' };

describe('favourable and adverse', () => {
  it.each([
    [' | dB | gain = 3 dB', [2, 1]],
    [' | dB | loss = 3 dB', [1, 2]],
    [' | dB | noise figure = 3 dB', [1, 2]],
    [' | dB | signal ratio = 3 dB', [2, 1]],
    [' | dBc | impairment ratio = -30 dBc', [1, 2]],
    [' | dB/K | figure of merit = 3 dB/K', [2, 1]],
    [' | dBm | level | wanted = 3 dBm', [2, 1]],
    [' | dBm | level | unwanted = 3 dBm', [1, 2]],
  ])('of%s', (line, expected) => {
    expect(spreadOf(line, GOOD)).toEqual(expected);
  });

  it('of a temperature is lower', () => {
    expect(spreadOf(' | K | temperature = 290 K', { favourable: '10 K', adverse: '20 K' })).toEqual([10, 20]);
  });

  it.each([
    [' = 3 dBm', /wanted or unwanted/],
    [' | MHz | bandwidth = 3 MHz', /for a bandwidth: give below and above/],
    [' = 3', /for a plain quantity: give below and above/],
  ])('of%s is refused', (line, why) => {
    expect(spreadOf(line, { favourable: '1', adverse: '1' })).toMatch(why);
  });
});

describe('deviations', () => {
  it.each<readonly [string, Tolerance, readonly number[]]>([
    [' = 868 MHz', { below: '20 kHz', above: '1 MHz' }, [0.02, 1]],
    [' = 25 mW', { below: '10 %', above: '0.5' }, [2.5, 0.5]],
    [' = 15 °C', { below: '5 °C', above: '10 K' }, [5, 10]],
    [' = 4 %', { below: '1 %', above: '0.5' }, [1, 0.5]],
    [' = -5 m', { below: '10 %', above: '0 m' }, [0.5, 0]],
    [' = 14 dBm', { below: '1 dB', above: '0.5' }, [1, 0.5]],
    [' = 0.9 dB/m', { below: '10 dB/km', above: '10 %' }, [0.01, 0.09]],
    [' = 3 dB', { above: '1 dB' }, [0, 1]],
  ])('%s with %j', (line, tolerance, expected) => {
    const found = spreadOf(line, tolerance);
    expect(found).toEqual(expected.map((size) => expect.closeTo(size, 12) as number));
  });

  it.each<readonly [string, Tolerance, RegExp]>([
    [' = 14 dBm', { below: '1 dBm', above: '1 dB' }, /“1 dBm” is not in dB/],
    [' = 14 dBm', { below: '5 %' }, /not in dB/],
    [' = 25 mW', { above: '1 dB' }, /neither in mW nor in %/],
    [' = 3 dB', { above: '-1 dB' }, /negative/],
    [' = 3 dB', { above: 'much' }, /“much” is no quantity/],
    [' = 3 dB', {}, /names no deviation/],
    [' | dB | gain = 3 dB', { above: '1 dB', adverse: '1 dB' }, /the one or the other/],
    [' = 3 dB', { above: '1 dB', shape: 'bell' as 'normal' }, /shape “bell”/],
  ])('%s with %j is refused', (line, tolerance, why) => {
    expect(spreadOf(line, tolerance)).toMatch(why);
  });

  it('of nothing are exact', () => {
    expect(spreadOf(' = 3 dB', { above: '0 dB', below: '0 dB' })).toBe('exact');
  });

  it('without a shape are uniform', () => {
    const { inputs } = inputsOfLine(toleranced('z = 3 dB', { z: { above: '1 dB' } }), 'z');
    expect(inputs[0]?.spread.shape).toBe('uniform');
  });
});

describe('the inputs of a line', () => {
  it('are those above it in its case, and no others', () => {
    const evaluation = toleranced('a = 1 dB\nb = 2 dB\nc = 3 dB\nz = a + b', {
      a: { above: '1 dB' },
      c: { above: '1 dB' },
    });
    const { inputs, exact } = inputsOfLine(evaluation, 'z');
    expect([inputs.map(({ lineId }) => lineId), exact]).toEqual([['l0'], ['l1']]);
  });

  it('do not deviate where there is no power', () => {
    const evaluation = toleranced('P | dBm = 0 W\nQ = -100 dBm\nz = powersum(P, Q)', { P: { above: '1 dB' } });
    const { inputs, troubles, exact } = inputsOfLine(evaluation, 'z');
    expect([inputs, troubles, exact]).toEqual([[], [], ['l0', 'l1']]);
  });

  it('are stage values of chains as well, each by what it is', () => {
    const sheet = sheetOf('z = rx.oip3 + rx.nf');
    const good = (size: string): Tolerance => ({ favourable: `${size} dB`, adverse: '2 dB' });
    const evaluation = new Evaluation({
      ...sheet,
      sections: [
        ...sheet.sections,
        {
          id: 'rx',
          kind: 'chain',
          symbol: 'rx',
          title: '',
          stages: [
            {
              id: 's1',
              symbol: 'lna',
              label: '',
              gain: '15 dB',
              noiseFigure: '1 dB',
              outputIntercept: '20 dBm',
              tolerance: { gain: good('1'), noiseFigure: good('0.5'), outputIntercept: good('3') },
            },
          ],
        },
      ],
    });
    const { inputs, troubles } = inputsOfLine(evaluation, 'z');
    expect(troubles).toEqual([]);
    expect(
      Object.fromEntries(
        inputs.map(({ lineId, spread }) => [evaluation.line(lineId)?.symbol, [spread.below, spread.above]]),
      ),
    ).toEqual({ 'rx.lna.gain': [2, 1], 'rx.lna.nf': [0.5, 2], 'rx.lna.oip3': [2, 3] });
  });
});
