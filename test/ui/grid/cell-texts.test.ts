// What typing in a cell does to the worksheet, and what is refused with a reason.
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../../src/engine';
import { caseTyped, clearingEdit, editOf, isEditable, refusal, textIn } from '../../../src/ui/grid/cell-texts';
import type { CellName } from '../../../src/ui/grid/columns';
import { rowsOf, type Row } from '../../../src/ui/grid/rows';
import { applyAll, locateLine, type Edit, type Worksheet } from '../../../src/worksheet';
import { sheet } from '../../app/support';

const worksheet = sheet([
  ['P_tx', 'Transmit power', '14 dBm', { byCase: { storm: '13 dBm' }, requirement: { atMost: '16 dBm' } }],
  ['EIRP', 'Radiated power', 'P_tx + 2 dB'],
]);

const rowOf = (kind: Row['kind'], of: Worksheet = worksheet): Row => {
  const found = rowsOf({
    worksheet: of,
    evaluation: new Evaluation(of),
    findings: [],
    collapsed: new Set(),
    folding: new Map(),
  }).find((row) => row.kind === kind);
  if (found === undefined) throw new Error(kind);
  return found;
};
const line = rowOf('line');
const after = (edit: Edit, of: Worksheet = worksheet): Worksheet => applyAll(of, edit.changes).worksheet;

function typed(row: Row, cell: CellName, text: string): Worksheet {
  const edit = editOf(worksheet, row, cell, text);
  if (!edit.ok) throw new Error(edit.fault);
  return after(edit.value);
}

describe('the text with which an editor opens', () => {
  it.each([
    ['symbol', 'P_tx'],
    ['label', 'Transmit power'],
    ['entry', '14 dBm'],
    ['case calm', '14 dBm'],
    ['case storm', '13 dBm'],
    ['requirement', '≤ 16 dBm'],
    ['note', ''],
  ] as const)('in %s', (cell, text) => {
    expect(textIn(worksheet, line, cell)).toBe(text);
  });

  it('is the title of a section, and nothing for what is not there yet', () => {
    expect(textIn(worksheet, rowOf('section'), 'title')).toBe('Part');
    expect(textIn(worksheet, rowOf('add'), 'symbol')).toBe('');
  });
});

describe('typing', () => {
  const lineAfter = (cell: CellName, text: string) => locateLine(typed(line, cell, text), 'P_tx').line;

  it('keeps an entry as typed, also one that cannot be read', () => {
    expect(lineAfter('entry', ' 14 dB+ (').entry).toBe('14 dB+ (');
  });

  it('in a case’s column gives the case an entry of its own, or takes it back', () => {
    expect(lineAfter('case calm', '15 dBm').byCase).toEqual({ calm: '15 dBm', storm: '13 dBm' });
    expect(lineAfter('case storm', '').byCase).toBeUndefined();
    expect(lineAfter('case calm', '14 dBm').byCase).toEqual({ storm: '13 dBm' });
  });

  it('in the value column of the only case changes the line’s own entry', () => {
    const single = { ...worksheet, cases: worksheet.cases.slice(0, 1) };
    expect(caseTyped(single, 'case calm')).toBeUndefined();
    const edit = editOf(single, rowOf('line', single), 'case calm', '9 dBm');
    expect(edit.ok && locateLine(after(edit.value, single), 'P_tx').line.entry).toBe('9 dBm');
  });

  it('a symbol renames it in every expression', () => {
    expect(locateLine(typed(line, 'symbol', 'P_out'), 'EIRP').line.entry).toBe('P_out + 2 dB');
  });

  it('a requirement or nothing', () => {
    expect(lineAfter('requirement', '>= 3 dBm').requirement).toEqual({ atLeast: '3 dBm' });
    expect(lineAfter('requirement', ' ').requirement).toBeUndefined();
  });

  it('a tolerance or nothing', () => {
    expect(lineAfter('tolerance', '+0.3/-0.8 dB').tolerance).toEqual({ above: '0.3 dB', below: '0.8 dB' });
    expect(lineAfter('tolerance', ' ').tolerance).toBeUndefined();
  });

  it('in the place for a line makes one', () => {
    const [section] = typed(rowOf('add'), 'label', ' Feeder ').sections;
    expect(section?.kind === 'lines' && 'lines' in section && section.lines.map((one) => one.label)).toEqual([
      'Transmit power',
      'Radiated power',
      'Feeder',
    ]);
  });

  it('in the place for a section makes one, and in a heading renames it', () => {
    expect(typed(rowOf('new-section'), 'title', 'Noise').sections.map((one) => one.title)).toEqual(['Part', 'Noise']);
    expect(typed(rowOf('section'), 'title', 'Buoy').sections.map((one) => one.title)).toEqual(['Buoy']);
  });
});

describe('refusals', () => {
  it.each([
    ['symbol', 'EIRP', /Another line has the symbol EIRP/],
    ['symbol', '2x', /begins with a letter/],
    ['symbol', 'k_B', /constant/],
    ['requirement', '>=', /for example/],
    ['tolerance', '±', /for example/],
  ] as const)('%s: %s', (cell, text, sentence) => {
    expect(refusal(worksheet, line, cell, text)).toMatch(sentence);
    expect(editOf(worksheet, line, cell, text)).toMatchObject({ ok: false });
  });

  it.each([
    ['symbol', ''],
    ['symbol', 'P_tx'],
    ['symbol', 'λ_2'],
    ['entry', '((('],
    ['requirement', ''],
    ['tolerance', ''],
  ] as const)('none for %s: “%s”', (cell, text) => {
    expect(refusal(worksheet, line, cell, text)).toBeUndefined();
  });
});

describe('clearing', () => {
  it('takes an entry away, and an override back to the line’s own', () => {
    expect(locateLine(after(clearingEdit(worksheet, 'P_tx', 'entry')), 'P_tx').line.entry).toBe('');
    expect(locateLine(after(clearingEdit(worksheet, 'P_tx', 'case storm')), 'P_tx').line.byCase).toBeUndefined();
    expect(clearingEdit(worksheet, 'P_tx', 'case calm').changes).toEqual([]);
  });
});

it('only cells that hold something typed can be typed in', () => {
  expect([isEditable(line, 'entry'), isEditable(line, 'margin'), isEditable(rowOf('section'), 'margin')]).toEqual([
    true,
    false,
    false,
  ]);
});
