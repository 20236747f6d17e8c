import { cleanup, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { keysOf } from '../../../src/ui/dialogs/chord-keys';
import KeysDialog from '../../../src/ui/dialogs/KeysDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

describe('the keys of a shortcut', () => {
  it.each([
    ['F2', ['F2']],
    ['Ctrl+Shift+Z', ['Ctrl', 'Shift', 'Z']],
    ['+', ['+']],
    ['Ctrl++', ['Ctrl', '+']],
    ['Alt+↑', ['Alt', '↑']],
  ])('%s', (chord, keys) => expect(keysOf(chord)).toEqual(keys));
});

describe('the overview', () => {
  it('shows each group with what its keys do, all ways to press them', () => {
    const groups = [
      { title: 'Moving', keys: [{ keys: ['ArrowUp'], says: 'One row up' }] },
      { title: 'The page', keys: [{ keys: ['Ctrl+Y', 'Ctrl+Shift+Z'], says: 'Do again' }] },
    ];
    render(KeysDialog, { groups, onClose: vi.fn() });
    const dialog = screen.getByRole('dialog', { name: 'Keys' });
    expect(
      within(dialog)
        .getAllByRole('heading', { level: 3 })
        .map((title) => title.textContent),
    ).toEqual(['Moving', 'The page']);
    const does = within(dialog).getByText('Do again');
    expect(does.previousElementSibling?.textContent.replace(/\s+/g, ' ').trim()).toBe('Ctrl+Y or Ctrl+Shift+Z');
    expect(dialog.querySelectorAll('kbd')).toHaveLength(6);
  });
});
