// What the panel of a chain shows: columns by use, cells with what is typed and what is worked out, outputs with their users.
import { describe, expect, it } from 'vitest';

import { columnsOfChain, VALUE_COLUMNS } from '../../src/app/chain-columns';
import { cellsOfStage, findChain, inputsOfChain, outputsOfChain, type StageCell } from '../../src/app/chain-view';
import { Evaluation } from '../../src/engine';
import type { ChainSection, Worksheet } from '../../src/worksheet';
import { figureText } from '../../src/ui/parts/figure-parts';
import { chainSheet, FILTER } from './chain-sheet';

function opened(worksheet: Worksheet): { evaluation: Evaluation; chain: ChainSection } {
  const chain = findChain(worksheet, 'rx');
  if (chain === undefined) throw new Error('the chain is there');
  return { evaluation: new Evaluation(worksheet), chain };
}

const { evaluation, chain } = opened(chainSheet());

function cells(at: number, caseId = 'calm'): Map<string, StageCell> {
  const stage = chain.stages[at];
  if (stage === undefined) throw new Error('the stage is there');
  const columns = columnsOfChain(evaluation, chain, new Map(VALUE_COLUMNS.map(({ key }) => [key, true])));
  return new Map(cellsOfStage(evaluation, chain, stage, columns, caseId).map((cell) => [cell.column.key, cell]));
}

const text = (cell: StageCell | undefined): string => (cell === undefined ? 'no cell' : figureText(cell.figure));

describe('columns', () => {
  const keys = (worksheet: Worksheet, choices = new Map()): string[] => {
    const one = opened(worksheet);
    return columnsOfChain(one.evaluation, one.chain, choices).map(({ key }) => key);
  };

  it('are those that a stage uses, and what the chain can tell', () => {
    expect(keys(chainSheet())).toEqual([
      ...['gain', 'noiseFigure', 'inputIntercept', 'outputIntercept'],
      ...['out.gain', 'out.nf', 'out.te', 'out.signal', 'out.noise', 'out.snr', 'out.iip3'],
      ...['noise_share', 'distortion_share'],
    ]);
  });

  it('are gain and noise figure for a chain without stages', () => {
    expect(keys(chainSheet({ stages: [] }))).toEqual(['gain', 'noiseFigure']);
  });

  it('are used when one case alone uses them', () => {
    const stages = [{ ...FILTER, byCase: { storm: { selectivity: '40 dB' } } }];
    expect(keys(chainSheet({ stages }))).toContain('selectivity');
  });

  it('are shown and put away as a person chooses', () => {
    const chosen = keys(chainSheet(), new Map([['temperature', true] as const, ['out.te', false] as const]));
    expect(chosen).toContain('temperature');
    expect(chosen).not.toContain('out.te');
  });
});

describe('cells', () => {
  it('have what is typed', () => {
    expect(text(cells(1).get('gain'))).toBe('18.00 dB');
    expect(cells(1).get('gain')).toMatchObject({ entry: '18 dB', isWorkedOut: false });
    expect(cells(1).get('gain')?.override).toBeUndefined();
  });

  it('have the case’s own entry, told as such', () => {
    expect(text(cells(1, 'storm').get('gain'))).toBe('16.00 dB');
    expect(cells(1, 'storm').get('gain')).toMatchObject({ entry: '16 dB', override: '16 dB' });
  });

  it('have what is worked out where nothing is typed', () => {
    expect(text(cells(0).get('noiseFigure'))).toBe('2.00 dB');
    expect(cells(0).get('noiseFigure')).toMatchObject({ entry: '', isWorkedOut: true });
    expect(text(cells(1).get('inputIntercept'))).toBe('12.00 dBm');
    expect(cells(1).get('inputIntercept')?.isWorkedOut).toBe(true);
    expect(text(cells(2).get('outputIntercept'))).toBe('14.00 dBm');
  });

  it('are empty where there is nothing', () => {
    expect(cells(0).get('inputIntercept')).toMatchObject({ figure: { state: 'empty' }, isWorkedOut: false });
    expect(cells(0).get('temperature')).toMatchObject({ figure: { state: 'empty' }, isWorkedOut: false });
  });

  it('have the running figures in the case', () => {
    expect(text(cells(2).get('out.gain'))).toBe('10.00 dB');
    expect(text(cells(2, 'storm').get('out.gain'))).toBe('8.00 dB');
    expect(text(cells(1).get('out.signal'))).toBe('−74.00 dBm');
    const shares = [0, 1, 2].map((at) => cells(at).get('noise_share')?.figure);
    expect(shares.every((figure) => figure?.state === 'value' && figure.value > 0 && figure.value < 100)).toBe(true);
  });
});

describe('inputs', () => {
  it('have entries with figures, and what counts where nothing is said', () => {
    const inputs = inputsOfChain(evaluation, chain, 'calm');
    expect(inputs.map(({ input, entry, figure }) => [input, entry, figureText(figure)])).toEqual([
      ['signal', 'S', '−90.00 dBm'],
      ['noise', '', ''],
      ['bandwidth', 'B', '12.5 kHz'],
      ['interferer', '', ''],
    ]);
    expect(inputs[1]?.otherwise).toMatch(/290 K where nothing is said/);
  });
});

describe('outputs', () => {
  const groups = outputsOfChain(evaluation, chain, 'calm');

  it('come in groups, those that there are', () => {
    expect(groups.map(({ title, outputs }) => [title, outputs.map(({ symbol }) => symbol.slice(3)).join(' ')])).toEqual(
      [
        ['Gain and noise', 'gain nf te tsys source_share'],
        ['Linearity', 'iip3 oip3 sfdr'],
        ['Levels', 'in.signal in.noise in.snr signal noise snr mds'],
        ['Interferers', 'im3'],
      ],
    );
  });

  it('say who uses them, and not how the chain itself does', () => {
    const users = new Map(
      groups.flatMap(({ outputs }) =>
        outputs.map(({ symbol, users: all }) => [symbol, all.map((user) => user.symbol)]),
      ),
    );
    expect(users.get('rx.snr')).toEqual(['SNR']);
    expect(users.get('rx.gain')).toEqual(['G']);
    expect(users.get('rx.signal')).toEqual([]);
    expect(users.get('rx.te')).toEqual([]);
  });

  it('name the section of a user that is no line', () => {
    const worksheet = chainSheet();
    const second: ChainSection = { id: 'if', kind: 'chain', symbol: 'if', title: '', signal: 'rx.signal', stages: [] };
    const one = opened({ ...worksheet, sections: [...worksheet.sections, second] });
    const output = outputsOfChain(one.evaluation, one.chain, 'calm')
      .flatMap(({ outputs }) => outputs)
      .find(({ symbol }) => symbol === 'rx.signal');
    expect(output?.users).toMatchObject([{ sectionId: 'if' }]);
  });

  it('are none for a chain without stages', () => {
    const one = opened(chainSheet({ stages: [] }));
    expect(outputsOfChain(one.evaluation, one.chain, 'calm')).toEqual([]);
  });
});
