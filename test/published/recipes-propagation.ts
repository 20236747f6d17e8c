/** Free space, fields, antennas, path loss and capacity. */
import { number, numbers, type Recipe } from './records';

const Z_0 = '376.730313 ohm';
const LATER = 'a function of a later milestone';

/** The numeral at the head of an input such as `50 km`. */
const text = (inputs: Readonly<Record<string, unknown>>, key: string): string =>
  String(inputs[key]).replace('m2', 'm²').replace('dB(uV/m)', 'dBµV/m');

export const PROPAGATION_RECIPES: readonly Recipe[] = [
  { ids: /^fs-const-mhz-km$/, lines: (i) => `L_dB = free_space_loss(${text(i, 'd')}, ${text(i, 'f')})` },
  {
    ids: /^fs-const-set$/,
    lines: () =>
      // A metre at 1 MHz or 1 Hz is in the near field, where the function warns: a longer path, less 20 log10 of the rest.
      [
        ['1 km', '1 GHz', 0],
        ['1 m', '1 GHz', 0],
        ['1 km', '1 MHz', 60],
        ['1e6 km', '1 Hz', 180],
        ['1 mi', '1 MHz', 0],
        ['1 nmi', '1 MHz', 0],
      ]
        .map(([d = '', f = '', rest = 0], at) => `dB_${at} = free_space_loss(${d}, ${f}) - ${rest} dB`)
        .join('\n'),
  },
  {
    ids: /^(fs-\d\d$|prose-fs-)/,
    lines: (i) => `L_dB = free_space_loss(${number(i, 'd_m')} m, ${number(i, 'f_Hz')} Hz)`,
  },
  { ids: /^fspl-/, lines: (i) => `FSPL_dB = free_space_loss(${number(i, 'd_m')} m, ${number(i, 'f_Hz')} Hz)` },
  {
    ids: /^emwin-fspl-/,
    lines: (i) => `FSPL_dB = free_space_loss(${number(i, 'd_km')} km, ${number(i, 'f_MHz')} MHz)`,
  },
  {
    ids: /^fs-field-1kW-1km$/,
    lines: () => `E_V_per_m = sqrt(30 ohm*1 kW)/1 km
                  E_dBuV_per_m | dBµV/m = E_V_per_m`,
  },
  { ids: /^fs-conv-S$/, lines: (i) => `S_dBW_per_m2 | dBW/m² = ${text(i, 'E')} - db(${Z_0})` },
  {
    ids: /^fs-conv-Pr$/,
    lines: (i) => `Pr_dBW | dBW = ${text(i, 'E')} - db(${Z_0}) + 20*log10(c_0/${text(i, 'f')}) - db(4*pi)`,
  },
  {
    ids: /^fs-conv-Pr-dBm$/,
    lines: (i) => `Pr_dBm | dBm = ${text(i, 'E')} - db(${Z_0}) + 20*log10(c_0/${text(i, 'f')}) - db(4*pi)`,
  },
  {
    ids: /^fs-radar(-2)?$/,
    lines: (i) => `lambda = c_0/${text(i, 'f')}
                   d = ${text(i, 'd')}
                   Lbr_dB = 30*log10(4*pi) + 4*db(d) - db(${text(i, 'sigma')}) - 2*db(lambda)`,
  },
  {
    ids: /^planeearth-/,
    lines: (i) =>
      `L_plane_earth_dB = 4*db(${number(i, 'd_m')} m) - 20*log10(${number(i, 'h1_m')} m) - 20*log10(${number(i, 'h2_m')} m)`,
    without: { 'L_two_ray_exact_R=-1_dB': LATER, crossover_4pi_h1h2_over_lambda_m: LATER },
  },
  {
    ids: /^logdist-/,
    lines: (i) => `n = ${number(i, 'n')}
                   L_dB = free_space_loss(${number(i, 'd0_m')} m, ${number(i, 'f_Hz')} Hz) + 10*n*log10(${number(i, 'd_m')} m/(${number(i, 'd0_m')} m))`,
  },
  {
    ids: /^dish-\d$/,
    lines: (i) => `lambda = c_0/${number(i, 'f_Hz')} Hz
                   gain_dBi | dBi = ${number(i, 'efficiency')}*(pi*${number(i, 'D_m')} m/lambda)^2
                   A_eff_m2 = lin(gain_dBi)*lambda^2/(4*pi)
                   hpbw_70lambda_over_D_deg | deg = 70 deg*lambda/${number(i, 'D_m')} m`,
  },
  {
    ids: /^aperture-iso$/,
    lines: (i) =>
      numbers(i, 'f_GHz')
        .map((f, at) => `A_eff_dBm2_${at} | dBm² = (c_0/${f} GHz)^2/(4*pi)`)
        .join('\n'),
  },
  { ids: /^roddy-A0-6GHz$/, lines: (i) => `A0_dB_m2 = 20*log10(c_0/${number(i, 'f_GHz')} GHz) - 10*log10(4*pi)` },
  {
    ids: /^dish-area-gain-10m2$/,
    lines: (i) => `gain_dBi | dBi = ${number(i, 'eta')}*4*pi*${number(i, 'A_m2')} m²/(c_0/${number(i, 'f_GHz')} GHz)^2`,
  },
  {
    ids: /^pointing$/,
    lines: (i) =>
      numbers(i, 'theta_over_theta3dB')
        .map((ratio, at) => `loss_dB_${at} = 12 dB*${ratio}^2`)
        .join('\n'),
  },
  {
    ids: /^shannon-C-/,
    lines: (i) => `C_bit_s = capacity(${number(i, 'B_Hz')} Hz, ${number(i, 'SNR_dB')} dB)
                   C_over_B = C_bit_s/${number(i, 'B_Hz')} Hz`,
  },
  {
    ids: /^shannon-limit$/,
    lines: (i) =>
      numbers(i, 'eta_bit_s_Hz')
        .map(
          (eta, at) => `SNR_min_dB_${at} = db(exp(${eta}*ln(2)) - 1)
                           EbN0_min_dB_${at} = SNR_min_dB_${at} - 10*log10(${eta})`,
        )
        .join('\n'),
  },
  {
    ids: /^ebn0-cn-/,
    lines: (i) => `EbN0 = ${number(i, 'EbN0_dB')} dB
                   R = ${number(i, 'Rb_bit_s')} bit/s
                   CN_dB = EbN0 + 10*log10(R/${number(i, 'B_Hz')} Hz)
                   CN0_dBHz | dBHz = EbN0 + db(R)`,
  },
  { ids: /^gt-lrit$/, lines: (i) => `GT_dB_per_K = ${number(i, 'G_dBi')} dBi - db(${number(i, 'T_K')} K)` },
  { ids: /^eirp-6W-48p2$/, lines: (i) => `EIRP_dBW | dBW = db(${number(i, 'P_W')} W) + ${number(i, 'G_dB')} dB` },
  {
    ids: /^roddy-p12.19$/,
    lines: (i) => `C = ${number(i, 'C_W')} W
                   N_0 = k_B*${number(i, 'Ts_K')} K
                   CN0_dBHz | dBHz = C/N_0
                   CN_dB = db(C/(N_0*${number(i, 'B_Hz')} Hz))`,
  },
  {
    ids: /^roddy-p12.22$/,
    lines: (i) =>
      `EIRP_dBW | dBW = ${number(i, 'CN0_dBHz')} dBHz - ${number(i, 'GT_dB_per_K')} dB/K + ${number(i, 'losses_dB')} dB + db(k_B)`,
  },
  {
    ids: /^voyager-check-space-loss-S$/,
    lines: () => 'value = -free_space_loss(7.273e9 km, 2113.31 MHz)',
    without: { unit: 'the unit' },
  },
  {
    ids: /^voyager-check-N0-1545K$/,
    lines: () => 'value | dBm/Hz = noise_density(1545 K)',
    without: { unit: 'the unit' },
  },
  { ids: /^voyager-check-N0fav-1511-1545$/, lines: () => 'value = db(1511 K/1545 K)', without: { unit: 'the unit' } },
  { ids: /^voyager-check-N0adv-1604-1545$/, lines: () => 'value = db(1604 K/1545 K)', without: { unit: 'the unit' } },
  {
    ids: /^voyager-check-N0adv-25p36-21p12$/,
    lines: () => 'value = db(25.36 K/21.12 K)',
    without: { unit: 'the unit' },
  },
  {
    ids: /^voyager-check-160bps$/,
    lines: () => 'value = 10*log10(160 bit/s/(1 bit/s))',
    without: { unit: 'the unit' },
  },
  { ids: /^voyager-check-sin2-60deg$/, lines: () => 'value = 20*log10(sin(60 deg))', without: { unit: 'the unit' } },
  { ids: /^voyager-check-cos2-60deg$/, lines: () => 'value = 20*log10(cos(60 deg))', without: { unit: 'the unit' } },
  {
    ids: /^voyager-check-Tsys$/,
    lines: (i) =>
      `T_sys_K = ${numbers(i, 'components_K')
        .map((kelvin) => `${kelvin} K`)
        .join(' + ')}`,
  },
  {
    ids: /^cas-marco-dsn-/,
    lines: (i) =>
      `T_sys_K = ${number(i, 'vacuum_zenith_K')} K + ${number(i, 'elevation_K')} K + ${number(i, 'sky_K')} K`,
  },
];
