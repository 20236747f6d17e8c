import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { createRawSnippet } from 'svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import ModalDialog from '../../../src/ui/dialogs/ModalDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(() => {
  cleanup();
  document.body.replaceChildren();
});

const content = (html: string) => createRawSnippet(() => ({ render: () => html }));

function show(html = '<p>What is in it</p>') {
  const onClose = vi.fn();
  const shown = render(ModalDialog, { title: 'A question', onClose, children: content(html) });
  return { onClose, ...shown };
}

describe('a dialog', () => {
  it('is open, and named by its title', () => {
    show();
    const dialog = screen.getByRole<HTMLDialogElement>('dialog', { name: 'A question' });
    expect(dialog.open).toBe(true);
    expect(dialog.textContent).toContain('What is in it');
  });

  it('asks to be taken away when the browser closes it (Escape) and when its button is pressed', async () => {
    const { onClose } = show();
    screen.getByRole('dialog').dispatchEvent(new Event('close'));
    expect(onClose).toHaveBeenCalledTimes(1);
    await fireEvent.click(screen.getByRole('button', { name: 'Close' }));
    expect(onClose).toHaveBeenCalledTimes(2);
  });

  it('closes by a press outside only where nothing can be lost', async () => {
    const { rerender } = show();
    expect(screen.getByRole('dialog').getAttribute('closedby')).toBe('closerequest');
    await rerender({ closesOutside: true });
    expect(screen.getByRole('dialog').getAttribute('closedby')).toBe('any');
  });
});

describe('focus', () => {
  it('goes to the title, and back to where it was', () => {
    const opener = document.createElement('button');
    document.body.append(opener);
    opener.focus();
    const { unmount } = show();
    expect(document.activeElement?.textContent).toBe('A question');
    unmount();
    expect(document.activeElement).toBe(opener);
  });

  it('goes to what is marked for it', () => {
    show('<p>Search <input aria-label="words" data-first-focus></p>');
    expect(document.activeElement?.getAttribute('aria-label')).toBe('words');
  });
});
