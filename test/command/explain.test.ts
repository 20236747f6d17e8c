/** `explain`: the working of a line as it stands in a terminal. */
import { describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { Evaluation } from '../../src/engine';
import { readWorksheetFile } from '../../src/exchange';
import { RADIATION_CAUTION } from '../../src/review';
import { STARTERS } from '../../src/starters';
import { fileOf, fileOfLines, runOn, worldOf } from './support';

const explained = (content: string, symbol: string, ...options: readonly string[]): string[] =>
  runOn(content, 'explain', 'sheet', symbol, ...options).results.split('\n');

const BUOY = fileOf(
  [
    'C | dBm | level | wanted = -92.75 dBm # Carrier @ storm: -98 dBm',
    'N | dBm | level | unwanted = -117.01 dBm # Noise',
    'I | dBm | level | unwanted = -110.5 dBm # Interference',
    'N_tot = powersum(N, I) # Together',
    'SINR = C - N_tot # Ratio require >= 15 dB',
    'M = SINR - 3 dB # Margin',
  ].join('\n'),
  'calm',
  'storm',
  'ice',
);

describe('a sum', () => {
  it('is told in symbols, with values and in linear terms, with what it rests on', () => {
    expect(explained(BUOY, 'SINR', '--case', 'storm')).toEqual([
      'SINR — Ratio, storm: 11.62 dB (× 14.54)',
      '  in symbols       C − N_tot',
      '  with values      −98.00 dBm − (−109.62 dBm)',
      '  in linear terms  158.5 fW ÷ 10.9 fW',
      '  rests on',
      '    C       −98.00 dBm  Carrier',
      '    N_tot  −109.62 dBm  Together',
      '  requirement: at least 15 dB: NOT MET, 3.38 dB short',
      '  kind: signal ratio (assumed from the name)',
      'used by: M',
      '',
    ]);
  });

  it('is told once for cases in which nothing differs', () => {
    const rows = explained(BUOY, 'SINR');
    expect(rows.filter((row) => row.startsWith('SINR'))).toEqual([
      'SINR — Ratio, calm and ice: 16.87 dB (× 48.69)',
      'SINR — Ratio, storm: 11.62 dB (× 14.54)',
    ]);
    expect(explained(BUOY, 'N')[0]).toBe('N — Noise, calm, storm and ice: -117.01 dBm (1.991 fW)');
    expect(explained(BUOY, 'SINR', '--case', 'ice', '--case', 'storm').filter((row) => row.startsWith('SINR'))).toEqual(
      ['SINR — Ratio, storm: 11.62 dB (× 14.54)', 'SINR — Ratio, ice: 16.87 dB (× 48.69)'],
    );
  });

  it('of powers is told with shares', () => {
    expect(explained(BUOY, 'N_tot')).toEqual([
      'N_tot — Together, calm, storm and ice: -109.62 dBm (10.9 fW)',
      '  in symbols       powersum(N, I)',
      '  with values      powersum(−117.01 dBm, −110.50 dBm)',
      '  in linear terms  1.991 fW + 8.913 fW',
      '  contributions',
      '    N  −117.01 dBm   18.3 %  Noise',
      '    I  −110.50 dBm   81.7 %  Interference',
      '  kind: unwanted level (assumed from the name)',
      'used by: SINR',
      '',
    ]);
  });
});

describe('shares', () => {
  const percentages = (rows: readonly string[]): number[] =>
    rows.flatMap((row) => /(−?[\d.]+) %/.exec(row)?.[1] ?? []).map((text) => Number(text.replace('−', '-')));

  it.each([
    ['powersum', [-110, -107, -120.5, -111]],
    ['meanpower', [-90, -90, -90]],
    ['ratiosum', [20, 17.3, 25]],
    ['powerdiff', [-90, -93]],
  ])('of a %s add to 100 %%', (name, figures) => {
    const unit = name === 'ratiosum' ? 'dB' : 'dBm';
    const lines = figures.map((figure, at) => `a${String(at)} = ${String(figure)} ${unit}`);
    const rows = explained(
      fileOf([...lines, `x = ${name}(${figures.map((_, at) => `a${String(at)}`).join(', ')})`].join('\n')),
      'x',
    );
    expect(percentages(rows)).toHaveLength(figures.length);
    expect(Math.abs(percentages(rows).reduce((sum, share) => sum + share, 0) - 100)).toBeLessThanOrEqual(
      0.05 * figures.length,
    );
  });

  it('that would read 0.0 % are told from none at all', () => {
    const rows = explained(fileOf('a = 0 dBm\nb = -60 dBm\nc | dBm = 0 W\nx = powersum(a, b, c)'), 'x');
    const at = rows.indexOf('  contributions');
    expect(rows.slice(at + 1, at + 4)).toEqual([
      '    a    0.00 dBm      100.0 %',
      '    b  −60.00 dBm  under 0.1 %',
      '    c   no power         0.0 %',
    ]);
  });
});

describe('what stands below the working', () => {
  it('is findings with their cases and answers, source, note and users', () => {
    const file = fileOfLines(
      [
        {
          id: 'f',
          symbol: 'F',
          entry: '2 dB',
          quantity: 'noise figure',
          byCase: { b: '-1 dB' },
          source: 'Invented.',
          note: 'Two\nlines.',
        },
        {
          id: 'g',
          symbol: 'G',
          entry: 'F + 1 dB',
          accepted: [{ code: 'negative-figure', entry: 'F + 1 dB', reason: '' }],
        },
        { id: 'h', symbol: '', label: 'Loose', entry: 'F' },
      ],
      {
        cases: [
          { id: 'a', name: 'Calm' },
          { id: 'b', name: 'Storm' },
        ],
      },
    );
    const rows = explained(file, 'F');
    expect(rows.slice(-5)).toEqual([
      expect.stringMatching(
        /^warning negative-figure in Storm: The line is a noise figure and reads −1\.00 dB/,
      ) as string,
      'source: Invented.',
      'note: Two lines.',
      'used by: G, h',
      '',
    ]);
    expect(explained(file, 'F', '--case', 'a').some((row) => row.startsWith('warning'))).toBe(false);
    expect(explained(file, 'F', '--case', 'b').some((row) => row.startsWith('warning negative-figure: '))).toBe(true);
  });

  it('has the reason of an accepted finding', () => {
    const file = fileOfLines([
      {
        symbol: 'F',
        entry: '-1 dB',
        quantity: 'noise figure',
        accepted: [{ code: 'negative-figure', entry: '-1 dB', reason: 'A test.' }],
      },
    ]);
    expect(explained(file, 'F').find((row) => row.startsWith('warning'))).toMatch(/ Accepted: A test\.$/);
  });

  it('has the caution beside radiated power and power density, and not beside others', () => {
    const file = fileOf('P = 14 dBm\nEIRP = P + 3 dBi\nS | dBW/m² = -100 dBW/m²');
    const caution = `caution: ${RADIATION_CAUTION}`;
    expect(['P', 'EIRP', 'S'].map((symbol) => explained(file, symbol).includes(caution))).toEqual([false, true, true]);
  });

  it('has the formula and source of models', () => {
    expect(explained(fileOf('x = free_space_loss(3 km, 868 MHz)'), 'x')).toEqual([
      'x, Nominal: 100.76 dB (× 11.91×10⁹)',
      '  in symbols  free_space_loss(3 km, 868 MHz)',
      '  kind: loss (assumed from the expression)',
      '  free_space_loss: L = 20 log₁₀(4π·d·f/c) (ITU-R P.525, free-space basic transmission loss)',
      '',
    ]);
  });
});

describe('lines without a figure', () => {
  const broken = fileOf(
    'a = b + 1 dB\nb = a + 1 dB require >= 3 dB\nc = b + 1 dB\ne =  # Nothing yet\nn = 1 dBm + 1 dBm',
  );

  it('in a loop are withheld, and the loop is named', () => {
    expect(explained(broken, 'b')).toEqual([
      'b, Nominal: withheld',
      '  in symbols   a + 1 dB',
      '  with values  a + 1 dB',
      '  rests on',
      '    a  withheld',
      '  requirement: at least 3 dB: not known, the value is withheld',
      expect.stringMatching(/^error loop: .*a.*b/) as string,
      'used by: a, c',
      '',
    ]);
  });

  it('wait for those at fault', () => {
    const answer = runOn(broken, 'explain', 'sheet', 'c');
    expect(answer.exitCode).toBe(1);
    expect(answer.results).toMatch(/^c, Nominal: waits for [ab]/);
    expect(answer.results).toMatch(/\nerror waiting: Waits for /);
  });

  it('may be empty', () => {
    expect(runOn(broken, 'explain', 'sheet', 'e')).toEqual({
      results: 'e — Nothing yet, Nominal: no entry\n',
      messages: '',
      exitCode: 0,
    });
  });
});

it('keeps every text of the file on its line', () => {
  const file = fileOfLines([
    { symbol: 'x', label: 'a\nb\u001b[2J', entry: '1 dB\n+\n2 dB', source: 's\r\nt', note: 'n\u2028o' },
    { symbol: 'y\nz', label: 'l\nm', entry: 'x' },
  ]);
  expect(explained(file, 'x')).toEqual([
    'x — a b [2J, Nominal: 3.00 dB (× 1.995)',
    '  in symbols       1 dB + 2 dB',
    '  in linear terms  1.259 × 1.585',
    'source: s t',
    'note: n o',
    'used by: y z',
    '',
  ]);
});

it('tells of a curve what it is, since it has no figure by itself, and of a line that it rests on one', () => {
  const curve = {
    id: 'c',
    kind: 'curve',
    symbol: 'G',
    title: 'Scan',
    x: { label: 'Angle', unit: 'deg' },
    y: { label: 'Gain', unit: 'dBi', quantity: 'gain' },
    points: [
      [0, 32],
      [45, 29],
    ],
  } as const;
  const lines = {
    id: 'l',
    kind: 'lines',
    title: '',
    lines: [{ id: 'x', symbol: 'x', label: '', entry: 'G(9 deg)' }],
  } as const;
  const file = fileOfLines([], { sections: [lines, curve] });
  expect(explained(file, 'x')).toContain('    G  a curve   Scan');
  expect(explained(file, 'G')[0]).toBe(
    'G — Scan, Nominal: a curve, read as G(x): Gain in dBi over Angle in deg, 2 points, 0 to 45 deg',
  );
});

describe.each(STARTERS)('of $title', ({ id, text }) => {
  const read = readWorksheetFile(text);
  if (!read.ok) throw new Error(read.fault.sentence);
  const lines = new Evaluation(read.value.worksheet).lines();

  it('every line can be told, with its requirement where it has one', () => {
    for (const { symbol, label, requirement } of lines) {
      const answer = run(['explain', id, symbol], worldOf({ [id]: text }));
      expect(answer).toMatchObject({ messages: '', exitCode: 0 });
      expect(answer.results).toContain(`${symbol} — ${label}, `);
      expect(/\n {2}requirement: at (least|most) .*: met, margin \d/.test(answer.results)).toBe(
        requirement !== undefined,
      );
      // No two signs in a row, and nothing that a program would say of what it lacks.
      expect(answer.results).not.toMatch(/[−+×÷/] −|undefined|NaN|Infinity|\[object/);
    }
  });
});
