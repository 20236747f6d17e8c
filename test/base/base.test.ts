/** Results, assertions and ids. */
import { describe, expect, it } from 'vitest';
import { assert, fail, newShortId, newUuid, ok, present, unreachable, type Result } from '../../src/base';

describe('results', () => {
  it('are a value or a fault, told apart by ok', () => {
    const both: readonly Result<number, string>[] = [ok(3), fail('no')];
    expect(both.map((result) => (result.ok ? result.value : result.fault))).toEqual([3, 'no']);
  });
});

describe('assertions', () => {
  it('pass in silence', () => {
    expect(() => {
      assert(true, 'never said');
    }).not.toThrow();
  });

  it.each([false, 0, '', null, undefined, NaN])('stop the program for %s, with the message', (condition) => {
    expect(() => {
      assert(condition, 'the sheet holds');
    }).toThrow('broken invariant: the sheet holds');
  });

  it('present gives what is there, falsy or not, and stops for what is not', () => {
    expect([present(0, 'n'), present('', 's'), present(false, 'b')]).toEqual([0, '', false]);
    expect(() => present(undefined, 'the line')).toThrow('the line is missing');
    expect(() => present(null, 'the line')).toThrow('the line is missing');
  });

  it('unreachable stops the program, naming the value', () => {
    expect(() => unreachable('odd' as never)).toThrow('unexpected odd');
  });
});

describe('ids', () => {
  it('a UUID of version 4', () => {
    expect(newUuid()).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
  });

  it('a short id of letters and digits', () => {
    expect(newShortId()).toMatch(/^[a-z0-9]{12}$/);
  });

  it('are new each time', () => {
    const count = 2000;
    expect(new Set(Array.from({ length: count }, newShortId)).size).toBe(count);
    expect(new Set(Array.from({ length: count }, newUuid)).size).toBe(count);
  });
});
