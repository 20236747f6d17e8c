// One worksheet in two tabs of a profile: one of them edits, the other looks, and nothing is overwritten in silence.
import type { BrowserContext, Page } from '@playwright/test';

import { expect, test, watchForErrors } from './fixtures';
import { WorksheetPage } from './pages/worksheet-page';

const LOOKING = 'This worksheet is being edited in another tab; here it can be looked at.';
const LOST = 'Another tab has taken this worksheet over; here it can be looked at.';

/** A further tab of the same profile; it shows the worksheet that was open last. */
async function openTab(context: BrowserContext): Promise<{ sheet: WorksheetPage; errors: readonly string[] }> {
  const page = await context.newPage();
  const errors = watchForErrors(page);
  return { sheet: await new WorksheetPage(page).open(), errors };
}

/** Begins a worksheet of two lines and waits until it is saved. */
async function beginWorksheet(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.account.draft('P', 'Level', '-80 dBm');
  await sheet.account.draft('G', 'Gain', '20 dB');
  await sheet.expectSaved();
}

const noticeOn = (sheet: WorksheetPage, text: string) => sheet.page.getByRole('status').filter({ hasText: text });

test('the second tab is told, takes over, and the first one only looks from then on', async ({
  sheet: first,
  context,
}) => {
  await beginWorksheet(first);
  const { sheet: second, errors } = await openTab(context);
  await expect(second.account.figure('P')).toHaveText('−80.00 dBm');
  await expect(noticeOn(second, LOOKING)).toBeVisible();
  await expect(second.account.grid).toHaveAttribute('aria-readonly', 'true');

  // What is typed there is refused with the reason, and is not kept.
  await second.account.cell('G', 'entry').click();
  await second.account.type('1 dB');
  await second.account.press('Enter');
  await expect(noticeOn(second, 'Take it over to edit it here.').first()).toBeVisible();
  await second.account.press('Escape', 'Escape');
  await expect(second.account.cell('G', 'entry')).toHaveText('20 dB');

  await noticeOn(second, LOOKING).getByRole('button', { name: 'Edit it here instead' }).click();
  await expect(noticeOn(second, LOOKING)).toBeHidden();
  await expect(second.account.grid).toHaveAttribute('aria-readonly', 'false');
  await expect(noticeOn(first, LOST)).toBeVisible();
  await expect(first.account.grid).toHaveAttribute('aria-readonly', 'true');

  await second.account.retype('G', 'entry', '23 dB');
  await second.expectSaved();
  await first.account.cell('G', 'entry').click();
  await first.account.press('Delete');
  await expect(first.account.cell('G', 'entry')).toHaveText('20 dB');

  // Taken back, it has what the other tab has made of it.
  await noticeOn(first, LOST).getByRole('button', { name: 'Edit it here instead' }).click();
  await expect(first.account.cell('G', 'entry')).toHaveText('23 dB');
  await expect(noticeOn(second, LOST)).toBeVisible();
  await first.account.retype('P', 'entry', '-81 dBm');
  await first.expectSaved();
  await first.page.reload();
  await expect(first.account.cell('P', 'entry')).toHaveText('-81 dBm');
  await expect(first.account.cell('G', 'entry')).toHaveText('23 dB');
  expect(errors).toEqual([]);
});

test('when the tab that edits is closed, the other one may edit, with its last edit', async ({
  sheet: first,
  context,
}) => {
  await beginWorksheet(first);
  const { sheet: second, errors } = await openTab(context);
  await expect(noticeOn(second, LOOKING)).toBeVisible();
  await first.account.retype('G', 'entry', '17 dB');
  await first.expectSaved();
  await first.page.goto('about:blank');
  await expect(noticeOn(second, LOOKING)).toBeHidden();
  await expect(second.account.cell('G', 'entry')).toHaveText('17 dB');
  await second.account.retype('G', 'entry', '18 dB');
  await second.expectSaved();
  expect(errors).toEqual([]);
});

test('two tabs on different worksheets are not in each other’s way', async ({ sheet: first, context }) => {
  await beginWorksheet(first);
  const { sheet: second } = await openTab(context);
  const worksheets = await second.showWorksheets();
  await worksheets.begin();
  await second.account.newLine().click();
  await second.account.press('Escape');
  await second.account.draft('Q', 'Another level', '-50 dBm');
  await second.expectSaved();
  await first.account.retype('G', 'entry', '21 dB');
  await first.expectSaved();
  // Each tab has its own again after a reload.
  await second.page.reload();
  await expect(second.account.figure('Q')).toHaveText('−50.00 dBm');
  await first.page.reload();
  await expect(first.account.cell('G', 'entry')).toHaveText('21 dB');
});

test.describe('where the browser has no locks, so that both tabs edit', () => {
  const withoutLocks = (page: Page) =>
    page.addInitScript(() => Object.defineProperty(navigator, 'locks', { value: undefined }));

  /** Two tabs that have the worksheet; the first has saved an edit that the second does not know of and contradicts. */
  async function conflict(first: WorksheetPage, context: BrowserContext): Promise<WorksheetPage> {
    await withoutLocks(first.page);
    await beginWorksheet(first);
    const page = await context.newPage();
    await withoutLocks(page);
    const second = await new WorksheetPage(page).open();
    await expect(second.account.figure('G')).toHaveText('20.00 dB');
    await first.account.retype('G', 'entry', '21 dB');
    await first.expectSaved();
    await second.account.retype('G', 'entry', '33 dB');
    await expect(second.saveState).toHaveText('NOT saved: changed in another tab');
    await expect(second.page.getByRole('dialog', { name: 'Saved differently in another tab' })).toBeVisible();
    return second;
  }

  async function expectStored(first: WorksheetPage, entry: string): Promise<void> {
    await first.page.reload();
    await expect(first.account.cell('G', 'entry')).toHaveText(entry);
  }

  test('an edit that contradicts is kept as a copy, and the other version stays', async ({ sheet: first, context }) => {
    const second = await conflict(first, context);
    await expectStored(first, '21 dB');
    await second.dialog.getByRole('button', { name: 'Keep mine as a copy' }).click();
    await expect(second.dialog).toBeHidden();
    await expect(second.title).toHaveValue('Copy of New worksheet');
    await second.expectSaved();
    await expect(second.account.cell('G', 'entry')).toHaveText('33 dB');
    await expectStored(first, '21 dB');
    const worksheets = await first.showWorksheets();
    await expect(worksheets.entries).toHaveCount(2);
  });

  test('the other version is loaded instead', async ({ sheet: first, context }) => {
    const second = await conflict(first, context);
    await second.dialog.getByRole('button', { name: 'Load the other one' }).click();
    await expect(second.dialog).toBeHidden();
    await expect(second.account.cell('G', 'entry')).toHaveText('21 dB');
    await second.expectSaved();
    await second.account.retype('G', 'entry', '22 dB');
    await second.expectSaved();
    await expectStored(first, '22 dB');
  });

  test('decided later, it stays unsaved and can be saved as a file', async ({ sheet: first, context }) => {
    const second = await conflict(first, context);
    const file = await second.saveAsFile(second.dialog.getByRole('button', { name: 'Save mine as a file' }));
    expect(file.text).toContain('"33 dB"');
    await second.dialog.getByRole('button', { name: 'Decide later' }).click();
    await expect(second.dialog).toBeHidden();
    await expect(second.saveState).toHaveText('NOT saved: changed in another tab');
    await expect(second.account.cell('G', 'entry')).toHaveText('33 dB');
    // The next edit asks again; it overwrites nothing.
    await second.account.retype('P', 'entry', '-82 dBm');
    await expect(second.saveState).toHaveText('NOT saved: changed in another tab');
    await expectStored(first, '21 dB');
    await expect(first.account.cell('P', 'entry')).toHaveText('-80 dBm');
  });
});
