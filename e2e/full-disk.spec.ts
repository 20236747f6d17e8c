// Writes that fail: the page says so plainly, the worksheet can be saved as a file, and a retry brings it into storage.
import type { CDPSession, Page } from '@playwright/test';

import { expect, test } from './fixtures';
import { profileTest } from './own-browser';
import type { WorksheetPage } from './pages/worksheet-page';

async function begin(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.account.draft('P', 'Level', '-80 dBm');
  await sheet.expectSaved();
}

/** Expects that the page tells of the edit that is not saved and gives it out as a file. */
async function expectTold(sheet: WorksheetPage, says: RegExp): Promise<void> {
  const banner = sheet.page.getByRole('alert').filter({ hasText: 'Not saved.' });
  await expect(banner).toContainText(says);
  await expect(sheet.saveState).toHaveText('NOT saved');
  await expect(sheet.account.cell('P', 'entry')).toHaveText('-81 dBm');
  const file = await sheet.saveAsFile(banner.getByRole('button', { name: 'Save as a file' }));
  expect(file.text).toContain('"-81 dBm"');
  // A file is not the browser's storage: the state stays what it is.
  await expect(sheet.saveState).toHaveText('NOT saved');
}

/** Expects that trying again helps, and that the edit is there after a reload. */
async function expectRecovered(sheet: WorksheetPage): Promise<void> {
  await sheet.page.getByRole('button', { name: 'Try again' }).click();
  await sheet.expectSaved();
  await expect(sheet.page.getByRole('alert').filter({ hasText: 'Not saved.' })).toBeHidden();
  await sheet.page.reload();
  await expect(sheet.account.cell('P', 'entry')).toHaveText('-81 dBm');
}

profileTest('no room left in the browser’s storage', async ({ startAgain, baseURL }) => {
  const seed = await startAgain();
  await seed.account.draft('P', 'Level', '-80 dBm');
  await seed.expectSaved();

  // The browser goes by the room that it has seen last for a while, so the room is taken away before the page is opened.
  const { origin } = new URL(baseURL ?? '');
  let protocol: CDPSession | undefined;
  const sheet = await startAgain(async (page) => {
    protocol = await page.context().newCDPSession(page);
    await protocol.send('Storage.overrideQuotaForOrigin', { origin, quotaSize: 1 });
  });
  await sheet.account.retype('P', 'entry', '-81 dBm');
  await expectTold(sheet, /no room left/);
  // Trying again while there is no room changes nothing.
  await sheet.page.getByRole('button', { name: 'Try again' }).click();
  await expect(sheet.saveState).toHaveText('NOT saved');
  await protocol?.send('Storage.overrideQuotaForOrigin', { origin });
  await expectRecovered(sheet);
});

/** Lets each write to the database fail while `failing` is set on the window. */
async function makeWritesFail(page: Page): Promise<void> {
  await page.addInitScript(() => {
    const { prototype } = IDBObjectStore;
    for (const name of ['put', 'add'] as const) {
      const write = Reflect.get(prototype, name) as (...given: unknown[]) => IDBRequest<IDBValidKey>;
      prototype[name] = function (this: IDBObjectStore, ...given: unknown[]) {
        if ('failing' in window) throw new DOMException('made to fail by a test', 'UnknownError');
        return Reflect.apply(write, this, given);
      };
    }
  });
}

test('a storage that fails for some other reason, and edits made meanwhile', async ({ sheet, page }) => {
  await makeWritesFail(page);
  await begin(sheet);
  await page.evaluate(() => Object.assign(window, { failing: true }));
  await sheet.account.retype('P', 'entry', '-81 dBm');
  await expectTold(sheet, /storage failed/);
  // Work goes on, also while nothing is saved, and undo with it.
  await sheet.account.press('Control+End');
  await sheet.account.retype('P', 'label', 'Level at noon');
  await sheet.account.press('Control+z');
  await expect(sheet.account.cell('P', 'label')).toContainText('Level');
  await sheet.account.press('Control+y');
  await expect(sheet.account.cell('P', 'label')).toContainText('Level at noon');
  await expect(sheet.saveState).toHaveText('NOT saved');

  await page.evaluate(() => Reflect.deleteProperty(window, 'failing'));
  await expectRecovered(sheet);
  await expect(sheet.account.cell('P', 'label')).toContainText('Level at noon');
});

test('leaving with edits that are not saved is asked about', async ({ sheet, page }) => {
  await makeWritesFail(page);
  await begin(sheet);
  await page.evaluate(() => Object.assign(window, { failing: true }));
  await sheet.account.retype('P', 'entry', '-81 dBm');
  await expect(sheet.saveState).toHaveText('NOT saved');
  const asked = page.waitForEvent('dialog');
  const leaving = page.close({ runBeforeUnload: true });
  const question = await asked;
  expect(question.type()).toBe('beforeunload');
  await question.dismiss();
  await leaving;
  await expect(sheet.account.cell('P', 'entry')).toHaveText('-81 dBm');
});

test('a browser that gives no storage at all', async ({ sheet, page }) => {
  await page.addInitScript(() => {
    IDBFactory.prototype.open = () => {
      throw new DOMException('made to fail by a test', 'SecurityError');
    };
  });
  await sheet.open();
  await sheet.account.draft('P', 'Level', '-81 dBm');
  await expect(sheet.saveState).toHaveText('NOT saved: no storage');
  const banner = page.getByRole('alert').filter({ hasText: 'Not saved.' });
  await expect(banner).toContainText('gives the page no storage');
  const file = await sheet.saveAsFile(banner.getByRole('button', { name: 'Save as a file' }));
  expect(file.text).toContain('"-81 dBm"');
  // Files are opened all the same.
  await sheet.openFile({ name: file.name, text: file.text.replace('New worksheet', 'Brought along') });
  await expect(sheet.title).toHaveValue('Brought along');
});
