// A small worksheet for the tests of the panels: a level, a loss, a radiated power, a sum of levels made wrongly and rightly.
import { Evaluation } from '../../../src/engine';
import type { Line, Worksheet } from '../../../src/worksheet';

const line = (id: string, symbol: string, label: string, entry: string, more: Partial<Line> = {}): Line => ({
  ...{ id, symbol, label, entry },
  ...more,
});

/** Two cases, two sections of lines, one section of a kind that is not evaluated. */
export const SHEET: Worksheet = {
  id: 'sheet',
  title: 'Buoy',
  summary: 'Everything here is invented.',
  cases: [
    { id: 'calm', name: 'Calm' },
    { id: 'storm', name: 'Storm' },
  ],
  sections: [
    {
      ...{ id: 'tx', kind: 'lines', title: 'Transmitter' },
      lines: [
        line('p', 'P_tx', 'Transmit power', '14 dBm', { byCase: { storm: '13 dBm' }, source: 'Invented.' }),
        line('l', 'L_feed', 'Feeder', '2 dB', { source: 'Invented.', note: 'Two metres.' }),
        line('e', 'EIRP', 'Radiated', 'P_tx - L_feed + 3 dBi', { requirement: { atMost: '14.5 dBm' } }),
      ],
    },
    {
      ...{ id: 'rx', kind: 'lines', title: 'Receiver' },
      lines: [
        line('n', 'N', 'Noise', '-117 dBm', { side: 'unwanted' }),
        line('i', 'I', 'Interference', '-117 dBm', { side: 'unwanted' }),
        line('bad', 'N_bad', 'Sum of decibels', 'N + I'),
        line('good', 'N_tot', 'Sum of powers', 'powersum(N, I)'),
        line('w', 'SINR', 'Ratio', 'EIRP - 120 dB - N_bad', { requirement: { atLeast: '3 dB' } }),
        line('r1', 'SNR', 'Signal to noise', '20 dB', { quantity: 'signal ratio' }),
        line('r2', 'SIR', 'Signal to interference', '25 dB', { quantity: 'signal ratio' }),
        line('s', 'SUM', 'Ratios', 'SNR + SIR'),
      ],
    },
    { ...{ id: 'pool', kind: 'pool', title: 'Other harbours' }, content: {} },
  ] as Worksheet['sections'],
};

/** An evaluation of the sheet. */
export const evaluate = (): Evaluation => new Evaluation(SHEET);
