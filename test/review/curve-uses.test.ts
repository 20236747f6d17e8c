import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { curveUses } from '../../src/review';
import type { CurveSection, Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

const CURVE: CurveSection = {
  id: 'pattern',
  kind: 'curve',
  symbol: 'pattern',
  title: 'Antenna pattern',
  x: { label: 'Angle off the axis', unit: 'deg' },
  y: { label: 'Gain', unit: 'dB', quantity: 'gain' },
  points: [
    [0, 0],
    [10, -3],
    [20, -12],
  ],
};

function usesIn(text: string, curve: CurveSection = CURVE, ...caseIds: readonly string[]) {
  const sheet = sheetOf(text, ...caseIds);
  const worksheet: Worksheet = { ...sheet, sections: [curve, ...sheet.sections] };
  const evaluation = new Evaluation(worksheet);
  return worksheet.cases.map(({ id }) =>
    curveUses(evaluation, curve, id).map(({ symbol, x, y }) => [symbol, x, y] as const),
  );
}

describe('the uses of a curve', () => {
  it('are the calls in entries, with the argument in the unit of the first axis', () => {
    expect(usesIn('off = 5 deg\nG = pattern(off)\nH = 40 dBi + pattern(12 deg) - 1 dB')).toEqual([
      [
        ['G', 5, -1.5],
        ['H', 12, -4.8],
      ],
    ]);
  });

  it('may be several in one entry, and inside other calls', () => {
    expect(usesIn('G = max(pattern(0 deg), pattern(20 deg))')).toEqual([
      [
        ['G', 0, 0],
        ['G', 20, -12],
      ],
    ]);
  });

  it('have no figure beyond the ends of the curve, and are not there without an argument', () => {
    expect(usesIn('G = pattern(25 deg)\nH = pattern(missing)')).toEqual([[['G', 25, undefined]]]);
  });

  it('give the second axis in its own unit', () => {
    const loss: CurveSection = {
      ...CURVE,
      id: 'size',
      symbol: 'size',
      x: { label: 'Frequency', unit: 'MHz' },
      y: { label: 'Height', unit: 'km' },
      points: [
        [100, 1],
        [200, 3],
      ],
    };
    expect(usesIn('f = 0.15 GHz\nh | m = size(f)', loss)).toEqual([[['h', 150, 2]]]);
  });

  it('follow the case', () => {
    expect(usesIn('off = 5 deg @ b: 10 deg\nG = pattern(off)', CURVE, 'a', 'b')).toEqual([
      [['G', 5, -1.5]],
      [['G', 10, -3]],
    ]);
  });

  it('are none of a curve that cannot be called', () => {
    expect(usesIn('G = 3 dB', { ...CURVE, symbol: '' })).toEqual([[]]);
  });
});
