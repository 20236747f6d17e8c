/**
 * Meaning: beside its dimension each term of a sum carries exponents of wanted (w), unwanted (u), noise figure (f) and of
 * levels whose side is not said (l). They add like dimensions; their net tells a required level from a mistake.
 * Holds: exponents of a·b are the sums of those of a and b; those of aⁿ are n times those of a.
 */
import type { QuantityKind, Side } from './kinds';

export interface Meaning {
  readonly w: number;
  readonly u: number;
  readonly f: number;
  readonly l: number;
  /** True when every kind and side that went in was declared by a person or stated by a function or unit. */
  readonly declared: boolean;
}

export const NEUTRAL: Meaning = { w: 0, u: 0, f: 0, l: 0, declared: true };

/** A term about which nothing is known: it weighs nothing, and what it enters is not wholly declared. */
export const UNSAID: Meaning = { w: 0, u: 0, f: 0, l: 0, declared: false };

/** The exponents of a line of this kind and side. */
export function meaningOf(kind: QuantityKind, side: Side | undefined, declared: boolean): Meaning {
  switch (kind) {
    case 'level':
      if (side === 'wanted') return { w: 1, u: 0, f: 0, l: 0, declared };
      if (side === 'unwanted') return { w: 0, u: 1, f: 0, l: 0, declared };
      // A level whose side is not said is not wholly known.
      return { w: 0, u: 0, f: 0, l: 1, declared: false };
    case 'temperature':
      return { w: 0, u: 1, f: 0, l: 0, declared };
    case 'signal ratio':
      return { w: 1, u: -1, f: 0, l: 0, declared };
    case 'impairment ratio':
      return { w: -1, u: 1, f: 0, l: 0, declared };
    case 'figure of merit':
      return { w: 0, u: -1, f: 0, l: 0, declared };
    case 'noise figure':
      return { w: 0, u: 0, f: 1, l: 0, declared };
    case 'gain':
    case 'loss':
    case 'bandwidth':
    case 'plain':
      return { w: 0, u: 0, f: 0, l: 0, declared };
  }
}

/** The exponents of a·bⁿ. */
export function combineMeanings(a: Meaning, b: Meaning, exponent = 1): Meaning {
  if (b === NEUTRAL) return a;
  if (a === NEUTRAL && exponent === 1) return b;
  return {
    w: a.w + exponent * b.w,
    u: a.u + exponent * b.u,
    f: a.f + exponent * b.f,
    l: a.l + exponent * b.l,
    declared: a.declared && b.declared,
  };
}

const near = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;

/** True when both have the same exponents. */
export function sameMeaning(a: Meaning, b: Meaning): boolean {
  return near(a.w, b.w) && near(a.u, b.u) && near(a.f, b.f) && near(a.l, b.l);
}

const ALLOWED: readonly (readonly [number, number])[] = [
  [0, 0],
  [1, 0],
  [0, 1],
  [1, -1],
  [-1, 1],
  [0, -1],
  [-1, 0],
];

const isAllowed = (w: number, u: number): boolean => ALLOWED.some(([aw, au]) => near(w, aw) && near(u, au));

/** The ways to give sides to the levels whose side is not said. Fractional nets are tried at both ends alone. */
function resolutions({ w, u, l }: Meaning): (readonly [number, number])[] {
  const steps = Math.abs(l);
  if (!near(steps, Math.round(steps)))
    return [
      [w + l, u],
      [w, u + l],
    ];
  const sign = Math.sign(l);
  return Array.from(
    { length: Math.round(steps) + 1 },
    (_, wanted) => [w + sign * wanted, u + sign * (steps - wanted)] as const,
  );
}

/** True when the net is one that budgets have, for some choice of the sides not said. */
export function hasAllowedNet(meaning: Meaning): boolean {
  // Most sums have none or one level whose side is not said; they need no list of choices.
  if (meaning.l === 0) return isAllowed(meaning.w, meaning.u);
  if (meaning.l === 1) return isAllowed(meaning.w + 1, meaning.u) || isAllowed(meaning.w, meaning.u + 1);
  return resolutions(meaning).some(([w, u]) => isAllowed(w, u));
}

/** The meaning with its open sides settled, where only one choice of them gives a net that budgets have. */
export function resolveMeaning(meaning: Meaning): Meaning {
  if (near(meaning.l, 0)) return meaning;
  const allowed = resolutions(meaning).filter(([w, u]) => isAllowed(w, u));
  const [only] = allowed;
  return allowed.length === 1 && only !== undefined ? { ...meaning, w: only[0], u: only[1], l: 0 } : meaning;
}

/** What the net makes of a result: its kind and side, as far as it tells. */
export function kindOfNet(meaning: Meaning, dimensionless: boolean): { kind: QuantityKind; side?: Side } | undefined {
  const { w, u, f, l } = resolveMeaning(meaning);
  const is = (ww: number, uu: number, ll: number): boolean => near(w, ww) && near(u, uu) && near(l, ll);
  if (is(1, 0, 0)) return { kind: 'level', side: 'wanted' };
  if (is(0, 1, 0)) return { kind: 'level', side: 'unwanted' };
  if (is(0, 0, 1)) return { kind: 'level' };
  if (is(1, -1, 0) || is(0, -1, 1)) return { kind: 'signal ratio' };
  if (is(-1, 1, 0)) return { kind: 'impairment ratio' };
  if (is(0, -1, 0)) return { kind: 'figure of merit' };
  if (is(0, 0, 0) && dimensionless && near(f, 1)) return { kind: 'noise figure' };
  if (is(0, 0, 0) && dimensionless && near(f, 0)) return { kind: 'gain' };
  return undefined;
}

/** The net in words, for findings. */
export function describeNet({ w, u, l, f }: Meaning): string {
  const parts: string[] = [];
  const part = (n: number, what: string): void => {
    if (!near(n, 0)) parts.push(`${n > 0 ? '' : '−'}${String(Math.abs(Math.round(n * 100) / 100))} × ${what}`);
  };
  part(w, 'wanted');
  part(u, 'unwanted');
  part(l, 'level');
  part(f, 'noise figure');
  return parts.length === 0 ? 'nothing' : parts.join(', ');
}
