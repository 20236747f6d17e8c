// What the sensitivity of a line is shown as.
import { describe, expect, it } from 'vitest';

import {
  casesView,
  findSensitivity,
  sensitivityView,
  sensitivityWords,
  type SensitivityView,
  type CaseView,
} from '../../src/app/analysis-sensitivity';
import type { LineSpec } from './support';
import { evaluationOf, LINK } from './analysis-sheet';

// Free-space loss of 2 km at 900 MHz: 97.55 dB, of 3 km 101.08 dB.
const viewOf = (lineId: string, lines = LINK): SensitivityView => {
  const evaluation = evaluationOf(lines);
  return sensitivityView(evaluation, lineId, findSensitivity(evaluation, lineId, 'calm'));
};
const casesOf = (lineId: string, lines = LINK): readonly CaseView[] => {
  const evaluation = evaluationOf(lines);
  return casesView(
    evaluation.worksheet.cases.map((one) => ({ one, found: findSensitivity(evaluation, lineId, one.id) })),
  );
};
const view = viewOf('S');
const total = (key: string): string | undefined => view.totals.find((one) => one.key === key)?.figure;

describe('totals', () => {
  it('are each input at the limit that worsens or betters the line, with what is left to the requirement', () => {
    expect(total('nominal')).toBe('4.45 dB');
    // −1 −1.5 −20 lg 1.1, and +1 +0.5 −20 lg 0.9.
    expect(total('adverse')).toBe('1.12 dB');
    expect(total('favourable')).toBe('6.86 dB');
    expect(view.totals.map(({ margin }) => margin?.words)).toEqual([
      '1.45 dB to spare',
      '1.88 dB short',
      '3.86 dB to spare',
      '0.95 dB to spare',
      '1.93 dB short',
    ]);
    expect(view.totals.map(({ margin }) => margin?.met)).toEqual([true, false, true, true, false]);
  });

  it('have mean and deviation by root-sum-square', () => {
    // Uniform: variances 4/12 for P, 4/12 for L, (0.4 km)²/12 times (20/(2 ln 10) dB/km)² = 0.2515 for d; mean of L −0.5 dB.
    expect(total('mean')).toBe('3.95 dB');
    expect(view.deviation).toBe('0.96 dB');
    expect(view.totals.at(-1)).toMatchObject({ name: 'mean − 3σ', figure: '1.07 dB' });
  });

  it('count from the mean upwards where lower is better', () => {
    const lines: readonly LineSpec[] = [
      ['T', 'Noise temperature', '100 K', { quantity: 'temperature', tolerance: { above: '6 K' } }],
    ];
    const low = viewOf('T', lines);
    expect(low.totals.at(-1)).toMatchObject({ name: 'mean + 3σ', figure: '108.2 K' });
    expect(low.totals.at(0)).not.toHaveProperty('margin');
  });
});

describe('inputs', () => {
  it('come by effect, with tolerance, slope and share', () => {
    expect(view.inputs.map(({ symbol }) => symbol)).toEqual(['L', 'P', 'd']);
    expect(view.inputs[0]).toMatchObject({
      ...{
        tolerance: 'fav 0.5 dB adv 1.5 dB',
        slope: '−1 dB per dB',
        adverseText: '−1.50 dB',
        favourableText: '+0.50 dB',
      },
    });
    expect(view.inputs[2]).toMatchObject({ tolerance: '±10 %', slope: '−4.343 dB per km', remark: '' });
    expect(view.inputs.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
  });

  it('without tolerance have a slope alone', () => {
    expect(view.exact).toMatchObject([{ symbol: 'f', slope: '−0.009651 dB per MHz', adverseText: '' }]);
  });

  it('whose tolerance cannot be read are told', () => {
    expect(view.remarks).toEqual([
      'N is taken as exact: its deviation “3 %” is not in dB, as one of a line in dBm has to be.',
    ]);
  });

  it('are missing in words where nothing has a tolerance', () => {
    const bare = LINK.map(([symbol, label, entry, { tolerance, ...more } = {}]): LineSpec => [
      symbol,
      label,
      entry,
      more,
    ]);
    expect(viewOf('S', bare).remarks).toEqual([
      expect.stringMatching(/^Nothing that S rests on has a tolerance that counts\./),
    ]);
  });

  it('are told in a sentence', () => {
    expect(sensitivityWords(view)).toBe(
      'Largest swings: L (−1.50 dB adverse, +0.50 dB favourable), P (−1.00 dB adverse, +1.00 dB favourable) and d (−0.83 dB adverse, +0.92 dB favourable).',
    );
  });
});

describe('cases', () => {
  it('stand side by side, the worst marked', () => {
    expect(casesOf('S')).toMatchObject([
      { name: 'Calm', nominal: '4.45 dB', adverse: '1.12 dB', margin: '1.88 dB short', isWorst: false },
      { name: 'Storm', nominal: '0.92 dB', adverse: '−2.40 dB', margin: '5.40 dB short', isWorst: true },
    ]);
  });

  it('that are alike have no worst', () => {
    expect(casesOf('P').some(({ isWorst }) => isWorst)).toBe(false);
  });

  it('without figure say so', () => {
    const lines = LINK.map((one): LineSpec => (one[0] === 'f' ? ['f', 'Frequency', ''] : one));
    expect(viewOf('S', lines).none).toBe('S has no figure in this case, so there is nothing that could be off.');
    expect(casesOf('S', lines).map(({ nominal }) => nominal)).toEqual(['withheld', 'withheld']);
  });
});
