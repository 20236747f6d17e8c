/**
 * A draft: one worksheet while changes are applied to it. It copies a list when it first writes to it and writes to its own
 * copies afterwards, so that a thousand inserted lines cost one copy of their section.
 * Holds: nothing that the draft was given, and nothing that it returned in an inverse, is ever written to.
 */
import { assert, present, unreachable } from '../base';
import type { Change, LineField, SetLine, SetSection } from './changes';
import {
  isLinesSection,
  isOtherSection,
  type Case,
  type Line,
  type LinesSection,
  type Section,
  type Worksheet,
} from './document';
import { CASE_KEYS, LINE_KEYS, sectionKeys, WORKSHEET_KEYS, withKey } from './keys';
import { handOnIndex, placeOfLine } from './line-index';

const NEEDED: ReadonlySet<LineField> = new Set(['symbol', 'label', 'entry']);

/** A worksheet to which changes are applied one after the other. Not to be used after `finish`. */
export class Draft {
  readonly #base: Worksheet;
  #worksheet: Worksheet;
  #sections: Section[] | undefined;
  /** Lists of lines that this draft may write to, by section id. */
  readonly #ownLines = new Map<string, Line[]>();
  /** For lines that this draft moved: the section they are in now; null: taken out. */
  readonly #whereabouts = new Map<string, string | null>();
  /** For sections whose lines no longer stand where they stood: the place last touched, where a search begins. */
  readonly #lastTouched = new Map<string, number>();

  constructor(worksheet: Worksheet) {
    this.#base = worksheet;
    this.#worksheet = worksheet;
  }

  /** The worksheet with all changes. */
  finish(): Worksheet {
    const done = this.#sections === undefined ? this.#worksheet : { ...this.#worksheet, sections: this.#sections };
    for (const section of this.#base.sections) {
      const own = this.#ownLines.get(section.id);
      if (own === undefined || this.#lastTouched.has(section.id)) continue;
      if (isLinesSection(section)) handOnIndex(section.lines, own);
    }
    return done;
  }

  /** Applies one change and returns the change that undoes it. */
  apply(change: Change): Change {
    switch (change.kind) {
      case 'insert-line':
        this.#insertLine(change.line, change.sectionId, change.index);
        return { kind: 'remove-line', lineId: change.line.id };
      case 'remove-line': {
        const { line, sectionId, at } = this.#removeLine(change.lineId);
        return { kind: 'insert-line', sectionId, index: at, line };
      }
      case 'move-line': {
        const { line, sectionId, at } = this.#removeLine(change.lineId);
        this.#insertLine(line, change.sectionId, change.index);
        return { kind: 'move-line', lineId: change.lineId, sectionId, index: at };
      }
      case 'set-line':
        return this.#setLine(change);
      case 'insert-section':
        this.#insertSection(change.section, change.index);
        return { kind: 'remove-section', sectionId: change.section.id };
      case 'remove-section': {
        const index = this.#sectionIndex(change.sectionId);
        return { kind: 'insert-section', index, section: this.#removeSection(index) };
      }
      case 'move-section': {
        const index = this.#sectionIndex(change.sectionId);
        const [section] = this.#openSections().splice(index, 1);
        insertAt(this.#openSections(), change.index, present(section, 'the moved section'));
        return { ...change, index };
      }
      case 'set-section': {
        const index = this.#sectionIndex(change.sectionId);
        const section = present(this.#nowSections()[index], 'the section to set');
        assert(!isOtherSection(section), `the section ${section.id} is of a kind whose content is kept word for word`);
        assert(sectionKeys(section).includes(change.field), `a ${section.kind} section has the field ${change.field}`);
        const fields: Readonly<Record<string, unknown>> = { ...section };
        const after = withKey(fields, change.field, change.value, sectionKeys(section));
        // The field belongs to the section's kind, and its value has that field's type.
        if (after !== fields) this.#openSections()[index] = after as unknown as Section;
        return { ...change, value: fields[change.field] } as SetSection;
      }
      case 'insert-case':
        assert(!this.#worksheet.cases.some((one) => one.id === change.case.id), `the case ${change.case.id} is new`);
        this.#changeCases((cases) => {
          insertAt(cases, change.index, change.case);
        });
        return { kind: 'remove-case', caseId: change.case.id };
      case 'remove-case': {
        const index = this.#caseIndex(change.caseId);
        const removed = present(this.#worksheet.cases[index], 'the removed case');
        assert(this.#worksheet.cases.length > 1, 'a worksheet keeps at least one case');
        this.#changeCases((cases) => cases.splice(index, 1));
        return { kind: 'insert-case', index, case: removed };
      }
      case 'move-case': {
        const index = this.#caseIndex(change.caseId);
        this.#changeCases((cases) => {
          const [moved] = cases.splice(index, 1);
          insertAt(cases, change.index, present(moved, 'the moved case'));
        });
        return { ...change, index };
      }
      case 'rename-case': {
        const index = this.#caseIndex(change.caseId);
        const renamed = present(this.#worksheet.cases[index], 'the renamed case');
        this.#changeCases((cases) => (cases[index] = withKey(renamed, 'name', change.name, CASE_KEYS)));
        return { ...change, name: renamed.name };
      }
      case 'set-worksheet': {
        const before = this.#worksheet[change.field];
        this.#worksheet = withKey(this.#worksheet, change.field, change.value, WORKSHEET_KEYS);
        return { ...change, value: before } as Change;
      }
      default:
        return unreachable(change);
    }
  }

  #setLine(change: SetLine): Change {
    const { sectionIndex, at } = this.#locate(change.lineId);
    const before = present(this.#linesSectionAt(sectionIndex).lines[at], 'the line to set');
    assert(change.value !== undefined || !NEEDED.has(change.field), `a line needs its ${change.field}`);
    const after = withKey(before, change.field, change.value, LINE_KEYS);
    if (after !== before) this.#openLines(sectionIndex)[at] = after;
    return { ...change, value: before[change.field] } as SetLine;
  }

  #insertLine(line: Line, sectionId: string, index: number): void {
    assert(this.#whereIs(line.id) === undefined, `the line ${line.id} is new`);
    insertAt(this.#openLines(this.#sectionIndex(sectionId)), index, line);
    this.#whereabouts.set(line.id, sectionId);
    this.#lastTouched.set(sectionId, index);
  }

  #removeLine(lineId: string): { line: Line; sectionId: string; at: number } {
    const { sectionIndex, sectionId, at } = this.#locate(lineId);
    const [line] = this.#openLines(sectionIndex).splice(at, 1);
    this.#whereabouts.set(lineId, null);
    this.#lastTouched.set(sectionId, at);
    return { line: present(line, 'the removed line'), sectionId, at };
  }

  #insertSection(section: Section, index: number): void {
    assert(!this.#nowSections().some((one) => one.id === section.id), `the section ${section.id} is new`);
    insertAt(this.#openSections(), index, section);
    if (!isLinesSection(section)) return;
    this.#lastTouched.set(section.id, 0);
    for (const line of section.lines) {
      assert(this.#whereIs(line.id) === undefined, `the line ${line.id} is new`);
      this.#whereabouts.set(line.id, section.id);
    }
  }

  #removeSection(index: number): Section {
    const [section] = this.#openSections().splice(index, 1);
    assert(section !== undefined, 'the removed section is there');
    if (isLinesSection(section)) {
      for (const line of section.lines) this.#whereabouts.set(line.id, null);
      // Its list now belongs to the inverse change.
      this.#ownLines.delete(section.id);
    }
    return section;
  }

  #changeCases(write: (cases: Case[]) => void): void {
    const cases = [...this.#worksheet.cases];
    write(cases);
    this.#worksheet = { ...this.#worksheet, cases };
  }

  #caseIndex(caseId: string): number {
    const index = this.#worksheet.cases.findIndex((one) => one.id === caseId);
    assert(index >= 0, `the case ${caseId} is in the worksheet`);
    return index;
  }

  #nowSections(): readonly Section[] {
    return this.#sections ?? this.#worksheet.sections;
  }

  #openSections(): Section[] {
    return (this.#sections ??= [...this.#worksheet.sections]);
  }

  #sectionIndex(sectionId: string): number {
    const index = this.#nowSections().findIndex((section) => section.id === sectionId);
    assert(index >= 0, `the section ${sectionId} is in the worksheet`);
    return index;
  }

  #linesSectionAt(index: number): LinesSection {
    const section = present(this.#nowSections()[index], 'the section');
    assert(isLinesSection(section), `the section ${section.id} holds lines`);
    return section;
  }

  #openLines(sectionIndex: number): Line[] {
    const section = this.#linesSectionAt(sectionIndex);
    const own = this.#ownLines.get(section.id);
    if (own !== undefined) return own;
    const lines = [...section.lines];
    this.#ownLines.set(section.id, lines);
    this.#openSections()[sectionIndex] = { ...section, lines };
    return lines;
  }

  /** The section in which the line now is, or undefined; and where it stood in the section before the draft. */
  #whereIs(lineId: string): { sectionId: string; before: number } | undefined {
    const moved = this.#whereabouts.get(lineId);
    if (moved === null) return undefined;
    if (moved !== undefined) return { sectionId: moved, before: 0 };
    const place = placeOfLine(this.#base, lineId);
    const section = place && this.#base.sections[place.sectionIndex];
    return section && { sectionId: section.id, before: place.lineIndex };
  }

  #locate(lineId: string): { sectionIndex: number; sectionId: string; at: number } {
    const where = this.#whereIs(lineId);
    assert(where !== undefined, `the line ${lineId} is in the worksheet`);
    const sectionIndex = this.#sectionIndex(where.sectionId);
    const near = this.#lastTouched.get(where.sectionId) ?? where.before;
    const at = findNear(this.#linesSectionAt(sectionIndex).lines, lineId, near);
    return { sectionIndex, sectionId: where.sectionId, at };
  }
}

function insertAt<T>(list: T[], index: number, item: T): void {
  assert(Number.isInteger(index) && index >= 0 && index <= list.length, `${String(index)} is a place in the list`);
  list.splice(index, 0, item);
}

/** The place of a line that is in the list, searched outwards from `near`: changes of one edit lie close together. */
function findNear(lines: readonly Line[], lineId: string, near: number): number {
  for (let distance = 0; distance <= lines.length + near; distance++) {
    if (lines[near + distance]?.id === lineId) return near + distance;
    if (lines[near - distance]?.id === lineId) return near - distance;
  }
  throw new Error(`broken invariant: the line ${lineId} is not in the section it should be in`);
}
