// Findings that cases share are shown once, with the cases and with whose figures they are.
import { describe, expect, it } from 'vitest';

import { joinFindings } from '../../src/app/joined-findings';
import { Evaluation } from '../../src/engine';
import { sheet } from './support';

const summed = sheet([
  ['N', 'Noise', '-110 dBm'],
  ['I', 'Interference', '-112 dBm', { byCase: { storm: '-105 dBm' } }],
  ['N_tot', 'Both', 'N + I'],
]);

describe('joined findings', () => {
  it('joins one mistake whose figures differ from case to case, and says whose figures are shown', () => {
    const findings = new Evaluation(summed).findings('N_tot');
    expect(findings).toHaveLength(2);
    const [only, ...others] = joinFindings(summed, findings);
    expect(others).toEqual([]);
    expect(only?.caseIds).toEqual(['calm', 'storm']);
    expect(only?.message).toBe(`${findings[0]?.message ?? ''} (The figures are those of Calm.)`);
  });

  it('keeps findings apart that are about different entries', () => {
    const worksheet = sheet([
      ['N', 'Noise', '-110 dBm'],
      ['I', 'Interference', '-112 dBm'],
      ['J', 'Other interference', '-115 dBm'],
      ['N_tot', 'Both', 'N + I', { byCase: { storm: 'N + J' } }],
    ]);
    const joined = joinFindings(worksheet, new Evaluation(worksheet).findings('N_tot'));
    expect(joined.map((one) => one.caseIds)).toEqual([['calm'], ['storm']]);
  });

  it('gives the same list back when there is nothing to join', () => {
    const findings = new Evaluation(summed).findings('N_tot').slice(0, 1);
    expect(joinFindings(summed, findings)).toBe(findings);
  });
});
