/** Cascades: by cascade_nf where stages have noise figures, by temperatures and intercepts written out where they do not. */
import { number, type Recipe } from './records';

interface Stage {
  readonly G_dB?: number;
  readonly NF_dB?: number;
  readonly Te_K?: number;
  readonly T_K?: number;
  readonly IIP3_dBm?: number;
  readonly OIP3_dBm?: number;
  readonly IP1dB_dBm?: number;
  readonly OP1dB_dBm?: number;
  readonly loss_dB?: number;
  readonly T_p_K?: number;
}

const stagesOf = (inputs: Readonly<Record<string, unknown>>): readonly Stage[] => inputs['stages'] as readonly Stage[];

/** `NF_0 | dB`, `G_0 | dB` … one pair of lines a stage. */
const declared = (stages: readonly Stage[]): string =>
  stages
    .map(
      ({ NF_dB = 0, G_dB = 0 }, at) => `NF_${at} | dB | noise figure = ${NF_dB} dB\nG_${at} | dB | gain = ${G_dB} dB`,
    )
    .join('\n');

const cascade = (stages: readonly Stage[]): string =>
  `cascade_nf(${stages.map((_, at) => `NF_${at}, G_${at}`).join(', ')})`;

const gainAhead = (at: number): string =>
  at === 0 ? '' : `*lin(${Array.from({ length: at }, (_, index) => `G_${index}`).join(' + ')})`;

/** 1/P of the input intercept: contributions in phase, each with the gain ahead of it. */
const intercept = (stages: readonly Stage[], point: (stage: Stage) => number | undefined): string =>
  stages
    .flatMap((stage, at) => {
      const dBm = point(stage);
      return dBm === undefined ? [] : [`1${gainAhead(at)}/lin(${dBm} dBm)`];
    })
    .join(' + ');

export const CASCADE_RECIPES: readonly Recipe[] = [
  {
    ids: /^lossy-/,
    lines: (i) => `L = ${number(i, 'loss_dB')} dB
                   NF_dB_290 = passive_nf(L, ${number(i, 'T_p_K')} K)
                   Te_input_K = noise_temperature(NF_dB_290)
                   noise_at_output_K = ${number(i, 'T_p_K')} K*(1 - 1/lin(L))`,
  },
  {
    ids: /^roddy-p12.18$/,
    lines: (i) => `L = ${number(i, 'feeder_loss_dB')} dB
                   T_L = noise_temperature(passive_nf(L, ${number(i, 'feeder_T_K')} K))
                   Ts_feeder_input_K = ${number(i, 'T_ant_K')} K + T_L + lin(L)*${number(i, 'T_LNA_K')} K
                   Ts_LNA_input_K = Ts_feeder_input_K/lin(L)`,
  },
  {
    ids: /^cas-marco-up-/,
    lines: (i) => {
      const [cable, receiver] = stagesOf(i);
      return `L = ${cable?.loss_dB} dB
              circuit_K = ${cable?.T_p_K} K*(1 - 1/lin(L))
              antenna_K = ${number(i, 'T_ant_K')} K/lin(L)
              receiver_K = noise_temperature(${receiver?.NF_dB} dB)
              T_sys_K = circuit_K + antenna_K + receiver_K`;
    },
  },
  {
    ids: /^cas-marco-uhf$/,
    lines: (i) => {
      const [cable, receiver] = stagesOf(i);
      return `circuit_K = ${cable?.T_p_K} K*(lin(${cable?.loss_dB} dB) - 1)
              receiver_K = noise_temperature(${receiver?.NF_dB} dB)
              T_sys_K = circuit_K + ${number(i, 'T_ant_K')} K + receiver_K`;
    },
  },
  {
    ids: /^cas-pozar-10.2$/,
    lines: (i) => `${declared(stagesOf(i))}
                   NF_dB = ${cascade(stagesOf(i))}
                   F = lin(NF_dB)
                   Te_K = noise_temperature(NF_dB)
                   G = G_0 + G_1 + G_2
                   G_lin = lin(G)
                   No_dBm = thermal_noise(${number(i, 'T_A_K')} K + Te_K, ${number(i, 'B_Hz')} Hz) + G
                   Si_min_dBm | dBm = No_dBm + ${number(i, 'SNR_out_dB')} dB - G
                   Vi_uV | µV = sqrt(lin(Si_min_dBm)*${number(i, 'Z_ohm')} ohm)`,
  },
  {
    ids: /^cas-pozar-10.5$/,
    lines: (i) => {
      const [receiver] = stagesOf(i);
      return `No_dBm = thermal_noise(${number(i, 'T_A_K')} K + noise_temperature(${receiver?.NF_dB} dB), ${number(i, 'B_Hz')} Hz) + ${receiver?.G_dB} dB
              LDR_dB = ${receiver?.OP1dB_dBm} dBm - No_dBm
              SFDR_dB = 2/3*(${receiver?.OIP3_dBm} dBm - No_dBm) - ${number(i, 'SNR_out_dB')} dB`;
    },
  },
  {
    ids: /^cas-pozar-p-dynrange$/,
    lines: (i) => {
      const [receiver] = stagesOf(i);
      return `T_e = noise_temperature(${receiver?.NF_dB} dB)
              No_dBm = powersum(${number(i, 'Ni_dBm')} dBm, thermal_noise(T_e, ${number(i, 'B_Hz')} Hz)) + ${receiver?.G_dB} dB
              LDR_dB = ${receiver?.OP1dB_dBm} dBm - No_dBm
              SFDR_dB = 2/3*(${receiver?.OIP3_dBm} dBm - No_dBm) - ${number(i, 'SNR_out_dB')} dB`;
    },
  },
  {
    ids: /^cas-pozar-ip3$/,
    lines: (i) => {
      const [lna, mixer] = stagesOf(i);
      return `OIP3_mW | mW = 1/(1/lin(${lna?.OIP3_dBm} dBm + ${mixer?.G_dB} dB) + 1/lin(${mixer?.IIP3_dBm} dBm + ${mixer?.G_dB} dB))
              OIP3_dBm | dBm = OIP3_mW`;
    },
  },
  {
    ids: /^cas-pozar-yfactor$/,
    lines: (i) => `P_hot = -62.0 dBm
                   P_cold = -64.7 dBm
                   Y = lin(P_hot - P_cold)
                   Te_K = (290 K - Y*77 K)/(Y - 1)
                   Nout_dBm = thermal_noise(450 K + Te_K, 1 GHz) + ${stagesOf(i)[0]?.G_dB} dB`,
  },
  {
    ids: /^cas-pozar-radio$/,
    // The book takes the amplifier's 3 dB as the factor 2.
    lines: () => `T_REC_K = noise_temperature(cascade_nf(db(2), 20 dB, 7 dB, -6 dB, 1.1 dB))
                  T_TL_K = 300 K*(lin(1.5 dB) - 1)
                  T_A_K = 0.9*200 K + (1 - 0.9)*300 K
                  T_SYS_K = T_A_K + T_TL_K + lin(1.5 dB)*T_REC_K
                  Ni_dBm = thermal_noise(T_SYS_K, 75 kHz)
                  SNR_dB = -80 dBm - Ni_dBm`,
  },
  {
    ids: /^cas-roddy-12.7$/,
    lines: (i) => {
      const [lna, cable, receiver] = stagesOf(i);
      return `NF_rest = cascade_nf(passive_nf(${cable?.loss_dB} dB, ${cable?.T_p_K} K), -${cable?.loss_dB} dB, ${receiver?.NF_dB} dB)
              Ts_K = ${number(i, 'T_ant_K')} K + ${lna?.Te_K} K + noise_temperature(NF_rest)/lin(${lna?.G_dB} dB)`;
    },
  },
  {
    ids: /^cas-roddy-12.6$/,
    lines: (i) => {
      const [lna, receiver] = stagesOf(i);
      return `Te_total_K = noise_temperature(cascade_nf(noise_figure(${lna?.Te_K} K), ${lna?.G_dB} dB, ${receiver?.NF_dB} dB))`;
    },
  },
  {
    ids: /^cas-pratt-4.4-gm0$/,
    lines: (i) => {
      const [antenna, rf, mixer, ifStage] = stagesOf(i);
      return `Ts_K = ${antenna?.T_K} K + ${rf?.Te_K} K + ${mixer?.Te_K} K/lin(${rf?.G_dB} dB) + ${ifStage?.Te_K} K/lin(${rf?.G_dB} dB + ${mixer?.G_dB} dB)`;
    },
  },
  {
    ids: /^cas-pratt-4.5$/,
    lines: (i) => {
      const [guide, rf, mixer, ifStage] = stagesOf(i);
      return `T_wg_K = ${guide?.T_p_K} K*(1 - 1/lin(${guide?.loss_dB} dB))
              T_ant_at_LNA_K = ${number(i, 'T_ant_K')} K/lin(${guide?.loss_dB} dB)
              Ts_LNA_input_K = T_wg_K + T_ant_at_LNA_K + ${rf?.Te_K} K + ${mixer?.Te_K} K/lin(${rf?.G_dB} dB) + ${ifStage?.Te_K} K/lin(${rf?.G_dB} dB + ${mixer?.G_dB} dB)`;
    },
  },
  {
    ids: /^cas-sklar-5.4a$/,
    lines: (i) => `T_R_K = noise_temperature(${stagesOf(i)[0]?.NF_dB} dB)
                   T_S_K = ${number(i, 'T_A_K')} K + T_R_K
                   SNR_out_dB = db(${number(i, 'S_W')} W) - thermal_noise(T_S_K, ${number(i, 'B_Hz')} Hz)`,
  },
  {
    ids: /^cas-sklar-5.4b$/,
    lines: (i) => `${declared(stagesOf(i))}
                   NF_dB = ${cascade(stagesOf(i))}
                   F = lin(NF_dB)
                   SNR_out_dB = db(${number(i, 'S_W')} W) - thermal_noise(${number(i, 'T_A_K')} K + noise_temperature(NF_dB), ${number(i, 'B_Hz')} Hz)`,
  },
  {
    ids: /^cas-balanis-2.16$/,
    lines: (i) => {
      const [guide] = stagesOf(i);
      return `T_AP_K = ${guide?.T_p_K} K*(1/${number(i, 'eff')} - 1)
              T_a_K = (${number(i, 'T_A_K')} K + T_AP_K)/lin(${guide?.loss_dB} dB) + ${guide?.T_p_K} K*(1 - 1/lin(${guide?.loss_dB} dB))`;
    },
  },
  {
    ids: /^cas-inverse-firststage$/,
    lines: (i) => {
      const [first, second, third] = stagesOf(i);
      return `F = lin(noise_figure(${number(i, 'Te_max_K')} K))
              F_1 = F - (lin(${second?.NF_dB} dB) - 1)/lin(${first?.G_dB} dB) - (lin(${third?.NF_dB} dB) - 1)/lin(${first?.G_dB} dB + ${second?.G_dB} dB)
              NF1_max_dB = db(F_1)`;
    },
  },
  {
    ids: /^cas-oip3-amp-filter-amp$/,
    lines: (i) => {
      const [first, filter, last] = stagesOf(i);
      return `G_rest = ${filter?.G_dB} dB + ${last?.G_dB} dB
              OIP3_mW | mW = 1/(1/lin(${first?.OIP3_dBm} dBm + G_rest) + 1/lin(${last?.OIP3_dBm} dBm))
              OIP3_dBm | dBm = OIP3_mW
              G_dB = ${first?.G_dB} dB + G_rest`;
    },
  },
  {
    ids: /^cas-nf-T300$/,
    lines: (i) => `F = lin(${stagesOf(i)[0]?.NF_dB} dB)
                   Te_300_K = 300 K*(F - 1)`,
  },
  {
    ids: /^cas-full-/,
    lines: (i) => {
      const stages = stagesOf(i);
      return `${declared(stages)}
              NF_dB = ${cascade(stages)}
              Te_K = noise_temperature(NF_dB)
              G_dB = ${stages.map((_, at) => `G_${at}`).join(' + ')}
              noise_floor_in_dBm = thermal_noise(${number(i, 'T_A_K')} K + Te_K, ${number(i, 'B_Hz')} Hz)
              IIP3_dBm | dBm = 1/(${intercept(stages, ({ IIP3_dBm }) => IIP3_dBm)})
              OIP3_dBm = IIP3_dBm + G_dB
              SFDR3_dB = 2/3*(IIP3_dBm - noise_floor_in_dBm)
              IP1dB_dBm | dBm = 1/(${intercept(stages, ({ IP1dB_dBm }) => IP1dB_dBm)})
              OP1dB_dBm_approx = IP1dB_dBm + G_dB`;
    },
  },
];
