/**
 * What the catalogue holds of a function: the single source for checking, evaluation, reference, completion and the command
 * line. An *ordinary* function takes quantities of stated kinds and computes numbers; the checker converts arguments to what
 * the parameters say. A *structural* function (powersum, if, db …) checks its arguments itself.
 */
import type { QuantityKind, Side } from '../../quantity';
import type { Context } from '../context';
import type { CallTree } from '../tree';
import type { Checked } from '../types';

export const FUNCTION_GROUPS = ['Mathematics', 'Decibels', 'Noise', 'Propagation', 'Capacity'] as const;
export type FunctionGroup = (typeof FUNCTION_GROUPS)[number];

/** What a parameter takes, and the form in which the function gets it. */
export type ParameterKind =
  | 'temperature' // K
  | 'bandwidth' // Hz
  | 'frequency' // Hz
  | 'length' // m
  | 'loss' // dB
  | 'gain' // dB
  | 'noise figure' // dB
  | 'signal ratio' // dB
  | 'quantity' // structural functions: as the text says
  | 'condition'
  | 'number';

export interface Parameter {
  readonly name: string;
  readonly text: string;
  readonly takes: ParameterKind;
  /** The unit shown; any unit of the dimension is taken. */
  readonly unit: string;
  /** An entry that stands in when the argument is left out. */
  readonly default?: string;
}

interface Described {
  readonly name: string;
  readonly group: FunctionGroup;
  readonly parameters: readonly Parameter[];
  /** How many of the last parameters may be repeated, as a group; 0 when the list is closed. */
  readonly repeats: number;
  /** One sentence. */
  readonly text: string;
  readonly formula: string;
  /** Document, edition, section; or "definition", "common practice". */
  readonly source: string;
  readonly result: string;
  /** An entry that can be evaluated as it stands. */
  readonly example: string;
}

export interface OrdinaryFunction extends Described {
  readonly form: 'ordinary';
  readonly compute: (...values: number[]) => number;
  /** The unit in which `compute` gives its result. */
  readonly resultUnit: string;
  readonly resultKind: QuantityKind;
  readonly resultSide?: Side;
  /** Where the source limits the model: the range in words, the parameter at fault, and the test. */
  readonly validity?: {
    readonly range: string;
    readonly parameter: string;
    readonly holds: (...values: number[]) => boolean;
  };
  /** Parameter whose bandwidth (Hz) the resulting power is in, and whose temperature (K) it comes from. */
  readonly bandwidthFrom?: string;
  readonly temperatureFrom?: string;
  /** True when the repeated list may end in the middle of a group. */
  readonly mayEndEarly?: boolean;
}

export interface StructuralFunction extends Described {
  readonly form: 'structural';
  /** Arguments have been checked, and judged unless `judgesItself`. */
  readonly check: (tree: CallTree, operands: readonly Checked[], context: Context) => Checked;
  /** True when sums in arguments are not judged before (sum itself). */
  readonly judgesItself?: boolean;
}

export type FunctionEntry = OrdinaryFunction | StructuralFunction;

/** The call as it is written: `thermal_noise(T, B)`; defaults in brackets, `…` for repeats. */
export function signatureOf(entry: FunctionEntry): string {
  const names = entry.parameters.map(({ name, default: standard }) => (standard === undefined ? name : `[${name}]`));
  return `${entry.name}(${names.join(', ')}${entry.repeats > 0 ? ', …' : ''})`;
}

/** The fewest arguments that a call must have. */
export function fewestArguments(entry: FunctionEntry): number {
  return entry.parameters.filter(({ default: standard }) => standard === undefined).length;
}

export const quantityParameter = (name: string, text: string): Parameter => ({
  name,
  text,
  takes: 'quantity',
  unit: '',
});
export const numberParameter = (name: string, text: string): Parameter => ({ name, text, takes: 'number', unit: '1' });
