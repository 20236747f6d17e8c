/**
 * The heading above pasted points: labels and units of the two columns, in one row or with the units in a second.
 * `Angle (deg)`, `Angle [deg]`, `Angle / deg`, `Angle in deg` and `Angle, deg` are read; so is a unit alone.
 */
import { findUnit } from '../quantity';
import type { NumberedRow, Separator } from './point-rows';

/** What pasted text says of an axis. */
export interface PastedAxis {
  readonly label?: string;
  /** A word of a known unit. */
  readonly unit?: string;
}

export interface Heading {
  readonly x: PastedAxis;
  readonly y: PastedAxis;
  /** The rows that it was read from. */
  readonly rows: readonly number[];
  /** Words in brackets that are no units. */
  readonly unknownUnits: readonly string[];
  /** True when its words cannot be given to the columns. */
  readonly isUnclear: boolean;
}

/** The heading among the rows above the first point: the last of them, and the one before where that holds units alone. */
export function readHeading(
  above: readonly NumberedRow[],
  columns: readonly [number, number],
  separator: Separator,
): Heading | undefined {
  const last = above[above.length - 1];
  if (last === undefined) return undefined;
  const parts = partsOf(last, columns, separator);
  if (parts === undefined)
    // A remark need not be a heading; any other row is told of.
    return last.isRemark ? undefined : { x: {}, y: {}, rows: [last.row], unknownUnits: [], isUnclear: true };
  const [x, y] = parts.map(readHead) as [Head, Head];
  const before = above[above.length - 2];
  const isUnitRow = [x, y].every(({ label, unit }) => label === undefined && unit !== undefined);
  const labels = isUnitRow && before !== undefined ? partsOf(before, columns, separator) : undefined;
  const labelOf = ({ label }: Head, at: 0 | 1): { label?: string } => {
    const text = label ?? labels?.[at];
    return text === undefined || text === '' ? {} : { label: text };
  };
  const unitOf = ({ unit }: Head): { unit?: string } => (unit === undefined ? {} : { unit });
  return {
    x: { ...labelOf(x, 0), ...unitOf(x) },
    y: { ...labelOf(y, 1), ...unitOf(y) },
    rows: labels === undefined || before === undefined ? [last.row] : [before.row, last.row],
    unknownUnits: [x, y].flatMap(({ unknown }) => (unknown === undefined ? [] : [unknown])),
    isUnclear: false,
  };
}

/** The texts above the two columns. */
function partsOf(
  { cells }: NumberedRow,
  [x, y]: readonly [number, number],
  separator: Separator,
): readonly [string, string] | undefined {
  if (separator !== 'blanks') {
    const [first = '', second = ''] = [cells[x], cells[y]];
    return first === '' && second === '' ? undefined : [first, second];
  }
  const [one, two, ...more] = cells;
  if (one !== undefined && two !== undefined && more.length === 0) return [one, two];
  // Labels of several words are told apart by their brackets.
  const bracketed = [...cells.join(' ').matchAll(/\s*([^()[\]]+?)\s*(?:\[([^[\]]*)\]|\((\S*)\)(?=\s|$))/g)];
  const [first, second, third] = bracketed;
  const isWhole = bracketed.map(([whole]) => whole).join('').length === cells.join(' ').length;
  if (first === undefined || second === undefined || third !== undefined || !isWhole) return undefined;
  return [first[0].trim(), second[0].trim()];
}

interface Head {
  readonly label?: string | undefined;
  readonly unit?: string | undefined;
  readonly unknown?: string | undefined;
}

const FORMS: readonly RegExp[] = [
  /^(.*?)\s*\[([^[\]]+)\]$/,
  /^(.*?)\s*\((\S.*)\)$/,
  /^(.+?)\s+\/\s*(\S+)$/,
  /^(.+?)\/(\S+)$/,
  /^(.+?)\s+in\s+(\S+)$/,
  /^(.+?),\s*(\S+)$/,
];

function readHead(text: string): Head {
  const alone = findUnit(text);
  if (text !== '' && alone !== undefined) return { unit: alone.word };
  for (const form of FORMS) {
    const match = form.exec(text);
    const [label = '', word = ''] = match?.slice(1) ?? [];
    const unit = word === '' ? undefined : findUnit(word.trim());
    if (unit !== undefined) return { label: label === '' ? undefined : label, unit: unit.word };
  }
  const unknown = /[[(]([^()[\]]+)[)\]]$/.exec(text)?.[1];
  return { label: text === '' ? undefined : text, unknown };
}
