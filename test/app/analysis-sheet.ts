// A link with tolerances, two cases and a requirement, for the tests of analyses on the page.
import { Evaluation } from '../../src/engine';
import type { Line, Worksheet } from '../../src/worksheet';
import { sheet, type LineSpec } from './support';

const around = (text: string, more: Partial<NonNullable<Line['tolerance']>> = {}): Partial<Line> => ({
  tolerance: { below: text, above: text, ...more },
});

export const LINK: readonly LineSpec[] = [
  ['P', 'Transmit power', '20 dBm', around('1 dB')],
  ['L', 'Feed loss', '3 dB', { tolerance: { favourable: '0.5 dB', adverse: '1.5 dB' } }],
  ['d', 'Distance', '2 km', { ...around('10 %'), byCase: { storm: '3 km' } }],
  ['f', 'Frequency', '900 MHz'],
  ['C', 'Received', 'P - L - free_space_loss(d, f)'],
  ['N', 'Noise', '-85 dBm', { ...around('3 %'), side: 'unwanted' }],
  ['S', 'Signal to noise', 'C - N', { requirement: { atLeast: '3 dB' } }],
];

export const worksheetOf = (lines: readonly LineSpec[] = LINK): Worksheet => sheet(lines);
export const evaluationOf = (lines: readonly LineSpec[] = LINK): Evaluation => new Evaluation(worksheetOf(lines));
