/**
 * A symbol proposed for a label: the letter that the trade gives the quantity, with what qualifies it as subscript.
 * Holds: the proposal depends on the label and the taken symbols alone, is well formed, and is free.
 */
import { freeSymbol, isSymbol, symbolFault } from './symbols';

/** Names of whole quantities, tried first; the longest that begins or ends the label counts. */
const QUANTITIES: Readonly<Record<string, string>> = {
  'noise power density': 'N_0',
  'noise density': 'N_0',
  'noise figure': 'NF',
  'noise temperature': 'T',
  'noise bandwidth': 'B',
  'noise power': 'N',
  noise: 'N',
  'bit rate': 'R_b',
  'data rate': 'R_b',
  'symbol rate': 'R_s',
  bandwidth: 'B',
  power: 'P',
  gain: 'G',
  loss: 'L',
  losses: 'L',
  attenuation: 'L',
  temperature: 'T',
  frequency: 'f',
  wavelength: 'λ',
  distance: 'd',
  range: 'd',
  height: 'h',
  margin: 'M',
  interference: 'I',
  interferer: 'I',
  signal: 'S',
  carrier: 'C',
  level: 'P',
  sensitivity: 'S_min',
};

/** Words that qualify a quantity, as subscripts. */
const QUALIFIERS: Readonly<Record<string, string>> = {
  transmit: 'tx',
  transmitted: 'tx',
  transmitter: 'tx',
  receive: 'rx',
  received: 'rx',
  receiver: 'rx',
  antenna: 'ant',
  aerial: 'ant',
  feeder: 'feed',
  feed: 'feed',
  cable: 'cable',
  path: 'path',
  'free-space': 'fs',
  free: 'fs',
  space: '',
  system: 'sys',
  sky: 'sky',
  rain: 'rain',
  gas: 'gas',
  gaseous: 'gas',
  atmospheric: 'atm',
  pointing: 'point',
  polarisation: 'pol',
  polarization: 'pol',
  fade: 'fade',
  fading: 'fade',
  implementation: 'impl',
  filter: 'filt',
  amplifier: 'amp',
  mixer: 'mix',
  required: 'req',
  minimum: 'min',
  maximum: 'max',
  total: 'tot',
  input: 'in',
  output: 'out',
  link: 'link',
  body: 'body',
  thermal: '',
  channel: 'ch',
};

const BY_LENGTH = Object.entries(QUANTITIES).sort(([a], [b]) => b.length - a.length);

/**
 * A free symbol for a line with this label: `Transmit power` gives `P_tx`, `EIRP` gives `EIRP`, a label without a word of the
 * tables its first word. Empty when the label holds no letter. `counts` as for `freeSymbol`.
 */
export function proposeSymbol(label: string, taken: ReadonlySet<string>, counts?: Map<string, number>): string {
  const proposal = asSymbol(label.trim()) ?? fromTables(label) ?? fromFirstWord(label);
  return freeSymbol(symbolFault(proposal) === undefined || proposal === '' ? proposal : `${proposal}_2`, taken, counts);
}

/** The label itself where it is written as a symbol already: with an underscore, in capitals, or as one letter. */
function asSymbol(label: string): string | undefined {
  const isWrittenAsSymbol = label.includes('_') || label === label.toUpperCase() || label.length === 1;
  return isWrittenAsSymbol && isSymbol(label) ? label : undefined;
}

function fromTables(label: string): string | undefined {
  const text = label
    .toLowerCase()
    .replace(/[^\p{L}\p{N}-]+/gu, ' ')
    .trim();
  const name = BY_LENGTH.find(
    ([words]) => text === words || text.endsWith(` ${words}`) || text.startsWith(`${words} `),
  );
  if (name === undefined) return undefined;
  const [words, symbol] = name;
  const others = text.endsWith(words) ? text.slice(0, -words.length) : text.slice(words.length);
  const below = others.split(' ').flatMap((word) => {
    const known = Object.hasOwn(QUALIFIERS, word) ? QUALIFIERS[word] : undefined;
    return known ?? (/^\p{N}+$/u.test(word) ? word : '');
  });
  return [symbol, ...new Set(below.filter((word) => word !== ''))].join('_');
}

function fromFirstWord(label: string): string {
  return /\p{L}[\p{L}\p{M}\p{N}]*/u.exec(label)?.[0] ?? '';
}
