/** The rows of sections that are not lists of lines: what they say, and which of them tells a finding. */
import { describe, expect, it } from 'vitest';

import { itemRows, poolRule, rowOfItem, stageSummary } from '../../src/app/item-rows';
import { Evaluation } from '../../src/engine';
import type { Section, Worksheet } from '../../src/worksheet';

const sheetOf = (...sections: readonly Section[]): Worksheet => ({
  id: 'w',
  title: '',
  cases: [{ id: 'n', name: 'N' }],
  sections,
});

const pool = (entries: readonly string[], quantity?: 'signal ratio'): Section => ({
  id: 'p',
  kind: 'pool',
  symbol: 'tot',
  title: 'Pool',
  lines: entries.map((entry, i) => ({
    id: `l${String(i)}`,
    symbol: `a_${String(i)}`,
    label: '',
    entry,
    ...(quantity === undefined ? {} : { quantity }),
  })),
});

describe('a pool', () => {
  it.each([
    [['-100 dBm', '-97 dBm'], undefined, 'adds as power'],
    [['40 K', '60 K'], undefined, 'adds up'],
    [['20 dB', '17 dB'], 'signal ratio', 'adds by reciprocals'],
  ] as const)('of %j says how it adds', (entries, quantity, rule) => {
    const section = pool(entries, quantity);
    const evaluation = new Evaluation(sheetOf(section));
    expect(poolRule(evaluation, 'p')).toBe(rule);
    expect(itemRows(evaluation, section).map(({ symbol, summary }) => [symbol, summary])).toEqual([['tot', rule]]);
  });
});

describe('a chain', () => {
  const chain: Section = {
    id: 'rx',
    kind: 'chain',
    symbol: 'rx',
    title: 'Receiver',
    stages: [
      { id: 'a', symbol: 'pad', label: 'Pad', gain: '-3 dB', noiseFigure: '1 dB' },
      { id: 'b', symbol: 'amp', label: 'Amplifier', gain: '20 dB', noiseFigure: '2 dB', off: true },
    ],
  };
  const evaluation = new Evaluation(sheetOf(chain));
  const rows = itemRows(evaluation, chain);

  it('has a row for each stage, with what it says, and then its outputs', () => {
    expect(rows.slice(0, 2).map(({ symbol, summary, isOff }) => [symbol, summary, isOff])).toEqual([
      ['pad', '-3 dB, NF 1 dB', false],
      ['amp', '20 dB, NF 2 dB', true],
    ]);
    expect(rows.slice(2).map(({ symbol }) => symbol)).toContain('rx.nf');
    expect(stageSummary({ id: 'x', symbol: '', label: '', outputIntercept: '30 dBm', selectivity: '40 dB' })).toBe(
      'OIP3 30 dBm, selectivity 40 dB',
    );
  });

  it('tells a finding on a value of a stage in the row of that stage', () => {
    const finding = evaluation.sheetFindings().find(({ code }) => code === 'figure-below-loss');
    expect(rowOfItem(rows, evaluation, finding?.lineId ?? '')?.symbol).toBe('pad');
  });
});
