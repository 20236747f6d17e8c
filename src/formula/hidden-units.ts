/**
 * Bare numbers that stand for a unit: 32.44 in a free-space formula, −174 for a noise density, 228.6 for the Boltzmann
 * constant. They hold only for certain units, so a sum with one does not close; the finding names what is meant.
 */
import { FREQUENCY, isDimensionless, LENGTH, raiseDimension, sameDimension, type Unit } from '../quantity';
import type { Repair } from '../findings';
import type { Context } from './context';
import { isLevel } from './net';
import { withReplacedTerms, type Grouped } from './repairs';
import type { Tree } from './tree';
import type { SumTerm } from './types';

interface Known {
  readonly from: number;
  readonly to: number;
  readonly standsFor: string;
  /** What to write in its place, by the sign it enters with. */
  readonly write?: (sign: number) => { readonly text: string; readonly sign: number };
}

const literal = (figure: string, unit: string) => (sign: number) => ({ text: `${figure} ${unit}`, sign });

/** Usual values, from common practice; each range takes the usual roundings. */
const KNOWN: readonly Known[] = [
  { from: 32.4, to: 32.46, standsFor: 'free-space loss with MHz and km (or GHz and m)' },
  { from: 92.4, to: 92.5, standsFor: 'free-space loss with GHz and km' },
  {
    from: 173.8,
    to: 174.1,
    standsFor: 'the noise density k·T₀ in dBm/Hz, taken off',
    write: () => ({ text: '(-174 dBm/Hz)', sign: -1 }),
  },
  {
    from: 203.8,
    to: 204.1,
    standsFor: 'the noise density k·T₀ in dBW/Hz, taken off',
    write: () => ({ text: '(-204 dBW/Hz)', sign: -1 }),
  },
  {
    from: 113.9,
    to: 114.1,
    standsFor: 'the noise density k·T₀ in dBm/MHz, taken off',
    write: () => ({ text: '(-114 dBm/MHz)', sign: -1 }),
  },
  {
    from: -145.85,
    to: -145.7,
    standsFor: 'the step from dBµV/m to dBW/m² in free space',
    write: () => ({ text: 'db(377 ohm)', sign: -1 }),
  },
  {
    from: -115.85,
    to: -115.7,
    standsFor: 'the step from dBµV/m to dBm/m² in free space',
    write: () => ({ text: 'db(377 ohm)', sign: -1 }),
  },
  {
    from: 145.7,
    to: 145.85,
    standsFor: 'the step from dBW/m² to dBµV/m in free space',
    write: () => ({ text: 'db(377 ohm)', sign: 1 }),
  },
  {
    from: 115.7,
    to: 115.85,
    standsFor: 'the step from dBm/m² to dBµV/m in free space',
    write: () => ({ text: 'db(377 ohm)', sign: 1 }),
  },
  {
    from: -77.3,
    to: -77.1,
    standsFor: 'the step from a field in dBµV/m to the power of an isotropic antenna in dBm, with MHz',
  },
  {
    from: 77.1,
    to: 77.3,
    standsFor: 'the step from the power of an isotropic antenna in dBm to a field in dBµV/m, with MHz',
  },
  { from: 36.5, to: 36.6, standsFor: 'free-space loss with MHz and statute miles' },
  { from: 96.5, to: 96.6, standsFor: 'free-space loss with GHz and statute miles' },
  { from: 37.8, to: 37.81, standsFor: 'free-space loss with MHz and nautical miles' },
  { from: -27.6, to: -27.5, standsFor: 'free-space loss with MHz and m' },
  { from: -147.6, to: -147.5, standsFor: 'free-space loss with Hz and m' },
  { from: -174.1, to: -173.8, standsFor: 'the noise density k·T₀ in dBm/Hz', write: literal('-174', 'dBm/Hz') },
  { from: -204.1, to: -203.8, standsFor: 'the noise density k·T₀ in dBW/Hz', write: literal('-204', 'dBW/Hz') },
  { from: -114.1, to: -113.9, standsFor: 'the noise density k·T₀ in dBm/MHz', write: literal('-114', 'dBm/MHz') },
  {
    from: -144.1,
    to: -143.9,
    standsFor: 'the noise density k·T₀ in dBm/kHz or dBW/MHz',
    write: literal('-144', 'dBm/kHz'),
  },
  {
    from: -228.7,
    to: -228.5,
    standsFor: 'the Boltzmann constant in dBW/K/Hz',
    write: () => ({ text: 'db(k_B)', sign: 1 }),
  },
  {
    from: 228.5,
    to: 228.7,
    standsFor: 'the Boltzmann constant in dBW/K/Hz, taken off',
    write: () => ({ text: 'db(k_B)', sign: -1 }),
  },
  {
    from: -107.1,
    to: -106.9,
    standsFor: 'the step from dBµV to dBm in 50 Ω',
    write: () => ({ text: 'db(50 ohm)', sign: -1 }),
  },
  {
    from: 106.9,
    to: 107.1,
    standsFor: 'the step from dBm to dBµV in 50 Ω',
    write: () => ({ text: 'db(50 ohm)', sign: 1 }),
  },
  {
    from: -108.85,
    to: -108.7,
    standsFor: 'the step from dBµV to dBm in 75 Ω',
    write: () => ({ text: 'db(75 ohm)', sign: -1 }),
  },
  {
    from: 108.7,
    to: 108.85,
    standsFor: 'the step from dBm to dBµV in 75 Ω',
    write: () => ({ text: 'db(75 ohm)', sign: 1 }),
  },
  {
    from: -48.85,
    to: -48.7,
    standsFor: 'the step from dBmV to dBm in 75 Ω',
    write: () => ({ text: 'db(75 ohm)', sign: -1 }),
  },
  {
    from: 48.7,
    to: 48.85,
    standsFor: 'the step from dBm to dBmV in 75 Ω',
    write: () => ({ text: 'db(75 ohm)', sign: 1 }),
  },
  {
    from: -198.7,
    to: -198.5,
    standsFor: 'the Boltzmann constant in dBm/K/Hz',
    write: () => ({ text: 'db(k_B)', sign: 1 }),
  },
  {
    from: 198.5,
    to: 198.7,
    standsFor: 'the Boltzmann constant in dBm/K/Hz, taken off',
    write: () => ({ text: 'db(k_B)', sign: -1 }),
  },
];

/** The bare number of a sum that hides a unit: a known constant, else any bare number literal. */
export function hiddenConstant(
  terms: readonly SumTerm[],
): { term: SumTerm; figure: number; known: Known | undefined } | undefined {
  const numbers = terms.flatMap((term) =>
    isFigure(term) && term.plan.op === 'constant' ? [{ term, figure: term.coefficient * term.plan.value }] : [],
  );
  for (const number of numbers) {
    const known = KNOWN.find(({ from, to }) => number.figure >= from && number.figure <= to);
    if (known !== undefined) return { ...number, known };
  }
  const first = numbers.find(({ term }) => term.isNumber);
  return first === undefined ? undefined : { ...first, known: undefined };
}

/** A bare number that hides a unit, with the repairs that write it out. */
export interface Hidden {
  readonly term: SumTerm;
  readonly repairs: readonly Repair[];
}

/** Makes the finding for a number that keeps a sum from closing. */
export function sayConstantHidesUnit(
  tree: Tree,
  terms: readonly SumTerm[],
  declared: Unit | undefined,
  context: Context,
): Hidden | undefined {
  const hidden = hiddenConstant(terms);
  if (hidden === undefined) return undefined;
  const { term, known, figure } = hidden;
  const grouped = freeSpace(terms, term) ?? written(terms, term, figure, known, declared);
  const repairs: Repair[] =
    grouped === undefined ? [] : [{ kind: 'entry', title: grouped.title, entry: context.replace(tree, grouped.text) }];
  context.say('constant-hides-unit', term.tree, {
    facts: { number: String(figure).replace('-', '−'), standsFor: known?.standsFor ?? 'something with a unit' },
    repairs,
  });
  return { term, repairs };
}

function written(
  terms: readonly SumTerm[],
  term: SumTerm,
  figure: number,
  known: Known | undefined,
  declared: Unit | undefined,
): Grouped | undefined {
  const replacement = known?.write?.(Math.sign(figure));
  if (replacement === undefined) return undefined;
  // The written figure carries its own sign; the term stands with the sign that keeps the value.
  const isFigure = replacement.text.startsWith('-');
  const step = declared?.form === 'decibel' ? handStep(terms, term, declared.offsetDb) : undefined;
  return withReplacedTerms(
    terms.filter((other) => other !== step),
    [term],
    replacement.text,
    isFigure ? 1 : replacement.sign,
  );
}

/** The 30 by which dBW was made dBm by hand, which the written unit takes by itself. */
function handStep(terms: readonly SumTerm[], constant: SumTerm, offsetDb: number): SumTerm | undefined {
  return terms.find(
    (term) =>
      term !== constant &&
      isFigure(term) &&
      term.plan.op === 'constant' &&
      Math.abs(term.coefficient * term.plan.value + offsetDb) < 0.05 &&
      offsetDb !== 0,
  );
}

/** A bare number, or a literal in dB. */
const isFigure = ({ isNumber, plan, tree }: SumTerm): boolean =>
  plan.op === 'constant' && (isNumber || (tree.type === 'literal' && tree.unit?.word === 'dB'));

/**
 * True when a bare number hides a noise density, the Boltzmann constant or an impedance although the result has a unit of its
 * own: nothing in the sum is a level, or 174 is added to a level less a bandwidth. A loss of 114 dB is a loss of 114 dB.
 */
export function hidesBoltzmann(terms: readonly SumTerm[]): boolean {
  const hidden = hiddenConstant(terms);
  if (hidden?.known?.write === undefined || !hidden.term.isNumber) return false;
  const isTakenOff =
    hidden.figure > 0 &&
    terms.some(({ coefficient, type }) => coefficient < 0 && sameDimension(type.dimension, FREQUENCY));
  return isTakenOff || !terms.some(isLevel);
}

/** c + 20 log f + 20 log d is free_space_loss(d, f), whatever the constant. */
function freeSpace(terms: readonly SumTerm[], constant: SumTerm): Grouped | undefined {
  const squareOf = (exponent: typeof LENGTH): SumTerm | undefined =>
    terms.find(
      ({ coefficient, type, tree }) =>
        coefficient === 1 &&
        sameDimension(type.dimension, raiseDimension(exponent, 2)) &&
        argumentOfLog(tree) !== undefined,
    );
  const distance = squareOf(LENGTH);
  const frequency = squareOf(FREQUENCY);
  if (distance === undefined || frequency === undefined) return undefined;
  const call = `free_space_loss(${textOfLog(distance)}, ${textOfLog(frequency)})`;
  return withReplacedTerms(
    terms,
    terms.filter((term) => term === constant || term === distance || term === frequency),
    call,
  );
}

function argumentOfLog(tree: Tree): Tree | undefined {
  if (tree.type !== 'binary' || tree.operator !== '*') return undefined;
  const log = [tree.left, tree.right].find((side) => side.type === 'call' && side.name === 'log10');
  return log?.type === 'call' ? log.parameters[0] : undefined;
}

function textOfLog({ tree, text }: SumTerm): string {
  const argument = argumentOfLog(tree);
  return argument === undefined
    ? text
    : text.slice(argument.place.start - tree.place.start, argument.place.end - tree.place.start);
}

/** True when the sum's remaining dimension comes of logarithms of quantities with units, so that a number may hide theirs. */
export function hasDimensionedTerms(terms: readonly SumTerm[]): boolean {
  return terms.some(({ type }) => !isDimensionless(type.dimension));
}
