/**
 * The account of a pool in a case: its total, and for each line its share of it, the total without it, and the value at which
 * the total would just meet its requirement with all other lines as they are.
 * Holds: shares add to 1; the total without a line is what switching it off gives; a line put at its permitted value makes the
 * total its bound. Where the figures below do not add to the total that the engine gives, nothing of this is told.
 */
import { poolTotalId, type Evaluation, type Figure, type Reading } from '../engine';
import { evaluatePlan, type Checked, type Figures } from '../formula';
import { isDimensionless, type Unit } from '../quantity';
import { isPoolSection, type Line, type PoolSection } from '../worksheet';
import {
  amountIn,
  combineAmounts,
  figureIn,
  restOf,
  shareOf,
  withoutEach,
  type Adding,
  type NumberScale,
} from './pool-amounts';
import { isBareDecibels, powerSumOf } from './power-sums';

/** What a line may be for the total just to meet its requirement, all others as they are. */
export type Permitted =
  | {
      readonly state: 'value';
      readonly bound: 'at least' | 'at most';
      /** In the unit of the line's figure. */
      readonly value: number;
      readonly unit: Unit;
      /** From the line's figure to the permitted value: positive while there is room, in `unit` (dB for decibels). */
      readonly room: number;
    }
  /** The others alone break the requirement. */
  | { readonly state: 'none' }
  /** The others alone meet it, whatever this line is. */
  | { readonly state: 'any' };

export interface PoolLine {
  readonly lineId: string;
  readonly symbol: string;
  readonly label: string;
  readonly digits?: number;
  /** False: switched off. */
  readonly isOn: boolean;
  readonly figure: Figure;
  /** The part of the total, 0 to 1; absent when the line does not count or there is no total to share. */
  readonly share?: number;
  /** The total without the line; `empty` when nothing else is in the pool. Absent as the share is. */
  readonly without?: Figure;
  /** Absent without a requirement that can be read. */
  readonly permitted?: Permitted;
}

export interface PoolAccount {
  readonly sectionId: string;
  readonly caseId: string;
  /** The id by which the evaluation knows the total. */
  readonly totalId: string;
  readonly total: Reading;
  /** How the lines add; absent while there is no total. */
  readonly adding?: Adding;
  readonly lines: readonly PoolLine[];
}

/** The account of a pool; undefined when the section is none. */
export function poolAccount(evaluation: Evaluation, sectionId: string, caseId: string): PoolAccount | undefined {
  const pool = evaluation.worksheet.sections.find(({ id }) => id === sectionId);
  if (pool === undefined || !isPoolSection(pool)) return undefined;
  const totalId = poolTotalId(pool.id);
  const total = evaluation.reading(totalId, caseId);
  const terms = termsOf(evaluation, pool, caseId, total);
  const told = terms === undefined ? undefined : tell(terms, total);
  return {
    sectionId: pool.id,
    caseId,
    totalId,
    total,
    ...(told === undefined || terms === undefined ? {} : { adding: terms.adding }),
    lines: pool.lines.map((line) => ({
      lineId: line.id,
      symbol: line.symbol,
      label: line.label,
      ...(line.digits === undefined ? {} : { digits: line.digits }),
      isOn: line.off !== true,
      figure: evaluation.figure(line.id, caseId),
      ...told?.get(line.id),
    })),
  };
}

/** A line that counts, with its amount: what adds up. */
interface Term {
  readonly lineId: string;
  readonly figure: Figure & { readonly state: 'value' };
  readonly amount: number;
  readonly scale: NumberScale | undefined;
}

interface Terms {
  readonly adding: Adding;
  readonly terms: readonly Term[];
}

/** The lines that the total is made of, as its checked entry has them; undefined while there is no total. */
function termsOf(evaluation: Evaluation, pool: PoolSection, caseId: string, total: Reading): Terms | undefined {
  const checked = evaluation.inspect(poolTotalId(pool.id), caseId);
  if (checked === undefined || total.figure.state !== 'value') return undefined;
  const sum = amountsOf(checked, evaluation.figures);
  const lines = pool.lines.filter(counts);
  if (sum === undefined || sum.amounts.length !== lines.length) return undefined;
  const terms: Term[] = [];
  for (const [index, { id }] of lines.entries()) {
    const figure = evaluation.figure(id, caseId);
    const amount = sum.amounts[index];
    const part = checked.parts[index];
    if (figure.state !== 'value' || amount === undefined || part === undefined) return undefined;
    terms.push({ lineId: id, figure, amount, scale: scaleOf(part) });
  }
  return { adding: sum.adding, terms };
}

/** How a plain number counts among powers: as decibels, or by its logarithm; a ratio of voltages or fields with its square. */
function scaleOf(part: Checked): NumberScale | undefined {
  if (isBareDecibels(part)) return 'decibels';
  const { type } = part;
  if (type.form !== 'linear' || !isDimensionless(type.dimension)) return undefined;
  return type.degree === 1 ? 20 : 10;
}

/** The lines that the engine puts into the total: switched on, and with an entry in some case. */
const counts = (line: Line): boolean =>
  line.off !== true && (line.entry.trim() !== '' || Object.keys(line.byCase ?? {}).length > 0);

function amountsOf(checked: Checked, figures: Figures): { adding: Adding; amounts: readonly number[] } | undefined {
  const sum = powerSumOf(checked, figures);
  if (sum !== undefined)
    return sum.isReciprocal
      ? { adding: 'reciprocal', amounts: sum.parts.map(({ figureDb }) => -figureDb) }
      : { adding: 'powers', amounts: sum.parts.map(({ figureDb }) => figureDb) };
  if (checked.tree.type !== 'call' || checked.tree.name !== 'sum') return undefined;
  return { adding: 'linear', amounts: checked.parts.map(({ plan }) => evaluatePlan(plan, figures)) };
}

type Told = Pick<PoolLine, 'share' | 'without' | 'permitted'>;

function tell({ adding, terms }: Terms, { figure, requirement }: Reading): ReadonlyMap<string, Told> | undefined {
  if (figure.state !== 'value') return undefined;
  const amounts = terms.map(({ amount }) => amount);
  const whole = combineAmounts(amounts, adding);
  if (!agree(figureIn(figure.unit, whole, adding), figure.value, figure.unit)) return undefined;
  const rests = withoutEach(amounts, adding);
  const limit = requirement === undefined ? undefined : amountIn(figure.unit, requirement.limit, adding);
  return new Map(
    terms.map((term, index) => {
      const share = shareOf(term.amount, whole, adding);
      const rest = rests[index] ?? NaN;
      const told: Told = {
        ...(share === undefined ? {} : { share }),
        without: terms.length === 1 ? { state: 'empty' } : withValue(figure, figureIn(figure.unit, rest, adding)),
        ...(limit === undefined || requirement === undefined
          ? {}
          : { permitted: permittedOf(term, rest, limit, requirement.bound, adding) }),
      };
      return [term.lineId, told];
    }),
  );
}

function withValue(figure: Figure & { readonly state: 'value' }, value: number): Figure {
  const { unit, isFitted } = figure;
  return { state: 'value', value, unit, isFitted };
}

/** True when two figures in a unit are the same but for the last digits of the arithmetic. */
const agree = (a: number, b: number, { form }: Unit): boolean =>
  a === b || Math.abs(a - b) <= 1e-9 * Math.max(form === 'decibel' ? 1 : 0, Math.abs(b));

function permittedOf(
  { figure, amount, scale }: Term,
  rest: number,
  limit: number,
  bound: 'at least' | 'at most',
  adding: Adding,
): Permitted {
  const isCeiling = (bound === 'at most') !== (adding === 'reciprocal');
  const permittedAmount = restOf(limit, rest, adding);
  const value = Number.isNaN(permittedAmount) ? NaN : figureIn(figure.unit, permittedAmount, adding, scale);
  // An infinite signal ratio, which would be needed when the others reach the bound by themselves, is none.
  if (Number.isNaN(value) || value === Infinity) return { state: isCeiling ? 'none' : 'any' };
  if (!isCeiling && permittedAmount === -Infinity) return { state: 'any' };
  // A line as it stands is compared by its amount, so that a bound that is just met has exactly no room.
  const now = amount === permittedAmount ? value : figure.value;
  return { state: 'value', bound, value, unit: figure.unit, room: bound === 'at most' ? value - now : now - value };
}
