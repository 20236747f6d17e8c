/** Chains of any length as diagrams, for the tests of plots. */
import { Evaluation } from '../../../src/engine';
import { levelDiagramOfChain, type LevelDiagram } from '../../../src/review';
import type { ChainSection, Stage } from '../../../src/worksheet';

const KINDS = [
  { symbol: 'bpf', label: 'Band filter', gain: '-1.5 dB' },
  { symbol: 'lna', label: 'Low-noise amplifier', gain: '18 dB', noiseFigure: '1.2 dB', outputIntercept: '28 dBm' },
  { symbol: 'mixer', label: 'Mixer', gain: '-7 dB', outputIntercept: '15 dBm', inputCompression: '3 dBm' },
  { symbol: 'if_amp', label: 'Amplifier', gain: '9 dB', noiseFigure: '4 dB', outputCompression: '12 dBm' },
  { symbol: 'image_filter', label: 'Filter', gain: '-3.2 dB', selectivity: '40 dB' },
] as const;

export function chainOf(count: number, more: Partial<ChainSection> = {}): ChainSection {
  const stages = Array.from({ length: count }, (_, i): Stage => {
    const kind = KINDS[i % KINDS.length] ?? KINDS[0];
    return { ...kind, id: `s${String(i)}`, symbol: `${kind.symbol}${i < KINDS.length ? '' : String(i)}` };
  });
  return {
    ...{ id: 'rx', kind: 'chain', symbol: 'rx', title: 'Receiver', signal: '-85 dBm', bandwidth: '200 kHz' },
    ...{ interferer: '-45 dBm', stages, ...more },
  };
}

export function diagramOf(chain: ChainSection): LevelDiagram {
  const evaluation = new Evaluation({
    ...{ id: 'w', title: 'w', cases: [{ id: 'only', name: 'Only' }], sections: [chain] },
  });
  const diagram = levelDiagramOfChain(evaluation, chain.id, 'only');
  if (diagram === undefined) throw new Error('the chain has no diagram');
  return diagram;
}
