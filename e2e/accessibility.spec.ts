// Each screen and each dialog against WCAG 2.2 A and AA as far as a program can check it, and by keyboard what it cannot.
import type { Locator } from '@playwright/test';

import { expect, test } from './fixtures';
import type { WorksheetPage } from './pages/worksheet-page';

async function openBuoy(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.beginFromStarter('Harbour buoy uplink');
}

/** A worksheet with an error, a warning and a note. */
async function openWithFindings(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.account.draft('P', 'Level', '-60 dBm');
  await sheet.account.draft('S', 'Levels', 'P + P');
  await sheet.account.draft('CNR', 'Carrier to noise', '14 dB');
  await sheet.account.draft('R', 'Ratios', 'CNR + CNR');
  await sheet.account.draft('x', 'Number', 'P + 3');
  await expect(sheet.findingsButton).toHaveText('1 error, 1 warning, 1 note');
}

test.describe('axe finds nothing', () => {
  test('on the empty page', async ({ sheet, expectAccessible }) => {
    await sheet.open();
    await expect(sheet.page.getByRole('button', { name: /Microwave hop/ })).toBeVisible();
    await expectAccessible();
  });

  for (const scheme of ['light', 'dark'] as const) {
    test(`on a worksheet with its working and linear values, ${scheme}`, async ({ sheet, page, expectAccessible }) => {
      await page.emulateMedia({ colorScheme: scheme });
      await openBuoy(sheet);
      await sheet.button('Linear values').click();
      await sheet.account.cell('EIRP', 'symbol').click();
      await expect(sheet.working.getByRole('heading', { level: 2 })).toHaveText('Working of EIRP');
      await expectAccessible();
    });

    test(`on findings in the account and in the list, ${scheme}`, async ({ sheet, page, expectAccessible }) => {
      await page.emulateMedia({ colorScheme: scheme });
      await openWithFindings(sheet);
      const list = await sheet.showFindings();
      await sheet.account.line('x').getByRole('button', { name: '1 note: show' }).click();
      await expectAccessible();
      await list.getByRole('region', { name: 'Warnings' }).getByRole('button', { name: 'Accept…' }).click();
      await expect(list.getByRole('textbox')).toBeVisible();
      await expectAccessible();
    });

    test(`while typing, with suggestions open, ${scheme}`, async ({ sheet, page, expectAccessible }) => {
      await page.emulateMedia({ colorScheme: scheme });
      await openBuoy(sheet);
      await sheet.account.cell('L_fs', 'entry').click();
      await sheet.account.type('free_space_loss(d, f) + P');
      await expect(sheet.account.suggestions.first()).toBeVisible();
      await sheet.account.press('ArrowDown');
      await expect(sheet.account.chosenSuggestion).toHaveCount(1);
      // The option that is chosen is told to listeners by the field itself.
      const id = await sheet.account.chosenSuggestion.getAttribute('id');
      await expect(sheet.account.editor).toHaveAttribute('aria-activedescendant', id ?? 'none');
      await expectAccessible();
    });
  }

  test('in a window of 390 px, and nothing is cut off at its side', async ({ sheet, page, expectAccessible }) => {
    await page.setViewportSize({ width: 390, height: 844 });
    await openBuoy(sheet);
    await expectAccessible();
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(over).toBeLessThanOrEqual(0);
    await sheet.showWorksheets();
    await expectAccessible();
    const box = await sheet.dialog.boundingBox();
    expect(box?.x).toBeGreaterThanOrEqual(0);
    expect((box?.x ?? 0) + (box?.width ?? 0)).toBeLessThanOrEqual(390);
  });

  for (const [item, dialog] of [
    ['Functions and units', 'Functions, constants, units'],
    ['Keys', 'Keys'],
    ['About', 'About Levelwright'],
  ] as const) {
    test(`in the dialog “${dialog}”, which gives the focus back`, async ({ sheet, expectAccessible }) => {
      await openBuoy(sheet);
      await sheet.button('More').press('Enter');
      await expectAccessible();
      await sheet.menu.getByRole('menuitem', { name: item }).press('Enter');
      await expect(sheet.page.getByRole('dialog', { name: dialog })).toBeVisible();
      await expectAccessible();
      await expectFocusWithin(sheet.dialog);
      await sheet.account.press('Escape');
      await expect(sheet.dialog).toBeHidden();
      await expect(sheet.page.locator(':focus')).toHaveCount(1);
      await expect(sheet.page.locator('body:focus')).toHaveCount(0);
    });
  }

  test('in the list of worksheets, its trash and earlier states', async ({ sheet, expectAccessible }) => {
    await openBuoy(sheet);
    const worksheets = await sheet.showWorksheets();
    await expectAccessible();
    await worksheets.action('Duplicate', 'Harbour buoy uplink').click();
    await worksheets.action('Delete', 'Copy of Harbour buoy uplink').click();
    await worksheets.dialog.getByText('In the trash (1)').click();
    await worksheets.action('Earlier states of', 'Harbour buoy uplink').click();
    await worksheets.action('Rename', 'Harbour buoy uplink').click();
    await expect(worksheets.dialog.getByRole('textbox')).toBeFocused();
    await expectAccessible();
    await sheet.account.press('Escape', 'Escape');
    await expect(worksheets.dialog).toBeHidden();
    await expect(sheet.button('Worksheets')).toBeFocused();
  });

  test('in the menus of a case, a line and a section', async ({ sheet, expectAccessible }) => {
    await openBuoy(sheet);
    await sheet.account.caseHeading('Calm').getByRole('button').press('Enter');
    await expect(sheet.menu).toBeVisible();
    await expectAccessible();
    await sheet.account.press('Escape');
    await expect(sheet.account.caseHeading('Calm').getByRole('button')).toBeFocused();

    await sheet.account.cell('P_tx', 'label').click();
    await sheet.account.press('Shift+F10');
    await expect(sheet.menu).toBeVisible();
    await expectAccessible();
    await sheet.account.press('Escape');
    await expect(sheet.account.cell('P_tx', 'label')).toBeFocused();
  });

  test('in the dialog that accepts a finding, and focus goes back', async ({ sheet, expectAccessible }) => {
    await openWithFindings(sheet);
    await sheet.account.cell('R', 'entry').click();
    await sheet.account.press('Alt+Shift+Enter');
    await expect(sheet.dialog).toBeVisible();
    await expectAccessible();
    await sheet.account.press('Escape');
    await expect(sheet.dialog).toBeHidden();
    await expect(sheet.account.cell('R', 'entry')).toBeFocused();
  });

  test.describe('with the clipboard', () => {
    test.use({ permissions: ['clipboard-read', 'clipboard-write'] });

    test('in the preview of a pasted table', async ({ sheet, page, expectAccessible }) => {
      await sheet.open();
      await page.evaluate(() => navigator.clipboard.writeText('Name\tValue\nGain\t1,234\nOdd\t=A1+B1\n'));
      await sheet.account.press('Control+v');
      await expect(page.getByRole('dialog', { name: 'Paste a table' })).toBeVisible();
      await expectAccessible();
      await sheet.account.press('Escape');
      await expect(sheet.dialog).toBeHidden();
      await expect(sheet.account.newLine()).toBeFocused();
    });
  });
});

async function expectFocusWithin(place: Locator): Promise<void> {
  await expect.poll(() => place.evaluate((element) => element.contains(document.activeElement))).toBe(true);
}

test('the account is a grid with one tab stop, its rows and columns numbered', async ({ sheet, page }) => {
  await openBuoy(sheet);
  const { account } = sheet;
  await account.inTallWindow(async () => {
    const places = await account.rows.evaluateAll((rows) =>
      rows.map((row) => Number(row.getAttribute('aria-rowindex'))),
    );
    expect(places).toEqual(places.map((_, at) => at + 1));
  });
  const columns = await account.grid
    .getByRole('columnheader')
    .evaluateAll((headings) => headings.map((heading) => Number(heading.getAttribute('aria-colindex'))));
  expect(columns).toEqual(columns.map((_, at) => at + 1));
  await expect(account.grid).toHaveAttribute('aria-colcount', String(columns.length));
  await expect(account.grid).toHaveAttribute('aria-multiselectable', 'true');
  await expect(account.grid.getByRole('gridcell', { name: 'Line 1', exact: true })).toHaveAttribute(
    'aria-readonly',
    'true',
  );

  // The tab stop goes with the cursor, stays when the focus leaves, and Tab leaves and comes back by it.
  await account.expectOneTabStop();
  await account.cell('P_tx', 'entry').click();
  await account.press('ArrowDown', 'ArrowRight');
  await account.expectOneTabStop();
  const cursor = account.figure('a_coax');
  await expect(cursor).toBeFocused();
  await account.press('Tab');
  await expect.poll(() => account.grid.evaluate((grid) => grid.contains(document.activeElement))).toBe(false);
  await account.press('Shift+Tab');
  await expect(cursor).toBeFocused();
  await expect(page.getByRole('row', { selected: true })).toHaveCount(1);

  // On a heading's button, too, there is one.
  await account.press('Control+Home');
  await expect(account.section('Channel').getByRole('button', { name: /^Fold/ })).toBeFocused();
  await account.expectOneTabStop();
});

test('each button of the header is reached by Tab and works by Enter and Space', async ({ sheet, page }) => {
  await openBuoy(sheet);
  const buttons = sheet.header.getByRole('button');
  const names = await buttons.evaluateAll((all) => all.map((one) => one.getAttribute('aria-label') ?? one.textContent));
  expect(names.length).toBeGreaterThanOrEqual(8);
  await sheet.title.focus();
  const reached: (string | null)[] = [];
  for (let step = 0; step < names.length; step++) {
    await sheet.account.press('Tab');
    const name = await page.evaluate(() => {
      const { activeElement } = document;
      return activeElement?.getAttribute('aria-label') ?? activeElement?.textContent ?? null;
    });
    reached.push(name);
  }
  expect(reached).toEqual(names);

  const linear = sheet.button('Linear values');
  await linear.press('Space');
  await expect(linear).toHaveAttribute('aria-pressed', 'true');
  await linear.press('Enter');
  await expect(linear).toHaveAttribute('aria-pressed', 'false');
  await sheet.findingsButton.press('Enter');
  await expect(sheet.findings).toBeVisible();
  await sheet.button('Working').press('Enter');
  await expect(sheet.working).toBeVisible();
  await sheet.button('Search').press('Enter');
  await expect(page.getByRole('search').getByRole('textbox')).toBeFocused();
});

test('what an edit does is said once, politely', async ({ sheet, page }) => {
  await openBuoy(sheet);
  const said = page.locator('[aria-live="polite"]');
  await sheet.account.retype('P_tx', 'entry', '20 mW');
  await expect(said).toContainText(/\d+ lines recalculated/);
  await sheet.account.retype('L_feed', 'entry', 'P_tx + P_tx');
  await expect(said).toContainText(/1 new error/);
  await sheet.account.press('Control+z');
  await expect(said).toContainText(/Undone/);
});

test('with reduced motion nothing is animated', async ({ sheet, page }) => {
  await openBuoy(sheet);
  const running = (): Promise<number> => page.evaluate(() => document.getAnimations().length);
  const glow = async (entry: string): Promise<number> => {
    await page.evaluate(() => {
      const made = Object.assign(window, { animationsMade: 0 });
      const animate = Reflect.get(Element.prototype, 'animate') as (...given: unknown[]) => Animation;
      Element.prototype.animate = function (this: Element, ...given: unknown[]) {
        made.animationsMade += 1;
        return Reflect.apply(animate, this, given);
      };
    });
    await sheet.account.retype('P_tx', 'entry', entry);
    await expect(sheet.account.cell('P_tx', 'entry')).toHaveText(entry);
    return page.evaluate(() => (window as unknown as { animationsMade: number }).animationsMade);
  };
  // Otherwise a figure that has changed glows, so that this test can fail.
  expect(await glow('21 mW')).toBeGreaterThan(0);
  await page.emulateMedia({ reducedMotion: 'reduce' });
  expect(await glow('22 mW')).toBe(0);
  await expect.poll(running).toBe(0);
});

test('forced colours keep what is selected and what is wrong apart', async ({ sheet, page, expectAccessible }) => {
  await page.emulateMedia({ forcedColors: 'active' });
  await openWithFindings(sheet);
  await sheet.account.cell('S', 'entry').click();
  const ring = await sheet.account.cell('S', 'entry').evaluate((cell) => getComputedStyle(cell).outlineStyle);
  expect(ring).not.toBe('none');
  // Severity is told in words, not by colour.
  await expect(sheet.account.finding('Levels')).toContainText('Error:');
  await expectAccessible();
});
