import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { pointsInUnits, POINTS_LIMIT, readPastedPoints, type PastedPoints } from '../../src/exchange';

const codesOf = ({ problems }: PastedPoints): string[] =>
  problems.map(({ code, row }) => (row === undefined ? code : `${code} ${String(row)}`));

describe('what sets the columns apart', () => {
  const points = [
    [0, 0],
    [10.5, -3.25],
    [20, -12],
  ];
  it.each([
    ['tab', '0\t0\n10.5\t-3.25\n20\t-12\n'],
    ['tab', '0\t0\r\n10,5\t-3,25\r\n20\t-12\r\n'],
    ['semicolon', '0;0\n10.5;-3.25\n20;-12'],
    ['semicolon', '0;0\n10,5; −3,25\n20;-12'],
    ['comma', '0,0\n10.5,-3.25\n20,-12'],
    ['comma', '0, 0\n10.5, -3.25\n20, -12'],
    ['comma', '"0","0"\n"10,5","-3,25"\n"20","-12"'],
    ['blanks', '0 0\n10.5 -3.25\n20 -12'],
    ['blanks', '   0   0\n10,5     -3,25\n\n  20   -12  '],
  ])('is a %s in %j', (separator, text) => {
    const pasted = readPastedPoints(text);
    expect(pasted.separator).toBe(separator);
    expect(pasted.points).toEqual(points);
    expect(pasted.problems).toEqual([]);
  });
});

describe('the heading', () => {
  const body = '0\t0\n10\t-3';
  it.each([
    ['Angle (deg)\tGain (dBi)', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['Angle [deg]\tGain [dBi]', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['Angle / deg\tGain/dBi', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['Angle in deg\tGain, dBi', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['deg\tdBi', { unit: 'deg' }, { unit: 'dBi' }],
    ['Angle\tGain\ndeg\tdBi', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['Angle\tGain\n[deg]\t[dBi]', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['Angle off the axis\tGain', { label: 'Angle off the axis' }, { label: 'Gain' }],
    ['# Angle (deg)\tGain (dBi)', { label: 'Angle', unit: 'deg' }, { label: 'Gain', unit: 'dBi' }],
    ['\tLevel (dBm)', {}, { label: 'Level', unit: 'dBm' }],
  ])('%j is read', (heading, x, y) => {
    const pasted = readPastedPoints(`${heading}\n${body}`);
    expect([pasted.x, pasted.y]).toEqual([x, y]);
    expect(pasted.points).toEqual([
      [0, 0],
      [10, -3],
    ]);
    expect(pasted.problems).toEqual([]);
  });

  it('is read over columns set apart by blanks, by its brackets where the labels have several words', () => {
    for (const heading of ['Angle (deg) Gain (dBi)', 'Angle off axis (deg)   Gain over all [dBi]', 'deg dBi']) {
      const pasted = readPastedPoints(`${heading}\n0 1\n10 -3`);
      expect([pasted.x.unit, pasted.y.unit, pasted.problems]).toEqual(['deg', 'dBi', []]);
    }
    expect(readPastedPoints('Angle off axis (deg) Gain [dBi]\n0 1').x.label).toBe('Angle off axis');
  });

  it('is said to be unclear where its words cannot be told apart', () => {
    const pasted = readPastedPoints('Measured in the yard\n0 1\n10 -3');
    expect([pasted.x, pasted.y, codesOf(pasted)]).toEqual([{}, {}, ['heading-unclear 1']]);
    expect(pasted.points).toHaveLength(2);
  });

  it('keeps words in brackets that are no unit in the label, and says so', () => {
    const pasted = readPastedPoints(`Angle (deg)\tGain (guessed)\n${body}`);
    expect(pasted.y).toEqual({ label: 'Gain (guessed)' });
    expect(codesOf(pasted)).toEqual(['unknown-unit']);
    expect(pasted.problems[0]?.sentence).toContain('“guessed”');
  });

  it('leaves the rows above it told of, and remarks unsaid', () => {
    const pasted = readPastedPoints(`Yard measurement\t\n# by hand\nAngle (deg)\tGain (dBi)\n${body}\n# done`);
    expect(pasted.x.unit).toBe('deg');
    expect(codesOf(pasted)).toEqual(['not-a-point 1']);
  });
});

describe('units in the cells', () => {
  it('are those of the axes', () => {
    for (const text of ['0 deg\t1 dBi\n10 deg\t-3 dBi', '0 deg 1 dBi\n10 deg -3 dBi', '0deg;1dBi\n10deg;-3dBi']) {
      const pasted = readPastedPoints(text);
      expect([pasted.x, pasted.y, pasted.problems]).toEqual([{ unit: 'deg' }, { unit: 'dBi' }, []]);
      expect(pasted.points).toEqual([
        [0, 1],
        [10, -3],
      ]);
    }
  });

  it('leave a row out where they differ from the column', () => {
    const pasted = readPastedPoints('0 deg\t1 dBi\n1 rad\t-3 dBi\n2 deg\t4 dBi');
    expect(pasted.points).toEqual([
      [0, 1],
      [2, 4],
    ]);
    expect(codesOf(pasted)).toEqual(['unit-differs 2']);
  });
});

describe('what cannot be read', () => {
  it('is told with the number of its row, empty rows counted', () => {
    const pasted = readPastedPoints('f (MHz);L (dB)\n100;1\n\nbroken;2\n300;n/a\n400;4\ntotal');
    expect(pasted.points).toEqual([
      [100, 1],
      [400, 4],
    ]);
    expect(pasted.problems.map(({ sentence }) => sentence)).toEqual([
      'Row 4: “broken 2” is no pair of numbers.',
      'Row 5: “300 n/a” is no pair of numbers.',
      'Row 7: “total” is no pair of numbers.',
    ]);
  });

  it.each(['', ' \n\n', 'only words', '12', '1e999\t1', 'NaN\tNaN', '=A1\t=B1'])('%j has no points', (text) => {
    expect(readPastedPoints(text).points).toEqual([]);
  });

  it('is counted where it is much', () => {
    const pasted = readPastedPoints(`0 1\n${'words of no use here\n'.repeat(1000)}2 3`);
    expect(pasted.points).toHaveLength(2);
    expect(pasted.problems).toHaveLength(101);
    expect(pasted.problems.at(-1)?.sentence).toBe('900 further rows could not be taken.');
  });

  it('takes two columns of more and says so', () => {
    const pasted = readPastedPoints('site\t0\t1\t7\nsite\t10\t-3\t8');
    expect(pasted.points).toEqual([
      [0, 1],
      [10, -3],
    ]);
    expect(codesOf(pasted)).toEqual(['column-left-out']);
    expect(pasted.problems[0]?.sentence).toContain('columns 2 and 3');
  });
});

describe('the decimal sign', () => {
  it('is what the table agrees on', () => {
    expect(readPastedPoints('1.000\t2,5\n2.000\t3,5').points).toEqual([
      [1000, 2.5],
      [2000, 3.5],
    ]);
  });

  it('is asked for where nothing tells', () => {
    const text = '1,000\t2\n2,000\t3';
    expect(readPastedPoints(text).points[1]).toEqual([2, 3]);
    expect(codesOf(readPastedPoints(text))).toEqual(['decimal-unclear 1']);
    expect(readPastedPoints(text, { decimalSign: 'point' }).points[1]).toEqual([2000, 3]);
    expect(readPastedPoints(text).problems[0]?.sentence).toMatch(/1,000 was read as 1\.000, and 1 further figures/);
  });
});

describe('large tables', () => {
  it('are read in full up to the limit, in good time', () => {
    const rows = Array.from({ length: POINTS_LIMIT + 5 }, (_, i) => `${String(i)};${String(-i / 4)}`).join('\n');
    const before = performance.now();
    const pasted = readPastedPoints(rows);
    expect(performance.now() - before).toBeLessThan(5000);
    expect(pasted.points).toHaveLength(POINTS_LIMIT);
    expect(pasted.points.at(-1)).toEqual([POINTS_LIMIT - 1, -(POINTS_LIMIT - 1) / 4]);
    expect(codesOf(pasted)).toEqual(['too-many-rows']);
  });

  it('read back as written, whatever the separator', () => {
    const figure = fc.integer({ min: -1e6, max: 1e6 }).map((n) => n / 100);
    fc.assert(
      fc.property(
        fc.array(fc.tuple(figure, figure), { minLength: 1, maxLength: 30 }),
        fc.constantFrom('\t', ';', ' ', '  '),
        fc.boolean(),
        (points, sign, isComma) => {
          // One figure that tells the decimal sign.
          const all = [[0.5, 0.5] as const, ...points];
          const written = (n: number): string => (isComma ? String(n).replace('.', ',') : String(n));
          const text = all.map((point) => point.map(written).join(sign)).join('\n');
          expect(readPastedPoints(text)).toMatchObject({ points: all.map(([x, y]) => [x, y]), problems: [] });
        },
      ),
    );
  });

  it('never fails on any text', () => {
    fc.assert(
      fc.property(fc.stringMatching(/^[0-9.,;\t\n" ()[\]a-z#/-]{0,80}$/), (text) => {
        const { points } = readPastedPoints(text);
        expect(points.flat().every(Number.isFinite)).toBe(true);
      }),
      { numRuns: 500 },
    );
  });
});

describe('points for a curve with units of its own', () => {
  const inUnits = (text: string, x: string, y: string) => pointsInUnits(readPastedPoints(text), { x, y });

  it('are converted where the dimension is the same', () => {
    expect(inUnits('f (GHz)\tP (dBW)\n1.5\t-30', 'MHz', 'dBm')).toEqual({ ok: true, value: [[1500, 0]] });
  });

  it('stay as they are where the text names no unit', () => {
    expect(inUnits('1.5\t-30', 'MHz', 'dBm')).toEqual({ ok: true, value: [[1.5, -30]] });
  });

  it('are refused where a unit does not fit', () => {
    expect(inUnits('f (GHz)\tP (dBW)\n1.5\t-30', 'deg', 'dBW')).toEqual({
      ok: false,
      fault: 'The first column is in GHz, the curve in deg.',
    });
  });
});
