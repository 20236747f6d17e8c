/**
 * A line: its entry checked, brought into the line's unit, and given its kind and side. What comes out is all that the
 * engine needs: a plan for the figure, how other lines meet it, and the findings.
 */
import { fail, ok, present, type Result } from '../base';
import { CATALOGUE } from '../findings';
import {
  assumeFromName, findUnit, isDimensionless, kindOfNet, meaningOf, resolveMeaning, sameDimension, UNIT_WORDS, UNSAID,
  type Meaning, type QuantityKind, type Side, type Unit,
} from '../quantity';
import { meaningOfUnit, typeOfUnit } from './atoms';
import { check } from './check';
import { Context } from './context';
import { fittingDecibelUnit, isFieldLike, squared, termsOf } from './forms';
import { parseEntry } from './grammar';
import { sayFactorInLogarithm, sayHandConversion } from './hand-conversion';
import { sayConstantHidesUnit, hasDimensionedTerms, hidesBoltzmann, type Hidden } from './hidden-units';
import { consume } from './judge';
import { convertResult, readOverReference } from './conversion';
import { sayUnitMismatch } from './mismatch';
import { nearestName } from './nearest';
import { judgedNet } from './net';
import { sayLineRemarks } from './line-remarks';
import { constantPlan, type Plan } from './plan';
import { readPlainQuantity, type EntryFault } from './scan';
import { symbolsOf, type Tree } from './tree';
import type { Checked, DecibelType, LinearType, RateType, Remark, Scope } from './types';

/** What a person has said of a line. */
export interface LineSpec {
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly unit?: string | undefined;
  readonly quantity?: QuantityKind | undefined;
  readonly side?: Side | undefined;
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

/** A line as checked. */
export interface LineResult {
  /** The line's unit; absent when neither declared nor found (the entry is in error, or empty). */
  readonly unit?: Unit | undefined;
  /** True when the unit was neither declared nor typed, so that display may choose a prefix. */
  readonly isFitted: boolean;
  /** The figure in `unit`. */
  readonly plan: Plan;
  /** How other lines meet it; absent without a unit. */
  readonly type?: LinearType | DecibelType | RateType | undefined;
  readonly kind?: AttributedKind | undefined;
  readonly side?: AttributedSide | undefined;
  /** The bare number it holds, for use as a coefficient. */
  readonly constant?: number | undefined;
  /** Significant digits typed, for plain quantities. */
  readonly typedDigits?: number | undefined;
  readonly isEmpty: boolean;
  readonly isInError: boolean;
  readonly remarks: readonly Remark[];
  /** True when its findings looked at other lines than those it uses. */
  readonly looksAround: boolean;
  /** Symbols that have no type because their own lines are in error. */
  readonly waitsFor: readonly string[];
  /** Every symbol in the entry. */
  readonly symbols: readonly string[];
}

/** An entry as read, before anything is known of the symbols in it. */
export type ReadEntry =
  | { readonly form: 'empty' }
  | { readonly form: 'quantity'; readonly figure: number; readonly unit: Unit | null; readonly digits: number }
  | { readonly form: 'expression'; readonly tree: Tree; readonly symbols: readonly string[] }
  | { readonly form: 'unreadable'; readonly fault: EntryFault };

/** Reads an entry: a plain quantity if it is one, else an expression. */
export function readEntry(entry: string): ReadEntry {
  if (entry.trim() === '') return { form: 'empty' };
  const plain = readPlainQuantity(entry);
  if (plain !== undefined) return { form: 'quantity', ...plain };
  const parsed = parseEntry(entry);
  return parsed.ok
    ? { form: 'expression', tree: parsed.value, symbols: symbolsOf(parsed.value) }
    : { form: 'unreadable', fault: parsed.fault };
}

interface Draft {
  readonly checked: Checked | undefined;
  readonly tree?: Tree | undefined;
  readonly symbols?: readonly string[] | undefined;
  readonly typedDigits?: number | undefined;
  /** A bare number: it takes the line's unit. */
  readonly bareFigure?: number | undefined;
  /** The unit typed behind a plain quantity. */
  readonly ownUnit?: Unit | undefined;
}

/** Checks a line, whose entry may have been read before. Never throws for anything a person can type. */
export function checkLine(spec: LineSpec, scope: Scope, read: ReadEntry = readEntry(spec.entry)): LineResult {
  const context = new Context(spec.entry, scope);
  const declared = declaredUnit(spec, context);
  if (read.form === 'empty') return emptyLine(spec, declared.ok ? declared.value : undefined, context);
  const draft = checkRead(spec, read, context, declared.ok ? declared.value : undefined);
  return settle(spec, draft, declared.ok ? declared.value : undefined, context, !declared.ok);
}

function declaredUnit(spec: LineSpec, context: Context): Result<Unit | undefined, undefined> {
  const word = spec.unit?.trim();
  if (word === undefined || word === '') return ok(undefined);
  const unit = findUnit(word);
  if (unit !== undefined) return ok(unit);
  const nearest = nearestName(word, UNIT_WORDS);
  context.say('bad-entry', undefined, {
    facts: { what: `The line’s unit “${word}” is not known here.${nearest === undefined ? '' : ` Is it ${nearest}?`}` },
    repairs: nearest === undefined ? [] : [{ kind: 'unit', title: `unit ${nearest}`, unit: nearest }],
  });
  return fail(undefined);
}

function emptyLine(spec: LineSpec, unit: Unit | undefined, context: Context): LineResult {
  const kind = unit === undefined ? undefined : attributeKind(spec, unit, undefined, undefined);
  return {
    unit,
    isFitted: false,
    plan: constantPlan(NaN),
    type: undefined,
    kind,
    isEmpty: true,
    isInError: context.remarks.length > 0,
    remarks: context.remarks,
    looksAround: false,
    waitsFor: [],
    symbols: [],
  };
}

function checkRead(spec: LineSpec, read: Exclude<ReadEntry, { form: 'empty' }>, context: Context, declared: Unit | undefined): Draft {
  switch (read.form) {
    case 'quantity': {
      const start = spec.entry.length - spec.entry.trimStart().length;
      const place = { start, end: spec.entry.trimEnd().length };
      const tree: Tree = { type: 'literal', place, figure: read.figure, unit: read.unit ?? declared ?? null };
      return {
        checked: check(tree, context),
        tree,
        typedDigits: read.digits,
        bareFigure: read.unit === null ? read.figure : undefined,
        ownUnit: read.unit ?? undefined,
      };
    }
    case 'unreadable':
      context.remarks.push({ code: 'bad-entry', place: read.fault.place, facts: { what: read.fault.sentence }, repairs: [] });
      return { checked: undefined };
    case 'expression':
      return { checked: check(read.tree, context), tree: read.tree, symbols: read.symbols };
  }
}

/** The finding constant-hides-unit comes before the sum is judged, so that its number gets no second remark. */
function findHidden(checked: Checked, declared: Unit | undefined, context: Context): Hidden | undefined {
  const { type } = checked;
  if (type.form !== 'decibel') return undefined;
  const terms = termsOf(checked, context.textOf(checked.tree));
  const net = judgedNet(terms);
  // Of levels added the finding is another; no number in such a sum stands for a unit.
  if (net.w + net.u + net.l > 2 - 1e-9) return undefined;
  if (declared?.form === 'decibel') {
    const read = readOverReference({ ...checked, type }, declared).type;
    if (read.form === 'decibel' && sameDimension(read.dimension, declared.dimension)) {
      // It closes; but a step between references may have been taken twice.
      if (!sayHandConversion(checked.tree, terms, declared.offsetDb, context)) sayFactorInLogarithm(terms, declared, context);
      return undefined;
    }
    return sayConstantHidesUnit(checked.tree, terms, declared, context);
  }
  if (declared !== undefined) return undefined;
  const isPlain = isDimensionless(type.dimension) || !hasDimensionedTerms(terms);
  const hasWord = !fittingDecibelUnit(type.dimension, 0, []).word.startsWith('dB(');
  return isPlain || (hasWord && !hidesBoltzmann(terms)) ? undefined : sayConstantHidesUnit(checked.tree, terms, undefined, context);
}

function settle(spec: LineSpec, draft: Draft, declared: Unit | undefined, context: Context, isUnitInError: boolean): LineResult {
  const assumed = declared === undefined ? undefined : assumeFromName(spec.symbol, spec.label, declared);
  const hidden = draft.checked === undefined ? undefined : findHidden(draft.checked, declared, context);
  const checked =
    draft.checked === undefined
      ? undefined
      : consume(draft.checked, context, { symbol: spec.symbol, label: spec.label, kind: spec.quantity ?? assumed?.kind ?? nameKind(spec), hidden: hidden?.term });
  if (draft.checked?.type.form === 'decibel' && checked?.type.form === 'broken' && declared !== undefined)
    sayInverseLevel({ ...draft.checked, type: draft.checked.type }, declared, context);
  const converted = checked === undefined || isUnitInError ? undefined : convertResult(checked, declared, context, hidden?.repairs);
  const unit = declared ?? converted?.unit;
  const isInError = converted === undefined || context.waitsFor.length > 0 || context.remarks.some(isErrorRemark);
  const symbols = draft.symbols ?? [];
  const isFitted = declared === undefined && draft.ownUnit === undefined && converted?.isFitted === true;
  const plan = isInError ? NO_FIGURE : converted.plan;
  const { remarks, waitsFor } = context;
  const typedDigits = draft.typedDigits;
  if (unit === undefined)
    return { unit, isFitted, plan, typedDigits, isEmpty: false, isInError, looksAround: context.looksAround, waitsFor, symbols, remarks };
  const net = checked === undefined ? undefined : powerMeaning(checked);
  const kind = attributeKind(spec, unit, draft.tree?.type === 'literal' ? undefined : net, checked);
  const side = attributeSide(spec, unit, kind, net);
  const isBareNumber = isDimensionless(unit.form === 'rate' ? [0, 1, 0, 0, 0] : unit.dimension) && unit.word === '1' && declared === undefined;
  const sortIsPure = isBareNumber && (checked?.type.form === 'linear' ? checked.type.sort !== 'ratio' : true);
  const type = exportedType(spec, unit, kind, net, checked, sortIsPure);
  sayLineRemarks({ spec, unit, kind, net, type, plan, isInError, tree: draft.tree, checked, context });
  const constant = sortIsPure && draft.bareFigure !== undefined ? draft.bareFigure : undefined;
  const { looksAround } = context;
  return { unit, isFitted, plan, type, kind, side, constant, typedDigits, isEmpty: false, isInError, remarks, looksAround, waitsFor, symbols };
}

/** S − N − I in a line in dB: beside the levels added, what is left has not the unit declared. */
function sayInverseLevel(checked: Checked & { type: DecibelType }, declared: Unit, context: Context): void {
  const net = judgedNet(termsOf(checked, ''));
  const isInverse = net.w + net.u + net.l < -1 + 1e-9;
  if (isInverse && declared.form !== 'rate' && !sameDimension(checked.type.dimension, declared.dimension))
    sayUnitMismatch(checked, declared, context);
}

const NO_FIGURE = constantPlan(NaN);

/** The checked expression of a line, for its working; undefined when it is empty or cannot be read. */
export function inspectLine(spec: LineSpec, scope: Scope, read: ReadEntry = readEntry(spec.entry)): Checked | undefined {
  if (read.form === 'empty') return undefined;
  const context = new Context(spec.entry, scope);
  const declared = spec.unit === undefined ? undefined : findUnit(spec.unit);
  const { checked } = checkRead(spec, read, context, declared);
  return checked === undefined ? undefined : consume(checked, context);
}

const isErrorRemark = ({ code, applies }: Remark): boolean => applies === undefined && CATALOGUE[code].severity === 'error';

/** The kind that the name says before the unit is known: enough to know a loss from a level. */
function nameKind(spec: LineSpec): QuantityKind | undefined {
  return assumeFromName(spec.symbol, spec.label, present(findUnit('dB'), 'dB'))?.kind;
}

/** The meaning of a result as of its power-like quantity. */
function powerMeaning(checked: Checked): Meaning | undefined {
  const { type } = checked;
  if (type.form === 'linear') return isFieldLike(type) ? squared(type.meaning) : type.meaning;
  return type.form === 'decibel' ? type.meaning : undefined;
}

/** Kind: as declared, else as the name says, else as the expression's net tells, else as the unit suggests. */
function attributeKind(spec: LineSpec, unit: Unit, net: Meaning | undefined, checked: Checked | undefined): AttributedKind | undefined {
  if (spec.quantity !== undefined) return { kind: spec.quantity, origin: 'declared' };
  const named = assumeFromName(spec.symbol, spec.label, unit);
  if (named !== undefined) return { kind: named.kind, origin: 'name' };
  if (net !== undefined && unit.form !== 'rate') {
    const told = kindOfTerms(checked) ?? kindOfNet(net, isDimensionless(unit.dimension))?.kind;
    const isTemperature = unit.defaultKind === 'temperature' && told === 'level';
    if (told !== undefined && fitsUnit(told, unit) && isSaid(net, checked)) return { kind: isTemperature ? 'temperature' : told, origin: 'expression' };
  }
  return unit.defaultKind === undefined ? undefined : { kind: unit.defaultKind, origin: 'unit' };
}

/** True when the expression tells something: not a lone term about which nothing is known, nor a plain number. */
function isSaid(net: Meaning, checked: Checked | undefined): boolean {
  const isZero = [net.w, net.u, net.f, net.l].every((exponent) => Math.abs(exponent) < 1e-9);
  if (!isZero) return true;
  if (checked?.type.form !== 'decibel') return false;
  if (checked.kind !== undefined) return true;
  return termsOf(checked, '').some(({ kind, type }) => kind !== undefined || (type.meaning !== undefined && type.meaning.declared));
}

const fitsUnit = (kind: QuantityKind, unit: Unit): boolean =>
  kind === 'gain' || kind === 'loss' || kind === 'noise figure'
    ? unit.form === 'decibel' && isDimensionless(unit.dimension)
    : unit.defaultKind === undefined || unit.defaultKind === kind || unit.defaultKind === 'bandwidth' || kind === 'level';

/** A call's own kind; a gain or a loss for sums of such: losses less gains are a loss. */
function kindOfTerms(checked: Checked | undefined): QuantityKind | undefined {
  if (checked === undefined) return undefined;
  if (checked.terms === undefined) return checked.kind;
  const { terms } = checked;
  // Terms about which nothing is known, such as a literal in dB, go with the rest.
  const known = terms.filter(({ kind, type }) => kind !== undefined || type.meaning?.declared === true);
  const isLossLike = known.every(({ kind, coefficient }) => (kind === 'loss' && coefficient > 0) || (kind === 'gain' && coefficient < 0));
  return isLossLike && known.some(({ kind }) => kind === 'loss') ? 'loss' : undefined;
}

function attributeSide(spec: LineSpec, unit: Unit, kind: AttributedKind | undefined, net: Meaning | undefined): AttributedSide | undefined {
  if (spec.side !== undefined) return { side: spec.side, origin: 'declared' };
  if (kind?.kind !== 'level') return undefined;
  const named = assumeFromName(spec.symbol, spec.label, unit);
  if (named?.side !== undefined) return { side: named.side, origin: 'name' };
  const told = net === undefined ? undefined : kindOfNet(net, false)?.side;
  return told === undefined ? undefined : { side: told, origin: 'expression' };
}

/** The line as others meet it. Assumed kinds count; assumed sides count as not said. */
function exportedType(
  spec: LineSpec, unit: Unit, kind: AttributedKind | undefined, net: Meaning | undefined, checked: Checked | undefined, isPure: boolean,
): LinearType | DecibelType | RateType {
  const type = typeOfUnit(unit, exportedMeaning(spec, unit, kind, net), isPure);
  if (type.form === 'rate' || checked === undefined || (checked.type.form !== 'decibel' && checked.type.form !== 'linear')) return type;
  const { bandwidth, noiseTemperature } = checked.type;
  const degree = type.form === 'linear' && checked.type.form === 'linear' ? checked.type.degree : 0;
  if (bandwidth === undefined && noiseTemperature === undefined && degree === 0) return type;
  return type.form === 'linear' ? { ...type, bandwidth, noiseTemperature, degree } : { ...type, bandwidth, noiseTemperature };
}

function exportedMeaning(spec: LineSpec, unit: Unit, kind: AttributedKind | undefined, net: Meaning | undefined): Meaning {
  if (spec.quantity !== undefined) {
    const netSide = net === undefined ? undefined : kindOfNet(net, false)?.side;
    return meaningOf(spec.quantity, spec.side ?? (spec.quantity === 'level' ? netSide : undefined), true);
  }
  if (kind?.kind === 'level' && spec.side !== undefined) return meaningOf('level', spec.side, true);
  if (kind?.origin === 'name' && kind.kind !== 'level') return meaningOf(kind.kind, undefined, false);
  const isLevel = net !== undefined && Math.abs(net.w + net.u + net.l - 1) < 1e-9;
  if (kind?.kind === 'level') return isLevel ? resolveMeaning(net) : meaningOf('level', undefined, false);
  if (net !== undefined) return resolveMeaning(net);
  return kind === undefined ? (unit.word === 'dB' ? UNSAID : meaningOfUnit(unit)) : meaningOf(kind.kind, undefined, false);
}
