/** What one edit did to the evaluation. */

export interface Pass {
  /** Lines whose figure, kind or findings may differ from before, by id. */
  readonly changed: ReadonlySet<string>;
  /** True when lines, sections, cases or the graph have changed, and not only figures. */
  readonly structure: boolean;
  /** How many nodes were computed; none is computed twice in a pass. */
  readonly computed: number;
}
