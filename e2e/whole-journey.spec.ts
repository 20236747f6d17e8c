// The whole way in one go, as a person goes it: drafted by keyboard, stopped and repaired, looked at in linear values, undone
// and done again, found after the browser was killed, sent as a file, opened elsewhere, and evaluated on the command line.
import { writeFile } from 'node:fs/promises';

import { evaluate, expectSameFigures } from './command-line';
import { expect, watchForErrors } from './fixtures';
import { profileTest } from './own-browser';
import { WorksheetPage } from './pages/worksheet-page';
import { draftBudget } from './quarry-budget';

profileTest('a budget from an empty worksheet to a colleague’s screen', async ({ startAgain, browser }, testInfo) => {
  profileTest.slow();
  const sheet = await startAgain();
  const { account } = sheet;
  const errors = watchForErrors(sheet.page);
  await draftBudget(sheet);

  await expect(account.figure('N_tot')).toHaveText('withheld');
  await account.press('F8', 'Alt+Enter');
  await expect(account.cell('N_tot', 'entry')).toHaveText('powersum(N, I)');
  await expect(account.figure('M')).toHaveText('34.26 dB');
  await expect(sheet.findingsButton).toHaveText('No findings');

  await account.press('Alt+l');
  const complete = await account.readAll();
  expect(complete).toHaveLength(25);
  expect(complete.find(({ symbol }) => symbol === 'EIRP')?.figures).toEqual(['29.80 dBm955 mW']);

  await account.inTallWindow(async () => {
    let steps = 0;
    while ((await account.readShown()).length > 0) {
      await account.press('Control+z');
      steps += 1;
    }
    // At least one step for each cell that was typed.
    expect(steps).toBeGreaterThanOrEqual(3 * 25);
    for (let step = 0; step < steps; step++) await account.press('Control+y');
    expect(await account.readShown()).toEqual(complete);
  });
  await sheet.expectSaved();
  expect(errors).toEqual([]);

  const found = await startAgain();
  expect(await found.account.readAll()).toEqual(complete);
  await found.button('Linear values').click();
  const plain = await found.account.readAll();
  const file = await found.saveAsFile();

  const colleague = await browser.newContext();
  const page = await colleague.newPage();
  const colleaguesErrors = watchForErrors(page);
  const received = await new WorksheetPage(page).open();
  await received.openFile(file);
  await expect(received.account.line('P_tx')).toBeVisible();
  expect(await received.account.readAll()).toEqual(plain);
  await received.button('Linear values').click();
  expect(await received.account.readAll()).toEqual(complete);
  expect(colleaguesErrors).toEqual([]);
  await colleague.close();

  const path = testInfo.outputPath(file.name);
  await writeFile(path, file.text);
  const evaluated = await evaluate(path);
  expect(evaluated.findings).toEqual([]);
  expectSameFigures(plain, evaluated);
});
