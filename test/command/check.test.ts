/** `check`: one line a finding and a requirement, over all files, whatever their texts hold. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { Evaluation } from '../../src/engine';
import { readWorksheetFile } from '../../src/exchange';
import { fileOf, fileOfLines, runOn, worldOf } from './support';

const HOP = fileOf(
  [
    'C | dBm | level | wanted = -90 dBm @ rain: -104 dBm',
    'N | dBm | level | unwanted = -104 dBm',
    'CN = C - N require >= 3 dB',
    'F | dB | noise figure = -1 dB',
    'S = C + C',
    'T = S + 1 dB require <= 1 dBm',
  ].join('\n'),
  'clear',
  'rain',
);

describe('the lines', () => {
  const lines = runOn(HOP, 'check', 'sheet').results.split('\n');

  it('give file, case, line, severity and code of each finding, with its repair', () => {
    expect(lines.slice(0, -5)).toEqual([
      expect.stringMatching(
        /^sheet: clear,rain: F: warning negative-figure: The line is a noise figure and reads −1\.00 dB/,
      ) as string,
      expect.stringMatching(/^sheet: clear: S: error levels-summed: .* \[repair: powersum\(C, C\)\]$/) as string,
      expect.stringMatching(/^sheet: rain: S: error levels-summed: .* \[repair: powersum\(C, C\)\]$/) as string,
      expect.stringMatching(/^sheet: clear,rain: T: error waiting: Waits for S, which has no value yet\.$/) as string,
    ]);
  });

  it('give each requirement in each case, met or not or not known', () => {
    expect(lines.slice(-5)).toEqual([
      'sheet: clear: CN: requirement at least 3 dB: met, margin 11.00 dB',
      'sheet: rain: CN: requirement at least 3 dB: NOT MET, 3.00 dB short',
      'sheet: clear: T: requirement at most 1 dBm: not known, the value is withheld',
      'sheet: rain: T: requirement at most 1 dBm: not known, the value is withheld',
      '',
    ]);
  });

  it('come file by file, in the order given', () => {
    const world = worldOf({
      'b.json': fileOf('x = 1 dB require >= 0 dB'),
      'a.json': fileOf('y = 2 dB require >= 3 dB'),
    });
    expect(run(['check', 'b.json', 'a.json'], world)).toEqual({
      results:
        'b.json: nominal: x: requirement at least 0 dB: met, margin 1.00 dB\n' +
        'a.json: nominal: y: requirement at least 3 dB: NOT MET, 1.00 dB short\n',
      messages: '',
      exitCode: 1,
    });
  });

  it('are none for a file without findings and requirements', () => {
    expect(runOn(fileOf('x = 1 dB'), 'check', 'sheet')).toEqual({ results: '', messages: '', exitCode: 0 });
  });

  it('name a line without a symbol, or with that of another, by its id', () => {
    const file = fileOfLines([
      { id: 'one', symbol: 'x', entry: '1 dB' },
      { id: 'two', symbol: 'x', entry: '1 dB' },
      { id: 'three', symbol: '', label: 'loose', entry: '1 dB', requirement: { atLeast: '0 dB' } },
    ]);
    expect(runOn(file, 'check', 'sheet').results.split('\n')).toEqual([
      expect.stringMatching(/^sheet: nominal: two: error duplicate-symbol/) as string,
      'sheet: nominal: three: requirement at least 0 dB: met, margin 1.00 dB',
      '',
    ]);
  });
});

describe('accepted findings', () => {
  const lines = [
    { symbol: 'F', entry: '-1 dB', quantity: 'noise figure' as const },
    {
      symbol: 'G',
      entry: '-2 dB',
      quantity: 'noise figure' as const,
      accepted: [{ code: 'negative-figure', entry: '-2 dB', reason: 'a test\nfigure' }],
    },
  ];

  it('are told with their reason; warnings leave the exit code at 0 either way', () => {
    const answer = runOn(fileOfLines(lines), 'check', 'sheet');
    expect(answer.exitCode).toBe(0);
    expect(answer.results.split('\n')).toEqual([
      expect.not.stringContaining('[accepted') as string,
      expect.stringMatching(/^sheet: nominal: G: warning negative-figure: .* \[accepted: a test figure\]$/) as string,
      '',
    ]);
  });
});

it('has as many lines as findings and requirements, whatever stands in the texts', () => {
  const hostile = fc.string({
    unit: fc.constantFrom('a', ' ', '\n', '\r', '\u2028', '\u2029', '\u0085', '\v', '\f', '\u001b', ':', '"', 'µ'),
    maxLength: 10,
  });
  const line = fc.record({
    symbol: hostile,
    label: hostile,
    entry: fc.oneof(fc.constantFrom('1 dBm + 2 dBm', '1/0', '3 dB', '', '-1 dB', 'x\n+ y'), hostile),
    requirement: hostile.map((atLeast) => ({ atLeast })),
    quantity: fc.constantFrom('noise figure' as const, 'level' as const),
  });
  fc.assert(
    fc.property(fc.array(line, { minLength: 1, maxLength: 4 }), (lines) => {
      const file = fileOfLines(lines);
      const read = readWorksheetFile(file);
      if (!read.ok) throw new Error(read.fault.sentence);
      const { results } = runOn(file, 'check', 'sheet');
      const count = new Evaluation(read.value.worksheet).sheetFindings().length + lines.length;
      // Every line ends with a line feed, and there is no other character that a terminal or an editor takes for a line's end.
      expect(results.split(/\r\n|[\n\r\u0085\u2028\u2029\v\f]/)).toHaveLength(count + 1);
      expect(results).not.toMatch(/[^\P{Cc}\n]/u);
      for (const one of results.split('\n').slice(0, -1)) expect(one).toMatch(/^sheet: nominal: /);
    }),
    { numRuns: 100 },
  );
});
