/**
 * Builds the items of one chain. A reference names an item by its id, or is a constant; what rests on a reference that is not
 * there is not made at all.
 */
import type { Plan, Plane } from '../formula';
import type { QuantityKind, Side } from '../quantity';
import { basisOf, type ChainInput, type ChainSection, type Line, type Stage, type StageField } from '../worksheet';
import { STAGE_PARTS } from './chain-parts';
import { itemId, type Criterion, type Derived, type Item } from './item';

/** An item's id, or a constant. */
export type Ref = string | number;

/** What an item is, and which stage it is about; without one it is about the chain. */
export interface About {
  readonly quantity?: QuantityKind;
  readonly side?: Side;
  readonly stage?: Stage;
  /** The place at which it holds. */
  readonly plane?: Plane;
  readonly formula?: string;
}

type Compute = (...values: number[]) => number;

export class ChainBuilder {
  readonly items: Item[] = [];
  /** How the chain is called in sentences. */
  readonly name: string;
  /** Symbols that several stages have: none of them can be called by it. */
  readonly #ambiguous = new Set<string>();

  constructor(readonly chain: ChainSection) {
    const met = new Set<string>();
    for (const { symbol } of chain.stages) {
      if (met.has(symbol)) this.#ambiguous.add(symbol);
      met.add(symbol);
    }
    this.name = chain.title || chain.symbol || 'the chain';
  }

  /** One of the chain's own expressions as a line; undefined when nothing is said. */
  input(field: ChainInput, label: string, unit: string, quantity: QuantityKind, side?: Side): Ref | undefined {
    const entry = this.chain[field]?.trim() ?? '';
    if (entry === '') return undefined;
    // Its side is not declared: a level whose side is not said may be given.
    const line = {
      ...this.line(`input.${field}`, label, entry, unit),
      quantity,
      ...(side && field === 'signal' ? { side } : {}),
    };
    this.items.push({ line, origin: { sectionId: this.chain.id, isUnitChosen: false } });
    return line.id;
  }

  /** A stage's value as a line with its entries. */
  cell(stage: Stage, field: StageField): Ref {
    const { part, label, unit, quantity } = STAGE_PARTS[field];
    const byCase = Object.entries(stage.byCase ?? {}).flatMap(([caseId, values]): [string, string][] => {
      const entry = values[field]?.trim() ?? '';
      return entry === '' ? [] : [[caseId, entry]];
    });
    const line: Line = {
      ...this.line(
        this.part(stage, part),
        `${nameOf(stage)}: ${label}`,
        stage[field]?.trim() ?? '',
        unit,
        itemId(stage.id, field),
      ),
      quantity,
      ...(byCase.length === 0 ? {} : { byCase: Object.fromEntries(byCase) }),
      ...(stage.tolerance?.[field] === undefined ? {} : { tolerance: stage.tolerance[field] }),
      ...(stage.source === undefined ? {} : { source: stage.source }),
      ...(stage.accepted?.[field] === undefined ? {} : { accepted: stage.accepted[field] }),
    };
    this.items.push({ line, origin: { sectionId: this.chain.id, stageId: stage.id, field, isUnitChosen: false } });
    return line.id;
  }

  /** A computed figure; undefined, and nothing made, when an input is missing. */
  derive(
    part: string,
    label: string,
    unit: string,
    inputs: readonly (Ref | undefined)[],
    compute: Compute,
    about: About = {},
  ): Ref | undefined {
    return this.add(part, label, unit, inputs, about, (plans) => ({
      op: 'apply',
      name: label,
      compute,
      parameters: plans,
    }));
  }

  /** a − b. */
  difference(part: string, label: string, a: Ref | undefined, b: Ref | undefined, about: About): Ref | undefined {
    return this.add(part, label, 'dB', [a, b], about, ([left, right]) => ({
      op: 'sum',
      terms: [left, right].flatMap((plan, i) => (plan === undefined ? [] : [{ coefficient: i === 0 ? 1 : -1, plan }])),
      constant: 0,
    }));
  }

  /** a + b. */
  sum(part: string, label: string, unit: string, inputs: readonly (Ref | undefined)[], about: About): Ref | undefined {
    return this.add(part, label, unit, inputs, about, (plans) => ({
      op: 'sum',
      terms: plans.map((plan) => ({ coefficient: 1, plan })),
      constant: 0,
    }));
  }

  /** The figure of another item under a further symbol. */
  copy(part: string, label: string, unit: string, of: Ref | undefined, about: About): Ref | undefined {
    return this.sum(part, label, unit, [of], about);
  }

  /** A finding on figures of the chain; its item is no figure of the account. */
  check(
    about: { readonly stage: Stage; readonly field?: StageField } | undefined,
    inputs: readonly (Ref | undefined)[],
    compute: Compute,
    criterion: Criterion,
  ): void {
    const given = inputs.filter((input) => input !== undefined);
    if (given.length < inputs.length) return;
    const { stage, field } = about ?? {};
    const base = this.line(
      '',
      stage === undefined ? this.name : nameOf(stage),
      // An answer to the finding holds while this text is what it was.
      field === undefined ? basisOf(this.chain, stage) : (stage?.[field]?.trim() ?? ''),
      '1',
      itemId('check', stage?.id ?? '', field ?? '', criterion.code),
    );
    const accepted = field === undefined ? this.chain.accepted : stage?.accepted?.[field];
    this.items.push({
      line: accepted === undefined ? base : { ...base, accepted },
      origin: {
        sectionId: this.chain.id,
        ...(stage === undefined ? {} : { stageId: stage.id }),
        ...(field === undefined ? {} : { field }),
      },
      derived: {
        ...derivedOf('1', given, {}, (plans) => ({ op: 'apply', name: criterion.code, compute, parameters: plans })),
        criterion,
        isCheck: true,
      },
    });
  }

  /** The place up to which the gain has come: behind a stage, or the chain's input. */
  plane(gain: Ref, stage: Stage | undefined): Plane {
    const { symbol } = this.chain;
    const part = stage === undefined ? '' : this.part(stage, 'out.gain');
    return {
      chain: symbol,
      key: String(gain),
      text: stage === undefined ? `at the input of ${this.name}` : `behind ${nameOf(stage)}`,
      ...(part === '' ? {} : { gain: `${symbol}.${part}` }),
    };
  }

  /** `lna.gain`; nothing for a stage that cannot be called. */
  private part(stage: Stage, part: string): string {
    return stage.symbol === '' || this.#ambiguous.has(stage.symbol) ? '' : `${stage.symbol}.${part}`;
  }

  private add(
    part: string,
    label: string,
    unit: string,
    inputs: readonly (Ref | undefined)[],
    { quantity, side, stage, plane, formula }: About,
    plan: (plans: readonly Plan[]) => Plan,
  ): Ref | undefined {
    const given = inputs.filter((input) => input !== undefined);
    if (given.length < inputs.length) return undefined;
    const called = stage === undefined ? part : part === '' ? '' : this.part(stage, part);
    const words = stage === undefined ? label : `${nameOf(stage)}: ${label}`;
    const line = this.line(
      called,
      words,
      '',
      unit,
      stage === undefined ? part || label : itemId(stage.id, part || label),
    );
    this.items.push({
      line,
      origin: { sectionId: this.chain.id, ...(stage === undefined ? {} : { stageId: stage.id }) },
      derived: {
        ...derivedOf(unit, given, { ...(quantity && { quantity }), ...(side && { side }) }, plan),
        ...(plane === undefined ? {} : { plane }),
        ...(formula === undefined ? {} : { formula }),
      },
    });
    return line.id;
  }

  private line(part: string, label: string, entry: string, unit: string, id: string = part): Line {
    const { symbol } = this.chain;
    return {
      id: itemId(this.chain.id, id),
      symbol: symbol === '' || part === '' ? '' : `${symbol}.${part}`,
      label,
      entry,
      unit,
    };
  }
}

/** How a stage is called in sentences. */
export const nameOf = (stage: Stage): string => stage.label || stage.symbol || 'stage';

/** A figure in a sentence. */
export const decibels = (figure: number | undefined): string => (figure ?? NaN).toFixed(2).replace('-', '−');

/** Inputs by id; constants go into the plan. */
function derivedOf(
  unit: string,
  inputs: readonly Ref[],
  meaning: Pick<About, 'quantity' | 'side'>,
  plan: (plans: readonly Plan[]) => Plan,
): Derived {
  const ids = inputs.filter((input) => typeof input === 'string');
  return {
    ...meaning,
    unit,
    inputs: ids,
    plan: (given) => {
      let next = 0;
      return plan(
        inputs.map((input): Plan =>
          typeof input === 'number' ? { op: 'constant', value: input } : (given[next++] as Plan),
        ),
      );
    },
  };
}
