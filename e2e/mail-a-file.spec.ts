// A worksheet goes out as a file and comes in again: in another profile and on the command line it has the same figures.
import { writeFile } from 'node:fs/promises';

import { evaluate, expectSameFigures, withoutOwnEntry, type Evaluated } from './command-line';
import { expect, test, watchForErrors } from './fixtures';
import { WorksheetPage } from './pages/worksheet-page';
import { worksheetFile } from './worksheet-files';

test('a file opened in a fresh profile, dropped there, and evaluated by the command has the same figures', async ({
  sheet,
  browser,
}, testInfo) => {
  await sheet.open();
  await sheet.beginFromStarter('Harbour buoy uplink');
  // An edit of one's own, so that it is not the example that comes back.
  await sheet.account.retype('L_quay', 'entry', '6.25 dB');
  await sheet.expectSaved();
  const sent = await sheet.account.readAll();
  expect(sent.length).toBeGreaterThanOrEqual(25);
  const file = await sheet.saveAsFile();
  expect(file.name).toBe('harbour-buoy-uplink.budget.json');
  const path = testInfo.outputPath(file.name);
  await writeFile(path, file.text);

  for (const way of ['chosen', 'dropped'] as const) {
    await test.step(`${way} in a fresh profile`, async () => {
      const profile = await browser.newContext();
      const page = await profile.newPage();
      const errors = watchForErrors(page);
      const received = await new WorksheetPage(page).open();
      if (way === 'chosen') await received.openFile(file);
      else await received.dropFile(path);
      await expect(received.title).toHaveValue('Harbour buoy uplink');
      expect(await received.account.readAll()).toEqual(sent);
      await received.expectSaved();
      // Sent back, it is the same file.
      const returned = await received.saveAsFile();
      expect(returned.text).toBe(file.text);
      expect(errors).toEqual([]);
      await profile.close();
    });
  }

  const evaluated = await evaluate(path);
  expect(evaluated.findings).toEqual([]);
  expectSameFigures(sent, evaluated);
});

test('withheld and waiting figures are the same on the command line', async ({ sheet }, testInfo) => {
  const file = worksheetFile({
    id: '0b0f3a9e-5d1c-4c59-9d0e-1f6d2a7c1111',
    title: 'Two levels',
    cases: [
      { id: 'near', name: 'Near' },
      { id: 'far', name: 'Far' },
    ],
    lines: [
      { id: 'a', symbol: 'P_1', label: 'One level', entry: '-60 dBm', byCase: { far: '-71.125 dBm' } },
      { id: 'b', symbol: 'P_2', label: 'Another level', entry: '2 pW' },
      { id: 'c', symbol: 'S', label: 'Both', entry: 'powersum(P_1, db(P_2))' },
      { id: 'd', symbol: 'x', label: 'Far only', entry: '3 dB', byCase: { far: 'P_1 + P_1' } },
      { id: 'e', symbol: 'y', label: 'Rests on it', entry: 'x - 1 dB' },
    ],
  });
  const path = testInfo.outputPath(file.name);
  await writeFile(path, file.text);
  await sheet.open();
  await sheet.openFileOf('Two levels', file);
  const lines = await sheet.account.readAll();
  expect(withoutOwnEntry(lines[3]?.figures[1] ?? '')).toBe('withheld');
  expect(lines[4]?.figures).toEqual(['2.00 dB', 'waits for x']);
  // An error finding: the command says so by its exit status, with the figures all the same.
  const failure: unknown = await evaluate(path).catch((error: unknown) => error);
  expect(failure).toMatchObject({ code: 1 });
  expectSameFigures(lines, JSON.parse((failure as { stdout: string }).stdout) as Evaluated);
});

test('a bad file is refused with the place in words, and the open worksheet is not touched', async ({ sheet }) => {
  await sheet.open();
  await sheet.account.draft('P', 'Kept as it is', '-50 dBm');
  await sheet.expectSaved();
  const before = await sheet.account.readAll();
  const good = worksheetFile({
    id: '0b0f3a9e-5d1c-4c59-9d0e-1f6d2a7c2222',
    title: 'Not to be seen',
    lines: [
      { id: 'a', symbol: 'A', label: 'First', entry: '1 dB' },
      { id: 'b', symbol: 'B', label: 'Second', entry: '2 dB' },
    ],
  });
  const bad: readonly (readonly [text: string, says: RegExp])[] = [
    [good.text.replace('"2 dB"', '17'), /sections\[0\]\.lines\[1\]\.entry/],
    [good.text.slice(0, -40), /made-for-a-test\.budget\.json was not opened\. .+/],
    [good.text.replace('levelwright-worksheet', 'something-else'), /was not opened\. .+/],
    [good.text.replace('"id": "b"', '"id": "a"'), /sections\[0\]\.lines\[1\]/],
    [`${'['.repeat(1000)}${']'.repeat(1000)}`, /was not opened\. .+/],
    ['', /was not opened\. .+/],
  ];
  for (const [text, says] of bad) {
    await sheet.openFile({ name: good.name, text });
    const notice = sheet.page.getByRole('status').filter({ hasText: 'was not opened' });
    await expect(notice).toHaveText(says);
    await expect(sheet.title).toHaveValue('New worksheet');
    expect(await sheet.account.readAll()).toEqual(before);
    await notice.getByRole('button', { name: 'Dismiss' }).click();
    await expect(notice).toBeHidden();
  }
  await sheet.expectSaved();
});

test('hostile texts of a file stand there as text and do nothing', async ({ sheet, page }) => {
  const dialogs: string[] = [];
  page.on('dialog', (dialog) => {
    dialogs.push(dialog.message());
    void dialog.dismiss();
  });
  const script = '<script>alert(1)</script>';
  const image = '<img src=x onerror="alert(2)">';
  const vector = '"><svg/onload=alert(3)>';
  const file = worksheetFile({
    id: '0b0f3a9e-5d1c-4c59-9d0e-1f6d2a7c3333',
    title: `Title ${script}`,
    summary: image,
    section: `Section ${image}`,
    cases: [{ id: 'only', name: `Case ${image}` }],
    lines: [
      {
        id: '<b>',
        symbol: 'a',
        label: `Label ${script}`,
        entry: `1 dB ${image}`,
        note: `Note ${image}`,
        source: vector,
      },
      { id: 'b', symbol: image, label: vector, entry: script, unit: image },
      { id: 'c', symbol: 'javascript:alert(4)', label: '{{7*7}} ${alert(5)}', entry: 'a + "<b>"', unit: script },
      { id: 'd', symbol: 'P', label: 'Level', entry: '-70 dBm', requirement: { atLeast: image } },
      {
        id: 'e',
        symbol: 'x',
        label: 'Accepted',
        entry: 'P + 3',
        accepted: [{ code: 'number-as-decibels', entry: 'P + 3', reason: image }],
      },
    ],
  });
  await sheet.open();
  await sheet.openFileOf(`Title ${script}`, file);
  const lines = await sheet.account.readAll();
  expect(lines[0]?.label).toBe(`Label ${script}`);
  expect(lines[0]?.entry).toBe(`1 dB ${image}`);
  expect(lines[1]?.label).toBe(vector);
  expect(lines[2]?.label).toContain('{{7*7}} ${alert(5)}');
  await expect(sheet.account.section(`Section ${image}`)).toBeVisible();
  await expect(sheet.account.caseHeading(`Case ${image}`)).toBeVisible();

  // Everywhere else where these texts are shown: working, findings, the list of worksheets, search, print.
  await sheet.account.cellOf(1, 'label').click();
  await expect(sheet.working).toContainText(`Label ${script}`);
  await expect(sheet.working.getByRole('textbox', { name: 'Note' })).toHaveValue(`Note ${image}`);
  await sheet.account.cellOf(2, 'label').click();
  await expect(sheet.working).toContainText(vector);
  const findings = await sheet.showFindings();
  await expect(findings).toContainText(image);
  const { dialog } = await sheet.showWorksheets();
  await expect(dialog.getByRole('button', { name: `Title ${script}`, exact: true })).toBeVisible();
  await page.keyboard.press('Escape');
  await page.evaluate(() => window.dispatchEvent(new Event('beforeprint')));
  await page.emulateMedia({ media: 'print' });
  await expect(page.getByRole('heading', { level: 1, name: `Title ${script}` })).toBeVisible();
  await expect(page.getByText(`Note ${image}`).first()).toBeVisible();

  // No element has been made of them.
  await expect(page.locator('img, svg[onload], script:not([src])')).toHaveCount(0);
  expect(dialogs).toEqual([]);
  // Breaches of the content security policy are errors on the page, which fail the test at its end.
});
