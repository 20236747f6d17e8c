/**
 * Says that what is being derived depends on these values, though it does not use them: figures come from the evaluation,
 * which is no reactive thing, and change when a version number does.
 */
export function dependsOn(...values: readonly unknown[]): number {
  return values.length;
}
