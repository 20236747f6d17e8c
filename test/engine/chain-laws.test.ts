/**
 * The laws of chains, as properties of the whole way from the document to the figure: stages at random, put into a worksheet
 * and evaluated.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ChainSection, Stage } from '../../src/worksheet';
import { between, expectSame, figure, sheet, written } from './law-support';
import { valueOf } from './notation';

const chainOf = (stages: readonly Stage[], inputs: Partial<ChainSection> = {}): ChainSection => ({
  id: 'rx',
  kind: 'chain',
  symbol: 'rx',
  title: 'Chain',
  ...inputs,
  stages,
});

interface Figures {
  readonly gain: number;
  readonly noiseFigure: number;
  readonly intercept: number;
  readonly kelvin: number;
  readonly isPassive: boolean;
  readonly off: boolean;
}

const figures = fc.record({
  gain: between(-20, 30),
  noiseFigure: between(0.05, 20),
  intercept: between(-20, 50),
  kelvin: between(4, 500),
  isPassive: fc.boolean(),
  off: fc.boolean(),
});

/** Passive stages lose; their noise is that of their temperature. */
const stageOf = (of: Figures, index: number): Stage => ({
  id: `s${String(index)}`,
  symbol: `s${String(index)}`,
  label: '',
  ...(of.off ? { off: true } : {}),
  gain: written(of.isPassive ? -Math.abs(of.gain) : of.gain, 'dB'),
  ...(of.isPassive ? { temperature: written(of.kelvin, 'K') } : { noiseFigure: written(of.noiseFigure, 'dB') }),
  inputIntercept: written(of.intercept, 'dBm'),
});

const stages = fc.array(figures, { minLength: 1, maxLength: 6 }).map((list) => list.map(stageOf));
const active = stages.map((list) => list.map(({ off: _, ...stage }): Stage => stage));
const source = between(2.7, 2000);
const SURROUNDINGS = { signal: '-90 dBm', bandwidth: '1 MHz' };

describe('a chain', () => {
  it('split anywhere in two has the same S/N, gain and intercept', () => {
    fc.assert(
      fc.property(active, source, fc.nat(), (list, kelvin, cut) => {
        const at = cut % (list.length + 1);
        const noise = written(kelvin, 'K');
        const whole = sheet(chainOf(list, { ...SURROUNDINGS, noise }));
        const [front, back] = [list.slice(0, at), list.slice(at)];
        if (front.length === 0 || back.length === 0) return;
        const halves = sheet(
          chainOf(front, { ...SURROUNDINGS, noise, id: 'a', symbol: 'a' }),
          // What the second takes in is what the first gives out: its level, and its noise as a temperature.
          chainOf(back, { ...SURROUNDINGS, signal: 'a.signal', noise: 'a.tsys*lin(a.gain)', id: 'b', symbol: 'b' }),
        );
        expectSame(figure(halves, 'b.snr'), figure(whole, 'rx.snr'));
        expectSame(figure(halves, 'b.signal'), figure(whole, 'rx.signal'));
        expectSame(figure(halves, 'b.noise'), figure(whole, 'rx.noise'));
        expectSame(figure(halves, 'a.gain') + figure(halves, 'b.gain'), figure(whole, 'rx.gain'));
        const [first, second] = [figure(halves, 'a.iip3'), figure(halves, 'b.iip3') - figure(halves, 'a.gain')];
        expectSame(-10 * Math.log10(10 ** (-first / 10) + 10 ** (-second / 10)), figure(whole, 'rx.iip3'));
      }),
    );
  });

  it('of one attenuator at 290 K has its loss as noise figure', () => {
    fc.assert(
      fc.property(between(0, 60), fc.boolean(), (loss, isSaid) => {
        const pad: Stage = { id: 's', symbol: 's', label: '', gain: written(-loss, 'dB') };
        const evaluation = sheet(chainOf([isSaid ? { ...pad, temperature: '290 K' } : pad]));
        expectSame(figure(evaluation, 'rx.nf'), loss);
        expectSame(figure(evaluation, 'rx.s.nf'), loss);
      }),
    );
  });

  it('adds nothing by a loss at the temperature of its source', () => {
    fc.assert(
      fc.property(between(0, 60), source, (loss, kelvin) => {
        const line: Stage = {
          id: 's',
          symbol: 's',
          label: '',
          gain: written(-loss, 'dB'),
          temperature: written(kelvin, 'K'),
        };
        const evaluation = sheet(chainOf([line], { ...SURROUNDINGS, noise: written(kelvin, 'K') }));
        expectSame(figure(evaluation, 'rx.noise'), figure(evaluation, 'rx.in.noise'));
      }),
    );
  });

  it('with a first gain beyond measure has the noise figure of its first stage', () => {
    fc.assert(
      fc.property(between(0.05, 20), active, (noiseFigure, rest) => {
        const first: Stage = {
          id: 'first',
          symbol: 'first',
          label: '',
          gain: '300 dB',
          noiseFigure: written(noiseFigure, 'dB'),
        };
        expectSame(figure(sheet(chainOf([first, ...rest])), 'rx.nf'), noiseFigure);
      }),
    );
  });

  it('has no lower noise figure than its first stage, and never a lower one behind one more stage', () => {
    fc.assert(
      fc.property(active, (list) => {
        const evaluation = sheet(chainOf(list));
        const behind = list.map(({ symbol }) => figure(evaluation, `rx.${symbol}.out.nf`));
        for (const [i, nf] of behind.entries()) expect(nf).toBeGreaterThanOrEqual((behind[i - 1] ?? 0) - 1e-9);
        expectSame(behind[0] ?? NaN, figure(evaluation, 'rx.s0.nf'));
        expectSame(behind.at(-1) ?? NaN, figure(evaluation, 'rx.nf'));
      }),
    );
  });

  it('has noise shares that make 100 % with the share of the source', () => {
    fc.assert(
      fc.property(stages, source, (list, kelvin) => {
        const evaluation = sheet(chainOf(list, { noise: written(kelvin, 'K') }));
        const on = list.filter(({ off }) => off !== true);
        const shares = on.map(({ symbol }) => figure(evaluation, `rx.${symbol}.noise_share`));
        expectSame(
          shares.reduce((sum, share) => sum + share, figure(evaluation, 'rx.source_share')),
          100,
        );
        for (const share of shares) expect(share).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  it('has distortion shares that make 100 %', () => {
    fc.assert(
      fc.property(stages, fc.constantFrom('coherent' as const, 'power' as const), (list, intercept) => {
        const on = list.filter(({ off }) => off !== true);
        if (on.length === 0) return;
        const evaluation = sheet(chainOf(list, { intercept }));
        const shares = on.map(({ symbol }) => figure(evaluation, `rx.${symbol}.distortion_share`));
        expectSame(
          shares.reduce((sum, share) => sum + share, 0),
          100,
        );
      }),
    );
  });

  it('has an intercept no higher in phase than as powers, and no higher than any stage leaves it', () => {
    fc.assert(
      fc.property(active, (list) => {
        const coherent = sheet(chainOf(list));
        const inPhase = figure(coherent, 'rx.iip3');
        const asPowers = figure(sheet(chainOf(list, { intercept: 'power' })), 'rx.iip3');
        const single = list.map(
          ({ symbol }, i) =>
            figure(coherent, `rx.${symbol}.iip3`) - (i === 0 ? 0 : figure(coherent, `rx.s${String(i - 1)}.out.gain`)),
        );
        expect(inPhase).toBeLessThanOrEqual(asPowers + 1e-9);
        expect(asPowers).toBeLessThanOrEqual(Math.min(...single) + 1e-9);
        if (list.length === 1) expectSame(inPhase, single[0] ?? NaN);
      }),
    );
  });
});

describe('a bypassed stage', () => {
  const outputs = ['gain', 'nf', 'te', 'tsys', 'iip3', 'oip3', 'mds', 'sfdr', 'signal', 'noise', 'snr', 'source_share'];
  const outputsOf = (list: readonly Stage[]): readonly (number | string)[] => {
    const evaluation = sheet(chainOf(list, { ...SURROUNDINGS, noise: '150 K' }));
    return outputs.map((output) => valueOf(evaluation, `rx.${output}`));
  };

  it('is as good as none', () => {
    fc.assert(
      fc.property(stages, (list) => {
        const on = list.filter(({ off }) => off !== true);
        if (on.length === 0) return;
        expect(outputsOf(list)).toEqual(outputsOf(on));
      }),
    );
  });

  it('may stand before or behind another bypassed one', () => {
    fc.assert(
      fc.property(active, figures, figures, fc.nat(), (list, one, other, place) => {
        const [a, b] = [stageOf({ ...one, off: true }, 10), stageOf({ ...other, off: true }, 11)];
        const at = place % (list.length + 1);
        const withBoth = (...both: readonly Stage[]): readonly Stage[] => [
          ...list.slice(0, at),
          ...both,
          ...list.slice(at),
        ];
        expect(outputsOf(withBoth(a, b))).toEqual(outputsOf(withBoth(b, a)));
      }),
    );
  });
});
