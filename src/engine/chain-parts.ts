/** What the values of a stage are called in symbols and in words, and what they are quantities of. */
import type { QuantityKind } from '../quantity';
import type { StageField } from '../worksheet';

export interface StagePart {
  /** Behind the stage's symbol: `rx.lna.nf`. */
  readonly part: string;
  readonly label: string;
  readonly unit: string;
  readonly quantity: QuantityKind;
}

export const STAGE_PARTS: Readonly<Record<StageField, StagePart>> = {
  gain: { part: 'gain', label: 'gain', unit: 'dB', quantity: 'gain' },
  noiseFigure: { part: 'nf', label: 'noise figure', unit: 'dB', quantity: 'noise figure' },
  outputIntercept: { part: 'oip3', label: 'third-order output intercept', unit: 'dBm', quantity: 'level' },
  inputIntercept: { part: 'iip3', label: 'third-order input intercept', unit: 'dBm', quantity: 'level' },
  outputIntercept2: { part: 'oip2', label: 'second-order output intercept', unit: 'dBm', quantity: 'level' },
  inputIntercept2: { part: 'iip2', label: 'second-order input intercept', unit: 'dBm', quantity: 'level' },
  outputCompression: { part: 'op1db', label: '1 dB output compression', unit: 'dBm', quantity: 'level' },
  inputCompression: { part: 'ip1db', label: '1 dB input compression', unit: 'dBm', quantity: 'level' },
  temperature: { part: 'temperature', label: 'physical temperature', unit: 'K', quantity: 'temperature' },
  noiseBandwidth: { part: 'bandwidth', label: 'noise bandwidth', unit: 'Hz', quantity: 'bandwidth' },
  selectivity: { part: 'selectivity', label: 'selectivity towards the interferer', unit: 'dB', quantity: 'loss' },
};
