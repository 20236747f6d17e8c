// A worksheet with one chain for the tests of its panel: a filter, an amplifier and a mixer, with lines around them.
import type { ChainSection, Stage, Worksheet } from '../../src/worksheet';

export const FILTER: Stage = { id: 's1', symbol: 'fil', label: 'Filter', gain: '-2 dB' };

export const AMPLIFIER: Stage = {
  ...{ id: 's2', symbol: 'lna', label: 'Amplifier', gain: '18 dB', noiseFigure: '1.5 dB' },
  ...{ outputIntercept: '30 dBm', byCase: { storm: { gain: '16 dB' } } },
};

export const MIXER: Stage = {
  ...{ id: 's3', symbol: 'mix', label: 'Mixer', gain: '-6 dB', noiseFigure: '7 dB', inputIntercept: '20 dBm' },
};

/** The worksheet with the chain given instead of the one of three stages. */
export function chainSheet(more: Partial<ChainSection> = {}): Worksheet {
  const line = (id: string, entry: string) => ({ id, symbol: id, label: `Line ${id}`, entry });
  return {
    id: '9f1c7d6e-3b52-4a8e-8c1d-0a4b6e2f7d15',
    title: 'Chain sheet',
    cases: [
      { id: 'calm', name: 'Calm' },
      { id: 'storm', name: 'Storm' },
    ],
    sections: [
      { id: 'before', kind: 'lines', title: 'Before', lines: [line('S', '-90 dBm'), line('B', '12.5 kHz')] },
      {
        ...{ id: 'rx', kind: 'chain', symbol: 'rx', title: 'Receiver', signal: 'S', bandwidth: 'B' },
        stages: [FILTER, AMPLIFIER, MIXER],
        ...more,
      },
      { id: 'after', kind: 'lines', title: 'After', lines: [line('SNR', 'rx.snr'), line('G', 'rx.gain + rx.gain')] },
    ],
  };
}
