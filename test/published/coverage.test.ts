/**
 * What of the handed-down checks is run, and what is not.
 *
 * There are 791 records of constants, budgets, cascades, levels, propagation, modulation and fading. Those that this version can
 * put through a worksheet stand word for word in `data/` (id, inputs, figures, tolerance, source, how), 401 of them, and every
 * one is run by `checks.test.ts`. The other 390 are named in `not-covered.json` under the reason: for the most part functions of
 * later milestones; some are limits or definitions in which there is nothing to compute. A record that becomes reachable moves
 * from there into `data/`, and gets a recipe. Cascades and combinations go through chains and pools as well
 * (`chains.test.ts`). `data/prose.json` holds 15 more, which were handed down in the prose beside them.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { figuresOf, RECORDS } from './records';
import { recipeOf, RECIPES } from './recipes';

const notCovered = JSON.parse(readFileSync(new URL('./not-covered.json', import.meta.url), 'utf8')) as Record<
  string,
  readonly string[]
>;
const covered = RECORDS.map(({ id }) => id);
const records = covered.filter((id) => !id.startsWith('prose-'));
const left = Object.values(notCovered).flat();

describe('coverage of the handed-down checks', () => {
  it('is 401 run and 390 named with a reason, each once', () => {
    expect([records.length, left.length]).toEqual([401, 390]);
    expect(new Set([...records, ...left]).size).toBe(791);
    expect(new Set(covered).size).toBe(401 + 15);
  });

  it('gives every record exactly one recipe', () => {
    expect(covered.filter((id) => RECIPES.filter(({ ids }) => ids.test(id)).length !== 1)).toEqual([]);
  });

  it('has no recipe without a record', () => {
    expect(RECIPES.filter(({ ids }) => !covered.some((id) => ids.test(id))).map(({ ids }) => String(ids))).toEqual([]);
  });

  it('checks at least one figure of every record, and names each that it leaves out', () => {
    const silent = RECORDS.filter((record) => {
      const { without = {} } = recipeOf(record.id);
      const keys = new Set(
        figuresOf(record).map(({ key }) => (key in record.expected ? key : key.replace(/_\d+$/, ''))),
      );
      const checked = [...keys].filter((key) => !(key in without));
      return checked.length === 0 || Object.keys(record.expected).some((key) => !keys.has(key) && !(key in without));
    });
    expect(silent.map(({ id }) => id)).toEqual([]);
  });

  it('tells of every record how it came here', () => {
    expect(
      RECORDS.filter(({ how, source }) => !['read', 'computed', 'memory'].includes(how) || source.length < 5).map(
        ({ id }) => id,
      ),
    ).toEqual([]);
  });
});
