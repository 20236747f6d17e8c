/** What a curve's plot says in words, for those who cannot see it. */
import type { CurveSection } from '../../worksheet';
import { axisTitle, type CurveLayout } from './curve-layout';

export function describeCurve(section: CurveSection, { uses }: CurveLayout): string {
  const axes = `${axisTitle(section.y, 'y')} over ${axisTitle(section.x, 'x')}`;
  const scale = section.logarithmic === true ? ', x by its logarithm' : '';
  const read = uses.length === 0 ? 'No line reads it.' : `Read by ${uses.map((use) => use.description).join('; ')}.`;
  return `${axes}${scale}, ${String(section.points.length)} points. ${read}`;
}
