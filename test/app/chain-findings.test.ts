// The findings of a chain, and the edits that repair them: an entry in the place from which it counted.
import { describe, expect, it } from 'vitest';

import { findingsOfChain, repairInChain, withChainRepairs } from '../../src/app/chain-findings';
import { findChain } from '../../src/app/chain-view';
import { Evaluation, type LineFinding } from '../../src/engine';
import { applyAll, type Stage, type Worksheet } from '../../src/worksheet';
import { AMPLIFIER, chainSheet, FILTER, MIXER } from './chain-sheet';

const withAmplifier = (more: Partial<Stage>): Worksheet =>
  chainSheet({ stages: [FILTER, { ...AMPLIFIER, ...more }, MIXER] });

function found(worksheet: Worksheet): { evaluation: Evaluation; findings: readonly LineFinding[] } {
  const evaluation = new Evaluation(worksheet);
  return { evaluation, findings: findingsOfChain(evaluation, evaluation.sheetFindings(), 'rx') };
}

const repair = (entry: string) => ({ kind: 'entry', title: 'Write it so', entry }) as const;

describe('the findings of a chain', () => {
  it('are those on its stages and inputs, and not those on lines', () => {
    const worksheet = withAmplifier({ gain: '18 dBm' });
    const { evaluation, findings } = found({ ...worksheet, sections: [...worksheet.sections] });
    expect(findings.length).toBeGreaterThan(0);
    expect(findings.every(({ lineId }) => evaluation.originOf(lineId)?.sectionId === 'rx')).toBe(true);
    const [first] = findings;
    expect(evaluation.originOf(first?.lineId ?? '')).toMatchObject({ stageId: 's2', field: 'gain' });
    expect(findings.some(({ code }) => code === 'waiting')).toBe(false);
  });

  it('are none of a sound chain but notes', () => {
    expect(found(chainSheet()).findings.filter(({ severity }) => severity !== 'note')).toEqual([]);
  });

  it('offer repairs of entries alone', () => {
    const [finding] = found(withAmplifier({ gain: '18 dBm' })).findings;
    if (finding === undefined) throw new Error('there is a finding');
    const offered = { ...finding, repairs: [repair('18 dB'), { kind: 'unit', title: 'In dBm', unit: 'dBm' } as const] };
    expect(withChainRepairs(offered).repairs).toEqual([repair('18 dB')]);
    const sound = { ...finding, repairs: [] };
    expect(withChainRepairs(sound)).toBe(sound);
  });
});

describe('a repair', () => {
  it('replaces the stage’s own entry', () => {
    const worksheet = withAmplifier({ gain: '18 dBm', byCase: {} });
    const { evaluation, findings } = found(worksheet);
    const edit = findings[0] && repairInChain(evaluation, findings[0], repair('18 dB'));
    const after = applyAll(worksheet, edit?.changes ?? []).worksheet;
    expect(findChain(after, 'rx')?.stages[1]?.gain).toBe('18 dB');
    expect(edit?.label).toBe('Write it so');
  });

  it('replaces the case’s own entry where that counted', () => {
    const worksheet = withAmplifier({ byCase: { storm: { gain: '16 dBm' } } });
    const { evaluation, findings } = found(worksheet);
    const edit = findings[0] && repairInChain(evaluation, findings[0], repair('16 dB'));
    const stage = findChain(applyAll(worksheet, edit?.changes ?? []).worksheet, 'rx')?.stages[1];
    expect(stage?.gain).toBe('18 dB');
    expect(stage?.byCase).toEqual({ storm: { gain: '16 dB' } });
  });

  it('replaces an input of the chain', () => {
    const worksheet = chainSheet({ signal: 'S + S' });
    const { evaluation, findings } = found(worksheet);
    const edit = findings[0] && repairInChain(evaluation, findings[0], repair('powersum(S, S)'));
    expect(findChain(applyAll(worksheet, edit?.changes ?? []).worksheet, 'rx')?.signal).toBe('powersum(S, S)');
  });

  it('of a unit is none', () => {
    const { evaluation, findings } = found(withAmplifier({ gain: '18 dBm' }));
    const inUnit = { kind: 'unit', title: 'In dBm', unit: 'dBm' } as const;
    expect(findings[0] && repairInChain(evaluation, findings[0], inUnit)).toBeUndefined();
  });
});
