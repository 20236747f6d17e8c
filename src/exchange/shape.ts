/**
 * From plain data to a worksheet: each part is read through its schema, and the first thing that does not fit is told with its
 * path, what was expected and what was found.
 */
import * as v from 'valibot';

import { fail, ok, type Result } from '../base';
import { LINES_LIMIT, type OtherSection, type Section, type Worksheet } from '../worksheet';
import type { FileFault } from './file-fault';
import { pathText } from './json-text';
import { sectionSchemas, unknownSectionSchema, worksheetSchema } from './schema';

/** The worksheet that the data holds. `content` is the document without `format` and `version`. */
export function readShape(content: unknown): Result<Worksheet, FileFault> {
  const outer = read(worksheetSchema, content, []);
  if (!outer.ok) return outer;
  const rows = outer.value.sections.reduce((sum, section) => sum + rowsOf(section), 0);
  if (rows > LINES_LIMIT) return fail(tooManyLines(rows));
  const sections: Section[] = [];
  for (const [i, data] of outer.value.sections.entries()) {
    const section = readSection(data, i);
    if (!section.ok) return section;
    sections.push(section.value);
  }
  return ok({ ...outer.value, sections });
}

function readSection(data: Readonly<Record<string, unknown>>, index: number): Result<Section, FileFault> {
  const path = ['sections', index];
  const kind = data['kind'];
  if (typeof kind === 'string' && Object.hasOwn(sectionSchemas, kind)) {
    const section = read<v.GenericSchema>(sectionSchemas[kind as keyof typeof sectionSchemas], data, path);
    return section.ok ? ok(section.value as Section) : section;
  }
  const section = read(unknownSectionSchema, data, path);
  if (!section.ok) return section;
  const { id, title } = section.value;
  return ok<OtherSection>({ id, kind: section.value.kind, title, content: data });
}

/** How many lines or stages a section holds. */
function rowsOf(section: Readonly<Record<string, unknown>>): number {
  const count = (rows: unknown): number => (Array.isArray(rows) ? rows.length : 0);
  return count(section['lines']) + count(section['stages']);
}

function read<Schema extends v.GenericSchema>(
  schema: Schema,
  data: unknown,
  path: readonly (string | number)[],
): Result<v.InferOutput<Schema>, FileFault> {
  const result = v.safeParse(schema, data, { abortEarly: true });
  return result.success ? ok(result.output) : fail(shapeFault(result.issues[0], path));
}

function shapeFault(issue: v.BaseIssue<unknown>, path: readonly (string | number)[]): FileFault {
  const steps = [...path, ...(issue.path ?? []).map((item) => item.key as string | number)];
  const place = pathText(steps);
  const isMissing = issue.type === 'loose_object' && issue.received === 'undefined';
  const what = isMissing ? 'missing' : `${issue.message} expected, ${foundText(issue.input)} found`;
  return { code: 'wrong-shape', path: place, sentence: `${place === '' ? 'worksheet' : place}: ${what}.` };
}

function foundText(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return value.length === 0 ? 'an empty list' : 'a list';
  switch (typeof value) {
    case 'string':
      return value.length <= 24 ? `“${value}”` : `text of ${String(value.length)} characters`;
    case 'number':
      return `number ${String(value)}`;
    case 'boolean':
      return String(value);
    default:
      return 'an object';
  }
}

function tooManyLines(rows: number): FileFault {
  const sentence = `This file has ${String(rows)} lines; at most ${String(LINES_LIMIT)} are taken. Split it into several worksheets.`;
  return { code: 'too-many-lines', path: 'sections', sentence };
}
