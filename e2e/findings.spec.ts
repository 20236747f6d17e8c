// Findings: in the account under their line, and in a list of their own; repaired, accepted with a reason, taken back.
import { expect, test } from './fixtures';
import type { WorksheetPage } from './pages/worksheet-page';
import { worksheetFile } from './worksheet-files';

/** One finding of each severity, a line that waits for the first, and lines without any around them. */
const file = worksheetFile({
  id: '5c0c2c55-3d22-4f6a-8f0e-2b6f0f1e0001',
  title: 'Findings of all kinds',
  lines: [
    { id: 'a', symbol: 'P_1', label: 'First level', entry: '-60 dBm' },
    { id: 'b', symbol: 'P_2', label: 'Second level', entry: '-63 dBm' },
    { id: 'c', symbol: 'S', label: 'Both together', entry: 'P_1 + P_2' },
    { id: 'd', symbol: 'CNR', label: 'Carrier to noise', entry: '14 dB' },
    { id: 'e', symbol: 'CIR', label: 'Carrier to interference', entry: '18 dB' },
    { id: 'f', symbol: 'R', label: 'Ratios together', entry: 'CNR + CIR' },
    { id: 'g', symbol: 'x', label: 'With a bare number', entry: 'P_1 + 3' },
    { id: 'h', symbol: 'y', label: 'Rests on the first', entry: 'S - 3 dB' },
  ],
});

const LEVELS = 'Levels are added as decibels';

async function openFindings(sheet: WorksheetPage): Promise<void> {
  await sheet.open();
  await sheet.openFileOf('Findings of all kinds', file);
  await expect(sheet.findingsButton).toHaveText('1 error, 1 warning, 1 note');
}

test('the list leads to each finding and its filters hide and show them', async ({ sheet }) => {
  await openFindings(sheet);
  const list = await sheet.showFindings();
  const groups = list.getByRole('region');
  await expect(groups).toHaveCount(3);
  await expect(list.getByRole('listitem')).toHaveCount(3);

  for (const [group, symbol] of [
    ['Errors', 'S'],
    ['Warnings', 'R'],
    ['Notes', 'x'],
  ] as const) {
    await list.getByRole('region', { name: group }).getByRole('button').first().click();
    await expect(sheet.account.line(symbol)).toHaveAttribute('aria-selected', 'true');
    await expect(sheet.account.line(symbol).locator(':focus')).toHaveCount(1);
  }

  const filter = list.getByRole('group', { name: 'Show' });
  await filter.getByRole('button', { name: 'Warnings 1' }).click();
  await expect(list.getByRole('region', { name: 'Warnings' })).toBeHidden();
  await expect(list.getByRole('listitem')).toHaveCount(2);
  await filter.getByRole('button', { name: 'Warnings 1' }).click();
  await expect(list.getByRole('region', { name: 'Warnings' })).toBeVisible();
  // Lines that only wait for another are told when they are asked for.
  await filter.getByRole('button', { name: 'Waiting 1' }).click();
  await expect(list.getByRole('region', { name: 'Lines that wait for another' })).toContainText('y');
});

test('F8 goes from finding to finding and round the end', async ({ sheet }) => {
  await openFindings(sheet);
  for (const symbol of ['S', 'R', 'x', 'S']) {
    await sheet.account.press('F8');
    await expect(sheet.account.line(symbol).locator(':focus')).toHaveCount(1);
  }
  await sheet.account.press('Shift+F8');
  await expect(sheet.account.line('x').locator(':focus')).toHaveCount(1);
});

test('a repair from the list is one edit, and the list goes on with the next finding', async ({ sheet }) => {
  await openFindings(sheet);
  const list = await sheet.showFindings();
  await expect(sheet.account.figure('y')).toHaveText('waits for S');
  const error = list.getByRole('region', { name: 'Errors' });
  await expect(error).toContainText(LEVELS);
  await error.getByRole('button', { name: /^Repair: .*powersum/ }).click();
  await expect(sheet.account.cell('S', 'entry')).toHaveText('powersum(P_1, P_2)');
  await expect(sheet.account.figure('S')).toHaveText('−58.24 dBm');
  await expect(sheet.account.figure('y')).toHaveText('−61.24 dBm');
  await expect(error).toBeHidden();
  await expect(sheet.findingsButton).toHaveText('1 warning, 1 note');
  await expect(list.locator(':focus')).toHaveCount(1);
  await sheet.account.press('Control+z');
  await expect(sheet.account.cell('S', 'entry')).toHaveText('P_1 + P_2');
  await expect(sheet.account.figure('S')).toHaveText('withheld');
});

test('a warning is accepted with a reason, kept in the file, withdrawn, and falls away with the entry', async ({
  sheet,
}) => {
  await openFindings(sheet);
  const list = await sheet.showFindings();
  const warning = list.getByRole('region', { name: 'Warnings' });
  await warning.getByRole('button', { name: 'Accept…' }).click();
  const reason = list.getByRole('textbox', { name: /^Why it is right as it is/ });
  await expect(reason).toBeFocused();
  // Not without a reason.
  await reason.press('Enter');
  await expect(list.getByRole('alert')).toHaveText(/Write a reason/);
  await reason.fill('A bound from the older report.');
  await reason.press('Enter');

  const accepted = list.getByRole('region', { name: 'Accepted' });
  await expect(accepted).toContainText('A bound from the older report.');
  await expect(warning).toBeHidden();
  await expect(sheet.findingsButton).toHaveText('1 error, 1 note');
  const saved = await sheet.saveAsFile();
  expect(saved.text).toContain('A bound from the older report.');

  await accepted.getByRole('button', { name: 'Withdraw' }).click();
  await expect(warning).toBeVisible();
  await expect(sheet.findingsButton).toHaveText('1 error, 1 warning, 1 note');

  // From the account, by keyboard, through the dialog; then the entry changes.
  await sheet.account.cell('R', 'entry').click();
  await sheet.account.press('Alt+Shift+Enter');
  const dialog = sheet.page.getByRole('dialog', { name: /^Accept: / });
  await expect(dialog.getByRole('textbox')).toBeFocused();
  await sheet.account.type('As before.');
  await sheet.account.press('Enter');
  await expect(dialog).toBeHidden();
  await expect(sheet.findingsButton).toHaveText('1 error, 1 note');
  await sheet.account.retype('R', 'entry', 'CIR + CNR');
  await expect(sheet.findingsButton).toHaveText('1 error, 1 warning, 1 note');
});

test('notes are folded to a mark, errors stand open; both fold by pointer and key', async ({ sheet }) => {
  await openFindings(sheet);
  const { account } = sheet;
  const note = account.finding('number');
  await expect(account.finding(LEVELS)).toBeVisible();
  await expect(note).toBeHidden();
  await account.line('x').getByRole('button', { name: '1 note: show' }).click();
  await expect(note).toBeVisible();
  await account.line('x').getByRole('button', { name: '1 note: fold' }).click();
  await expect(note).toBeHidden();
  await account.cell('x', 'label').click();
  await account.press('Space');
  await expect(note).toBeVisible();

  await account.cell('S', 'label').click();
  await account.press('Space');
  await expect(account.finding(LEVELS)).toBeHidden();
  await expect(account.line('S').getByRole('button', { name: '1 error: show' })).toBeVisible();
  // Folded, the error is still told by the line itself.
  await expect(account.cell('S', 'entry')).toHaveAttribute('aria-invalid', 'true');
  await expect(account.figure('S')).toHaveText('withheld');
});

test('a finding that opens does not move the row that is being edited', async ({ sheet }) => {
  await openFindings(sheet);
  const { account } = sheet;
  const topOf = async (symbol: string): Promise<number> => {
    const box = await account.line(symbol).boundingBox();
    return box === null ? Number.NaN : Math.round(box.y);
  };
  // Its own finding opens below it.
  await account.cell('CIR', 'entry').click();
  const before = await topOf('CIR');
  await account.type('CNR + CNR');
  expect(await topOf('CIR')).toBe(before);
  await account.press('F2');
  await expect(account.finding(/ratio/i)).toHaveCount(2);
  expect(await topOf('CIR')).toBe(before);

  // Findings that open above it, under lines that rest on it, or close there.
  await account.cell('CNR', 'entry').click();
  const place = await topOf('CNR');
  await account.retype('P_1', 'entry', '-60 dBm');
  await account.cell('CNR', 'entry').click();
  await account.type('-40 dBm');
  await account.press('F2');
  expect(await topOf('CNR')).toBe(place);
});

test('findings above the edited row close and open without moving it', async ({ sheet }) => {
  const { account } = sheet;
  await sheet.open();
  const lines = Array.from({ length: 30 }, (_, at) => ({
    id: `l${String(at)}`,
    symbol: `x_${String(at)}`,
    label: `Line ${String(at)}`,
    // Five lines near the top rest on the last one.
    entry: at < 5 ? 'P + Q' : '1 dB',
  }));
  const rests = worksheetFile({
    id: '5c0c2c55-3d22-4f6a-8f0e-2b6f0f1e0002',
    title: 'Rests on what is below',
    lines: [
      { id: 'p', symbol: 'P', label: 'Level', entry: '-60 dBm' },
      ...lines.slice(0, 12),
      { id: 'q', symbol: 'Q', label: 'Gain or level', entry: '3 dB' },
      ...lines.slice(12),
    ],
  });
  await sheet.openFileOf('Rests on what is below', rests);
  await account.cell('Q', 'entry').click();
  const topOf = async (): Promise<number> => Math.round((await account.line('Q').boundingBox())?.y ?? Number.NaN);
  const before = await topOf();
  await account.type('3 dBm');
  await account.press('F2');
  await expect(sheet.findingsButton).toHaveText('5 errors');
  await expect.poll(topOf).toBe(before);
  await account.press('Control+z');
  await expect(sheet.findingsButton).toHaveText('No findings');
  await expect.poll(topOf).toBe(before);
});
