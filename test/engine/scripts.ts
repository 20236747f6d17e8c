/**
 * Random worksheets and random edits of them, for the tests that compare evaluation edit by edit with evaluation from scratch.
 * Symbols are few, so that lines use one another, clash and loop; entries are of every sort that the checker tells apart.
 */
import fc from 'fast-check';
import * as w from '../../src/worksheet';
import type { Change, Line, LinesSection, Section, Worksheet } from '../../src/worksheet';
import { QUANTITY_KINDS, SIDES } from '../../src/quantity';

export const SYMBOLS = [
  'P',
  'N',
  'I_1',
  'S',
  'SNR',
  'NF',
  'G_1',
  'L_1',
  'B',
  'B_2',
  'T',
  'd',
  'r',
  'x',
  'y',
  '',
] as const;

const UNITS = [
  '',
  'dB',
  'dBm',
  'dBW',
  'dBµV',
  'dBHz',
  'dBm/Hz',
  'dBi',
  'W',
  'mW',
  'K',
  '°C',
  'MHz',
  'dB/km',
  '1',
  'furlong',
] as const;

const LABELS = [
  '',
  'Bandwidth',
  'Cable length',
  'Noise figure',
  'Path loss',
  'Antenna gain',
  'C/N uplink',
  'Noise',
  'Wanted signal',
  'Margin',
] as const;

/** Entries with holes for symbols: `$` is filled with one of them. */
const TEMPLATES = [
  '10 dBm',
  '-100 dBm',
  '3 dB',
  '-2 dB',
  '12 dBi',
  '1 MHz',
  '200 kHz',
  '290 K',
  '17 °C',
  '5 km',
  '0.3 dB/km',
  '2 W',
  '0 W',
  '60 dBµV',
  '-174 dBm/Hz',
  '3',
  '4.5',
  '',
  ' ',
  '-60 dBc',
  '14,5 dBm',
  '20 dBHz',
  '1e3',
  '2 mV',
  '256 kbit/s',
  '2 W + 3 W',
  '$',
  '-$',
  '$ + $',
  '$ - $',
  '$ + $ - $',
  '$ - $ + 3 dB',
  '$ + 3',
  '2*$',
  '3*$ - 2*$',
  '$*$',
  '$/$',
  '$/2',
  '($ + $)/2',
  '$^2',
  'powersum($, $)',
  'powersum($, $, $)',
  'powerdiff($, $)',
  'fieldsum($, $)',
  'ratiosum($, $)',
  'mean($, $)',
  'meanpower($, $)',
  'max($, $)',
  'min($, 3 dB)',
  'db($)',
  'lin($)',
  'lin($)/lin($)',
  '10*log10($)',
  '20*log10($)',
  '10^($/10)',
  'sqrt($)',
  'abs($)',
  'sum($, $)',
  'thermal_noise($, $)',
  'thermal_noise(T_0, $) + $',
  '-174 dBm/Hz + 10*log10($) + $',
  'noise_density($)',
  'noise_temperature($)',
  'cascade_nf($, $, $)',
  'passive_nf($)',
  'free_space_loss($, 868 MHz)',
  'capacity($, $)',
  'if($ > 3 dB, $, $)',
  'if($ > $, 1 dB, $)',
  'rebase($, $, $)',
  '$*$ + $',
  '32.44 + 20*log10($) + 20*log10($)',
  '-174 + 10*log10($)',
  '$ + db($)',
  '$ - db(50 ohm)',
  '10*log10($/1 mW)',
  'interpolate($, 0 dB, 1 dB, 10 dB, 3 dB)',
  'round($, 1)',
  '$ +',
  'P_unknown + 1 dB',
  'powersumm($)',
  '($',
  '1/0',
  'k_B*$*$',
  '$ + $ + $ + $',
  'rx.nf',
  'rx.gain + $',
  'rx.lna.out.signal - rx.noise',
  '$ - rx.noise',
  'powersum(tot, $)',
  'tot + 3 dB',
  'C(12 deg)',
  'C($)',
  'C + 1 dB',
  'pool($; $)',
] as const;

const symbol = fc.constantFrom(...SYMBOLS.filter((name) => name !== ''));

export const entries: fc.Arbitrary<string> = fc
  .tuple(fc.constantFrom(...TEMPLATES), fc.array(symbol, { minLength: 4, maxLength: 4 }))
  .map(([template, names]) => {
    let at = 0;
    return template.replace(/\$/g, () => names[at++ % names.length] ?? 'x');
  });

const optional = <T>(value: fc.Arbitrary<T>, weight = 3): fc.Arbitrary<T | undefined> =>
  fc.oneof({ weight, arbitrary: fc.constant(undefined) }, { weight: 1, arbitrary: value });

interface Draft {
  readonly symbol: string;
  readonly label: string;
  readonly entry: string;
  readonly unit: string | undefined;
  readonly quantity: Line['quantity'];
  readonly side: Line['side'];
  readonly overrides: readonly (string | undefined)[];
  readonly requirement: string | undefined;
}

const drafts: fc.Arbitrary<Draft> = fc.record({
  symbol: fc.constantFrom(...SYMBOLS),
  label: fc.constantFrom(...LABELS),
  entry: entries,
  unit: optional(fc.constantFrom(...UNITS)),
  quantity: optional(fc.constantFrom(...QUANTITY_KINDS), 5),
  side: optional(fc.constantFrom(...SIDES), 5),
  overrides: fc.array(optional(entries, 5), { minLength: 3, maxLength: 3 }),
  requirement: optional(fc.constantFrom('3 dB', '-90 dBm', '10', 'soon'), 6),
});

const CASES = ['clear', 'rain', 'worst'] as const;

function lineOf({ overrides, unit, quantity, side, requirement, ...rest }: Draft, id: string, caseCount: number): Line {
  const byCase = Object.fromEntries(
    CASES.slice(0, caseCount).flatMap((caseId, at) => (overrides[at] === undefined ? [] : [[caseId, overrides[at]]])),
  );
  return {
    id,
    ...rest,
    ...(unit ? { unit } : {}),
    ...(quantity ? { quantity } : {}),
    ...(side ? { side } : {}),
    ...(Object.keys(byCase).length > 0 ? { byCase } : {}),
    ...(requirement ? { requirement: { atLeast: requirement } } : {}),
  };
}

/** What stages and chains are given; their own outputs too, which closes loops. */
const VALUES = [
  '10 dB',
  '-3 dB',
  '2 dB',
  '30 dBm',
  '-10 dBm',
  '100 K',
  '1 MHz',
  'G_1',
  '-L_1',
  'NF',
  'T',
  'rx.gain',
  '',
  '3 +',
] as const;
const value = fc.constantFrom(...VALUES);

const stageValues = fc.dictionary(fc.constantFrom(...w.STAGE_FIELDS), value, { maxKeys: 5, noNullPrototype: true });

/** A chain of up to three stages, a pool and a curve. */
const furtherSections: fc.Arbitrary<readonly Section[]> = fc
  .record({
    stages: fc.array(
      fc.tuple(fc.constantFrom('lna', 'mix', 'amp', ''), stageValues, optional(stageValues), fc.boolean()),
      { maxLength: 3 },
    ),
    inputs: fc.record({ signal: value, noise: value, bandwidth: value, interferer: value }),
    isPower: fc.boolean(),
    pool: fc.array(fc.tuple(drafts, fc.boolean()), { maxLength: 3 }),
    unit: optional(fc.constantFrom(...UNITS)),
    points: fc.uniqueArray(fc.tuple(fc.integer({ min: 0, max: 30 }), fc.integer({ min: -5, max: 5 })), {
      maxLength: 4,
    }),
  })
  .map(({ stages, inputs, isPower, pool, unit, points }) => [
    {
      id: 'ch',
      kind: 'chain',
      symbol: 'rx',
      title: 'Chain',
      ...inputs,
      ...(isPower ? { intercept: 'power' as const } : {}),
      stages: stages.map(([symbol, values, override, off], i) => ({
        id: `st${String(i)}`,
        symbol,
        label: '',
        ...(off ? { off: true } : {}),
        ...values,
        ...(override === undefined ? {} : { byCase: { rain: override } }),
      })),
    },
    {
      id: 'po',
      kind: 'pool',
      symbol: 'tot',
      title: 'Pool',
      ...(unit ? { unit } : {}),
      lines: pool.map(([draft, off], i) => ({ ...lineOf(draft, `p${String(i)}`, 1), ...(off ? { off: true } : {}) })),
    },
    {
      id: 'cu',
      kind: 'curve',
      symbol: 'C',
      title: 'Curve',
      x: { label: 'x', unit: 'deg' },
      y: { label: 'y', unit: 'dB' },
      points,
    },
  ]);

/** Worksheets of one to three cases and up to twelve lines in two sections; half of them with a chain, a pool and a curve. */
export const worksheets: fc.Arbitrary<Worksheet> = fc
  .record({
    caseCount: fc.integer({ min: 1, max: 3 }),
    lines: fc.array(drafts, { minLength: 1, maxLength: 12 }),
    cut: fc.nat(12),
    further: fc.oneof(fc.constant<readonly Section[]>([]), furtherSections),
  })
  .map(({ caseCount, lines, cut, further }) => {
    const all = lines.map((draft, index) => lineOf(draft, `l${String(index)}`, caseCount));
    const section = (id: string, part: readonly Line[]): LinesSection => ({
      id,
      kind: 'lines',
      title: id,
      lines: part,
    });
    return {
      id: 'w',
      title: 'random',
      cases: CASES.slice(0, caseCount).map((id) => ({ id, name: id })),
      sections: [section('a', all.slice(0, cut)), ...further, section('b', all.slice(cut))],
    };
  });

/** What is drawn for one step; which edit it makes depends on the worksheet that it meets. */
export interface Step {
  readonly which: number;
  readonly a: number;
  readonly b: number;
  readonly draft: Draft;
}

export const steps: fc.Arbitrary<Step> = fc.record({
  which: fc.nat(999),
  a: fc.nat(999),
  b: fc.nat(999),
  draft: drafts,
});

/** An id that none of these has. */
function newIdIn(lines: readonly { readonly id: string }[]): string {
  const taken = new Set(lines.map(({ id }) => id));
  let count = 0;
  while (taken.has(`n${String(count)}`)) count++;
  return `n${String(count)}`;
}

/** The changes that a step makes; none where the worksheet has nothing to do it with. */
export function changesOf(worksheet: Worksheet, { which, a, b, draft }: Step): readonly Change[] {
  const lines = w.allLines(worksheet);
  const line = lines[a % Math.max(lines.length, 1)];
  const sections = worksheet.sections.filter(w.isLinesSection);
  const section = sections[b % sections.length];
  const oneCase = worksheet.cases[b % worksheet.cases.length];
  if (section === undefined || oneCase === undefined) return [];
  const newId = newIdIn(lines);
  const insert: Change = {
    kind: 'insert-line',
    sectionId: section.id,
    index: a % (section.lines.length + 1),
    line: lineOf(draft, newId, worksheet.cases.length),
  };
  if (line === undefined) return [insert];
  const set = (change: Omit<Extract<Change, { kind: 'set-line' }>, 'kind' | 'lineId'>): readonly Change[] => [
    { kind: 'set-line', lineId: line.id, ...change } as Change,
  ];
  const choices: readonly (() => readonly Change[])[] = [
    () => set({ field: 'entry', value: draft.entry }),
    () => set({ field: 'entry', value: draft.entry }),
    () => set({ field: 'entry', value: draft.entry }),
    () => set({ field: 'unit', value: draft.unit }),
    () => set({ field: 'symbol', value: draft.symbol }),
    () => set({ field: 'label', value: draft.label }),
    () => set({ field: 'quantity', value: draft.quantity }),
    () => set({ field: 'side', value: draft.side }),
    () =>
      set({ field: 'requirement', value: draft.requirement === undefined ? undefined : { atMost: draft.requirement } }),
    () => set({ field: 'note', value: 'noted' }),
    () => set({ field: 'accepted', value: [{ code: 'loss-added', entry: line.entry, reason: 'so it is' }] }),
    () => [insert],
    () => [insert],
    () => [{ kind: 'remove-line', lineId: line.id }],
    () => w.moveLinesTo(worksheet, [line.id], { sectionId: section.id, index: b % (section.lines.length + 1) }).changes,
    () => w.setEntry(worksheet, line.id, draft.entry, oneCase.id).changes,
    () => w.setEntry(worksheet, line.id, draft.entry, oneCase.id).changes,
    () =>
      line.byCase === undefined ? [] : w.removeOverride(worksheet, line.id, Object.keys(line.byCase)[0] ?? '').changes,
    () =>
      worksheet.cases.length < 4
        ? w.addCase(worksheet, `case ${newId}`, a % 2 === 0 ? oneCase.id : undefined).changes
        : [],
    () => (worksheet.cases.length > 1 ? w.removeCase(worksheet, oneCase.id).changes : []),
    () => w.renameCase(worksheet, oneCase.id, `case ${newId}`).changes,
    () => w.duplicateLines(worksheet, [line.id]).changes,
    () => (sections.length > 1 ? [{ kind: 'remove-section', sectionId: section.id }] : []),
    () => w.insertSection(worksheet, 0, 'new').changes,
    () => [...set({ field: 'entry', value: draft.entry }), ...set({ field: 'unit', value: draft.unit })],
    () =>
      draft.symbol === '' || w.isTakenByAnother(worksheet, draft.symbol, line.id)
        ? []
        : w.setSymbol(worksheet, line.id, draft.symbol).changes,
  ];
  const chain = worksheet.sections.find(w.isChainSection);
  const stage = chain?.stages[a % Math.max(chain.stages.length, 1)];
  const field = w.STAGE_FIELDS[b % w.STAGE_FIELDS.length] ?? 'gain';
  const typed = VALUES[which % VALUES.length] ?? '';
  const onChain: readonly (() => readonly Change[])[] =
    chain === undefined
      ? []
      : [
          () =>
            w.insertStage(worksheet, chain.id, b % 3, {
              id: newIdIn(chain.stages),
              symbol: 'new',
              label: '',
              gain: typed,
              noiseFigure: '2 dB',
            }).changes,
          () => w.setChainInput(worksheet, chain.id, w.CHAIN_INPUTS[b % 4] ?? 'noise', typed).changes,
          () => w.setInterceptAddition(worksheet, chain.id, a % 2 === 0 ? 'power' : 'coherent').changes,
          () => w.setSectionSymbol(worksheet, chain.id, 'front').changes,
          ...(stage === undefined
            ? []
            : [
                (): readonly Change[] => w.setStageValue(worksheet, chain.id, stage.id, field, typed).changes,
                (): readonly Change[] =>
                  w.setStageValue(worksheet, chain.id, stage.id, field, typed, oneCase.id).changes,
                (): readonly Change[] => w.setStageOff(worksheet, chain.id, stage.id, stage.off !== true).changes,
                (): readonly Change[] => w.moveStageTo(worksheet, chain.id, stage.id, b % 3).changes,
                (): readonly Change[] => w.deleteStage(worksheet, chain.id, stage.id).changes,
                (): readonly Change[] => w.setStageSymbol(worksheet, chain.id, stage.id, 'first').changes,
              ]),
        ];
  const curve = worksheet.sections.find(w.isCurveSection);
  const onCurve: readonly (() => readonly Change[])[] =
    curve === undefined
      ? []
      : [
          () =>
            w.setPoints(worksheet, curve.id, [
              [0, a % 7],
              [b % 40, 3],
            ]).changes,
          () => w.setCurveField(worksheet, curve.id, 'interpolation', 'monotone').changes,
          () => w.setCurveField(worksheet, curve.id, 'y', { label: 'y', unit: a % 2 === 0 ? 'dBi' : 'K' }).changes,
        ];
  const onPool: readonly (() => readonly Change[])[] = worksheet.sections.some(w.isPoolSection)
    ? [() => set({ field: 'off', value: line.off === true ? undefined : true })]
    : [];
  const all = [...choices, ...onChain, ...onCurve, ...onPool];
  return all[which % all.length]?.() ?? [];
}
