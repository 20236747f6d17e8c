// Auditing a budget: linear values, the working with its links and shares, what rests on what, search, folded sections.
import { expect, test } from './fixtures';
import type { WorksheetPage } from './pages/worksheet-page';

async function openBuoy(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.beginFromStarter('Harbour buoy uplink');
}

/** Brings the cursor to a line, wherever in the sheet it is, as a person finds it. */
async function find(sheet: WorksheetPage, symbol: string, label: string): Promise<void> {
  await sheet.button('Search').click();
  await sheet.page.getByRole('search').getByRole('textbox', { name: 'Search' }).fill(label);
  await sheet.account.press('Enter', 'Escape');
  await expect(sheet.account.line(symbol)).toHaveAttribute('aria-selected', 'true');
}

test('each decibel figure has its linear value beside it, in the account and in the working', async ({ sheet }) => {
  await openBuoy(sheet);
  await sheet.button('Linear values').click();
  await expect(sheet.button('Linear values')).toHaveAttribute('aria-pressed', 'true');
  const lines = await sheet.account.readAll();
  const figureOf = (symbol: string): string | undefined => lines.find((line) => line.symbol === symbol)?.figures[0];
  expect(figureOf('Ptx')).toBe('13.98 dBm25 mW');
  expect(figureOf('Lquay')).toBe('7.00 dB× 5.012');
  expect(figureOf('B')).toBe('125 kHz');
  for (const { symbol, figures } of lines) {
    for (const figure of figures) {
      const own = figure.replace(/\s*, own entry.*$/, '');
      if (/^[−\d.]+ dB(m|W|i|d|Hz)?(?![/\w])/.test(own)) {
        expect(own, symbol).toMatch(/^[−\d.]+ dB\w*?(× ?[\d.×⁻⁰¹²³⁴-⁹]+|[\d.]+ \D+)$/);
      }
    }
  }
  await sheet.account.cell('EIRP', 'symbol').click();
  const working = await sheet.showWorking();
  await expect(working).toContainText('23.06 mW');
  // Kept over a reload.
  await sheet.page.reload();
  await expect(sheet.button('Linear values')).toHaveAttribute('aria-pressed', 'true');
});

test('the working gives each step, its symbols lead to their lines, and shares make up the whole', async ({
  sheet,
}) => {
  await openBuoy(sheet);
  await find(sheet, 'N_tot', 'Noise and interference together');
  const { working } = sheet;
  await expect(working.getByRole('heading', { level: 2 })).toHaveText('Working of Ntot');

  // In symbols, with values, in linear terms.
  const steps = working.getByRole('definition');
  await expect(steps.first()).toContainText('powersum(N, Iferry, Icrane, Ipump)');
  expect(await steps.count()).toBeGreaterThanOrEqual(3);
  await expect(steps.nth(1)).toContainText('dBm');

  // Shares in both cases make up 100 %, but for rounding.
  const shares = async (): Promise<readonly number[]> => {
    const texts = await working
      .getByRole('listitem')
      .getByText(/^(under )?[\d.]+ %$/)
      .allTextContents();
    return texts.map((text) => (text.startsWith('under') ? 0 : Number.parseFloat(text)));
  };
  const calm = await shares();
  expect(calm).toHaveLength(4);
  expect(Math.abs(calm.reduce((sum, share) => sum + share, 0) - 100)).toBeLessThanOrEqual(2);
  await working.getByRole('radio', { name: 'Storm' }).check({ force: true });
  await expect.poll(shares).not.toEqual(calm);
  const storm = await shares();
  expect(Math.abs(storm.reduce((sum, share) => sum + share, 0) - 100)).toBeLessThanOrEqual(2);

  // What uses it, and back.
  await expect(working.getByRole('heading', { name: 'Used by' })).toBeVisible();
  await working.getByRole('button', { name: 'SINR', exact: true }).click();
  await expect(working.getByRole('heading', { level: 2 })).toHaveText('Working of SINR');
  await expect(sheet.account.line('SINR')).toHaveAttribute('aria-selected', 'true');
  await working.getByRole('definition').first().getByRole('button', { name: 'Ntot' }).click();
  await expect(working.getByRole('heading', { level: 2 })).toHaveText('Working of Ntot');
  await expect(sheet.account.line('N_tot').locator(':focus')).toHaveCount(1);
});

test('an assumed kind is told and confirmed in one step, which the file then has', async ({ sheet }) => {
  await sheet.open();
  await sheet.account.draft('L_roof', 'Through the roof', '6 dB');
  await sheet.account.cell('L_roof', 'symbol').click();
  const { working } = sheet;
  await expect(sheet.account.cell('L_roof', 'label')).toContainText('assumed: a loss');
  await expect(working.getByRole('combobox', { name: 'Kind' })).toHaveValue('loss');
  await expect(working.getByText('assumed from the name')).toBeVisible();
  const before = await sheet.saveAsFile();
  await working.getByRole('button', { name: 'Confirm: kind loss' }).click();
  await expect(working.getByText('as declared')).toBeVisible();
  const after = await sheet.saveAsFile();
  const declared = (text: string): number => text.split('"quantity": "loss"').length - 1;
  expect([declared(before.text), declared(after.text)]).toEqual([0, 1]);
  await expect(sheet.account.cell('L_roof', 'label')).toHaveText('Through the roof');
});

test('threads lead from the selected line to what it rests on and to what rests on it', async ({ sheet }) => {
  await openBuoy(sheet);
  await sheet.account.inTallWindow(async () => {
    // EIRP rests on three lines, and one rests on it. Threads are drawn, not told: the working tells the same in words.
    await sheet.account.cell('EIRP', 'symbol').click();
    await expect(sheet.account.grid.locator('path.rests-on')).toHaveCount(3);
    await expect(sheet.account.grid.locator('path.used-by')).toHaveCount(1);
    await sheet.account.cell('f', 'symbol').click();
    await expect(sheet.account.grid.locator('path.rests-on')).toHaveCount(0);
    // The free-space loss and the ferry's interference.
    await expect(sheet.account.grid.locator('path.used-by')).toHaveCount(2);
  });
});

test('search finds labels, entries and notes, in folded sections too', async ({ sheet, page }) => {
  await openBuoy(sheet);
  const section = 'Noise and interference at the antenna port';
  await sheet.account.press('/');
  const bar = page.getByRole('search');
  const field = bar.getByRole('textbox', { name: 'Search' });
  await expect(field).toBeFocused();
  await sheet.account.type('ferry');
  // Three lines by symbol or label, two by their entries.
  await expect(bar.getByRole('status')).toHaveText('4 lines');
  await sheet.account.press('Enter');
  await expect(bar.getByRole('status')).toHaveText('1 of 4');
  // What is found is marked where it stands, and no longer once the search is closed.
  await expect(sheet.account.line('EIRP_ferry').locator('mark')).toHaveText(['EIRPferry', 'Ferry']);
  await expect(field).toBeFocused();
  await expect(sheet.account.line('EIRP_ferry')).toHaveAttribute('aria-selected', 'true');
  await sheet.account.press('Enter');
  await expect(sheet.account.line('d_ferry')).toHaveAttribute('aria-selected', 'true');
  await sheet.account.press('Shift+Enter');
  await expect(sheet.account.line('EIRP_ferry')).toHaveAttribute('aria-selected', 'true');
  await sheet.account.press('Escape');
  await expect(bar).toBeHidden();
  await expect(sheet.account.grid.locator('mark')).toHaveCount(0);
  await expect(sheet.account.line('EIRP_ferry').locator(':focus')).toHaveCount(1);

  await sheet.account
    .section(section)
    .getByRole('button', { name: `Fold the lines of ${section}` })
    .click();
  await expect(sheet.account.line('EIRP_ferry')).toBeHidden();
  await sheet.account.press('/');
  await sheet.account.type('breakwater');
  await sheet.account.press('Enter');
  await expect(sheet.account.line('L_wall')).toHaveAttribute('aria-selected', 'true');
  await field.fill('no such words');
  await expect(bar.getByRole('status')).toHaveText('nothing found');
});

test('sections fold to their heading with a count, by pointer and by key', async ({ sheet }) => {
  await openBuoy(sheet);
  const { account } = sheet;
  const heading = account.section('Channel');
  await heading.getByRole('button', { name: 'Fold the lines of Channel' }).click();
  await expect(account.line('f')).toBeHidden();
  await expect(heading).toContainText('2 lines');
  const fold = heading.getByRole('button', { name: 'Show the lines of Channel' });
  await expect(fold).toBeFocused();
  await expect(fold).toHaveAttribute('aria-expanded', 'false');
  await account.press('Space');
  await expect(account.line('f')).toBeVisible();
  // Nothing of it is in the worksheet: there is nothing to undo.
  await sheet.button('More').click();
  await expect(sheet.menu.getByRole('menuitem', { name: 'Undo' })).toBeDisabled();
});
