/**
 * The catalogue of findings: the only place where their codes, severities and words stand.
 * Facts used in messages: `now` (what the line gives as it stands), `meant` (what the first repair gives), `repair` (its text),
 * and what each entry names. Figures may be absent while inputs are withheld; the sentences hold without them.
 */
import type { Facts, Severity } from './finding';

interface CatalogueEntry {
  readonly severity: Severity;
  readonly title: string;
  /** Why it matters, for the reference and for contributors. */
  readonly why: string;
  readonly message: (facts: Facts) => string;
}

const given = (value: string | undefined, sentence: (value: string) => string): string =>
  value === undefined ? '' : sentence(value);

/** “Probably meant: `repair`, which gives X.”, as far as known. */
const instead = (facts: Facts, lead: string): string =>
  facts['repair'] === undefined
    ? ''
    : ` ${lead}: ${facts['repair']}${given(facts['meant'], (meant) => `, which gives ${meant}`)}.`;

const entry = (severity: Severity, title: string, why: string, message: CatalogueEntry['message']): CatalogueEntry => ({
  severity,
  title,
  why,
  message,
});

const f = (facts: Facts, name: string): string => facts[name] ?? '';

export const CATALOGUE = {
  'levels-summed': entry(
    'error',
    'Levels are added as decibels',
    'Adding decibel levels multiplies their powers: the result is a power squared and means nothing.',
    (x) =>
      `${f(x, 'levels')} ${x['single'] === undefined ? 'are levels and are added' : 'is a level and is counted more than once'}. In decibels that multiplies their powers${given(x['now'], (now) => `: the sum would read ${now}`)}.` +
      instead(x, 'Added as powers') +
      given(x['inPhase'], (figure) => ` In phase, as fields, they would make ${figure}.`),
  ),
  'unit-mismatch': entry(
    'error',
    'The result does not have the unit declared',
    'A figure is only shown in a unit of its own dimension.',
    (x) =>
      `${f(x, 'what')} has the dimension of ${f(x, 'found')}, not of ${f(x, 'declared')}${given(x['now'], (now) => `: its bare figure would read ${now}`)}.` +
      given(x['missing'], (missing) => ` ${missing}`) +
      instead(x, 'Probably meant'),
  ),
  'mixed-forms': entry(
    'error',
    'Decibel and linear figures are mixed',
    'A linear quantity with a unit has no place in a decibel sum: its figure depends on the unit chosen.',
    (x) =>
      `${f(x, 'linear')} is linear (${f(x, 'linearUnit')}) and stands ${f(x, 'where')}${given(x['now'], (now) => `: figure by figure that would read ${now}`)}.` +
      instead(x, 'In one form'),
  ),
  'decibels-multiplied': entry(
    'error',
    'Decibels are multiplied or raised',
    'Products of decibels, and roots, logarithms or powers of them, have no meaning as power ratios.',
    (x) =>
      `${f(x, 'what')}${given(x['now'], (now) => `; figure by figure that would read ${now}`)}.` +
      instead(x, 'Probably meant'),
  ),
  'log-of-dimension': entry(
    'error',
    'Logarithm of a quantity with a unit',
    'The logarithm of a quantity depends on its unit unless it is divided by a reference.',
    (x) =>
      `${f(x, 'function')} takes a plain number; ${f(x, 'argument')} has the dimension of ${f(x, 'found')}${given(x['now'], (now) => `, and its bare figure would give ${now}`)}.` +
      instead(x, 'Probably meant'),
  ),
  'rate-without-length': entry(
    'error',
    'Decibels per length without the length',
    'An attenuation per length becomes a loss only when multiplied by a length.',
    (x) =>
      `${f(x, 'rate')} is in decibels per length and stands ${f(x, 'where')}${given(x['now'], (now) => `; its bare figure would give ${now}`)}.` +
      instead(x, 'Times a length'),
  ),
  'field-and-power': entry(
    'error',
    'A voltage or field level stands for a power level',
    'Volts become watts only through an impedance: dBµV less dBΩ is a power level.',
    (x) =>
      `${f(x, 'what')} is a level of ${f(x, 'found')}, not of ${f(x, 'declared')}${given(x['now'], (now) => `: the figures give ${now}`)}. An impedance is missing.` +
      instead(x, 'With an impedance'),
  ),
  'density-and-level': entry(
    'error',
    'A density is combined with a level',
    'A power per hertz and a power cannot be added or compared until a bandwidth is stated.',
    (x) =>
      `${f(x, 'densities')} per hertz and ${f(x, 'levels')} as whole power stand together in ${f(x, 'where')}${given(x['now'], (now) => `; by their bare figures that would read ${now}`)}.` +
      instead(x, 'In one bandwidth'),
  ),
  'no-power': entry(
    'error',
    'No power to express in decibels',
    'Zero or negative power has no decibel figure.',
    (x) => `${f(x, 'what')}. The decibel figure does not exist; the value is withheld until its inputs are put right.`,
  ),
  'pool-mixed': entry(
    'error',
    'The pool holds what cannot be added',
    'A pool adds powers: levels of one dimension, temperatures, signal ratios or impairment ratios, and one sort alone.',
    (x) =>
      `${f(x, 'first')} is ${f(x, 'firstSort')} and ${f(x, 'second')} is ${f(x, 'secondSort')}: their powers have no total. Bring them into one form, or move one to another pool.`,
  ),
  'bad-curve': entry(
    'error',
    'The curve cannot be read',
    'A curve needs known units and one value at each place.',
    (x) => f(x, 'what'),
  ),
  'outside-curve': entry(
    'error',
    'Read outside the curve',
    'A table says nothing of what lies beyond its ends, and nothing is made up there.',
    (x) =>
      `${f(x, 'curve')} is known from ${f(x, 'from')} to ${f(x, 'to')} and is read at ${f(x, 'value')}. Add points, or stay within them.`,
  ),
  loop: entry(
    'error',
    'The line rests on itself',
    'A value that depends on itself cannot be computed.',
    (x) => `The line rests on itself: ${f(x, 'path')}. Break the loop in one of these lines.`,
  ),
  'unknown-symbol': entry(
    'error',
    'Nothing has this name',
    'An expression may use the symbols of lines, constants and functions of the catalogue.',
    (x) =>
      given(
        x['example'],
        (example) =>
          `“${f(x, 'name')}” is a chain or a stage and has no figure by itself: write a part of it, such as ${example}.`,
      ) ||
      given(
        x['needs'],
        (needs) =>
          `“${f(x, 'name')}” is not given: ${f(x, 'name').split('.')[0] ?? ''} gives it once it is told ${needs}.`,
      ) ||
      `${f(x, 'what')} “${f(x, 'name')}” is not known here.` + given(x['nearest'], (nearest) => ` Is it “${nearest}”?`),
  ),
  'duplicate-symbol': entry(
    'error',
    'Two lines have this symbol',
    'A symbol stands for one line.',
    (x) =>
      `“${f(x, 'name')}” ${f(x, 'holder')}. Expressions use that one; this line's value is withheld until it has a symbol of its own.`,
  ),
  'bad-entry': entry(
    'error',
    'The entry cannot be read',
    'An entry is a quantity such as 43 dBm or an expression such as P_tx + G_tx.',
    (x) => f(x, 'what'),
  ),
  'wrong-arguments': entry(
    'error',
    'The function cannot take these arguments',
    'Each function states what it takes.',
    (x) =>
      `${f(x, 'what')}.` +
      given(x['signature'], (signature) => ` It is written ${signature}.`) +
      instead(x, 'Probably meant'),
  ),
  'not-finite': entry(
    'error',
    'The result is not a finite number',
    'A division by zero or an overflow leaves no figure.',
    (x) => `${f(x, 'what')} has no finite value${given(x['because'], (why) => `: ${why}`)}.`,
  ),
  waiting: entry(
    'error',
    'The line waits for another',
    'A line whose inputs are withheld is withheld too.',
    (x) => `Waits for ${f(x, 'roots')}, which has no value yet.`,
  ),
  'ratios-summed': entry(
    'warning',
    'Signal or impairment ratios are added as decibels',
    'Ratios to a common signal combine through their powers, not by adding their decibels.',
    (x) =>
      `${f(x, 'ratios')} are ratios to a signal and are added${given(x['now'], (now) => `: ${now}`)}.` +
      instead(x, 'Combined as powers'),
  ),
  'noise-figures-summed': entry(
    'warning',
    'Noise figures are added',
    'The noise figure of a cascade follows from each figure and the gain ahead of it.',
    (x) =>
      `${f(x, 'figures')} enter as noise figures more than once${given(x['now'], (now) => `: ${now}`)}. A cascade's noise figure needs the gain ahead of each stage; one sum takes one noise figure.` +
      instead(x, 'As a cascade'),
  ),
  'sides-mixed': entry(
    'warning',
    'Wanted and unwanted quantities are combined oddly',
    'The sums of a budget are levels, ratios of wanted to unwanted, or gains; this one is none of them.',
    (x) =>
      `${f(x, 'terms')} add up to ${f(x, 'net')}${given(x['now'], (now) => ` (now ${now})`)}, which is neither a level, a ratio of wanted to unwanted, nor a gain.` +
      instead(x, 'Probably meant'),
  ),
  'kind-mismatch': entry(
    'warning',
    'The line says it is something else',
    'The kind a line declares steers the checks of all lines that use it.',
    (x) =>
      `${x['asked'] ?? `The line is declared ${f(x, 'declared')}`}, but ${f(x, 'what')} ${x['asked'] === undefined ? 'makes' : 'is'} ${f(x, 'found')}${given(x['now'], (now) => ` (${now})`)}.` +
      instead(x, 'Probably meant'),
  ),
  'decibels-averaged': entry(
    'warning',
    'Decibels are averaged',
    'The mean of decibel figures is the geometric mean of the powers, not the mean power.',
    (x) =>
      `The mean of decibel figures${given(x['now'], (now) => `, ${now},`)} is not the mean power.` +
      instead(x, 'As powers'),
  ),
  'bandwidths-differ': entry(
    'warning',
    'Powers in different bandwidths',
    'Noise powers can be combined or compared only in one bandwidth.',
    (x) =>
      `${f(x, 'first')} is in ${f(x, 'firstBandwidth')} and ${f(x, 'second')} in ${f(x, 'secondBandwidth')}${given(x['now'], (now) => `; the result now is ${now}`)}.` +
      instead(x, 'In one bandwidth'),
  ),
  'figure-below-loss': entry(
    'warning',
    'A noise figure below the loss',
    'A loss at a physical temperature adds the noise of that temperature: its noise figure cannot be less.',
    (x) =>
      `${f(x, 'stage')} has a loss of ${f(x, 'loss')} dB and a noise figure of ${f(x, 'figure')} dB; at ${f(x, 'temperature')} K a loss of that size has ${f(x, 'least')} dB. Leave the noise figure out, or state the temperature.`,
  ),
  'compression-above-intercept': entry(
    'warning',
    'Compression above the intercept',
    'A stage compresses some 10 dB below its third-order intercept; above it the two figures do not fit one another.',
    (x) =>
      `${f(x, 'stage')} has its 1 dB compression at ${f(x, 'compression')} dBm and its third-order intercept at ${f(x, 'intercept')} dBm, both at the output: compression comes first, as a rule some 10 dB below. One of them may be meant for the input.`,
  ),
  'stage-compressed': entry(
    'warning',
    'The stage is driven into compression',
    'Above its compression a stage no longer has the gain that the account counts on.',
    (x) =>
      `${f(x, 'stage')} gets ${f(x, 'level')} dBm and compresses by 1 dB at ${f(x, 'limit')} dBm at its input: ${f(x, 'excess')} dB too much. Take gain off ahead of it, or a stage that bears more.`,
  ),
  'ends-disagree': entry(
    'warning',
    'Stated at both ends, and they disagree',
    'A level at the output is the one at the input with the gain; the one at the input counts.',
    (x) =>
      `${f(x, 'stage')}: the ${f(x, 'what')} is stated as ${f(x, 'output')} dBm, while the one stated at the input makes ${f(x, 'expected')} dBm with its gain. The one at the input counts; leave one of the two out.`,
  ),
  'stage-symbol-repeated': entry(
    'warning',
    'Two stages have this symbol',
    'A stage without a symbol of its own cannot be called.',
    (x) =>
      `Several stages of ${f(x, 'chain')} have the symbol “${f(x, 'name')}”: what they give has no symbol until each has one of its own.`,
  ),
  'interferer-too-strong': entry(
    'warning',
    'The interferer is too strong for this account',
    'Products and lost gain are worked out from intercepts, which hold well below compression only.',
    (x) =>
      `The interferer of ${f(x, 'chain')} is at ${f(x, 'level')} dBm, less than 3 dB below the intercept of ${f(x, 'limit')} dBm that it meets: third-order figures no longer hold, and the gain lost beside it is not given.`,
  ),
  'planes-differ': entry(
    'warning',
    'Figures from two places of a chain',
    'A level or a temperature holds at one place; between two places lies gain.',
    (x) =>
      `${f(x, 'first')} holds ${f(x, 'firstPlane')} and ${f(x, 'second')} ${f(x, 'secondPlane')}: the gain between lies in neither${given(x['now'], (now) => `, and ${now} counts it as none`)}.` +
      instead(x, 'Referred to one place'),
  ),
  'outside-validity': entry(
    'warning',
    'Outside the range of the model',
    'A published model holds within the range its source states.',
    (x) =>
      `${f(x, 'function')} holds for ${f(x, 'range')}; here ${f(x, 'name')} is ${f(x, 'value')}${given(x['now'], (now) => `, and the line gives ${now} all the same`)}.`,
  ),
  'level-without-reference': entry(
    'warning',
    'A level in dB has no reference',
    'A level is a power over a stated reference: dBm, dBW, dBµV.',
    (x) =>
      `The line is a level, but its unit dB names no reference${given(x['now'], (now) => ` (${now})`)}.` +
      instead(x, 'Probably meant'),
  ),
  'constant-hides-unit': entry(
    'warning',
    'A bare number hides a unit',
    'Constants such as 32.44 or −174 hold only for certain units; written with their unit, or as the named function, they can be checked.',
    (x) =>
      `The number ${f(x, 'number')} stands for ${f(x, 'standsFor')}${x['closes'] === undefined ? ', so the sum does not close' : ''}${given(x['now'], (now) => `: ${x['closes'] === undefined ? 'the figures read' : 'the line gives'} ${now}`)}.` +
      instead(x, 'Probably meant'),
  ),
  'field-ratio-in-power-log': entry(
    'warning',
    '10 log of a voltage or field ratio',
    'A ratio of voltages or fields is 20 log10 in decibels; 10 log10 gives half of it.',
    (x) =>
      `${f(x, 'what')} takes 10 log10 of a ratio of two voltages or fields${given(x['now'], (now) => ` and gives ${now}, half the decibels`)}.` +
      instead(x, 'In decibels'),
  ),
  'negative-figure': entry(
    'warning',
    'A noise figure, temperature or bandwidth below its floor',
    'A noise figure is at least 0 dB, a noise temperature at least 0 K and a bandwidth at least 0 Hz.',
    (x) =>
      `The line is a ${f(x, 'kind')} and reads ${f(x, 'now')}; it cannot be below ${f(x, 'floor')}.${instead(x, 'Probably meant')}`,
  ),
  'loss-added': entry(
    'note',
    'A loss is added',
    'A positive loss lowers a level; adding it is right only when a requirement is referred back.',
    (x) =>
      `${f(x, 'loss')} is a loss of ${f(x, 'size')} and enters with +${given(x['now'], (now) => `: ${now}`)}. That is right only when a requirement is referred back.` +
      instead(x, 'Taken off'),
  ),
  'negative-loss': entry(
    'note',
    'A loss below 0 dB',
    'A negative loss is a gain; often its sign was taken from another convention.',
    (x) =>
      `The line is a loss and reads ${f(x, 'now')}: taken off, it would raise the level.` +
      instead(x, 'Probably meant'),
  ),
  'nf-plus-loss': entry(
    'note',
    'Noise figure plus loss',
    'A loss ahead of a receiver adds its decibels to the noise figure only at 290 K.',
    (x) =>
      `${f(x, 'figure')} plus ${f(x, 'loss')}${given(x['now'], (now) => `, ${now},`)} is exact only for a loss at 290 K ahead of the receiver.` +
      instead(x, 'As a cascade'),
  ),
  'figure-on-wanted': entry(
    'note',
    'Noise figure on a wanted level',
    'A noise figure raises noise; the wanted level does not change by it.',
    (x) =>
      `${f(x, 'figure')} is a noise figure and is added to the wanted level ${f(x, 'level')}${given(x['now'], (now) => ` (${now})`)}. It belongs to the noise.${instead(x, 'Without it')}`,
  ),
  'number-as-decibels': entry(
    'note',
    'A bare number counts as decibels',
    'A number without a unit in a decibel sum is taken as dB.',
    (x) =>
      `${f(x, 'number')} has no unit and counts as ${f(x, 'decibels')}${given(x['now'], (now) => ` (${now})`)}.` +
      given(x['repair'], (repair) => ` Write ${repair}.`),
  ),
  cancellation: entry(
    'note',
    'Almost everything cancels',
    'A small difference of large powers carries the errors of both.',
    (x) =>
      `The difference${given(x['now'], (now) => `, ${now},`)} is more than 10 dB below its inputs: small errors in them change it much.`,
  ),
  'noise-not-known': entry(
    'note',
    'An amplifier without a noise figure',
    'What an amplifier adds is not known from its gain.',
    (x) =>
      `${f(x, 'stage')} amplifies and has no noise figure: noise figure, noise and S/N of ${f(x, 'chain')} are not given until it has one.`,
  ),
  'first-stage-weak': entry(
    'note',
    'The first stage does not set the noise figure',
    'With enough gain in front, what follows adds little; here it adds most of the noise.',
    (x) =>
      `In ${f(x, 'chain')} the first stage that is more than a loss makes ${f(x, 'share')} % of the noise from it on; the rest comes from behind it although an amplifier follows. More gain in front would bring the noise figure down.`,
  ),
  'source-temperature': entry(
    'note',
    'Noise figures beside another source temperature',
    'Noise figures are stated for a source at 290 K; with a colder or hotter one S/N falls by another amount.',
    (x) =>
      `The source of ${f(x, 'chain')} is at ${f(x, 'temperature')} K, while its noise figures are stated for 290 K. Noise is carried in temperatures, so that levels and S/N are right; S/N falls by another figure than the noise figure.`,
  ),
  'reference-temperature': entry(
    'note',
    'A noise figure beside another temperature',
    'A noise figure is stated for a source at 290 K; added to noise at another temperature it is not exact.',
    (x) =>
      `${f(x, 'figure')} is a noise figure, stated for a source at 290 K, and is added to noise at ${f(x, 'temperature')}${given(x['now'], (now) => `: ${now}`)}.` +
      instead(x, 'By temperatures'),
  ),
} as const satisfies Record<string, CatalogueEntry>;

export type FindingCode = keyof typeof CATALOGUE;

/** All finding codes, in the catalogue's order. */
export const FINDING_CODES = Object.keys(CATALOGUE) as FindingCode[];
