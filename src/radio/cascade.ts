/** Cascades of stages. */

/**
 * Noise figure of a cascade, dB: F = F₁ + (F₂ − 1)/G₁ + (F₃ − 1)/(G₁G₂) + …
 * Shape: noise figure and gain by turns, dB, beginning with a noise figure; a last gain may be left out and does not count.
 * Holds: an infinite first gain leaves the first noise figure. Source: Friis 1944.
 */
export function cascadeNoiseFigureDb(...figuresAndGainsDb: readonly number[]): number {
  let noiseFactor = 1;
  let gainAheadDb = 0;
  for (let i = 0; i < figuresAndGainsDb.length; i += 2) {
    noiseFactor += (10 ** ((figuresAndGainsDb[i] ?? 0) / 10) - 1) / 10 ** (gainAheadDb / 10);
    gainAheadDb += figuresAndGainsDb[i + 1] ?? 0;
  }
  return 10 * Math.log10(noiseFactor);
}
