/** Edits of a curve that set several of its fields in one step, for the panel. */
import { ok, type Result } from '../../base';
import { pointsInUnits, type PastedAxis, type PastedPoints } from '../../exchange';
import { convertFigure } from '../../engine';
import { findUnit } from '../../quantity';
import {
  setCurveField,
  setPoints,
  type CurveAxis,
  type CurveSection,
  type CurveValueAxis,
  type Edit,
  type Worksheet,
} from '../../worksheet';

/** Whether pasted points take the place of all that are there, or come behind them. */
export type PasteWay = 'replace' | 'append';

/**
 * The edit that pastes points: replacing, with the axes as the text names them; appending, in the curve's own units. Where there
 * are no points yet both are the same: a curve that has just been made takes labels and units from the first heading.
 */
export function pasteEdit(
  worksheet: Worksheet,
  curve: CurveSection,
  pasted: PastedPoints,
  way: PasteWay,
): Result<Edit, string> {
  const count = `${String(pasted.points.length)} ${pasted.points.length === 1 ? 'point' : 'points'}`;
  if (way === 'append' && curve.points.length > 0) {
    const points = pointsInUnits(pasted, { x: curve.x.unit, y: curve.y.unit });
    if (!points.ok) return points;
    const edit = setPoints(worksheet, curve.id, [...curve.points, ...points.value]);
    return ok({ ...edit, label: `Add ${count} to ${curve.symbol}` });
  }
  const edit = setPoints(worksheet, curve.id, pasted.points);
  const x = axisWith(curve.x, pasted.x);
  const y = axisWith(curve.y, pasted.y);
  return ok({
    ...edit,
    label: `Paste ${count} into ${curve.symbol}`,
    changes: [
      ...(x === curve.x ? [] : setCurveField(worksheet, curve.id, 'x', x).changes),
      ...(y === curve.y ? [] : setCurveField(worksheet, curve.id, 'y', y).changes),
      ...edit.changes,
    ],
  });
}

/** The axis with another label or unit; what it is a quantity of is left out when the unit is of another dimension. */
export function axisWith<Axis extends CurveAxis | CurveValueAxis>(axis: Axis, { label, unit }: PastedAxis): Axis {
  const isSame = (label ?? axis.label) === axis.label && (unit ?? axis.unit) === axis.unit;
  if (isSame) return axis;
  const changed: Axis = { ...axis, label: label ?? axis.label, unit: unit ?? axis.unit };
  if (!('quantity' in changed) || isOfOneDimension(axis.unit, changed.unit)) return changed;
  const { quantity: _other, ...bare } = changed;
  return bare as Axis;
}

function isOfOneDimension(before: string, after: string): boolean {
  const [from, to] = [findUnit(before.trim()), findUnit(after.trim())];
  return from !== undefined && to !== undefined && convertFigure(1, from, to) !== undefined;
}
