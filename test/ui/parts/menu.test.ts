// A menu: the focus goes in, arrows go round, a choice or Escape closes it.
import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';

import Menu from '../../../src/ui/parts/Menu.svelte';

beforeAll(() => {
  HTMLElement.prototype.showPopover = (): void => undefined;
});
afterEach(cleanup);

function show() {
  const chosen = vi.fn();
  const closed = vi.fn();
  const anchor = document.createElement('button');
  document.body.append(anchor);
  const item = (label: string) => ({ label, run: () => chosen(label) as unknown as undefined });
  const items = [item('Rename'), { ...item('Move'), disabled: true }, item('Remove')];
  render(Menu, { props: { items, label: 'Case', anchor, onclose: closed } });
  return { chosen, closed, anchor };
}

const focused = (): string => document.activeElement?.textContent.trim() ?? '';

describe('menu', () => {
  it('takes the focus, and arrows go round what can be chosen', async () => {
    show();
    const menu = screen.getByRole('menu', { name: 'Case' });
    expect(focused()).toBe('Rename');
    for (const [key, on] of [
      ['ArrowDown', 'Remove'],
      ['ArrowDown', 'Rename'],
      ['ArrowUp', 'Remove'],
      ['Home', 'Rename'],
      ['End', 'Remove'],
    ] as const) {
      await fireEvent.keyDown(menu, { key });
      expect(focused()).toBe(on);
    }
  });

  it('does what is chosen, then closes', async () => {
    const { chosen, closed } = show();
    await fireEvent.click(screen.getByRole('menuitem', { name: 'Remove' }));
    expect(chosen).toHaveBeenCalledWith('Remove');
    expect(closed).toHaveBeenCalledWith(true);
    expect(chosen.mock.invocationCallOrder[0]).toBeLessThan(closed.mock.invocationCallOrder[0] ?? 0);
  });

  it('closes with Escape and gives the focus back', async () => {
    const { chosen, closed, anchor } = show();
    await fireEvent.keyDown(screen.getByRole('menu'), { key: 'Escape' });
    expect(closed).toHaveBeenCalledWith(false);
    expect(document.activeElement).toBe(anchor);
    expect(chosen).not.toHaveBeenCalled();
  });

  it('closes when something else is pressed, and leaves the focus to that', async () => {
    const { closed, anchor } = show();
    await fireEvent.pointerDown(document.body);
    expect(closed).toHaveBeenCalledWith(true);
    expect(document.activeElement).not.toBe(anchor);
  });
});
