/** Edits of sections, and of the worksheet's own texts. */
import type { Change } from './changes';
import { isOtherSection, type Section, type Worksheet } from './document';
import type { Edit, Focus } from './edit';
import { sectionOf } from './lookup';
import { newSection } from './new';

const onSection = (sectionId: string): Focus => ({ kind: 'section', sectionId });

const sectionName = (section: Section): string => (section.title === '' ? 'section' : `section “${section.title}”`);

/** Inserts an empty section of lines, or the one given, before the section that now has this index, or at the end. */
export function insertSection(worksheet: Worksheet, index: number, section: Section | string = ''): Edit {
  return sectionInsertion(worksheet, index, typeof section === 'string' ? newSection(section) : section);
}

function sectionInsertion(worksheet: Worksheet, index: number, section: Section): Edit {
  const beside = worksheet.sections[index - 1] ?? worksheet.sections[0];
  return {
    label: `Insert ${section.kind === 'lines' ? 'section' : section.kind}`,
    changes: [{ kind: 'insert-section', index, section }],
    focus: onSection(section.id),
    focusBefore: beside === undefined ? { kind: 'worksheet' } : onSection(beside.id),
  };
}

/** Gives a section another title; sections of kinds not known here keep theirs. */
export function renameSection(worksheet: Worksheet, sectionId: string, title: string): Edit {
  const section = sectionOf(worksheet, sectionId);
  const changes: Change[] =
    section.title === title || isOtherSection(section)
      ? []
      : [{ kind: 'set-section', sectionId, field: 'title', value: title }];
  return {
    label: `Rename ${sectionName(section)}`,
    changes,
    focus: onSection(sectionId),
    focusBefore: onSection(sectionId),
  };
}

/** Deletes a section with its lines. */
export function deleteSection(worksheet: Worksheet, sectionId: string): Edit {
  const section = sectionOf(worksheet, sectionId);
  const index = worksheet.sections.indexOf(section);
  const next = worksheet.sections[index + 1] ?? worksheet.sections[index - 1];
  return {
    label: `Delete ${sectionName(section)}`,
    changes: [{ kind: 'remove-section', sectionId }],
    focus: next === undefined ? { kind: 'worksheet' } : onSection(next.id),
    focusBefore: onSection(sectionId),
  };
}

/** Moves a section before the section that now has this index, or to the end. */
export function moveSectionTo(worksheet: Worksheet, sectionId: string, index: number): Edit {
  const section = sectionOf(worksheet, sectionId);
  const now = worksheet.sections.indexOf(section);
  const target = index > now ? index - 1 : index;
  return {
    label: `Move ${sectionName(section)}`,
    changes: target === now ? [] : [{ kind: 'move-section', sectionId, index: target }],
    focus: onSection(sectionId),
    focusBefore: onSection(sectionId),
  };
}

/** Moves a section one place up or down; an edit without changes at the edge. */
export function moveSection(worksheet: Worksheet, sectionId: string, direction: 'up' | 'down'): Edit {
  const now = worksheet.sections.indexOf(sectionOf(worksheet, sectionId));
  const index = direction === 'up' ? Math.max(now - 1, 0) : Math.min(now + 2, worksheet.sections.length);
  return moveSectionTo(worksheet, sectionId, index);
}

/** Gives the worksheet another title. */
export function setTitle(worksheet: Worksheet, title: string): Edit {
  const changes: Change[] = worksheet.title === title ? [] : [{ kind: 'set-worksheet', field: 'title', value: title }];
  return { label: 'Change the title', changes, focus: { kind: 'worksheet' }, focusBefore: { kind: 'worksheet' } };
}

/** Gives the worksheet another summary; an empty one takes it away. */
export function setSummary(worksheet: Worksheet, summary: string): Edit {
  const value = summary === '' ? undefined : summary;
  const changes: Change[] = worksheet.summary === value ? [] : [{ kind: 'set-worksheet', field: 'summary', value }];
  return { label: 'Change the summary', changes, focus: { kind: 'worksheet' }, focusBefore: { kind: 'worksheet' } };
}
