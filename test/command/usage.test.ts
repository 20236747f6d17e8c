/** Arguments and files that cannot be used: exit 2, nothing on standard output, and a sentence on standard error. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { caseOf, fileOf, fileOfLines, resultsOf, runOn, worldOf, type Results } from './support';

const SHEET = fileOf('P_tx = 14 dBm @ storm: 13 dBm\nL = 2 dB\nEIRP = P_tx - L', 'calm', 'storm');

/** The refusal of the contract; returns what it says. */
function refusalOf(answer: ReturnType<typeof run>): string {
  expect(answer.exitCode).toBe(2);
  expect(answer.results).toBe('');
  expect(answer.messages).toMatch(/\S.*\n$/s);
  return answer.messages;
}

describe('bad usage', () => {
  it.each([
    [[], /^levelwright — radio budgets/],
    [['judge', 'sheet'], /^There is no command “judge”\.[^]*evaluate FILE/],
    [['__proto__'], /^There is no command “__proto__”/],
    [['evaluate'], /^evaluate takes one file/],
    [['evaluate', 'sheet', 'sheet'], /^evaluate takes one file/],
    [['evaluate', 'sheet', '--speed', '3'], /'--speed'/],
    [['evaluate', 'sheet', '--line'], /'--line/],
    [['evaluate', 'sheet', '--linear=yes'], /'--linear'/],
    [['evaluate', 'sheet', '--format', 'xml'], /^There is no format “xml”; there are text, json, markdown, csv\./],
    [['evaluate', 'sheet', '--format', 'toString'], /^There is no format “toString”/],
    [['evaluate', 'sheet', '--case', 'fog'], /^sheet: there is no case “fog”; there are calm, storm\./],
    [['evaluate', 'sheet', '--case', 'calm', '--case', '__proto__'], /^sheet: there is no case “__proto__”/],
    [['evaluate', 'sheet', '--line', 'EIRp'], /^sheet: there is no line “EIRp”; is it “EIRP”\?/],
    [['evaluate', 'sheet', '--line', 'EIRP', '--line', 'Zq9'], /^sheet: there is no line “Zq9”\.$/m],
    [['evaluate', 'sheet', '--line', ''], /^sheet: there is no line “”/],
    [['check'], /^check takes at least one file/],
    [['check', 'sheet', '--case', 'calm'], /'--case'/],
    [['explain', 'sheet'], /^explain takes a file and a symbol/],
    [['explain', 'sheet', 'EIRP', 'L'], /^explain takes a file and a symbol/],
    [['explain', 'sheet', 'EIRP', '--case', 'fog'], /^sheet: there is no case “fog”/],
    [['explain', 'sheet', 'Zq9'], /^sheet: there is no line “Zq9”\.$/m],
    [['functions', 'powersun'], /^There is no function “powersun”\. Is it “powersum”\?/],
    [['functions', 'constructor'], /^There is no function “constructor”/],
    [['functions', 'sin', 'cos'], /^functions takes one name at most/],
  ])('%j', (words, message) => {
    expect(refusalOf(run(words, worldOf({ sheet: SHEET })))).toMatch(message);
  });
});

describe('help', () => {
  it.each([[['help']], [['--help']], [['-h']], [['evaluate', '--help']], [['explain', 'sheet', '--help']]])(
    '%j',
    (words) => {
      expect(run(words, worldOf({}))).toEqual({
        results: expect.stringMatching(/^levelwright[^]*explain FILE SYMBOL/) as string,
        messages: '',
        exitCode: 0,
      });
    },
  );
});

const document = (more: object): string => JSON.stringify({ ...(JSON.parse(fileOf('x = 1 dB')) as object), ...more });

describe('bad files', () => {
  it.each<readonly [string, string | Uint8Array, RegExp]>([
    ['an empty one', '', /^sheet: Line 1, column 1: a value is expected/],
    ['no JSON', 'Power 14 dBm', /^sheet: Line 1, column 1:/],
    ['JSON that breaks off', SHEET.slice(0, 300), /^sheet: Line \d+, column \d+:.*the end of the text/],
    ['no text', new Uint8Array([0xff, 0xfe, 0x00, 0x7b]), /^sheet: This file is no UTF-8 text/],
    ['another format', '{"format":"other"}', /^sheet: This is no worksheet file/],
    ['a list', '[]', /^sheet: This is no worksheet file/],
    ['null', 'null', /^sheet: This is no worksheet file/],
    ['no version', document({ version: 'new' }), /^sheet: version: a whole number/],
    ['no cases', document({ cases: [] }), /^sheet: cases/],
    [
      'a case given twice',
      document({
        cases: [
          { id: 'a', name: '' },
          { id: 'a', name: '' },
        ],
      }),
      /“a” is given to/,
    ],
    ['sections that are none', document({ sections: 3 }), /^sheet: sections: a list expected, number 3 found/],
    [
      'a line without an entry',
      SHEET.replace('"entry": "2 dB"', '"enter": "2 dB"'),
      /^sheet: sections\[0\]\.lines\[1\]\.entry: missing/,
    ],
    [
      'a key of every object',
      SHEET.replace('"title"', '"__proto__": {}, "title"'),
      /^sheet: .*The key __proto__ is not allowed/,
    ],
    [
      'a constructor',
      SHEET.replace('"label"', '"constructor": 1, "label"'),
      /^sheet: .*The key constructor is not allowed/,
    ],
    ['a key twice', SHEET.replace('"title"', '"title": "", "title"'), /^sheet: .*given twice/],
    ['brackets without end', '['.repeat(1_000_000), /^sheet: .*nested more than 64 deep/],
    ['objects without end', '{"a":'.repeat(100_000), /^sheet: .*nested more than 64 deep/],
    ['33 MiB', new Uint8Array(33 * 1024 * 1024), /^sheet: This file is larger than 32 MiB/],
    ['a number beyond all range', document({}).replace('"version":1', '"version":1e999'), /^sheet: .*too large/],
  ])('%s', (_, content, message) => {
    for (const words of [
      ['evaluate', 'sheet', '--format', 'json'],
      ['check', 'sheet'],
      ['explain', 'sheet', 'x'],
    ])
      expect(refusalOf(runOn(content, ...words))).toMatch(message);
  });

  it('that are missing', () => {
    expect(refusalOf(run(['evaluate', 'nowhere'], worldOf({})))).toMatch(
      /^nowhere: cannot be read \(ENOENT: no such file/,
    );
  });

  it('among good ones leave nothing on standard output', () => {
    expect(refusalOf(run(['check', 'sheet', 'bad'], worldOf({ sheet: SHEET, bad: '{}' })))).toMatch(/^bad: This is no/);
  });

  it('cannot put lines or control characters into the message', () => {
    const odd = document({ cases: [{ id: 'a\nb\u001b[2J', name: 'x' }] });
    expect(refusalOf(runOn(odd, 'evaluate', 'sheet', '--case', 'c'))).toBe(
      'sheet: there is no case “c”; there are a b [2J.\n',
    );
    expect(refusalOf(run(['evaluate', 'a\nb'], worldOf({}))).split('\n')).toHaveLength(2);
  });
});

describe('files with something to be told', () => {
  it('of a later version are evaluated, and said to be', () => {
    const later = SHEET.replace('"version": 1', '"version": 7');
    const answer = runOn(later, 'evaluate', 'sheet', '--format', 'json');
    expect(answer.exitCode).toBe(0);
    expect(answer.messages).toMatch(
      /^sheet: This file is of version 7 of the format; version 1 is the last one known here\./,
    );
    expect(caseOf(JSON.parse(answer.results) as Results, 'EIRP').value).toBe(12);
  });

  it('of a later version that cannot be read are refused, and why', () => {
    expect(refusalOf(runOn(document({ version: 7, cases: 'many' }), 'evaluate', 'sheet'))).toMatch(
      /^sheet: This file is of version 7.*cannot be read \(cases/,
    );
  });

  it('with sections of other kinds and stray cases are evaluated', () => {
    const file = fileOfLines([], {
      sections: [
        {
          id: 'a',
          kind: 'lines',
          title: 'all',
          lines: [{ id: 'l', symbol: 'x', label: '', entry: '1 dB', byCase: { fog: '2 dB' } }],
        },
        { id: 'b', kind: 'garden', title: 'Roses', content: { id: 'b', kind: 'garden', title: 'Roses', beds: 3 } },
      ],
    });
    const answer = runOn(file, 'evaluate', 'sheet');
    expect(answer.exitCode).toBe(0);
    expect(answer.messages.split('\n')).toEqual([
      expect.stringContaining('sheet: One line has an entry for the case “fog”'),
      expect.stringContaining('sheet: Sections that cannot be evaluated here are kept as they are: “Roses” (garden).'),
      '',
    ]);
    expect(Object.keys(resultsOf(file).lines)).toEqual(['x']);
  });

  it('whose recorded values have moved say so, and are no failure', () => {
    const file = SHEET.replace(/\n}\n$/, ',\n"recorded": { "EIRP": { "calm": "12.00 dBm", "storm": "9.00 dBm" } } }');
    expect(runOn(file, 'check', 'sheet')).toMatchObject({
      exitCode: 0,
      messages: 'sheet: EIRP in storm was 9.00 dBm when the file was saved and is 11.00 dBm now.\n',
    });
  });
});

it('never throws, and with exit 2 prints nothing but a message', () => {
  const word = fc.oneof(
    fc.constantFrom(
      'evaluate',
      'check',
      'explain',
      'functions',
      'sheet',
      'bad',
      '--case',
      '--line',
      '--format',
      'json',
      '--linear',
      '--',
      'x',
      '-',
      '--help',
      'calm',
      '--case=calm',
    ),
    fc.string({ maxLength: 8 }),
  );
  const content = fc.oneof(
    fc.constant(SHEET),
    fc.json(),
    fc.string(),
    fc
      .tuple(fc.nat(SHEET.length), fc.string({ maxLength: 6 }))
      .map(([at, put]) => SHEET.slice(0, at) + put + SHEET.slice(at + put.length)),
  );
  fc.assert(
    fc.property(fc.array(word, { maxLength: 6 }), content, (words, bad) => {
      const answer = run(words, worldOf({ sheet: SHEET, bad }));
      if (answer.exitCode === 2) refusalOf(answer);
      else expect(answer.results.endsWith('\n')).toBe(true);
    }),
    { numRuns: 300 },
  );
});
