// Analyses of a line: what tolerances make of it, trials in workers, a sweep read off, and a value taken over.
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

import AxeBuilder from '@axe-core/playwright';
import type { Locator } from '@playwright/test';

import { expect, test } from './fixtures';
import type { WorksheetPage } from './pages/worksheet-page';

const TITLE = 'A hop with tolerances';
const file = readFileSync(fileURLToPath(new URL('../test/docs/toleranced-hop.budget.json', import.meta.url)), 'utf8');

/** Opens the worksheet and the analysis of its required line. */
async function openAnalysis(sheet: WorksheetPage, view: string): Promise<Locator> {
  await sheet.open();
  await sheet.openFileOf(TITLE, { name: 'hop.budget.json', text: file });
  await sheet.button('Analysis').click();
  const panel = sheet.page.getByRole('complementary', { name: 'Analysis' });
  await expect(panel.getByRole('combobox', { name: 'Line' })).toContainText('SINR');
  await panel.getByRole('group', { name: 'Analyses' }).getByRole('button', { name: view }).click();
  return panel;
}

test('totals and swings are those of the command line', async ({ sheet }) => {
  const panel = await openAnalysis(sheet, 'Sensitivity');
  // The figures that README shows for this file.
  const row = (name: string): Locator => panel.getByRole('row').filter({ hasText: name }).first();
  await expect(row('all adverse')).toContainText('7.26 dB');
  await expect(row('all favourable')).toContainText('15.30 dB');
  await expect(row('mean − 3σ')).toContainText('8.58 dB');
  await expect(panel).toContainText('42 %');
});

test('trials run in workers, and the same seed gives the same share', async ({ sheet }) => {
  const panel = await openAnalysis(sheet, 'Trials');
  await expect(panel).toContainText('100 000 trials with seed 1.'.replace(' ', '\u202f'), { timeout: 30_000 });
  const told = panel.getByText(/met in [\d.]+ % of the trials/);
  const first = await told.textContent();
  await panel.getByRole('button', { name: 'Run' }).click();
  await expect(told).toHaveText(first ?? '');
  await expect(panel.getByRole('button', { name: 'Save as SVG' })).toBeVisible();
});

test('a sweep is read off, and the value found is taken over in one step', async ({ sheet }) => {
  const panel = await openAnalysis(sheet, 'Sweep and solve');
  await expect(panel).toContainText('8.00 dB is reached at 16.06 dBm.');
  await panel.getByRole('button', { name: 'use this value' }).click();
  await expect(sheet.account.figure('SINR')).toContainText('8.00');
  await expect(sheet.account.figure('P_tx')).toContainText('16.06');
  await sheet.page.keyboard.press('Control+Z');
  await expect(sheet.account.figure('P_tx')).toContainText('20.00');
});

test('no analysis has a fault that axe finds', async ({ sheet, page }) => {
  const panel = await openAnalysis(sheet, 'Sensitivity');
  for (const view of ['Sensitivity', 'Trials', 'Sweep and solve']) {
    await panel.getByRole('group', { name: 'Analyses' }).getByRole('button', { name: view }).click();
    await expect(panel.getByRole('group', { name: 'Analyses' }).getByRole('button', { name: view })).toHaveAttribute(
      'aria-pressed',
      'true',
    );
    expect((await new AxeBuilder({ page }).analyze()).violations).toEqual([]);
  }
});
