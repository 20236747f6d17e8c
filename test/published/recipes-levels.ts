/** Units and references, voltages, fields, converters, EVM and phase noise: what decibels alone can say of them. */
import { number, numbers, quantity, type Recipe } from './records';

const Z_0 = '376.730313 ohm';

/** A reference in words, as a quantity: `1 microvolt per metre` is 1 µV/m. */
const WORDS: Readonly<Record<string, readonly [unit: string, linear: string]>> = {
  'notation-01': ['dBm', 'mW'],
  'notation-02': ['dBW', 'W'],
  'notation-06': ['dBHz', 'Hz'],
  'notation-08': ['dBµV', 'µV'],
  'notation-09': ['dBµV/m', 'µV/m'],
  'notation-10': ['dBW/m²', 'W/m²'],
};

/** The linear unit in which each reference is checked to be 1. */
export const referenceLine = (id: string): string => {
  const [unit, linear] = WORDS[id] ?? [];
  if (unit === undefined || linear === undefined) throw new Error(`${id} is no notation with a reference`);
  return `reference | ${linear} = 0 ${unit}`;
};

export const LEVEL_RECIPES: readonly Recipe[] = [
  { ids: /^notation-(01|02|06|08|09|10)$/, lines: (_, { id }) => referenceLine(id) },
  {
    ids: /^notation-20log$/,
    lines: (i) => `power_dB = db(${number(i, 'ratio_power')})
                   rootpower_dB = db(${number(i, 'ratio_rootpower')} V/1 V)`,
  },
  { ids: /^notation-dBd$/, lines: (i) => `gain_dBi | dBi = ${number(i, 'gain_dBd')} dBd` },
  { ids: /^notation-dBW-dBm$/, lines: (i) => `dBm | dBm = ${number(i, 'dBW')} dBW` },
  {
    ids: /^(prose-)?lvl-0dBm-/,
    lines: (i) => `P = ${number(i, 'P_dBm')} dBm
                   dBuV | dBµV = P + db(${number(i, 'Z_ohm')} ohm)`,
  },
  {
    ids: /^lvl-[\d.]+dBuV-/,
    lines: (i) => `U = ${number(i, 'dBuV')} dBµV
                   P_dBm | dBm = U - 10*log10(${number(i, 'Z_ohm')} ohm)
                   V_uV | µV = U`,
  },
  {
    ids: /^lvl-v-/,
    lines: (i) => `P = ${number(i, 'P_dBm')} dBm
                   Vrms | V = sqrt(lin(P)*${number(i, 'Z_ohm')} ohm)
                   Vpp | V = 2*sqrt(2)*Vrms
                   dBuV | dBµV = P + db(${number(i, 'Z_ohm')} ohm)
                   dBV | dBV = Vrms`,
  },
  { ids: /^lvl-emf$/, lines: (i) => `pd_dBuV | dBµV = ${number(i, 'emf_dBuV')} dBµV - 20*log10(2)` },
  {
    ids: /^fs-dBuVm-pfd$/,
    lines: (i) => `E = ${number(i, 'E_dBuV_per_m')} dBµV/m
                   S_dBmW_per_m2 | dBm/m² = E - db(${Z_0})
                   S_dBW_per_m2 | dBW/m² = E - db(${Z_0})`,
  },
  {
    ids: /^fs-E-H$/,
    lines: (i) => `H_dBuA_per_m | dBµA/m = ${number(i, 'E_dBuV_per_m')} dBµV/m - 20*log10(376.730313 ohm)`,
  },
  {
    ids: /^fs-1kW-1km$/,
    lines: (i) => `E = sqrt(30 ohm*${number(i, 'EIRP_W')} W)/${number(i, 'd_m')} m
                   E_mV_per_m | mV/m = E
                   E_dBuV_per_m | dBµV/m = E`,
  },
  {
    ids: /^fs-[\de.-]+W-\d+m$/,
    lines: (i) => `P = ${number(i, 'EIRP_W')} W
                   d = ${number(i, 'd_m')} m
                   E_V_per_m = sqrt(30 ohm*P)/d
                   E_dBuV_per_m | dBµV/m = E_V_per_m
                   S_dBW_per_m2 | dBW/m² = P/(4*pi*d^2)`,
  },
  {
    ids: /^fs-500uVm-3m$/,
    lines: (i) => `E = ${number(i, 'E_uV_per_m')} µV/m
                   E_dBuV_per_m | dBµV/m = E
                   EIRP_dBm | dBm = (E*${number(i, 'd_m')} m)^2/30 ohm`,
  },
  {
    ids: /^fs-iso-[\d]+-/,
    lines: (i) => `E = ${number(i, 'E_dBuV_per_m')} dBµV/m
                   A = (c_0/${number(i, 'f_Hz')} Hz)^2/(4*pi)
                   P_dBm | dBm = E - db(${Z_0}) + db(A) + ${number(i, 'G_dBi')} dBi`,
  },
  {
    ids: /^fs-iso-const$/,
    lines: (i) =>
      `P_dBm | dBm = ${number(i, 'E_dBuV_per_m')} dBµV/m - db(${Z_0}) + 20*log10(c_0/${number(i, 'f_MHz')} MHz) - db(4*pi)`,
  },
  {
    ids: /^fs-P525-E$/,
    lines: (i) => `P = ${number(i, 'Pt_dBW')} dBW
                                      E_dBuV_per_m | dBµV/m = P + db(30 ohm) - 20*log10(${number(i, 'd_km')} km)`,
  },
  {
    ids: /^fs-P1546-Lb$/,
    lines: (i) => `E = ${number(i, 'E_dBuV_per_m')} dBµV/m
                   P = 1 kW*1.641
                   A = (c_0/${number(i, 'f_MHz')} MHz)^2/(4*pi)
                   Lb_dB = db(P) - (E - db(${Z_0}) + db(A))`,
  },
  {
    ids: /^fs-AF-iso$/,
    lines: (i) => `A = (c_0/${number(i, 'f_MHz')} MHz)^2/(4*pi)
                                      AF_dB_per_m | dB(1/m²) = db(${Z_0}) - db(${number(i, 'Z_ohm')} ohm) - db(A) - ${number(i, 'G_dBi')} dBi`,
  },
  {
    ids: /^adc-snr-/,
    lines: (i) => `n = ${number(i, 'N_bits')}
                   SNR_rule_dB = n*6.02 dB + 1.76 dB
                   SNR_exact_dB = 20*log10(2^n) + 10*log10(1.5)`,
  },
  { ids: /^adc-enob-/, lines: (i) => `ENOB = (${number(i, 'SINAD_dB')} dB - 1.76 dB)/6.02 dB` },
  { ids: /^jitter-/, lines: (i) => `SNR_dB = -20*log10(2*pi*${number(i, 'f_Hz')} Hz*${number(i, 'tj_s')} s)` },
  {
    ids: /^adc-processing-gain-read$/,
    lines: (i) => `SNR_q = 6.02 dB*${number(i, 'N_bits')} + 1.76 dB
                   SNR_dB = SNR_q + 10*log10(${number(i, 'fs_Hz')} Hz/2/${number(i, 'B_Hz')} Hz)`,
  },
  {
    ids: /^oversample-/,
    lines: (i) => `gain_dB = 10*log10(${number(i, 'OSR')})
                   extra_bits = gain_dB/6.02 dB`,
  },
  {
    ids: /^adc-combine-/,
    lines: (i) => `SNR_q = 20*log10(2^${number(i, 'N_bits')}) + 10*log10(1.5)
                   SNR_j = -20*log10(2*pi*${number(i, 'f_Hz')} Hz*${number(i, 'jitter_s')} s)
                   SNR_t = ${number(i, 'thermal_SNR_dB')} dB
                   SNR_total_dB = ratiosum(SNR_q, SNR_j, SNR_t)`,
  },
  {
    ids: /^adc-nf-16bit-80M$/,
    lines: (i) => `P_fs | dBm = (${number(i, 'FS_Vpp')} V/2)^2/2/${number(i, 'Z_ohm')} ohm
                   N_0 = P_fs - ${number(i, 'SNR_dB')} dB - db(${number(i, 'fs_Hz')} Hz/2)
                   NF_dB = N_0 - noise_density(T_0)`,
  },
  {
    ids: /^pn-flat-/,
    lines: (i) => `integrated_SSB_dBc | dBc = ${number(i, 'L_dBc_Hz')} dBc/Hz + db(${number(i, 'B_Hz')} Hz)
                   rms_rad = sqrt(2*lin(integrated_SSB_dBc))
                   rms_deg | deg = rms_rad
                   EVM_percent | % = rms_rad
                   SNR_dB = -db(2*lin(integrated_SSB_dBc))`,
  },
  {
    ids: /^pn-int-/,
    lines: (i) => `p = lin(${number(i, 'integrated_SSB_dBc')} dBc)
                   rms_rad = sqrt(2*p)
                   rms_deg | deg = rms_rad
                   SNR_dB = -db(2*p)`,
  },
  {
    ids: /^pn-deg-/,
    lines: (i) => `rms_rad | rad = ${number(i, 'rms_deg')} deg
                   EVM_percent_small | % = rms_rad
                   EVM_percent_exact | % = sqrt(2 - 2*exp(-(rms_rad^2)/2))
                   SNR_dB = -20*log10(rms_rad)`,
  },
  {
    ids: /^evm-[\d.]+$/,
    lines: (i) => `EVM_dB = 20*log10(${number(i, 'EVM_percent')} %)
                   SNR_dB = -20*log10(${number(i, 'EVM_percent')} %)`,
  },
  { ids: /^evmdB-/, lines: (i) => `EVM_percent | % = 10^(${quantity(number(i, 'EVM_dB'), 'dB')}/20)` },
  { ids: /^3gpp-evm-/, lines: (i) => `SNR_equiv_dB = -20*log10(${number(i, 'EVM_percent')} %)` },
  {
    ids: /^evm-snr$/,
    lines: (i) =>
      numbers(i, 'EVM_percent')
        .map((evm, at) => `SNR_dB_${at} = -20*log10(${evm} %)`)
        .join('\n'),
  },
  {
    ids: /^evm-rss-/,
    lines: (i) => {
      const parts = numbers(i, 'EVM_percent');
      return `EVM_total_percent | % = sqrt(${parts.map((evm) => `(${evm} %)^2`).join(' + ')})
              SNR_dB = -db(EVM_total_percent^2)`;
    },
  },
];
