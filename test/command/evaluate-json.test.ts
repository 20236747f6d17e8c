/** `evaluate --format json`: the object of the contract, for people's programs to read. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { STARTERS } from '../../src/starters';
import { allLines, applyAll, type Worksheet } from '../../src/worksheet';
import { caseOf, fileOf, fileOfLines, resultsOf, runOn } from './support';

const NOISY = fileOf(
  [
    'C | dBm | level | wanted = -90 dBm # Carrier @ storm: -98 dBm',
    'N | dBm | level | unwanted = -110 dBm # Noise',
    'I | dBm | level | unwanted = -105 dBm # Interference',
    'N_tot = N + I # Total',
    'SINR | dB = C - powersum(N, I) # Ratio require >= 10 dB',
    'M = C - N_tot # Margin require >= 1 dB',
  ].join('\n'),
  'calm',
  'storm',
);

describe('the object', () => {
  const results = resultsOf(NOISY);

  it('has title, cases, lines and findings, and nothing else', () => {
    expect(Object.keys(results)).toEqual(['title', 'cases', 'lines', 'findings']);
    expect(results.title).toBe('test');
    expect(results.cases).toEqual(['calm', 'storm']);
    expect(Object.keys(results.lines)).toEqual(['C', 'N', 'I', 'N_tot', 'SINR', 'M']);
  });

  it('gives a line its label, unit, kind and side, and each case its figure', () => {
    expect(results.lines['C']).toEqual({
      label: 'Carrier',
      unit: 'dBm',
      quantity: 'level',
      side: 'wanted',
      cases: {
        calm: { value: -90, linear: expect.closeTo(1e-12, 20) as number, linearUnit: 'W' },
        storm: { value: -98, linear: expect.closeTo(10 ** -12.8, 20) as number, linearUnit: 'W' },
      },
    });
  });

  it('gives requirements with their margins, in dB', () => {
    expect(caseOf(results, 'SINR', 'calm').requirement).toEqual({
      met: true,
      margin: expect.closeTo(3.8067, 3) as number,
      unit: 'dB',
    });
    expect(caseOf(results, 'SINR', 'storm').requirement).toMatchObject({
      met: false,
      margin: expect.closeTo(-4.1933, 3) as number,
    });
    expect(caseOf(results, 'N')).not.toHaveProperty('requirement');
  });

  it('has null where a value is withheld, and names what is waited for', () => {
    expect(results.lines['N_tot']).toMatchObject({ label: 'Total', side: null });
    expect(caseOf(results, 'N_tot')).toEqual({ value: null, linear: null, linearUnit: null });
    expect(caseOf(results, 'M')).toEqual({
      value: null,
      linear: null,
      linearUnit: null,
      waitsFor: ['N_tot'],
      requirement: { met: null, margin: null, unit: null },
    });
  });

  it('gives each finding once a case, with both figures and the repair', () => {
    const found = results.findings.filter(({ line }) => line === 'N_tot');
    expect(found.map((finding) => finding.case)).toEqual(['calm', 'storm']);
    expect(found[0]).toEqual({
      code: 'levels-summed',
      severity: 'error',
      line: 'N_tot',
      case: 'calm',
      message: expect.stringMatching(/−215.*powersum\(N, I\), which gives −103\.81 dBm/) as string,
      repair: 'powersum(N, I)',
      accepted: false,
    });
    expect(results.findings.map(({ line, code }) => `${line} ${code}`)).toContain('M waiting');
  });

  it('exits 1, for an error has been found', () => {
    expect(runOn(NOISY, 'evaluate', 'sheet', '--format', 'json')).toMatchObject({ exitCode: 1, messages: '' });
  });
});

describe('linear values', () => {
  it.each([
    ['-30 dBm', -30, 1e-6, 'W'],
    ['2 dBW', 2, 10 ** 0.2, 'W'],
    ['25 mW', 25, 0.025, 'W'],
    ['-174 dBm/Hz', -174, 10 ** -20.4, 'W/Hz'],
    ['60 dBµV', 60, 1e-3, 'V'],
    ['40 dBµV/m', 40, 1e-4, 'V/m'],
    ['2 mV', 2, 2e-3, 'V'],
    ['3 dB', 3, 10 ** 0.3, '1'],
    ['6 dBi', 6, 10 ** 0.6, '1'],
    ['0 dBd', 0, 10 ** 0.215, '1'],
    ['60 dBHz', 60, 1e6, 'Hz'],
    ['125 kHz', 125, 125e3, 'Hz'],
    ['4 Mbit/s', 4, 4e6, 'bit/s'],
    ['66 dB(bit/s)', 66, 10 ** 6.6, 'bit/s'],
    ['2 MBd', 2, 2e6, 'Bd'],
    ['24 dBK', 24, 10 ** 2.4, 'K'],
    ['290 K', 290, 290, 'K'],
    ['15 °C', 15, 288.15, 'K'],
    ['12 dB/K', 12, 10 ** 1.2, '1/K'],
    ['3.2 km', 3.2, 3200, 'm'],
    ['50 ohm', 50, 50, 'Ω'],
    ['58 %', 58, 0.58, '1'],
    ['0.07 dB/km', 0.07, 7e-5, 'dB/m'],
    ['0.9 dB/m', 0.9, 0.9, 'dB/m'],
    ['42', 42, 42, '1'],
  ])('%s is %d, and %d %s', (entry, value, linear, linearUnit) => {
    const found = caseOf(resultsOf(fileOf(`x = ${entry}`)), 'x');
    expect([found.value, found.linearUnit]).toEqual([value, linearUnit]);
    expect((found.linear ?? NaN) / linear).toBeCloseTo(1, 12);
  });

  it('of no power are nought, and the value is told apart from one that is withheld', () => {
    const results = resultsOf(fileOf('P | dBm = 0 W require >= -100 dBm\nQ | dBm = 0 W require <= -100 dBm'));
    expect(caseOf(results, 'P')).toEqual({
      value: null,
      noPower: true,
      linear: 0,
      linearUnit: 'W',
      requirement: { met: false, margin: null, unit: 'dB' },
    });
    expect(caseOf(results, 'Q').requirement).toEqual({ met: true, margin: null, unit: 'dB' });
  });

  it('too large for a number are null, with the value kept', () => {
    expect(caseOf(resultsOf(fileOf('x = 4000 dB')), 'x')).toMatchObject({ value: 4000, linear: null, linearUnit: '1' });
  });
});

it('tells the unit of a case that has another one than the line', () => {
  const results = resultsOf(fileOf('b = 1 dB\na = b + 1 dB @ storm: b + 3 dBm', 'calm', 'storm'));
  expect(results.lines['a']?.unit).toBe('dB');
  expect(caseOf(results, 'a', 'calm')).not.toHaveProperty('unit');
  expect(caseOf(results, 'a', 'storm')).toMatchObject({ value: 4, unit: 'dBm' });
});

describe('the names of lines', () => {
  it.each(['constructor', 'toString', '__proto__', 'hasOwnProperty', 'valueOf', 'prototype'])('may be %s', (symbol) => {
    const file = fileOfLines([
      { symbol, entry: '3 dB', requirement: { atLeast: '1 dB' } },
      { symbol: 'y', entry: '4 dB' },
    ]);
    const results = resultsOf(file);
    expect(Object.keys(results.lines)).toEqual([symbol, 'y']);
    expect(Object.getOwnPropertyDescriptor(results.lines, symbol)?.value).toMatchObject({
      unit: 'dB',
      cases: { nominal: { value: 3 } },
    });
    for (const format of ['text', 'markdown', 'csv'])
      expect(runOn(file, 'evaluate', 'sheet', '--format', format, '--line', symbol).exitCode).toBe(0);
    expect(runOn(file, 'explain', 'sheet', symbol).results).toContain('3.00 dB');
    expect(runOn(file, 'check', 'sheet').results).toContain('requirement at least 1 dB: met');
  });

  it('do not exist because every object has them', () => {
    for (const symbol of ['constructor', '__proto__', 'toString'])
      expect(runOn(fileOf('x = 1 dB'), 'evaluate', 'sheet', '--line', symbol)).toMatchObject({
        exitCode: 2,
        results: '',
      });
  });

  it('are ids where there is no symbol, or another line has it', () => {
    const results = resultsOf(
      fileOfLines([
        { id: 'first', symbol: 'x', entry: '1 dB' },
        { id: 'second', symbol: 'x', entry: '2 dB' },
        { id: 'third', symbol: '', label: 'loose', entry: '3 dB' },
      ]),
    );
    expect(Object.keys(results.lines)).toEqual(['x', 'second', 'third']);
    expect(results.findings).toMatchObject([{ code: 'duplicate-symbol', line: 'second' }]);
    expect(caseOf(results, 'third').value).toBe(3);
  });

  it('stay apart when an id is the symbol of another line', () => {
    const file = fileOfLines([
      { id: 'x', symbol: '', entry: '1 dB' },
      { id: 'y', symbol: 'x', entry: '2 dB' },
      { id: '#x', symbol: '', entry: '3 dB' },
    ]);
    const results = resultsOf(file);
    expect(Object.fromEntries(Object.keys(results.lines).map((name) => [name, caseOf(results, name).value]))).toEqual({
      '##x': 1,
      x: 2,
      '#x': 3,
    });
    expect(Object.keys(resultsOf(file, '--line', '##x').lines)).toEqual(['##x']);
  });
});

describe('findings that have been accepted', () => {
  const line = {
    symbol: 'P',
    entry: 'a + L',
    accepted: [{ code: 'loss-added', entry: 'a + L', reason: 'referred back' }],
  };
  const inputs = [
    { symbol: 'a', entry: '-90 dBm' },
    { symbol: 'L', entry: '2 dB', quantity: 'loss' as const },
  ];

  it('are marked, while the entry is what it was', () => {
    expect(resultsOf(fileOfLines([...inputs, line])).findings).toMatchObject([{ code: 'loss-added', accepted: true }]);
    expect(resultsOf(fileOfLines([...inputs, { ...line, entry: 'L + a' }])).findings).toMatchObject([
      { code: 'loss-added', accepted: false },
    ]);
  });

  it('do not make an error acceptable', () => {
    const accepted = [{ code: 'levels-summed', entry: 'a + a', reason: 'I insist' }];
    const file = fileOfLines([...inputs, { symbol: 'Q', entry: 'a + a', accepted }]);
    expect(resultsOf(file).findings).toMatchObject([{ code: 'levels-summed', accepted: false }]);
    expect(runOn(file, 'evaluate', 'sheet').exitCode).toBe(1);
  });
});

describe('every value', () => {
  const starters = STARTERS.map(({ text }) => {
    const read = readWorksheetFile(text);
    if (!read.ok) throw new Error(read.fault.sentence);
    return read.value.worksheet;
  });

  /** A starter with some of its entries and case entries replaced by others. */
  const edited = fc
    .record({
      worksheet: fc.constantFrom(...starters),
      edits: fc.array(
        fc.record({
          at: fc.nat(),
          entry: fc.oneof(
            fc.double({ min: -200, max: 200, noNaN: true }).map((figure) => `${String(figure)} dB`),
            fc.double({ min: 1e-30, max: 1e30, noNaN: true }).map((figure) => `${String(figure)} W`),
            fc.constantFrom('0 W', '', 'EIRP', '1/0', 'f', '3 dB +', '-103.7 dBm', '7e3 Hz'),
          ),
        }),
        { minLength: 1, maxLength: 6 },
      ),
    })
    .map(({ worksheet, edits }): Worksheet => {
      const lines = allLines(worksheet);
      return applyAll(
        worksheet,
        edits.map(({ at, entry }) => ({
          kind: 'set-line',
          lineId: lines[at % lines.length]?.id ?? '',
          field: 'entry',
          value: entry,
        })),
      ).worksheet;
    });

  it('is the figure of the evaluation, bit for bit, or null', () => {
    fc.assert(
      fc.property(edited, (worksheet) => {
        const evaluation = new Evaluation(worksheet);
        const results = resultsOf(writeWorksheetFile(worksheet));
        for (const { id, symbol } of evaluation.lines())
          for (const { id: caseId } of worksheet.cases) {
            const figure = evaluation.figure(id, caseId);
            // What a chain does not give in any case is not there.
            if (!(symbol in results.lines)) {
              expect(evaluation.originOf(id)).toBeDefined();
              expect(figure.state).toBe('empty');
              continue;
            }
            const found = caseOf(results, symbol, caseId);
            const isFinite = figure.state === 'value' && Number.isFinite(figure.value);
            // toBe compares as Object.is does; JSON has no −0.
            expect(found.value).toBe(isFinite ? figure.value + 0 : null);
            expect(found.noPower).toBe(figure.state === 'value' && figure.value === -Infinity ? true : undefined);
            if (figure.state === 'value') expect(found.unit ?? results.lines[symbol]?.unit).toBe(figure.unit.word);
          }
        expect(new Set(results.findings.map(({ line, code }) => `${line} ${code}`))).toEqual(
          new Set(
            evaluation.sheetFindings().map(({ lineId, code }) => {
              const { symbol = '', label = '' } = evaluation.line(lineId) ?? {};
              return `${symbol || label} ${code}`;
            }),
          ),
        );
      }),
      { numRuns: 40 },
    );
  });
});
