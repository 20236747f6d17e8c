/**
 * Tolerances as typed, read into magnitudes in the line's unit. A deviation of a line in decibels is in dB; of another line it is
 * in a unit of the same dimension, or in per cent of the value. A bare number has the line's unit.
 */
import { fail, ok, type Result } from '../base';
import type { Node } from '../engine';
import { readPlainQuantity } from '../formula';
import { sameDimension, type Unit } from '../quantity';
import type { Tolerance } from '../worksheet';
import { favourableDirection, type Direction } from './directions';
import type { Spread } from './shapes';

export interface ReadTolerance {
  readonly spread: Spread;
  readonly group: string | undefined;
  /** undefined: the line has no good direction. */
  readonly direction: Direction | undefined;
}

/** The shape of a tolerance that names none: nothing is known but the limits. */
export const USUAL_SHAPE = 'uniform';

const SHAPES: readonly string[] = ['uniform', 'triangular', 'normal', 'arcsine'];

/** Reads a line's tolerance around its figure; or says in a sentence why it cannot be used. */
export function readTolerance(
  tolerance: Tolerance,
  node: Node,
  figure: number,
  unit: Unit,
): Result<ReadTolerance, string> {
  const { favourable, adverse, below, above, shape = USUAL_SHAPE } = tolerance;
  if (!SHAPES.includes(shape)) return fail(`its tolerance has the shape “${shape}”; there are ${SHAPES.join(', ')}.`);
  const direction = favourableDirection(node);
  const isByKind = isSaid(favourable) || isSaid(adverse);
  const isByPlace = isSaid(below) || isSaid(above);
  if (isByKind && isByPlace)
    return fail(
      'its tolerance gives favourable or adverse together with below or above; it can give the one or the other.',
    );
  if (!isByKind && !isByPlace) return fail('its tolerance names no deviation.');
  if (isByKind && direction === undefined) return fail(noDirection(node));
  const isLowerGood = isByKind && direction === 'lower';
  const lower = magnitude(isByKind ? (isLowerGood ? favourable : adverse) : below, figure, unit);
  const upper = magnitude(isByKind ? (isLowerGood ? adverse : favourable) : above, figure, unit);
  if (!lower.ok) return lower;
  if (!upper.ok) return upper;
  const group = tolerance.group?.trim();
  return ok({
    spread: { below: lower.value, above: upper.value, shape },
    group: group === '' ? undefined : group,
    direction,
  });
}

const isSaid = (text: string | undefined): boolean => text !== undefined && text.trim() !== '';

function noDirection({ result }: Node): string {
  const kind = result.kind?.kind;
  return kind === 'level'
    ? 'its tolerance says favourable and adverse, but not whether the level is wanted or unwanted: say its side, or give below and above.'
    : `its tolerance says favourable and adverse, but neither direction is good for ${
        kind === undefined || kind === 'plain' ? 'a plain quantity' : kind === 'loss' ? 'selectivity' : `a ${kind}`
      }: give below and above.`;
}

function magnitude(text: string | undefined, figure: number, unit: Unit): Result<number, string> {
  if (text === undefined || text.trim() === '') return ok(0);
  const read = readPlainQuantity(text);
  if (read === undefined) return fail(`its deviation “${text}” is no quantity.`);
  if (!(read.figure >= 0)) return fail(`its deviation “${text}” is negative; deviations are magnitudes.`);
  const size = inUnit(read.figure, read.unit, figure, unit);
  if (size === undefined)
    return fail(
      unit.form === 'decibel'
        ? `its deviation “${text}” is not in dB, as one of a line in ${unit.word} has to be.`
        : `its deviation “${text}” is neither in ${unit.word === '1' ? 'plain numbers' : unit.word} nor in %.`,
    );
  return ok(size);
}

function inUnit(size: number, typed: Unit | null, figure: number, unit: Unit): number | undefined {
  if (typed === null || typed.word === unit.word)
    return unit.form === 'decibel' && typed?.word !== undefined && typed.word !== 'dB' ? undefined : size;
  if (unit.form === 'decibel') return typed.word === 'dB' ? size : undefined;
  if (typed.word === '%') return (size / 100) * Math.abs(figure);
  if (unit.form === 'rate') return typed.form === 'rate' ? (size * unit.lengthM) / typed.lengthM : undefined;
  // A step of 5 °C is one of 5 K: shifts do not count.
  return typed.form === 'linear' && sameDimension(typed.dimension, unit.dimension)
    ? (size * typed.factor) / unit.factor
    : undefined;
}
