/**
 * Finding units by their words, plus the two composed forms that the standards write: `dB(reference)`, and densities over a
 * stated bandwidth such as `dBm/100kHz`.
 * Holds: every word reads, writes and reads back.
 */
import {
  LENGTH,
  NO_DIMENSION,
  TIME,
  combineDimensions,
  raiseDimension,
  isRootPower,
  sameDimension,
  type Dimension,
} from './dimension';
import type { DecibelUnit, Unit } from './unit';
import { table, UNIT_WORDS } from './unit-table';

/** One spelling for what keyboards write in several ways: µ, Ω, ², `-` and the middle dot. */
function normalise(text: string): string {
  return text
    .replace(/[\u03bc]/g, 'µ')
    .replace(/[\u2126]/g, 'Ω')
    .replace(/(?<![0-9])\^?2(?=\/|\)|$)/g, (found, at: number, whole: string) =>
      /m$/.test(whole.slice(0, at)) ? '²' : found,
    )
    .replace(/m\^?3(?=\/|\)|$)/g, 'm³')
    .replace(/[\u2212\u2010\u2011\u2013]/g, '-')
    .replace(/[\u22c5]/g, '·');
}

const MICRO = /^(dB)?u(?=[WVAHs]|m$)/;

const composed = new Map<string, Unit | null>();

/** The unit that a word names, in any accepted spelling; undefined when there is none. The word holds no spaces, but `dB (1 mW)` does. */
export function findUnit(word: string): Unit | undefined {
  const direct = table.get(word);
  if (direct !== undefined) return direct;
  const known = composed.get(word);
  if (known !== undefined) return known ?? undefined;
  const unit = findUncommon(word);
  if (composed.size < 2000) composed.set(word, unit ?? null);
  return unit;
}

function findUncommon(word: string): Unit | undefined {
  if (word.length > 40) return undefined;
  const text = normalise(word.trim());
  const spelled = table.get(text) ?? table.get(text.replace(MICRO, (found) => found.replace('u', 'µ')));
  if (spelled !== undefined) return spelled;
  return referenceUnit(text) ?? densityOver(text);
}

/** `dBm/100kHz`: a level density over a stated bandwidth. */
function densityOver(text: string): DecibelUnit | undefined {
  const match = /^(dBm|dBW)(\/m²)?\/(\d+(?:\.\d+)?)([kMG]?Hz)$/.exec(text);
  if (match === null) return undefined;
  const level = table.get((match[1] ?? '') + (match[2] ?? ''));
  const bandwidth = table.get(match[4] ?? '');
  const figure = Number(match[3]);
  if (level?.form !== 'decibel' || bandwidth?.form !== 'linear' || !(figure > 0)) return undefined;
  return {
    form: 'decibel',
    word: text,
    dimension: combineDimensions(level.dimension, TIME),
    offsetDb: level.offsetDb - 10 * Math.log10(figure * bandwidth.factor),
    defaultKind: 'level',
    description: `power density over ${match[3] ?? ''} ${match[4] ?? ''}`,
  };
}

/** `dB(1 mW)`, `dB(µV/m)`, `dB(W·s/K)`: the reference written out, as ISO 80000-1 and ITU-R V.574 do. */
function referenceUnit(text: string): DecibelUnit | undefined {
  const match = /^dB ?\((?:1 )?(.+)\)$/.exec(text);
  if (match === null) return undefined;
  const reference = product(match[1] ?? '');
  if (reference === undefined) return undefined;
  // Antenna factors, field over voltage, are ratios of root-power quantities: dB(1/m) is 20 log10, of 1/m².
  const root = isRootPower(reference.dimension) || sameDimension(reference.dimension, raiseDimension(LENGTH, -1));
  const dimension = root ? raiseDimension(reference.dimension, 2) : reference.dimension;
  const offsetDb = (root ? 20 : 10) * Math.log10(reference.factor);
  for (const unit of table.values()) {
    if (
      unit.form === 'decibel' &&
      Math.abs(unit.offsetDb - offsetDb) < 1e-9 &&
      unit.dimension.every((n, i) => n === dimension[i]) &&
      !isDimensionlessWord(unit)
    )
      return unit;
  }
  return {
    form: 'decibel',
    word: `dB(${match[1] ?? ''})`,
    dimension,
    offsetDb,
    description: `decibel over ${match[1] ?? ''}`,
  };
}

const isDimensionlessWord = (unit: DecibelUnit): boolean => unit.dimension.every((n) => n === 0);

const EXPONENT: Readonly<Record<string, number>> = {
  '': 1,
  '²': 2,
  '³': 3,
  '⁴': 4,
  '⁶': 6,
  '⁻¹': -1,
  '⁻²': -2,
  '^-1': -1,
  '^-2': -2,
  '^2': 2,
  '^3': 3,
};

function product(text: string): { dimension: Dimension; factor: number } | undefined {
  let dimension = NO_DIMENSION;
  let factor = 1;
  const plain = table.get(text);
  if (plain?.form === 'linear') return { dimension: plain.dimension, factor: plain.factor };
  for (const [index, below] of text.split('/').entries()) {
    for (const part of below.replace(/[()]/g, '').split(/[·*]/)) {
      const match = /^([A-Za-zµΩ1]+?)((?:\^-?\d|[⁻²³⁴⁶¹])*)$/.exec(part);
      const unit = table.get(match?.[1] ?? '');
      const power = EXPONENT[match?.[2] ?? ''];
      if (unit?.form !== 'linear' || unit.shift !== 0 || power === undefined) return undefined;
      const exponent = index === 0 ? power : -power;
      dimension = combineDimensions(dimension, unit.dimension, exponent);
      factor *= unit.factor ** exponent;
    }
  }
  return { dimension, factor };
}

const RUN =
  /[A-Za-zµ\u03bcΩ\u2126°%](?:[A-Za-z0-9µ\u03bcΩ\u2126°%/²³⁴⁻¹^·-]|\((?:1 )?[A-Za-z0-9µ\u03bcΩ\u2126/²³⁴⁻¹^·*-]*\))*/y;
const WORD_GOES_ON = /[\p{L}\p{N}_]/u;

/**
 * The longest unit word in `text` at `at`, and where it ends; undefined when none starts there.
 * A shorter word is taken when what follows it is an operator: `3 dB-L` is 3 dB less L.
 */
export function matchUnit(text: string, at: number): { unit: Unit; end: number } | undefined {
  RUN.lastIndex = at;
  const run = RUN.exec(text)?.[0];
  if (run === undefined) return undefined;
  for (let length = run.length; length > 0; length--) {
    const next = text[at + length];
    if (next !== undefined && WORD_GOES_ON.test(next)) continue;
    const unit = findUnit(run.slice(0, length));
    if (unit !== undefined) return { unit, end: at + length };
  }
  return undefined;
}

/** Unit words of the same dimension and form as `unit`, itself included: what a line may be shown in. */
export function alternativeUnits(unit: Unit): readonly Unit[] {
  return UNIT_WORDS.map((word) => table.get(word)).filter(
    (other): other is Unit =>
      other !== undefined &&
      other.form === unit.form &&
      (other.form === 'rate' ||
        (unit.form !== 'rate' && other.dimension.every((n, i) => Math.abs(n - (unit.dimension[i] ?? 0)) < 1e-9))),
  );
}
