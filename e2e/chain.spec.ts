// A receiver line-up: built by keyboard, reordered, a stage bypassed, its levels read from the diagram.
import AxeBuilder from '@axe-core/playwright';
import type { Locator } from '@playwright/test';

import { expect, test } from './fixtures';
import type { WorksheetPage } from './pages/worksheet-page';

const STAGES = [
  ['pre', 'Preselector', '-1.2 dB', ''],
  ['lna', 'Amplifier', '15 dB', '0.9 dB'],
  ['img', 'Image filter', '-2 dB', ''],
  ['mix', 'Mixer', '-7 dB', '7.5 dB'],
  ['ifa', 'Amplifier behind the mixer', '20 dB', '3 dB'],
] as const;

const lineUp = (sheet: WorksheetPage): Locator => sheet.page.getByRole('grid', { name: 'Line-up' });
const symbols = (sheet: WorksheetPage): Locator => lineUp(sheet).getByRole('row').locator('[data-cell="symbol"]');

async function typeChain(sheet: WorksheetPage): Promise<void> {
  const { account } = sheet;
  await sheet.open();
  await account.press('Control+End', 'ArrowRight', 'Enter');
  await expect(lineUp(sheet).locator(':focus')).toHaveCount(1);
  for (const [symbol, label, gain, noiseFigure] of STAGES) {
    await account.type(symbol);
    await account.press('Tab');
    await account.type(label);
    await account.press('Tab');
    await account.type(gain);
    await account.press('Tab');
    if (noiseFigure !== '') await account.type(noiseFigure);
    await account.press('Enter', 'Control+End');
  }
  await expect(symbols(sheet)).toHaveText([...STAGES.map(([symbol]) => symbol), 'add a stage']);
}

/** Fills a field of the chain's head. */
async function say(sheet: WorksheetPage, field: string, text: string): Promise<void> {
  const input = sheet.working
    .getByRole('combobox', { name: field })
    .or(sheet.working.getByRole('textbox', { name: field }));
  await input.fill(text);
  await input.press('Enter');
}

test('a five-stage chain is built by keyboard, reordered and a stage bypassed', async ({ sheet }) => {
  await typeChain(sheet);
  // Friis by hand: losses at 290 K have their loss as noise figure.
  // F = 1.3183 + 0.2303/0.7586 + 0.5849/23.99 + 4.6234/15.14 + 0.9953/3.020 = 2.2812, 3.58 dB.
  await expect(sheet.account.figure('rx.nf')).toContainText('3.58');
  await expect(sheet.account.figure('rx.gain')).toContainText('24.80');

  // The filter ahead of the amplifier goes behind it: 0.9 dB and 15 dB come first.
  await sheet.account.press('Control+Home');
  await expect(lineUp(sheet).locator(':focus')).toContainText('pre');
  await sheet.account.press('Alt+ArrowDown');
  await expect(symbols(sheet)).toHaveText(['lna', 'pre', 'img', 'mix', 'ifa', 'add a stage']);
  // F = 1.2303 + 0.3183/31.62 + 0.5849/23.99 + 4.6234/15.14 + 0.9953/3.020 = 1.9001, 2.79 dB.
  await expect(sheet.account.figure('rx.nf')).toContainText('2.79');

  // Without the image filter there is more gain ahead of the mixer.
  await lineUp(sheet)
    .getByRole('gridcell', { name: /^img is in the line-up/ })
    .click();
  // F = 1.2303 + 0.3183/31.62 + 4.6234/23.99 + 0.9953/4.786 = 1.6410, 2.15 dB.
  await expect(sheet.account.figure('rx.nf')).toContainText('2.15');
  await expect(sheet.account.figure('rx.gain')).toContainText('26.80');
  await expect(sheet.account.rows.filter({ hasText: 'Image filter' })).toContainText('bypassed');

  for (let step = 0; step < 2; step++) await sheet.page.keyboard.press('Control+Z');
  await expect(symbols(sheet)).toHaveText(['pre', 'lna', 'img', 'mix', 'ifa', 'add a stage']);
  await expect(sheet.account.figure('rx.nf')).toContainText('3.58');
});

test('the level diagram and its table give the levels along the chain', async ({ sheet }) => {
  await typeChain(sheet);
  await say(sheet, 'Wanted level', '-90 dBm');
  await say(sheet, 'Bandwidth', '1 MHz');
  // k 290 K 1 MHz = -113.98 dBm; -90 + 24.8 = -65.2 dBm and -113.98 + 3.58 + 24.8 = -85.59 dBm at the output.
  await expect(sheet.account.figure('rx.signal')).toContainText('−65.20');
  await expect(sheet.account.figure('rx.snr')).toContainText('20.39');

  const diagram = sheet.working.getByRole('group', { name: 'Levels: Receiver' });
  await expect(diagram.getByRole('button', { name: /ifa.*−65\.20 dBm/ })).toBeVisible();
  await sheet.working.getByRole('button', { name: 'as table' }).click();
  const row = sheet.working.getByRole('row').filter({ hasText: 'ifa' }).filter({ hasText: '−65.20' });
  await expect(row.last()).toContainText('20.39');
  await sheet.working.getByRole('button', { name: 'as table' }).click();

  const download = sheet.page.waitForEvent('download');
  await sheet.working.getByRole('button', { name: 'Save as SVG' }).click();
  expect((await download).suggestedFilename()).toMatch(/\.svg$/);
});

test('a chain has no fault that axe finds, light and dark, beside the account and at whole width', async ({
  sheet,
  page,
}) => {
  await typeChain(sheet);
  await say(sheet, 'Wanted level', '-90 dBm');
  await say(sheet, 'Bandwidth', '1 MHz');
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
    expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
  }
  await sheet.working.getByRole('button', { name: 'Give the panel the whole width' }).click();
  expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
});

test('a pool tells shares and what each line may be, and a line is left out', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.press('Control+End', 'ArrowRight', 'ArrowRight', 'Enter');
  await expect(account.section('Noise and interference')).toBeVisible();
  await account.newLine('Noise and interference').click();
  for (const [symbol, entry] of [
    ['N', '-100 dBm'],
    ['I_1', '-100 dBm'],
  ] as const) {
    await account.type(symbol);
    await account.press('Tab', 'Tab');
    await account.type(entry);
    await account.press('Enter');
  }
  await expect(account.figure('N_I')).toContainText('−96.99');
  await account.section('Noise and interference').getByRole('button', { name: 'open the shares' }).click();
  await expect(sheet.working).toContainText('50');
  await sheet.working.getByRole('checkbox').or(sheet.working.getByRole('switch')).first().click();
  await expect(account.figure('N_I')).toContainText('−100.00');
});
