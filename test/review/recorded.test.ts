/** Values recorded when a file is saved, and what is told of those that have moved since. */
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { describeMoved, movedValues, recordedValues } from '../../src/review';
import { STARTERS } from '../../src/starters';
import type { Worksheet } from '../../src/worksheet';
import { sheetOf, sheetOfLines } from '../engine/notation';

const SHEET = sheetOf(
  [
    'C = -90 dBm @ storm: -98.5 dBm',
    'N = -104 dBm',
    'CN = C - N require >= 3 dB',
    'f = 868.3 MHz require >= 863 MHz',
    'P | dBm = 0 W require <= 0 dBm',
  ].join('\n'),
  'calm',
  'storm',
);
const recorded = (worksheet: Worksheet): Worksheet['recorded'] => recordedValues(new Evaluation(worksheet));
const moved = (worksheet: Worksheet): ReturnType<typeof movedValues> => movedValues(new Evaluation(worksheet));

/** The worksheet with other entries, by symbol. */
const withEntries = (worksheet: Worksheet, entries: Readonly<Record<string, string>>): Worksheet => ({
  ...worksheet,
  sections: worksheet.sections.map((section) =>
    'lines' in section
      ? { ...section, lines: section.lines.map((line) => ({ ...line, entry: entries[line.symbol] ?? line.entry })) }
      : section,
  ),
});

describe('recorded values', () => {
  it('are those of lines with a requirement, in each case, as text with units', () => {
    expect(recorded(SHEET)).toEqual({
      CN: { calm: '14.00 dB', storm: '5.50 dB' },
      f: { calm: '868.3 MHz', storm: '868.3 MHz' },
      P: { calm: 'no power', storm: 'no power' },
    });
  });

  it('are none when no line has a requirement', () => {
    expect(recorded(sheetOf('x = 1 dB'))).toBeUndefined();
  });

  it('leave out what is withheld, waits or has no symbol of its own', () => {
    const requirement = { atLeast: '0 dB' };
    expect(
      recorded(
        sheetOfLines([
          { id: 'a', symbol: 'a', label: '', entry: '1/0', requirement },
          { id: 'b', symbol: '', label: '', entry: '1 dB', requirement },
          { id: 'c', symbol: 'x', label: '', entry: '2 dB', requirement },
          { id: 'd', symbol: 'x', label: '', entry: '3 dB', requirement },
        ]),
      ),
    ).toEqual({ a: {}, x: { nominal: '2.00 dB' } });
  });

  it.each(['constructor', '__proto__', 'toString'])(
    'of a line named %s leave a file that can be read again',
    (symbol) => {
      const sheet = sheetOfLines([{ id: 'l', symbol, label: '', entry: '1 dB', requirement: { atLeast: '0 dB' } }]);
      const values = recorded(sheet);
      expect(Object.keys(values ?? {})).toEqual([symbol]);
      expect(readWorksheetFile(writeWorksheetFile({ ...sheet, recorded: values ?? {} })).ok).toBe(true);
    },
  );
});

describe('moved values', () => {
  it.each(STARTERS)('are none right after recording, through the file ($title)', ({ text }) => {
    const read = readWorksheetFile(text);
    if (!read.ok) throw new Error(read.fault.sentence);
    const values = recorded(read.value.worksheet);
    const saved = readWorksheetFile(writeWorksheetFile({ ...read.value.worksheet, recorded: values ?? {} }));
    if (!saved.ok) throw new Error(saved.fault.sentence);
    expect(Object.keys(saved.value.worksheet.recorded ?? {}).length).toBeGreaterThan(1);
    expect(moved(saved.value.worksheet)).toEqual([]);
  });

  const saved = { ...SHEET, recorded: recorded(SHEET) ?? {} };

  it('are told by line and case', () => {
    expect(moved(withEntries(saved, { N: '-104.01 dBm', C: '-90.01 dBm' }))).toEqual([
      { symbol: 'CN', caseId: 'storm', recorded: '5.50 dB', now: '5.51 dB' },
    ]);
    expect(moved(withEntries(saved, { P: '-3 dBm' }))).toEqual([
      { symbol: 'P', caseId: 'calm', recorded: 'no power', now: '-3.00 dBm' },
      { symbol: 'P', caseId: 'storm', recorded: 'no power', now: '-3.00 dBm' },
    ]);
  });

  it('are not told for changes beyond what was recorded', () => {
    expect(moved(withEntries(saved, { N: '-104.0001 dBm' }))).toEqual([]);
  });

  it('have no value now while it is withheld', () => {
    expect(moved(withEntries(saved, { N: '1 dBm + 1 dBm' }))).toEqual([
      { symbol: 'CN', caseId: 'calm', recorded: '14.00 dB', now: undefined },
      { symbol: 'CN', caseId: 'storm', recorded: '5.50 dB', now: undefined },
    ]);
  });

  it('are not told of lines and cases that are gone', () => {
    const history = { CN: { calm: '14.00 dB', fog: '1.00 dB' }, gone: { calm: '1.00 dB' }, toString: { calm: '1' } };
    expect(moved({ ...SHEET, recorded: history })).toEqual([]);
  });
});

it.each([
  ['5.51 dB', 'CN in Storm was 5.50 dB when the file was saved and is 5.51 dB now.'],
  [undefined, 'CN in Storm was 5.50 dB when the file was saved and is withheld now.'],
])('a moved value is told in a sentence (%s)', (now, sentence) => {
  expect(describeMoved({ symbol: 'CN', caseId: 'storm', recorded: '5.50 dB', now }, () => 'Storm')).toBe(sentence);
});
