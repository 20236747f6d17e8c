import { describe, expect, it } from 'vitest';

import type { CurveUse } from '../../../src/review';
import { boxesMeet, isWithin, textWidth, type Box } from '../../../src/ui/plots/boxes';
import {
  axisTitle,
  CURVE_LABEL_PX,
  layoutCurve,
  tableRows,
  type CurveLayout,
} from '../../../src/ui/plots/curve-layout';
import type { CurveSection } from '../../../src/worksheet';

const PATTERN: CurveSection = {
  ...{ id: 'c', kind: 'curve', symbol: 'pattern', title: 'Antenna pattern', interpolation: 'monotone' },
  x: { label: 'Angle', unit: 'deg' },
  y: { label: 'Gain', unit: 'dBi' },
  points: [
    [0, 17],
    [10, 14],
    [30, -4],
    [90, -15],
  ],
};
const CABLE: CurveSection = {
  ...{ id: 'd', kind: 'curve', symbol: 'cable', title: 'Cable', logarithmic: true },
  x: { label: 'Frequency', unit: 'Hz' },
  y: { label: '', unit: 'dB' },
  points: [
    [1e6, 1],
    [1e8, 5],
    [1e10, 60],
  ],
};

const use = (symbol: string, x: number, y?: number): CurveUse => ({ lineId: symbol, symbol, label: '', x, y });

function layout(section: CurveSection, uses: readonly CurveUse[] = [], widthPx = 800): CurveLayout {
  const made = layoutCurve(section, uses, { widthPx });
  if (made === undefined) throw new Error('there is no curve');
  return made;
}

describe('the layout of a curve', () => {
  it('stands the points on the curve, at their places on the axes', () => {
    const { points, plot, line, yTicks } = layout(PATTERN);
    expect(yTicks.map(({ text }) => text)).toEqual(['−15', '−10', '−5', '0', '5', '10', '15', '20']);
    expect(points[0]?.x).toBe(plot.left);
    expect(points[3]?.y).toBe(plot.bottom);
    // A third of 90 degrees.
    expect(points[2]?.x).toBeCloseTo(plot.left + (plot.right - plot.left) / 3, 9);
    for (const point of points)
      expect(line.some(({ x, y }) => Math.abs(x - point.x) < 1e-9 && Math.abs(y - point.y) < 1e-9)).toBe(true);
  });

  it('draws a monotone curve that never turns where its points do not', () => {
    const { line } = layout(PATTERN);
    line.slice(1).forEach(({ x, y }, index) => {
      expect(x).toBeGreaterThanOrEqual(line[index]?.x ?? Infinity);
      expect(y).toBeGreaterThanOrEqual((line[index]?.y ?? Infinity) - 1e-9);
    });
  });

  it('counts by the logarithm where the curve does', () => {
    const { points, xTicks, plot } = layout(CABLE);
    expect(points[1]?.x).toBeCloseTo((plot.left + plot.right) / 2, 9);
    expect(xTicks.map(({ text }) => text)).toEqual(['1×10⁶', '10×10⁶', '100×10⁶', '1×10⁹', '10×10⁹']);
  });

  it('tells the figures of a narrow band far from zero apart', () => {
    const band: CurveSection = {
      ...{ ...CABLE, logarithmic: false },
      points: [
        [2.4e9, 1],
        [2.4001e9, 2],
      ],
    };
    const texts = layout(band).xTicks.map(({ text }) => text);
    expect(new Set(texts).size).toBe(texts.length);
    expect(texts[0]).toBe('2.4×10⁹');
  });

  it.each([300, 380, 800, 1200])('lets no figures of the axes meet or leave the drawing at %i px', (widthPx) => {
    for (const section of [PATTERN, CABLE]) {
      const { width, height, plot, xTicks, yTicks } = layout(section, [], widthPx);
      const boxes: Box[] = [
        ...xTicks.map(({ x, text }) => ({
          ...{ left: x - textWidth(text, CURVE_LABEL_PX) / 2, right: x + textWidth(text, CURVE_LABEL_PX) / 2 },
          ...{ top: plot.bottom + 8, bottom: plot.bottom + 21 },
        })),
        ...yTicks.map(({ y, text }) => ({
          ...{ left: plot.left - 6 - textWidth(text, CURVE_LABEL_PX), right: plot.left - 6 },
          ...{ top: y - 6, bottom: y + 6 },
        })),
      ];
      boxes.forEach((box, index) => {
        expect(isWithin(box, { left: 0, top: 0, right: width, bottom: height })).toBe(true);
        for (const other of boxes.slice(index + 1)) expect(boxesMeet(box, other)).toBe(false);
      });
    }
  });

  it('marks and names the places at which lines read it, those at one place together', () => {
    const { uses, plot } = layout(PATTERN, [use('G_a', 45, -7), use('G_b', 45, -7), use('G_c', 10, 14)]);
    expect(uses.map(({ label }) => label?.text)).toEqual(['G_a, G_b: −7 dBi', 'G_c: 14 dBi']);
    expect(uses[0]?.x).toBeCloseTo((plot.left + plot.right) / 2, 9);
    expect(uses[0]?.description).toBe('G_a, G_b: −7 dBi at 45 deg');
  });

  it('lets no names meet, however many there are', () => {
    const many = Array.from({ length: 40 }, (_, i) => use(`G_${String(i)}`, i * 2, 17 - i * 0.8));
    const { uses, plot } = layout(PATTERN, many, 380);
    const boxes = uses.flatMap(({ label }) => label?.box ?? []);
    expect(uses).toHaveLength(40);
    expect(boxes.length).toBeGreaterThan(2);
    boxes.forEach((box, index) => {
      expect(isWithin(box, plot)).toBe(true);
      for (const other of boxes.slice(index + 1)) expect(boxesMeet(box, other)).toBe(false);
    });
  });

  it('says which lines read it where it has no value', () => {
    const { uses, outside } = layout(PATTERN, [use('G_a', 100)]);
    expect(uses).toEqual([]);
    expect(outside).toEqual(['G_a reads the curve at 100 deg, where it has no value.']);
  });

  it('is not there while the table is no curve', () => {
    expect(layoutCurve({ ...PATTERN, points: [[0, 1]] }, [], { widthPx: 800 })).toBeUndefined();
    expect(layoutCurve({ ...PATTERN, x: { label: '', unit: 'parsnip' } }, [], { widthPx: 800 })).toBeUndefined();
  });

  it('holds a level curve too', () => {
    const flat: CurveSection = {
      ...PATTERN,
      points: [
        [0, 3],
        [1, 3],
      ],
    };
    const { line, plot } = layout(flat);
    for (const { y } of line) expect(y > plot.top && y < plot.bottom).toBe(true);
  });
});

describe('the words of a curve', () => {
  it('name an axis with its unit, and by x and y where it has no name', () => {
    expect([axisTitle(PATTERN.x, 'x'), axisTitle(CABLE.y, 'y'), axisTitle({ label: 'n', unit: '1' }, 'x')]).toEqual([
      'Angle, deg',
      'y, dB',
      'n',
    ]);
  });

  it('list points and uses in the order of x', () => {
    expect(tableRows(PATTERN, [use('G_a', 20, 5)]).map(({ x, y, use: by }) => [x, y, by?.symbol])).toEqual([
      [0, 17, undefined],
      [10, 14, undefined],
      [20, 5, 'G_a'],
      [30, -4, undefined],
      [90, -15, undefined],
    ]);
  });
});
