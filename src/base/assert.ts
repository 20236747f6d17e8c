/** Assertions: for broken programs only, never for what a person typed or a file holds. */

/**
 * Stops when `condition` is false.
 * Throws: Error with `message`; caught by the page's outermost boundary alone, which keeps the document.
 */
export function assert(condition: unknown, message: string): asserts condition {
  if (!condition) throw new Error(`broken invariant: ${message}`);
}

/** The value, which the caller knows to be present. Throws: Error naming `what` when it is not. */
export function present<T>(value: T | undefined | null, what: string): T {
  assert(value !== undefined && value !== null, `${what} is missing`);
  return value;
}

/** For the default branch of an exhaustive switch. Throws always. */
export function unreachable(value: never): never {
  throw new Error(`broken invariant: unexpected ${String(value)}`);
}
