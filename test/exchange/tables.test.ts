import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  linesFromPreview,
  previewTable,
  readCopiedLines,
  readTabSeparated,
  readWorksheetFile,
  tableOfLines,
  writeCopiedLines,
  writeTabSeparated,
  type PastePreview,
} from '../../src/exchange';
import * as w from '../../src/worksheet';
import { MANY, worksheets } from '../worksheet/arbitrary';
import { EXAMPLE } from './example';

/** A preview in short: its columns and, for each row, symbol | label | entry | note. */
function short(preview: PastePreview): { columns: string; rows: string[]; problems: string[] } {
  return {
    columns: preview.columns.join(', '),
    rows: preview.rows.map((row) => [row.symbol, row.label, row.entry, row.note].join(' | ')),
    problems: preview.problems.map((problem) =>
      problem.row === undefined ? problem.code : `${problem.code} ${String(problem.row)}`,
    ),
  };
}

describe('tab-separated text', () => {
  it.each([
    [
      'a\tb\r\nc\td\r\n',
      [
        ['a', 'b'],
        ['c', 'd'],
      ],
    ],
    ['a\tb\nc', [['a', 'b'], ['c']]],
    ['a\rb', [['a'], ['b']]],
    ['x\t"line1\nline2"\ty', [['x', 'line1\nline2', 'y']]],
    ['"say ""hi"""\t', [['say "hi"', '']]],
    ['\t\t', [['', '', '']]],
    ['a\n\nb', [['a'], [''], ['b']]],
    ['', [['']]],
    ['5" dish\t"x" y', [['5" dish', '"x" y']]],
    ["'=A1\t'quoted'", [['=A1', "'quoted'"]]],
  ])('%j is read as %j', (text, rows) => {
    expect(readTabSeparated(text).rows).toEqual(rows);
  });

  it('tells where a quotation mark is not closed', () => {
    expect(readTabSeparated('a\n"b\tc\nd')).toEqual({ rows: [['a'], ['"b', 'c'], ['d']], unclosedQuoteRow: 2 });
  });

  it.each([
    ['=HYPERLINK("http://x")', '"\'=HYPERLINK(""http://x"")"'],
    ['@cmd', "'@cmd"],
    ['+1+2', "'+1+2"],
    ['＝1', "'＝1"],
    ['-P_tx', "'-P_tx"],
    ['-92.3 dBm', '-92.3 dBm'],
    ['-92.3', '-92.3'],
    ['14 dBm', '14 dBm'],
  ])('%s goes out as %s', (cell, written) => {
    expect(writeTabSeparated([[cell]])).toBe(`${written}\r\n`);
  });

  it('reads what it wrote', MANY, () => {
    const cell = fc.oneof(fc.string({ unit: 'grapheme' }), fc.stringMatching(/^['"=+\-@\t\r\n ab1]{0,6}$/));
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 1, maxLength: 4 }), { minLength: 1, maxLength: 4 }), (rows) => {
        expect(readTabSeparated(writeTabSeparated(rows)).rows).toEqual(rows);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('a pasted table', () => {
  const tables: [string, string, ReturnType<typeof short>][] = [
    [
      'label, figure, unit',
      'Transmit power\t14\tdBm',
      { columns: 'label, value, unit', rows: [' | Transmit power | 14 dBm | '], problems: [] },
    ],
    [
      'label, quantity',
      'Transmit power\t14 dBm\nBandwidth\t20 MHz',
      { columns: 'label, value', rows: [' | Transmit power | 14 dBm | ', ' | Bandwidth | 20 MHz | '], problems: [] },
    ],
    [
      'symbol, label, quantity',
      'P_tx\tTransmit power\t14 dBm',
      { columns: 'symbol, label, value', rows: ['P_tx | Transmit power | 14 dBm | '], problems: [] },
    ],
    [
      'symbol, quantity',
      'P_tx\t14 dBm\nB\t1 MHz',
      { columns: 'symbol, value', rows: ['P_tx |  | 14 dBm | ', 'B |  | 1 MHz | '], problems: [] },
    ],
    [
      'a one-word label is a label',
      'Gain\t3 dB',
      { columns: 'label, value', rows: [' | Gain | 3 dB | '], problems: [] },
    ],
    [
      'quantities alone',
      '14 dBm\n3 dB',
      { columns: 'value', rows: [' |  | 14 dBm | ', ' |  | 3 dB | '], problems: [] },
    ],
    [
      'all there is',
      'P_tx\tTransmit power\t14\tdBm\tdata sheet\tset to full',
      {
        columns: 'symbol, label, value, unit, note, note',
        rows: ['P_tx | Transmit power | 14 dBm | data sheet; set to full'],
        problems: [],
      },
    ],
    [
      'a heading, whose words go with notes of several columns',
      'Item\tValue\tUnit\tSource\tRemark\nPower\t14\tdBm\tdata sheet\tfull\nLoss\t2\tdB\t\tcable',
      {
        columns: 'label, value, unit, note, note',
        rows: [' | Power | 14 dBm | Source: data sheet; Remark: full', ' | Loss | 2 dB | Remark: cable'],
        problems: [],
      },
    ],
    [
      'a second value column',
      'Power\t14 dBm\t13 dBm',
      { columns: 'label, value, note', rows: [' | Power | 14 dBm | 13 dBm'], problems: [] },
    ],
    [
      'row numbers',
      '1\tPower\t14\tdBm\n2\tLoss\t2\tdB',
      {
        columns: 'left out, label, value, unit',
        rows: [' | Power | 14 dBm | ', ' | Loss | 2 dB | '],
        problems: ['column-left-out'],
      },
    ],
    [
      'units in brackets',
      'Power\t14\t[dBm]\nLoss\t2\t(dB)',
      { columns: 'label, value, unit', rows: [' | Power | 14 dBm | ', ' | Loss | 2 dB | '], problems: [] },
    ],
    [
      'typographic minus and blanks',
      'Floor\t\u2212174\u00a0dBm/Hz\nBand\t14\u202f250\tMHz',
      { columns: 'label, value, unit', rows: [' | Floor | -174 dBm/Hz | ', ' | Band | 14250 MHz | '], problems: [] },
    ],
    [
      'a heading line within',
      'Transmitter\t\nPower\t14 dBm\nLoss\t2 dB',
      { columns: 'label, value', rows: [' | Power | 14 dBm | ', ' | Loss | 2 dB | '], problems: [] },
    ],
    [
      'a line without a value',
      'Power\t14 dBm\nReceiver\t\nLoss\t2 dB',
      {
        columns: 'label, value',
        rows: [' | Power | 14 dBm | ', ' | Receiver |  | ', ' | Loss | 2 dB | '],
        problems: ['no-value 2'],
      },
    ],
    [
      'a dash for a value',
      'Power\t14 dBm\nLoss\t—',
      { columns: 'label, value', rows: [' | Power | 14 dBm | ', ' | Loss |  | —'], problems: ['no-value 2'] },
    ],
    [
      'formulas of another program',
      'Power\t14\tdBm\nEIRP\t=B1+B2\tdBm\nSum\t@SUM(B1:B2)\nDifference\t+B1-B2\tdB',
      {
        columns: 'label, value, unit',
        rows: [
          ' | Power | 14 dBm | ',
          ' | EIRP |  | formula in the source: =B1+B2 in dBm',
          ' | Sum |  | formula in the source: @SUM(B1:B2)',
          ' | Difference |  | formula in the source: +B1-B2 in dB',
        ],
        problems: ['formula-kept 2', 'formula-kept 3', 'formula-kept 4'],
      },
    ],
    [
      'words for a value',
      'Power\t14 dBm\nLoss\tabout 2 dB',
      {
        columns: 'label, value',
        rows: [' | Power | 14 dBm | ', ' | Loss | about 2 dB | '],
        problems: ['not-a-quantity 2'],
      },
    ],
    [
      'own entries',
      'EIRP\tRadiated\tP_tx + G_tx\t',
      {
        columns: 'symbol, label, value, note',
        rows: ['EIRP | Radiated | P_tx + G_tx | '],
        problems: ['not-a-quantity 1'],
      },
    ],
    [
      'rows of blanks',
      '\t\nPower\t14 dBm\n \t \n',
      { columns: 'label, value', rows: [' | Power | 14 dBm | '], problems: [] },
    ],
    ['a plus sign', 'Gain\t+3 dB', { columns: 'label, value', rows: [' | Gain | 3 dB | '], problems: [] }],
    [
      'a text that is not closed',
      'Power\t14 dBm\n"Loss\t2 dB',
      { columns: 'label, value', rows: [' | Power | 14 dBm | ', ' | "Loss | 2 dB | '], problems: ['unclosed-quote 2'] },
    ],
    ['nothing', '', { columns: '', rows: [], problems: [] }],
  ];

  it.each(tables)('with %s', (_, text, expected) => {
    expect(short(previewTable(text))).toEqual(expected);
  });

  it('shows its heading', () => {
    expect(previewTable('Item\tValue\nPower\t14 dBm').heading).toEqual(['Item', 'Value']);
    expect(previewTable('Power\t14 dBm').heading).toBeUndefined();
  });

  const figures: [string, string, string[], string][] = [
    ['a comma that can only be decimal', '2,5\n0,001\n12,75', ['2.5', '0.001', '12.75'], 'comma'],
    ['a point that can only be decimal', '2.5\n0.001', ['2.5', '0.001'], 'point'],
    ['both signs: the last is decimal', '1.234,5\n1.234', ['1234.5', '1234 !'], 'comma'],
    ['both signs the other way', '1,234.5\n1,234', ['1234.5', '1234 !'], 'point'],
    ['groups only', '1,234,567\n2,345', ['1234567', '2345 !'], 'point'],
    ['a comma before three digits, and nothing that tells', '1,234', ['1.234 !'], 'unclear'],
    ['a point before three digits, and nothing that tells', '1.234', ['1.234'], 'unclear'],
    ['a comma before three digits in a table of decimal commas', '1,234\n2,5', ['1.234', '2.5'], 'comma'],
    ['apostrophes and blanks as groups', "1'234.5\n14 250", ['1234.5', '14250'], 'point'],
    ['signs that contradict each other', '2,5\n2.5\n1,234', ['2.5', '2.5', '1.234 !'], 'unclear'],
    ['exponents', '1,5e-3\n2E\u22123', ['1.5e-3', '2e-3'], 'comma'],
    ['bare points', '.5\n5.', ['.5', '5.'], 'point'],
  ];

  it.each(figures)('reads %s', (_, text, expected, sign) => {
    const preview = previewTable(text);
    const told = new Set(preview.problems.filter((one) => one.code === 'decimal-unclear').map((one) => one.row));
    expect(preview.rows.map((row) => (told.has(row.row) ? `${row.entry} !` : row.entry))).toEqual(expected);
    expect(preview.decimalSign).toBe(sign);
  });

  it.each(['10 3', "1'2", '1.2.3', '1,23,4', '1.234,56.7', '1 234 56', '3 dB or so', `${'1'.repeat(65)} dB`])(
    'takes %s for no figure, and keeps it as it stands',
    (cell) => {
      const preview = previewTable(`Loss\t1 dB\nGain\t${cell}`);
      expect(short(preview)).toMatchObject({
        rows: [' | Loss | 1 dB | ', ` | Gain | ${cell} | `],
        problems: ['not-a-quantity 2'],
      });
    },
  );

  it('follows what the person decides', () => {
    const text = 'Loss\t1,234\tdB\nGain\t2\tdB';
    expect(previewTable(text, { decimalSign: 'point' }).rows[0]?.entry).toBe('1234 dB');
    expect(previewTable(text, { decimalSign: 'comma' }).problems).toEqual([]);
    expect(short(previewTable(text, { columns: ['label', 'value', 'left out'] })).rows).toEqual([
      ' | Loss | 1.234 | ',
      ' | Gain | 2 | ',
    ]);
    expect(previewTable(text, { hasHeading: true }).rows).toHaveLength(1);
  });

  it('takes 10,000 rows and tells of more', MANY, () => {
    const preview = previewTable('Loss\t1 dB\n'.repeat(10_001));
    expect(preview.rows).toHaveLength(10_000);
    expect(preview.problems.map((one) => one.sentence)).toEqual([
      'The table has 10001 rows; the first 10000 were taken. Paste the rest separately.',
    ]);
  });

  it('loses no filled cell, whatever it holds', MANY, () => {
    const cell = fc.oneof(
      fc.constantFrom('14', '14 dBm', 'dBm', 'P_tx', 'Transmit power', '=A1', '', '—', '1,234', '2,5 dB', '1', '2'),
      fc.stringMatching(/^[a-z%=+ ]{0,6}$/),
    );
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 1, maxLength: 5 }), { minLength: 1, maxLength: 5 }), (rows) => {
        const preview = previewTable(writeTabSeparated(rows));
        const kept = [
          ...preview.rows.flatMap((row) => [row.symbol, row.label, row.entry, row.note]),
          ...(preview.heading ?? []),
        ].join('\n');
        const bare = (text: string): string => text.replace(/[^\p{L}\p{N}]/gu, '');
        rows.forEach((cells, i) => {
          cells.forEach((text, column) => {
            if (preview.columns[column] === 'left out') return;
            const figure = /^\d+,\d+/.test(text) ? text.replace(',', '') : text;
            expect([i, text, bare(kept)]).toEqual([i, text, expect.stringContaining(bare(figure))]);
          });
        });
      }),
      { numRuns: 1000 },
    );
  });
});

describe('lines from a pasted table', () => {
  const sheet = w.newWorksheet('Buoy');

  it('have proposed symbols where the table has none, none alike, and none for a remark', () => {
    const preview = previewTable('Transmitter\t\nTransmit power\t14 dBm\nTransmit power\t15 dBm\nNote\t\nGain\t2 dBi', {
      hasHeading: false,
    });
    expect(linesFromPreview(sheet, preview).map((line) => [line.symbol, line.label, line.entry])).toEqual([
      ['', 'Transmitter', ''],
      ['P_tx', 'Transmit power', '14 dBm'],
      ['P_tx_2', 'Transmit power', '15 dBm'],
      ['', 'Note', ''],
      ['G', 'Gain', '2 dBi'],
    ]);
  });

  it('go in as one edit, whose symbols and references fit the worksheet', () => {
    const place = { sectionId: sheet.sections[0]?.id ?? '', index: 0 };
    const first = w.perform(w.startHistory(sheet), w.insertLine(sheet, place, { symbol: 'P_tx', entry: '1 dBm' }));
    const preview = previewTable('P_tx\tPower\t14 dBm\nEIRP\tRadiated\tP_tx + 2 dBi');
    const lines = linesFromPreview(first.worksheet, preview);
    const { edit, messages } = w.pasteLines(first.worksheet, w.placeAtEnd(first.worksheet, place.sectionId), {
      cases: [],
      lines,
    });
    const pasted = w.perform(first, edit);
    expect(w.allLines(pasted.worksheet).map((line) => `${line.symbol} = ${line.entry}`)).toEqual([
      'P_tx = 1 dBm',
      'P_tx_2 = 14 dBm',
      'EIRP = P_tx_2 + 2 dBi',
    ]);
    expect(messages).toEqual([]);
    expect(w.undo(pasted)?.history.worksheet).toEqual(first.worksheet);
  });

  it('put what cannot be a symbol into the note', () => {
    const preview = previewTable('T_0\tTemperature\t290 K', { columns: ['symbol', 'label', 'value'] });
    expect(short(preview)).toMatchObject({ rows: [' | Temperature | 290 K | T_0'], problems: ['bad-symbol 1'] });
    expect(linesFromPreview(sheet, preview)[0]).toMatchObject({ symbol: 'T', note: 'T_0' });
  });
});

describe('copied lines', () => {
  it('keep every field, unknown ones too', MANY, () => {
    fc.assert(
      fc.property(worksheets, (worksheet) => {
        const lines = w.allLines(worksheet);
        const copied = readCopiedLines(
          writeCopiedLines(
            worksheet,
            lines.map((line) => line.id),
          ),
        );
        expect(copied.ok && copied.value.lines).toEqual(lines);
        const used = new Set(lines.flatMap((line) => Object.keys(line.byCase ?? {})));
        for (const one of worksheet.cases)
          if (used.has(one.id)) expect(copied.ok && copied.value.cases).toContainEqual(one);
      }),
      { numRuns: 100 },
    );
  });

  it('from elsewhere are checked as a file is', () => {
    const forged = readCopiedLines('{"format":"levelwright-worksheet","version":1,"sections":[{"__proto__":{}}]}');
    expect(forged.ok ? undefined : forged.fault.code).toBe('refused-key');
  });

  it('go to other programs as a table of symbol, label, a cell for each case, note', () => {
    const example = readWorksheetFile(EXAMPLE);
    const worksheet = example.ok ? example.value.worksheet : w.newWorksheet();
    const rows = tableOfLines(worksheet, ['l1'], w.entryIn);
    expect(rows).toEqual([['P_tx', 'Transmit power', '14 dBm', '13 dBm', 'µ ≥ “quoted”\n\tsecond line']]);
    expect(writeTabSeparated(rows)).toBe('P_tx\tTransmit power\t14 dBm\t13 dBm\t"µ ≥ “quoted”\n\tsecond line"\r\n');
  });
});
