import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { applyAll, applyChange, findLine, isLinesSection, type Change, type Worksheet } from '../../src/worksheet';
import { editDraws, editOf, MANY, worksheets } from './arbitrary';

const line = (id: string, symbol = id.toUpperCase()) => ({ id, symbol, label: '', entry: '1 dB' });

const sheet: Worksheet = {
  id: 'w',
  title: 'Buoy',
  cases: [
    { id: 'calm', name: 'Calm' },
    { id: 'storm', name: 'Storm' },
  ],
  sections: [
    { id: 'tx', kind: 'lines', title: 'Transmitter', lines: [line('a'), line('b'), line('c')] },
    { id: 'scan', kind: 'curve', title: 'Scan', content: { id: 'scan', kind: 'curve', title: 'Scan' } },
    { id: 'rx', kind: 'lines', title: 'Receiver', lines: [line('d')] },
  ],
};

/** The worksheet in one line: `tx:a,b,c scan rx:d | calm,storm`. */
function outline(worksheet: Worksheet): string {
  const sections = worksheet.sections.map((section) =>
    isLinesSection(section) ? `${section.id}:${section.lines.map((one) => one.id).join(',')}` : section.id,
  );
  return `${sections.join(' ')} | ${worksheet.cases.map((one) => one.id).join(',')}`;
}

describe('each change', () => {
  const cases: [string, Change, string][] = [
    [
      'insert-line',
      { kind: 'insert-line', sectionId: 'tx', index: 1, line: line('n') },
      'tx:a,n,b,c scan rx:d | calm,storm',
    ],
    [
      'insert-line at the end',
      { kind: 'insert-line', sectionId: 'rx', index: 1, line: line('n') },
      'tx:a,b,c scan rx:d,n | calm,storm',
    ],
    ['remove-line', { kind: 'remove-line', lineId: 'b' }, 'tx:a,c scan rx:d | calm,storm'],
    [
      'move-line down',
      { kind: 'move-line', lineId: 'a', sectionId: 'tx', index: 2 },
      'tx:b,c,a scan rx:d | calm,storm',
    ],
    ['move-line up', { kind: 'move-line', lineId: 'c', sectionId: 'tx', index: 0 }, 'tx:c,a,b scan rx:d | calm,storm'],
    [
      'move-line across',
      { kind: 'move-line', lineId: 'b', sectionId: 'rx', index: 0 },
      'tx:a,c scan rx:b,d | calm,storm',
    ],
    [
      'insert-section',
      { kind: 'insert-section', index: 1, section: { id: 'n', kind: 'lines', title: '', lines: [line('x')] } },
      'tx:a,b,c n:x scan rx:d | calm,storm',
    ],
    ['remove-section', { kind: 'remove-section', sectionId: 'tx' }, 'scan rx:d | calm,storm'],
    ['remove-section of another kind', { kind: 'remove-section', sectionId: 'scan' }, 'tx:a,b,c rx:d | calm,storm'],
    ['move-section', { kind: 'move-section', sectionId: 'tx', index: 2 }, 'scan rx:d tx:a,b,c | calm,storm'],
    [
      'insert-case',
      { kind: 'insert-case', index: 1, case: { id: 'rain', name: 'Rain' } },
      'tx:a,b,c scan rx:d | calm,rain,storm',
    ],
    ['remove-case', { kind: 'remove-case', caseId: 'calm' }, 'tx:a,b,c scan rx:d | storm'],
    ['move-case', { kind: 'move-case', caseId: 'calm', index: 1 }, 'tx:a,b,c scan rx:d | storm,calm'],
  ];

  it.each(cases)('%s gives the arrangement expected, and its inverse takes it back', (_, change, expected) => {
    const { worksheet, inverse } = applyChange(sheet, change);
    expect(outline(worksheet)).toBe(expected);
    expect(applyChange(worksheet, inverse).worksheet).toEqual(sheet);
  });

  it('set-line sets, replaces and takes away one field', () => {
    const set = applyChange(sheet, { kind: 'set-line', lineId: 'b', field: 'unit', value: 'dBm' });
    expect(findLine(set.worksheet, 'b')?.line).toEqual({ ...line('b'), unit: 'dBm' });
    expect(set.inverse).toEqual({ kind: 'set-line', lineId: 'b', field: 'unit', value: undefined });
    const gone = applyChange(set.worksheet, { kind: 'set-line', lineId: 'b', field: 'unit' });
    expect(gone.worksheet).toEqual(sheet);
    expect(gone.inverse).toEqual({ kind: 'set-line', lineId: 'b', field: 'unit', value: 'dBm' });
  });

  it('puts a new field in the file’s order, ahead of keys that are not known', () => {
    const odd = { ...line('a'), note: 'n', xCustom: 1 };
    const start: Worksheet = { ...sheet, sections: [{ id: 's', kind: 'lines', title: '', lines: [odd] }] };
    const { worksheet } = applyAll(start, [
      { kind: 'set-line', lineId: 'a', field: 'signOff', value: [] },
      { kind: 'set-line', lineId: 'a', field: 'unit', value: 'dB' },
    ]);
    const keys = Object.keys(findLine(worksheet, 'a')?.line ?? {});
    expect(keys).toEqual(['id', 'symbol', 'label', 'entry', 'unit', 'note', 'signOff', 'xCustom']);
  });

  it('set-section, rename-case and set-worksheet set texts', () => {
    const { worksheet, inverse } = applyAll(sheet, [
      { kind: 'set-section', sectionId: 'rx', field: 'title', value: 'Gateway' },
      { kind: 'rename-case', caseId: 'storm', name: 'Gale' },
      { kind: 'set-worksheet', field: 'title', value: 'Mooring' },
      { kind: 'set-worksheet', field: 'summary', value: 'in short' },
      { kind: 'set-worksheet', field: 'recorded', value: { SINR: { calm: '3 dB' } } },
    ]);
    expect(worksheet).toMatchObject({ title: 'Mooring', summary: 'in short', recorded: { SINR: { calm: '3 dB' } } });
    expect(worksheet.sections[2]?.title).toBe('Gateway');
    expect(worksheet.cases[1]).toEqual({ id: 'storm', name: 'Gale' });
    expect(applyAll(worksheet, inverse).worksheet).toEqual(sheet);
  });
});

describe('what a change does not concern', () => {
  it('keeps its identity', () => {
    const { worksheet } = applyChange(sheet, { kind: 'set-line', lineId: 'b', field: 'entry', value: '2 dB' });
    expect(worksheet.sections[1]).toBe(sheet.sections[1]);
    expect(worksheet.sections[2]).toBe(sheet.sections[2]);
    expect(worksheet.cases).toBe(sheet.cases);
    expect(findLine(worksheet, 'a')?.line).toBe(findLine(sheet, 'a')?.line);
    expect(findLine(worksheet, 'b')?.line).not.toBe(findLine(sheet, 'b')?.line);
  });

  it('is the whole worksheet when a field is set to what it is', () => {
    expect(applyChange(sheet, { kind: 'set-line', lineId: 'b', field: 'entry', value: '1 dB' }).worksheet).toBe(sheet);
    expect(applyChange(sheet, { kind: 'set-worksheet', field: 'title', value: 'Buoy' }).worksheet).toBe(sheet);
  });

  it('is not written to, neither in the worksheet nor in inverses, when a batch goes on changing it', () => {
    const before = structuredClone(sheet);
    const { worksheet, inverse } = applyAll(sheet, [
      { kind: 'set-line', lineId: 'a', field: 'entry', value: '2 dB' },
      { kind: 'remove-section', sectionId: 'tx' },
      { kind: 'insert-section', index: 0, section: { id: 'tx', kind: 'lines', title: 'T', lines: [line('a')] } },
      { kind: 'insert-line', sectionId: 'tx', index: 0, line: line('z') },
      { kind: 'set-line', lineId: 'a', field: 'entry', value: '3 dB' },
    ]);
    expect(outline(worksheet)).toBe('tx:z,a scan rx:d | calm,storm');
    expect(sheet).toEqual(before);
    expect(applyAll(worksheet, inverse).worksheet).toEqual(sheet);
  });
});

describe('a change that does not fit is a broken program', () => {
  const wrong: [string, Change][] = [
    ['an unknown line', { kind: 'set-line', lineId: 'zz', field: 'entry', value: '' }],
    ['an unknown line to remove', { kind: 'remove-line', lineId: 'zz' }],
    ['a needed field taken away', { kind: 'set-line', lineId: 'a', field: 'entry' }],
    ['an unknown section', { kind: 'insert-line', sectionId: 'zz', index: 0, line: line('n') }],
    ['an index beyond the end', { kind: 'insert-line', sectionId: 'rx', index: 2, line: line('n') }],
    ['a negative index', { kind: 'move-section', sectionId: 'rx', index: -1 }],
    ['a line id that is there already', { kind: 'insert-line', sectionId: 'rx', index: 0, line: line('a') }],
    [
      'a section id that is there already',
      { kind: 'insert-section', index: 0, section: { id: 'tx', kind: 'lines', title: '', lines: [] } },
    ],
    [
      'a section with a line that is there already',
      { kind: 'insert-section', index: 0, section: { id: 'n', kind: 'lines', title: '', lines: [line('a')] } },
    ],
    [
      'a line put into a section of another kind',
      { kind: 'insert-line', sectionId: 'scan', index: 0, line: line('n') },
    ],
    [
      'a title for a section kept word for word',
      { kind: 'set-section', sectionId: 'scan', field: 'title', value: 'x' },
    ],
    ['an unknown case', { kind: 'rename-case', caseId: 'zz', name: 'x' }],
    ['a case id that is there already', { kind: 'insert-case', index: 0, case: { id: 'calm', name: 'x' } }],
  ];

  it.each(wrong)('%s', (_, change) => {
    expect(() => applyChange(sheet, change)).toThrow(/broken invariant/);
  });

  it('the last case removed', () => {
    const changes: Change[] = [
      { kind: 'remove-case', caseId: 'calm' },
      { kind: 'remove-case', caseId: 'storm' },
    ];
    expect(() => applyAll(sheet, changes)).toThrow(/at least one case/);
  });

  it('a line that the same batch has removed', () => {
    const changes: Change[] = [
      { kind: 'remove-section', sectionId: 'tx' },
      { kind: 'set-line', lineId: 'a', field: 'entry', value: '' },
    ];
    expect(() => applyAll(sheet, changes)).toThrow(/broken invariant/);
  });
});

describe('laws', () => {
  it('the inverse of a batch gives back an equal worksheet with its keys in the same order', MANY, () => {
    fc.assert(
      fc.property(worksheets, editDraws, (worksheet, draw) => {
        const changes = editOf(worksheet, draw)?.changes ?? [];
        const { worksheet: after, inverse } = applyAll(worksheet, changes);
        const back = applyAll(after, inverse).worksheet;
        expect(back).toEqual(worksheet);
        expect(JSON.stringify(back)).toBe(JSON.stringify(worksheet));
      }),
      { numRuns: 500 },
    );
  });

  it('a batch comes to the same as its changes one by one', MANY, () => {
    fc.assert(
      fc.property(worksheets, fc.array(editDraws, { maxLength: 6 }), (worksheet, draws) => {
        const changes: Change[] = [];
        let oneByOne = worksheet;
        for (const draw of draws)
          for (const change of editOf(oneByOne, draw)?.changes ?? []) {
            changes.push(change);
            oneByOne = applyChange(oneByOne, change).worksheet;
          }
        expect(applyAll(worksheet, changes).worksheet).toEqual(oneByOne);
      }),
      { numRuns: 300 },
    );
  });

  it('every line is found where it stands after any batch', MANY, () => {
    fc.assert(
      fc.property(worksheets, fc.array(editDraws, { maxLength: 6 }), (start, draws) => {
        let worksheet = start;
        for (const draw of draws) worksheet = applyAll(worksheet, editOf(worksheet, draw)?.changes ?? []).worksheet;
        worksheet.sections.forEach((section, sectionIndex) => {
          if (!isLinesSection(section)) return;
          section.lines.forEach((one, lineIndex) => {
            expect(findLine(worksheet, one.id)).toEqual({ line: one, section, sectionIndex, lineIndex });
          });
        });
      }),
      { numRuns: 200 },
    );
  });
});
