/** The published models as functions of numbers: hand-worked figures, their limits, and what they do outside their domain. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  BOLTZMANN,
  capacityBitPerS,
  cascadeNoiseFigureDb,
  freeSpaceLossDb,
  isBeyondNearField,
  noiseDensityDbmPerHz,
  noiseFigureDb,
  noiseTemperatureK,
  passiveNoiseFigureDb,
  REFERENCE_TEMPERATURE_K,
  SPEED_OF_LIGHT,
  thermalNoiseDbm,
} from '../../src/radio';

describe('constants', () => {
  it('are those of the SI and of ITU-R V.573', () => {
    expect([BOLTZMANN, SPEED_OF_LIGHT, REFERENCE_TEMPERATURE_K]).toEqual([1.380649e-23, 299792458, 290]);
  });
});

describe('thermal noise', () => {
  it.each([
    [290, 1, -173.975187],
    [290, 1e6, -113.975187],
    [1000, 1e6, -108.599167],
    [290, 180e3, -121.422463],
  ])('of %d K in %d Hz is %d dBm', (temperatureK, bandwidthHz, dBm) => {
    expect(thermalNoiseDbm(temperatureK, bandwidthHz)).toBeCloseTo(dBm, 5);
  });

  it('in one hertz is the density', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 1e5, noNaN: true }), (temperatureK) => {
        expect(thermalNoiseDbm(temperatureK, 1)).toBeCloseTo(noiseDensityDbmPerHz(temperatureK), 10);
      }),
    );
  });

  it('grows by 10 log10 of bandwidth and of temperature', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e4, noNaN: true }),
        fc.double({ min: 1, max: 1e10, noNaN: true }),
        (temperatureK, bandwidthHz) => {
          expect(
            thermalNoiseDbm(10 * temperatureK, bandwidthHz) - thermalNoiseDbm(temperatureK, bandwidthHz),
          ).toBeCloseTo(10, 9);
          expect(
            thermalNoiseDbm(temperatureK, 10 * bandwidthHz) - thermalNoiseDbm(temperatureK, bandwidthHz),
          ).toBeCloseTo(10, 9);
        },
      ),
    );
  });

  it('at 0 K or in 0 Hz is no power; below that there is none', () => {
    expect([noiseDensityDbmPerHz(0), thermalNoiseDbm(0, 1), thermalNoiseDbm(290, 0)]).toEqual([
      -Infinity,
      -Infinity,
      -Infinity,
    ]);
    expect([noiseDensityDbmPerHz(-1), thermalNoiseDbm(-1, 1), thermalNoiseDbm(1, -1), thermalNoiseDbm(-1, -1)]).toEqual(
      [NaN, NaN, NaN, NaN],
    );
  });
});

describe('noise figure and temperature', () => {
  it.each([
    [0, 0],
    [3, 288.626071],
    [10, 2610],
    [0.5, 35.385352],
  ])('%d dB is %d K', (noiseFigure, temperatureK) => {
    expect(noiseTemperatureK(noiseFigure)).toBeCloseTo(temperatureK, 5);
    expect(noiseFigureDb(temperatureK)).toBeCloseTo(noiseFigure, 6);
  });

  it('a temperature below 0 K has no figure', () => {
    expect(noiseFigureDb(-1)).toBeNaN();
  });

  it.each([
    [2, 290, 2],
    [2, 310, 2.109152],
    [3, 0, 0],
    [0, 310, 0],
    [1.5, 150, 0.839974],
  ])('a loss of %d dB at %d K has the figure %d dB', (lossDb, temperatureK, figureDb) => {
    expect(passiveNoiseFigureDb(lossDb, temperatureK)).toBeCloseTo(figureDb, 5);
  });

  it('a loss below 0 dB, or below 0 K, has none', () => {
    expect([passiveNoiseFigureDb(-1, 290), passiveNoiseFigureDb(1, -1)]).toEqual([NaN, NaN]);
  });
});

describe('cascades', () => {
  it.each([
    [[1], 1],
    [[1, 15], 1],
    [[1, 15, 8], 1.543719],
    [[1, 15, 8, 20], 1.543719],
    [[2, 10, 1, -1, 4], 2.555429],
    [[2, 10, 1, -1, 4, -3], 2.555429],
    [[3, 0, 3], 4.757474],
    [[], 0],
  ])('of %j dB is %d dB', (stages, figureDb) => {
    expect(cascadeNoiseFigureDb(...stages)).toBeCloseTo(figureDb, 5);
  });

  it('are never better than their first stage', () => {
    const db = fc.double({ min: 0, max: 20, noNaN: true });
    fc.assert(
      fc.property(db, db, db, (first, gain, second) => {
        expect(cascadeNoiseFigureDb(first, gain, second)).toBeGreaterThanOrEqual(first - 1e-9);
      }),
    );
  });

  it('put together in parts are the same', () => {
    const db = fc.double({ min: 0, max: 20, noNaN: true });
    fc.assert(
      fc.property(db, db, db, db, db, (nf1, g1, nf2, g2, nf3) => {
        expect(cascadeNoiseFigureDb(nf1, g1, cascadeNoiseFigureDb(nf2, g2, nf3))).toBeCloseTo(
          cascadeNoiseFigureDb(nf1, g1, nf2, g2, nf3),
          8,
        );
        expect(cascadeNoiseFigureDb(cascadeNoiseFigureDb(nf1, g1, nf2), g1 + g2, nf3)).toBeCloseTo(
          cascadeNoiseFigureDb(nf1, g1, nf2, g2, nf3),
          8,
        );
      }),
    );
  });
});

describe('free space', () => {
  it.each([
    [1000, 1e6, 32.44778],
    [10e3, 868e6, 111.2182],
    [35786e3, 20e9, 209.5426],
  ])('%d m at %d Hz: %d dB', (distanceM, frequencyHz, lossDb) => {
    expect(freeSpaceLossDb(distanceM, frequencyHz)).toBeCloseTo(lossDb, 4);
  });

  it('is symmetric in distance and frequency, and grows by 6.02 dB when either doubles', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e8, noNaN: true }),
        fc.double({ min: 1, max: 1e8, noNaN: true }),
        (distanceM, frequencyHz) => {
          expect(freeSpaceLossDb(distanceM, frequencyHz)).toBeCloseTo(freeSpaceLossDb(frequencyHz, distanceM), 9);
          expect(freeSpaceLossDb(2 * distanceM, frequencyHz) - freeSpaceLossDb(distanceM, frequencyHz)).toBeCloseTo(
            20 * Math.log10(2),
            9,
          );
        },
      ),
    );
  });

  it('has no figure at or below zero', () => {
    expect([freeSpaceLossDb(0, 1e6), freeSpaceLossDb(-1, 1e6), freeSpaceLossDb(1, 0)]).toEqual([NaN, NaN, NaN]);
  });

  it.each([
    [47.8, 1e6, true],
    [47.6, 1e6, false],
    [1, 1e9, true],
  ])('%d m at %d Hz is beyond λ/2π: %s', (distanceM, frequencyHz, beyond) => {
    expect(isBeyondNearField(distanceM, frequencyHz)).toBe(beyond);
  });
});

describe('capacity', () => {
  it.each([
    [1e6, 0, 1e6],
    [1e6, 10, 3.459432e6],
    [3100, 30, 30898.4],
    [0, 10, 0],
  ])('of %d Hz at %d dB is %d bit/s', (bandwidthHz, ratioDb, bitPerS) => {
    expect(Math.abs(capacityBitPerS(bandwidthHz, ratioDb) - bitPerS)).toBeLessThanOrEqual(1e-5 * bitPerS);
  });

  it('at very low ratios is B·(S/N)/ln 2, with its digits kept', () => {
    expect(capacityBitPerS(1, -150) / (1e-15 / Math.LN2)).toBeCloseTo(1, 12);
  });

  it('of a bandwidth below zero there is none', () => {
    expect(capacityBitPerS(-1, 10)).toBeNaN();
  });
});
