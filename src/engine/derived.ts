/** Results of items that have no entry: figures derived from other items, and curves. */
import { present } from '../base';
import { constantPlan, typeOfUnit, type LineResult, type Plan, type Remark } from '../formula';
import { findUnit, makeCurve, meaningOf, type QuantityKind, type Side, type Unit } from '../quantity';
import type { CurveSection } from '../worksheet';
import type { Derived } from './item';

/** What a derived item needs to know of its inputs. */
interface Input {
  readonly slot: number;
}

const slotPlan = ({ slot }: Input): Plan => ({ op: 'slot', slot });

/** The result of a derived item in the slot, from its inputs in their order. */
export function derivedResult(derived: Derived, slot: number, inputs: readonly Input[]): LineResult {
  const unit = present(findUnit(derived.unit), derived.unit);
  const { criterion, quantity, side, plane } = derived;
  const remarks: Remark[] =
    criterion === undefined
      ? []
      : [
          {
            code: criterion.code,
            facts: criterion.facts,
            repairs: [],
            applies: { plan: { op: 'slot', slot }, test: criterion.test },
            ...(criterion.late === undefined
              ? {}
              : {
                  lateFacts: (evaluate) =>
                    criterion.late?.([
                      ...inputs.map((input) => evaluate(slotPlan(input))),
                      evaluate({ op: 'slot', slot }),
                    ]) ?? {},
                }),
          },
        ];
  const result = bare(unit, quantity, side);
  const { type } = result;
  const placed = type === undefined || type.form === 'rate' || plane === undefined ? type : { ...type, plane };
  return { ...result, type: placed, plan: derived.plan(inputs.map(slotPlan)), remarks };
}

/** The parts of a result that do not depend on figures. Kinds and sides of derived items count as declared. */
function bare(
  unit: Unit,
  quantity: QuantityKind | undefined,
  side: Side | undefined,
): Omit<LineResult, 'plan' | 'remarks'> {
  return {
    unit,
    isFitted: false,
    type: typeOfUnit(unit, meaningOf(quantity ?? 'plain', side, true)),
    ...(quantity === undefined ? {} : { kind: { kind: quantity, origin: 'declared' } }),
    ...(side === undefined ? {} : { side: { side, origin: 'declared' } }),
    isEmpty: false,
    isInError: false,
    looksAround: false,
    waitsFor: [],
    symbols: [],
  };
}

/** A curve as a line: it has no figure of its own, and is called by its symbol. */
export function curveResult(section: CurveSection): LineResult {
  const made = makeCurve({
    x: section.x,
    y: section.y,
    isMonotone: section.interpolation === 'monotone',
    isLogarithmic: section.logarithmic === true,
    points: section.points,
  });
  if (!made.ok)
    return {
      isFitted: false,
      plan: constantPlan(NaN),
      isEmpty: section.points.length === 0,
      isInError: section.points.length > 0,
      remarks: section.points.length === 0 ? [] : [{ code: 'bad-curve', facts: { what: made.fault }, repairs: [] }],
      looksAround: false,
      waitsFor: [],
      symbols: [],
    };
  const curve = made.value;
  return {
    ...bare(curve.yUnit, section.y.quantity ?? curve.yUnit.defaultKind, undefined),
    isEmpty: true,
    plan: constantPlan(NaN),
    curve,
    remarks: [],
  };
}
