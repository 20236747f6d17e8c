// The grid in a page: its roles, its one tab stop, typing into a cell, and the row with the cursor always there.
import { cleanup, render, screen, within } from '@testing-library/svelte';
import { flushSync, tick } from 'svelte';
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import { allLines, type Worksheet } from '../../../src/worksheet';
import { sheet } from '../../app/support';
import GridStage from './GridStage.svelte';

beforeAll(() => {
  // jsdom measures nothing: rows keep the heights expected of them.
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe(): void {
        return undefined;
      }
      unobserve(): void {
        return undefined;
      }
      disconnect(): void {
        return undefined;
      }
    },
  );
  HTMLElement.prototype.showPopover = function show(this: HTMLElement): void {
    this.setAttribute('data-shown', '');
  };
  HTMLElement.prototype.scrollIntoView = (): void => undefined;
  window.matchMedia = (media: string): MediaQueryList =>
    Object.assign(new EventTarget(), {
      media,
      matches: true,
      onchange: null,
      addListener: () => undefined,
      removeListener: () => undefined,
    });
});

afterEach(cleanup);

let session: Session;

async function show(worksheet: Worksheet): Promise<void> {
  session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(worksheet));
  render(GridStage, { session });
  flushSync();
  await tick();
}

const focused = (): HTMLElement => document.activeElement as HTMLElement;
const press = async (key: string, more: KeyboardEventInit = {}): Promise<void> => {
  focused().dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
  flushSync();
  await tick();
  await tick();
};
const type = (text: string): void => {
  const input = focused() as HTMLInputElement;
  input.value = text;
  input.dispatchEvent(new InputEvent('input', { bubbles: true }));
  flushSync();
};

describe('a small worksheet', () => {
  beforeEach(async () => {
    await show(
      sheet([
        ['N', 'Noise', '-117 dBm'],
        ['I', 'Interference', '-110 dBm', { byCase: { storm: '-105 dBm' } }],
        ['N_tot', 'Both', 'N + I', { requirement: { atMost: '-100 dBm' } }],
      ]),
    );
  });

  it('is a grid whose rows and columns are numbered', () => {
    const grid = screen.getByRole('grid', { name: /Test sheet/ });
    expect(grid.getAttribute('aria-rowcount')).toBe('8');
    const heads = within(grid).getAllByRole('columnheader');
    expect(grid.getAttribute('aria-colcount')).toBe(String(heads.length));
    const rows = within(grid).getAllByRole('row');
    expect(rows.map((row) => row.getAttribute('aria-rowindex'))).toEqual(['1', '2', '3', '4', '5', '6', '7', '8']);
    const cells = within(rows[2] as HTMLElement).getAllByRole('gridcell');
    expect(cells.map((cell) => cell.getAttribute('aria-colindex'))).toEqual(heads.map((_, i) => String(i + 1)));
  });

  it('has one tab stop, which has the focus', () => {
    const stops = [...document.querySelectorAll('[role="gridcell"]')].filter(
      (cell) => cell.getAttribute('tabindex') === '0',
    );
    expect(stops).toHaveLength(1);
    expect(focused()).toBe(stops[0]);
    expect(focused().textContent.trim()).toBe('N');
  });

  it('links an entry to the finding below it, and marks it invalid', () => {
    const entry = screen.getAllByRole('gridcell').find((cell) => cell.textContent.trim() === 'N + I');
    expect(entry?.getAttribute('aria-invalid')).toBe('true');
    const described = document.getElementById(entry?.getAttribute('aria-describedby') ?? '');
    expect(described?.textContent).toMatch(/Levels are added as decibels/);
  });

  it('moves the focus with the arrows', async () => {
    await press('ArrowDown');
    await press('ArrowRight');
    expect(focused().textContent.trim()).toMatch(/^Interference/);
    await press('End');
    expect(focused().dataset['cell']).toBe('requirement');
  });

  it('keeps the focus on a line that is moved', async () => {
    const line = focused().closest('[data-row]')?.getAttribute('data-row');
    expect(line).toMatch(/^line /);
    for (const key of ['ArrowDown', 'ArrowUp']) {
      await press(key, { altKey: true });
      expect(focused().closest('[data-row]')?.getAttribute('data-row')).toBe(line);
    }
  });

  it('edits with F2, and Escape puts back what stood there', async () => {
    await press('ArrowRight');
    await press('ArrowRight');
    await press('F2');
    const input = focused() as HTMLInputElement;
    expect([input.tagName, input.value]).toEqual(['INPUT', '-117 dBm']);
    type('-90 dBm');
    expect(document.getElementById('cell-help')?.textContent).toMatch(/gives\s+−90\.00 dBm/);
    expect(screen.getAllByRole('option').length).toBeGreaterThan(0);
    await press('Escape');
    expect(screen.queryAllByRole('option')).toEqual([]);
    expect(focused()).toBe(input);
    await press('Escape');
    expect(allLines(session.worksheet)[0]?.entry).toBe('-117 dBm');
    expect(focused().dataset['cell']).toBe('entry');
  });

  it('previews an entry typed in the place for a new line, and what is wrong with it', async () => {
    await press('End', { ctrlKey: true });
    await press('ArrowUp');
    for (let i = 0; i < 3 && focused().dataset['cell'] !== 'entry'; i++) await press('ArrowRight');
    expect(focused().dataset['cell']).toBe('entry');
    await press('N');
    type('N + 3 dB');
    expect(document.getElementById('cell-help')?.textContent).toMatch(/gives\s+−114\.00 dBm/);
    type('N + I');
    expect(document.getElementById('cell-help')?.textContent).toMatch(
      /Error\. N and I are levels and are added.*Write powersum\(N, I\)/s,
    );
    await press('Enter', { altKey: true });
    await press('Enter');
    expect(allLines(session.worksheet)[3]?.entry).toBe('powersum(N, I)');
  });

  it('marks what is searched for, in each cell that holds it, until the search ends', async () => {
    const marks = (): string[] => [...document.querySelectorAll('mark')].map((mark) => mark.textContent);
    session.searched = 'in';
    flushSync();
    await tick();
    expect(marks()).toEqual(['In']);
    session.searched = 'n';
    flushSync();
    // Noise and its symbol, the label and the symbol of the total, its entry.
    expect(marks()).toEqual(['N', 'N', 'n', 'n', 'Ntot', 'N']);
    session.searched = '';
    flushSync();
    expect(marks()).toEqual([]);
  });

  it('opens the editor with a text put behind what stands there, the caret in it', async () => {
    const focus = { kind: 'lines', lineIds: ['N_tot'], field: 'entry' } as const;
    session.focusRequest = { focus, edit: true, insert: { text: 'powersum()', caret: 9 } };
    flushSync();
    await tick();
    const input = focused() as HTMLInputElement;
    expect([input.value, input.selectionStart]).toEqual(['N + I powersum()', 15]);
    expect(allLines(session.worksheet)[2]?.entry).toBe('N + I');
  });

  it('keeps what was typed with Enter and goes down', async () => {
    await press('ArrowRight');
    await press('ArrowRight');
    await press('-');
    type('-118 dBm');
    await press('Enter');
    expect(allLines(session.worksheet)[0]?.entry).toBe('-118 dBm');
    expect(focused().textContent.trim()).toBe('-110 dBm');
  });

  it('suggests symbols and takes the one chosen', async () => {
    for (const key of ['ArrowDown', 'ArrowDown', 'ArrowRight', 'ArrowRight']) await press(key);
    await press('F2');
    type('N + I + N');
    const options = screen.getAllByRole('option').map((option) => option.textContent);
    expect(options.some((text) => /Noise/.test(text))).toBe(true);
    await press('ArrowDown');
    expect(focused().getAttribute('aria-activedescendant')).toBe('cell-suggestion-0');
    await press('Enter');
    expect(focused().tagName).toBe('INPUT');
  });

  it('repairs with one key', async () => {
    await press('ArrowDown');
    await press('ArrowDown');
    await press('Enter', { altKey: true });
    expect(allLines(session.worksheet)[2]?.entry).toBe('powersum(N, I)');
    expect(screen.queryByText(/Levels are added/)).toBeNull();
  });

  it('says which entry a case has of its own', () => {
    expect(screen.getByText(', own entry -105 dBm')).toBeTruthy();
  });
});

describe('a long worksheet', () => {
  it('renders what is in view and the row with the cursor', async () => {
    await show(sheet(Array.from({ length: 600 }, (_, i) => [`L_${String(i)}`, 'Loss', '1 dB'] as const)));
    expect(document.querySelectorAll('[role="row"]').length).toBeLessThan(80);
    session.select('L_400');
    flushSync();
    await tick();
    await tick();
    expect(focused().textContent.trim()).toMatch(/^L/);
    expect(focused().closest('[role="row"]')?.getAttribute('aria-rowindex')).toBe('403');
    expect(document.querySelectorAll('[role="row"]').length).toBeLessThan(80);
  });
});
