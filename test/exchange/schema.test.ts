import { readFileSync } from 'node:fs';

import { Ajv2020 } from 'ajv/dist/2020.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { MANY, worksheets } from '../worksheet/arbitrary';
import { exampleDocument } from './example';

const schema = JSON.parse(
  readFileSync(new URL('../../static/worksheet.schema.json', import.meta.url), 'utf8'),
) as object;
const validate = new Ajv2020({ strict: true, strictRequired: false }).compile(schema);

/** Faults that the schema cannot express; its description says so. */
const BEYOND_SCHEMA = ['id-given-twice', 'key-given-twice', 'refused-key', 'nested-too-deeply'];

type Step = string | number;

/** Every place in the data, as a path. */
function placesIn(data: unknown, path: readonly Step[] = []): (readonly Step[])[] {
  if (typeof data !== 'object' || data === null) return [path];
  const inner = Array.isArray(data)
    ? data.flatMap((item, i) => placesIn(item, [...path, i]))
    : Object.entries(data).flatMap(([key, item]) => placesIn(item, [...path, key]));
  return [path, ...inner];
}

/** True when the data still has something at this path. */
function hasPlace(data: unknown, [step, ...rest]: readonly Step[]): boolean {
  if (step === undefined) return true;
  if (typeof data !== 'object' || data === null || !Object.hasOwn(data, step)) return false;
  return hasPlace((data as Record<Step, unknown>)[step], rest);
}

/** The data with the value at a path replaced, or taken away when `value` is undefined. */
function replaced(data: unknown, [step, ...rest]: readonly Step[], value: unknown): unknown {
  if (step === undefined) return value;
  if (Array.isArray(data)) {
    const item: unknown = rest.length === 0 ? value : replaced(data[Number(step)], rest, value);
    const items: unknown[] = [...(data as unknown[])];
    items.splice(Number(step), 1, ...(item === undefined ? [] : [item]));
    return items;
  }
  const { [step]: old, ...others } = data as Record<string, unknown>;
  const item = rest.length === 0 ? value : replaced(old, rest, value);
  return item === undefined ? others : { ...(data as object), [step]: item };
}

const strangers = fc.oneof(
  fc.constantFrom<unknown>(
    undefined,
    null,
    true,
    0,
    1,
    -1,
    1.5,
    16,
    '',
    'x',
    [],
    {},
    ['a'],
    [1, 2],
    { a: 1 },
    { a: 'b' },
  ),
  fc.constantFrom<unknown>(
    { atLeast: '1 dB' },
    { atMost: 3 },
    { atLeast: '1', atMost: '2' },
    'chain',
    'pool',
    'curve',
    'lines',
  ),
  fc.constantFrom<unknown>(
    'level',
    'wanted',
    'uniform',
    'power',
    'x'.repeat(65_536),
    'x'.repeat(65_537),
    '𝄞'.repeat(65_536),
  ),
);

describe('the published schema', () => {
  it('accepts the example', () => {
    expect(validate(exampleDocument())).toBe(true);
  });

  it('describes every property', () => {
    const bare: string[] = [];
    const visit = (node: unknown, path: string): void => {
      if (typeof node !== 'object' || node === null) return;
      for (const [name, property] of Object.entries((node as { properties?: Record<string, object> }).properties ?? {}))
        if (!('description' in property) && !('$ref' in property) && !('const' in property))
          bare.push(`${path}.${name}`);
      for (const [key, item] of Object.entries(node)) visit(item, `${path}/${key}`);
    };
    visit(schema, '');
    expect(bare).toEqual([]);
  });

  it('accepts every worksheet that is written', MANY, () => {
    fc.assert(
      fc.property(worksheets, (worksheet) => {
        expect(validate(JSON.parse(writeWorksheetFile(worksheet)))).toBe(true);
      }),
      { numRuns: 200 },
    );
  });

  it('agrees with the reader on documents with one or two things wrong', MANY, () => {
    const places = placesIn(exampleDocument());
    const mutation = fc.tuple(fc.constantFrom(...places), strangers);
    const counts = { good: 0, bad: 0 };
    fc.assert(
      fc.property(mutation, fc.option(mutation), ([path, value], second) => {
        const once = replaced(exampleDocument(), path, value);
        const isTherePlace = second !== null && hasPlace(once, second[0]);
        const document = isTherePlace ? replaced(once, second[0], second[1]) : once;
        fc.pre(document !== undefined);
        const result = readWorksheetFile(JSON.stringify(document));
        if (!result.ok && BEYOND_SCHEMA.includes(result.fault.code)) return;
        const isRead = result.ok && result.value.readOnly === undefined;
        counts[isRead ? 'good' : 'bad']++;
        const isValid = validate(document);
        expect({ path, isValid, fault: result.ok ? null : result.fault.path }).toMatchObject({ isValid: isRead });
      }),
      { numRuns: 3000, seed: 20_200_012 },
    );
    expect(counts.good).toBeGreaterThan(200);
    expect(counts.bad).toBeGreaterThan(1000);
  });
});
