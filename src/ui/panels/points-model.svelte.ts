/**
 * The table of a curve's points while somebody works in it: where the cursor is, what is being typed, and the half of a new
 * point that is already there.
 * Holds: a text that is no number stays in its cell with the reason, and the points as they were; the last row is always one
 * that adds a point.
 */
import { readPointFigure } from '../../exchange';
import type { CurvePoint, CurveSection } from '../../worksheet';

export type PointColumn = 0 | 1;

export interface PointCell {
  readonly row: number;
  readonly column: PointColumn;
}

/** Where the cursor goes from a cell. */
export type PointMove = 'up' | 'down' | 'left' | 'right' | 'next' | 'before' | 'first' | 'last' | 'stay';

export interface PointsHost {
  readonly curve: () => CurveSection;
  readonly readOnly: () => boolean;
  /** Performs the edit; false when nothing can be changed now. */
  readonly keep: (points: readonly CurvePoint[]) => boolean;
  readonly say: (sentence: string) => void;
}

export class PointsModel {
  cursor = $state.raw<PointCell>({ row: 0, column: 0 });
  /** The text being typed; null while the cursor only stands. */
  typed = $state<string | null>(null);
  /** Why the text cannot be kept. */
  trouble = $state<string | undefined>();
  /** The figures of the point being added. */
  draft = $state.raw<readonly [number | undefined, number | undefined]>([undefined, undefined]);
  readonly #host: PointsHost;

  constructor(host: PointsHost) {
    this.#host = host;
  }

  get points(): readonly CurvePoint[] {
    return this.#host.curve().points;
  }

  /** Rows of the table, the one that adds a point among them. */
  get rowCount(): number {
    return this.points.length + 1;
  }

  /** The cursor, within the rows that are there now. */
  get at(): PointCell {
    return { ...this.cursor, row: Math.min(this.cursor.row, this.rowCount - 1) };
  }

  get isOnNew(): boolean {
    return this.at.row === this.points.length;
  }

  /** What stands in a cell; undefined while nothing does. */
  figureAt({ row, column }: PointCell): number | undefined {
    return row < this.points.length ? this.points[row]?.[column] : this.draft[column];
  }

  put(cell: PointCell): void {
    this.cursor = cell;
  }

  /** Begins to type in the cell of the cursor: over what stands there, or from it. */
  edit(over: boolean): void {
    if (this.#host.readOnly()) return;
    const figure = this.figureAt(this.at);
    this.typed = over || figure === undefined ? '' : String(figure);
    this.trouble = undefined;
  }

  cancel(): void {
    this.typed = null;
    this.trouble = undefined;
  }

  /** Types a text into the cell of the cursor and keeps it; false when it cannot be kept. */
  type(text: string): boolean {
    this.edit(true);
    if (this.typed === null) return false;
    this.typed = text;
    return this.keep();
  }

  get isTyping(): boolean {
    return this.typed !== null;
  }

  get isReadOnly(): boolean {
    return this.#host.readOnly();
  }

  /** Keeps what was typed, and moves. False when it cannot be kept: the text stays. */
  keep(move: PointMove = 'stay'): boolean {
    const text = this.typed;
    const wasOnNew = this.isOnNew;
    if (text !== null && !this.#keepText(text, this.at)) return false;
    this.cancel();
    const goesOn = move === 'down' || move === 'next';
    const missing = this.draft.findIndex((figure) => figure === undefined);
    // A new point is typed across: to the figure that is missing, then to the next new one.
    if (text === null || !wasOnNew || !goesOn) this.move(move);
    else if (this.draft[0] !== undefined || this.draft[1] !== undefined)
      this.put({ row: this.rowCount - 1, column: missing === 1 ? 1 : 0 });
    else this.move('last');
    return true;
  }

  #keepText(text: string, cell: PointCell): boolean {
    const isNew = cell.row === this.points.length;
    if (text.trim() === '') {
      if (isNew) {
        this.draft = cell.column === 0 ? [undefined, this.draft[1]] : [this.draft[0], undefined];
        return true;
      }
      this.trouble = 'A point needs both figures. Escape brings the figure back; Delete takes the whole point away.';
      return false;
    }
    const { x, y } = this.#host.curve();
    const read = readPointFigure(text, (cell.column === 0 ? x : y).unit);
    if (!read.ok) {
      this.trouble = read.fault;
      return false;
    }
    return isNew ? this.#keepNew(cell.column, read.value) : this.#keepOld(cell, read.value);
  }

  #keepOld({ row, column }: PointCell, figure: number): boolean {
    const before = this.points[row];
    if (before === undefined || before[column] === figure) return true;
    const after: CurvePoint = column === 0 ? [figure, before[1]] : [before[0], figure];
    return this.#host.keep(this.points.map((point, i) => (i === row ? after : point)));
  }

  #keepNew(column: PointColumn, figure: number): boolean {
    const [x, y] = column === 0 ? [figure, this.draft[1]] : [this.draft[0], figure];
    if (x === undefined || y === undefined) {
      this.draft = [x, y];
      return true;
    }
    if (!this.#host.keep([...this.points, [x, y]])) return false;
    this.draft = [undefined, undefined];
    return true;
  }

  /** Takes the point of the cursor away; on the last row, what was typed of a new one. */
  remove(): void {
    const { row } = this.at;
    if (this.#host.readOnly()) return;
    if (row === this.points.length) {
      this.draft = [undefined, undefined];
      return;
    }
    if (this.#host.keep(this.points.filter((_, i) => i !== row))) this.#host.say('The point was deleted.');
  }

  /** Moves by so many rows. */
  page(rows: number): void {
    const { row, column } = this.at;
    this.cursor = { row: Math.max(0, Math.min(this.rowCount - 1, row + rows)), column };
  }

  move(move: PointMove): void {
    this.cursor = this.#from(this.at, move);
  }

  #from({ row, column }: PointCell, move: PointMove): PointCell {
    const last = this.rowCount - 1;
    switch (move) {
      case 'up':
        return { row: Math.max(0, row - 1), column };
      case 'down':
        return { row: Math.min(last, row + 1), column };
      case 'left':
        return { row, column: 0 };
      case 'right':
        return { row, column: 1 };
      case 'next':
        return column === 0 ? { row, column: 1 } : row < last ? { row: row + 1, column: 0 } : { row, column };
      case 'before':
        return column === 1 ? { row, column: 0 } : row > 0 ? { row: row - 1, column: 1 } : { row, column };
      case 'first':
        return { row: 0, column: 0 };
      case 'last':
        return { row: last, column: 0 };
      case 'stay':
        return { row, column };
    }
  }
}
