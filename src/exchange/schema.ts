/**
 * The shape of a worksheet file, version 1, as schemas that a file is read through once.
 * Holds: `static/worksheet.schema.json` accepts the same documents (a test compares the two); objects come out with their known
 * keys in the order of the file's contract and unknown keys, kept, after them. Each message names what is expected.
 */
import * as v from 'valibot';

import { QUANTITY_KINDS, SIDES } from '../quantity';
import {
  CHAIN_INPUTS,
  INTERCEPT_ADDITIONS,
  INTERPOLATIONS,
  STAGE_FIELDS,
  TEXT_LIMIT,
  type Requirement,
} from '../worksheet';

const listed = (names: readonly string[]): string => `one of ${names.join(', ')}`;
const withinLimit = (text: string): boolean => text.length <= TEXT_LIMIT || Array.from(text).length <= TEXT_LIMIT;
const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const text = v.pipe(v.string('text'), v.check(withinLimit, `text of at most ${String(TEXT_LIMIT)} characters`));
const id = v.pipe(v.string('an id'), v.nonEmpty('an id that is not empty'), v.check(withinLimit, 'a shorter id'));
const optionalText = v.exactOptional(text);
const optionalTruth = v.exactOptional(v.boolean('true or false'));
const object = v.custom<Record<string, unknown>>(isObject, 'an object');
const texts = v.pipe(object, v.record(v.string(), text));
const list = <Item extends v.GenericSchema>(item: Item): v.ArraySchema<Item, string> => v.array(item, 'a list');
const quantity = v.exactOptional(v.picklist(QUANTITY_KINDS, listed(QUANTITY_KINDS)));

const SHAPES = ['uniform', 'triangular', 'normal', 'arcsine'] as const;

const tolerance = v.pipe(
  object,
  v.looseObject({
    favourable: optionalText,
    adverse: optionalText,
    below: optionalText,
    above: optionalText,
    shape: v.exactOptional(v.picklist(SHAPES, listed(SHAPES))),
    group: optionalText,
  }),
);

const isPair = (value: unknown): boolean =>
  Array.isArray(value) && value.length === 2 && value.every((item) => typeof item === 'number');

const isBound = (value: unknown): boolean => typeof value === 'string' && withinLimit(value);
const requirement = v.custom<Requirement>(
  (value) =>
    isObject(value) &&
    Object.hasOwn(value, 'atLeast') !== Object.hasOwn(value, 'atMost') &&
    isBound(value['atLeast'] ?? value['atMost']),
  'an object with either atLeast or atMost as text',
);

/** A line of a section of lines, or of a pool. */
export const lineSchema = v.looseObject(
  {
    id,
    symbol: text,
    label: text,
    entry: text,
    unit: optionalText,
    quantity,
    side: v.exactOptional(v.picklist(SIDES, listed(SIDES))),
    byCase: v.exactOptional(texts),
    off: optionalTruth,
    digits: v.exactOptional(
      v.pipe(
        v.number('a number'),
        v.integer('a whole number'),
        v.minValue(0, '0 or more'),
        v.maxValue(15, 'at most 15'),
      ),
    ),
    tolerance: v.exactOptional(tolerance),
    requirement: v.exactOptional(requirement),
    source: optionalText,
    note: optionalText,
    accepted: v.exactOptional(list(v.looseObject({ code: text, entry: text, reason: text }, 'an object'))),
    signOff: v.exactOptional(list(v.looseObject({ by: text, on: text, basis: text }, 'an object'))),
  },
  'an object',
);

const head = { id, kind: text, title: text };
const symbol = { symbol: text };

const linesSection = v.looseObject({ ...head, lines: list(lineSchema) }, 'an object');

const stageFigures = v.entriesFromList(STAGE_FIELDS, optionalText);
const accepted = list(v.looseObject({ code: text, entry: text, reason: text }, 'an object'));

const stage = v.looseObject(
  {
    id,
    symbol: text,
    label: text,
    off: optionalTruth,
    ...stageFigures,
    byCase: v.exactOptional(v.pipe(object, v.record(v.string(), v.pipe(object, v.looseObject(stageFigures))))),
    tolerance: v.exactOptional(v.pipe(object, v.record(v.string(), tolerance))),
    source: optionalText,
    note: optionalText,
    accepted: v.exactOptional(v.pipe(object, v.record(v.string(), accepted))),
  },
  'an object',
);

const chain = v.looseObject({
  ...head,
  ...symbol,
  ...v.entriesFromList(CHAIN_INPUTS, optionalText),
  intercept: v.exactOptional(v.picklist(INTERCEPT_ADDITIONS, listed(INTERCEPT_ADDITIONS))),
  accepted: v.exactOptional(accepted),
  stages: list(stage),
});

const pool = v.looseObject({
  ...head,
  ...symbol,
  unit: optionalText,
  requirement: v.exactOptional(requirement),
  lines: list(lineSchema),
});

const axis = { label: text, unit: text };
const curve = v.looseObject({
  ...head,
  ...symbol,
  x: v.looseObject(axis, 'an object'),
  y: v.looseObject({ ...axis, quantity }, 'an object'),
  interpolation: v.exactOptional(v.picklist(INTERPOLATIONS, listed(INTERPOLATIONS))),
  logarithmic: optionalTruth,
  points: list(v.custom<readonly [number, number]>(isPair, 'a pair of numbers')),
});

/** The shape of each kind of section. A section of another kind has an id and a title, and is kept word for word. */
export const sectionSchemas = { lines: linesSection, chain, pool, curve } as const;

/** A section of a kind that this version does not know. */
export const unknownSectionSchema = v.looseObject(head, 'an object');

/** The worksheet without what its sections hold. */
export const worksheetSchema = v.looseObject(
  {
    id,
    title: text,
    summary: optionalText,
    cases: v.pipe(list(v.looseObject({ id, name: text }, 'an object')), v.minLength(1, 'at least one case')),
    sections: list(object),
    recorded: v.exactOptional(v.pipe(object, v.record(v.string(), texts))),
  },
  'an object',
);
