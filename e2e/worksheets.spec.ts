// The worksheets of this browser: begun, named, duplicated, deleted and had back; examples; a reload keeps what was open.
import { expect, test } from './fixtures';

test('a worksheet is begun, renamed, duplicated, deleted and had back', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('P', 'Level', '-70 dBm');
  await sheet.title.fill('Tunnel repeater');
  await sheet.title.press('Enter');
  await sheet.expectSaved();

  const worksheets = await sheet.showWorksheets();
  await expect(worksheets.entries).toHaveCount(1);
  await expect(worksheets.entry('Tunnel repeater')).toContainText('open here');
  await expect(worksheets.entry('Tunnel repeater')).toContainText('1 line');

  await worksheets.action('Rename', 'Tunnel repeater').click();
  await worksheets.dialog
    .getByRole('textbox', { name: 'New title of “Tunnel repeater”' })
    .fill('Tunnel repeater, north');
  await account.press('Enter');
  await expect(worksheets.entry('Tunnel repeater, north')).toBeVisible();
  await expect(sheet.title).toHaveValue('Tunnel repeater, north');

  await worksheets.action('Duplicate', 'Tunnel repeater, north').click();
  const copy = 'Copy of Tunnel repeater, north';
  await expect(worksheets.entry(copy)).toBeVisible();
  await expect(worksheets.entries).toHaveCount(2);

  await worksheets.action('Delete', copy).click();
  await expect(worksheets.entries).toHaveCount(1);
  await worksheets.dialog.getByRole('status').getByRole('button', { name: 'Undo' }).click();
  await expect(worksheets.entries).toHaveCount(2);

  // The copy is one of its own: an edit there leaves the other as it is.
  await worksheets.dialog.getByRole('button', { name: copy, exact: true }).click();
  await expect(worksheets.dialog).toBeHidden();
  await expect(sheet.title).toHaveValue(copy);
  await account.retype('P', 'entry', '-75 dBm');
  await sheet.expectSaved();
  const again = await sheet.showWorksheets();
  await again.dialog.getByRole('button', { name: 'Tunnel repeater, north', exact: true }).click();
  await expect(again.dialog).toBeHidden();
  await expect(account.cell('P', 'entry')).toHaveText('-70 dBm');
});

test('the open worksheet is deleted with its last edit and restored from the trash', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await sheet.title.fill('Short-lived');
  await sheet.title.press('Enter');
  await account.newLine().click();
  await account.type('P');
  await account.press('Enter');
  await account.retype('P', 'entry', '-70 dBm');
  const worksheets = await sheet.showWorksheets();
  await worksheets.action('Delete', 'Short-lived').click();
  await expect(worksheets.entries).toHaveCount(0);
  await expect(sheet.title).toHaveValue('New worksheet');
  await worksheets.dialog.getByText('In the trash (1)').click();
  await worksheets.dialog.getByRole('button', { name: 'Restore “Short-lived”' }).click();
  await worksheets.dialog.getByRole('button', { name: 'Short-lived', exact: true }).click();
  await expect(account.cell('P', 'entry')).toHaveText('-70 dBm');
});

test('an earlier state is opened as a worksheet of its own', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('P', 'Level', '-70 dBm');
  await sheet.expectSaved();
  await account.retype('P', 'entry', '-71 dBm');
  await sheet.expectSaved();
  const worksheets = await sheet.showWorksheets();
  await worksheets.action('Earlier states of', 'New worksheet').click();
  await worksheets.dialog
    .getByRole('list', { name: /^Earlier states/ })
    .getByRole('button')
    .first()
    .click();
  await expect(worksheets.dialog).toBeHidden();
  await expect(account.cell('P', 'entry')).toHaveText('-70 dBm');
  const again = await sheet.showWorksheets();
  await expect(again.entries).toHaveCount(2);
});

test('what is opened from the list is ready to be typed in', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('P', 'Level', '-70 dBm');
  await sheet.expectSaved();
  const worksheets = await sheet.showWorksheets();
  await worksheets.begin();
  await expect(account.newLine()).toBeFocused();
  await account.draft('Q', 'Another level', '-50 dBm');
  await expect(account.figure('Q')).toHaveText('−50.00 dBm');
  await sheet.expectSaved();

  const again = await sheet.showWorksheets();
  await again.dialog.getByRole('button', { name: /^Harbour buoy uplink/ }).click();
  await expect(sheet.title).toHaveValue('Harbour buoy uplink');
  await expect(account.cell('f', 'symbol')).toBeFocused();
});

for (const title of ['Harbour buoy uplink', 'Microwave hop between two ridges', 'Small satellite downlink']) {
  test(`the example “${title}” has no findings, meets its requirements, and is there after a reload`, async ({
    sheet,
    page,
  }) => {
    const { account } = sheet;
    await sheet.open();
    await sheet.beginFromStarter(title);
    await expect(sheet.findingsButton).toHaveText('No findings');
    const requirements = account.rows.getByRole('gridcell').filter({ hasText: /^\s*[≥≤] ?\S/ });
    const lines = await account.inTallWindow(async () => {
      expect(await requirements.count()).toBeGreaterThan(0);
      for (const text of await requirements.allTextContents()) expect(text).toMatch(/✓ met by /);
      await expect(account.grid).not.toContainText('withheld');
      return account.readShown();
    });
    expect(lines.length).toBeGreaterThan(20);
    await expect(account.caseHeading('').getByRole('button')).toHaveCount(0);
    expect(await account.caseNames()).toHaveLength(2);

    await page.reload();
    await sheet.expectReady();
    await expect(sheet.title).toHaveValue(title);
    expect(await account.readAll()).toEqual(lines);
  });
}

test('a file of a worksheet that is here already, but differs, is asked about', async ({ sheet, page }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('P', 'Level', '-70 dBm');
  await sheet.expectSaved();
  const file = await sheet.saveAsFile();
  await account.retype('P', 'entry', '-72 dBm');
  await sheet.expectSaved();

  const question = page.getByRole('dialog', { name: 'This worksheet is here already' });
  await sheet.openFile(file);
  await question.getByRole('button', { name: 'Cancel' }).click();
  await expect(account.cell('P', 'entry')).toHaveText('-72 dBm');

  await sheet.openFile(file);
  await question.getByRole('button', { name: 'Open the file beside it' }).click();
  await expect(account.cell('P', 'entry')).toHaveText('-70 dBm');
  await sheet.expectSaved();

  await sheet.openFile(file);
  await question.getByRole('button', { name: 'Replace what is here' }).click();
  await expect(question).toBeHidden();
  await sheet.expectSaved();
  const worksheets = await sheet.showWorksheets();
  await expect(worksheets.entries).toHaveCount(2);
});
