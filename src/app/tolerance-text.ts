/**
 * A tolerance as text: how a person types it, and how it is shown: `±0.5 dB`, `+0.3/−0.8 dB triangular`, `fav 0.5 dB adv 1 dB`,
 * `±2 % group supply`. Signs and ± give what is stored as below and above; words, and two bare magnitudes, favourable and adverse.
 * Holds: what is written reads back; limits of a normal shape are kept at 3σ, whatever they were typed at.
 */
import { fail, ok, type Result } from '../base';
import { readPlainQuantity } from '../formula';
import type { Tolerance, ToleranceShape } from '../worksheet';

export const TOLERANCE_EXAMPLE = '±0.5 dB or +0.3/−0.8 dB normal';

type Side = 'favourable' | 'adverse' | 'below' | 'above';
type Parts = Readonly<Partial<Record<Side, string>>>;

const GROUP = /(?:^|[\s,;])group\b\s*(.*)$/isu;
const SHAPE = /(?:^|[\s,;(])(uniform|triangular|normal|arcsine)(?=$|[\s,;)])/iu;
const SIGMA = /[\s,;(]*(\d+(?:\.\d+)?)?\s*(?:σ|\bsigma\b)\s*\)?/iu;
const WORDS = /^(fav(?:ou?rable)?|adv(?:erse)?)\b\.?/iu;

/** The tolerance that a text states; undefined for an empty text; a fault is a sentence. */
export function readTolerance(text: string): Result<Tolerance | undefined, string> {
  let rest = text.trim();
  if (rest === '') return ok(undefined);
  const group = GROUP.exec(rest);
  if (group !== null) rest = rest.slice(0, group.index);
  const name = group?.[1]?.trim();
  if (name === '') return fail('The group has no name: for example group supply.');
  const sigma = SIGMA.exec(rest);
  if (sigma !== null) rest = rest.replace(SIGMA, ' ');
  const named = SHAPE.exec(rest)?.[1]?.toLowerCase() as ToleranceShape | undefined;
  if (named !== undefined) rest = rest.replace(SHAPE, ' ');
  if (sigma !== null && named !== undefined && named !== 'normal')
    return fail(`Limits in σ are those of a normal shape, not of a ${named} one.`);
  const parts = readParts(rest.replace(/[\s,;()]+$/u, '').trim());
  if (!parts.ok) return parts;
  const scaled = scaleParts(parts.value, Number(sigma?.[1] ?? 1), sigma !== null);
  if (!scaled.ok) return scaled;
  const shape = sigma === null ? named : 'normal';
  return ok({ ...scaled.value, ...(shape && { shape }), ...(name !== undefined && { group: name }) });
}

function readParts(text: string): Result<Parts, string> {
  if (text === '') return fail(`The deviation is missing: for example ${TOLERANCE_EXAMPLE}.`);
  const both = /^(?:±|\+\s?\/\s?[-−–]|\+[-−–])\s*(.*)$/su.exec(text)?.[1];
  if (both !== undefined) return checked({ below: both, above: both });
  if (WORDS.test(text)) return readSides(text, /[\s,;/]*(?=\b(?:fav|adv))/iu, (part) => sideOfWord(part));
  if (/^[+\-−–]/u.test(text)) return readSides(text, /(?<=[^eE^])[\s,;/]*(?=[+\-−–])/u, sideOfSign);
  const [first = '', second, ...others] = text.split(/\s*\/(?=\s*[\d.,])\s*/u);
  if (others.length > 0) return fail('There are more than two deviations.');
  return checked(second === undefined ? { below: first, above: first } : { favourable: first, adverse: second });
}

type Sided = readonly [side: Side, magnitude: string];

const sideOfWord = (part: string): Sided | undefined => {
  const word = WORDS.exec(part)?.[0];
  if (word === undefined) return undefined;
  return [/^f/iu.test(word) ? 'favourable' : 'adverse', part.slice(word.length).trim()];
};

const sideOfSign = (part: string): Sided | undefined =>
  /^[+\-−–]/u.test(part) ? [part.startsWith('+') ? 'above' : 'below', part.slice(1).trim()] : undefined;

function readSides(text: string, between: RegExp, sideOf: (part: string) => Sided | undefined): Result<Parts, string> {
  const found: Partial<Record<Side, string>> = {};
  for (const part of text.split(between)) {
    const sided = sideOf(part);
    if (sided === undefined) return fail(`“${part}” is no deviation: for example ${TOLERANCE_EXAMPLE}.`);
    const [side, magnitude] = sided;
    if (found[side] !== undefined) return fail(`The deviation ${SIDE_WORDS[side]} is given twice.`);
    found[side] = magnitude;
  }
  return checked(found);
}

const SIDE_WORDS: Readonly<Record<Side, string>> = {
  favourable: 'to the favourable side',
  adverse: 'to the adverse side',
  below: 'below',
  above: 'above',
};

/** Each deviation is a magnitude; one without a unit takes that of the other. */
function checked(parts: Parts): Result<Parts, string> {
  const sides = Object.entries(parts) as [Side, string][];
  const unit = sides.map(([, text]) => unitTextOf(text)).find((word) => word !== '') ?? '';
  const found: Partial<Record<Side, string>> = {};
  for (const [side, text] of sides) {
    const read = readPlainQuantity(text);
    if (read === undefined) return fail(`“${text}” is no quantity: for example ${TOLERANCE_EXAMPLE}.`);
    if (!(read.figure >= 0) || /^[-−–+]/u.test(text))
      return fail(`“${text}” has a sign too many: deviations are magnitudes.`);
    found[side] = read.unit === null && unit !== '' ? `${text} ${unit}` : text;
  }
  return ok(found);
}

const NUMBER = /^[\d.,'’ \u00a0\u202f]*\d[.,]?(?:[eE][+-]?\d+)?/u;
const unitTextOf = (text: string): string => text.replace(NUMBER, '').trim();

/** Deviations at so many σ, at three. */
function scaleParts(parts: Parts, sigmas: number, isSaid: boolean): Result<Parts, string> {
  if (!isSaid || sigmas === 3) return ok(parts);
  if (!(sigmas > 0)) return fail('Limits stand at 1σ, 2σ or 3σ.');
  const scaled = (Object.entries(parts) as [Side, string][]).map(([side, text]) => {
    const figure = ((readPlainQuantity(text)?.figure ?? NaN) * 3) / sigmas;
    return [side, `${String(Number(figure.toPrecision(12)))} ${unitTextOf(text)}`.trim()];
  });
  return ok(Object.fromEntries(scaled) as Parts);
}

/** The tolerance as shown and as it is edited; empty without one. */
export function writeTolerance(tolerance: Tolerance | undefined): string {
  if (tolerance === undefined) return '';
  const { favourable, adverse, below, above, shape, group } = tolerance;
  const words = [
    favourable === undefined ? '' : `fav ${favourable}`,
    adverse === undefined ? '' : `adv ${adverse}`,
    writePlaces(below, above),
    shape === undefined ? '' : shape === 'normal' ? 'normal 3σ' : shape,
    group === undefined || group.trim() === '' ? '' : `group ${group.trim()}`,
  ];
  return words.filter((word) => word !== '').join(' ');
}

function writePlaces(below: string | undefined, above: string | undefined): string {
  if (above === undefined) return below === undefined ? '' : `−${below}`;
  if (below === undefined) return `+${above}`;
  if (below === above) return `±${above}`;
  const [unit, other] = [unitTextOf(above), unitTextOf(below)];
  // A unit said once counts for both; digits grouped by blanks are left as they are.
  const number = unit === other && unit !== '' && above.endsWith(` ${unit}`) ? above.slice(0, -unit.length - 1) : '';
  return number === '' || /\s/u.test(number) ? `+${above} −${below}` : `+${number}/−${below}`;
}

/** What becomes of a tolerance when its text is changed; keys that this version does not know stay. */
export function editedTolerance(before: Tolerance | undefined, text: string): Result<Tolerance | undefined, string> {
  if (text.trim() === writeTolerance(before).trim()) return ok(before);
  const read = readTolerance(text);
  if (!read.ok || read.value === undefined || before === undefined) return read;
  const { favourable, adverse, below, above, shape, group, ...others } = before;
  return ok({ ...others, ...read.value });
}
