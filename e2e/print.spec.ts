// On paper: every line of the worksheet, its cautions, findings and sources, from a table made for printing.
import { expect, test } from './fixtures';
import { worksheetFile } from './worksheet-files';

const LINES = 120;

const file = worksheetFile({
  id: '9a3d0c61-7a2e-4b0f-9f5e-000000000001',
  title: 'Long account for paper',
  summary: 'A summary that stands below the title.',
  cases: [
    { id: 'dry', name: 'Dry' },
    { id: 'wet', name: 'Wet' },
  ],
  lines: [
    { id: 'p', symbol: 'P_tx', label: 'Transmit power', entry: '30 dBm', source: 'Invented data sheet' },
    { id: 'g', symbol: 'EIRP', label: 'Radiated power', entry: 'P_tx + 6 dBi', note: 'A note for the reader' },
    { id: 'bad', symbol: 'S', label: 'Two levels', entry: 'P_tx + EIRP' },
    {
      id: 'need',
      symbol: 'P_rx',
      label: 'Level received',
      entry: 'EIRP - 100 dB',
      byCase: { wet: 'EIRP - 111.5 dB' },
      requirement: { atLeast: '-70 dBm' },
    },
    ...Array.from({ length: LINES - 4 }, (_, at) => ({
      id: `n${String(at)}`,
      symbol: `L_${String(at)}`,
      label: `Loss number ${String(at)}`,
      entry: `${String(at)}.5 dB`,
    })),
  ],
});

test('everything is printed, though the screen holds only what is in view', async ({
  sheet,
  page,
  expectAccessible,
}) => {
  await sheet.open();
  await sheet.openFileOf('Long account for paper', file);
  await sheet.button('Linear values').click();
  expect(await sheet.account.rows.count()).toBeLessThan(LINES);

  await page.evaluate(() => window.dispatchEvent(new Event('beforeprint')));
  await page.emulateMedia({ media: 'print' });
  await expect(sheet.header).toBeHidden();
  await expect(sheet.account.grid).toBeHidden();
  await expect(page.getByRole('heading', { level: 1, name: 'Long account for paper' })).toBeVisible();
  const paper = page.locator('body');
  await expect(paper).toContainText('A summary that stands below the title.');
  // The cautions, and the one for radiated power.
  await expect(paper).toContainText('Results are estimates from the figures entered; confirm them by measurement.');
  await expect(paper).toContainText(/needs the licence and limits of the place/);
  await expect(paper).toContainText(/Exposure of people/);

  // Requirements with their margins.
  const requirements = page.getByRole('table').filter({ has: page.getByRole('columnheader', { name: 'Standing' }) });
  await expect(requirements.getByRole('row', { name: /Dry/ })).toContainText('met, 6.00 dB to spare');
  await expect(requirements.getByRole('row', { name: /Wet/ })).toContainText('not met, 5.50 dB short');

  // Every line, with its entry, its figures in both cases and its linear value.
  const account = page.getByRole('table').filter({ has: page.getByRole('columnheader', { name: 'Entry' }) });
  await expect(account.getByRole('columnheader', { name: 'Wet' })).toBeVisible();
  for (const number of [0, 57, LINES - 5]) {
    await expect(
      account
        .getByRole('row')
        .filter({ hasText: `Loss number ${String(number)}` })
        .first(),
    ).toBeVisible();
  }
  // Each line, the heading of columns and the one of the section.
  await expect(account.getByRole('row')).toHaveCount(LINES + 2);
  await expect(account.getByRole('row').filter({ hasText: 'Level received' })).toContainText('Wet: EIRP - 111.5 dB');
  await expect(account.getByRole('row').filter({ hasText: 'Transmit power' })).toContainText('1 W');

  // Findings in words, sources and notes, the working of what is required.
  await expect(paper).toContainText('Levels are added as decibels');
  await expect(paper).toContainText('Not answered.');
  await expect(paper).toContainText('Source: Invented data sheet');
  await expect(paper).toContainText('A note for the reader');
  await expect(page.getByRole('heading', { name: 'Working of the required lines' })).toBeVisible();
  await expectAccessible();

  // Back on the screen nothing of it is left.
  await page.evaluate(() => window.dispatchEvent(new Event('afterprint')));
  await page.emulateMedia({ media: 'screen' });
  await expect(sheet.account.grid).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Working of the required lines' })).toHaveCount(0);
});

test('the browser prints it on several pages', async ({ sheet, page }) => {
  await sheet.open();
  await sheet.openFileOf('Long account for paper', file);
  const paper = await page.pdf({ format: 'A4' });
  expect(paper.subarray(0, 5).toString('latin1')).toBe('%PDF-');
  // Each page is an object of the type Page; the tree above them is of the type Pages.
  const pages = paper.toString('latin1').match(/\/Type\s*\/Page(?!s)/g) ?? [];
  // 120 lines at some 30 to 45 a page, and what is around them.
  expect(pages.length).toBeGreaterThanOrEqual(4);
  expect(pages.length).toBeLessThanOrEqual(12);
});
