/** Constants, noise temperature and figure, combination of ratios, noise rise, and the sums behind published sensitivities. */
import { number, numbers, quantity, type Recipe } from './records';

const TABLE = 'a limit stated by the standard, not a result';

/** kT₀B + NF + SNR and what else a sensitivity holds. */
const sensitivity = (key: string, hertz: number, ...terms: readonly string[]): string =>
  `${key} = thermal_noise(T_0, ${hertz} Hz) + ${terms.join(' + ')}`;

export const NOISE_RECIPES: readonly Recipe[] = [
  { ids: /^const-k$/, lines: () => 'k_J_per_K = k_B', without: { exact: 'a statement' } },
  { ids: /^const-c$/, lines: () => 'c_m_per_s = c_0', without: { exact: 'a statement' } },
  { ids: /^const-T0$/, lines: () => 'T0_K = T_0' },
  {
    ids: /^const-k-dB$/,
    lines: () => `k_dBW_per_K_Hz | dBW/K/Hz = db(k_B)
                  k_dBm_per_K_Hz | dBm/K/Hz = k_B`,
  },
  {
    ids: /^const-kT0$/,
    lines: (i) => `kT0_W_per_Hz | W/Hz = k_B*${number(i, 'T_K')} K
                   kT0_dBW_per_Hz | dBW/Hz = k_B*T_0
                   kT0_dBm_per_Hz = noise_density(${number(i, 'T_K')} K)`,
  },
  { ids: /^const-kT-/, lines: (i) => `N0_dBm_per_Hz = noise_density(${number(i, 'T_K')} K)` },
  {
    ids: /^kTB-/,
    lines: (i) => `N_dBm = thermal_noise(${number(i, 'T_K')} K, ${number(i, 'B_Hz')} Hz)
                   N_dBW | dBW = k_B*${number(i, 'T_K')} K*${number(i, 'B_Hz')} Hz`,
  },
  { ids: /^(lte-15kHz-noise$|prose-kTB-)/, lines: (i) => `N_dBm = thermal_noise(T_0, ${number(i, 'B_Hz')} Hz)` },
  {
    ids: /^nf2t-(\d|roddy)/,
    lines: (i) => `NF = ${number(i, 'NF_dB')} dB
                   F = lin(NF)
                   Te_K = noise_temperature(NF)`,
  },
  { ids: /^nf2t-marco/, lines: (i) => `Te_K = noise_temperature(${number(i, 'NF_dB')} dB)` },
  {
    ids: /^nf2t-rfcafe/,
    lines: (i) =>
      numbers(i, 'NF_dB')
        .map((figure, at) => `Te_K_${at} = noise_temperature(${figure} dB)`)
        .join('\n'),
  },
  { ids: /^t2nf-/, lines: (i) => `NF_dB = noise_figure(${number(i, 'Te_K')} K)` },
  {
    ids: /^cn-(roddy-12.19|emwin)$/,
    lines: (i) => `CN0_up | dBHz = ${number(i, 'up_dBHz')} dBHz
                   CN0_down | dBHz = ${number(i, 'down_dBHz')} dBHz
                   combined_dBHz = ratiosum(CN0_up, CN0_down)`,
  },
  {
    ids: /^cn-(roddy-12.20|roddy-p12.36|pratt-20-20-24)$/,
    lines: (i) => `CN_up = ${number(i, 'up_dB')} dB
                   CN_down = ${number(i, 'down_dB')} dB
                   CN_im = ${number(i, 'intermod_dB')} dB
                   combined_dB = ratiosum(CN_up, CN_down, CN_im)`,
  },
  {
    ids: /^cn-pratt-20-20$/,
    lines: (i) => `combined_dB = ratiosum(${number(i, 'up_dB')} dB, ${number(i, 'down_dB')} dB)`,
  },
  { ids: /^cn-fcc-/, lines: (i) => `combined_dB = ratiosum(${number(i, 'EbN0_dB')} dB, ${number(i, 'EbI0_dB')} dB)` },
  {
    ids: /^cn-roddy-p12.35$/,
    lines: (i) => {
      const hop = (name: string, key: string): string => {
        const part = i[name] as Readonly<Record<string, number>>;
        return `${key} = ${part['EIRP']} dBW + ${part['GT']} dB/K - ${part['FSL']} dB - ${part['RFL']} dB - ${part['AA']} dB - ${part['AML']} dB + 228.6 dB(K·Hz/W)`;
      };
      return `${hop('up', 'up_dBHz')}
              ${hop('down', 'down_dBHz')}
              combined_dBHz = ratiosum(up_dBHz, down_dBHz)`;
    },
  },
  {
    ids: /^cn-comb-/,
    lines: (i) =>
      `combined_dB = ratiosum(${numbers(i, 'terms_dB')
        .map((term) => `${term} dB`)
        .join(', ')})`,
  },
  {
    ids: /^rain-roddy-12.16$/,
    lines: (i) => `A = ${number(i, 'A_dB')} dB
                   T_rain_K = ${number(i, 'Ta_K')} K*(1 - 1/lin(A))
                   Ts_new_K = ${number(i, 'Ts_K')} K + T_rain_K
                   noise_increase_dB = db(Ts_new_K/${number(i, 'Ts_K')} K)
                   CN_faded_dB = ${number(i, 'CN_clear_dB')} dB - A - noise_increase_dB`,
  },
  {
    ids: /^rain-roddy-12.17$/,
    lines: (i) => `margin_dB = ${number(i, 'CN_clear_dB')} dB - ${number(i, 'threshold_dB')} dB
                   NC_clear = lin(-${number(i, 'CN_clear_dB')} dB)
                   r = ${number(i, 'Ta_K')} K/${number(i, 'Ts_K')} K
                   A_ratio = (lin(margin_dB) + r)/(1 + r)
                   A_dB = db(A_ratio)`,
  },
  {
    ids: /^in-rise-/,
    lines: (i) => `N = -100 dBm
                   I = N + ${quantity(number(i, 'IN_dB'), 'dB')}
                   rise_dB = powersum(N, I) - N
                   deltaT_over_T_percent | % = lin(I - N)`,
  },
  { ids: /^(in-m1461$|prose-in-rise-)/, lines: (i) => `rise_dB = powersum(0 dB, ${number(i, 'IN_dB')} dB)` },
  {
    ids: /^(dTT-|in-dTT6$)/,
    lines: (i) => `IN_dB = db(${number(i, 'deltaT_over_T_percent')} %)
                   rise_dB = db(1 + ${number(i, 'deltaT_over_T_percent')} %)`,
  },
  {
    ids: /^rise-in-/,
    lines: (i) => `N = -100 dBm
                   I = powerdiff(N + ${number(i, 'rise_dB')} dB, N)
                   IN_dB = I - N`,
  },
  { ids: /^load-rise-/, lines: (i) => `rise_dB = -db(1 - ${number(i, 'load_percent')} %)` },
  {
    ids: /^lte-refsens-derive-/,
    lines: (i) =>
      sensitivity(
        'REFSENS_dBm',
        number(i, 'B_Hz'),
        ...['NF_dB', 'SINR_dB', 'IM_dB'].map((key) => quantity(number(i, key), 'dB')),
        `(-${number(i, 'diversity_dB')} dB)`,
      ),
  },
  {
    ids: /^nr-refsens-n1-/,
    lines: (i) =>
      sensitivity(
        'REFSENS_dBm',
        number(i, 'N_RB') * 12 * number(i, 'SCS_kHz') * 1000,
        ...['NF_dB', 'SNR_dB', 'IM_dB'].map((key) => quantity(number(i, key), 'dB')),
        `(-${number(i, 'diversity_dB')} dB)`,
      ),
  },
  {
    ids: /^lte-bs-refsens-5$/,
    lines: (i) =>
      sensitivity(
        'PREFSENS_dBm',
        number(i, 'N_RB') * 180e3,
        ...['NF_dB', 'IM_dB', 'SNR_dB'].map((key) => quantity(number(i, key), 'dB')),
      ),
  },
  {
    ids: /^utra-bs-refsens$/,
    lines: (i) => `NF = ${number(i, 'NF_dB')} dB
                   EbN0 = ${number(i, 'EbN0_dB')} dB
                   G_p = db(${number(i, 'chip_rate_Hz')} Hz/${number(i, 'rate_kbps')} kbit/s)
                   REFSENS_dBm = thermal_noise(T_0, ${number(i, 'chip_rate_Hz')} Hz) + NF + EbN0 - G_p`,
  },
  {
    ids: /^utra-ue-refsens$/,
    lines: (i) => `NF = ${number(i, 'NF_dB')} dB
                   EbN0 = ${number(i, 'EbN0_dB')} dB
                   DPCH_Ec_dBm = noise_density(T_0) + NF + EbN0 + 10*log10(${number(i, 'rate_kbps')} kbit/s)`,
  },
  {
    ids: /^lte-bs-acs-implied$/,
    // The record was computed with the rounded density −174 dBm/Hz.
    lines: (i) => `N = -174 dBm/Hz + 10*log10(${number(i, 'B_Hz')} Hz) + ${number(i, 'NF_dB')} dB
                   I = powerdiff(N + ${number(i, 'desensitization_dB')} dB, N)
                   ACS_dB = ${number(i, 'interferer_dBm')} dBm - I`,
  },
  {
    ids: /^acir-/,
    lines: (i) => `ACLR = ${number(i, 'ACLR_dB')} dB
                                  ACS = ${number(i, 'ACS_dB')} dB
                                  ACIR_dB = ratiosum(ACLR, ACS)`,
  },
  {
    ids: /^wifi-a-/,
    lines: (
      i,
      { expected },
    ) => `N = thermal_noise(T_0, ${number(i, 'B_Hz')} Hz) + ${number(i, 'NF_dB')} dB + ${number(i, 'IM_dB')} dB
                                 implied_SNR_dB = ${String(expected['min_sensitivity_dBm'])} dBm - N`,
    without: {
      min_sensitivity_dBm: TABLE,
      adjacent_rejection_dB: TABLE,
      alternate_rejection_dB: TABLE,
      EVM_limit_dB: TABLE,
    },
  },
  { ids: /^wifi-sens-11-03-845$/, lines: () => 'offset_dBm = thermal_noise(T_0, 20 MHz) + 10 dB + 5 dB' },
];
