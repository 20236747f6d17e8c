/**
 * Right by construction: random budgets of the kinds that engineers write, with any figures whatever. None may draw a warning or
 * an error, and their figures are those of plain arithmetic.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { sheetOf } from '../engine/notation';

const tenths = (min: number, max: number): fc.Arbitrary<number> =>
  fc.integer({ min: min * 10, max: max * 10 }).map((n) => n / 10);

interface Part {
  /** As it stands in the sum, with its sign. */
  readonly text: string;
  /** Lines that it needs. */
  readonly lines: string;
  readonly figureDb: number;
}

/** A part as drawn; `name` is the line that it needs, its symbol the first letter. */
interface Drawn {
  readonly text: string;
  readonly figureDb: number;
  readonly name?: string;
}

/** Losses, some of which have the figures of well-known constants. */
const losses = fc.oneof(
  { weight: 3, arbitrary: tenths(0, 300) },
  {
    weight: 1,
    arbitrary: fc.constantFrom(30, 107, 114, 144, 174, 204, 228.6, 198.6, 32.44, 92.45, 147.55, 145.8, 77.2, 2.15, 60),
  },
);

/** Losses taken off and gains added, as literals, as lines, in brackets, as multiples and as rates. */
const parts: fc.Arbitrary<readonly Part[]> = fc
  .array(
    fc.oneof(
      losses.map((loss): Drawn => ({ text: `- ${loss} dB`, figureDb: -loss })),
      tenths(0, 80).map((gain) => ({ text: `+ ${gain} dBi`, figureDb: gain })),
      tenths(0, 80).map((gain) => ({ text: `+ ${gain} dB`, figureDb: gain })),
      tenths(0, 20).map((loss) => ({ text: `- 2*${loss} dB`, figureDb: -2 * loss })),
      tenths(1, 40).map((length) => ({ text: `- 0.2 dB/m*${length} m`, figureDb: -0.2 * length })),
      fc
        .tuple(tenths(0, 90), tenths(0, 90))
        .map(([loss, gain]) => ({ text: `- (${loss} dB - ${gain} dBi)`, figureDb: gain - loss })),
      losses.map((loss) => ({ name: `L = ${loss} dB`, text: '- L', figureDb: -loss })),
      tenths(0, 80).map((gain) => ({ name: `G = ${gain} dBi`, text: '+ G', figureDb: gain })),
      tenths(0, 80).map((gain) => ({ name: `G = ${gain} dB`, text: '+ G', figureDb: gain })),
      tenths(0, 60).map((margin) => ({ name: `M = ${margin} dB`, text: '- M', figureDb: -margin })),
      fc.integer({ min: 2, max: 64 }).map((n) => ({ text: `- 10*log10(${n})`, figureDb: -10 * Math.log10(n) })),
    ),
    { minLength: 1, maxLength: 5 },
  )
  .map((drawn) =>
    drawn.map(({ text, figureDb, name }: Drawn, at): Part => {
      const symbol = name?.[0];
      return symbol === undefined || name === undefined
        ? { text, figureDb, lines: '' }
        : { text: text.replace(symbol, `${symbol}_${at}`), figureDb, lines: name.replace(symbol, `${symbol}_${at}`) };
    }),
  );

interface Start {
  readonly text: string;
  readonly lines: string;
  /** Figure over the reference of the unit. */
  readonly figure: number;
  readonly unit: string;
}

/** Levels of every dimension, as literals, as lines, and as linear quantities in decibels. */
const starts: fc.Arbitrary<Start> = fc.oneof(
  fc
    .tuple(fc.constantFrom('dBm', 'dBW', 'dBµV', 'dBµV/m', 'dBm/Hz', 'dBW/m²', 'dBK', 'dBm/MHz'), tenths(-200, 100))
    .map(([unit, figure]) => ({ text: `${figure} ${unit}`, lines: '', figure, unit })),
  fc
    .tuple(fc.constantFrom('dBm', 'dBW', 'dBµV', 'dBm/Hz'), tenths(-200, 100))
    .map(([unit, figure]) => ({ text: 'P_x', lines: `P_x = ${figure} ${unit}`, figure, unit })),
  fc
    .integer({ min: 1, max: 900 })
    .map((watts) => ({ text: 'P_x', lines: `P_x | dBW = ${watts} W`, figure: 10 * Math.log10(watts), unit: 'dBW' })),
  fc
    .integer({ min: 1, max: 900 })
    .map((watts) => ({ text: `db(${watts} W)`, lines: '', figure: 10 * Math.log10(watts), unit: 'dBW' })),
);

function check(lines: readonly string[], symbol: string, figure: number, unit: string): void {
  const evaluation = new Evaluation(sheetOf(lines.filter((line) => line !== '').join('\n')));
  const alarms = evaluation.sheetFindings().filter(({ severity }) => severity !== 'note');
  expect(alarms.map(({ code, message }) => `${code}: ${message}`)).toEqual([]);
  const line = evaluation.lines().find((one) => one.symbol === symbol);
  const read = evaluation.figure(line?.id ?? '', 'nominal');
  expect(read).toMatchObject({ state: 'value', unit: { word: unit } });
  expect(read.state === 'value' && read.value).toBeCloseTo(figure, 6);
}

describe('right by construction', () => {
  it('a level less losses plus gains, whatever the figures', () => {
    fc.assert(
      fc.property(starts, parts, fc.boolean(), (start, rest, isDeclared) => {
        const entry = [start.text, ...rest.map(({ text }) => text)].join(' ');
        const figure = rest.reduce((sum, { figureDb }) => sum + figureDb, start.figure);
        check(
          [start.lines, ...rest.map(({ lines }) => lines), `y${isDeclared ? ` | ${start.unit}` : ''} = ${entry}`],
          'y',
          figure,
          start.unit,
        );
      }),
      { numRuns: 250 },
    );
  });

  it('the same through a chain of lines', () => {
    fc.assert(
      fc.property(starts, parts, (start, rest) => {
        const steps = rest.map(({ text }, at) => `s_${at + 1} = s_${at} ${text}`);
        const figure = rest.reduce((sum, { figureDb }) => sum + figureDb, start.figure);
        check(
          [start.lines, ...rest.map(({ lines }) => lines), `s_0 | ${start.unit} = ${start.text}`, ...steps],
          `s_${rest.length}`,
          figure,
          start.unit,
        );
      }),
      { numRuns: 60 },
    );
  });

  it('noise in a bandwidth, signal-to-noise ratio, sensitivity and margin', () => {
    fc.assert(
      fc.property(
        tenths(-150, -20),
        tenths(0, 20),
        fc.integer({ min: 1, max: 400 }),
        tenths(-20, 30),
        fc.constantFrom('db(B)', '10*log10(B)', '10*log10(B/1 Hz)'),
        (level, figureDb, megahertz, needed, bandwidth) => {
          const noise = -174 + 10 * Math.log10(megahertz * 1e6) + figureDb;
          const lines = [
            `B = ${megahertz} MHz`,
            `NF = ${figureDb} dB`,
            `S = ${level} dBm`,
            `N | dBm = -174 dBm/Hz + ${bandwidth} + NF`,
            `SNR_req = ${needed} dB`,
            'SNR = S - N',
            'sens = N + SNR_req',
            'm_1 = SNR - SNR_req',
            'm_2 = S - sens',
            'd = m_1 - m_2',
          ];
          check(lines, 'N', noise, 'dBm');
          check(lines, 'm_2', level - noise - needed, 'dB');
          check(lines, 'd', 0, 'dB');
        },
      ),
      { numRuns: 60 },
    );
  });

  it('interferers combined as powers, a ratio of the sum, and the same by ratios', () => {
    fc.assert(
      fc.property(tenths(-120, -40), fc.array(tenths(-150, -60), { minLength: 1, maxLength: 5 }), (level, levels) => {
        const total = 10 * Math.log10(levels.reduce((sum, one) => sum + 10 ** (one / 10), 0));
        const names = levels.map((_, at) => `I_${at}`);
        const lines = [
          `S = ${level} dBm`,
          ...levels.map((one, at) => `I_${at} = ${one} dBm`),
          `I_tot = powersum(${names.join(', ')})`,
          `SIR = S - I_tot`,
          ...names.map((name) => `SIR_${name} = S - ${name}`),
          `SIR_b = ratiosum(${names.map((name) => `SIR_${name}`).join(', ')})`,
        ];
        check(lines, 'I_tot', total, 'dBm');
        check(lines, 'SIR', level - total, 'dB');
        check(lines, 'SIR_b', level - total, 'dB');
      }),
      { numRuns: 60 },
    );
  });

  it('C/N₀ and Eb/N₀ of a downlink', () => {
    fc.assert(
      fc.property(
        tenths(-20, 80),
        tenths(100, 280),
        tenths(-20, 50),
        fc.integer({ min: 1, max: 900 }),
        (eirp, loss, merit, kilobits) => {
          const density = eirp - loss + merit + 228.59916717321767;
          const lines = [
            `EIRP = ${eirp} dBW`,
            `L_p = ${loss} dB`,
            `GT = ${merit} dB/K`,
            `R = ${kilobits} kbit/s`,
            'CN0 = EIRP - L_p + GT - db(k_B)',
            'EbN0 = CN0 - db(R)',
          ];
          check(lines, 'CN0', density, 'dBHz');
          check(lines, 'EbN0', density - 10 * Math.log10(kilobits * 1000), 'dB');
        },
      ),
      { numRuns: 60 },
    );
  });
});
