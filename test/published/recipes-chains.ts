/**
 * The records that are cascades, put into chain sections, stage by stage as they are printed; and combinations of ratios, levels
 * and temperatures, put into pools. Lines behind the sections give each figure of the record under its key.
 */
import type { ChainSection, Line, PoolSection, Section, Stage } from '../../src/worksheet';
import { number, numbers, type PublishedRecord } from './records';

type Inputs = PublishedRecord['inputs'];

export interface ChainRecipe {
  readonly ids: RegExp;
  readonly sections: (inputs: Inputs) => readonly Section[];
  /** In the notation of test/engine/notation.ts, each checked figure under its key. */
  readonly lines: (inputs: Inputs) => string;
  /** Codes of the warnings that the record deserves; none for all others. */
  readonly warns?: readonly string[];
}

interface PrintedStage {
  readonly name: string;
  readonly G_dB?: number;
  readonly NF_dB?: number | string;
  readonly Te_K?: number;
  readonly T_K?: number;
  readonly IIP3_dBm?: number;
  readonly OIP3_dBm?: number;
  readonly IP1dB_dBm?: number;
  readonly OP1dB_dBm?: number;
  readonly loss_dB?: number;
  readonly T_p_K?: number;
}

const printed = (inputs: Inputs): readonly PrintedStage[] => inputs['stages'] as readonly PrintedStage[];

const said = (field: keyof Stage, figure: number | undefined, unit: string): Partial<Stage> =>
  figure === undefined ? {} : { [field]: `${figure} ${unit}` };

/** A printed stage; a loss is a gain below 0 dB. Where no gain is printed there is none to count: the stage is the last. */
function stageOf(of: PrintedStage, index: number): Stage {
  return {
    id: `s${String(index)}`,
    symbol: `s${String(index)}`,
    label: of.name,
    ...said('gain', of.loss_dB === undefined ? (of.G_dB ?? 0) : -of.loss_dB, 'dB'),
    ...(typeof of.NF_dB === 'number' ? said('noiseFigure', of.NF_dB, 'dB') : {}),
    ...(of.Te_K === undefined ? {} : { noiseFigure: `noise_figure(${of.Te_K} K)` }),
    ...said('outputIntercept', of.OIP3_dBm, 'dBm'),
    ...said('inputIntercept', of.IIP3_dBm, 'dBm'),
    ...said('outputCompression', of.OP1dB_dBm, 'dBm'),
    ...said('inputCompression', of.IP1dB_dBm, 'dBm'),
    ...said('temperature', of.T_p_K, 'K'),
  };
}

const chain = (stages: readonly Stage[], surroundings: Partial<ChainSection> = {}): ChainSection => ({
  id: 'rx',
  kind: 'chain',
  symbol: 'rx',
  title: 'Receiver',
  ...surroundings,
  stages,
});

const printedChain = (inputs: Inputs, surroundings: Partial<ChainSection> = {}): readonly Section[] => [
  chain(printed(inputs).map(stageOf), surroundings),
];

const source = (inputs: Inputs, key = 'T_A_K'): string => `${number(inputs, key)} K`;
const bandwidth = (inputs: Inputs): string => `${number(inputs, 'B_Hz')} Hz`;

const pool = (entries: readonly string[], line: Partial<Line> = {}): readonly Section[] => [
  {
    id: 'p',
    kind: 'pool',
    symbol: 'total',
    title: 'Total',
    lines: entries.map((entry, i) => ({ id: `p${String(i)}`, symbol: '', label: `term ${String(i)}`, entry, ...line })),
  } satisfies PoolSection,
];

const inDecibels = (inputs: Inputs, keys: readonly string[]): readonly string[] =>
  keys.map((key) => `${number(inputs, key)} dB`);

export const CHAIN_RECIPES: readonly ChainRecipe[] = [
  {
    ids: /^lossy-/,
    sections: (i) => [chain([stageOf({ name: 'line', loss_dB: number(i, 'loss_dB'), T_p_K: number(i, 'T_p_K') }, 0)])],
    lines: () => `NF_dB_290 = rx.nf
                  Te_input_K = rx.te
                  noise_at_output_K = rx.te*lin(rx.gain)`,
  },
  {
    ids: /^roddy-p12.18$/,
    sections: (i) => [
      chain(
        [
          stageOf({ name: 'feeder', loss_dB: number(i, 'feeder_loss_dB'), T_p_K: number(i, 'feeder_T_K') }, 0),
          stageOf({ name: 'amplifier', Te_K: number(i, 'T_LNA_K') }, 1),
        ],
        { noise: source(i, 'T_ant_K') },
      ),
    ],
    lines: () => `Ts_feeder_input_K = rx.tsys
                  Ts_LNA_input_K = rx.tsys*lin(rx.s0.out.gain)`,
  },
  {
    ids: /^cas-marco-up-/,
    sections: (i) => printedChain(i, { noise: source(i, 'T_ant_K') }),
    // The table refers everything to the input of the receiver, behind the cable.
    lines: (i) => `circuit_K = rx.s0.te*lin(rx.s0.out.gain)
                   antenna_K = ${source(i, 'T_ant_K')}*lin(rx.s0.out.gain)
                   receiver_K = rx.s1.te
                   T_sys_K = rx.tsys*lin(rx.s0.out.gain)`,
  },
  {
    ids: /^cas-marco-uhf$/,
    sections: (i) => printedChain(i, { noise: source(i, 'T_ant_K') }),
    // The table adds the cable's noise at the antenna to the receiver's own at the receiver: a warning is due.
    lines: (i) => `circuit_K = rx.s0.te
                   receiver_K = rx.s1.te
                   T_sys_K = ${source(i, 'T_ant_K')} + rx.s0.te + rx.s1.te`,
    warns: ['planes-differ'],
  },
  {
    ids: /^cas-pozar-10.2$/,
    sections: (i) => printedChain(i, { noise: source(i), bandwidth: bandwidth(i) }),
    lines: (i) => `NF_dB = rx.nf
                   F = lin(rx.nf)
                   Te_K = rx.te
                   G_lin = lin(rx.gain)
                   No_dBm = rx.noise
                   Si_min_dBm = rx.mds + ${number(i, 'SNR_out_dB')} dB
                   Vi_uV | µV = sqrt(lin(Si_min_dBm)*${number(i, 'Z_ohm')} ohm)`,
  },
  {
    ids: /^cas-pozar-10.5$/,
    sections: (i) => printedChain(i, { noise: source(i), bandwidth: bandwidth(i) }),
    // Its dynamic ranges begin at a signal that is above the noise by the ratio asked for.
    lines: (i) => `No_dBm = rx.noise
                   LDR_dB = rx.s0.op1db - rx.noise
                   SFDR_dB = rx.sfdr - ${number(i, 'SNR_out_dB')} dB`,
  },
  {
    ids: /^cas-pozar-p-dynrange$/,
    sections: (i) =>
      printedChain(i, {
        noise: `lin(${number(i, 'Ni_dBm')} dBm)/(k_B*${bandwidth(i)})`,
        bandwidth: bandwidth(i),
      }),
    lines: (i) => `No_dBm = rx.noise
                   LDR_dB = rx.s0.op1db - rx.noise
                   SFDR_dB = rx.sfdr - ${number(i, 'SNR_out_dB')} dB`,
  },
  {
    ids: /^cas-pozar-ip3$/,
    sections: (i) => printedChain(i),
    lines: () => `OIP3_dBm = rx.oip3
                  OIP3_mW | mW = rx.oip3`,
  },
  {
    ids: /^cas-pozar-yfactor$/,
    sections: (i) => [
      chain([{ ...stageOf(printed(i)[0] ?? { name: '' }, 0), noiseFigure: 'noise_figure(Te_K)' }], {
        noise: '450 K',
        bandwidth: '1 GHz',
      }),
    ],
    lines: () => `Y = lin(-62.0 dBm - (-64.7 dBm))
                  Te_K = (290 K - Y*77 K)/(Y - 1)
                  Nout_dBm = rx.noise`,
  },
  {
    ids: /^cas-pozar-radio$/,
    // The book takes the amplifier's 3 dB as the factor 2, which is 290 K.
    sections: (i) => [
      chain(
        printed(i)
          .slice(1)
          .map(stageOf)
          .map((one) => (one.noiseFigure === '3 dB' ? { ...one, noiseFigure: 'noise_figure(290 K)' } : one)),
        { signal: '-80 dBm', noise: 'T_A_K', bandwidth: '75 kHz' },
      ),
    ],
    lines: () => `T_A_K = 0.9*200 K + (1 - 0.9)*300 K
                  T_TL_K = rx.s0.te
                  T_REC_K = (rx.te - rx.s0.te)*lin(rx.s0.out.gain)
                  T_SYS_K = rx.tsys
                  Ni_dBm = rx.mds
                  SNR_dB = rx.snr`,
  },
  {
    ids: /^cas-roddy-12.7$/,
    sections: (i) => printedChain(i, { noise: source(i, 'T_ant_K') }),
    lines: () => 'Ts_K = rx.tsys',
  },
  { ids: /^cas-roddy-12.6$/, sections: (i) => printedChain(i), lines: () => 'Te_total_K = rx.te' },
  {
    ids: /^cas-pratt-4.4-gm0$/,
    sections: (i) => [chain(printed(i).slice(1).map(stageOf), { noise: `${String(printed(i)[0]?.T_K)} K` })],
    lines: () => 'Ts_K = rx.tsys',
  },
  {
    ids: /^cas-pratt-4.5$/,
    sections: (i) => printedChain(i, { noise: source(i, 'T_ant_K') }),
    lines: (i) => `T_wg_K = rx.s0.te*lin(rx.s0.out.gain)
                   T_ant_at_LNA_K = ${source(i, 'T_ant_K')}*lin(rx.s0.out.gain)
                   Ts_LNA_input_K = rx.tsys*lin(rx.s0.out.gain)`,
  },
  {
    ids: /^cas-sklar-5.4[ab]$/,
    sections: (i) => printedChain(i, { signal: `${number(i, 'S_W')} W`, noise: source(i), bandwidth: bandwidth(i) }),
    lines: () => `T_R_K = rx.te
                  T_S_K = rx.tsys
                  NF_dB = rx.nf
                  F = lin(rx.nf)
                  SNR_out_dB = rx.snr`,
  },
  {
    ids: /^cas-balanis-2.16$/,
    sections: (i) => printedChain(i, { noise: `${source(i)} + T_AP_K` }),
    lines: (i) => `T_AP_K = ${printed(i)[0]?.T_p_K} K*(1/${number(i, 'eff')} - 1)
                   T_a_K = rx.tsys*lin(rx.gain)`,
  },
  {
    ids: /^cas-inverse-firststage$/,
    // What the stages behind the first leave of the noise is the first one's.
    sections: (i) => [
      chain(printed(i).slice(1).map(stageOf), { id: 'rest', symbol: 'rest' }),
      chain([
        { ...stageOf(printed(i)[0] ?? { name: '' }, 0), noiseFigure: 'NF1_max_dB' },
        ...printed(i)
          .slice(1)
          .map((one, at) => stageOf(one, at + 1)),
      ]),
    ],
    lines: (i) => `NF1_max_dB | dB = noise_figure(${number(i, 'Te_max_K')} K - rest.te/lin(${printed(i)[0]?.G_dB} dB))
                   all = rx.te`,
  },
  {
    ids: /^cas-oip3-amp-filter-amp$/,
    sections: (i) => printedChain(i),
    lines: () => `OIP3_dBm = rx.oip3
                  OIP3_mW | mW = rx.oip3
                  G_dB = rx.gain`,
  },
  {
    ids: /^cas-nf-T300$/,
    sections: (i) => printedChain(i),
    lines: () => `F = lin(rx.nf)
                  Te_300_K = 300 K*(lin(rx.nf) - 1)`,
  },
  {
    ids: /^cas-full-/,
    sections: (i) => printedChain(i, { noise: source(i), bandwidth: bandwidth(i) }),
    lines: () => `NF_dB = rx.nf
                  Te_K = rx.te
                  G_dB = rx.gain
                  noise_floor_in_dBm = rx.mds
                  IIP3_dBm = rx.iip3
                  OIP3_dBm = rx.oip3
                  SFDR3_dB = rx.sfdr
                  IP1dB_dBm = rx.ip1db
                  // The record refers to the output by the gain that a weak signal has.
                  OP1dB_dBm_approx = rx.ip1db + rx.gain`,
  },
  {
    ids: /^cn-(roddy-12.20|roddy-p12.36|pratt-20-20-24)$/,
    sections: (i) => pool(inDecibels(i, ['up_dB', 'down_dB', 'intermod_dB']), { quantity: 'signal ratio' }),
    lines: () => 'combined_dB = total',
  },
  {
    ids: /^cn-pratt-20-20$/,
    sections: (i) => pool(inDecibels(i, ['up_dB', 'down_dB']), { quantity: 'signal ratio' }),
    lines: () => 'combined_dB = total',
  },
  {
    ids: /^cn-fcc-/,
    sections: (i) => pool(inDecibels(i, ['EbN0_dB', 'EbI0_dB']), { quantity: 'signal ratio' }),
    lines: () => 'combined_dB = total',
  },
  {
    ids: /^cn-comb-/,
    sections: (i) =>
      pool(
        numbers(i, 'terms_dB').map((term) => `${term} dB`),
        { quantity: 'signal ratio' },
      ),
    lines: () => 'combined_dB = total',
  },
  {
    ids: /^in-rise-/,
    sections: (i) => pool(['-100 dBm', `${-100 + number(i, 'IN_dB')} dBm`]),
    lines: (i) => `rise_dB = total - (-100 dBm)
                   deltaT_over_T_percent | % = lin(${-100 + number(i, 'IN_dB')} dBm - (-100 dBm))`,
  },
  {
    ids: /^rain-roddy-12.16$/,
    sections: (i) => pool([`${number(i, 'Ts_K')} K`, 'T_rain_K'], { quantity: 'temperature' }),
    lines: (i) => `A = ${number(i, 'A_dB')} dB
                   T_rain_K = ${number(i, 'Ta_K')} K*(1 - 1/lin(A))
                   Ts_new_K = total
                   noise_increase_dB = db(total/${number(i, 'Ts_K')} K)
                   CN_faded_dB = ${number(i, 'CN_clear_dB')} dB - A - noise_increase_dB`,
  },
];
