/** What a level diagram says in words: names of levels, figures, a point and the whole of it for those who cannot see it. */
import { POINT_LEVELS, type LevelDiagram, type LevelPoint, type PointLevelName } from '../../review';
import { writeTick } from './ticks';

const LONG_WORDS: Readonly<Record<PointLevelName, string>> = {
  wanted: 'wanted',
  noise: 'noise',
  interferer: 'interferer',
  compression: '1 dB compression',
  intercept: 'third-order intercept',
};
const SHORT_WORDS: Readonly<Record<PointLevelName, string>> = {
  ...LONG_WORDS,
  compression: 'compression',
  intercept: 'intercept',
};

/** What a level is called on the drawing and in the table. */
export const levelWord = (diagram: LevelDiagram, name: PointLevelName, isShort = false): string =>
  name === 'wanted' && diagram.of === 'sum' ? 'level' : (isShort ? SHORT_WORDS : LONG_WORDS)[name];

/** A decibel figure, in the table and in descriptions. */
export const writeLevel = (value: number, decimals = 2): string => writeTick(value, decimals);

/** A step, with its sign. */
export const writeStep = (value: number, decimals: number): string =>
  `${value > 0 ? '+' : ''}${writeLevel(value, decimals)}`;

/** A point in words, all that is known of it. */
export function describePoint(diagram: LevelDiagram, point: LevelPoint): string {
  const unit = diagram.unit.word;
  const parts = POINT_LEVELS.flatMap((name) => {
    const level = point[name];
    return level === undefined ? [] : [`${levelWord(diagram, name)} ${writeLevel(level.value)} ${unit}`];
  });
  if (point.snrDb !== undefined) parts.push(`S/N ${writeLevel(point.snrDb)} dB`);
  if (point.stepDb !== undefined) parts.push(`step ${writeStep(point.stepDb, 2)} dB`);
  const name = point.label === '' ? point.name : `${point.name}, ${point.label}`;
  return `${name}${point.isBypassed ? ' (bypassed)' : ''}: ${parts.length === 0 ? 'no level' : parts.join(', ')}`;
}

/** The whole diagram in a sentence or two: its points, and each level from its first to its last. */
export function describeDiagram(diagram: LevelDiagram): string {
  const { points, unit } = diagram;
  const [first, last] = [points[0], points.at(-1)];
  const courses = POINT_LEVELS.flatMap((name) => {
    const known = points.flatMap((point) => point[name]?.value ?? []);
    const [from, to] = [known[0], known.at(-1)];
    if (from === undefined || to === undefined) return [];
    const range =
      name === 'compression' || name === 'intercept'
        ? `${writeLevel(Math.min(...known))} ${unit.word} at the lowest`
        : `${writeLevel(from)} to ${writeLevel(to)} ${unit.word}`;
    return [`${levelWord(diagram, name)} ${range}`];
  });
  return `${String(points.length)} points from ${first?.name ?? ''} to ${last?.name ?? ''}: ${courses.join('; ')}.`;
}
