/** The catalogue of findings: what every code has, and how sentences hold without figures that are not known. */
import { describe, expect, it } from 'vitest';
import { CATALOGUE, FINDING_CODES, type Facts } from '../../src/findings';

/** The codes of the algebra's table with their severities, and those of chains, pools and curves. */
const TABLE = {
  error: [
    'levels-summed',
    'unit-mismatch',
    'mixed-forms',
    'decibels-multiplied',
    'log-of-dimension',
    'rate-without-length',
    'field-and-power',
    'density-and-level',
    'no-power',
    'loop',
    'unknown-symbol',
    'duplicate-symbol',
    'bad-entry',
    'wrong-arguments',
    'not-finite',
    'waiting',
    'pool-mixed',
    'bad-curve',
    'outside-curve',
  ],
  warning: [
    'ratios-summed',
    'noise-figures-summed',
    'sides-mixed',
    'kind-mismatch',
    'decibels-averaged',
    'bandwidths-differ',
    'outside-validity',
    'level-without-reference',
    'constant-hides-unit',
    'field-ratio-in-power-log',
    'negative-figure',
    'planes-differ',
    'figure-below-loss',
    'compression-above-intercept',
    'stage-compressed',
    'ends-disagree',
    'stage-symbol-repeated',
    'interferer-too-strong',
  ],
  note: [
    'loss-added',
    'negative-loss',
    'nf-plus-loss',
    'figure-on-wanted',
    'number-as-decibels',
    'cancellation',
    'reference-temperature',
    'first-stage-weak',
    'noise-not-known',
    'source-temperature',
  ],
} as const;

describe('the catalogue of findings', () => {
  it('has the codes of the algebra, of chains, pools and curves, with their severities', () => {
    const found = Object.fromEntries(
      (['error', 'warning', 'note'] as const).map((severity) => [
        severity,
        FINDING_CODES.filter((code) => CATALOGUE[code].severity === severity).sort(),
      ]),
    );
    expect(found).toEqual(
      Object.fromEntries(Object.entries(TABLE).map(([severity, codes]) => [severity, [...codes].sort()])),
    );
  });

  it.each(FINDING_CODES)('%s has a title, a reason, and a code of small letters', (code) => {
    const { title, why } = CATALOGUE[code];
    expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
    expect(title).toMatch(/^[A-Z0-9].*[^.]$/);
    expect(why).toMatch(/^[A-Z].*\.$/);
  });

  const OPTIONAL = ['now', 'meant', 'repair', 'inPhase', 'missing', 'nearest', 'because', 'signature'];
  /** Every fact by its own name, but those that are not always known. */
  const named = (without: readonly string[]): Facts =>
    new Proxy<Record<string, string>>(
      {},
      { get: (_, name) => (typeof name !== 'string' || without.includes(name) ? undefined : `<${name}>`) },
    );

  it.each(FINDING_CODES)('%s makes a whole sentence without figures and repairs', (code) => {
    const message = CATALOGUE[code].message(named(OPTIONAL));
    expect(message).not.toMatch(/undefined|null|NaN| {2}|\( ?\)|“ ?”/);
    expect(message).not.toMatch(/<(now|meant|repair|inPhase)>/);
  });

  it.each(FINDING_CODES)('%s makes whole sentences with them', (code) => {
    expect(CATALOGUE[code].message(named([]))).not.toMatch(/undefined|null|NaN| {2}| [.,]|\.\./);
  });

  it('titles are all different', () => {
    expect(new Set(FINDING_CODES.map((code) => CATALOGUE[code].title)).size).toBe(FINDING_CODES.length);
  });

  it.each([
    [
      'levels-summed',
      { levels: 'P_1 and P_2', now: '17.00 dBm', meant: 'which gives 11.76 dBm', repair: 'powersum(P_1, P_2)' },
      ['17.00 dBm', '11.76 dBm', 'powersum(P_1, P_2)'],
    ],
    ['loop', { path: 'a → b → a' }, ['a → b → a']],
    ['unknown-symbol', { what: 'The symbol', name: 'Q', nearest: 'P' }, ['“Q”', '“P”']],
    ['waiting', { roots: 'a, b' }, ['a, b']],
  ] as const)('%s quotes its facts', (code, facts, parts) => {
    const message = CATALOGUE[code].message(facts);
    expect(parts.filter((part) => !message.includes(part))).toEqual([]);
  });
});
