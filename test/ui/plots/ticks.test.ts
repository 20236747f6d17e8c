import { describe, expect, it } from 'vitest';

import { logarithmicTicks, niceTicks, writeTick } from '../../../src/ui/plots/ticks';

describe('ticks of a linear axis', () => {
  it('stand at round figures that hold what is shown', () => {
    expect(niceTicks(-113.9, 33, 8)).toEqual({
      ...{ from: -150, to: 50, decimals: 0 },
      values: [-150, -100, -50, 0, 50],
    });
    expect(niceTicks(-92, -61, 8).values).toEqual([-95, -90, -85, -80, -75, -70, -65, -60]);
    expect(niceTicks(0, 0.3, 5)).toEqual({ from: 0, to: 0.3, decimals: 1, values: [0, 0.1, 0.2, 0.3] });
  });

  it('add no tick where the ends are ticks already', () => {
    expect(niceTicks(-20, 20, 5).values).toEqual([-20, -10, 0, 10, 20]);
  });

  it('are at most as many as asked for, at least two, and less than a step beyond each end', () => {
    for (const [low, high] of [
      [-130, 45],
      [-0.001, 0.0015],
      [999, 1001],
      [-1e9, 3],
      [-3, 7],
      [12, 12.0004],
    ] as const)
      for (const most of [3, 4, 6, 9, 12]) {
        const { values, from, to } = niceTicks(low, high, most);
        const step = (values[1] ?? NaN) - (values[0] ?? NaN);
        expect(values.length).toBeLessThanOrEqual(most);
        expect(values.length).toBeGreaterThanOrEqual(2);
        expect([from, to]).toEqual([values[0], values.at(-1)]);
        expect(from).toBeLessThanOrEqual(low);
        expect(to).toBeGreaterThanOrEqual(high);
        expect(low - from).toBeLessThan(step * 1.000001);
        expect(to - high).toBeLessThan(step * 1.000001);
      }
  });

  it('hold a single figure', () => {
    const { from, to, values } = niceTicks(-60, -60, 6);
    expect(from).toBeLessThan(-60);
    expect(to).toBeGreaterThan(-60);
    expect(values.length).toBeLessThanOrEqual(6);
    expect(niceTicks(3, 3.0000000000000004, 6)).toEqual(niceTicks(3, 3, 6));
  });
});

describe('ticks of a logarithmic axis', () => {
  it('stand at 1, 2 and 5 of each decade, or at decades, as there is room', () => {
    expect(logarithmicTicks(1, 100, 8).values).toEqual([1, 2, 5, 10, 20, 50, 100]);
    expect(logarithmicTicks(1, 100, 4).values).toEqual([1, 10, 100]);
    expect(logarithmicTicks(1, 1e9, 6).values).toEqual([1, 100, 1e4, 1e6, 1e8]);
  });

  it('keep the ends as they are', () => {
    expect(logarithmicTicks(30, 4000, 5)).toMatchObject({ from: 30, to: 4000, values: [100, 1000] });
  });

  it('go in equal steps within a part of a decade', () => {
    expect(logarithmicTicks(110, 180, 8).values).toEqual([110, 120, 130, 140, 150, 160, 170, 180]);
  });

  it('write small ones with the decimals they need', () => {
    const { values, decimals } = logarithmicTicks(0.01, 1, 4);
    expect(values).toEqual([0.01, 0.1, 1]);
    expect(decimals).toBe(2);
  });
});

describe('a tick in writing', () => {
  it('has a typographic minus, and none on zero', () => {
    expect([writeTick(-20, 0), writeTick(-0, 1), writeTick(0.3, 1)]).toEqual(['−20', '0.0', '0.3']);
  });
});
