/**
 * Wrong entries in the spellings that engineers type: each must be found, under the code given, and under no other.
 * A line without a code is right and stands beside the wrong ones to show where the edge is.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { expectLines, readLines } from '../engine/notation';

const folder = new URL('./wrong-budgets/', import.meta.url);
const names = readdirSync(folder).sort();
const read = (name: string): string => readFileSync(new URL(name, folder), 'utf8');

describe('wrong budgets', () => {
  it.each(names)('%s', (name) => {
    expectLines(read(name));
  });

  it('hold more than 40 wrong lines', () => {
    const wrong = names.flatMap((name) => readLines(read(name)).filter(({ codes }) => codes.length > 0));
    expect(wrong.length).toBeGreaterThan(40);
  });
});
