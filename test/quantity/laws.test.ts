/** The laws of the decibel algebra, each quoted in the name of the property that holds it. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import {
  fieldSum,
  findUnit,
  meanPower,
  powerDifference,
  powerShares,
  powerSum,
  reciprocalSum,
  UNIT_WORDS,
} from '../../src/quantity';
import { cascadeNoiseFigureDb, noiseFigureDb, noiseTemperatureK, passiveNoiseFigureDb } from '../../src/radio';
import { sheetOf, valueOf } from '../engine/notation';

const level = fc.double({ min: -300, max: 300, noNaN: true });
const levels = fc.array(level, { minLength: 1, maxLength: 8 });
const positive = fc.double({ min: 1e-20, max: 1e20, noNaN: true, noDefaultInfinity: true });
const ratio = fc.double({ min: -60, max: 60, noNaN: true });

describe('“Sum order changes nothing.”', () => {
  const TERMS = [
    '+ P',
    '- L_1',
    '+ G_1',
    '- 3 dB',
    '+ 2*x',
    '+ 10*log10(4)',
    '- N',
    '+ NF',
    '+ B_d',
    '+ SNR',
    '- 1.5',
    '+ Q',
  ];
  const LINES = `P = 10 dBm
                 Q = 7 dBm
                 N = -101 dBm
                 L_1 = 2.5 dB
                 G_1 = 12 dB
                 NF = 4 dB
                 SNR = 9 dB
                 x = 0.5 dB
                 B_d = 60 dBHz`;
  const told = (terms: readonly string[]): unknown => {
    const evaluation = new Evaluation(sheetOf(`${LINES}\nsum = 0 dB ${terms.join(' ')}`));
    const { id } = evaluation.lines().at(-1) ?? { id: '' };
    const { figure, kind, side } = evaluation.reading(id, 'nominal');
    return {
      value:
        figure.state === 'value'
          ? `${figure.value.toFixed(9)} ${figure.unit.form === 'decibel' ? String(figure.unit.dimension) : ''}`
          : figure.state,
      kind,
      side,
      codes: evaluation
        .findings(id)
        .map(({ code }) => code)
        .sort(),
    };
  };

  it('neither the figure, nor the kind, nor what is found', () => {
    fc.assert(
      fc.property(
        fc
          .shuffledSubarray(TERMS, { minLength: 2, maxLength: 6 })
          .chain((terms) =>
            fc.tuple(
              fc.constant(terms),
              fc.shuffledSubarray(terms, { minLength: terms.length, maxLength: terms.length }),
            ),
          ),
        ([terms, shuffled]) => {
          const unitless = (all: readonly string[]): unknown => told(all);
          expect(unitless(shuffled)).toEqual(unitless(terms));
        },
      ),
      { numRuns: 150 },
    );
  });
});

describe('“lin(db(x)) = x.”', () => {
  it.each(['W', 'Hz', 'K', 'V', 'V/m', 'm²', '1'])('for x in %s', (unit) => {
    fc.assert(
      fc.property(positive, (x) => {
        const evaluation = new Evaluation(sheetOf(`x | ${unit} = ${String(x)}\ny | ${unit} = lin(db(x))`));
        const y = valueOf(evaluation, 'y');
        expect(typeof y === 'number' && Math.abs(y / x - 1)).toBeLessThan(1e-12);
      }),
      { numRuns: 40 },
    );
  });
});

describe('“powersum: commutative, associative to 1e-12 dB, between max and max + 10·log10 n, shifts with its terms, no power is neutral”', () => {
  it('commutative', () => {
    fc.assert(
      fc.property(level, level, (a, b) => {
        expect(powerSum([a, b])).toBe(powerSum([b, a]));
      }),
    );
    fc.assert(
      fc.property(levels, (all) => {
        expect(powerSum([...all].reverse())).toBeCloseTo(powerSum(all), 11);
      }),
    );
  });

  it('associative to 1e-12 dB', () => {
    // Levels of ±300 dB themselves are only known to 6e-14; 1e-12 dB is asked of levels up to 100 dB.
    const near = fc.double({ min: -100, max: 100, noNaN: true });
    fc.assert(
      fc.property(near, near, near, (a, b, c) => {
        expect(Math.abs(powerSum([powerSum([a, b]), c]) - powerSum([a, powerSum([b, c])]))).toBeLessThanOrEqual(1e-12);
      }),
    );
  });

  it('between max and max + 10·log10 n', () => {
    fc.assert(
      fc.property(levels, (all) => {
        const sum = powerSum(all);
        const most = Math.max(...all);
        expect(sum).toBeGreaterThanOrEqual(most);
        expect(sum).toBeLessThanOrEqual(most + 10 * Math.log10(all.length) + 1e-12 * Math.abs(most) + 1e-12);
      }),
    );
  });

  it('shifts with its terms', () => {
    fc.assert(
      fc.property(levels, ratio, (all, by) => {
        expect(powerSum(all.map((one) => one + by))).toBeCloseTo(powerSum(all) + by, 9);
      }),
    );
  });

  it('no power is neutral; empty or all of it is no power', () => {
    fc.assert(
      fc.property(levels, (all) => {
        expect(powerSum([...all, -Infinity])).toBe(powerSum(all));
      }),
    );
    expect([powerSum([]), powerSum([-Infinity, -Infinity])]).toEqual([-Infinity, -Infinity]);
  });

  it('does not overflow where the powers themselves would', () => {
    expect(powerSum([4000, 4000])).toBeCloseTo(4000 + 10 * Math.log10(2), 9);
    expect(powerSum([-4000, -4000])).toBeCloseTo(-4000 + 10 * Math.log10(2), 9);
  });
});

describe('“shares sum to 1 and equal finite differences”', () => {
  it('sum to 1', () => {
    fc.assert(
      fc.property(levels, (all) => {
        expect(powerShares(all).reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 10);
      }),
    );
  });

  it('are the derivative of the sum by each term', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -20, max: 20, noNaN: true }), { minLength: 1, maxLength: 6 }), (all) => {
        powerShares(all).forEach((share, at) => {
          const step = 1e-4;
          const moved = (by: number): number => powerSum(all.map((one, index) => (index === at ? one + by : one)));
          expect((moved(step) - moved(-step)) / (2 * step)).toBeCloseTo(share, 6);
        });
      }),
    );
  });

  it('of no power are none', () => {
    expect(powerShares([-Infinity, -Infinity])).toEqual([0, 0]);
    expect(powerShares([0, -Infinity])).toEqual([1, 0]);
  });
});

describe('“ratiosum(a, b) ≤ min(a, b)”', () => {
  it('and commutative, and no more than 10·log10 n below', () => {
    fc.assert(
      fc.property(fc.array(ratio, { minLength: 1, maxLength: 6 }), (all) => {
        const sum = reciprocalSum(all);
        expect(sum).toBeLessThanOrEqual(Math.min(...all));
        expect(sum).toBeGreaterThanOrEqual(Math.min(...all) - 10 * Math.log10(all.length) - 1e-9);
        expect(reciprocalSum([...all].reverse())).toBeCloseTo(sum, 10);
      }),
    );
  });
});

describe('differences, fields and means', () => {
  it('powerdiff takes back what powersum put in', () => {
    fc.assert(
      fc.property(ratio, ratio, (a, b) => {
        expect(powerDifference(powerSum([a, b]), b)).toBeCloseTo(a, b - a > 20 ? 1 : 6);
      }),
      { examples: [[0, 0]] },
    );
  });

  it('a difference of equals is no power; of a larger power there is none', () => {
    fc.assert(
      fc.property(level, (a) => {
        expect(powerDifference(a, a)).toBe(-Infinity);
      }),
    );
    fc.assert(
      fc.property(level, fc.double({ min: 1e-3, max: 100, noNaN: true }), (a, by) => {
        expect(powerDifference(a, a + by)).toBeNaN();
      }),
    );
  });

  it('fieldsum of two equals is 6.02 dB up, and never below powersum', () => {
    fc.assert(
      fc.property(level, (a) => {
        expect(fieldSum([a, a])).toBeCloseTo(a + 20 * Math.log10(2), 9);
      }),
    );
    fc.assert(
      fc.property(levels, (all) => {
        expect(fieldSum(all)).toBeGreaterThanOrEqual(powerSum(all) - 1e-9);
      }),
    );
  });

  it('meanpower lies between its terms', () => {
    fc.assert(
      fc.property(levels, (all) => {
        expect(meanPower(all)).toBeLessThanOrEqual(Math.max(...all) + 1e-9);
        expect(meanPower(all)).toBeGreaterThanOrEqual(Math.min(...all) - 1e-9);
      }),
    );
  });
});

describe('“A cascade whose first gain is infinite has the first noise figure; a 290 K attenuator’s noise figure is its loss.”', () => {
  const figure = fc.double({ min: 0, max: 30, noNaN: true });

  it('a first gain without bound leaves the first noise figure', () => {
    fc.assert(
      fc.property(figure, figure, (first, second) => {
        expect(cascadeNoiseFigureDb(first, Infinity, second)).toBeCloseTo(first, 10);
      }),
    );
    fc.assert(
      fc.property(figure, figure, (first, second) => {
        expect(cascadeNoiseFigureDb(first, 300, second)).toBeCloseTo(first, 10);
      }),
    );
  });

  it('an attenuator at 290 K', () => {
    fc.assert(
      fc.property(figure, (loss) => {
        expect(passiveNoiseFigureDb(loss, 290)).toBeCloseTo(loss, 10);
      }),
    );
  });

  it('ahead of a receiver it adds its loss to the noise figure', () => {
    fc.assert(
      fc.property(figure, figure, (loss, receiver) => {
        expect(cascadeNoiseFigureDb(passiveNoiseFigureDb(loss, 290), -loss, receiver)).toBeCloseTo(loss + receiver, 8);
      }),
    );
  });

  it('noise temperature and noise figure are inverse', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 30, noNaN: true }), (db) => {
        expect(noiseFigureDb(noiseTemperatureK(db))).toBeCloseTo(db, 9);
      }),
    );
  });
});

describe('“decibel figures survive unchanged”', () => {
  const words = UNIT_WORDS.filter((word) => findUnit(word)?.form === 'decibel' && word !== 'dB');

  it('typed in the line’s own unit, whatever it is', () => {
    fc.assert(
      fc.property(fc.constantFrom(...words), fc.double({ min: -500, max: 500, noNaN: true }), (word, typed) => {
        const figure = Number(typed.toFixed(4)) + 0;
        const evaluation = new Evaluation(
          sheetOf(
            `x = ${String(figure)} ${word}\ny | ${word} = ${String(figure)} ${word}\nz | ${word} = ${String(figure)}`,
          ),
        );
        expect([valueOf(evaluation, 'x'), valueOf(evaluation, 'y'), valueOf(evaluation, 'z')]).toEqual([
          figure,
          figure,
          figure,
        ]);
      }),
      { numRuns: 200 },
    );
  });

  it('through a sum with 0 dB and through a reference and back', () => {
    const evaluation = new Evaluation(sheetOf('x = 20 dBm\ny = x + 0 dB\nz | dBW = x\nback | dBm = z'));
    expect(['x', 'y', 'z', 'back'].map((symbol) => valueOf(evaluation, symbol))).toEqual([20, 20, -10, 20]);
  });

  it('added as written: −174 dBm/Hz + 60 dBHz + 3 dB is exactly −111 dBm', () => {
    expect(valueOf(new Evaluation(sheetOf('N = -174 dBm/Hz + 60 dBHz + 3 dB')), 'N')).toBe(-111);
  });
});

describe('“Changing a line’s display unit within one form changes no finding elsewhere.”', () => {
  const SHEET = (unit: string, second: string): string => `P | ${unit} = 1.5 W
    N | ${second} = -101 dBm
    S = P - 100 dB
    T = P + N
    SNR = S - N
    SINR = ratiosum(SNR, 12 dB)
    w = S + SNR
    m = mean(P, N)
    d = powerdiff(P, P - 0.1 dB)
    L_1 = 2 dB
    b = P + L_1
    c = powersum(S, N)
    q | dBµV = P
    x = P*2
    y | dBm/Hz = P`;

  it.each([
    ['dBm', 'dBm'],
    ['dBW', 'dBm'],
    ['dBm', 'dBW'],
    ['dBkW', 'dBpW'],
  ])('%s and %s', (unit, second) => {
    const codes = (text: string): readonly string[] =>
      new Evaluation(sheetOf(text)).sheetFindings().map(({ code, lineId }) => `${lineId} ${code}`);
    expect(codes(SHEET(unit, second))).toEqual(codes(SHEET('dBm', 'dBm')));
    expect(codes(SHEET(unit, second)).length).toBeGreaterThan(6);
  });
});
