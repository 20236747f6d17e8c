/**
 * Figures in a pasted table: which cells hold one, and which of point and comma is its decimal sign.
 * Holds: where point or comma may mark thousands as well (`1,234`), the rest of the table decides; where nothing does, the
 * sign is taken for the decimal one. Whoever pastes is told of each figure that was read as thousands, and of each decimal
 * comma that nothing but this rule supports.
 */

/** The decimal sign of a table; `unclear` when no cell tells. */
export type DecimalSign = 'point' | 'comma' | 'unclear';

/** A figure as it stands in a cell, taken apart. */
export interface PastedFigure {
  /** `-`, or nothing. */
  readonly sign: string;
  /** Digits with point and comma as pasted; blanks and apostrophes that group digits are gone. */
  readonly digits: string;
  /** `e-3`, or nothing. */
  readonly exponent: string;
  /** What follows the figure: a word that may be a unit, or nothing. */
  readonly unit: string;
  /** Which sign must be the decimal one for this cell to be read, as far as the cell alone tells. */
  readonly decimal: DecimalSign | 'none';
}

const CELL = /^([+\-\u2212\u2013]?) ?(\d[\d.,'\u2019 ]*|[.,]\d+)(?:[eE]([+\-\u2212]?\d+))?(?: ?([\p{L}°%µΩ]\S*))?$/u;
const LONGEST_CELL = 64;
const GROUPED_BY_BLANKS = /^\d{1,3}(?:[ '\u2019]\d{3})+(?=$|[.,])/;

/** The cell with typographic blanks and minus signs made plain, without blanks round it. */
export function plainCell(cell: string): string {
  return cell.replace(/[\u00a0\u2007\u2009\u202f]/g, ' ').trim();
}

/** The figure in a cell that holds one and at most one word after it; undefined for any other cell. */
export function readPastedFigure(cell: string): PastedFigure | undefined {
  const plain = plainCell(cell);
  const match = plain.length > LONGEST_CELL ? null : CELL.exec(plain);
  if (match === null) return undefined;
  const [, sign = '', body = '', exponent, unit = ''] = match;
  const digits = ungrouped(body.trim());
  if (digits === undefined) return undefined;
  const decimal = decimalSignOf(digits);
  if (decimal === undefined) return undefined;
  return {
    sign: sign === '' || sign === '+' ? '' : '-',
    digits,
    exponent: exponent === undefined ? '' : `e${exponent.replace('\u2212', '-')}`,
    unit,
    decimal,
  };
}

/** The digits without the blanks or apostrophes that group them in threes; undefined when these stand elsewhere. */
function ungrouped(body: string): string | undefined {
  if (!/[ '\u2019]/.test(body)) return body;
  const grouped = GROUPED_BY_BLANKS.exec(body)?.[0];
  if (grouped === undefined) return undefined;
  const rest = body.slice(grouped.length);
  return /[ '\u2019]/.test(rest) ? undefined : grouped.replace(/[ '\u2019]/g, '') + rest;
}

/** What the digits alone tell about the decimal sign; undefined when they are no figure in any reading. */
function decimalSignOf(digits: string): PastedFigure['decimal'] | undefined {
  const [first, second] = [...new Set(digits.replace(/\d/g, ''))];
  if (first === undefined) return 'none';
  if (second !== undefined) return isReadableWith(digits, second) ? nameOf(second) : undefined;
  const other = first === '.' ? ',' : '.';
  const canBeDecimal = isReadableWith(digits, first);
  const canGroup = isReadableWith(digits, other);
  if (canBeDecimal && canGroup) return 'unclear';
  return canBeDecimal ? nameOf(first) : canGroup ? nameOf(other) : undefined;
}

const nameOf = (sign: string): 'point' | 'comma' => (sign === '.' ? 'point' : 'comma');

function isReadableWith(digits: string, decimal: string): boolean {
  return decimal === '.'
    ? /^(?:\d+|[1-9]\d{0,2}(?:,\d{3})+)?(?:\.\d*)?$/.test(digits)
    : /^(?:\d+|[1-9]\d{0,2}(?:\.\d{3})+)?(?:,\d*)?$/.test(digits);
}

/** The decimal sign that a table's figures agree on; `unclear` when none tells, or when they contradict each other. */
export function decimalSignIn(figures: readonly PastedFigure[]): DecimalSign {
  const signs = new Set(figures.map((figure) => figure.decimal));
  if (signs.has('point') === signs.has('comma')) return 'unclear';
  return signs.has('point') ? 'point' : 'comma';
}

/** The figure in the worksheet's writing, with a point; `isSure` is false where the person has to be told of the reading. */
export function writtenFigure(figure: PastedFigure, sign: DecimalSign): { text: string; isSure: boolean } {
  const hasComma = figure.digits.includes(',');
  const own = figure.decimal === 'unclear' || figure.decimal === 'none' ? sign : figure.decimal;
  const decimal = own === 'unclear' ? (hasComma ? 'comma' : 'point') : own;
  const isGrouped = hasComma === (decimal === 'point');
  const digits =
    decimal === 'comma' ? figure.digits.replaceAll('.', '').replace(',', '.') : figure.digits.replaceAll(',', '');
  const isSure = figure.decimal !== 'unclear' || !(isGrouped || (hasComma && own === 'unclear'));
  return { text: `${figure.sign}${digits}${figure.exponent}`, isSure };
}
