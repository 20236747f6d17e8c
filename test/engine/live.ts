/** A worksheet under evaluation that tests edit by symbol. */
import { Evaluation, type Figure, type Pass } from '../../src/engine';
import { applyAll, type Change, type Line, type Worksheet } from '../../src/worksheet';
import { sheetOf, valueOf } from './notation';

export class Live {
  worksheet: Worksheet;
  readonly evaluation: Evaluation;

  constructor(text: string, ...caseIds: readonly string[]) {
    this.worksheet = sheetOf(text, ...caseIds);
    this.evaluation = new Evaluation(this.worksheet);
  }

  /** The line with this symbol (or label), the first of several. */
  line(symbol: string): Line {
    const line = this.evaluation.lines().find((one) => one.symbol === symbol || one.label === symbol);
    if (line === undefined) throw new Error(`there is no line ${symbol}`);
    return line;
  }

  edit(...changes: readonly Change[]): Pass {
    this.worksheet = applyAll(this.worksheet, changes).worksheet;
    return this.evaluation.edit(this.worksheet, changes);
  }

  entry(symbol: string, entry: string): Pass {
    return this.edit({ kind: 'set-line', lineId: this.line(symbol).id, field: 'entry', value: entry });
  }

  /** Sets (or with undefined removes) a line's overrides. */
  overrides(symbol: string, byCase: Line['byCase']): Pass {
    return this.edit({ kind: 'set-line', lineId: this.line(symbol).id, field: 'byCase', value: byCase });
  }

  insert(text: string, index = 0): Pass {
    const added = sheetOf(text).sections.flatMap((section) => ('lines' in section ? section.lines : []));
    return this.edit(
      ...added.map((line, at): Change => ({
        kind: 'insert-line',
        sectionId: 's',
        index: index + at,
        line: { ...line, id: `new-${line.symbol}-${String(at)}` },
      })),
    );
  }

  remove(symbol: string): Pass {
    return this.edit({ kind: 'remove-line', lineId: this.line(symbol).id });
  }

  value(symbol: string, caseId = this.worksheet.cases[0]?.id): number | string {
    return valueOf(this.evaluation, symbol, caseId);
  }

  figure(symbol: string, caseId = this.worksheet.cases[0]?.id ?? ''): Figure {
    return this.evaluation.figure(this.line(symbol).id, caseId);
  }

  codes(symbol: string): readonly string[] {
    return this.evaluation.findings(this.line(symbol).id).map(({ code }) => code);
  }

  message(symbol: string): string {
    return this.evaluation.findings(this.line(symbol).id)[0]?.message ?? '';
  }

  /** The symbols of the lines that a pass changed, in the order of the worksheet. */
  changedIn({ changed }: Pass): readonly string[] {
    return this.evaluation.lines().flatMap(({ id, symbol }) => (changed.has(id) ? [symbol] : []));
  }
}
