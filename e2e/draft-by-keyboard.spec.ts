// A receiver budget from an empty worksheet to a margin, with the keyboard alone: the page is never touched by a pointer.
import { expect, test } from './fixtures';
import type { ReadLine } from './pages/account';
import type { WorksheetPage } from './pages/worksheet-page';
import { draftBudget } from './quarry-budget';

async function readWithLinear({ account }: WorksheetPage): Promise<readonly ReadLine[]> {
  await account.press('Alt+l');
  return account.readShown();
}

test('a budget of 25 lines is drafted, repaired and read in linear values by keyboard', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  // The cursor waits in the first place to type in.
  await expect(account.newLine()).toBeFocused();
  await draftBudget(sheet);

  const drafted = await account.readAll();
  expect(drafted).toHaveLength(25);
  expect(drafted.find((line) => line.symbol === 'EIRP')?.figures).toEqual(['29.80 dBm']);

  // Levels added as decibels: withheld, with what was meant, and lines below say what they wait for.
  await expect(account.figure('N_tot')).toHaveText('withheld');
  await expect(account.figure('SINR')).toHaveText('waits for N_tot');
  await expect(account.finding('Levels are added as decibels')).toContainText('powersum(N, I)');
  await expect(sheet.findingsButton).toHaveText('1 error');

  // One key brings the cursor there, one key repairs it.
  await account.press('F8');
  await expect(account.cell('N_tot', 'symbol')).toBeFocused();
  await account.press('Alt+Enter');
  await expect(account.cell('N_tot', 'entry')).toHaveText('powersum(N, I)');
  await expect(sheet.findingsButton).toHaveText('No findings');
  // By hand: N = −129.996 + 6.5, I = 30 − 101.892 − 52 + 2.15 − 0.8, C = 29.8 − 95.375 − 11 + 2.15 − 0.8.
  await expect(account.figure('N_tot')).toHaveText('−119.98 dBm');
  await expect(account.figure('M')).toHaveText('34.26 dB');

  await account.inTallWindow(async () => {
    const plain = await account.readShown();
    const linear = await readWithLinear(sheet);
    const linearOf = (symbol: string): string | undefined => {
      const [shown] = linear.find((line) => line.symbol === symbol)?.figures ?? [];
      const [decibels = ''] = plain.find((line) => line.symbol === symbol)?.figures ?? [];
      return shown?.slice(decibels.length);
    };
    expect(linearOf('EIRP')).toBe('955 mW');
    expect(linearOf('Ptx')).toBe('501.2 mW');
    expect(linearOf('Lcab')).toBe('× 1.318');
    expect(linearOf('f')).toBe('');
    // And back.
    expect(await readWithLinear(sheet)).toEqual(plain);
  });
});

test('all of a budget is undone to the empty sheet and done again, the same at each step', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await draftBudget(sheet);
  await account.press('F8', 'Alt+Enter');
  await expect(sheet.findingsButton).toHaveText('No findings');

  await account.inTallWindow(async () => {
    const down = [await account.readShown()];
    while ((down.at(-1)?.length ?? 0) > 0) {
      await account.press('Control+z');
      down.push(await account.readShown());
    }
    const [complete] = down;
    expect(complete).toHaveLength(25);
    await expect(sheet.page.getByRole('region', { name: 'How to begin' })).toBeVisible();
    await sheet.button('More').press('Enter');
    await expect(sheet.menu.getByRole('menuitem', { name: 'Undo' })).toBeDisabled();
    await account.press('Escape');

    const up = [await account.readShown()];
    for (let step = 1; step < down.length; step++) {
      await account.press('Control+y');
      up.push(await account.readShown());
    }
    expect(up.reverse()).toEqual(down);
    await sheet.button('More').press('Enter');
    await expect(sheet.menu.getByRole('menuitem', { name: 'Redo' })).toBeDisabled();
    await account.press('Escape');
    expect(await account.readShown()).toEqual(complete);
  });
  await sheet.expectSaved();
});

test('a case, its own entry and a requirement with its margin, by keyboard', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('P', 'Level at the receiver', '-97 dBm');
  await account.draft('N', 'Noise', '-112 dBm');
  await account.draft('SNR', 'Signal to noise', 'P - N');
  await expect(account.figure('SNR')).toHaveText('15.00 dB');

  // From the cell, Tab back leads to the heading of the case, whose menu adds another.
  await account.press('Shift+Tab');
  await expect(account.caseHeading('Nominal').getByRole('button')).toBeFocused();
  await account.press('Enter');
  await expect(sheet.menu).toBeVisible();
  await account.press('ArrowDown');
  await expect(sheet.menu.getByRole('menuitem', { name: 'Add a case', exact: true })).toBeFocused();
  await account.press('Enter');
  await expect(sheet.page.getByRole('textbox', { name: 'Name of the case' })).toBeFocused();
  await account.type('Sandstorm');
  await account.press('Enter');
  expect(await account.caseNames()).toEqual(['Nominal', 'Sandstorm']);

  // F6 brings the cursor back to the account from wherever it is.
  await account.press('F6');
  await account.press('Control+Home', 'ArrowDown', 'Home', ...Array<string>(5).fill('ArrowRight'));
  await expect(account.figure('P', 1)).toBeFocused();
  await account.type('-103.5 dBm');
  await account.press('Enter');
  await expect(account.figure('P', 0)).toHaveText('−97.00 dBm');
  await expect(account.figure('P', 1)).toContainText('−103.50 dBm');
  await expect(account.figure('P', 1)).toContainText('own entry -103.5 dBm');
  await expect(account.figure('SNR', 1)).toHaveText('8.50 dB');

  // Down to SNR and right to its requirement.
  await account.press('ArrowDown');
  await expect(account.figure('SNR', 1)).toBeFocused();
  await account.press('ArrowRight');
  await account.type('>= 6 dB');
  await account.press('Enter');
  await expect(account.requirement('SNR')).toHaveText('≥ 6 dB ✓ met by 2.50 dB, Sandstorm');

  // A case that is taken out of its own entry inherits again.
  await account.press('ArrowUp', 'ArrowUp', 'ArrowUp', 'Home', ...Array<string>(5).fill('ArrowRight'));
  await expect(account.figure('P', 1)).toBeFocused();
  await account.press('Delete');
  await expect(account.figure('P', 1)).toHaveText('−97.00 dBm');
  await expect(account.requirement('SNR')).toHaveText('≥ 6 dB ✓ met by 9.00 dB');
});

test('Escape puts back what stood in a cell, and what is typed replaces it', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  await account.draft('G', 'Gain', '12 dB');
  await account.press('ArrowUp', 'ArrowRight', 'ArrowRight');
  await expect(account.cell('G', 'entry')).toBeFocused();

  await account.type('99');
  await expect(account.editor).toHaveValue('99');
  await account.press('Escape', 'Escape');
  await expect(account.cell('G', 'entry')).toHaveText('12 dB');
  await expect(account.cell('G', 'entry')).toBeFocused();

  // F2 opens it with the caret at the end; Enter keeps the addition.
  await account.press('F2');
  await account.type(' + 1 dB');
  await account.press('Enter');
  await expect(account.cell('G', 'entry')).toHaveText('12 dB + 1 dB');
  await expect(account.figure('G')).toHaveText('13.00 dB');

  // What is typed at the beginning stays together there.
  await account.press('ArrowUp', 'F2', 'Home');
  await account.type('100 dB - ');
  await expect(account.editor).toHaveValue('100 dB - 12 dB + 1 dB');
  await account.press('Enter');
  await expect(account.figure('G')).toHaveText('89.00 dB');

  // A symbol that cannot be one is refused with a reason and the editor stays.
  await account.press('ArrowUp', 'Home', 'ArrowRight');
  await expect(account.cell('G', 'symbol')).toBeFocused();
  await account.type('k_B');
  await account.press('Enter');
  await expect(account.editor).toHaveValue('k_B');
  await expect(account.editor).toHaveAttribute('aria-invalid', 'true');
  await account.press('Escape');
  await expect(account.cell('G', 'symbol')).toHaveText('G');
});

test.describe('with the clipboard', () => {
  test.use({ permissions: ['clipboard-read', 'clipboard-write'] });

  test('lines selected with Shift and arrows are copied, pasted as lines, cut and undone', async ({ sheet, page }) => {
    const { account } = sheet;
    await sheet.open();
    await account.draft('a', 'First', '1 dB');
    await account.draft('b', 'Second', 'a + 2 dB');
    await account.draft('c', 'Third', '3 dB');
    await account.press('ArrowUp', 'ArrowUp', 'ArrowUp');
    await expect(account.cell('a', 'symbol')).toBeFocused();
    await account.press('Shift+ArrowDown');
    await expect(page.getByRole('row', { selected: true })).toHaveCount(2);
    await account.press('Control+c');

    // For other programs it is a table, parted by tabs.
    const table = await page.evaluate(() => navigator.clipboard.readText());
    expect(table.split(/\r?\n/)[0]).toContain('\t');
    expect(table).toContain('3.00 dB');

    await account.press('Control+v');
    const pasted = await account.readAll();
    expect(pasted.map(({ label, entry }) => [label.replace(/assumed.*/, ''), entry])).toEqual([
      ['First', '1 dB'],
      ['Second', 'a + 2 dB'],
      ['First', '1 dB'],
      // The pasted second line rests on the pasted first one, which had to get another symbol.
      ['Second', 'a_2 + 2 dB'],
      ['Third', '3 dB'],
    ]);
    expect(new Set(pasted.map(({ symbol }) => symbol)).size).toBe(5);
    expect(pasted.map(({ figures }) => figures[0])).toEqual(['1.00 dB', '3.00 dB', '1.00 dB', '3.00 dB', '3.00 dB']);

    await account.press('Control+z');
    expect(await account.readAll()).toHaveLength(3);
    await account.press('Control+a', 'Control+x');
    expect(await account.readAll()).toHaveLength(0);
    await account.press('Control+z');
    expect((await account.readAll()).map(({ symbol }) => symbol)).toEqual(['a', 'b', 'c']);
  });

  test('a table of three columns becomes lines after a look at it, in one step', async ({ sheet, page }) => {
    const { account } = sheet;
    await sheet.open();
    await page.evaluate(() =>
      navigator.clipboard.writeText(
        'Name\tSign\tValue\nMast amplifier gain\tG_mast\t17,5 dB\nMast cable loss\tL_mast\t2,25 dB\n',
      ),
    );
    await account.press('Control+v');
    const dialog = page.getByRole('dialog', { name: 'Paste a table' });
    await expect(dialog).toBeVisible();
    await expect(dialog.getByRole('heading', { name: 'What they become: 2 lines' })).toBeVisible();
    await expect(dialog.getByRole('combobox', { name: 'Column 2 is' })).toHaveValue('symbol');
    // The last button of the dialog takes the table; Tab leads there.
    const take = dialog.getByRole('button', { name: 'Make 2 lines' });
    for (let step = 0; step < 12 && !(await take.evaluate((button) => button === document.activeElement)); step++) {
      await account.press('Tab');
    }
    await expect(take).toBeFocused();
    await account.press('Enter');
    await expect(dialog).toBeHidden();
    const lines = await account.readAll();
    expect(lines.map(({ symbol, figures }) => [symbol, figures[0]])).toEqual([
      ['Gmast', '17.50 dB'],
      ['Lmast', '2.25 dB'],
    ]);
    await account.press('Control+z');
    expect(await account.readAll()).toHaveLength(0);
  });
});
