/** The counting generator: known answers, evenness, and streams that do not depend on how they are cut. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fillEven, streamKey, threefry2x32, type StreamKey } from '../../src/analysis';

const hex = (words: StreamKey): string => words.map((word) => word.toString(16).padStart(8, '0')).join(' ');

const ZERO: StreamKey = [0, 0];
const ONES: StreamKey = [0xffffffff, 0xffffffff];
const PI: StreamKey = [0x243f6a88, 0x85a308d3];
const FURTHER: StreamKey = [0x13198a2e, 0x03707344];

describe('Threefry-2x32', () => {
  // The known answers that its authors publish with their implementation, recalled.
  it.each([
    [13, ZERO, ZERO, '9d1c5ec6 8bd50731'],
    [13, ONES, ONES, 'fd36d048 2d17272c'],
    [13, PI, FURTHER, 'ba3e4725 f27d669e'],
    [20, ZERO, ZERO, '6b200159 99ba4efe'],
    [20, ONES, ONES, '1cb996fc bb002be7'],
    [20, PI, FURTHER, 'c4923a9c 483df7a0'],
  ] as const)('in %d rounds gives the known answer for %j under %j', (rounds, counter, key, answer) => {
    expect(hex(threefry2x32(counter, key, rounds))).toBe(answer);
  });
});

function even(key: StreamKey, start: number, count: number): Float64Array {
  const column = new Float64Array(count);
  fillEven(column, key, start, count);
  return column;
}

describe('streams', () => {
  it('are the cipher of the trial, 13 rounds, as 52 bits between 0 and 1', () => {
    const key = streamKey(7, 'line a');
    const [x0, x1] = threefry2x32([12345, 0], key, 13);
    expect(even(key, 12345, 1)[0]).toBe(((x0 >>> 6) * 2 ** 26 + (x1 >>> 6) + 0.5) / 2 ** 52);
  });

  it('do not depend on where a block begins', () => {
    fc.assert(
      fc.property(fc.nat(1e6), fc.integer({ min: 1, max: 300 }), fc.nat(299), (start, count, offset) => {
        const key = streamKey(3, 'line x');
        const at = Math.min(offset, count - 1);
        expect(even(key, start, count)[at]).toBe(even(key, start + at, 1)[0]);
      }),
    );
  });

  it('are even, and do not follow one another', () => {
    const count = 200_000;
    const columns = ['line a', 'line b', 'group a'].map((name) => even(streamKey(1, name), 0, count));
    for (const column of columns) {
      const bins = new Array<number>(100).fill(0);
      for (const u of column) bins[Math.floor(u * 100)] = (bins[Math.floor(u * 100)] ?? 0) + 1;
      const chiSquare = bins.reduce((sum, bin) => sum + (bin - count / 100) ** 2 / (count / 100), 0);
      // 99 degrees of freedom: 99.99 % lie below 161.
      expect(chiSquare).toBeLessThan(161);
      expect(Math.min(...column.slice(0, 1000))).toBeGreaterThan(0);
    }
    const [a = new Float64Array(0), b = new Float64Array(0)] = columns;
    const product = a.reduce((sum, u, i) => sum + (u - 0.5) * ((b[i] ?? 0) - 0.5), 0) / count / (1 / 12);
    expect(Math.abs(product)).toBeLessThan(4 / Math.sqrt(count));
    const next = a.reduce((sum, u, i) => sum + (u - 0.5) * ((a[i + 1] ?? 0.5) - 0.5), 0) / count / (1 / 12);
    expect(Math.abs(next)).toBeLessThan(4 / Math.sqrt(count));
  });

  it('differ by name and by every bit of the seed', () => {
    const names = ['line a', 'line b', 'line ab', 'line ba', 'line l1', 'line l2', 'group a', ''];
    const seeds = [0, 1, 2 ** 32, 2 ** 32 + 1, Number.MAX_SAFE_INTEGER];
    const keys = names.flatMap((name) => seeds.map((seed) => hex(streamKey(seed, name))));
    expect(new Set(keys).size).toBe(names.length * seeds.length);
  });
});
