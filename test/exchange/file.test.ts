import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import {
  fileNameFor,
  readWorksheetBytes,
  readWorksheetFile,
  writeWorksheetFile,
  type FileFault,
  type ReadWorksheet,
} from '../../src/exchange';
import { allLines, applyAll, editProblem, type Worksheet } from '../../src/worksheet';
import { editDraws, editOf, MANY, worksheets } from '../worksheet/arbitrary';
import { EXAMPLE, exampleDocument } from './example';

function read(text: string): ReadWorksheet {
  const result = readWorksheetFile(text);
  if (!result.ok) throw new Error(result.fault.sentence);
  return result.value;
}

function faultOf(text: string): FileFault | undefined {
  const result = readWorksheetFile(text);
  return result.ok ? undefined : result.fault;
}

/** The example with something put at a path; undefined takes the key away. */
function changed(path: readonly (string | number)[], value: unknown): string {
  const document = exampleDocument();
  const last = path[path.length - 1] ?? '';
  const holder = path
    .slice(0, -1)
    .reduce<Record<string | number, unknown>>(
      (object, key) => object[key] as Record<string | number, unknown>,
      document,
    );
  if (value === undefined) Reflect.deleteProperty(holder, last);
  else holder[last] = value;
  return JSON.stringify(document);
}

describe('a good file', () => {
  it('gives the worksheet it holds', () => {
    const { worksheet, readOnly } = read(EXAMPLE);
    expect(readOnly).toBeUndefined();
    expect(worksheet).toMatchObject({ id: '6f1c2d3e-0000-4000-8000-000000000001', title: 'Harbour buoy uplink' });
    expect(worksheet.cases).toEqual([
      { id: 'calm', name: 'Calm' },
      { id: 'storm', name: 'Storm', xColour: 3 },
    ]);
    expect(allLines(worksheet)[0]).toMatchObject({
      symbol: 'P_tx',
      entry: '14 dBm',
      byCase: { storm: '13 dBm' },
      digits: 1,
    });
    expect(worksheet).not.toHaveProperty('format');
  });

  it('is written again byte for byte', () => {
    expect(writeWorksheetFile(read(EXAMPLE).worksheet)).toBe(EXAMPLE);
  });

  it('gives chains, pools and curves with what they hold, and keeps sections of other kinds word for word', () => {
    const [, chain, pool, curve, other] = read(EXAMPLE).worksheet.sections;
    expect(chain).toEqual((exampleDocument()['sections'] as unknown[])[1]);
    expect(pool).toMatchObject({ kind: 'pool', symbol: 'N_I', unit: 'dBm', lines: [{ symbol: 'I_1' }] });
    expect(curve).toMatchObject({
      kind: 'curve',
      symbol: 'G_scan',
      points: [
        [0, 32],
        [10, 31.6],
      ],
    });
    expect(other).toEqual({
      id: 'later',
      kind: 'waterfall',
      title: 'Not known yet',
      content: (exampleDocument()['sections'] as unknown[])[4],
    });
  });

  it('tells of sections that are kept and not evaluated', () => {
    expect(read(EXAMPLE).messages).toEqual([
      'Sections that cannot be evaluated here are kept as they are: “Not known yet” (waterfall).',
    ]);
  });

  it.each([
    [
      'a bypass that is neither true nor false',
      ['sections', 1, 'stages', 0, 'off'],
      'yes',
      'sections[1].stages[0].off',
    ],
    [
      'a value of a stage that is no text',
      ['sections', 1, 'stages', 0, 'selectivity'],
      3,
      'sections[1].stages[0].selectivity',
    ],
    ['a way of adding that there is none of', ['sections', 1, 'intercept'], 'sometimes', 'sections[1].intercept'],
    ['an interpolation that there is none of', ['sections', 3, 'interpolation'], 'wild', 'sections[3].interpolation'],
    ['a point that is no pair', ['sections', 3, 'points', 0], [1], 'sections[3].points[0]'],
    [
      'a requirement with two bounds',
      ['sections', 2, 'requirement'],
      { atLeast: '1', atMost: '2' },
      'sections[2].requirement',
    ],
  ])('refuses %s, with the place', (_what, path, value, place) => {
    expect(faultOf(changed(path, value))).toMatchObject({ code: 'wrong-shape', path: place });
  });

  it('refuses two stages with one id', () => {
    const stages = (exampleDocument()['sections'] as { stages: unknown[] }[])[1]?.stages ?? [];
    expect(faultOf(changed(['sections', 1, 'stages'], [...stages, ...stages]))).toMatchObject({
      code: 'id-given-twice',
      path: 'sections[1].stages[1].id',
    });
  });

  it('keeps entries for a case that it has not, and says so', () => {
    const text = changed(['sections', 0, 'lines', 1, 'byCase'], { ice: '1 dB' });
    const { worksheet, messages } = read(text);
    expect(allLines(worksheet)[1]?.byCase).toEqual({ ice: '1 dB' });
    expect(messages[0]).toBe(
      'One line has an entry for the case “ice”, which this worksheet does not have; kept and not used.',
    );
  });

  it('may begin with a byte-order mark and be laid out in any way', () => {
    const loose = `\ufeff \n\t${JSON.stringify(exampleDocument())}\r\n `;
    expect(writeWorksheetFile(read(loose).worksheet)).toBe(EXAMPLE);
  });

  it('may have its keys in any order: they are put in order', () => {
    const reverse = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(reverse);
      if (typeof value !== 'object' || value === null) return value;
      return Object.fromEntries(
        Object.entries(value)
          .reverse()
          .map(([key, item]) => [key, reverse(item)]),
      );
    };
    const { sections, ...document } = exampleDocument();
    const lines = { ...document, sections: (sections as unknown[]).slice(0, 1) };
    const canonical = writeWorksheetFile(read(JSON.stringify(lines)).worksheet);
    const turned = writeWorksheetFile(read(JSON.stringify(reverse(lines))).worksheet);
    expect(JSON.parse(turned)).toEqual(JSON.parse(canonical));
    expect(turned.replace(/"deep"[^\]]*\]/, '')).toBe(canonical.replace(/"deep"[^\]]*\]/, ''));
  });
});

describe('laws', () => {
  it('reading what was written gives an equal worksheet, and writing that the same text', MANY, () => {
    fc.assert(
      fc.property(worksheets, (worksheet) => {
        const text = writeWorksheetFile(worksheet);
        const again = read(text).worksheet;
        expect(again).toEqual(worksheet);
        expect(writeWorksheetFile(again)).toBe(text);
        expect(text.endsWith('}\n')).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  it('a worksheet that edits have changed without a problem can be read again', MANY, () => {
    fc.assert(
      fc.property(worksheets, fc.array(editDraws, { maxLength: 10 }), (start, draws) => {
        let worksheet = start;
        for (const draw of draws) {
          const edit = editOf(worksheet, draw);
          if (edit === undefined || editProblem(worksheet, edit) !== undefined) continue;
          worksheet = applyAll(worksheet, edit.changes).worksheet;
        }
        expect(read(writeWorksheetFile(worksheet)).worksheet).toEqual(worksheet);
      }),
      { numRuns: 200 },
    );
  });

  it(
    '2,000 mutants of a file are read or refused with a place, and never throw; what is read can be written and read',
    MANY,
    () => {
      const piece = fc.oneof(
        fc.constantFrom(
          '"',
          '{',
          '}',
          '[',
          ']',
          ',',
          ':',
          '\\',
          '\n',
          '0',
          '-',
          '1e999',
          'null',
          '"__proto__":1,',
          '\ud800',
        ),
        fc.string({ maxLength: 5 }),
      );
      const mutation = fc.record({ at: fc.nat(EXAMPLE.length), drop: fc.nat(12), put: piece });
      let readCount = 0;
      let refusedCount = 0;
      fc.assert(
        fc.property(fc.array(mutation, { minLength: 1, maxLength: 3 }), (mutations) => {
          let text = EXAMPLE;
          for (const { at, drop, put } of mutations) text = text.slice(0, at) + put + text.slice(at + drop);
          const result = readWorksheetFile(text);
          if (result.ok) {
            readCount++;
            expect(read(writeWorksheetFile(result.value.worksheet)).worksheet).toEqual(result.value.worksheet);
          } else {
            refusedCount++;
            expect(result.fault.sentence).toMatch(/\.\)?$/);
          }
        }),
        { numRuns: 2000, seed: 20_261_103 },
      );
      expect(readCount).toBeGreaterThan(50);
      expect(refusedCount).toBeGreaterThan(500);
    },
  );

  it('a file cut off anywhere is refused', MANY, () => {
    fc.assert(
      fc.property(fc.nat(EXAMPLE.length - 2), (length) => {
        expect(faultOf(EXAMPLE.slice(0, length))?.code).toMatch(/^(bad-json|not-a-worksheet)$/);
      }),
      { numRuns: 300 },
    );
  });
});

describe('a bad file is refused with the place and what was expected', () => {
  const shapes: [string, readonly (string | number)[], unknown, string, string][] = [
    [
      'a number for an entry',
      ['sections', 0, 'lines', 1, 'entry'],
      14,
      'sections[0].lines[1].entry',
      'sections[0].lines[1].entry: text expected, number 14 found.',
    ],
    [
      'no entry',
      ['sections', 0, 'lines', 1, 'entry'],
      undefined,
      'sections[0].lines[1].entry',
      'sections[0].lines[1].entry: missing.',
    ],
    ['no title', ['title'], undefined, 'title', 'title: missing.'],
    ['a null summary', ['summary'], null, 'summary', 'summary: text expected, null found.'],
    ['no cases', ['cases'], [], 'cases', 'cases: at least one case expected, an empty list found.'],
    ['an empty id', ['cases', 0, 'id'], '', 'cases[0].id', 'cases[0].id: an id that is not empty expected, “” found.'],
    [
      'a list of lines that is none',
      ['sections', 0, 'lines'],
      {},
      'sections[0].lines',
      'sections[0].lines: a list expected, an object found.',
    ],
    [
      'a strange quantity',
      ['sections', 0, 'lines', 0, 'quantity'],
      'loudness',
      'sections[0].lines[0].quantity',
      'one of level, gain',
    ],
    [
      'a strange side',
      ['sections', 0, 'lines', 0, 'side'],
      'left',
      'sections[0].lines[0].side',
      'one of wanted, unwanted expected, “left” found',
    ],
    [
      'a strange shape',
      ['sections', 0, 'lines', 0, 'tolerance', 'shape'],
      'flat',
      'sections[0].lines[0].tolerance.shape',
      'one of uniform',
    ],
    [
      'two bounds',
      ['sections', 0, 'lines', 0, 'requirement'],
      { atLeast: '1', atMost: '2' },
      'sections[0].lines[0].requirement',
      'either atLeast or atMost',
    ],
    [
      'a list for entries by case',
      ['sections', 0, 'lines', 0, 'byCase'],
      ['1 dB'],
      'sections[0].lines[0].byCase',
      'an object expected, a list found',
    ],
    [
      'a number by case',
      ['sections', 0, 'lines', 0, 'byCase', 'storm'],
      13,
      'sections[0].lines[0].byCase.storm',
      'text expected',
    ],
    [
      'half a digit',
      ['sections', 0, 'lines', 0, 'digits'],
      0.5,
      'sections[0].lines[0].digits',
      'a whole number expected',
    ],
    [
      'too long a text',
      ['sections', 0, 'lines', 0, 'note'],
      'x'.repeat(65_537),
      'sections[0].lines[0].note',
      'text of at most 65536 characters expected, text of 65537 characters found',
    ],
    [
      'an accepted finding without reason',
      ['sections', 0, 'lines', 0, 'accepted', 0, 'reason'],
      undefined,
      'sections[0].lines[0].accepted[0].reason',
      'missing',
    ],
    [
      'a stage without symbol',
      ['sections', 1, 'stages', 0, 'symbol'],
      undefined,
      'sections[1].stages[0].symbol',
      'missing',
    ],
    [
      'a bad line in a pool',
      ['sections', 2, 'lines', 0, 'entry'],
      [],
      'sections[2].lines[0].entry',
      'text expected, an empty list found',
    ],
    [
      'a point of three numbers',
      ['sections', 3, 'points', 0],
      [1, 2, 3],
      'sections[3].points[0]',
      'a pair of numbers expected',
    ],
    ['a section that is text', ['sections', 4], 'text', 'sections[4]', 'an object expected, “text” found'],
    ['recorded values that are none', ['recorded', 'SINR'], '3 dB', 'recorded.SINR', 'an object expected'],
  ];

  it.each(shapes)('%s', (_, path, value, place, sentence) => {
    const fault = faultOf(changed(path, value));
    expect(fault).toMatchObject({ code: 'wrong-shape', path: place });
    expect(fault?.sentence).toContain(sentence);
  });

  const ids: [string, readonly (string | number)[], string, string, string][] = [
    ['case', ['cases', 1, 'id'], 'calm', 'cases[1].id', 'cases[0].id'],
    ['section', ['sections', 2, 'id'], 'tx', 'sections[2].id', 'sections[0].id'],
    ['line', ['sections', 0, 'lines', 1, 'id'], 'l1', 'sections[0].lines[1].id', 'sections[0].lines[0].id'],
    ['line of a pool', ['sections', 2, 'lines', 0, 'id'], 'l1', 'sections[2].lines[0].id', 'sections[0].lines[0].id'],
  ];

  it.each(ids)('an id given to a second %s', (_, path, value, place, earlier) => {
    const fault = faultOf(changed(path, value));
    expect(fault).toMatchObject({ code: 'id-given-twice', path: place });
    expect(fault?.sentence).toContain(`is given to ${earlier} too`);
  });

  it.each(['__proto__', 'constructor', 'prototype'])('the key %s, wherever it stands', (key) => {
    const nested = EXAMPLE.replace('"storm": "13 dBm"', `"${key}": "13 dBm"`);
    expect(faultOf(nested)).toMatchObject({ code: 'refused-key', path: `sections[0].lines[0].byCase.${key}` });
    const hidden = EXAMPLE.replace('"xTool"', `"\\u00${key.charCodeAt(0).toString(16)}${key.slice(1)}"`);
    expect(faultOf(hidden)).toMatchObject({ code: 'refused-key', path: key });
    const unknown = EXAMPLE.replace('"anything": {}', `"anything": [{ "${key}": {} }]`);
    expect(faultOf(unknown)).toMatchObject({ code: 'refused-key', path: `sections[4].anything[0].${key}` });
    expect(faultOf(changed(['cases', 1, 'id'], key))).toMatchObject({ code: 'refused-key', path: 'cases[1].id' });
  });

  it('a key given twice, whose first value would be lost without a word', () => {
    const fault = faultOf(EXAMPLE.replace('"entry": "14 dBm"', '"entry": "14 dBm", "entry": "17 dBm"'));
    expect(fault).toMatchObject({ code: 'key-given-twice', path: 'sections[0].lines[0].entry' });
    const line = EXAMPLE.slice(0, EXAMPLE.indexOf('"entry": "14 dBm"')).split('\n').length;
    expect(fault?.sentence).toContain(`Line ${String(line)}, column 30: The key “entry” is given twice`);
  });

  it.each([
    ['an empty text', '', 'Line 1, column 1: a value is expected, the end of the text found.'],
    ['a comma too many', '{"a": 1,\n }', 'Line 2, column 2: a key in double quotes is expected, “}” found.'],
    ['a missing comma', '[1\n  2]', 'Line 2, column 3: a comma or ] is expected, “2” found.'],
    ['text after the end', '{} x', 'Line 1, column 4: the end of the text is expected, “x” found.'],
    ['a comment', '{ // no\n}', 'a key in double quotes is expected, “/” found'],
    ['a line break in a text', '["a\nb"]', 'a double quote before the end of the line'],
    ['a bad escape', '["\\x"]', 'an escape such as'],
    ['a number that JSON has not', '[01]', 'a comma or ] is expected, “1” found'],
  ])('%s', (_, text, sentence) => {
    const fault = faultOf(text);
    expect(fault?.code).toBe('bad-json');
    expect(fault?.sentence).toContain(sentence);
  });

  it('a number beyond all range, which would be written as null', () => {
    const fault = faultOf(EXAMPLE.replace('31.6', '1e999'));
    expect(fault).toMatchObject({ code: 'number-too-large', path: 'sections[3].points[1][1]' });
  });

  it.each([
    ['[]', 'not-a-worksheet'],
    ['"levelwright-worksheet"', 'not-a-worksheet'],
    ['{"format": "something-else", "version": 1}', 'not-a-worksheet'],
    ['{"format": "levelwright-worksheet"}', 'wrong-shape'],
    ['{"format": "levelwright-worksheet", "version": "1"}', 'wrong-shape'],
    ['{"format": "levelwright-worksheet", "version": 0}', 'wrong-shape'],
    ['{"format": "levelwright-worksheet", "version": 1.5}', 'wrong-shape'],
  ])('%s is no worksheet: %s', (text, code) => {
    expect(faultOf(text)?.code).toBe(code);
  });
});

describe('limits', () => {
  const nested = (depth: number, extra: number): string =>
    EXAMPLE.replace('"anything": {}', `"anything": ${'['.repeat(depth - extra)}${']'.repeat(depth - extra)}`);

  it('nesting of 64 is read, 65 is not', () => {
    // The list stands inside the document, the list of sections and the section.
    expect(readWorksheetFile(nested(64, 3)).ok).toBe(true);
    expect(faultOf(nested(65, 3))).toMatchObject({ code: 'nested-too-deeply', path: 'sections[4].anything…' });
  });

  it.each(['[', '{"a":', '[{"a":'])('a bomb of a million %s is refused for its nesting', (piece) => {
    expect(faultOf(piece.repeat(1_000_000))?.code).toBe('nested-too-deeply');
  });

  it('a file over 32 MiB is refused unread, also when its bytes only are too many', () => {
    expect(faultOf(' '.repeat(32 * 1024 * 1024 + 1))?.code).toBe('too-large');
    expect(faultOf('€'.repeat(11 * 1024 * 1024))?.code).toBe('too-large');
    expect(faultOf('€'.repeat(1024))?.code).toBe('bad-json');
    const bytes = readWorksheetBytes(new Uint8Array(32 * 1024 * 1024 + 1));
    expect(bytes.ok ? undefined : bytes.fault.code).toBe('too-large');
  });

  it('100,000 lines are read, one more is not, stages and pools counted', MANY, () => {
    const line = (i: number): unknown => ({ id: `n${String(i)}`, symbol: '', label: '', entry: '' });
    const many = Array.from({ length: 99_998 }, (_, i) => line(i));
    expect(read(changed(['sections', 0, 'lines'], many)).worksheet.sections[0]).toHaveProperty('lines.length', 99_998);
    expect(faultOf(changed(['sections', 0, 'lines'], [...many, line(99_998)]))).toMatchObject({
      code: 'too-many-lines',
    });
  });
});

describe('versions', () => {
  it('a later one opens read-only with a message', () => {
    const { readOnly, worksheet } = read(changed(['version'], 2));
    expect(readOnly).toMatch(/version 2 .* version 1 is the last one known here.* not changed/);
    expect(worksheet.title).toBe('Harbour buoy uplink');
  });

  it('a later one in a form that is not understood is refused as such', () => {
    const later = JSON.stringify({ ...exampleDocument(), version: 3, cases: 'elsewhere' });
    const fault = faultOf(later);
    expect(fault).toMatchObject({ code: 'later-version', path: 'cases' });
    expect(fault?.sentence).toMatch(/version 3 .*cases: a list expected, “elsewhere” found.*newer Levelwright/);
  });
});

describe('bytes', () => {
  it('are read as UTF-8, with or without a byte-order mark', () => {
    const bytes = new TextEncoder().encode(EXAMPLE);
    const marked = Uint8Array.of(0xef, 0xbb, 0xbf, ...bytes);
    for (const each of [bytes, marked]) {
      const result = readWorksheetBytes(each);
      expect(result.ok && writeWorksheetFile(result.value.worksheet)).toBe(EXAMPLE);
    }
  });

  it('that are no UTF-8 are refused, not guessed at', () => {
    const result = readWorksheetBytes(Uint8Array.of(0x7b, 0xb5, 0x7d));
    expect(result.ok ? undefined : result.fault.code).toBe('not-text');
  });
});

describe('what is written', () => {
  it('never holds a key that would be refused on reading', () => {
    const worksheet: Worksheet = {
      ...read(EXAMPLE).worksheet,
      recorded: { constructor: { calm: '1 dB' }, M: { calm: '2 dB' } },
    };
    expect(read(writeWorksheetFile(worksheet)).worksheet.recorded).toEqual({ M: { calm: '2 dB' } });
  });

  it.each([
    ['Harbour buoy uplink', 'harbour-buoy-uplink.budget.json'],
    ['  Ka/Ku: été & Ωmega #2 ', 'ka-ku-ete-ωmega-2.budget.json'],
    ['港の浮標', '港の浮標.budget.json'],
    ['../../etc/passwd', 'etc-passwd.budget.json'],
    ['', 'worksheet.budget.json'],
    ['???', 'worksheet.budget.json'],
    ['a'.repeat(100), `${'a'.repeat(60)}.budget.json`],
  ])('under the name for “%s” is %s', (title, name) => {
    expect(fileNameFor(title)).toBe(name);
  });
});
