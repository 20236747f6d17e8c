// How far a stage's values may be off: setting, changing and taking away.
import { describe, expect, it } from 'vitest';

import {
  applyAll,
  isChainSection,
  setStageTolerance,
  type Stage,
  type Tolerance,
  type Worksheet,
} from '../../src/worksheet';

const worksheet: Worksheet = {
  id: '0b7c1a52-6a0e-4f39-9f57-6c5e8a1d2f33',
  title: 'Tolerances',
  cases: [{ id: 'calm', name: 'Calm' }],
  sections: [
    {
      ...{ id: 'rx', kind: 'chain', symbol: 'rx', title: '' },
      stages: [
        { id: 'a', symbol: 'lna', label: '', gain: '15 dB', noiseFigure: '1 dB' },
        { id: 'b', symbol: 'mix', label: '' },
      ],
    },
  ],
};

const stagesOf = ({ sections }: Worksheet): readonly Stage[] =>
  sections.filter(isChainSection).flatMap((one) => one.stages);
const after = (before: Worksheet, field: 'gain' | 'noiseFigure', tolerance: Tolerance | undefined): Worksheet =>
  applyAll(before, setStageTolerance(before, 'rx', 'a', field, tolerance).changes).worksheet;

describe('the tolerance of a stage’s value', () => {
  const half: Tolerance = { below: '0.5 dB', above: '0.5 dB' };

  it('is set for that value alone, and leaves other stages the same objects', () => {
    const one = after(worksheet, 'gain', half);
    expect(stagesOf(one)[0]).toEqual({ ...stagesOf(worksheet)[0], tolerance: { gain: half } });
    expect(stagesOf(one)[1]).toBe(stagesOf(worksheet)[1]);
    const two = after(one, 'noiseFigure', { adverse: '0.2 dB' });
    expect(stagesOf(two)[0]?.tolerance).toEqual({ gain: half, noiseFigure: { adverse: '0.2 dB' } });
  });

  it('is taken away without a trace', () => {
    expect(after(after(worksheet, 'gain', half), 'gain', undefined)).toEqual(worksheet);
  });

  it('that is there already is no edit', () => {
    expect(setStageTolerance(after(worksheet, 'gain', half), 'rx', 'a', 'gain', half).changes).toEqual([]);
    expect(setStageTolerance(worksheet, 'rx', 'a', 'gain', undefined).changes).toEqual([]);
  });

  it('is an edit in the name of the stage', () => {
    expect(setStageTolerance(worksheet, 'rx', 'a', 'gain', half).label).toBe('Change a tolerance of lna');
  });
});
