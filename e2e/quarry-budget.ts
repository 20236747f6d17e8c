// A receiver budget of 25 lines, and the keys with which a person types it into an empty worksheet.
import { expect } from './fixtures';
import type { Account } from './pages/account';
import type { WorksheetPage } from './pages/worksheet-page';

// The budget is invented: a telemetry receiver at the foot of a quarry that nobody has dug.

/** Lines of each section: symbol, label, entry. */
const SIGNAL = [
  ['f', 'Carrier frequency', '412 MHz'],
  ['d', 'Distance to the crusher', '3.4 km'],
  ['P_tx', 'Transmit power', '27 dBm'],
  ['L_cab', 'Cable loss at the crusher', '1.2 dB'],
  ['G_tx', 'Antenna gain at the crusher', '4 dBi'],
  ['EIRP', 'Equivalent isotropically radiated power', 'P_tx - L_cab + G_tx'],
] as const;
const PATH = [
  ['L_spoil', 'Loss through the spoil heaps', '11 dB'],
  ['G_rx', 'Antenna gain at the hut', '2.15 dBi'],
  ['L_rx', 'Cable loss at the hut', '0.8 dB'],
  ['C', 'Wanted carrier', 'EIRP - L_fs - L_spoil + G_rx - L_rx'],
] as const;
const NOISE = [
  ['B', 'Receiver bandwidth', '25 kHz'],
  ['NF', 'Noise figure of the receiver', '6.5 dB'],
] as const;
const INTERFERENCE = [
  ['P_pump', 'Power of the pump radio', '30 dBm'],
  ['d_pump', 'Distance to the pump', '7.2 km'],
  ['L_pump', 'Free-space loss from the pump', 'free_space_loss(d_pump, f)'],
  ['ACS', 'Adjacent-channel selectivity', '52 dB'],
  ['I', 'Interference from the pump', 'P_pump - L_pump - ACS + G_rx - L_rx'],
] as const;
const RESULT = [
  ['SINR', 'Signal to noise and interference', 'C - N_tot'],
  ['SINR_min', 'Needed by the demodulator', '10.5 dB'],
  ['M', 'Margin', 'SINR - SINR_min'],
  ['R_b', 'Bit rate', '9.6 kbit/s'],
  ['EbN0', 'Energy per bit over noise density', 'C - N + db(B/R_b)'],
] as const;

async function draftAll(account: Account, lines: readonly (readonly [string, string, string])[]): Promise<void> {
  for (const [symbol, label, entry] of lines) await account.draft(symbol, label, entry);
}

/** Takes the suggestion that is written so, from those that stand open. */
async function takeSuggestion(account: Account, text: string): Promise<void> {
  const wanted = account.suggestions.filter({ hasText: text });
  await expect(wanted.first()).toBeVisible();
  for (let step = 0; step < 12; step++) {
    await account.press('ArrowDown');
    if ((await account.chosenSuggestion.textContent())?.includes(text) === true) break;
  }
  await account.press('Enter');
}

/** From the place for a new line, a new section below. */
async function beginSection(account: Account, title: string): Promise<void> {
  await account.press('ArrowDown');
  await account.type(title);
  await account.press('Enter');
  await expect(account.newLine(title)).toBeFocused();
}

/** Types all 25 lines from an empty worksheet; N_tot is left as it is first thought of: levels added as decibels. */
export async function draftBudget({ account }: WorksheetPage): Promise<void> {
  await draftAll(account, SIGNAL);

  // A function by its first letters, its arguments by theirs.
  await account.type('L_fs');
  await account.press('Tab');
  await account.type('Free-space loss');
  await account.press('Tab');
  await account.type('free_s');
  await takeSuggestion(account, 'free_space_loss');
  await account.type('d, f');
  await expect(account.editor).toHaveValue('free_space_loss(d, f)');
  await account.press('Enter');
  await draftAll(account, PATH);

  await beginSection(account, 'Noise and interference');
  await draftAll(account, NOISE);
  await account.type('N');
  await account.press('Tab');
  await account.type('Receiver noise');
  await account.press('Tab');
  await account.type('therm');
  await takeSuggestion(account, 'thermal_noise');
  await account.type('T_0, B');
  await account.press('End');
  await account.type(' + N');
  await takeSuggestion(account, 'NF');
  await expect(account.editor).toHaveValue('thermal_noise(T_0, B) + NF');
  await account.press('Enter');
  await draftAll(account, INTERFERENCE);
  await account.draft('N_tot', 'Noise and interference', 'N + I');

  await beginSection(account, 'Result');
  await draftAll(account, RESULT);
}
