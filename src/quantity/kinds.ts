/** What a line is a quantity of, and on which side of the receiver's comparison it stands. */

/** The quantity kinds of the worksheet file, in the file's words. */
export const QUANTITY_KINDS = [
  'level',
  'gain',
  'loss',
  'noise figure',
  'signal ratio',
  'impairment ratio',
  'figure of merit',
  'temperature',
  'bandwidth',
  'plain',
] as const;

export type QuantityKind = (typeof QUANTITY_KINDS)[number];

/** *Wanted*, or *unwanted* (noise, interference, distortion). */
export const SIDES = ['wanted', 'unwanted'] as const;

export type Side = (typeof SIDES)[number];
