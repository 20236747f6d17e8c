/**
 * Whole published budgets: every printed line becomes a line of the worksheet (`b0`, `b1` …), with its value and sign as printed;
 * the printed totals are sums of them. Where a table prints a bare dB for a rate or for the Boltzmann constant, the line gets
 * the unit that it stands for.
 */
import type { BudgetLine, PublishedRecord, Recipe } from './records';

const UNITS: Readonly<Record<string, string>> = {
  'dBW/(K Hz)': 'dBW/K/Hz',
  'dBm/(K Hz)': 'dBm/K/Hz',
  'dB(m2)': 'dBm²',
  'dBW/m2': 'dBW/m²',
  'dB(K)': 'dBK',
};

/** What a printed `dB` stands for, by the line's name. */
function unitOf({ name, unit }: BudgetLine): string {
  if (/^-\[?k\]?$/.test(name)) return 'dB(K·Hz/W)';
  if (/data (bit )?rate/i.test(name)) return 'dB(bit/s)';
  if (name === 'Spreading 20 log R') return 'dBm²';
  return UNITS[unit] ?? unit;
}

const printed = (record: PublishedRecord): readonly BudgetLine[] => record.lines ?? [];

/** The printed lines; with `means`, the printed means of a table whose totals are sums of them. */
const table = (record: PublishedRecord, means = false): string =>
  printed(record)
    .flatMap((line, at) => {
      const value = means ? (line.printed_mean ?? line.value) : line.value;
      return value === null
        ? []
        : [`b${at} = ${value} ${unitOf(line).replace(/^1$/, '')} # ${line.name.replace(/@|=>|!/g, ' ')}`];
    })
    .join('\n');

/** The sum of lines `from` to `to` that count, with their printed signs. */
const sum = (record: PublishedRecord, from: number, to: number): string =>
  printed(record)
    .flatMap(({ sign }, at) => (at < from || at > to || sign === 0 ? [] : [`${sign > 0 ? '+' : '-'} b${at}`]))
    .join(' ')
    .replace(/^\+ /, '');

const sumOfStage = (record: PublishedRecord, stage: string): string =>
  printed(record)
    .flatMap((line, at) => (line.stage !== stage || line.sign === 0 ? [] : [`${line.sign > 0 ? '+' : '-'} b${at}`]))
    .join(' ')
    .replace(/^\+ /, '');

const VARIANCE = 'a variance, of rows whose shapes are for the most part not printed';

/** The lines that both X-band tables and the UHF tables of one source have after the received power. */
const tracking = (first: number): string => `carrier_power_dBm = received_power_dBm + b${first}
  carrier_loop_SNR_dB = carrier_power_dBm - N0_dBm_per_Hz - b${first + 1}`;

export const BUDGET_RECIPES: readonly Recipe[] = [
  {
    ids: /^budget-voyager2-uplink-1996$/,
    lines: (_, record) => `${table(record, true)}
      received_power_dBm = ${sum(record, 0, 9)}
      Pt_over_N0_dBHz = received_power_dBm - b10
      carrier_SNR_in_2BLO_dB = Pt_over_N0_dBHz - b11`,
    without: { received_power_var: VARIANCE, Pt_over_N0_var: VARIANCE, carrier_SNR_var: VARIANCE },
  },
  {
    ids: /^budget-voyager2-telemetry-160bps-1996$/,
    lines: (_, record) => `${table(record)}
      data_power_dBm = b0 + b1 + b2
      ST_over_N0_dB = data_power_dBm - b3 - b4
      after_losses_dB = ST_over_N0_dB + b5
      margin_dB = after_losses_dB - b6`,
    without: { ST_over_N0_var: VARIANCE, after_losses_var: VARIANCE, margin_var: VARIANCE },
  },
  {
    ids: /^budget-marco-xband-uplink-/,
    lines: (_, record) => `${table(record)}
      EIRP_dBm = ${sum(record, 0, 3)}
      received_power_dBm = EIRP_dBm + ${sum(record, 6, 12)}
      N0_dBm_per_Hz = noise_density(b14)
      Pt_over_N0_dBHz = received_power_dBm - N0_dBm_per_Hz
      ${tracking(17)}
      carrier_margin_dB = carrier_loop_SNR_dB - b23
      required_Pt_over_N0_dBHz | dBHz = b22 + db(62.5 bit/s) - b19 - b21
      channel_margin_dB = Pt_over_N0_dBHz - required_Pt_over_N0_dBHz
      margin_above_threshold_dB = channel_margin_dB - b24`,
  },
  {
    ids: /^budget-marco-xband-downlink-/,
    lines: (_, record) => `${table(record)}
      EIRP_dBm = ${sum(record, 0, 3)}
      received_power_dBm = EIRP_dBm + ${sum(record, 6, 12)}
      N0_dBm_per_Hz = noise_density(b15 + b16 + b17)
      Pt_over_N0_dBHz = received_power_dBm - N0_dBm_per_Hz
      ${tracking(20)}
      carrier_margin_dB = carrier_loop_SNR_dB - b22
      required_Pt_over_N0_dBHz | dBHz = b26 + db(62.5 bit/s) - b23 - b25
      channel_margin_dB = Pt_over_N0_dBHz - required_Pt_over_N0_dBHz
      margin_above_threshold_dB = channel_margin_dB - b27`,
  },
  {
    ids: /^budget-marco-uhf-/,
    lines: (_, record) => `${table(record)}
      EIRP_dBm = ${sum(record, 0, 2)}
      received_power_dBm = EIRP_dBm + ${sum(record, 5, 8)}
      T_sys_K = b11 + b12 + b13
      N0_dBm_per_Hz = noise_density(T_sys_K)
      Pt_over_N0_dBHz = received_power_dBm - N0_dBm_per_Hz
      ${tracking(16)}
      carrier_margin_dB = carrier_loop_SNR_dB - b18
      required_Pt_over_N0_dBHz | dBHz = b22 + db(8000 bit/s) + b19 + b21
      channel_margin_dB = Pt_over_N0_dBHz - required_Pt_over_N0_dBHz
      margin_above_threshold_dB = channel_margin_dB - b23`,
  },
  {
    ids: /^budget-emwin-n-goes$/,
    lines: (_, record) => `${table(record)}
      uplink_incident_dBm = ${sum(record, 0, 4)}
      uplink_CN0_dBHz = ${sumOfStage(record, 'up')}
      downlink_incident_dBm = ${sum(record, 10, 12)}
      downlink_CN0_dBHz = ${sumOfStage(record, 'down')}
      overall_CN0_dBHz = ratiosum(uplink_CN0_dBHz, downlink_CN0_dBHz)
      EbN0_dB = overall_CN0_dBHz - db(9600 bit/s)
      required_EbN0_dB = b19 + b20 + b21
      margin_dB = EbN0_dB - required_EbN0_dB`,
  },
  {
    ids: /^budget-roddy-ex12\.(9|14)$/,
    lines: (_, record) => `${table(record)}\nCN0_dBHz | dBHz = ${sum(record, 0, 9)}`,
  },
  {
    ids: /^budget-roddy-eirp-required$/,
    lines: (_, record) => `${table(record)}
      R_b = 2 bit/s/(1 Bd)*36 MBd/1.2
      Rb_dB | dBHz = 2*36 MHz/1.2
      EbN0_req = 9.6 dB
      CN0_dBHz = EbN0_req + Rb_dB
      EIRP_dBW | dBW = CN0_dBHz - b1 + b2 - b3`,
  },
  {
    ids: /^budget-fcc-tlm-/,
    lines: (_, record) => `${table(record)}
      EIRP_dBW = ${sum(record, 0, 2)}
      margin_dB = ${String(record.expected['CN_dB'])} dB - b7`,
    without: { CN_dB: 'the filing does not print the bandwidth' },
  },
  {
    ids: /^budget-fcc-cmd-/,
    lines: (_, record) => `${table(record)}
      isotropic_power_dBW | dBW = b0 + b1
      receiver_input | ${printed(record)[6]?.unit ?? ''} = isotropic_power_dBW + b3 - b5
      margin_dB = receiver_input - b7`,
    without: { aperture_factor_dB_m2: 'a line of the table', GT_dB_per_K: 'filings differ in whether losses count' },
  },
  {
    ids: /^budget-pratt-uplink-12\.1$/,
    lines: (_, record) => `${table(record)}
      Gt_dBi | dBi = 0.68*(pi*9 m*6.285 GHz/c_0)^2
      Lp_dB = free_space_loss(38500 km, 6.285 GHz)
      Pr_minus_Pt_dB = ${sum(record, 0, 3)}
      N_dBW | dBW = b4 + b5 + b6`,
  },
  {
    ids: /^budget-pratt-ex4\.1$/,
    lines: (_, record) => `${table(record)}
      flux_dBW_per_m2 | dBW/m² = b0 - b1 - b2
      flux_W_per_m2 | W/m² = flux_dBW_per_m2
      Pr_dBW | dBW = flux_dBW_per_m2 + b3
      Pr_dBm | dBm = Pr_dBW
      Pr_W | W = Pr_dBW`,
  },
  {
    ids: /^budget-proakis-geo$/,
    lines: (_, record) => `${table(record)}
      Pr_dBW = ${sum(record, 0, 3)}
      Pr_over_N0_dBHz = Pr_dBW - b4
      rate_dB | dB(bit/s) = Pr_over_N0_dBHz - b5
      rate_bps | bit/s = rate_dB`,
  },
  {
    ids: /^budget-fcc-cband-/,
    lines: (_, record) => `${table(record)}
      EIRP_dBW = ${sum(record, 0, 2)}
      uplink_EbN0_dB = ${sumOfStage(record, 'up')}
      uplink_Eb_N0I0_dB = ratiosum(uplink_EbN0_dB, b9)
      downlink_EbN0_dB = ${sumOfStage(record, 'down')}`,
  },
  {
    ids: /^budget-lte-pusch-/,
    lines: (_, record) => `${table(record)}
      aggregate_noise_dBm = b4 + 10*log10(b5)
      floor_dBm = aggregate_noise_dBm + b7 + b8
      rss_dBm = floor_dBm + b10
      isotropic_requirement_dBm = rss_dBm - b12 + b13 + b14 - b15 + b16
      MAPL_dB = b0 + b1 - b2 - isotropic_requirement_dBm`,
  },
  {
    ids: /^budget-umts-uplink-12k2$/,
    lines: (_, record) => `${table(record)}
      rx_noise_dBm | dBm = b3 + db(3.84 MHz)
      interference_dBm = powerdiff(rx_noise_dBm + b5, rx_noise_dBm)
      N_plus_I_dBm = powersum(rx_noise_dBm, interference_dBm)
      processing_gain_dB = 10*log10(3.84 MHz/12.2 kbit/s)
      rx_requirement_dBm = N_plus_I_dBm + b9 - processing_gain_dB - b10 + b11 + b12
      cell_edge_loss_dB = b0 - b1 - rx_requirement_dBm - b14 - b15 + b16`,
  },
  {
    ids: /^budget-pratt-cband-downlink$/,
    lines: (_, record) => `${table(record)}
      Pr_dBW = ${sum(record, 0, 7)}
      N_dBW | dBW = b8 + b9 + b10
      CN_dB = Pr_dBW - N_dBW`,
  },
];
