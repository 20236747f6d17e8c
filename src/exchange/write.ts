/**
 * Writing a worksheet file, always in the same form: two-space indent, known keys in the order of the contract, unknown keys
 * after them, one line break at the end.
 * Holds: reading what was written gives an equal worksheet, and writing that gives the same text.
 */
import {
  CASE_KEYS,
  inOrder,
  isChainSection,
  isLinesSection,
  isOtherSection,
  LINE_KEYS,
  sectionKeys,
  STAGE_FIELDS,
  STAGE_KEYS,
  WORKSHEET_KEYS,
  type Line,
  type Section,
  type Stage,
  type Worksheet,
} from '../worksheet';
import { FORMAT } from './file';
import { REFUSED_KEYS } from './json-text';
import { WORKSHEET_VERSION } from './migrations';

const TOLERANCE_KEYS = ['favourable', 'adverse', 'below', 'above', 'shape', 'group'];
const ACCEPTED_KEYS = ['code', 'entry', 'reason'];
const SIGN_OFF_KEYS = ['by', 'on', 'basis'];

/** The text of the worksheet's file. */
export function writeWorksheetFile(worksheet: Worksheet): string {
  const document = {
    format: FORMAT,
    version: WORKSHEET_VERSION,
    ...inOrder(worksheet, WORKSHEET_KEYS),
    cases: worksheet.cases.map((one) => inOrder(one, CASE_KEYS)),
    sections: worksheet.sections.map(sectionContent),
    ...(worksheet.recorded && { recorded: withoutRefusedKeys(worksheet.recorded) }),
  };
  return `${JSON.stringify(document, null, 2)}\n`;
}

function sectionContent(section: Section): object {
  if (isOtherSection(section)) return section.content;
  const ordered = inOrder(section, sectionKeys(section));
  if (isLinesSection(section)) return { ...ordered, lines: section.lines.map(lineContent) };
  if (!isChainSection(section)) return ordered;
  const { accepted } = section;
  return {
    ...ordered,
    ...(accepted && { accepted: accepted.map((one) => inOrder(one, ACCEPTED_KEYS)) }),
    stages: section.stages.map(stageContent),
  };
}

function stageContent(stage: Stage): object {
  const { byCase, tolerance, accepted } = stage;
  const each = <T extends object>(record: Readonly<Record<string, T>>, map: (value: T) => object): object =>
    Object.fromEntries(Object.entries(record).map(([key, value]) => [key, map(value)]));
  return {
    ...inOrder(stage, STAGE_KEYS),
    ...(byCase && { byCase: each(byCase, (values) => inOrder(values, STAGE_FIELDS)) }),
    ...(tolerance && { tolerance: each(tolerance, (one) => inOrder(one, TOLERANCE_KEYS)) }),
    ...(accepted && {
      accepted: each(accepted, (list) => list.map((one) => inOrder(one, ACCEPTED_KEYS))),
    }),
  };
}

function lineContent(line: Line): object {
  const { tolerance, accepted, signOff } = line;
  return {
    ...inOrder(line, LINE_KEYS),
    ...(tolerance && { tolerance: inOrder(tolerance, TOLERANCE_KEYS) }),
    ...(accepted && { accepted: accepted.map((one) => inOrder(one, ACCEPTED_KEYS)) }),
    ...(signOff && { signOff: signOff.map((one) => inOrder(one, SIGN_OFF_KEYS)) }),
  };
}

/** A line may have been named `constructor` by another program; a file with such a key would be refused. */
function withoutRefusedKeys(recorded: NonNullable<Worksheet['recorded']>): Worksheet['recorded'] {
  return Object.fromEntries(Object.entries(recorded).filter(([symbol]) => !REFUSED_KEYS.has(symbol)));
}

/** A file name for a title: `Harbour buoy uplink` gives `harbour-buoy-uplink.budget.json`. */
export function fileNameFor(title: string): string {
  const words = title
    .normalize('NFKD')
    .replace(/[\u0300-\u036f]/g, '')
    .normalize('NFC')
    .toLowerCase()
    .match(/[\p{L}\p{M}\p{N}]+/gu);
  const name = Array.from((words ?? ['worksheet']).join('-'))
    .slice(0, 60)
    .join('')
    .replace(/-$/, '');
  return `${name}.budget.json`;
}
