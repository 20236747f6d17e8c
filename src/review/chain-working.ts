/**
 * The working of what a chain gives: the formula, the cascade with each stage's figures put in, and each stage's part.
 * Holds: every figure is one of the engine's; a stage's part in noise is its share of the chain's own noise.
 */
import { stageItemId, type Evaluation, type Node } from '../engine';
import { writeFigure, writeSignificant } from '../quantity';
import { isChainSection, type ChainSection, type Stage } from '../worksheet';
import type { Piece, WorkingStep, WorkingTerm } from './working-types';

const text = (words: string): Piece => ({ type: 'text', text: words });

/** What a chain's output adds up from; undefined for other items. */
export interface ChainWorking {
  readonly steps: readonly WorkingStep[];
  readonly terms: readonly WorkingTerm[];
  /** True when the terms are shares that add up. */
  readonly shares: boolean;
}

/** The working of a derived item. */
export function chainWorking(evaluation: Evaluation, node: Node, caseId: string): ChainWorking {
  const origin = evaluation.originOf(node.lineId);
  const section = evaluation.worksheet.sections.find(({ id }) => id === origin?.sectionId);
  const { formula } = node.item.derived ?? {};
  const steps: WorkingStep[] = formula === undefined ? [] : [{ title: 'in symbols', pieces: [text(formula)] }];
  const output = node.line.symbol.split('.').at(-1) ?? '';
  if (section === undefined || !isChainSection(section) || origin?.stageId !== undefined)
    return { steps, terms: inputTerms(evaluation, node, caseId), shares: false };
  const reader = new StageReader(evaluation, section, caseId);
  if (output === 'te' || output === 'nf' || output === 'tsys') {
    steps.push({ title: 'with values', pieces: output === 'nf' ? reader.figureSum() : reader.temperatureSum() });
    return { steps, terms: reader.noiseTerms(), shares: true };
  }
  if (output === 'iip3') return { steps, terms: reader.distortionTerms(), shares: true };
  if (output === 'gain') return { steps, terms: reader.gainTerms(), shares: false };
  return { steps, terms: inputTerms(evaluation, node, caseId), shares: false };
}

/** What a derived item is computed from, as far as it has names. */
function inputTerms(evaluation: Evaluation, node: Node, caseId: string): WorkingTerm[] {
  return node.inputs
    .filter(({ line }) => line.label !== '')
    .map(({ lineId, line }) => ({
      lineId,
      symbol: line.symbol,
      label: line.label,
      ...written(evaluation, lineId, caseId),
    }));
}

function written(evaluation: Evaluation, lineId: string, caseId: string): { text: string; unit: string } {
  const figure = evaluation.figure(lineId, caseId);
  return figure.state === 'value' ? writeFigure(figure.value, figure.unit) : { text: '', unit: '' };
}

/** Reads the figures of the stages that count. */
class StageReader {
  readonly #stages: readonly Stage[];

  constructor(
    private readonly evaluation: Evaluation,
    private readonly chain: ChainSection,
    private readonly caseId: string,
  ) {
    this.#stages = chain.stages.filter(({ off }) => off !== true);
  }

  /** Tₑ = 75.1 K + 120 K / 0.776 + … */
  temperatureSum(): Piece[] {
    return this.#cascade((stage) => this.#figure(stage, 'te', 'K'), 'Tₑ = ');
  }

  /** F = 1.259 + (1.995 − 1) / 0.794 + … */
  figureSum(): Piece[] {
    const pieces = this.#cascade((stage, i) => {
      const kelvin = this.#value(stage, 'te');
      if (kelvin === undefined) return [text('?')];
      const factor = writeSignificant(1 + kelvin / 290);
      return [text(i === 0 ? factor : `(${factor} − 1)`)];
    }, 'F = ');
    return pieces;
  }

  #cascade(term: (stage: Stage, index: number) => readonly Piece[], lead: string): Piece[] {
    const pieces: Piece[] = [text(lead)];
    let gainDb = 0;
    this.#stages.forEach((stage, i) => {
      if (i > 0) pieces.push(text(' + '));
      pieces.push(...term(stage, i));
      if (i > 0) pieces.push(text(` / ${writeSignificant(10 ** (gainDb / 10))}`));
      gainDb = this.#value(stage, 'out.gain') ?? NaN;
    });
    return pieces;
  }

  /** Each stage's noise temperature with its share of the chain's own noise. */
  noiseTerms(): WorkingTerm[] {
    const shares = this.#stages.map((stage) => this.#value(stage, 'noise_share') ?? NaN);
    const all = shares.reduce((sum, share) => sum + share, 0);
    return this.#stages.map((stage, i) => this.#term(stage, 'te', (shares[i] ?? NaN) / all));
  }

  /** Each stage's intercept with its share of the distortion. */
  distortionTerms(): WorkingTerm[] {
    return this.#stages.flatMap((stage) => {
      const share = this.#value(stage, 'distortion_share');
      return share === undefined ? [] : [this.#term(stage, 'iip3', share / 100)];
    });
  }

  gainTerms(): WorkingTerm[] {
    return this.#stages.map((stage) => this.#term(stage, 'gain', undefined));
  }

  /** What is worked out of a stage, or typed, under the first of these names that is there. */
  #idOf(stage: Stage, what: string): string | undefined {
    const names = what === 'iip3' ? ['inputIntercept', 'iip3'] : [what];
    return names
      .map((name) => stageItemId(this.chain.id, stage.id, name))
      .find((id) => this.evaluation.line(id) !== undefined);
  }

  #value(stage: Stage, what: string): number | undefined {
    const id = this.#idOf(stage, what);
    const figure = id === undefined ? undefined : this.evaluation.figure(id, this.caseId);
    return figure?.state === 'value' ? figure.value : undefined;
  }

  #figure(stage: Stage, what: string, unit: string): Piece[] {
    const value = this.#value(stage, what);
    const lineId = this.#idOf(stage, what);
    return value === undefined
      ? [text('?')]
      : [{ type: 'figure', text: writeSignificant(value), unit, ...(lineId === undefined ? {} : { lineId }) }];
  }

  #term(stage: Stage, what: string, share: number | undefined): WorkingTerm {
    const lineId = this.#idOf(stage, what);
    const line = lineId === undefined ? undefined : this.evaluation.line(lineId);
    const shown = lineId === undefined ? { text: '', unit: '' } : written(this.evaluation, lineId, this.caseId);
    return {
      ...(lineId === undefined ? {} : { lineId }),
      symbol: line?.symbol || stage.symbol,
      label: line?.label ?? stage.label,
      ...shown,
      ...(share === undefined || Number.isNaN(share) ? {} : { share }),
    };
  }
}
