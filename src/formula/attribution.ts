/**
 * What a line is a quantity of, on which side it stands, and how other lines meet it: as declared, else as its name says, else
 * as its expression's net tells, else as its unit suggests.
 */
import { present } from '../base';
import {
  assumeFromName,
  findUnit,
  isDimensionless,
  kindOfNet,
  meaningOf,
  resolveMeaning,
  UNSAID,
  type Meaning,
  type QuantityKind,
  type Side,
  type Unit,
} from '../quantity';
import { meaningOfUnit, typeOfUnit } from './atoms';
import { isFieldLike, squared, termsOf } from './forms';
import type { Checked, DecibelType, LinearType, RateType } from './types';

/** What a person has said of a line. */
export interface LineSpec {
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly unit?: string | undefined;
  readonly quantity?: QuantityKind | undefined;
  readonly side?: Side | undefined;
  /** True where gains, losses and noise figures are told apart although their decibels add alike: in stages of a chain. */
  readonly isStrict?: boolean | undefined;
}

export type KindOrigin = 'declared' | 'name' | 'expression' | 'unit';

export interface AttributedKind {
  readonly kind: QuantityKind;
  readonly origin: KindOrigin;
}

export interface AttributedSide {
  readonly side: Side;
  readonly origin: KindOrigin;
}

/** The kind that the name says before the unit is known: enough to know a loss from a level. */
export function nameKind(spec: LineSpec): QuantityKind | undefined {
  return assumeFromName(spec.symbol, spec.label, present(findUnit('dB'), 'dB'))?.kind;
}

/** The meaning of a result as of its power-like quantity. */
export function powerMeaning(checked: Checked): Meaning | undefined {
  const { type } = checked;
  if (type.form === 'linear') return isFieldLike(type) ? squared(type.meaning) : type.meaning;
  return type.form === 'decibel' ? type.meaning : undefined;
}

/** Kind: as declared, else as the name says, else as the expression's net tells, else as the unit suggests. */
export function attributeKind(
  spec: LineSpec,
  unit: Unit,
  net: Meaning | undefined,
  checked: Checked | undefined,
): AttributedKind | undefined {
  if (spec.quantity !== undefined) return { kind: spec.quantity, origin: 'declared' };
  const named = assumeFromName(spec.symbol, spec.label, unit);
  if (named !== undefined) return { kind: named.kind, origin: 'name' };
  if (net !== undefined && unit.form !== 'rate') {
    const told = kindOfTerms(checked) ?? kindOfNet(net, isDimensionless(unit.dimension))?.kind;
    const isTemperature = unit.defaultKind === 'temperature' && told === 'level';
    if (told !== undefined && fitsUnit(told, unit) && isSaid(net, checked))
      return { kind: isTemperature ? 'temperature' : told, origin: 'expression' };
  }
  return unit.defaultKind === undefined ? undefined : { kind: unit.defaultKind, origin: 'unit' };
}

/** True when the expression tells something: not a lone term about which nothing is known, nor a plain number. */
function isSaid(net: Meaning, checked: Checked | undefined): boolean {
  const isZero = [net.w, net.u, net.f, net.l].every((exponent) => Math.abs(exponent) < 1e-9);
  if (!isZero) return true;
  if (checked?.type.form !== 'decibel') return false;
  if (checked.kind !== undefined) return true;
  return termsOf(checked, '').some(
    ({ kind, type }) => kind !== undefined || (type.meaning !== undefined && type.meaning.declared),
  );
}

const fitsUnit = (kind: QuantityKind, unit: Unit): boolean =>
  kind === 'gain' || kind === 'loss' || kind === 'noise figure'
    ? unit.form === 'decibel' && isDimensionless(unit.dimension)
    : unit.defaultKind === undefined ||
      unit.defaultKind === kind ||
      unit.defaultKind === 'bandwidth' ||
      kind === 'level';

/** A call's own kind; a gain or a loss for sums of such: losses less gains are a loss. */
export function kindOfTerms(checked: Checked | undefined): QuantityKind | undefined {
  if (checked === undefined) return undefined;
  if (checked.terms === undefined) return checked.kind;
  const { terms } = checked;
  // Terms about which nothing is known, such as a literal in dB, go with the rest.
  const known = terms.filter(({ kind, type }) => kind !== undefined || type.meaning?.declared === true);
  const isLossLike = known.every(
    ({ kind, coefficient }) => (kind === 'loss' && coefficient > 0) || (kind === 'gain' && coefficient < 0),
  );
  return isLossLike && known.some(({ kind }) => kind === 'loss') ? 'loss' : undefined;
}

export function attributeSide(
  spec: LineSpec,
  unit: Unit,
  kind: AttributedKind | undefined,
  net: Meaning | undefined,
): AttributedSide | undefined {
  if (spec.side !== undefined) return { side: spec.side, origin: 'declared' };
  if (kind?.kind !== 'level') return undefined;
  const named = assumeFromName(spec.symbol, spec.label, unit);
  if (named?.side !== undefined) return { side: named.side, origin: 'name' };
  const told = net === undefined ? undefined : kindOfNet(net, false)?.side;
  return told === undefined ? undefined : { side: told, origin: 'expression' };
}

/** The line as others meet it. Assumed kinds count; assumed sides count as not said. */
export function exportedType(
  spec: LineSpec,
  unit: Unit,
  kind: AttributedKind | undefined,
  net: Meaning | undefined,
  checked: Checked | undefined,
  isPure: boolean,
): LinearType | DecibelType | RateType {
  const type = typeOfUnit(unit, exportedMeaning(spec, unit, kind, net), isPure);
  if (
    type.form === 'rate' ||
    checked === undefined ||
    (checked.type.form !== 'decibel' && checked.type.form !== 'linear')
  )
    return type;
  const { bandwidth, noiseTemperature, plane } = checked.type;
  const degree = type.form === 'linear' && checked.type.form === 'linear' ? checked.type.degree : 0;
  if (bandwidth === undefined && noiseTemperature === undefined && plane === undefined && degree === 0) return type;
  return type.form === 'linear'
    ? { ...type, bandwidth, noiseTemperature, plane, degree }
    : { ...type, bandwidth, noiseTemperature, plane };
}

function exportedMeaning(
  spec: LineSpec,
  unit: Unit,
  kind: AttributedKind | undefined,
  net: Meaning | undefined,
): Meaning {
  if (spec.quantity !== undefined) {
    const netSide = net === undefined ? undefined : kindOfNet(net, false)?.side;
    return meaningOf(spec.quantity, spec.side ?? (spec.quantity === 'level' ? netSide : undefined), true);
  }
  if (kind?.kind === 'level' && spec.side !== undefined) return meaningOf('level', spec.side, true);
  if (kind?.origin === 'name' && kind.kind !== 'level') return meaningOf(kind.kind, undefined, false);
  const isLevel = net !== undefined && Math.abs(net.w + net.u + net.l - 1) < 1e-9;
  if (kind?.kind === 'level') return isLevel ? resolveMeaning(net) : meaningOf('level', undefined, false);
  if (net !== undefined) return resolveMeaning(net);
  return kind === undefined
    ? unit.word === 'dB'
      ? UNSAID
      : meaningOfUnit(unit)
    : meaningOf(kind.kind, undefined, false);
}
