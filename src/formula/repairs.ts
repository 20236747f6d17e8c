/** Rewriting sums: the texts that repairs put in an entry's place. */
import { isDimensionless } from '../quantity';
import { asFactor, type Context } from './context';
import type { SumTerm } from './types';

/** A rewritten sum, and the few words that stand for it. */
export interface Grouped {
  readonly text: string;
  readonly title: string;
}

const near = (a: number, b: number): boolean => Math.abs(a - b) < 1e-9;

/** A coefficient as text: `3*`, `0.5*`, nothing for 1. */
const factorText = (size: number): string => (near(size, 1) ? '' : `${String(Math.round(size * 1e9) / 1e9)}*`);

/** Terms written as a sum again, in their order, positive ones first where the first would be negative. */
export function writeSum(pieces: readonly { readonly coefficient: number; readonly text: string }[]): string {
  const first = pieces.findIndex(({ coefficient }) => coefficient > 0);
  const head = first > 0 ? pieces[first] : undefined;
  const ordered = head === undefined ? pieces : [head, ...pieces.filter((piece) => piece !== head)];
  return ordered
    .map(({ coefficient, text }, index) => {
      const sign = coefficient < 0 ? (index === 0 ? '-' : ' - ') : index === 0 ? '' : ' + ';
      const size = factorText(Math.abs(coefficient));
      const isNegativeLiteral = text.startsWith('-');
      return sign + size + (isNegativeLiteral && (sign !== '' || size !== '') ? `(${text})` : text);
    })
    .join('');
}

const pieceOf = ({ coefficient, text, tree }: SumTerm): { coefficient: number; text: string } => ({
  coefficient,
  text: near(Math.abs(coefficient), 1) ? text : asFactor(tree, text),
});

/** Puts some terms of a sum together in a call; the call stands where the first of them stood. */
function grouped(
  terms: readonly SumTerm[],
  chosen: readonly SumTerm[],
  call: string,
  sign: number,
): Grouped | undefined {
  const [first] = chosen;
  if (first === undefined) return undefined;
  const rest = terms.filter((term) => !chosen.includes(term)).map(pieceOf);
  const at = terms.filter((term) => !chosen.includes(term) || term === first).indexOf(first);
  const pieces = [...rest.slice(0, at), { coefficient: sign, text: call }, ...rest.slice(at)];
  return { text: writeSum(pieces), title: call };
}

/** Levels in a power sum (or in phase), as many times as their coefficients say; undefined for broken multiples. */
export function groupedAsPowers(
  terms: readonly SumTerm[],
  levels: readonly SumTerm[],
  name: 'powersum' | 'fieldsum',
  context: Context,
): Grouped | undefined {
  const texts: string[] = [];
  // Of levels and densities the densities have the more seconds; they come in a bandwidth first.
  const lowest = Math.min(...levels.map(({ type }) => type.dimension[2]));
  const bandwidth = context.bandwidthTerm();
  for (const level of levels) {
    const times = Math.round(Math.abs(level.coefficient));
    if (!near(times, Math.abs(level.coefficient)) || times > 9) return undefined;
    const isDensity = level.type.dimension[2] !== lowest;
    if (isDensity && bandwidth === undefined) return undefined;
    texts.push(...Array.from({ length: times }, () => (isDensity ? `${level.text} + ${bandwidth ?? ''}` : level.text)));
  }
  return grouped(terms, levels, `${name}(${texts.join(', ')})`, Math.sign(levels[0]?.coefficient ?? 1));
}

/** Ratios combined by ratiosum. */
export function groupedAsRatios(terms: readonly SumTerm[], ratios: readonly SumTerm[]): Grouped | undefined {
  if (ratios.some(({ coefficient }) => !near(Math.abs(coefficient), 1))) return undefined;
  return grouped(
    terms,
    ratios,
    `ratiosum(${ratios.map(({ text }) => text).join(', ')})`,
    Math.sign(ratios[0]?.coefficient ?? 1),
  );
}

/** Noise figures as a cascade: the gain ahead of each later stage is the one named like its predecessor, else the first gain. */
export function cascadeOfFigures(
  terms: readonly SumTerm[],
  figures: readonly SumTerm[],
  context: Context,
): Grouped | undefined {
  const gains = context
    .allLines()
    .filter(
      ({ kind, unit, symbol, label, isDeclared }) =>
        kind === 'gain' &&
        unit.form === 'decibel' &&
        isDimensionless(unit.dimension) &&
        (isDeclared || unit.defaultKind === 'gain' || /^G/.test(symbol) || /\bgain\b/i.test(label)),
    );
  const gainAfter = (figure: SumTerm): string | undefined => {
    const suffix = (figure.symbol ?? '').replace(/^NF_?/, '');
    const named = gains.find(({ symbol }) => suffix !== '' && symbol.replace(/^G_?/, '') === suffix);
    return (named ?? gains[0])?.symbol;
  };
  const parts: string[] = [];
  for (const [index, figure] of figures.entries()) {
    if (!near(figure.coefficient, 1) || figure.symbol === undefined) return undefined;
    parts.push(figure.text);
    const gain = gainAfter(figure);
    if (index === figures.length - 1) break;
    if (gain === undefined) return undefined;
    parts.push(gain);
  }
  return grouped(terms, figures, `cascade_nf(${parts.join(', ')})`, 1);
}

/** The sum with the sign of one term turned, the first for which `isRight` holds and the dimension stays. */
export function withFlippedTerm(
  terms: readonly SumTerm[],
  isRight: (changed: readonly SumTerm[]) => boolean,
): Grouped | undefined {
  for (const term of [...terms].reverse()) {
    if (!isDimensionless(term.type.dimension)) continue;
    const changed = terms.map((other) => (other === term ? { ...other, coefficient: -other.coefficient } : other));
    if (!isRight(changed)) continue;
    const text = writeSum(changed.map(pieceOf));
    return { text, title: text };
  }
  return undefined;
}

/** The sum without one of its terms. */
export function withoutTerm(terms: readonly SumTerm[], left: SumTerm): Grouped {
  const text = writeSum(terms.filter((term) => term !== left).map(pieceOf));
  return { text, title: text };
}

/** The sum with the sign of one term turned. */
export function withTurnedTerm(terms: readonly SumTerm[], turned: SumTerm): Grouped {
  const text = writeSum(
    terms.map((term) => pieceOf(term === turned ? { ...term, coefficient: -term.coefficient } : term)),
  );
  return { text, title: text };
}

/** The sum with some terms replaced by one text. */
export function withReplacedTerms(
  terms: readonly SumTerm[],
  replaced: readonly SumTerm[],
  text: string,
  sign = 1,
): Grouped {
  return grouped(terms, replaced, text, sign) ?? { text, title: text };
}
