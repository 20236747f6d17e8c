// Ten thousand lines: only those in view are in the page, the one with the cursor always, and typing is not held up.
import { expect, test } from './fixtures';
import { largeFile } from './worksheet-files';

const COUNT = 10_000;
/** Rows that may be in the page at once: a view's worth, and some beyond its edges. */
const MOST_ROWS = 200;

test('rows out of view are not in the page, the one with the cursor always is', async ({ sheet, page }) => {
  const { account } = sheet;
  await sheet.open();
  await sheet.openFileOf('Long survey', largeFile(COUNT));
  await expect(account.figure('P_1')).toHaveText('−40.00 dBm');
  // Each line, the heading, the section's own row and the two places for more.
  await expect(account.grid).toHaveAttribute('aria-rowcount', String(COUNT + 4));
  expect(await account.rows.count()).toBeLessThan(MOST_ROWS);

  // By wheel, far away from the cursor and back: the cursor's row stays in the page and keeps the focus.
  await account.cell('P_3', 'entry').click();
  await account.grid.hover();
  const isAt = (edge: 'head' | 'foot'): Promise<boolean> =>
    account.grid.evaluate(
      (grid, wanted) =>
        wanted === 'head' ? grid.scrollTop < 1 : grid.scrollTop + grid.clientHeight >= grid.scrollHeight - 1,
      edge,
    );
  for (const edge of ['foot', 'head'] as const) {
    while (!(await isAt(edge))) {
      const before = await account.grid.evaluate((grid) => grid.scrollTop);
      await page.mouse.wheel(0, edge === 'foot' ? 40_000 : -40_000);
      await expect.poll(() => account.grid.evaluate((grid) => grid.scrollTop)).not.toBe(before);
      expect(await account.rows.count()).toBeLessThan(MOST_ROWS);
      await expect(account.cell('P_3', 'entry')).toBeFocused();
    }
    await expect(account.lineNumber(edge === 'foot' ? COUNT : 1)).toBeInViewport();
  }

  // By key, to the foot and back.
  await account.press('Control+End');
  await expect(account.rows.last().locator(':focus')).toHaveCount(1);
  await expect(account.lineNumber(COUNT)).toBeInViewport();
  for (let step = 0; step < 5; step++) {
    await account.press('PageUp');
    await expect(account.grid.locator(':focus')).toHaveCount(1);
    await expect(account.grid.locator(':focus')).toBeInViewport();
  }
  await account.press('Control+Home');
  await expect(account.grid.locator(':focus')).toBeInViewport();
  await account.expectOneTabStop();
});

/** Tasks of over 50 ms on the page's thread, gathered while something is done. */
interface LongTasks {
  readonly durations: readonly number[];
}

test('an edit in the middle, with keystrokes that are not held up', async ({ sheet, page }, testInfo) => {
  const { account } = sheet;
  await sheet.open();
  await sheet.openFileOf('Long survey', largeFile(COUNT));
  // To the middle by search.
  await account.press('/');
  await account.type('Level 5005');
  await account.press('Enter', 'Escape');
  await expect(account.line('P_5005')).toHaveAttribute('aria-selected', 'true');
  await account.cell('P_5005', 'entry').click();
  await sheet.expectSaved();

  await page.evaluate(() => {
    const durations: number[] = [];
    const observer = new PerformanceObserver((list) => durations.push(...list.getEntries().map((one) => one.duration)));
    observer.observe({ type: 'longtask' });
    Object.assign(window, { longTasks: { durations } });
  });
  const typed = 'P_5004 - 2 dB + 12.25 dB - 1 dB';
  let mostRows = 0;
  for (const character of typed) {
    await account.type(character);
    mostRows = Math.max(mostRows, await account.rows.count());
  }
  await expect(account.editor).toHaveValue(typed);
  // The observer hears of a task after it has ended: an idle moment lets it.
  const { durations } = await page.evaluate(
    () =>
      new Promise<LongTasks>((resolve) => {
        const { longTasks } = window as unknown as { longTasks: LongTasks };
        requestIdleCallback(() => resolve(longTasks));
      }),
  );
  const longest = Math.max(0, ...durations);
  testInfo.annotations.push({
    type: 'keystrokes',
    description: `${String(typed.length)} keystrokes, ${String(durations.length)} tasks over 50 ms, the longest ${longest.toFixed(0)} ms`,
  });
  expect(typed.length).toBeGreaterThanOrEqual(30);
  expect(mostRows).toBeLessThan(MOST_ROWS);

  await account.press('Enter');
  // −40 − (5000 mod 37) dBm at the head of the ten, three losses, then the edit; the ten below go on from it.
  await expect(account.figure('P_5004')).toHaveText('−45.75 dBm');
  await expect(account.figure('P_5005')).toHaveText('−36.50 dBm');
  await expect(account.figure('P_5006')).toHaveText('−36.75 dBm');
  await sheet.expectSaved();
  await account.press('Control+z');
  await expect(account.figure('P_5005')).toHaveText('−46.00 dBm');
});
