/**
 * Reading a worksheet file. A file is untrusted: size, nesting and keys are checked on the text, then its shape, then what the
 * shape cannot say. A file that fails any of it is refused as a whole, with the place and what was expected there.
 * Holds: no text makes this throw or hang; unknown keys and sections of other kinds come through untouched.
 */
import { fail, ok, type Result } from '../base';
import { allLines, isChainSection, isOtherSection, type Worksheet } from '../worksheet';
import { checkDocument } from './document-checks';
import type { FileFault } from './file-fault';
import { checkJsonText } from './json-text';
import { FILE_BYTES_LIMIT, NESTING_LIMIT } from './limits';
import { migrate, WORKSHEET_VERSION } from './migrations';
import { readShape } from './shape';

/** The first key of every worksheet file. */
export const FORMAT = 'levelwright-worksheet';

/** What a file gave. */
export interface ReadWorksheet {
  readonly worksheet: Worksheet;
  /** Present when the worksheet must not be saved over its file: why, as a sentence for the user. */
  readonly readOnly?: string;
  /** What the user should know about the file, as sentences. */
  readonly messages: readonly string[];
}

/** Reads a file's bytes, which must be UTF-8, with or without a byte-order mark. */
export function readWorksheetBytes(bytes: Uint8Array): Result<ReadWorksheet, FileFault> {
  if (bytes.byteLength > FILE_BYTES_LIMIT) return fail(TOO_LARGE);
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return fail({
      code: 'not-text',
      path: '',
      sentence: 'This file is no UTF-8 text. If another program saved it, let it save as UTF-8.',
    });
  }
  return readWorksheetFile(text);
}

/** Reads the text of a file. */
export function readWorksheetFile(text: string): Result<ReadWorksheet, FileFault> {
  if (isLongerThan(text, FILE_BYTES_LIMIT)) return fail(TOO_LARGE);
  const json = text.startsWith('\ufeff') ? text.slice(1) : text;
  const checked = checkJsonText(json, NESTING_LIMIT);
  if (!checked.ok) return fail(withPath(checked.fault));
  const document: unknown = JSON.parse(json);
  if (!isObject(document) || document['format'] !== FORMAT) return fail(NOT_A_WORKSHEET);
  const version = document['version'];
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1)
    return fail({ code: 'wrong-shape', path: 'version', sentence: 'version: a whole number from 1 expected.' });
  return version > WORKSHEET_VERSION ? readLater(document, version) : readDocument(migrate(document, version));
}

function readDocument(document: Readonly<Record<string, unknown>>): Result<ReadWorksheet, FileFault> {
  const { format: _format, version: _version, ...content } = document;
  const shape = readShape(content);
  if (!shape.ok) return shape;
  const fault = checkDocument(shape.value);
  return fault === undefined ? ok({ worksheet: shape.value, messages: messagesOn(shape.value) }) : fail(fault);
}

function readLater(document: Readonly<Record<string, unknown>>, version: number): Result<ReadWorksheet, FileFault> {
  const later = `This file is of version ${String(version)} of the format; version ${String(WORKSHEET_VERSION)} is the last one known here`;
  const read = readDocument(document);
  if (read.ok)
    return ok({
      ...read.value,
      readOnly: `${later}. It can be looked at, not changed; a newer Levelwright can change it.`,
    });
  const { path } = read.fault;
  return fail({
    code: 'later-version',
    path,
    sentence: `${later}, and it cannot be read (${read.fault.sentence}) Open it with a newer Levelwright.`,
  });
}

/** What is odd about a file that is good otherwise. */
function messagesOn(worksheet: Worksheet): string[] {
  const known = new Set(worksheet.cases.map((one) => one.id));
  const unknown = new Map<string, number>();
  const stages = worksheet.sections.flatMap((section) => (isChainSection(section) ? section.stages : []));
  for (const { byCase } of [...allLines(worksheet), ...stages])
    for (const id of Object.keys(byCase ?? {})) if (!known.has(id)) unknown.set(id, (unknown.get(id) ?? 0) + 1);
  const messages = [...unknown].map(([id, count]) => {
    const what = count === 1 ? 'One line has an entry' : `${String(count)} lines have entries`;
    return `${what} for the case “${id}”, which this worksheet does not have; kept and not used.`;
  });
  const others = worksheet.sections.filter(isOtherSection);
  if (others.length > 0) {
    const names = others.map((section) => `“${section.title === '' ? section.id : section.title}” (${section.kind})`);
    messages.push(`Sections that cannot be evaluated here are kept as they are: ${names.join(', ')}.`);
  }
  return messages;
}

function isLongerThan(text: string, bytes: number): boolean {
  if (text.length > bytes) return true;
  return text.length * 3 > bytes && new TextEncoder().encode(text).byteLength > bytes;
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function withPath<Fault extends { path: string; sentence: string }>(fault: Fault): Fault {
  return fault.path === '' ? fault : { ...fault, sentence: `${fault.sentence} (At ${fault.path}.)` };
}

const TOO_LARGE: FileFault = {
  code: 'too-large',
  path: '',
  sentence: `This file is larger than ${String(FILE_BYTES_LIMIT / 1024 / 1024)} MiB; no worksheet is. Check that it is the right file.`,
};

const NOT_A_WORKSHEET: FileFault = {
  code: 'not-a-worksheet',
  path: 'format',
  sentence: `This is no worksheet file: its format should be “${FORMAT}”. Check that it is the right file.`,
};
