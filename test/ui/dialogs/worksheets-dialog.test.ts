import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { fail, ok } from '../../../src/base';
import type { CopyEntry, WorksheetEntry } from '../../../src/store';
import type { WorksheetActions } from '../../../src/ui/dialogs/worksheet-actions';
import WorksheetsDialog from '../../../src/ui/dialogs/WorksheetsDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

const NOW = new Date(2026, 10, 3, 15, 0).getTime();
const HOUR = 3_600_000;

const worksheet = (id: string, more: Partial<WorksheetEntry> = {}): WorksheetEntry => ({
  ...{ id, title: `Sheet ${id}`, createdAt: NOW - 90 * HOUR, savedAt: NOW - HOUR, deletedAt: null },
  ...{ rev: 1, size: 14_200, lineCount: 25, standing: 'usable' },
  ...more,
});

const copy = (rev: number): CopyEntry => ({
  ...{
    rev,
    worksheetId: 'a',
    title: 'Sheet a',
    savedAt: NOW - rev * HOUR,
    size: 900,
    lineCount: rev,
    quarantined: null,
  },
});

function makeActions() {
  const done = () => vi.fn(() => Promise.resolve(ok(undefined)));
  return {
    ...{ open: done(), begin: done(), openFile: done(), beginFrom: done(), rename: done(), duplicate: done() },
    ...{ remove: done(), restore: done(), emptyTrash: done(), openCopy: done() },
    copies: vi.fn<WorksheetActions['copies']>(() => Promise.resolve(ok([copy(1), copy(2)]))),
  } satisfies WorksheetActions;
}

const starters = [{ id: 'hop', title: 'A hop', summary: 'Two masts and a valley.' }];

function show(entries: readonly WorksheetEntry[], actions: WorksheetActions = makeActions()) {
  const onClose = vi.fn();
  const given = { entries, starters, actions, onClose, persistence: 'refused' as const, estimate: null, now: NOW };
  return { onClose, ...render(WorksheetsDialog, given) };
}

/** As a person does: the button has the focus when it is pressed. */
const press = (name: string | RegExp) => {
  const button = screen.getByRole('button', { name, hidden: true });
  button.focus();
  return fireEvent.click(button);
};

describe('the list', () => {
  it('shows what is kept, the last saved first, with what is known of each', async () => {
    const { rerender } = show([
      worksheet('a', { savedAt: NOW - 5 * HOUR }),
      worksheet('b'),
      worksheet('c', { deletedAt: NOW }),
    ]);
    const list = screen.getByRole('region', { name: 'Kept in this browser' });
    const titles = within(list).getAllByRole('button', { name: /^Sheet/ });
    expect(titles.map((title) => title.textContent)).toEqual(['Sheet b', 'Sheet a']);
    expect(list.textContent.replace(/\s+/g, ' ')).toContain('saved today 14:00 · 25 lines · 14 kB');
    expect(within(list).queryByText('open here')).toBeNull();
    await rerender({ openId: 'b' });
    expect(within(list).getAllByText('open here')).toHaveLength(1);
  });

  it('says what to do where there is nothing', () => {
    show([]);
    expect(screen.getByText(/No worksheet yet\. Begin a new one, open a file/)).toBeDefined();
  });

  it('says why it cannot be read', async () => {
    const { rerender } = show([]);
    await rerender({ fault: 'The storage failed. Reload the page.' });
    expect(screen.getByText('The storage failed. Reload the page.').closest('[role=alert]')).not.toBeNull();
    expect(screen.queryByText(/No worksheet yet/)).toBeNull();
  });

  it('offers for a damaged worksheet its earlier states, but not to open, rename or duplicate it', () => {
    show([worksheet('a', { standing: 'unreadable' })]);
    expect(screen.getByText(/Damaged in storage/)).toBeDefined();
    expect(screen.queryByRole('button', { name: 'Sheet a' })).toBeNull();
    expect(screen.queryByRole('button', { name: 'Rename “Sheet a”' })).toBeNull();
    expect(screen.getByRole('button', { name: 'Earlier states of “Sheet a”' })).toBeDefined();
  });

  it('opens a worksheet of a later version, and offers nothing that would write it', () => {
    show([worksheet('a', { standing: 'newer' })]);
    expect(screen.getByText(/later version of this page/)).toBeDefined();
    expect(screen.getByRole('button', { name: 'Sheet a' })).toBeDefined();
    for (const deed of ['Rename', 'Duplicate', 'Delete'])
      expect(screen.queryByRole('button', { name: `${deed} “Sheet a”` })).toBeNull();
  });

  it('tells how storage stands', async () => {
    const { rerender } = show([]);
    expect(screen.getByRole('region', { name: 'Storage' }).textContent).toMatch(/may clear them when it runs short/);
    await rerender({ persistence: 'granted', estimate: { usedBytes: 1_200_000, quotaBytes: 10.7e9 } });
    const told = screen.getByRole('region', { name: 'Storage' }).textContent;
    expect(told).toMatch(/promised to keep them/);
    expect(told).toMatch(/1\.2 MB of the 10\.7 GB/);
  });
});

describe('deeds', () => {
  it.each([
    ['Sheet a', 'open', ['a']],
    ['Duplicate “Sheet a”', 'duplicate', ['a']],
    ['Delete “Sheet a”', 'remove', ['a']],
    ['New worksheet', 'begin', []],
    ['Open a file…', 'openFile', []],
    [/^A hop/, 'beginFrom', ['hop']],
  ] as const)('%s', async (button, deed, given) => {
    const actions = makeActions();
    show([worksheet('a')], actions);
    await press(button);
    expect(actions[deed].mock.calls).toEqual([given]);
  });

  it('tells when a deed failed', async () => {
    const actions = { ...makeActions(), begin: () => Promise.resolve(fail('There is no room left.')) };
    show([worksheet('a')], actions);
    await press('New worksheet');
    expect((await screen.findByText('There is no room left.')).closest('[role=alert]')).not.toBeNull();
  });

  it('renames in place: Enter keeps, blanks round it are left out', async () => {
    const actions = makeActions();
    show([worksheet('a')], actions);
    await press('Rename “Sheet a”');
    const field = screen.getByRole<HTMLInputElement>('textbox', { name: 'New title of “Sheet a”' });
    expect(document.activeElement).toBe(field);
    await fireEvent.input(field, { target: { value: '  Harbour  ' } });
    await fireEvent.submit(present(field.closest('form')));
    expect(actions.rename.mock.calls).toEqual([['a', 'Harbour']]);
    expect(screen.queryByRole('textbox')).toBeNull();
  });

  it('leaves the title as it was on Escape, and keeps the dialog', async () => {
    const actions = makeActions();
    const { onClose } = show([worksheet('a')], actions);
    await press('Rename “Sheet a”');
    const isDone = await fireEvent.keyDown(screen.getByRole('textbox'), { key: 'Escape' });
    expect(isDone).toBe(false);
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(actions.rename).not.toHaveBeenCalled();
    expect(onClose).not.toHaveBeenCalled();
    await vi.waitFor(() => expect(document.activeElement?.getAttribute('aria-label')).toBe('Rename “Sheet a”'));
  });

  it('takes no empty title', async () => {
    const actions = makeActions();
    show([worksheet('a')], actions);
    await press('Rename “Sheet a”');
    await fireEvent.input(screen.getByRole('textbox'), { target: { value: '   ' } });
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Rename' }).disabled).toBe(true);
    await fireEvent.submit(present(screen.getByRole('textbox').closest('form')));
    expect(actions.rename).not.toHaveBeenCalled();
  });
});

describe('the trash', () => {
  it('offers to undo what was just deleted', async () => {
    const actions = makeActions();
    const { rerender } = show([worksheet('a'), worksheet('b')], actions);
    await press('Delete “Sheet a”');
    await rerender({ entries: [worksheet('a', { deletedAt: NOW }), worksheet('b')] });
    expect(screen.getByRole('status').textContent).toContain('“Sheet a” is in the trash.');
    await vi.waitFor(() => expect(document.activeElement?.textContent).toBe('Undo'));
    await press('Undo');
    expect(actions.restore.mock.calls).toEqual([['a']]);
    await rerender({ entries: [worksheet('a'), worksheet('b')] });
    expect(screen.queryByRole('button', { name: 'Undo' })).toBeNull();
  });

  it('gives back what was deleted earlier', async () => {
    const actions = makeActions();
    show([worksheet('a', { deletedAt: NOW - HOUR })], actions);
    expect(screen.getByText('In the trash (1)')).toBeDefined();
    await press('Restore “Sheet a”');
    expect(actions.restore.mock.calls).toEqual([['a']]);
  });

  it('is emptied only after asking once more', async () => {
    const actions = makeActions();
    show([worksheet('a', { deletedAt: NOW - HOUR })], actions);
    await press('Empty the trash…');
    expect(screen.getByText(/Delete 1 worksheet with their earlier states\? This cannot be undone\./)).toBeDefined();
    await vi.waitFor(() => expect(document.activeElement?.textContent).toBe('Keep'));
    await press('Keep');
    expect(actions.emptyTrash).not.toHaveBeenCalled();
    await press('Empty the trash…');
    await press('Delete for good');
    expect(actions.emptyTrash).toHaveBeenCalledTimes(1);
  });
});

describe('earlier states', () => {
  it('are read when asked for, and open one by one', async () => {
    const actions = makeActions();
    show([worksheet('a')], actions);
    expect(actions.copies).not.toHaveBeenCalled();
    await press('Earlier states of “Sheet a”');
    const list = await screen.findByRole('list', { name: 'Earlier states of “Sheet a”' });
    expect(within(list).getAllByRole('listitem')).toHaveLength(2);
    await fireEvent.click(within(list).getByRole('button', { name: 'Open the state of today 13:00' }));
    expect(actions.openCopy.mock.calls).toEqual([[copy(2)]]);
  });

  it.each([
    ['none', ok([]), /No earlier state of this worksheet is kept yet/],
    ['a fault', fail('The storage failed.'), 'The storage failed.'],
  ] as const)('are told to be missing: %s', async (_, answer, words) => {
    show([worksheet('a')], { ...makeActions(), copies: () => Promise.resolve(answer) });
    await press('Earlier states of “Sheet a”');
    expect(await screen.findByText(words)).toBeDefined();
  });
});

function present<T>(value: T | null): T {
  if (value === null) throw new Error('it is not there');
  return value;
}
