/**
 * Wrong by construction: one fault put into an otherwise right sum, at any place and in any spelling. It must always be found,
 * under its code; where the repair has one obvious figure, the repaired line must have it.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { applyAll, applyRepair } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

const tenths = (min: number, max: number): fc.Arbitrary<number> =>
  fc.integer({ min: min * 10, max: max * 10 }).map((n) => n / 10);
const dB = (figure: number): string => (figure < 0 ? `- ${-figure} dB` : `+ ${figure} dB`);

/** Terms that are right anywhere in a decibel sum. */
const harmless = fc.array(
  fc.oneof(
    tenths(-60, 60).map((figure) => ({ text: dB(figure), figure })),
    tenths(0, 30).map((figure) => ({ text: `+ ${figure} dBi`, figure })),
    tenths(0, 30).map((figure) => ({ text: `- (${figure} dB + 1 dB)`, figure: -figure - 1 })),
    fc.integer({ min: 2, max: 9 }).map((n) => ({ text: `+ 10*log10(${n})`, figure: 10 * Math.log10(n) })),
  ),
  { maxLength: 3 },
);

/** A level in some spelling: the text, the lines it needs, and its figure in dBm. */
const levels = fc.oneof(
  tenths(-120, 60).map((figure) => ({ text: `${figure} dBm`, line: '', figure })),
  tenths(-120, 60).map((figure) => ({ text: 'P_#', line: `P_# = ${figure} dBm`, figure })),
  tenths(-120, 60).map((figure) => ({ text: 'W_#', line: `W_# = ${figure} dBW`, figure: figure + 30 })),
  tenths(-120, 60).map((figure) => ({ text: `(P_# - 3 dB)`, line: `P_# = ${figure} dBm`, figure: figure - 3 })),
  fc
    .integer({ min: 1, max: 500 })
    .map((milliwatts) => ({ text: `db(${milliwatts} mW)`, line: '', figure: 10 * Math.log10(milliwatts) })),
  fc
    .integer({ min: 1, max: 500 })
    .map((milliwatts) => ({ text: 'L#', line: `L# | dBm = ${milliwatts} mW`, figure: 10 * Math.log10(milliwatts) })),
);

type Level = { readonly text: string; readonly line: string; readonly figure: number };
const numbered = (level: Level, at: number): Level => ({
  ...level,
  text: level.text.replace('#', `q${at}`),
  line: level.line.replace('#', `q${at}`),
});

interface Told {
  readonly codes: readonly string[];
  readonly severe: readonly string[];
  readonly repaired: { readonly codes: readonly string[]; readonly figureDbm: number | undefined };
}

/** What is found on the last line, and what its first repair makes of it, in dBm where it is a level. */
function tell(lines: readonly string[], code: string): Told {
  const worksheet = sheetOf(lines.filter((line) => line !== '').join('\n'));
  const evaluation = new Evaluation(worksheet);
  const line = evaluation.lines().at(-1);
  if (line === undefined) throw new Error('no line');
  const found = evaluation.findings(line.id);
  const repair = found.find((finding) => finding.code === code)?.repairs[0];
  const after =
    repair === undefined
      ? undefined
      : new Evaluation(applyAll(worksheet, applyRepair(worksheet, line.id, repair).changes).worksheet);
  const figure = after?.figure(line.id, 'nominal');
  return {
    codes: found.map((finding) => finding.code),
    severe: found.filter(({ severity }) => severity !== 'note').map((finding) => finding.code),
    repaired: {
      codes: after
        ?.findings(line.id)
        .filter(({ severity }) => severity !== 'note')
        .map((finding) => finding.code) ?? ['no repair'],
      figureDbm:
        figure?.state === 'value' && figure.unit.form === 'decibel'
          ? figure.value + figure.unit.offsetDb + 30
          : undefined,
    },
  };
}

describe('wrong by construction', () => {
  it('a second level in a sum is levels-summed, and the repair is their power sum', () => {
    fc.assert(
      fc.property(
        levels,
        levels,
        harmless,
        harmless,
        fc.constantFrom('', ' | dBm', ' | dBW'),
        (first, second, between, behind, unit) => {
          const [a, b] = [numbered(first, 1), numbered(second, 2)];
          const entry = [
            a.text,
            ...between.map(({ text }) => text),
            `+ ${b.text}`,
            ...behind.map(({ text }) => text),
          ].join(' ');
          const { codes, repaired } = tell([a.line, b.line, `y${unit} = ${entry}`], 'levels-summed');
          expect(codes).toContain('levels-summed');
          expect(repaired.codes).toEqual([]);
          // The terms in brackets stay outside the power sum, where they count for both levels.
          const inBrackets = [first, second].filter(({ text }) => text.startsWith('(')).length;
          const bare = (level: Level): number => (level.text.startsWith('(') ? level.figure + 3 : level.figure);
          const sum = 10 * Math.log10(10 ** (bare(a) / 10) + 10 ** (bare(b) / 10));
          const rest = [...between, ...behind].reduce((total, { figure }) => total + figure, 0);
          expect(repaired.figureDbm).toBeCloseTo(sum + rest - 3 * inBrackets, 6);
        },
      ),
      { numRuns: 120 },
    );
  });

  it.each([
    ['two signal ratios', ['SNR = 12 dB', 'CIR = 9 dB'], 'SNR', 'CIR', 'ratios-summed'],
    [
      'C/N up and down, by their labels',
      ['a = 12 dB # C/N uplink', 'b = 9 dB # C/N downlink'],
      'a',
      'b',
      'ratios-summed',
    ],
    ['two impairment ratios', ['s_1 = -40 dBc', 's_2 = -50 dBc'], 's_1', 's_2', 'ratios-summed'],
    [
      'declared signal ratios',
      ['a | dB | signal ratio = 12 dB', 'b | dB | signal ratio = 9 dB'],
      'a',
      'b',
      'ratios-summed',
    ],
    ['two noise figures', ['NF_1 = 3 dB', 'NF_2 = 8 dB', 'G_1 = 20 dB'], 'NF_1', 'NF_2', 'noise-figures-summed'],
    ['watts beside decibels', ['P_1 = 3 dBm', 'w = 5 mW'], 'P_1', 'w', 'mixed-forms'],
    ['hertz beside decibels', ['N_0 = -174 dBm/Hz', 'B = 1 MHz'], 'N_0', 'B', 'mixed-forms'],
    ['kelvin beside decibels', ['G_1 = 30 dBi', 'T = 290 K'], 'G_1', 'T', 'mixed-forms'],
    ['a rate without its length', ['P_1 = 3 dBm', 'r = 0.2 dB/m'], 'P_1', 'r', 'rate-without-length'],
    ['a density and a level', ['N_0 = -174 dBm/Hz', 'P_1 = -90 dBm'], 'N_0', 'P_1', 'levels-summed'],
    ['a voltage and a power', ['U = 40 dBµV', 'P_1 = -90 dBm'], 'U', 'P_1', 'field-and-power'],
    ['an unknown symbol', ['P_1 = 3 dBm'], 'P_1', 'P_9', 'unknown-symbol'],
  ])('%s are found anywhere in a sum', (_, lines, first, second, code) => {
    fc.assert(
      fc.property(harmless, harmless, fc.boolean(), fc.boolean(), (between, behind, isSwapped, isBracketed) => {
        const [a, b] = isSwapped ? [second, first] : [first, second];
        const inner = [a, ...between.map(({ text }) => text), `+ ${b}`].join(' ');
        const entry = [isBracketed ? `(${inner})` : inner, ...behind.map(({ text }) => text)].join(' ');
        expect(tell([...lines, `y = ${entry}`], code).codes).toContain(code);
      }),
      { numRuns: 20 },
    );
  });

  it('a level declared in the unit of another dimension is never shown', () => {
    const WRONG: Readonly<Record<string, readonly string[]>> = {
      dBm: ['dB', 'dBm/Hz', 'dBµV', 'dBHz', 'K', 'V', 'dB/K', 'Hz', 'dBi', 'dBW/m²'],
      'dBm/Hz': ['dBm', 'dBHz', 'dB', 'W'],
      dBHz: ['dB', 'dBm', 'K', 'dBK'],
      dBµV: ['dBm', 'W', 'dBµV/m', 'dB'],
      dB: ['dBm', 'dBW', 'dBHz', 'dBK', 'W', 'K', 'dB/m'],
    };
    fc.assert(
      fc.property(
        fc
          .constantFrom(...Object.keys(WRONG))
          .chain((unit) => fc.tuple(fc.constant(unit), fc.constantFrom(...(WRONG[unit] ?? [])))),
        tenths(-100, 100),
        harmless,
        ([unit, declared], figure, rest) => {
          const entry = [`x`, ...rest.map(({ text }) => text)].join(' ');
          const evaluation = new Evaluation(sheetOf(`x = ${figure} ${unit}\ny | ${declared} = ${entry}`));
          expect(evaluation.figure('l1', 'nominal').state).toBe('withheld');
          expect(evaluation.findings('l1').some(({ severity }) => severity === 'error')).toBe(true);
        },
      ),
      { numRuns: 100 },
    );
  });
});
