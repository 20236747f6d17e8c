/** `evaluate` as text, Markdown and CSV: what stands in them, and that no text of a file breaks out of its place. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { CAUTIONS } from '../../src/review';
import { fileOf, fileOfLines, runOn } from './support';

const SHEET = fileOf(
  [
    'P | dBm | level = 14 dBm # Power @ storm: 13 dBm',
    'L | dB | loss = 2 dB # Feeder',
    'EIRP | dBm | level = P - L # Radiated require <= 11.5 dBm',
    'B = 125 kHz # Bandwidth',
    'N = P + P # Wrong',
    'Q = N - L # Waiting',
  ].join('\n'),
  'calm',
  'storm',
);

const print = (format: string, content = SHEET, ...options: readonly string[]): string =>
  runOn(content, 'evaluate', 'sheet', '--format', format, ...options).results;

describe('text', () => {
  const rows = print('text').split('\n');

  it('has a row a line, figures right-aligned under their case, and the requirement in words', () => {
    expect(rows.slice(0, 9)).toEqual([
      'test',
      '',
      'Symbol  Line              calm        storm  Requirement',
      '',
      'all',
      'P       Power        14.00 dBm    13.00 dBm',
      'L       Feeder         2.00 dB      2.00 dB',
      'EIRP    Radiated     12.00 dBm    11.00 dBm  at most 11.5 dBm; calm: NOT MET, 0.50 dB short; storm: met, margin 0.50 dB',
      'B       Bandwidth      125 kHz      125 kHz',
    ]);
    expect(rows[9]).toBe('N       Wrong         withheld     withheld');
    expect(rows[10]).toBe('Q       Waiting    waits for N  waits for N');
  });

  it('has the findings below, with their case where it is not in all', () => {
    expect(rows.filter((row) => row.startsWith('error levels-summed'))).toEqual([
      expect.stringMatching(/^error levels-summed: N \(calm\): P and P are levels/),
      expect.stringMatching(/^error levels-summed: N \(storm\): P and P are levels/),
    ]);
    expect(rows.filter((row) => row.startsWith('error waiting: Q: Waits for N'))).toHaveLength(1);
  });

  it('ends with the cautions', () => {
    expect(rows.slice(-4)).toEqual([...CAUTIONS, '']);
  });

  it('has linear values on request', () => {
    expect(print('text', SHEET, '--linear')).toMatch(/14\.00 dBm \(25\.12 mW\) {2}13\.00 dBm \(19\.95 mW\)\n/);
    expect(print('text', SHEET, '--linear')).toMatch(/2\.00 dB \(× 1\.585\)/);
    expect(print('text', SHEET, '--linear')).toMatch(/125 kHz {2,}125 kHz\n/);
  });

  it('has the chosen lines and cases alone, in the order of the worksheet', () => {
    const chosen = print('text', SHEET, '--line', 'EIRP', '--line', 'P', '--case', 'storm').split('\n');
    expect(chosen.slice(2, 7)).toEqual([
      'Symbol  Line          storm  Requirement',
      '',
      'all',
      'P       Power     13.00 dBm',
      'EIRP    Radiated  11.00 dBm  at most 11.5 dBm; met, margin 0.50 dB',
    ]);
  });

  it('keeps a line on its row, whatever its texts hold', () => {
    const label = 'one\ntwo\r\nthree\u2028four\u0085five\u001b[31mred\u0007 \u202eturned';
    const [row, ...more] = print('text', fileOfLines([{ symbol: 'x', label, entry: '1 dB' }]))
      .split('\n')
      .filter((one) => one.startsWith('x '));
    expect([row, more]).toEqual(['x       one two three four five [31mred   turned  1.00 dB', []]);
  });
});

describe('requirements in words', () => {
  it.each([
    ['x | dB = 3.96 dB require >= 1 dB', 'at least 1 dB; met, margin 2.96 dB'],
    ['x | dB = 0.6 dB require >= 1 dB', 'at least 1 dB; NOT MET, 0.40 dB short'],
    ['x | dB = 1 dB require >= 1 dB', 'at least 1 dB; met, margin 0.00 dB'],
    ['x | dB = 0.999 dB require >= 1 dB', 'at least 1 dB; NOT MET, less than 0.01 dB short'],
    ['x | dBm = 0 dBm require <= 2 mW', 'at most 2 mW; met, margin 3.01 dB'],
    ['x | K = 200 K require <= 250 K', 'at most 250 K; met, margin 50 K'],
    ['x = 2.5e-6 require <= 1e-6', 'at most 1e-6; NOT MET, 1.5×10⁻⁶ short'],
    ['x = 868.3 MHz require >= 863 MHz', 'at least 863 MHz; met, margin 5.3 MHz'],
    ['x | dBm = 0 W require >= -100 dBm', 'at least -100 dBm; NOT MET, no power'],
    ['x | dBm = 0 W require <= -100 dBm', 'at most -100 dBm; met, no power'],
    ['x | dB = 3 dB require >= 1 K', 'at least 1 K; not known, the bound cannot be read'],
    ['x | dB = 1/0 require >= 1 dB', 'at least 1 dB; not known, the value is withheld'],
    ['x | dB =  require >= 1 dB', 'at least 1 dB; not known, there is no entry'],
  ])('%s', (line, words) => {
    const row = print('text', fileOf(line))
      .split('\n')
      .find((one) => one.startsWith('x'));
    expect(row?.endsWith(words) === true ? words : row).toBe(words);
  });
});

describe('Markdown', () => {
  it('is a table a section, with findings and cautions as lists', () => {
    const rows = print('markdown').split('\n');
    expect(rows.slice(0, 8)).toEqual([
      '# test',
      '',
      '## all',
      '',
      '| Symbol | Line | calm | storm | Requirement |',
      '| --- | --- | ---: | ---: | --- |',
      '| P | Power | 14.00 dBm | 13.00 dBm |  |',
      '| L | Feeder | 2.00 dB | 2.00 dB |  |',
    ]);
    expect(rows).toContain('## Findings');
    expect(rows).toContain('- error waiting: Q: Waits for N, which has no value yet.');
    expect(rows.slice(rows.indexOf('## Cautions'))).toEqual([
      '## Cautions',
      '',
      ...CAUTIONS.map((one) => `- ${one}`),
      '',
    ]);
  });

  it.each([
    ['a | b', 'a \\| b'],
    ['*a* _b_ `c`', '\\*a\\* \\_b\\_ \\`c\\`'],
    ['<img src=x onerror=y>', '\\<img src=x onerror=y\\>'],
    ['[a](b)', '\\[a\\](b)'],
    ['&lt;b&gt; R&D', '\\&lt;b\\&gt; R\\&D'],
    ['~~a~~ $b$ #c', '\\~\\~a\\~\\~ \\$b\\$ \\#c'],
    ['back\\slash', 'back\\\\slash'],
    ['two\n\n# lines', 'two \\# lines'],
    ['carriage\rreturn', 'carriage return'],
  ])('shows %j as it is', (label, escaped) => {
    const file = fileOfLines([{ symbol: 'x', label, entry: '1 dB' }], { title: label });
    expect(
      print('markdown', file)
        .split('\n')
        .slice(0, 7)
        .filter((row) => row !== ''),
    ).toEqual([
      `# ${escaped}`,
      '## all',
      '| Symbol | Line | Nominal | Requirement |',
      '| --- | --- | ---: | --- |',
      `| x | ${escaped} | 1.00 dB |  |`,
    ]);
  });
});

/** A reader of CSV by RFC 4180, strict: anything that it does not foresee is an error. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let at = 0;
  while (at < text.length) {
    const match = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/y;
    match.lastIndex = at;
    const found = match.exec(text);
    if (found === null) throw new Error(`no CSV at ${JSON.stringify(text.slice(at, at + 20))}`);
    row.push(found[1]?.replaceAll('""', '"') ?? found[2] ?? '');
    at = match.lastIndex;
    if (found[3] === ',') continue;
    rows.push(row);
    row = [];
  }
  if (row.length > 0) throw new Error('the last row has no end');
  return rows;
}

/** The rows of a worksheet's CSV, each by the names of its columns. */
function records(content: string, ...options: readonly string[]): Record<string, string>[] {
  const [head = [], ...rows] = readCsv(print('csv', content, ...options));
  return rows.map((row) => {
    expect(row).toHaveLength(head.length);
    return Object.fromEntries(head.map((name, column) => [name, row[column] ?? '']));
  });
}

describe('CSV', () => {
  it('has a row a line and case, with values in full', () => {
    const rows = records(fileOf('x | dB = 1/3 * 1 dB # Third require >= 0.5 dB\ny = x + x # Both', 'calm', 'storm'));
    expect(rows.map((row) => [row['symbol'], row['case'], row['value']])).toEqual([
      ['x', 'calm', '0.3333333333333333'],
      ['x', 'storm', '0.3333333333333333'],
      ['y', 'calm', '0.6666666666666666'],
      ['y', 'storm', '0.6666666666666666'],
    ]);
    expect(rows[0]).toEqual({
      section: 'all',
      symbol: 'x',
      label: 'Third',
      case: 'calm',
      value: '0.3333333333333333',
      unit: 'dB',
      requirement: 'at least 0.5 dB',
      met: 'no',
      margin: String(1 / 3 - 0.5),
      'margin unit': 'dB',
      findings: '',
    });
  });

  it('has linear values on request', () => {
    expect(records(fileOf('x = -30 dBm'), '--linear')).toMatchObject([
      { value: '-30', linear: '0.000001', 'linear unit': 'W' },
    ]);
    expect(records(fileOf('x = -30 dBm'))[0]).not.toHaveProperty('linear');
  });

  it('leaves empty what is not there', () => {
    expect(records(fileOf('x | dBm = 0 W require >= 0 dBm\ny = 1/0\nz = y + 1'))).toMatchObject([
      { symbol: 'x', value: '', unit: 'dBm', met: 'no', margin: '', findings: '' },
      { symbol: 'y', value: '', unit: '', findings: 'not-finite' },
      { symbol: 'z', value: '', unit: '', findings: 'waiting' },
    ]);
  });

  it.each([
    '=1+1',
    '+1',
    '-1',
    '@SUM(A1)',
    '\t=1',
    '\r=1',
    '\n=1',
    '＝1',
    '＋1',
    '－1',
    '＠x',
    '  =1',
    '\u200b=1',
    '\ufeff@x',
    '\u0000-1',
  ])('puts an apostrophe before the text %j', (label) => {
    const [row] = records(fileOfLines([{ symbol: 'x', label, entry: '1 dB' }]));
    expect(row?.['label']).toBe(`'${label}`);
  });

  it.each(['a=b', 'a-b', "'x", '"quoted", with comma', 'two\r\nlines', 'µ ≥ −3', ''])(
    'keeps the text %j as it is',
    (label) => {
      const [row] = records(fileOfLines([{ symbol: 'x', label, entry: '1 dB' }]));
      expect(row?.['label']).toBe(label);
    },
  );

  it('guards every text of a file', () => {
    const file = fileOfLines([{ id: 'l', symbol: '=s', label: '=l', entry: '1 dB', requirement: { atLeast: '=3' } }], {
      cases: [{ id: '=c', name: '=n' }],
    });
    const [head, ...rows] = readCsv(print('csv', file));
    expect(head?.some((cell) => cell.startsWith('='))).toBe(false);
    for (const cell of rows.flat()) expect(cell).not.toMatch(/^[=+@]/);
    expect(rows[0]).toEqual(expect.arrayContaining(["'=s", "'=l", "'=c", 'at least =3']));
  });

  it('does not touch numbers below nought', () => {
    expect(records(fileOf('x = -103.25 dBm require >= -100 dBm'))).toMatchObject([
      { value: '-103.25', margin: '-3.25' },
    ]);
  });

  it('gives back every text, and no cell that a program might run', () => {
    const hostile = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 12 }),
      fc
        .array(fc.constantFrom('=', '+', '-', '@', '"', ',', '\r', '\n', '\t', ' ', "'", 'x', '＝'), { maxLength: 8 })
        .map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(hostile, hostile, (label, title) => {
        const lines = [{ id: 'l', symbol: 'x', label, entry: '-1 dB' }];
        const [row] = records(fileOfLines([], { sections: [{ id: 's', kind: 'lines', title, lines }] }));
        for (const [found, typed] of [
          [row?.['label'], label],
          [row?.['section'], title],
        ] as const) {
          expect(found === typed || found === `'${typed}`).toBe(true);
          expect(found).not.toMatch(/^\s*[=+\-@＝＋－＠\t\r\n]/u);
        }
        expect(row?.['value']).toBe('-1');
      }),
      { numRuns: 200 },
    );
  });
});

it('says of a pool which lines are switched off', () => {
  const lines = [
    { id: 'a', symbol: 'A', label: 'thermal', entry: '-100 dBm' },
    { id: 'b', symbol: 'B', label: 'image', entry: '-90 dBm', off: true },
  ];
  const pool = { id: 'p', kind: 'pool', symbol: 'N_I', title: 'Noise', lines } as const;
  const rows = print('text', fileOfLines([], { sections: [pool] })).split('\n');
  expect(rows.filter((row) => row.includes('(switched off)'))).toEqual([
    expect.stringMatching(/^B +image \(switched off\) +-90\.00 dBm$/),
  ]);
});
