/**
 * Edits of one line's fields: entries, units, kinds, requirements, texts, accepted findings, repairs.
 * Holds: an accepted finding lasts while one of the line's entries is the one that it was accepted for; the edit that changes
 * the entry takes it away, and undoing that edit brings it back.
 */
import { assert } from '../base';
import type { Repair } from '../findings';
import { QUANTITY_KINDS, type QuantityKind } from '../quantity';
import type { LineField } from './changes';
import type { AcceptedFinding, Line, Worksheet } from './document';
import { changesBetween, lineName, type Edit, type Focus } from './edit';
import { LINE_KEYS, withKey } from './keys';
import { caseOf, entriesOf, locateLine, overrideIn } from './lookup';

/** Fields that `setLineField` sets; symbols, entries and accepted findings have edits of their own. */
export type PlainField = Exclude<LineField, 'symbol' | 'entry' | 'byCase' | 'accepted'>;

const FIELD_NAMES: Readonly<Record<PlainField, string>> = {
  label: 'label',
  unit: 'unit',
  quantity: 'quantity kind',
  side: 'side',
  off: 'switch',
  digits: 'digits',
  tolerance: 'tolerance',
  requirement: 'requirement',
  source: 'source',
  note: 'note',
  signOff: 'sign-off',
};

/** The line without the accepted findings that none of its entries bears any longer. */
export function withCurrentAcceptances(line: Line): Line {
  if (line.accepted === undefined) return line;
  const entries = new Set(entriesOf(line));
  const kept = line.accepted.filter((finding) => entries.has(finding.entry));
  if (kept.length === line.accepted.length) return line;
  return withKey(line, 'accepted', kept.length === 0 ? undefined : kept, LINE_KEYS);
}

/** The line with its entry in one case set, or given back to the line's own entry; the order is that of the cases. */
export function withOverride(worksheet: Worksheet, line: Line, caseId: string, entry: string | undefined): Line {
  if (overrideIn(line, caseId) === entry) return line;
  const entries = new Map(Object.entries(line.byCase ?? {}));
  if (entry === undefined) entries.delete(caseId);
  else entries.set(caseId, entry);
  const known = worksheet.cases.map((one) => one.id).filter((id) => entries.has(id));
  const others = [...entries.keys()].filter((id) => !known.includes(id));
  const byCase = Object.fromEntries([...known, ...others].map((id) => [id, entries.get(id) ?? '']));
  return withKey(line, 'byCase', entries.size === 0 ? undefined : byCase, LINE_KEYS);
}

/**
 * Sets a line's entry: its own, or with `caseId` the one that stands in its place in that case. Blanks round it are left out.
 * In a case, an empty text takes the override away, and typing what the case inherits anyway makes none.
 */
export function setEntry(worksheet: Worksheet, lineId: string, entry: string, caseId?: string): Edit {
  const { line } = locateLine(worksheet, lineId);
  const text = entry.trim();
  if (caseId === undefined)
    return entryEdit(`Change the entry of ${lineName(line)}`, line, withKey(line, 'entry', text, LINE_KEYS));
  const one = caseOf(worksheet, caseId);
  if (text === '') return removeOverride(worksheet, lineId, caseId);
  const isInherited = overrideIn(line, caseId) === undefined && text === line.entry;
  const after = isInherited ? line : withOverride(worksheet, line, caseId, text);
  return entryEdit(`Change the entry of ${lineName(line)} for ${one.name}`, line, after, caseId);
}

/** Lets a case use the line's own entry again. */
export function removeOverride(worksheet: Worksheet, lineId: string, caseId: string): Edit {
  const { line } = locateLine(worksheet, lineId);
  const one = caseOf(worksheet, caseId);
  const after = withOverride(worksheet, line, caseId, undefined);
  return entryEdit(`Let ${lineName(line)} be the same for ${one.name}`, line, after, caseId);
}

function entryEdit(label: string, before: Line, after: Line, caseId?: string): Edit {
  return lineEdit(label, before, withCurrentAcceptances(after), 'entry', caseId);
}

function lineEdit(label: string, before: Line, after: Line, field: LineField, caseId?: string): Edit {
  const focus: Focus = {
    kind: 'lines',
    lineIds: [before.id],
    field,
    ...(caseId === undefined ? undefined : { caseId }),
  };
  return { label, changes: changesBetween(before, after), focus, focusBefore: focus };
}

/**
 * Sets one of a line's other fields. An empty text takes an optional field away, as undefined does; a label may be empty.
 * Blanks round a unit are left out.
 */
export function setLineField<Field extends PlainField>(
  worksheet: Worksheet,
  lineId: string,
  field: Field,
  value: Line[Field] | undefined,
): Edit {
  const { line } = locateLine(worksheet, lineId);
  const given = field === 'unit' && typeof value === 'string' ? value.trim() : value;
  const kept = field === 'label' ? (given ?? '') : given === '' ? undefined : given;
  const after = withKey<Line, Field>(line, field, kept as Line[Field] | undefined, LINE_KEYS);
  return lineEdit(`Change the ${FIELD_NAMES[field]} of ${lineName(line)}`, line, after, field);
}

/** Answers a finding with a reason; an earlier answer to the same finding on the same entry is replaced. */
export function acceptFinding(worksheet: Worksheet, lineId: string, finding: AcceptedFinding): Edit {
  const { line } = locateLine(worksheet, lineId);
  const accepted = [...(line.accepted ?? []).filter((one) => !isAbout(one, finding)), finding];
  return acceptanceEdit(`Accept a finding on ${lineName(line)}`, line, accepted);
}

/** Takes the answer to a finding back. */
export function unacceptFinding(
  worksheet: Worksheet,
  lineId: string,
  finding: Pick<AcceptedFinding, 'code' | 'entry'>,
): Edit {
  const { line } = locateLine(worksheet, lineId);
  const accepted = (line.accepted ?? []).filter((one) => !isAbout(one, finding));
  const isThere = accepted.length < (line.accepted?.length ?? 0);
  return acceptanceEdit(`Take back an accepted finding on ${lineName(line)}`, line, isThere ? accepted : line.accepted);
}

function isAbout(one: AcceptedFinding, other: Pick<AcceptedFinding, 'code' | 'entry'>): boolean {
  return one.code === other.code && one.entry === other.entry;
}

function acceptanceEdit(label: string, line: Line, accepted: readonly AcceptedFinding[] | undefined): Edit {
  const after = withKey(line, 'accepted', accepted?.length === 0 ? undefined : accepted, LINE_KEYS);
  return lineEdit(label, line, after, 'accepted');
}

/** The accepted finding that answers this code on the entry that counts, or undefined. */
export function acceptanceOf(line: Line, code: string, entry: string): AcceptedFinding | undefined {
  return line.accepted?.find((one) => isAbout(one, { code, entry }));
}

/**
 * Does what a finding's repair says. A repaired entry replaces the one that counted: in the case named, where the case has an
 * entry of its own, else the line's.
 */
export function applyRepair(worksheet: Worksheet, lineId: string, repair: Repair, caseId?: string): Edit {
  const { line } = locateLine(worksheet, lineId);
  switch (repair.kind) {
    case 'entry': {
      const isOverridden = caseId !== undefined && overrideIn(line, caseId) !== undefined;
      return { ...setEntry(worksheet, lineId, repair.entry, isOverridden ? caseId : undefined), label: repair.title };
    }
    case 'unit':
      return { ...setLineField(worksheet, lineId, 'unit', repair.unit), label: repair.title };
    case 'quantity': {
      const kind = repair.quantity === undefined ? line.quantity : quantityKind(repair.quantity);
      const after = withKey(line, 'quantity', kind, LINE_KEYS);
      const whole = withKey(after, 'side', repair.side ?? line.side, LINE_KEYS);
      return lineEdit(repair.title, line, whole, repair.quantity === undefined ? 'side' : 'quantity');
    }
  }
}

function quantityKind(name: string): QuantityKind {
  const kind = QUANTITY_KINDS.find((one) => one === name);
  assert(kind !== undefined, `${name} is a quantity kind`);
  return kind;
}
