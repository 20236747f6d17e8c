/** Results: a value, or a fault as a value. Nothing in the project reports an expected failure by throwing. */

/** Either a value of type `T` or a fault of type `F`; `ok` tells which. */
export type Result<T, F> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly fault: F };

/** A successful result. */
export function ok<T>(value: T): { readonly ok: true; readonly value: T } {
  return { ok: true, value };
}

/** A failed result. */
export function fail<F>(fault: F): { readonly ok: false; readonly fault: F } {
  return { ok: false, fault };
}
