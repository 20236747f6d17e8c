/**
 * What a chain's panel shows: its inputs, each stage's cells and running figures, its outputs in groups with who uses them.
 * Holds: every figure is one that the evaluation tells; nothing is computed here.
 */
import { itemId, STAGE_PARTS, stageItemId, type Evaluation, type Figure } from '../engine';
import {
  CHAIN_INPUTS,
  entryIn,
  isChainSection,
  stageEntryIn,
  stageOverrideIn,
  type ChainInput,
  type ChainSection,
  type Stage,
  type Worksheet,
} from '../worksheet';
import { runningId, type ChainColumn } from './chain-columns';

/** A cell of the line-up. */
export interface StageCell {
  readonly column: ChainColumn;
  /** The item whose figure it is; it need not be there. */
  readonly lineId: string;
  readonly figure: Figure;
  /** What is typed and counts in the case; empty for figures computed. */
  readonly entry: string;
  /** What stands in place of the stage's own value in the case. */
  readonly override?: string;
  /** True for a figure worked out from the stage's other values where nothing is typed. */
  readonly isWorkedOut: boolean;
}

/** One of the chain's own expressions. */
export interface InputView {
  readonly input: ChainInput;
  readonly lineId: string;
  readonly label: string;
  readonly entry: string;
  readonly figure: Figure;
  /** What counts where nothing is said. */
  readonly otherwise: string;
}

/** Who uses an output: a line, or a chain's or a pool's part. */
export interface OutputUser {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
  /** Where it stands, when it is no line. */
  readonly sectionId?: string;
}

export interface OutputView {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
  readonly figure: Figure;
  readonly users: readonly OutputUser[];
}

export interface OutputGroup {
  readonly title: string;
  readonly outputs: readonly OutputView[];
}

/** The chain with this id, or undefined. */
export function findChain(worksheet: Worksheet, sectionId: string): ChainSection | undefined {
  const section = worksheet.sections.find(({ id }) => id === sectionId);
  return section !== undefined && isChainSection(section) ? section : undefined;
}

const INPUTS: Readonly<Record<ChainInput, { readonly label: string; readonly otherwise: string }>> = {
  signal: { label: 'Wanted level', otherwise: 'no levels where nothing is said' },
  noise: { label: 'Source temperature', otherwise: '290 K where nothing is said' },
  bandwidth: { label: 'Bandwidth', otherwise: 'that of the stages where nothing is said' },
  interferer: { label: 'Interferer', otherwise: 'none where nothing is said' },
};

/** The chain's inputs, in the order of the file. */
export function inputsOfChain(evaluation: Evaluation, chain: ChainSection, caseId: string): readonly InputView[] {
  return CHAIN_INPUTS.map((input) => {
    const lineId = inputId(chain.id, input);
    return { input, lineId, ...INPUTS[input], entry: chain[input] ?? '', figure: figureIn(evaluation, lineId, caseId) };
  });
}

/** The figure of an item. Nobody has chosen its unit: a bandwidth takes a prefix, so that it can be read at a glance. */
function figureIn(evaluation: Evaluation, lineId: string, caseId: string): Figure {
  const figure = evaluation.figure(lineId, caseId);
  return figure.state === 'value' && figure.unit.word === 'Hz' ? { ...figure, isFitted: true } : figure;
}

/** The id of a chain's input as the engine has it. */
export const inputId = (sectionId: string, input: ChainInput): string => itemId(sectionId, `input.${input}`);

/** The cells of a stage, in the order of the columns. */
export function cellsOfStage(
  evaluation: Evaluation,
  chain: ChainSection,
  stage: Stage,
  columns: readonly ChainColumn[],
  caseId: string,
): readonly StageCell[] {
  const { length } = evaluation.worksheet.cases;
  return columns.map((column) => {
    if (column.kind === 'running') {
      const lineId = runningId(chain.id, stage.id, column.key);
      return { column, lineId, figure: figureIn(evaluation, lineId, caseId), entry: '', isWorkedOut: false };
    }
    const override = length > 1 ? stageOverrideIn(stage, column.key, caseId) : undefined;
    const entry = stageEntryIn(stage, column.key, caseId);
    const typedId = stageItemId(chain.id, stage.id, column.key);
    // Where nothing is typed, the engine has it under its name when it can work it out.
    const outId = stageItemId(chain.id, stage.id, STAGE_PARTS[column.key].part);
    const isTyped = evaluation.line(typedId) !== undefined;
    const lineId = isTyped || evaluation.line(outId) === undefined ? typedId : outId;
    return {
      column,
      lineId,
      figure: figureIn(evaluation, lineId, caseId),
      entry,
      ...(override === undefined ? {} : { override }),
      isWorkedOut: !isTyped && evaluation.line(lineId) !== undefined,
    };
  });
}

/** The chain's outputs by what they are about, in the order in which they are read. */
const OUTPUTS: readonly { readonly title: string; readonly parts: readonly string[] }[] = [
  { title: 'Gain and noise', parts: ['gain', 'nf', 'te', 'tsys', 'source_share'] },
  { title: 'Linearity', parts: ['iip3', 'oip3', 'iip2', 'oip2', 'ip1db', 'op1db', 'sfdr'] },
  { title: 'Levels', parts: ['in.signal', 'in.noise', 'in.snr', 'signal', 'noise', 'snr', 'mds'] },
  { title: 'Interferers', parts: ['im3', 'im2', 'rise', 'blocking'] },
];

/** The groups of outputs; those that the chain does not give are left out. */
export function outputsOfChain(evaluation: Evaluation, chain: ChainSection, caseId: string): readonly OutputGroup[] {
  return OUTPUTS.flatMap(({ title, parts }) => {
    const outputs = parts.flatMap((part): OutputView[] => {
      const lineId = itemId(chain.id, part);
      const line = evaluation.line(lineId);
      if (line === undefined) return [];
      const { symbol, label } = line;
      return [
        {
          ...{ lineId, symbol, label, figure: figureIn(evaluation, lineId, caseId) },
          users: usersOf(evaluation, lineId, chain.id),
        },
      ];
    });
    return outputs.length === 0 ? [] : [{ title, outputs }];
  });
}

/** Those who use a figure, but for the chain's own workings. */
function usersOf(evaluation: Evaluation, lineId: string, chainId: string): readonly OutputUser[] {
  return evaluation.usedBy(lineId).flatMap((userId): OutputUser[] => {
    const line = evaluation.line(userId);
    const origin = evaluation.originOf(userId);
    const isOwnWorking = origin?.sectionId === chainId && (line === undefined || entryIn(line) === '');
    if (line === undefined || isOwnWorking) return [];
    const { symbol, label } = line;
    return [{ lineId: userId, symbol, label, ...(origin === undefined ? {} : { sectionId: origin.sectionId }) }];
  });
}
