/**
 * Where a curve is read: each call in a line's entry, with the place on the curve and what the curve gives there.
 * Holds: both figures are those of the line's own plan, in the units of the curve's axes.
 */
import type { Evaluation } from '../engine';
import { evaluatePlan, type Checked, type Plan } from '../formula';
import type { CurveSection } from '../worksheet';

export interface CurveUse {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
  /** In the unit of the first axis. */
  readonly x: number;
  /** In the unit of the second axis; undefined where the curve has no value at x. */
  readonly y: number | undefined;
}

/** The uses of a curve in a case, by line and in the order of each entry. Calls whose argument has no figure are left out. */
export function curveUses(
  evaluation: Evaluation,
  section: Pick<CurveSection, 'id' | 'symbol'>,
  caseId: string,
): readonly CurveUse[] {
  if (section.symbol === '' || evaluation.lineOf(section.symbol)?.id !== section.id) return [];
  const uses: CurveUse[] = [];
  for (const lineId of evaluation.usedBy(section.id)) {
    const line = evaluation.line(lineId);
    const checked = evaluation.inspect(lineId, caseId);
    if (line === undefined || checked === undefined) continue;
    for (const call of callsOf(checked, section.symbol)) {
      const [argument] = call.parameters;
      const x = argument === undefined ? NaN : evaluatePlan(argument, evaluation.figures);
      if (!Number.isFinite(x)) continue;
      const y = call.compute(x);
      uses.push({ lineId, symbol: line.symbol, label: line.label, x, y: Number.isFinite(y) ? y : undefined });
    }
  }
  return uses;
}

type Call = Extract<Plan, { readonly op: 'apply' }>;

function callsOf(checked: Checked, symbol: string): readonly Call[] {
  const { tree, plan, parts } = checked;
  const call = tree.type === 'call' && tree.name === symbol ? callIn(plan) : undefined;
  return [...(call === undefined ? [] : [call]), ...parts.flatMap((part) => callsOf(part, symbol))];
}

/** The call itself; a linear second axis is brought into SI behind it. */
function callIn(plan: Plan): Call | undefined {
  if (plan.op === 'apply') return plan;
  const [term] = plan.op === 'sum' ? plan.terms : [];
  return term?.plan.op === 'apply' ? term.plan : undefined;
}
