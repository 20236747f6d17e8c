/**
 * A line: its entry checked, brought into the line's unit, and given its kind and side. What comes out is all that the
 * engine needs: a plan for the figure, how other lines meet it, and the findings.
 */
import { fail, ok, type Result } from '../base';
import { CATALOGUE } from '../findings';
import {
  assumeFromName,
  findUnit,
  isDimensionless,
  sameDimension,
  UNIT_WORDS,
  type Curve,
  type Unit,
} from '../quantity';
import {
  attributeKind,
  attributeSide,
  exportedType,
  kindOfTerms,
  nameKind,
  powerMeaning,
  type AttributedKind,
  type AttributedSide,
  type LineSpec,
} from './attribution';
import { findFunction } from './catalogue';
import { check } from './check';
import { asFactor, Context } from './context';
import { convertResult, readOverReference } from './conversion';
import { fittingDecibelUnit, termsOf } from './forms';
import { parseEntry } from './grammar';
import { sayFactorInLogarithm, sayHandConversion } from './hand-conversion';
import { hasDimensionedTerms, hidesBoltzmann, sayConstantHidesUnit, type Hidden } from './hidden-units';
import { consume } from './judge';
import { sayLineRemarks } from './line-remarks';
import { sayUnitMismatch } from './mismatch';
import { nearestName } from './nearest';
import { judgedNet } from './net';
import { constantPlan, type Plan } from './plan';
import { readPlainQuantity, type EntryFault } from './scan';
import { symbolsOf, type Tree } from './tree';
import type { Checked, DecibelType, LinearType, RateType, Remark, Scope } from './types';

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
  /** What is called by the symbol of a curve. */
  readonly curve?: Curve | undefined;
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
export function readEntry(entry: string, limit?: number): ReadEntry {
  if (entry.trim() === '') return { form: 'empty' };
  const plain = readPlainQuantity(entry);
  if (plain !== undefined) return { form: 'quantity', ...plain };
  const parsed = parseEntry(entry, limit);
  return parsed.ok
    ? { form: 'expression', tree: parsed.value, symbols: symbolsOf(parsed.value, isCurveName) }
    : { form: 'unreadable', fault: parsed.fault };
}

/** A call of what is no function of the catalogue may be one of a curve. */
const isCurveName = (name: string): boolean => findFunction(name) === undefined;

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

function checkRead(
  spec: LineSpec,
  read: Exclude<ReadEntry, { form: 'empty' }>,
  context: Context,
  declared: Unit | undefined,
): Draft {
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
      context.remarks.push({
        code: 'bad-entry',
        place: read.fault.place,
        facts: { what: read.fault.sentence },
        repairs: [],
      });
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
      if (!sayHandConversion(checked.tree, terms, declared.offsetDb, context))
        sayFactorInLogarithm(terms, declared, context);
      return undefined;
    }
    return sayConstantHidesUnit(checked.tree, terms, declared, context);
  }
  if (declared !== undefined) return undefined;
  const isPlain = isDimensionless(type.dimension) || !hasDimensionedTerms(terms);
  const hasWord = !fittingDecibelUnit(type.dimension, 0, []).word.startsWith('dB(');
  return isPlain || (hasWord && !hidesBoltzmann(terms))
    ? undefined
    : sayConstantHidesUnit(checked.tree, terms, undefined, context);
}

function settle(
  spec: LineSpec,
  draft: Draft,
  declared: Unit | undefined,
  context: Context,
  isUnitInError: boolean,
): LineResult {
  const assumed = declared === undefined ? undefined : assumeFromName(spec.symbol, spec.label, declared);
  const hidden = draft.checked === undefined ? undefined : findHidden(draft.checked, declared, context);
  const checked =
    draft.checked === undefined
      ? undefined
      : consume(draft.checked, context, {
          symbol: spec.symbol,
          label: spec.label,
          kind: spec.quantity ?? assumed?.kind ?? nameKind(spec),
          hidden: hidden?.term,
        });
  if (draft.checked?.type.form === 'decibel' && checked?.type.form === 'broken' && declared !== undefined)
    sayInverseLevel({ ...draft.checked, type: draft.checked.type }, declared, context);
  const converted =
    checked === undefined || isUnitInError ? undefined : convertResult(checked, declared, context, hidden?.repairs);
  const unit = declared ?? converted?.unit;
  const isInError = converted === undefined || context.waitsFor.length > 0 || context.remarks.some(isErrorRemark);
  const symbols = draft.symbols ?? [];
  const isFitted = declared === undefined && draft.ownUnit === undefined && converted?.isFitted === true;
  sayStrictKind(spec, checked, context);
  const plan = isInError ? NO_FIGURE : converted.plan;
  const { remarks, waitsFor } = context;
  const typedDigits = draft.typedDigits;
  if (unit === undefined)
    return {
      unit,
      isFitted,
      plan,
      typedDigits,
      isEmpty: false,
      isInError,
      looksAround: context.looksAround,
      waitsFor,
      symbols,
      remarks,
    };
  const net = checked === undefined ? undefined : powerMeaning(checked);
  const kind = attributeKind(spec, unit, draft.tree?.type === 'literal' ? undefined : net, checked);
  const side = attributeSide(spec, unit, kind, net);
  const isBareNumber =
    isDimensionless(unit.form === 'rate' ? [0, 1, 0, 0, 0] : unit.dimension) &&
    unit.word === '1' &&
    declared === undefined;
  const sortIsPure = isBareNumber && (checked?.type.form === 'linear' ? checked.type.sort !== 'ratio' : true);
  const type = exportedType(spec, unit, kind, net, checked, sortIsPure);
  sayLineRemarks({ spec, unit, kind, net, type, plan, isInError, tree: draft.tree, checked, context });
  const constant = sortIsPure && draft.bareFigure !== undefined ? draft.bareFigure : undefined;
  const { looksAround } = context;
  return {
    unit,
    isFitted,
    plan,
    type,
    kind,
    side,
    constant,
    typedDigits,
    isEmpty: false,
    isInError,
    remarks,
    looksAround,
    waitsFor,
    symbols,
  };
}

const STRICT_KINDS: ReadonlySet<string> = new Set(['gain', 'loss', 'noise figure']);

/** A loss where a gain is wanted has the wrong sign; a gain is no noise figure. */
function sayStrictKind(spec: LineSpec, checked: Checked | undefined, context: Context): void {
  if (spec.isStrict !== true || spec.quantity === undefined || checked === undefined) return;
  const told = kindOfTerms(checked);
  if (told === undefined || told === spec.quantity || !STRICT_KINDS.has(told) || !STRICT_KINDS.has(spec.quantity))
    return;
  const text = context.textOf(checked.tree);
  const isTurned = spec.quantity === 'gain' && told === 'loss';
  context.say('kind-mismatch', checked.tree, {
    facts: { asked: `A ${spec.quantity} is wanted here`, what: text, found: `a ${told}` },
    repairs: isTurned ? [context.rewrite(checked.tree, `-${asFactor(checked.tree, text)}`)] : [],
  });
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
export function inspectLine(
  spec: LineSpec,
  scope: Scope,
  read: ReadEntry = readEntry(spec.entry),
): Checked | undefined {
  if (read.form === 'empty') return undefined;
  const context = new Context(spec.entry, scope);
  const declared = spec.unit === undefined ? undefined : findUnit(spec.unit);
  const { checked } = checkRead(spec, read, context, declared);
  return checked === undefined ? undefined : consume(checked, context);
}

const isErrorRemark = ({ code, applies }: Remark): boolean =>
  applies === undefined && CATALOGUE[code].severity === 'error';
