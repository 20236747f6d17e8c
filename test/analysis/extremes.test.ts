/** Worst and best cases: joint, by effect and not by sign, and inside a range where the line has a hump there. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { extremesOf, type Extremes } from '../../src/analysis';
import type { Tolerance } from '../../src/worksheet';
import { both, idOf, inputsOfLine, toleranced } from './support';

function extremesIn(
  text: string,
  tolerances: Readonly<Record<string, Tolerance>>,
  direction: 'higher' | 'lower' = 'higher',
): Extremes {
  const evaluation = toleranced(text, tolerances);
  const { evaluation: free, inputs } = inputsOfLine(evaluation, 'z');
  return extremesOf(free, idOf(evaluation, 'z'), 'nominal', inputs, direction);
}

describe('extremes', () => {
  it('take each figure to the limit that worsens the line', () => {
    const found = extremesIn('G = 10 dB\nL = 4 dB\nz = G - L', {
      G: { below: '1 dB', above: '0.5 dB' },
      L: { below: '0.25 dB', above: '2 dB' },
    });
    expect(found).toEqual({ adverse: 3, favourable: 6.75 });
  });

  it('are the other way round for a line that is better low', () => {
    expect(extremesIn('z = 3 dB', { z: { below: '1 dB', above: '2 dB' } }, 'lower')).toEqual({
      adverse: 5,
      favourable: 2,
    });
  });

  it('go by the effect of a figure, not by its sign in an entry', () => {
    // L counts once against and twice for.
    const found = extremesIn('L = 4 dB\na = 10 dB - L\nz = a + 2*L', { L: both('1 dB', 'uniform') });
    expect(found).toEqual({ adverse: 13, favourable: 15 });
    // And not at all where it cancels.
    const none = extremesIn('L = 4 dB\na = 10 dB - L\nz = a + L', { L: both('1 dB', 'uniform') });
    expect(none).toEqual({ adverse: 10, favourable: 10 });
  });

  it('are joint: what a figure does depends on where the others stand', () => {
    const found = extremesIn('P = -100 dBm\nQ = -100 dBm\nz = powersum(P, Q)', {
      P: both('3 dB', 'uniform'),
      Q: both('6 dB', 'uniform'),
    });
    const sum = (a: number, b: number): number => 10 * Math.log10(10 ** (a / 10) + 10 ** (b / 10));
    expect(found.adverse).toBeCloseTo(sum(-103, -106), 10);
    expect(found.favourable).toBeCloseTo(sum(-97, -94), 10);
  });

  it('find corners of a saddle, at which each figure alone does nothing', () => {
    const found = extremesIn('x = 0\ny = 0\nz = x*y + x*0.001', { x: both('1', 'uniform'), y: both('1', 'uniform') });
    expect(found.favourable).toBeCloseTo(1.001, 12);
    expect(found.adverse).toBeCloseTo(-1.001, 12);
  });

  it('find the hump of a line that is best between the limits', () => {
    // A drive P: the carrier over noise rises with it, the carrier over intermodulation falls twice as fast.
    const text =
      'P = 0 dB\nC_N | dB | signal ratio = 20 dB + P\nC_IM | dB | signal ratio = 26 dB - 2*P\nz = ratiosum(C_N, C_IM)';
    const found = extremesIn(text, { P: both('6 dB', 'uniform') });
    const ratio = (p: number): number => -10 * Math.log10(10 ** (-(20 + p) / 10) + 10 ** (-(26 - 2 * p) / 10));
    // At the best drive 2·10^(−C_IM/10) = 10^(−C_N/10): 26 − 2P − 10·lg 2 = 20 + P.
    const drive = (6 - 10 * Math.log10(2)) / 3;
    expect(found.favourable).toBeCloseTo(ratio(drive), 9);
    expect(found.favourable).toBeGreaterThan(ratio(0));
    expect(found.favourable).toBeGreaterThan(Math.max(ratio(-6), ratio(6)));
    expect(found.adverse).toBeCloseTo(Math.min(ratio(-6), ratio(6)), 12);
  });

  it('find a hump beside other figures that have none', () => {
    const text = 'x = 1\na = 3 dB\nz = a - x^2 * 1 dB';
    expect(extremesIn(text, { x: both('2', 'uniform'), a: both('1 dB', 'uniform') }).favourable).toBeCloseTo(4, 6);
    expect(extremesIn(text, { x: both('2', 'uniform'), a: both('1 dB', 'uniform') }).adverse).toBeCloseTo(2 - 9, 12);
  });

  it('move groups as one', () => {
    const found = extremesIn('G | dB | gain = 10 dB\nL | dB | loss = 4 dB\nz = G + L', {
      G: { favourable: '1 dB', adverse: '1 dB', group: 'heat' },
      L: { favourable: '0.75 dB', adverse: '0.75 dB', group: 'heat' },
    });
    expect(found).toEqual({ adverse: 13.75, favourable: 14.25 });
  });

  it('pass over places at which the line is withheld, and are the figure itself without tolerances', () => {
    const found = extremesIn('a = -103 dBm\nz = powerdiff(-100 dBm, a)', { a: both('4 dB', 'uniform') });
    // Where both are equal nothing is left, which is worse than anything; beyond there is no figure.
    expect(found.adverse).toBe(-Infinity);
    expect(found.favourable).toBeCloseTo(10 * Math.log10(1e-10 - 10 ** -10.7), 10);
    expect(extremesIn('z = 3 dB', {})).toEqual({ adverse: 3, favourable: 3 });
  });

  it('bound sums of any weights by the sum of their parts', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(fc.integer({ min: -3, max: 3 }), fc.integer({ min: 0, max: 5 }), fc.integer({ min: 0, max: 5 })),
          {
            minLength: 1,
            maxLength: 5,
          },
        ),
        (parts) => {
          const lines = parts.map((_, at) => `x${String(at)} = 1 dB`).join('\n');
          const sum = parts
            .map(([weight], at) => `${weight < 0 ? '-' : '+'} ${String(Math.abs(weight))}*x${String(at)}`)
            .join(' ');
          const tolerances = Object.fromEntries(
            parts.map(([, below, above], at) => [
              `x${String(at)}`,
              { below: `${String(below)} dB`, above: `${String(above)} dB` },
            ]),
          );
          const found = extremesIn(`${lines}\nz = 0 dB ${sum}`, tolerances);
          const nominal = parts.reduce((total, [weight]) => total + weight, 0);
          const worst = parts.reduce((total, [w, below, above]) => total + Math.min(-w * below, w * above), nominal);
          const best = parts.reduce((total, [w, below, above]) => total + Math.max(-w * below, w * above), nominal);
          expect(found.adverse).toBeCloseTo(worst, 9);
          expect(found.favourable).toBeCloseTo(best, 9);
        },
      ),
      { numRuns: 60 },
    );
  });
});
