import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import ConflictDialog from '../../../src/ui/dialogs/ConflictDialog.svelte';
import SaveTroubleBanner from '../../../src/ui/dialogs/SaveTroubleBanner.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

const press = (name: string) => fireEvent.click(screen.getByRole('button', { name }));

describe('two tabs that saved differently', () => {
  const now = new Date(2026, 10, 3, 15, 0).getTime();

  function show() {
    const ways = { onKeepAsCopy: vi.fn(), onLoadTheirs: vi.fn(), onSaveFile: vi.fn(), onClose: vi.fn() };
    const mine = { title: 'Hop', lineCount: 26 };
    const theirs = { title: 'Hop, short', lineCount: 24, savedAt: now - 60_000 };
    render(ConflictDialog, { mine, theirs, now, ...ways });
    return ways;
  }

  it('shows both versions and says that nothing was overwritten', () => {
    show();
    const text = screen.getByRole('dialog', { name: 'Saved differently in another tab' }).textContent;
    expect(text).toContain('“Hop”, 26 lines, not saved');
    expect(text).toContain('“Hop, short”, 24 lines, saved today 14:59');
    expect(text).toMatch(/Nothing was overwritten/);
  });

  it.each([
    ['Keep mine as a copy', 'onKeepAsCopy'],
    ['Load the other one', 'onLoadTheirs'],
    ['Save mine as a file', 'onSaveFile'],
    ['Decide later', 'onClose'],
  ] as const)('%s', async (button, way) => {
    const ways = show();
    await press(button);
    for (const [name, called] of Object.entries(ways)) expect(called).toHaveBeenCalledTimes(name === way ? 1 : 0);
  });
});

describe('edits that are not saved', () => {
  it('are told at once, in words, with two ways on', async () => {
    const [onSaveFile, onRetry] = [vi.fn(), vi.fn()];
    render(SaveTroubleBanner, { sentence: 'There is no room left.', onSaveFile, onRetry });
    expect(screen.getByRole('alert').textContent).toMatch(/Not saved\. There is no room left\./);
    expect(screen.queryByText('What the browser said')).toBeNull();
    await press('Save as a file');
    await press('Try again');
    expect([onSaveFile.mock.calls.length, onRetry.mock.calls.length]).toEqual([1, 1]);
  });

  it('may have a third way, and the browser’s own words', async () => {
    const run = vi.fn();
    const [onSaveFile, onRetry] = [vi.fn(), vi.fn()];
    const other = { word: 'Keep it again', run };
    render(SaveTroubleBanner, { sentence: 'It is gone.', detail: 'QuotaExceededError', onSaveFile, onRetry, other });
    expect(screen.getByText('QuotaExceededError')).toBeDefined();
    await press('Keep it again');
    expect(run).toHaveBeenCalledTimes(1);
  });
});
