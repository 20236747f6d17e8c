/** The function catalogue: every function that entries may call, each described once. */
import { DECIBEL_FUNCTIONS } from './decibels';
import type { FunctionEntry } from './entry';
import { MATHEMATICS } from './mathematics';
import { CAPACITY_FUNCTIONS, NOISE_FUNCTIONS, PROPAGATION_FUNCTIONS } from './models';

export * from './entry';

/** All functions, by group. */
export const FUNCTIONS: readonly FunctionEntry[] = [
  ...DECIBEL_FUNCTIONS,
  ...NOISE_FUNCTIONS,
  ...PROPAGATION_FUNCTIONS,
  ...CAPACITY_FUNCTIONS,
  ...MATHEMATICS,
];

const byName = new Map(FUNCTIONS.map((entry) => [entry.name, entry]));

/** The function of this name. */
export function findFunction(name: string): FunctionEntry | undefined {
  return byName.get(name);
}
