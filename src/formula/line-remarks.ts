/** What the checker says of a line as a whole: its declared kind against what it rests on, and figures below their floor. */
import {
  FREQUENCY,
  isDimensionless,
  kindOfNet,
  meaningOf,
  raiseDimension,
  sameDimension,
  TEMPERATURE,
  TIME,
  type Dimension,
  type Meaning,
  type QuantityKind,
  type Unit,
} from '../quantity';
import type { Repair } from '../findings';
import type { Context } from './context';
import type { AttributedKind, LineSpec } from './attribution';
import type { Plan } from './plan';
import type { Tree } from './tree';
import type { Checked, DecibelType, LinearType, RateType } from './types';

interface LineFacts {
  readonly spec: LineSpec;
  readonly unit: Unit;
  readonly kind: AttributedKind | undefined;
  readonly net: Meaning | undefined;
  readonly type: LinearType | DecibelType | RateType;
  readonly plan: Plan;
  readonly isInError: boolean;
  readonly tree: Tree | undefined;
  readonly checked: Checked | undefined;
  readonly context: Context;
}

/** Makes the findings that concern the line rather than a part of its entry. */
export function sayLineRemarks(line: LineFacts): void {
  if (line.isInError) return;
  sayLevelWithoutReference(line);
  sayKindMismatch(line);
  sayBelowFloor(line);
}

function sayLevelWithoutReference({ spec, unit, tree, context }: LineFacts): void {
  if (spec.quantity !== 'level' || unit.word !== 'dB') return;
  const own = tree?.type === 'literal' && spec.unit === undefined ? tree : undefined;
  const repairs: Repair[] = ['dBm', 'dBW'].map((word) =>
    own === undefined
      ? { kind: 'unit', title: `unit ${word}`, unit: word }
      : context.rewrite(own, `${context.textOf(own).replace(/ ?dB$/, '')} ${word}`),
  );
  context.say('level-without-reference', undefined, {
    facts: {},
    repairs: [...repairs, { kind: 'quantity', title: 'declare it a gain', quantity: 'gain' }],
  });
}

const near = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;

/** The declared kind or side against the net, when the net is wholly known from what was declared. */
function sayKindMismatch({ spec, net, unit, tree, context }: LineFacts): void {
  const isDeclared = spec.quantity !== undefined || spec.side !== undefined;
  if (spec.quantity !== undefined && !fitsUnit(spec.quantity, unit)) {
    context.say('kind-mismatch', tree, {
      facts: { declared: spec.quantity, what: `its unit ${unit.word}`, found: 'something else' },
      repairs:
        unit.defaultKind === undefined
          ? []
          : [{ kind: 'quantity', title: `declare it ${unit.defaultKind}`, quantity: unit.defaultKind }],
    });
    return;
  }
  if (
    !isDeclared ||
    spec.quantity === 'plain' ||
    net === undefined ||
    !net.declared ||
    tree === undefined ||
    tree.type === 'literal'
  )
    return;
  const declared = meaningOf(spec.quantity ?? 'level', spec.side, true);
  const isSideFree = near(declared.l, 1);
  const agrees = isSideFree ? near(net.w + net.u + net.l, 1) : near(declared.w, net.w) && near(declared.u, net.u);
  if (agrees) return;
  const found = kindOfNet({ ...net, f: 0 }, unit.form !== 'rate' && isDimensionless(unit.dimension));
  const words = [found?.side, found?.kind].filter((word) => word !== undefined).join(' ');
  context.say('kind-mismatch', tree, {
    facts: {
      declared: [spec.side, spec.quantity].filter((word) => word !== undefined).join(' '),
      what: context.textOf(tree),
      found: words === '' ? 'something else' : /^[aeiou]/.test(words) ? `an ${words}` : `a ${words}`,
    },
    repairs:
      found === undefined
        ? []
        : [
            {
              kind: 'quantity',
              title: `declare it ${words}`,
              quantity: found.kind,
              ...(found.side === undefined ? {} : { side: found.side }),
            },
          ],
  });
}

/** True when a quantity of this kind can be in this unit. */
function fitsUnit(kind: QuantityKind, unit: Unit): boolean {
  if (unit.form === 'rate') return kind === 'loss' || kind === 'gain' || kind === 'plain';
  const is = (dimension: Dimension): boolean => sameDimension(unit.dimension, dimension);
  switch (kind) {
    case 'gain':
    case 'loss':
    case 'noise figure':
      return isDimensionless(unit.dimension);
    case 'signal ratio':
      return isDimensionless(unit.dimension) || is(FREQUENCY);
    case 'impairment ratio':
      return isDimensionless(unit.dimension) || is(TIME);
    case 'temperature':
      return is(TEMPERATURE);
    case 'bandwidth':
      return is(FREQUENCY);
    case 'figure of merit':
      return is(raiseDimension(TEMPERATURE, -1));
    case 'level':
    case 'plain':
      return true;
  }
}

const isNegative = (value: number): boolean => value < 0;

function sayBelowFloor({ unit, kind, plan, tree, checked, context }: LineFacts): void {
  const positive: Repair[] =
    tree?.type === 'literal' && tree.figure < 0
      ? [context.rewrite(tree, context.textOf(tree).replace(/^[-−–]\s*/, ''))]
      : [];
  const isRatio = unit.form === 'decibel' && isDimensionless(unit.dimension);
  if (kind?.kind === 'noise figure' && isRatio)
    context.say('negative-figure', tree, {
      facts: { kind: 'noise figure', floor: '0 dB' },
      repairs: positive,
      applies: { plan, test: isNegative },
    });
  if (unit.form === 'linear' && sameDimension(unit.dimension, TEMPERATURE)) {
    const floor = -unit.shift / unit.factor;
    context.say('negative-figure', tree, {
      facts: { kind: 'temperature', floor: unit.word === '°C' ? '−273.15 °C' : '0 K' },
      repairs: positive,
      applies: { plan, test: (value) => value < floor },
    });
  }
  if (unit.form === 'linear' && kind?.kind === 'bandwidth' && kind.origin !== 'unit' && kind.origin !== 'expression')
    context.say('negative-figure', tree, {
      facts: { kind: 'bandwidth', floor: '0 Hz' },
      repairs: positive,
      applies: { plan, test: isNegative },
    });
  const isNamedLoss = kind?.kind === 'loss' && kind.origin !== 'expression' && isRatio;
  if (isNamedLoss && checked?.type.form !== 'broken')
    context.say('negative-loss', tree, {
      facts: {},
      repairs: [...positive, { kind: 'quantity', title: 'declare it a gain', quantity: 'gain' }],
      applies: { plan, test: isNegative },
    });
}
