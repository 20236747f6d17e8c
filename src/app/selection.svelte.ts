/**
 * What is selected: a line (and a range of lines up to it), and a case.
 * Holds: the selected case is one of the worksheet's; a range is told by its two ends, so that it survives moves.
 */

/** The selection of the page. */
export class Selection {
  /** The line that the cursor is on, or null. */
  lineId = $state<string | null>(null);
  /** The other end of a range of lines, or null when one line alone is selected. */
  anchorId = $state<string | null>(null);
  /** The section whose heading has the cursor, or null. */
  sectionId = $state<string | null>(null);
  /** The case whose figures the working shows. */
  caseId = $state('');

  /** Selects one line alone. */
  put(lineId: string | null, caseId?: string): void {
    this.lineId = lineId;
    this.anchorId = null;
    if (caseId !== undefined) this.caseId = caseId;
  }

  /** Extends the range to a line; the line selected so far becomes its other end. */
  extendTo(lineId: string): void {
    this.anchorId ??= this.lineId;
    this.lineId = lineId;
    if (this.anchorId === lineId) this.anchorId = null;
  }

  /** The selected lines among `order` (all line ids from top to bottom), in that order. */
  within(order: readonly string[]): readonly string[] {
    if (this.lineId === null) return [];
    if (this.anchorId === null) return [this.lineId];
    const at = order.indexOf(this.lineId);
    const other = order.indexOf(this.anchorId);
    if (at < 0) return [];
    if (other < 0) return [this.lineId];
    return order.slice(Math.min(at, other), Math.max(at, other) + 1);
  }
}
