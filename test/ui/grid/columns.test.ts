// Which columns there are in which width, and which cells rows have.
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../../src/engine';
import {
  caseColumn,
  caseOfColumn,
  cellNearest,
  cellsOf,
  columnName,
  columnsOf,
  gridTemplate,
  leastTotal,
  type ColumnsInput,
} from '../../../src/ui/grid/columns';
import { rowsOf } from '../../../src/ui/grid/rows';
import { sheet } from '../../app/support';

const worksheet = sheet([['P', 'Power', '14 dBm']]);
const input: ColumnsInput = {
  worksheet,
  choices: { requirement: 'shown', tolerance: 'auto', source: 'auto', note: 'auto' },
  width: 930,
  narrow: false,
  caseId: 'storm',
};
const base = ['margin', 'symbol', 'label', 'entry', 'case calm', 'case storm'];

describe('columns', () => {
  it.each([
    [{}, [...base, 'requirement']],
    [{ width: 1300 }, [...base, 'requirement', 'source', 'note']],
    [{ width: 1500 }, [...base, 'requirement', 'tolerance', 'source', 'note']],
    [{ choices: { requirement: 'hidden', tolerance: 'hidden', source: 'shown', note: 'hidden' } }, [...base, 'source']],
    [
      { choices: { requirement: 'hidden', tolerance: 'shown', source: 'hidden', note: 'hidden' } },
      [...base, 'tolerance'],
    ],
    [{ narrow: true, width: 390 }, ['margin', 'symbol', 'label', 'case storm', 'entry', 'requirement']],
  ] as const)('%o', (more, columns) => {
    expect(columnsOf({ ...input, ...more })).toEqual(columns);
  });

  it('fit their width where there is room', () => {
    const columns = columnsOf(input);
    expect(leastTotal(columns, 930)).toBeLessThanOrEqual(930);
    expect(gridTemplate(columns, 930).match(/px/g)).toHaveLength(columns.length);
  });

  it('are narrower where there are more cases', () => {
    const cases = ['calm', 'storm', 'night'].map((id) => ({ id, name: id }));
    const columns = columnsOf({ ...input, worksheet: { ...worksheet, cases } });
    expect(columns).toHaveLength(8);
    expect(leastTotal(columns, 930)).toBeLessThanOrEqual(930);
    expect(leastTotal(columns, 1500)).toBeGreaterThan(930);
  });

  it('are named after their cases', () => {
    expect(caseOfColumn(caseColumn('a b'))).toBe('a b');
    expect([columnName('case storm', worksheet), columnName('entry', worksheet)]).toEqual(['Storm', 'Entry']);
  });
});

describe('cells', () => {
  const rows = rowsOf({
    worksheet,
    evaluation: new Evaluation(worksheet),
    findings: [
      {
        code: 'loss-added',
        severity: 'note',
        title: '',
        message: '',
        lineId: 'P',
        caseIds: ['calm'],
        repairs: [
          { kind: 'entry', title: 'a', entry: 'a' },
          { kind: 'unit', title: 'b', unit: 'dB' },
        ],
      },
    ],
    collapsed: new Set(),
    folding: new Map([['P', true]]),
  });
  const columns = columnsOf(input);
  const ofKind = (kind: string) => rows.find((row) => row.kind === kind);

  it.each([
    ['section', ['margin', 'title']],
    ['finding', ['finding', 'repair 0', 'repair 1', 'accept']],
    ['add', ['symbol', 'label', 'entry']],
    ['new-section', ['title', 'new chain', 'new pool', 'new curve']],
  ] as const)('of a %s row', (kind, cells) => {
    const row = ofKind(kind);
    expect(row && cellsOf(row, columns)).toEqual(cells);
  });

  it.each([
    ['add', 'label', 'label'],
    ['add', 'requirement', 'entry'],
    ['add', 'margin', 'symbol'],
    ['section', 'entry', 'title'],
    ['finding', 'entry', 'finding'],
    ['line', 'title', 'symbol'],
    ['line', 'case storm', 'case storm'],
  ] as const)('in a %s row nearest to %s: %s', (kind, wanted, cell) => {
    const row = ofKind(kind);
    expect(row && cellNearest(row, columns, wanted)).toBe(cell);
  });
});
