/**
 * What is printed of a worksheet, gathered into plain data: requirements, sections, findings, endnotes, workings.
 * Holds: endnotes are numbered in the order of their first mention, and equal texts are one endnote.
 */
import type { LineFinding, Reading } from '../../engine';
import type { LevelDiagram, Working } from '../../review';
import type { ItemRow } from '../../app/item-rows';
import {
  isChainSection,
  isLinesSection,
  isOtherSection,
  overrideIn,
  type Case,
  type Line,
  type Section,
  type Worksheet,
} from '../../worksheet';
import { tellsRadiation } from '../../review';
import { groupFindings, type FindingItem } from './finding-groups';

/** Where the printed figures come from. */
export interface PrintSource {
  readonly reading: (lineId: string, caseId: string) => Reading;
  readonly findings: () => readonly LineFinding[];
  /** What a section has that is no line of the worksheet: stages and outputs of a chain, a total, a curve. */
  readonly items: (section: Section) => readonly ItemRow[];
  readonly lineOf: (lineId: string) => Line | undefined;
  /** The levels along a chain in a case; undefined where there are none. */
  readonly levels: (sectionId: string, caseId: string) => LevelDiagram | undefined;
  /** Undefined for a line that is not there. */
  readonly working: (lineId: string, caseId: string) => Working | undefined;
}

/** A line as it is printed. */
export interface PrintLine {
  readonly line: Line;
  /** One for each case of the worksheet, in order. */
  readonly readings: readonly Reading[];
  /** Entries that single cases have in place of the line's own. */
  readonly overrides: readonly { readonly caseName: string; readonly entry: string }[];
  /** Numbers of endnotes. */
  readonly notes: readonly number[];
  readonly radiates: boolean;
}

/** A section as it is printed; without lines where this version does not evaluate its kind. */
export interface PrintSection {
  readonly id: string;
  readonly title: string;
  readonly lines?: readonly PrintLine[];
}

/** The working of a required line, in the cases that share it. */
export interface PrintWorking {
  readonly key: string;
  readonly caseNames: readonly string[];
  readonly working: Working;
}

/** The level diagram of a chain, in the cases that share it. */
export interface PrintLevels {
  readonly key: string;
  readonly caseNames: readonly string[];
  readonly diagram: LevelDiagram;
}

/** Everything that is printed. */
export interface PrintDocument {
  readonly sections: readonly PrintSection[];
  readonly required: readonly PrintLine[];
  readonly findings: readonly FindingItem[];
  readonly endnotes: readonly string[];
  readonly workings: readonly PrintWorking[];
  readonly levels: readonly PrintLevels[];
  readonly radiates: boolean;
}

/** Gathers what is printed. */
export function printDocument(worksheet: Worksheet, source: PrintSource): PrintDocument {
  const numbers = new Map<string, number>();
  const noteNumber = (text: string): number => {
    const known = numbers.get(text) ?? numbers.size + 1;
    numbers.set(text, known);
    return known;
  };
  const sections = worksheet.sections.map((section) => ({
    id: section.id,
    title: section.title,
    ...(!isOtherSection(section) && {
      lines: [
        ...(isLinesSection(section) ? section.lines.map(withItsSwitch) : []),
        ...source.items(section).map(lineOfItem),
      ].map((line) => printLine(worksheet, line, source, noteNumber)),
    }),
  }));
  const lines = sections.flatMap((section) => section.lines ?? []);
  const required = lines.filter(({ line }) => line.requirement !== undefined);
  const groups = groupFindings(worksheet, source.findings(), source.lineOf);
  return {
    sections,
    required,
    findings: [...groups.error, ...groups.warning, ...groups.note, ...groups.accepted],
    endnotes: [...numbers.keys()],
    workings: required.flatMap(({ line }) => workingsOf(worksheet.cases, line, source)),
    levels: worksheet.sections.filter(isChainSection).flatMap(({ id }) => levelsOf(worksheet.cases, id, source)),
    radiates: lines.some((line) => line.radiates),
  };
}

/** An item as a line to print: what it is called and what its figure is of, and its summary in the place of an entry. */
function lineOfItem({ line, symbol, label, summary, figureOf, isOff }: ItemRow): Line {
  // On paper the heading of the section may be far away: a total says what it is of.
  const name = label === 'Total' && line.label !== '' ? `Total: ${line.label}` : label;
  const called = figureOf === undefined ? name : `${name === '' ? symbol : name}: ${figureOf}`;
  return { ...line, symbol, label: isOff ? `${called} (bypassed)` : called, entry: summary };
}

/** A line of a pool that does not count says so. */
const withItsSwitch = (line: Line): Line =>
  line.off === true ? { ...line, label: `${line.label} (switched off)`.trim() } : line;

function printLine(
  worksheet: Worksheet,
  line: Line,
  source: PrintSource,
  noteNumber: (text: string) => number,
): PrintLine {
  const readings = worksheet.cases.map((one) => source.reading(line.id, one.id));
  const overrides = worksheet.cases.flatMap((one) => {
    const entry = overrideIn(line, one.id);
    return entry === undefined ? [] : [{ caseName: one.name, entry }];
  });
  const notes = [line.source && `Source: ${line.source}`, line.note].flatMap((text) =>
    text ? [noteNumber(text)] : [],
  );
  const radiates = readings.some(({ figure }) =>
    tellsRadiation(line, figure.state === 'value' ? figure.unit : undefined),
  );
  return { line, readings, overrides, notes: [...new Set(notes)], radiates };
}

/** The working in each case, those that read the same taken together. */
function workingsOf(cases: readonly Case[], line: Line, source: PrintSource): PrintWorking[] {
  const found = new Map<string, { caseNames: string[]; working: Working }>();
  for (const one of cases) {
    const working = source.working(line.id, one.id);
    if (working === undefined) continue;
    const key = JSON.stringify([working.steps, working.terms]);
    const same = found.get(key);
    if (same === undefined) found.set(key, { caseNames: [one.name], working });
    else same.caseNames.push(one.name);
  }
  return [...found.values()].map((one, index) => ({ key: `${line.id} ${String(index)}`, ...one }));
}

/** The levels of a chain in each case, those that are alike taken together. */
function levelsOf(cases: readonly Case[], sectionId: string, source: PrintSource): PrintLevels[] {
  const found = new Map<string, { caseNames: string[]; diagram: LevelDiagram }>();
  for (const one of cases) {
    const diagram = source.levels(sectionId, one.id);
    if (diagram === undefined) continue;
    const key = JSON.stringify(diagram.points);
    const same = found.get(key);
    if (same === undefined) found.set(key, { caseNames: [one.name], diagram });
    else same.caseNames.push(one.name);
  }
  return [...found.values()].map((one, index) => ({ key: `${sectionId} ${String(index)}`, ...one }));
}

/** Most columns of cases that fit beside each other on a page. */
const CASES_ABREAST = 5;

/** The worksheet's cases in groups that fit on a page, each with its place among all cases. */
export function casesAbreast(cases: readonly Case[]): { readonly name: string; readonly index: number }[][] {
  const numbered = cases.map((one, index) => ({ name: one.name, index }));
  const groups: { name: string; index: number }[][] = [];
  for (let start = 0; start < numbered.length; start += CASES_ABREAST)
    groups.push(numbered.slice(start, start + CASES_ABREAST));
  return groups;
}

/** An entry in the stretches between which it may be broken, after brackets and separators; a figure keeps its unit. */
export function entryStretches(entry: string): string[] {
  return entry.replace(/(?<=\d) (?=[\p{L}%°])/gu, '\u00a0').split(/(?<=[(,;])/);
}
