/** One thing to choose in a menu. */
export interface MenuItem {
  readonly label: string;
  /** The key that does the same, as shown. */
  readonly keys?: string | undefined;
  readonly run: () => void;
  readonly disabled?: boolean | undefined;
  /** For things that are on or off. */
  readonly checked?: boolean | undefined;
  /** Set apart from what stands above. */
  readonly apart?: boolean | undefined;
}
