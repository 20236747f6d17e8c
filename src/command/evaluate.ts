/** `evaluate`: figures, requirements and findings of a worksheet, as text, JSON, Markdown or CSV. */
import type { Evaluation, LineFinding, Reading } from '../engine';
import { fittingLinearUnit } from '../formula';
import { alternativeUnits, linearValue, type LinearUnit, type Unit } from '../quantity';
import type { Case, Line } from '../worksheet';
import type { Answer, ExitCode, World } from './answer';
import { chooseCases, lineWithSymbol, nameOfLine, openFile } from './open';
import { isUnmet } from './requirement-text';
import { writeCsv, writeMarkdown, writeText } from './tables';

export const FORMATS = ['text', 'json', 'markdown', 'csv'] as const;
export type Format = (typeof FORMATS)[number];

export interface EvaluateOptions {
  readonly cases: readonly string[];
  readonly lines: readonly string[];
  readonly format: Format;
  readonly linear: boolean;
}

/** What is to be written: the chosen lines and cases of an evaluation, with their findings. */
export interface Selection {
  readonly evaluation: Evaluation;
  readonly cases: readonly Case[];
  readonly lines: readonly Line[];
  readonly findings: readonly LineFinding[];
  readonly linear: boolean;
  /** True when lines were asked for by their symbols. */
  readonly isByName: boolean;
}

/** Evaluates a file. Findings and the exit code are those of the chosen lines and cases. */
export function evaluateFile(file: string, options: EvaluateOptions, world: World): Answer {
  const opened = openFile(file, world);
  const { evaluation } = opened;
  const cases = chooseCases(opened, options.cases);
  const chosen = new Set(options.lines.map((symbol) => lineWithSymbol(opened, symbol).id));
  const isChosen = (id: string): boolean =>
    chosen.size === 0 ? evaluation.originOf(id) === undefined || isGiven(evaluation, id, cases) : chosen.has(id);
  const lines = evaluation.lines().filter(({ id }) => isChosen(id));
  const caseIds = new Set(cases.map(({ id }) => id));
  const findings = evaluation
    .sheetFindings()
    .filter(({ lineId }) => chosen.size === 0 || chosen.has(lineId))
    .map((finding) => ({ ...finding, caseIds: finding.caseIds.filter((id) => caseIds.has(id)) }))
    .filter(({ caseIds: found }) => found.length > 0);
  const selection = { evaluation, cases, lines, findings, linear: options.linear, isByName: chosen.size > 0 };
  return { results: write(selection, options.format), messages: opened.messages, exitCode: exitCodeOf(selection) };
}

/** True unless a chain or pool has nothing to give there in any case. */
function isGiven(evaluation: Evaluation, lineId: string, cases: readonly Case[]): boolean {
  return cases.some(({ id }) => evaluation.figure(lineId, id).state !== 'empty');
}

function write(selection: Selection, format: Format): string {
  switch (format) {
    case 'json':
      return `${JSON.stringify(asJson(selection), null, 2)}\n`;
    case 'text':
      return writeText(selection);
    case 'markdown':
      return writeMarkdown(selection);
    case 'csv':
      return writeCsv(selection);
  }
}

/** 1 when an error finding or a requirement that is not met, or not known to be, is among what was chosen. */
export function exitCodeOf({ evaluation, cases, lines, findings }: Omit<Selection, 'linear' | 'isByName'>): ExitCode {
  const hasError = findings.some(({ severity }) => severity === 'error');
  const hasUnmet = lines.some((line) => cases.some(({ id }) => isUnmet(line, evaluation.reading(line.id, id))));
  return hasError || hasUnmet ? 1 : 0;
}

/** The object of the contract. Maps are built without a prototype, since symbols are text from a file. */
function asJson({ evaluation, cases, lines, findings }: Selection): unknown {
  const byName = Object.create(null) as Record<string, unknown>;
  const names = new Map(lines.map((line) => [line.id, nameOfLine(evaluation, line)]));
  for (const { lineId } of findings) {
    const line = evaluation.line(lineId);
    if (line !== undefined && !names.has(lineId)) names.set(lineId, nameOfLine(evaluation, line));
  }
  for (const line of lines) byName[names.get(line.id) ?? line.id] = lineAsJson(evaluation, line, cases);
  return {
    title: evaluation.worksheet.title,
    cases: cases.map(({ id }) => id),
    lines: byName,
    findings: findings.flatMap((finding) =>
      finding.caseIds.map((caseId) => ({
        code: finding.code,
        severity: finding.severity,
        line: names.get(finding.lineId) ?? finding.lineId,
        case: caseId,
        message: finding.message,
        repair: repairText(finding),
        accepted: finding.accepted !== undefined,
      })),
    ),
  };
}

/** The first repair in words: the new entry, the unit or the kind. */
export function repairText({ repairs }: LineFinding): string | null {
  const [repair] = repairs;
  if (repair === undefined) return null;
  return repair.kind === 'entry' ? repair.entry : repair.title;
}

function lineAsJson(evaluation: Evaluation, line: Line, cases: readonly Case[]): unknown {
  const readings = cases.map(({ id }) => evaluation.reading(line.id, id));
  const valued = readings.find(({ figure }) => figure.state === 'value') ?? readings[0];
  const unit = valued?.figure.state === 'value' ? valued.figure.unit.word : (line.unit ?? null);
  return {
    label: line.label,
    unit,
    quantity: valued?.kind?.kind ?? null,
    side: valued?.side?.side ?? null,
    cases: Object.fromEntries(cases.map(({ id }, index) => [id, caseAsJson(line, readings[index], unit)])),
  };
}

function caseAsJson(line: Line, reading: Reading | undefined, unit: string | null): unknown {
  const figure = reading?.figure;
  const requirement = line.requirement === undefined ? {} : { requirement: requirementAsJson(reading) };
  if (figure?.state !== 'value') {
    return {
      value: null,
      linear: null,
      linearUnit: null,
      ...(figure?.state === 'waiting' ? { waitsFor: figure.roots } : {}),
      ...requirement,
    };
  }
  const { value } = figure;
  const linear = linearValue(value, figure.unit) ?? siValue(value, figure.unit);
  return {
    value: finite(value),
    ...(value === -Infinity ? { noPower: true } : {}),
    // A line that declares no unit may have another one in another case.
    ...(figure.unit.word === unit ? {} : { unit: figure.unit.word }),
    linear: finite(linear.value),
    linearUnit: linear.unit,
    ...requirement,
  };
}

/** JSON has no infinities: they are null, as what is not known is. */
const finite = (number: number): number | null => (Number.isFinite(number) ? number : null);

function requirementAsJson(reading: Reading | undefined): unknown {
  if (reading?.requirement === undefined) return { met: null, margin: null, unit: null };
  const { met, margin, unit } = reading.requirement;
  return { met, margin: finite(margin), unit };
}

/** A linear figure in the SI unit of its dimension; rates per metre. */
function siValue(value: number, unit: Unit): { value: number; unit: string } {
  if (unit.form === 'rate') return { value: value / unit.lengthM, unit: 'dB/m' };
  if (unit.form === 'decibel') return { value, unit: unit.word };
  return { value: value * unit.factor + unit.shift, unit: siWord(unit) };
}

/** The word of the SI unit: the one with a prefix less its prefix (kbit/s is bit/s, not Hz), else that of the dimension. */
function siWord(unit: LinearUnit): string {
  if (unit.factor === 1 && unit.shift === 0) return unit.word;
  const plain = alternativeUnits(unit).find(
    (other) => other.form === 'linear' && other.factor === 1 && other.shift === 0 && unit.word.endsWith(other.word),
  );
  return plain?.word ?? fittingLinearUnit(unit.dimension, []).word;
}
