// The rows of the account, from worksheet and findings.
import { describe, expect, it } from 'vitest';

import { Evaluation, type LineFinding } from '../../../src/engine';
import { cellsOf } from '../../../src/ui/grid/columns';
import { rowsOf, type Row, type RowsInput } from '../../../src/ui/grid/rows';
import { sheetOf } from '../../app/support';

const worksheet = sheetOf([
  {
    title: 'Buoy',
    lines: [
      ['P', 'Power', '14 dBm'],
      ['L', 'Loss', '-1 dB'],
    ],
  },
  { title: 'Noise', lines: [['N', 'Noise', 'N + I']] },
]);

const finding = (lineId: string, more: Partial<LineFinding> = {}): LineFinding => ({
  code: 'levels-summed',
  severity: 'error',
  title: '',
  message: '',
  repairs: [],
  lineId,
  caseIds: ['calm'],
  ...more,
});

const rows = (more: Partial<RowsInput> = {}): Row[] =>
  rowsOf({
    worksheet,
    evaluation: new Evaluation(more.worksheet ?? worksheet),
    findings: [],
    collapsed: new Set(),
    folding: new Map(),
    ...more,
  });

const told = (list: readonly Row[]): string[] =>
  list.map((row) => (row.kind === 'line' ? `${String(row.number)} ${row.line.symbol}` : row.kind));

describe('rows', () => {
  it('are headings, numbered lines, places for lines, and the place for a section', () => {
    expect(told(rows())).toEqual(['section', '1 P', '2 L', 'add', 'section', '3 N', 'add', 'new-section']);
  });

  it('have errors and warnings open under their line, notes and accepted ones folded', () => {
    const findings = [
      finding('P', { severity: 'note', code: 'loss-added' }),
      finding('L', { severity: 'warning', code: 'kind-mismatch', accepted: 'as it is' }),
      finding('N'),
      finding('N', { severity: 'note', code: 'cancellation' }),
    ];
    expect(told(rows({ findings }))).toEqual([
      'section',
      '1 P',
      '2 L',
      'add',
      'section',
      '3 N',
      'finding',
      'finding',
      'add',
      'new-section',
    ]);
  });

  it('fold and open findings as a person has chosen', () => {
    const findings = [finding('P', { severity: 'note', code: 'loss-added' }), finding('N')];
    const folding = new Map([
      ['P', true],
      ['N', false],
    ]);
    expect(told(rows({ findings, folding }))).toEqual([
      'section',
      '1 P',
      'finding',
      '2 L',
      'add',
      'section',
      '3 N',
      'add',
      'new-section',
    ]);
  });

  it('say in the value cell alone that a line waits', () => {
    const list = rows({ findings: [finding('L', { code: 'waiting' })] });
    expect(told(list)).not.toContain('finding');
    expect(list.find((row) => row.kind === 'line' && row.line.id === 'L')).toMatchObject({ findings: [] });
  });

  it('count lines of folded sections on', () => {
    expect(told(rows({ collapsed: new Set(['s1']) }))).toEqual(['section', 'section', '3 N', 'add', 'new-section']);
  });

  it('show sections of other kinds by their title', () => {
    const other = { id: 'rx', kind: 'chain', title: 'Receiver', content: {} };
    const list = rows({ worksheet: { ...worksheet, sections: [other, ...worksheet.sections] } });
    expect(told(list).slice(0, 2)).toEqual(['other-section', 'section']);
  });

  it('have keys that are all different and stay the same when lines move', () => {
    const list = rows({ findings: [finding('N')] });
    const keys = list.map((row) => row.key);
    expect(new Set(keys).size).toBe(keys.length);
    const reversed = { ...worksheet, sections: [...worksheet.sections].reverse() };
    expect(
      rows({ worksheet: reversed, findings: [finding('N')] })
        .map((row) => row.key)
        .sort(),
    ).toEqual([...keys].sort());
  });

  it('of findings on figures that a chain works out say that no answer can be kept', () => {
    const stages = [{ id: 'a', symbol: 'amp', label: '', gain: '10 dB' }] as const;
    const chain = { id: 'c', kind: 'chain', symbol: 'rx', title: '', stages } as const;
    const chains = { ...worksheet, sections: [chain] };
    const evaluation = new Evaluation(chains);
    const gain = evaluation.lineOf('rx.gain')?.id ?? '';
    const findings = [finding(gain)];
    const row = rows({ worksheet: chains, evaluation, findings }).find(({ kind }) => kind === 'finding');
    expect(row).toMatchObject({ answerable: false });
    expect(row === undefined ? [] : cellsOf(row, [])).toEqual(['finding']);
  });
});
