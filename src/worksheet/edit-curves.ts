/** Edits of curves and pools: their points, axes and totals. Each is one undoable step. */
import { assert } from '../base';
import type { Change, SetSection } from './changes';
import type { CurvePoint, CurveSection } from './curve';
import { isCurveSection, isPoolSection, type Section, type PoolSection, type Worksheet } from './document';
import type { Edit, Focus } from './edit';
import { sectionOf } from './lookup';

function edit(label: string, section: Section, changes: readonly Change[]): Edit {
  const focus: Focus = { kind: 'section', sectionId: section.id };
  return { label, changes, focus, focusBefore: focus };
}

/** Sets all points of a curve, in the order given. */
export function setPoints(worksheet: Worksheet, sectionId: string, points: readonly CurvePoint[]): Edit {
  const curve = curveOf(worksheet, sectionId);
  return edit(`Change the points of ${curve.symbol}`, curve, [
    { kind: 'set-section', sectionId, field: 'points', value: points },
  ]);
}

export type CurveField = 'x' | 'y' | 'interpolation' | 'logarithmic';

/** Sets an axis of a curve, or how it goes between its points. */
export function setCurveField<Field extends CurveField>(
  worksheet: Worksheet,
  sectionId: string,
  field: Field,
  value: CurveSection[Field] | undefined,
): Edit {
  const curve = curveOf(worksheet, sectionId);
  const changes: Change[] =
    curve[field] === value ? [] : [{ kind: 'set-section', sectionId, field, value } as SetSection];
  return edit(`Change ${curve.symbol}`, curve, changes);
}

/** Sets the unit of a pool's total, or the requirement on it; undefined takes it away. */
export function setPoolField<Field extends 'unit' | 'requirement'>(
  worksheet: Worksheet,
  sectionId: string,
  field: Field,
  value: PoolSection[Field] | undefined,
): Edit {
  const pool = sectionOf(worksheet, sectionId);
  assert(isPoolSection(pool), `the section ${sectionId} is a pool`);
  const changes: Change[] =
    pool[field] === value ? [] : [{ kind: 'set-section', sectionId, field, value } as SetSection];
  return edit(`Change the ${field} of ${pool.symbol}`, pool, changes);
}

/** The curve with this id. Throws when there is none. */
export function curveOf(worksheet: Worksheet, sectionId: string): CurveSection {
  const section = sectionOf(worksheet, sectionId);
  assert(isCurveSection(section), `the section ${sectionId} is a curve`);
  return section;
}
