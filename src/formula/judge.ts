/**
 * Judging decibel sums as wholes: levels that were added, ratios and noise figures that were added, nets that no budget has,
 * and the notes. A sum is judged where it ends: as a line's result, as an argument, in a comparison.
 */
import {
  describeNet,
  hasAllowedNet,
  POWER,
  POWER_DENSITY,
  sameDimension,
  type Meaning,
  type QuantityKind,
} from '../quantity';
import { broken, type Context } from './context';
import { differByImpedance, impedanceOf } from './alignment';
import { findAveraged } from './averages';
import { describeType } from './forms';
import { isLevel, judgedNet } from './net';
import { sayNotes } from './notes';
import {
  cascadeOfFigures,
  groupedAsPowers,
  groupedAsRatios,
  withFlippedTerm,
  withReplacedTerms,
  type Grouped,
} from './repairs';
import { sayBandwidthsDiffer } from './bandwidths';
import { sayPlanesDiffer } from './planes';
import type { Tree } from './tree';
import type { Checked, SumTerm } from './types';

/** What is known of the line that the sum is the result of; absent for arguments. */
export interface LineOfSum {
  readonly symbol: string;
  readonly label: string;
  /** The line's kind, declared or assumed from its name. */
  readonly kind?: QuantityKind | undefined;
  /** A bare number that hides a unit: it gets that finding and no note. */
  readonly hidden?: SumTerm | undefined;
}

/** Ends an expression: judges it when it is a decibel sum. Returns it, or a broken one when it has no meaning. */
export function consume(checked: Checked, context: Context, line?: LineOfSum): Checked {
  if (checked.type.form !== 'decibel' || checked.terms === undefined) return checked;
  const isAlone = checked.terms.length === 1 && checked.terms[0]?.coefficient === 1;
  if (isAlone) return checked;
  return judge(checked, checked.terms, context, line) ? checked : broken(checked.tree);
}

/** Judges a sum; false when it has no meaning at all (an error has been said). */
function judge(checked: Checked, terms: readonly SumTerm[], context: Context, line: LineOfSum | undefined): boolean {
  const net = judgedNet(terms);
  const levels = net.w + net.u + net.l;
  if (levels > 2 - 1e-9) {
    sayLevelsSummed(
      checked.tree,
      terms,
      terms.filter((term) => isLevel(term) && term.coefficient > 0),
      context,
    );
    return false;
  }
  // S − N − I: the levels taken off are added as well, and what is left is the inverse of a level, which no line is.
  const takenOff = terms.filter((term) => isLevel(term) && term.coefficient < 0);
  if (levels < -1 + 1e-9 && takenOff.length > 1 && line !== undefined) {
    sayLevelsSummed(checked.tree, terms, takenOff, context);
    return false;
  }
  const averaged = findAveraged(checked.tree, terms, context);
  sayMeaning(checked.tree, terms, net, context);
  if (!averaged) sayNotes(checked, terms, net, context, line);
  const powers = terms.filter(({ coefficient }) => Math.abs(coefficient) === 1).filter(isLevel);
  sayBandwidthsDiffer(powers, context);
  sayPlanesDiffer(terms.filter(isLevel), terms, context);
  return true;
}

function sayLevelsSummed(tree: Tree, terms: readonly SumTerm[], levels: readonly SumTerm[], context: Context): void {
  if (sayVoltageAmongPowers(tree, terms, levels, context)) return;
  const turned = turnedDensity(terms);
  const grouped = turned ?? groupedAsPowers(terms, levels, 'powersum', context);
  const inPhase = groupedAsPowers(terms, levels, 'fieldsum', context);
  context.say('levels-summed', tree, {
    facts: { levels: levels.map(({ text }) => text).join(' and '), ...(levels.length === 1 ? { single: 'yes' } : {}) },
    repairs: repairsOf(grouped, tree, context),
    ...(inPhase === undefined ? {} : { figures: { inPhase: context.replace(tree, inPhase.text) } }),
  });
}

/** A level of voltage added to one of power: what is missing first is the impedance. */
function sayVoltageAmongPowers(
  tree: Tree,
  terms: readonly SumTerm[],
  levels: readonly SumTerm[],
  context: Context,
): boolean {
  const power = levels.find(({ type }) => sameDimension(type.dimension, POWER));
  const voltage = levels.find(
    (term) => power !== undefined && differByImpedance(term.type.dimension, power.type.dimension),
  );
  if (power === undefined || voltage === undefined) return false;
  const inPower = levels.map((term) =>
    differByImpedance(term.type.dimension, power.type.dimension)
      ? { ...term, text: `${term.text} - ${impedanceOf(term.type)}` }
      : term,
  );
  const all = terms.map((term) => inPower[levels.indexOf(term)] ?? term);
  context.say('field-and-power', voltage.tree, {
    facts: {
      what: voltage.text,
      found: describeType(voltage.type),
      declared: `${describeType(power.type)}, as ${power.text} is`,
    },
    repairs: repairsOf(groupedAsPowers(all, inPower, 'powersum', context), tree, context),
  });
  return true;
}

/** `P + 174 dBm/Hz − …`: nobody has a noise density of +174 dBm/Hz; it is −174 dBm/Hz, taken off. */
function turnedDensity(terms: readonly SumTerm[]): Grouped | undefined {
  const density = terms.find(
    ({ tree, coefficient, type }) =>
      tree.type === 'literal' && tree.figure > 100 && coefficient === 1 && sameDimension(type.dimension, POWER_DENSITY),
  );
  return density === undefined ? undefined : withReplacedTerms(terms, [density], `(-${density.text})`, -1);
}

function repairsOf(grouped: Grouped | undefined, tree: Tree, context: Context): ReturnType<Context['rewrite']>[] {
  return grouped === undefined
    ? []
    : [{ kind: 'entry', title: grouped.title, entry: context.replace(tree, grouped.text) }];
}

const near = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;

function sayMeaning(tree: Tree, terms: readonly SumTerm[], net: Meaning, context: Context): void {
  if (Math.abs(net.f) > 2 - 1e-9) {
    const figures = terms.filter(({ type }) => type.meaning !== undefined && !near(type.meaning.f, 0));
    context.say('noise-figures-summed', tree, {
      facts: { figures: figures.map(({ text }) => text).join(' and ') },
      repairs: repairsOf(cascadeOfFigures(terms, figures, context), tree, context),
    });
  }
  if (hasAllowedNet(net)) return;
  const isRatios = near(net.l, 0) && near(net.w, -net.u) && Math.abs(net.w) > 2 - 1e-9;
  if (isRatios) {
    const sign = Math.sign(net.w);
    const ratios = terms.filter(
      ({ coefficient, type }) =>
        type.meaning !== undefined && type.meaning.w * coefficient * sign > 0 && near(type.meaning.w, -type.meaning.u),
    );
    context.say('ratios-summed', tree, {
      facts: { ratios: ratios.map(({ text }) => text).join(' and ') },
      repairs: repairsOf(groupedAsRatios(terms, ratios), tree, context),
    });
    return;
  }
  const flipped = withFlippedTerm(terms, (changed) => {
    const changedNet = judgedNet(changed);
    return hasAllowedNet(changedNet) && changedNet.w + changedNet.u + changedNet.l < 2;
  });
  context.say('sides-mixed', tree, {
    facts: { terms: terms.map(({ text }) => text).join(', '), net: describeNet(net) },
    repairs: repairsOf(flipped, tree, context),
  });
}
