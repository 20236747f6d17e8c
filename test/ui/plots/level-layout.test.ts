import { describe, expect, it } from 'vitest';

import { boxesMeet, isWithin, textWidth, type Box } from '../../../src/ui/plots/boxes';
import { LABEL_PX, layoutLevels, type LevelLayout } from '../../../src/ui/plots/level-layout';
import { chainOf, diagramOf } from './support';

/** Labels that stand level, as boxes. */
function levelLabels(layout: LevelLayout): (Box & { what: string })[] {
  const centred = (x: number, y: number, text: string, sizePx: number) => ({
    ...{ what: text, left: x - textWidth(text, sizePx) / 2, right: x + textWidth(text, sizePx) / 2 },
    ...{ top: y - sizePx * 0.8, bottom: y + sizePx * 0.2 },
  });
  return [
    ...layout.ticks.map(({ y, text }) => ({
      ...{ what: `tick ${text}`, left: layout.plot.left - 6 - textWidth(text, LABEL_PX), right: layout.plot.left - 6 },
      ...{ top: y - 6, bottom: y + 6 },
    })),
    ...layout.endLabels.map(({ text, x, y }) => ({
      ...{ what: text, left: x, right: x + textWidth(text, LABEL_PX), top: y - 10, bottom: y + 3 },
    })),
    ...layout.points.flatMap(({ name, step }) => [
      ...(name.isAslant ? [] : [centred(name.x, name.y, name.text, LABEL_PX + 1)]),
      ...(step === undefined ? [] : [centred(step.x, step.y, step.text, LABEL_PX)]),
    ]),
    ...layout.brackets.map(({ box, text }) => ({ ...box, what: text.words })),
    ...layout.values.map(({ box, lines }) => ({ ...box, what: lines.map(({ text }) => text).join(' ') })),
  ];
}

const sizes = [1, 5, 12, 40].flatMap((stages) =>
  [380, 1200].flatMap((widthPx) => [false, true].map((showLinear) => ({ stages, widthPx, showLinear }))),
);

describe('the layout of a level diagram', () => {
  it.each(sizes)('cuts nothing off and lets no labels meet: %o', ({ stages, widthPx, showLinear }) => {
    const layout = layoutLevels(diagramOf(chainOf(stages)), { widthPx, showLinear });
    const labels = levelLabels(layout);
    const page: Box = { left: 0, top: 0, right: layout.width, bottom: layout.height };
    for (const label of labels) expect.soft(isWithin(label, page), `${label.what} is cut off`).toBe(true);
    labels.forEach((label, index) => {
      for (const other of labels.slice(index + 1))
        expect.soft(boxesMeet(label, other), `${label.what} meets ${other.what}`).toBe(false);
    });
  });

  it.each(sizes)(
    'keeps names that stand aslant apart and within the drawing: %o',
    ({ stages, widthPx, showLinear }) => {
      const layout = layoutLevels(diagramOf(chainOf(stages)), { widthPx, showLinear });
      const aslant = layout.points.filter(({ name }) => name.isAslant);
      expect(aslant.length === 0 || aslant.length === layout.points.length).toBe(true);
      aslant.forEach(({ name }, index) => {
        const reach = textWidth(name.text, LABEL_PX + 1) * Math.SQRT1_2;
        expect(name.x + reach).toBeLessThanOrEqual(layout.width);
        expect(name.y + reach).toBeLessThanOrEqual(layout.height);
        const next = aslant[index + 1];
        // The distance between two baselines.
        if (next !== undefined) expect((next.name.x - name.x) * Math.SQRT1_2).toBeGreaterThanOrEqual(LABEL_PX + 1);
      });
    },
  );

  it('is as wide as its place while the points fit, and wider where they do not', () => {
    const width = (stages: number, widthPx: number): number =>
      layoutLevels(diagramOf(chainOf(stages)), { widthPx, showLinear: false }).width;
    expect(width(5, 380)).toBeLessThanOrEqual(380);
    expect(width(12, 1200)).toBeLessThanOrEqual(1200);
    expect(width(12, 1200)).toBeGreaterThan(1150);
    expect(width(40, 1200)).toBeLessThanOrEqual(1200);
    expect(width(40, 380)).toBeGreaterThan(380);
    // Two points are not drawn to the ends of a wide page.
    expect(width(1, 1200)).toBeLessThan(500);
  });

  it.each(sizes)('gives the S/N at the first and the last point: %o', ({ stages, widthPx, showLinear }) => {
    const { brackets, points } = layoutLevels(diagramOf(chainOf(stages)), { widthPx, showLinear });
    const xs = brackets.map(({ x }) => x);
    expect(xs).toContain(points[0]?.x);
    expect(xs).toContain(points.at(-1)?.x);
  });

  it('gives every S/N and every step where there is room', () => {
    const layout = layoutLevels(diagramOf(chainOf(5)), { widthPx: 1200, showLinear: false });
    expect(layout.brackets).toHaveLength(6);
    expect(layout.points.map(({ step }) => step?.text)).toEqual([
      undefined,
      ...['−1.50 dB', '+18.00 dB', '−7.00 dB', '+9.00 dB', '−3.20 dB'],
    ]);
  });

  it('stands a level where the axis says', () => {
    const { series, ticks, plot } = layoutLevels(diagramOf(chainOf(2)), { widthPx: 800, showLinear: false });
    const wanted = series.find(({ name }) => name === 'wanted')?.marks[0];
    const [first, last] = [ticks[0], ticks.at(-1)];
    const level = (text?: string): number => Number(text?.replace('−', '-'));
    const share = (-85 - level(first?.text)) / (level(last?.text) - level(first?.text));
    expect(wanted?.y).toBeCloseTo(plot.bottom - share * (plot.bottom - plot.top), 6);
  });

  it('draws limits as caps and levels as lines, broken where one is not known', () => {
    const diagram = diagramOf(chainOf(5));
    const cut = {
      ...diagram,
      points: diagram.points.map((point, index) => {
        const { noise, ...rest } = point;
        return index === 2 || noise === undefined ? rest : point;
      }),
    };
    const { series } = layoutLevels(cut, { widthPx: 900, showLinear: false });
    const of = (name: string) => series.find((one) => one.name === name);
    expect(of('wanted')?.runs.map(({ length }) => length)).toEqual([6]);
    expect(of('noise')?.runs.map(({ length }) => length)).toEqual([2, 3]);
    expect(of('compression')?.runs).toEqual([]);
    expect(of('compression')?.marks).toHaveLength(2);
    expect(of('intercept')?.isLimit).toBe(true);
  });

  it('puts the name of a bypassed stage in brackets and says what they mean', () => {
    const chain = chainOf(3);
    const layout = layoutLevels(
      diagramOf({ ...chain, stages: chain.stages.map((stage, i) => (i === 1 ? { ...stage, off: true } : stage)) }),
      { widthPx: 800, showLinear: false },
    );
    expect(layout.points.map(({ name }) => name.text)).toEqual(['input', 'bpf', '(lna)', 'mixer']);
    expect(layout.remark?.text).toBe('In brackets: bypassed.');
    expect(layout.points[2]?.description).toContain('(bypassed)');
  });

  it('says in words all that is known of a point', () => {
    const { points } = layoutLevels(diagramOf(chainOf(2)), { widthPx: 800, showLinear: false });
    expect(points[2]?.description).toBe(
      'lna, Low-noise amplifier: wanted −68.50 dBm, noise −101.76 dBm, interferer −28.50 dBm, third-order intercept 28.00 dBm, S/N 33.26 dB, step +18.00 dB',
    );
  });

  it('shortens a name that is too long for any drawing', () => {
    const chain = chainOf(2);
    const layout = layoutLevels(
      diagramOf({
        ...chain,
        stages: chain.stages.map((stage) => ({ ...stage, symbol: '', label: 'A very long name of a stage indeed' })),
      }),
      { widthPx: 380, showLinear: false },
    );
    expect(layout.points[1]?.name.text).toBe('A very long name of…');
    expect(layout.points[1]?.description).toMatch(/^A very long name of a stage indeed: /);
  });
});
