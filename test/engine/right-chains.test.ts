/**
 * Right budgets with chains, pools and curves (test/golden/chains/right): stages whose values are expressions over lines, pools of
 * every sort, curves inside stages. None may draw a warning or an error, and every line has a figure.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { readWorksheetFile } from '../../src/exchange';
import { isChainSection, isCurveSection, isPoolSection, type Worksheet } from '../../src/worksheet';
import { valueOf } from './notation';

const folder = new URL('../golden/chains/right/', import.meta.url);
const names = readdirSync(folder).sort();

function opened(name: string): Worksheet {
  const read = readWorksheetFile(readFileSync(new URL(name, folder), 'utf8'));
  if (!read.ok) throw new Error(read.fault.sentence);
  expect(read.value.messages).toEqual([]);
  return read.value.worksheet;
}

/** Lines that say the same in two ways. */
const SAME: Readonly<Record<string, readonly (readonly [string, string])[]>> = {
  'receiver-of-lines': [
    ['GT', 'GT_2'],
    ['M', 'M_2'],
    ['SINAD', 'SINAD_2'],
    ['SNR_in', 'rx.snr'],
    ['N_in', 'rx.mds'],
    ['P_out', 'rx.signal'],
    ['IM3_out', 'IM3_before'],
    ['T_rx', 'T_rx_2'],
  ],
  'pools-of-all-sorts': [
    ['CI', 'SINR_2'],
    ['N_I', 'N_I_2'],
    ['T_s', 'T_s_2'],
    ['CI', 'CI_2'],
    ['N_0t', 'N_0t_2'],
  ],
  'curves-in-a-chain': [['CN', 'CN_2']],
};

describe('right budgets with chains, pools and curves', () => {
  it('have chains, pools and curves among them', () => {
    const sections = names.flatMap((name) => opened(name).sections);
    expect(sections.filter(isChainSection).length).toBeGreaterThanOrEqual(2);
    expect(sections.filter(isPoolSection).length).toBeGreaterThanOrEqual(5);
    expect(sections.filter(isCurveSection).length).toBeGreaterThanOrEqual(5);
  });

  it.each(names)('%s draws no warning and no error, and every line has a figure', (name) => {
    const worksheet = opened(name);
    const evaluation = new Evaluation(worksheet);
    const alarms = evaluation.sheetFindings().filter(({ severity }) => severity !== 'note');
    expect(alarms.map(({ code, message }) => `${code}: ${message}`)).toEqual([]);
    const without = evaluation
      .lines()
      .flatMap(({ id, symbol }) =>
        worksheet.cases.filter((one) => evaluation.figure(id, one.id).state !== 'value').map((one) => [symbol, one.id]),
      );
    expect(without).toEqual([]);
  });

  it.each(Object.entries(SAME))('%s says the same in two ways', (name, pairs) => {
    const worksheet = opened(`${name}.budget.json`);
    const evaluation = new Evaluation(worksheet);
    const apart = worksheet.cases.flatMap((one) =>
      pairs.flatMap(([a, b]) => {
        const [left, right] = [valueOf(evaluation, a, one.id), valueOf(evaluation, b, one.id)];
        const isSame = typeof left === 'number' && typeof right === 'number' && Math.abs(left - right) < 1e-9;
        return isSame ? [] : [{ a, left, b, right, case: one.id }];
      }),
    );
    expect(apart).toEqual([]);
  });
});
