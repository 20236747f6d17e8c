/** The axes of a plot as laid out: its field, and ticks and titles with their places. */
import type { Box } from './boxes';

/** Words in a drawing, with their place. */
export interface PlacedText {
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

export interface AxesLayout {
  readonly width: number;
  readonly height: number;
  readonly plot: Box;
  readonly xTicks: readonly { readonly x: number; readonly text: string }[];
  readonly yTicks: readonly { readonly y: number; readonly text: string }[];
  readonly xTitle: PlacedText;
  readonly yTitle: PlacedText;
}
