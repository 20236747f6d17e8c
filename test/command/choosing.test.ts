/** Choosing cases and lines, and the exit codes of what was chosen. */
import { describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { STARTERS } from '../../src/starters';
import { caseOf, fileOf, fileOfLines, resultsOf, runOn, worldOf } from './support';

const SHEET = fileOf('P_tx = 14 dBm @ storm: 13 dBm\nL = 2 dB\nEIRP = P_tx - L', 'calm', 'storm');

describe('choosing', () => {
  const named = fileOf('x = 1 dB @ b: 2 dB', 'a', 'b', 'c')
    .replace('"name": "a"', '"name": "Calm sea"')
    .replace('"name": "c"', '"name": "b"');

  it.each([
    [['--case', 'a'], ['a']],
    [['--case', 'Calm sea'], ['a']],
    [
      ['--case', 'c', '--case', 'a'],
      ['a', 'c'],
    ],
    [['--case', 'a', '--case', 'Calm sea'], ['a']],
    // An id comes before a name.
    [['--case', 'b'], ['b']],
    [[], ['a', 'b', 'c']],
  ])('cases by %j', (options, ids) => {
    const results = resultsOf(named, ...options);
    expect(results.cases).toEqual(ids);
    expect(Object.keys(results.lines['x']?.cases ?? {})).toEqual(ids);
  });

  it.each(['rx', 'rx.lna'])('%s, which has no figure by itself, is sent to a part', (symbol) => {
    const stages = [{ id: 's', symbol: 'lna', label: '', gain: '10 dB' }];
    const chain = { id: 'c', kind: 'chain', symbol: 'rx', title: '', stages } as const;
    const answer = runOn(fileOfLines([], { sections: [chain] }), 'explain', 'sheet', symbol);
    expect(answer).toMatchObject({ results: '', exitCode: 2 });
    expect(answer.messages).toBe(
      `sheet: “${symbol}” is a chain or a stage and has no figure by itself; ask for a part of it, such as rx.lna.gain.\n`,
    );
  });

  it('lines, by symbol or by the name in results, keeps their order', () => {
    expect(Object.keys(resultsOf(SHEET, '--line', 'EIRP', '--line', 'P_tx', '--line', 'EIRP').lines)).toEqual([
      'P_tx',
      'EIRP',
    ]);
    const loose = fileOfLines([{ id: 'q7', symbol: '', entry: '3 dB' }]);
    expect(caseOf(resultsOf(loose, '--line', 'q7'), 'q7').value).toBe(3);
    expect(runOn(loose, 'explain', 'sheet', 'q7').results).toMatch(/^q7, Nominal: 3\.00 dB/);
  });
});

describe('exit codes', () => {
  const mixed = fileOf(
    [
      'a = 1 dB @ good: 4 dB require >= 3 dB',
      'b = 5 dB require >= 3 dB',
      'n = 1 dBm + 1 dBm',
      'L | dB | loss = 1 dB',
      'w = 3 dBm + L # only a note',
    ].join('\n'),
    'bad',
    'good',
  );

  it.each([
    [['--line', 'b'], 0],
    [['--line', 'a'], 1],
    [['--line', 'a', '--case', 'good'], 0],
    [['--line', 'a', '--case', 'bad'], 1],
    [['--line', 'n'], 1],
    [['--line', 'w'], 0],
    [['--line', 'b', '--line', 'w'], 0],
    [[], 1],
  ])('of what is chosen by %j', (options, exitCode) => {
    for (const format of ['text', 'json', 'markdown', 'csv'])
      expect(runOn(mixed, 'evaluate', 'sheet', '--format', format, ...options)).toMatchObject({
        exitCode,
        messages: '',
      });
  });

  it.each([
    ['explain', 'b', 0],
    ['explain', 'a', 1],
    ['explain', 'n', 1],
    ['explain', 'w', 0],
  ])('of %s %s', (command, symbol, exitCode) => {
    expect(runOn(mixed, command, 'sheet', symbol).exitCode).toBe(exitCode);
  });

  it('is 1 while a requirement is not known to be met', () => {
    expect(runOn(fileOf('x | dB =  require >= 3 dB'), 'check', 'sheet').exitCode).toBe(1);
    expect(runOn(fileOf('x | dB = 5 dB require >= three'), 'check', 'sheet').exitCode).toBe(1);
    expect(runOn(fileOf('x | dB = '), 'check', 'sheet').exitCode).toBe(0);
  });

  it('is 0 for every starter, and the worst of several files', () => {
    const files = Object.fromEntries(STARTERS.map(({ id, text }) => [id, text]));
    const world = worldOf({ ...files, mixed });
    expect(run(['check', ...Object.keys(files)], world)).toMatchObject({ exitCode: 0, messages: '' });
    expect(run(['check', ...Object.keys(files), 'mixed'], world).exitCode).toBe(1);
  });
});
