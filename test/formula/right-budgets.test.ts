/**
 * Right budgets, one file each, in the forms that engineers type: none may draw a warning or an error, and notes only where
 * the algebra has one. Figures were worked out apart from the program.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { CATALOGUE, type FindingCode } from '../../src/findings';
import { expectLines, readLines } from '../engine/notation';

const folder = new URL('./right-budgets/', import.meta.url);
const names = readdirSync(folder).sort();
const read = (name: string): string => readFileSync(new URL(name, folder), 'utf8');

describe('right budgets', () => {
  it.each(names)('%s', (name) => {
    expectLines(read(name));
  });

  it.each(names)('%s expects no warning and no error', (name) => {
    const codes = readLines(read(name)).flatMap((line) => line.codes);
    expect(codes.filter((code) => CATALOGUE[code as FindingCode].severity !== 'note')).toEqual([]);
  });

  it('come in at least 25 kinds', () => {
    expect(names.length).toBeGreaterThanOrEqual(25);
  });
});
