import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import * as w from '../../src/worksheet';
import type { Change, Edit, Line, Worksheet } from '../../src/worksheet';
import { editDraws, editOf, MANY, worksheets } from './arbitrary';

const line = (id: string, symbol: string, entry: string, more: Partial<Line> = {}): Line => ({
  id,
  symbol,
  label: '',
  entry,
  ...more,
});

const sheet: Worksheet = {
  id: 'w',
  title: 'Buoy',
  cases: [
    { id: 'calm', name: 'Calm' },
    { id: 'storm', name: 'Storm' },
  ],
  sections: [
    {
      id: 'tx',
      kind: 'lines',
      title: 'Transmitter',
      lines: [
        line('p', 'P_tx', '14 dBm', { byCase: { storm: '13 dBm' } }),
        line('g', 'G_tx', '2 dBi', { note: 'P_tx is not part of this text' }),
        line('e', 'EIRP', 'P_tx + G_tx', { requirement: { atMost: 'P_tx + 6 dB' } }),
      ],
    },
    {
      id: 'rx',
      kind: 'lines',
      title: 'Receiver',
      lines: [line('m', 'M', 'EIRP - 10 dBm', { tolerance: { adverse: '1 dB', shape: 'normal', group: 'P_tx' } })],
    },
  ],
};

const after = (edit: Edit, worksheet = sheet): Worksheet => w.applyAll(worksheet, edit.changes).worksheet;
const lineAfter = (edit: Edit, id: string, worksheet = sheet): Line | undefined =>
  w.findLine(after(edit, worksheet), id)?.line;
const symbols = (worksheet: Worksheet): string =>
  worksheet.sections
    .map((one) => (w.isLinesSection(one) ? one.lines.map((each) => each.symbol).join(',') : one.id))
    .join(' | ');

describe('entries', () => {
  it('of the line itself, without blanks round them', () => {
    const edit = w.setEntry(sheet, 'p', '  15 dBm ');
    expect(lineAfter(edit, 'p')).toMatchObject({ entry: '15 dBm', byCase: { storm: '13 dBm' } });
    expect(edit).toMatchObject({ label: 'Change the entry of P_tx', focus: { lineIds: ['p'], field: 'entry' } });
  });

  it('of one case, in the order of the cases', () => {
    const edit = w.setEntry(sheet, 'p', '12 dBm', 'calm');
    expect(JSON.stringify(lineAfter(edit, 'p')?.byCase)).toBe('{"calm":"12 dBm","storm":"13 dBm"}');
    expect(edit.focus).toMatchObject({ caseId: 'calm' });
  });

  it('of a case are given back by an empty text or by the edit for it', () => {
    for (const edit of [w.setEntry(sheet, 'p', ' ', 'storm'), w.removeOverride(sheet, 'p', 'storm')])
      expect(lineAfter(edit, 'p')).toEqual(line('p', 'P_tx', '14 dBm'));
  });

  it('that a case inherits anyway make no override, but one that is there may say the same', () => {
    expect(w.setEntry(sheet, 'g', '2 dBi', 'calm').changes).toEqual([]);
    expect(lineAfter(w.setEntry(sheet, 'p', '14 dBm', 'storm'), 'p')?.byCase).toEqual({ storm: '14 dBm' });
  });

  it('are looked up safely whatever the case is called', () => {
    const [p] = w.allLines(sheet);
    expect(p && w.entryIn(p, 'toString')).toBe('14 dBm');
    expect(p && w.entryIn(p, 'storm')).toBe('13 dBm');
    expect(p && w.entryIn(p)).toBe('14 dBm');
  });
});

describe('accepted findings', () => {
  const finding = { code: 'loss-added', entry: 'P_tx + G_tx', reason: 'referred back' };
  const accepted = after(w.acceptFinding(sheet, 'e', finding));

  it('are kept with their reason and found again', () => {
    const found = w.findLine(accepted, 'e')?.line;
    expect(found && w.acceptanceOf(found, 'loss-added', 'P_tx + G_tx')).toEqual(finding);
    expect(found && w.acceptanceOf(found, 'loss-added', 'P_tx')).toBeUndefined();
  });

  it('are answered anew, not twice', () => {
    const again = w.acceptFinding(accepted, 'e', { ...finding, reason: 'checked' });
    expect(lineAfter(again, 'e', accepted)?.accepted).toEqual([{ ...finding, reason: 'checked' }]);
  });

  it('are taken back', () => {
    expect(lineAfter(w.unacceptFinding(accepted, 'e', finding), 'e', accepted)).toEqual(w.findLine(sheet, 'e')?.line);
    expect(w.unacceptFinding(accepted, 'e', { code: 'other', entry: '' }).changes).toEqual([]);
  });

  it('fall away with the edit of the entry, and undo brings them back', () => {
    const edit = w.setEntry(accepted, 'e', 'P_tx');
    expect(lineAfter(edit, 'e', accepted)).not.toHaveProperty('accepted');
    const undone = w.undo(w.perform(w.startHistory(accepted), edit));
    expect(undone?.history.worksheet).toEqual(accepted);
  });

  it('stay while a case still has the entry', () => {
    const first = after(w.setEntry(accepted, 'e', 'P_tx + G_tx - 1 dB', 'storm'), accepted);
    const both = after(w.acceptFinding(first, 'e', { ...finding, entry: 'P_tx + G_tx - 1 dB' }), first);
    expect(lineAfter(w.setEntry(both, 'e', '3 dBm'), 'e', both)?.accepted).toHaveLength(1);
    expect(lineAfter(w.removeOverride(both, 'e', 'storm'), 'e', both)?.accepted).toEqual([finding]);
  });

  it('follow a symbol that is renamed', () => {
    const renamed = after(w.setSymbol(accepted, 'p', 'P_t'), accepted);
    expect(w.findLine(renamed, 'e')?.line.accepted).toEqual([{ ...finding, entry: 'P_t + G_tx' }]);
  });
});

describe('other fields', () => {
  it('are set, and taken away by an empty text or undefined', () => {
    expect(lineAfter(w.setLineField(sheet, 'p', 'unit', ' dBW '), 'p')?.unit).toBe('dBW');
    expect(lineAfter(w.setLineField(sheet, 'g', 'note', ''), 'g')).toEqual(line('g', 'G_tx', '2 dBi'));
    expect(lineAfter(w.setLineField(sheet, 'e', 'requirement', undefined), 'e')).not.toHaveProperty('requirement');
    expect(lineAfter(w.setLineField(sheet, 'e', 'digits', 0), 'e')?.digits).toBe(0);
  });

  it('but a label is emptied, not taken away', () => {
    const labelled = after(w.setLineField(sheet, 'p', 'label', 'Transmit power'));
    expect(lineAfter(w.setLineField(labelled, 'p', 'label', ''), 'p', labelled)?.label).toBe('');
  });
});

describe('repairs', () => {
  it('of an entry replace the one that counts in the case', () => {
    const repair = { kind: 'entry', title: 'Add as powers', entry: '12 dBm' } as const;
    expect(lineAfter(w.applyRepair(sheet, 'p', repair, 'storm'), 'p')).toMatchObject({
      entry: '14 dBm',
      byCase: { storm: '12 dBm' },
    });
    expect(lineAfter(w.applyRepair(sheet, 'p', repair, 'calm'), 'p')).toMatchObject({
      entry: '12 dBm',
      byCase: { storm: '13 dBm' },
    });
    expect(w.applyRepair(sheet, 'p', repair).label).toBe('Add as powers');
  });

  it('of a unit, a kind and a side set just these', () => {
    const unit = w.applyRepair(sheet, 'g', { kind: 'unit', title: 'dBi it is', unit: 'dBi' });
    expect(lineAfter(unit, 'g')?.unit).toBe('dBi');
    const kind = w.applyRepair(sheet, 'g', { kind: 'quantity', title: 'A gain', quantity: 'gain' });
    expect(lineAfter(kind, 'g')).toMatchObject({ quantity: 'gain' });
    expect(lineAfter(kind, 'g')).not.toHaveProperty('side');
    const both = w.applyRepair(sheet, 'p', { kind: 'quantity', title: 'Wanted', quantity: 'level', side: 'wanted' });
    expect(lineAfter(both, 'p')).toMatchObject({ quantity: 'level', side: 'wanted' });
  });
});

describe('symbols', () => {
  it('are renamed in every expression and nowhere else', () => {
    const renamed = after(w.setSymbol(sheet, 'p', 'P_out'));
    expect(w.findLine(renamed, 'e')?.line).toMatchObject({
      entry: 'P_out + G_tx',
      requirement: { atMost: 'P_out + 6 dB' },
    });
    expect(w.findLine(renamed, 'g')?.line.note).toBe('P_tx is not part of this text');
    expect(w.findLine(renamed, 'm')?.line.tolerance).toEqual({ adverse: '1 dB', shape: 'normal', group: 'P_tx' });
    expect(w.findLine(renamed, 'm')?.line).toBe(w.findLine(sheet, 'm')?.line);
  });

  it('take their recorded values along', () => {
    const recorded: Worksheet = { ...sheet, recorded: { EIRP: { calm: '16 dBm' }, M: { calm: '6 dB' } } };
    const renamed = after(w.setSymbol(recorded, 'e', 'P_eirp'), recorded);
    expect(JSON.stringify(renamed.recorded)).toBe('{"P_eirp":{"calm":"16 dBm"},"M":{"calm":"6 dB"}}');
  });

  it('leave expressions alone where these would change their meaning', () => {
    const twice = after(w.setSymbol(sheet, 'g', 'P_tx'));
    expect(w.findLine(twice, 'e')?.line.entry).toBe('P_tx + G_tx');
    const apart = after(w.setSymbol(twice, 'g', 'G_2'), twice);
    expect(w.findLine(apart, 'e')?.line.entry).toBe('P_tx + G_tx');
    for (const bad of ['', 'P tx', '1P', 'pi']) expect(w.setSymbol(sheet, 'p', bad).changes).toHaveLength(1);
  });

  it('may have parts: the outputs of a chain follow its name', () => {
    const using: Worksheet = {
      ...sheet,
      sections: [{ id: 's', kind: 'lines', title: '', lines: [line('r', 'rx', '1'), line('u', 'U', 'rx.nf + rx')] }],
    };
    expect(lineAfter(w.setSymbol(using, 'r', 'front'), 'u', using)?.entry).toBe('front.nf + front');
  });

  it('may be parts: uses of a stage follow its name, in lines, pools and other stages', () => {
    const stage = { id: 'a', symbol: 'lna', label: '', gain: '10 dB' };
    const using: Worksheet = {
      ...sheet,
      sections: [
        { id: 'l', kind: 'lines', title: '', lines: [line('u', 'U', 'rx.lna.out.snr - rx.lnas.gain + lna')] },
        { id: 'p', kind: 'pool', symbol: 'N', title: '', lines: [line('v', 'V', 'rx.lna.out.noise')] },
        {
          id: 'c',
          kind: 'chain',
          symbol: 'rx',
          title: '',
          stages: [stage, { id: 'b', symbol: 'pad', label: '', gain: '-rx.lna.gain' }],
        },
      ],
    };
    const edit = w.setStageSymbol(using, 'c', 'a', 'amp');
    expect(lineAfter(edit, 'u', using)?.entry).toBe('rx.amp.out.snr - rx.lnas.gain + lna');
    expect(lineAfter(edit, 'v', using)?.entry).toBe('rx.amp.out.noise');
    expect(after(edit, using).sections[2]).toMatchObject({ stages: [{ symbol: 'amp' }, { gain: '-rx.amp.gain' }] });
  });
});

describe('lines', () => {
  it('are inserted above, below and at the end', () => {
    const at = (place: w.Place): string => symbols(after(w.insertLine(sheet, place, { symbol: 'n' })));
    expect(at(w.placeAbove(sheet, 'g'))).toBe('P_tx,n,G_tx,EIRP | M');
    expect(at(w.placeBelow(sheet, 'g'))).toBe('P_tx,G_tx,n,EIRP | M');
    expect(at(w.placeAtEnd(sheet, 'rx'))).toBe('P_tx,G_tx,EIRP | M,n');
  });

  it('have their keys in order however they are made', () => {
    expect(Object.keys(w.newLine({ note: 'n', unit: 'dB', entry: '1' }))).toEqual([
      'id',
      'symbol',
      'label',
      'entry',
      'unit',
      'note',
    ]);
  });

  it('are duplicated with free symbols, and refer to each other’s copies', () => {
    const edit = w.duplicateLines(sheet, ['e', 'p']);
    const copied = after(edit);
    expect(symbols(copied)).toBe('P_tx,G_tx,EIRP,P_tx_2,EIRP_2 | M');
    expect(w.allLines(copied)[4]).toMatchObject({ entry: 'P_tx_2 + G_tx', requirement: { atMost: 'P_tx_2 + 6 dB' } });
    expect(edit.label).toBe('Duplicate 2 lines');
    expect(edit.focus).toMatchObject({
      lineIds: w
        .allLines(copied)
        .slice(3, 5)
        .map((one) => one.id),
    });
  });

  it('are duplicated section by section, and a copy of a copy counts on', () => {
    const once = after(w.duplicateLines(sheet, ['m', 'p']));
    expect(symbols(once)).toBe('P_tx,P_tx_2,G_tx,EIRP | M,M_2');
    expect(symbols(after(w.duplicateLines(once, [w.allLines(once)[1]?.id ?? '']), once))).toBe(
      'P_tx,P_tx_2,P_tx_3,G_tx,EIRP | M,M_2',
    );
  });

  it('leave their sign-off behind when they are copied', () => {
    const signed = after({
      label: '',
      changes: [
        { kind: 'set-line', lineId: 'g', field: 'signOff', value: [{ by: 'AB', on: '2026-01-02', basis: '' }] },
      ],
    });
    const copied = after(w.duplicateLines(signed, ['g']), signed);
    expect(
      w
        .allLines(copied)
        .filter((one) => one.signOff !== undefined)
        .map((one) => one.id),
    ).toEqual(['g']);
  });

  it('are deleted, and the focus goes to the line in their place', () => {
    const edit = w.deleteLines(sheet, ['p', 'g']);
    expect(symbols(after(edit))).toBe('EIRP | M');
    expect(edit).toMatchObject({
      label: 'Delete 2 lines',
      focus: { lineIds: ['e'] },
      focusBefore: { lineIds: ['p', 'g'] },
    });
    expect(w.deleteLines(sheet, ['e']).focus).toMatchObject({ lineIds: ['g'] });
    expect(w.deleteLines(sheet, ['m']).focus).toEqual({ kind: 'section', sectionId: 'rx' });
    expect(w.deleteLines(sheet, ['m'], 'Cut').label).toBe('Cut line');
  });

  it.each([
    [['g'], 'up', 'G_tx,P_tx,EIRP | M'],
    [['g'], 'down', 'P_tx,EIRP,G_tx | M'],
    [['p', 'g'], 'down', 'EIRP,P_tx,G_tx | M'],
    [['e'], 'down', 'P_tx,G_tx | EIRP,M'],
    [['g', 'e'], 'down', 'P_tx | G_tx,EIRP,M'],
    [['m'], 'up', 'P_tx,G_tx,EIRP,M | '],
    [['p', 'e'], 'down', 'G_tx | P_tx,EIRP,M'],
    [['p'], 'up', 'P_tx,G_tx,EIRP | M'],
    [['m'], 'down', 'P_tx,G_tx,EIRP | M'],
  ] as const)('%j move one place %s', (ids, direction, expected) => {
    expect(symbols(after(w.moveLines(sheet, ids, direction)))).toBe(expected);
  });

  it('that cannot move make no edit', () => {
    expect(w.moveLines(sheet, ['p'], 'up').changes).toEqual([]);
    expect(w.moveLines(sheet, [], 'up').changes).toEqual([]);
  });

  it.each([
    [['m'], { sectionId: 'tx', index: 1 }, 'P_tx,M,G_tx,EIRP | '],
    [['e', 'p'], { sectionId: 'rx', index: 1 }, 'G_tx | M,P_tx,EIRP'],
    [['p', 'e'], { sectionId: 'tx', index: 1 }, 'P_tx,EIRP,G_tx | M'],
    [['p', 'g', 'm'], { sectionId: 'tx', index: 3 }, 'EIRP,P_tx,G_tx,M | '],
    [['g'], { sectionId: 'tx', index: 1 }, 'P_tx,G_tx,EIRP | M'],
  ] as const)('%j move to %j', (ids, place, expected) => {
    expect(symbols(after(w.moveLinesTo(sheet, ids, place)))).toBe(expected);
  });

  it('moved anywhere stand together, in order, and nothing else changes its order', MANY, () => {
    fc.assert(
      fc.property(worksheets, fc.array(fc.nat(30)), fc.nat(10), fc.nat(10), (worksheet, picks, home, index) => {
        const all = w.allLines(worksheet).map((one) => one.id);
        const homes = worksheet.sections.filter(w.isLinesSection);
        const target = homes[home % Math.max(homes.length, 1)];
        fc.pre(all.length > 0 && target !== undefined);
        const ids = new Set(picks.map((n) => all[n % all.length] ?? ''));
        const place = { sectionId: target.id, index: index % (target.lines.length + 1) };
        const moved = w.allLines(after(w.moveLinesTo(worksheet, [...ids], place), worksheet)).map((one) => one.id);
        expect(moved.filter((id) => !ids.has(id))).toEqual(all.filter((id) => !ids.has(id)));
        const block = all.filter((id) => ids.has(id));
        const at = moved.indexOf(block[0] ?? '');
        if (block.length > 0) expect(moved.slice(at, at + block.length)).toEqual(block);
      }),
      { numRuns: 300 },
    );
  });
});

describe('pasted lines', () => {
  const copied: w.CopiedLines = {
    cases: [
      { id: 'blow', name: 'Storm' },
      { id: 'ice', name: 'Ice' },
    ],
    lines: [
      line('p', 'P_tx', '20 dBm', {
        byCase: { blow: '19 dBm', ice: '18 dBm' },
        signOff: [{ by: 'AB', on: '', basis: '' }],
      }),
      line('q', 'P_tx_2', '1 dBm'),
      line('x', 'X', 'P_tx + P_tx_2 + G_tx'),
    ],
  };

  it('get ids and symbols of their own, keep what they say about each other, and tell what is lost', () => {
    const { edit, messages } = w.pasteLines(sheet, w.placeAtEnd(sheet, 'rx'), copied);
    const pasted = after(edit);
    expect(symbols(pasted)).toBe('P_tx,G_tx,EIRP | M,P_tx_3,P_tx_2,X');
    const lines = w.allLines(pasted).slice(4);
    expect(lines.map((one) => one.entry)).toEqual(['20 dBm', '1 dBm', 'P_tx_3 + P_tx_2 + G_tx']);
    expect(lines[0]?.byCase).toEqual({ storm: '19 dBm' });
    expect(new Set(w.allLines(pasted).map((one) => one.id)).size).toBe(7);
    expect(messages).toEqual([
      'The entries for the case “Ice” were left out: this worksheet has no such case.',
      'Sign-offs were left out: they were given to the lines that were copied.',
    ]);
  });

  it('come back under their old symbols after a cut', () => {
    const cut = after(w.deleteLines(sheet, ['p'], 'Cut'));
    const { edit, messages } = w.pasteLines(cut, w.placeAtEnd(cut, 'rx'), {
      cases: sheet.cases,
      lines: w.allLines(sheet).slice(0, 1),
    });
    expect(symbols(after(edit, cut))).toBe('G_tx,EIRP | M,P_tx');
    expect(messages).toEqual([]);
  });
});

describe('sections', () => {
  it('are inserted, renamed, moved and deleted', () => {
    const titles = (edit: Edit): string[] => after(edit).sections.map((one) => one.title);
    expect(titles(w.insertSection(sheet, 1, 'Path'))).toEqual(['Transmitter', 'Path', 'Receiver']);
    expect(titles(w.renameSection(sheet, 'rx', 'Gateway'))).toEqual(['Transmitter', 'Gateway']);
    expect(titles(w.moveSection(sheet, 'rx', 'up'))).toEqual(['Receiver', 'Transmitter']);
    expect(titles(w.moveSection(sheet, 'tx', 'down'))).toEqual(['Receiver', 'Transmitter']);
    expect(titles(w.moveSectionTo(sheet, 'tx', 2))).toEqual(['Receiver', 'Transmitter']);
    expect(titles(w.deleteSection(sheet, 'tx'))).toEqual(['Receiver']);
    expect(w.moveSection(sheet, 'tx', 'up').changes).toEqual([]);
    expect(w.renameSection(sheet, 'tx', 'Transmitter').changes).toEqual([]);
  });

  it('may all be deleted', () => {
    const one = after(w.deleteSection(sheet, 'tx'));
    const edit = w.deleteSection(one, 'rx');
    expect(after(edit, one).sections).toEqual([]);
    expect(edit.focus).toEqual({ kind: 'worksheet' });
  });
});

describe('cases', () => {
  it('are added under an id made from the name', () => {
    const ids = (name: string, worksheet = sheet): string[] =>
      after(w.addCase(worksheet, name), worksheet).cases.map((one) => one.id);
    expect(ids('Clear sky')).toEqual(['calm', 'storm', 'clear-sky']);
    expect(ids('Été')).toEqual(['calm', 'storm', 'ete']);
    expect(ids('Storm')).toEqual(['calm', 'storm', 'storm-2']);
    expect(ids('晴れ')).toEqual(['calm', 'storm', 'case']);
    expect(ids('2030')).toEqual(['calm', 'storm', 'case-2030']);
    expect(ids('Constructor')).toEqual(['calm', 'storm', 'constructor-2']);
  });

  it('never take up entries that some line still holds for a case that is gone', () => {
    const orphan = after({
      label: '',
      changes: [{ kind: 'set-line', lineId: 'g', field: 'byCase', value: { ice: '1 dBi' } }],
    });
    expect(after(w.addCase(orphan, 'Ice'), orphan).cases[2]?.id).toBe('ice-2');
  });

  it('may begin with the entries of another', () => {
    expect(lineAfter(w.addCase(sheet, 'Gale', 'storm'), 'p')?.byCase).toEqual({ storm: '13 dBm', gale: '13 dBm' });
    expect(lineAfter(w.addCase(sheet, 'Gale'), 'p')?.byCase).toEqual({ storm: '13 dBm' });
  });

  it('are removed with their entries and recorded values', () => {
    const recorded: Worksheet = { ...sheet, recorded: { M: { calm: '6 dB', storm: '5 dB' } } };
    const edit = w.removeCase(recorded, 'storm');
    const left = after(edit, recorded);
    expect(left.cases.map((one) => one.id)).toEqual(['calm']);
    expect(w.findLine(left, 'p')?.line).not.toHaveProperty('byCase');
    expect(left.recorded).toEqual({ M: { calm: '6 dB' } });
    expect(w.undo(w.perform(w.startHistory(recorded), edit))?.history.worksheet).toEqual(recorded);
    expect(() => w.removeCase(left, 'calm')).toThrow(/at least one case/);
  });

  it('are renamed without changing their id, and moved', () => {
    expect(after(w.renameCase(sheet, 'storm', 'Gale')).cases[1]).toEqual({ id: 'storm', name: 'Gale' });
    expect(after(w.moveCase(sheet, 'storm', 'left')).cases.map((one) => one.id)).toEqual(['storm', 'calm']);
    expect(w.moveCase(sheet, 'storm', 'right').changes).toEqual([]);
  });
});

describe('limits', () => {
  it('let ordinary edits through', () => {
    expect(w.editProblem(sheet, w.setEntry(sheet, 'p', '15 dBm'))).toBeUndefined();
    expect(w.editProblem(sheet, w.duplicateLines(sheet, ['p', 'm']))).toBeUndefined();
  });

  it('stop a text and a number of lines that a file may not hold', MANY, () => {
    expect(w.editProblem(sheet, w.setLineField(sheet, 'p', 'note', 'x'.repeat(65_537)))).toMatch(
      /65537 characters is too long/,
    );
    const many = Array.from({ length: 99_997 }, (_, i) => line(`n${String(i)}`, '', ''));
    const { edit } = w.pasteLines(sheet, w.placeAtEnd(sheet, 'rx'), { cases: [], lines: many });
    expect(w.editProblem(sheet, edit)).toMatch(/100001 lines/);
  });
});

describe('new worksheets', () => {
  it('have one case and one empty section, and differ in their ids', () => {
    const [one, two] = [w.newWorksheet(), w.newWorksheet()];
    expect(one).toMatchObject({
      title: 'New worksheet',
      cases: [{ id: 'nominal', name: 'Nominal' }],
      sections: [{ kind: 'lines', lines: [] }],
    });
    expect(one.id).not.toBe(two.id);
  });

  it('made by duplicating keep everything but id and title', () => {
    const copy = w.duplicateWorksheet(sheet);
    expect({ ...copy, id: 'w', title: 'Buoy' }).toEqual(sheet);
    expect(copy.title).toBe('Copy of Buoy');
    expect(copy.id).not.toBe('w');
  });
});

describe('the edits that the property tests draw', () => {
  it('make every kind of change and set every field that edits set', MANY, () => {
    const kinds = new Set<Change['kind']>();
    const fields = new Set<string>();
    for (const [worksheet, draw] of fc.sample(fc.tuple(worksheets, editDraws), { numRuns: 1500, seed: 7 }))
      for (const change of editOf(worksheet, draw)?.changes ?? []) {
        kinds.add(change.kind);
        if ('field' in change) fields.add(`${change.kind} ${change.field}`);
      }
    expect([...kinds].sort()).toEqual([
      'insert-case',
      'insert-line',
      'insert-section',
      'move-case',
      'move-line',
      'move-section',
      'remove-case',
      'remove-line',
      'remove-section',
      'rename-case',
      'set-line',
      'set-section',
      'set-worksheet',
    ]);
    for (const field of [
      'symbol',
      'label',
      'entry',
      'unit',
      'quantity',
      'side',
      'byCase',
      'requirement',
      'note',
      'accepted',
    ])
      expect(fields).toContain(`set-line ${field}`);
    for (const field of ['title', 'summary', 'recorded']) expect(fields).toContain(`set-worksheet ${field}`);
  });
});
