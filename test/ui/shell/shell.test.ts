// Parts of the page around the account: title, banners, search, and what is shown when the page fails.
import { cleanup, fireEvent, render, screen } from '@testing-library/svelte';
import { tick } from 'svelte';
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import { sheet } from '../../app/support';
import { knowModalDialogs } from '../dialogs/modal';
import ShellStage from './ShellStage.svelte';

beforeAll(() => {
  knowModalDialogs();
  HTMLElement.prototype.showPopover = function show(this: HTMLElement): void {
    this.setAttribute('data-shown', '');
  };
});

afterEach(cleanup);

async function session(): Promise<Session> {
  const made = new Session(new Settings(), fail({ code: 'unavailable', sentence: 'No storage here.', detail: '' }));
  const worksheet = sheet([
    ['P_tx', 'Transmit power', '14 dBm'],
    ['I_ferry', 'Ferry telemetry', '-112 dBm'],
    ['N_tot', 'Both', 'powersum(N, I_ferry)'],
  ]);
  await made.opening.importText(writeWorksheetFile(worksheet));
  made.focusRequest = null;
  made.notice = null;
  return made;
}

describe('the title', () => {
  it('is kept when it is left, as one edit', async () => {
    const made = await session();
    render(ShellStage, { session: made, part: 'title' });
    const field = screen.getByRole('textbox', { name: 'Title of the worksheet' });
    await fireEvent.input(field, { target: { value: ' Quay radio ' } });
    await fireEvent.blur(field);
    expect(made.worksheet.title).toBe('Quay radio');
    expect(made.sheet.undoLabel).toBe('Change the title');
  });

  it('is put back by Escape, and never empty', async () => {
    const made = await session();
    render(ShellStage, { session: made, part: 'title' });
    const field = screen.getByRole<HTMLInputElement>('textbox', { name: 'Title of the worksheet' });
    await fireEvent.input(field, { target: { value: 'Other' } });
    await fireEvent.keyDown(field, { key: 'Escape' });
    expect(field.value).toBe('Test sheet');
    await fireEvent.input(field, { target: { value: '  ' } });
    await fireEvent.blur(field);
    expect(made.worksheet.title).toBe('Test sheet');
  });
});

describe('banners', () => {
  it('say that edits are kept nowhere without storage', async () => {
    const made = await session();
    render(ShellStage, { session: made, part: 'banners' });
    expect(screen.getByRole('alert').textContent).toMatch(/Not saved\..*No storage here\./s);
  });

  it('say that another tab has the worksheet, and offer to take it over', async () => {
    const made = await session();
    made.keeping.claimState = 'elsewhere';
    render(ShellStage, { session: made, part: 'banners' });
    expect(screen.getByText(/being edited in another tab/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Edit it here instead' })).toBeTruthy();
  });

  it('show a notice until it is dismissed', async () => {
    const made = await session();
    made.notice = { text: 'x.json was not opened.' };
    render(ShellStage, { session: made, part: 'banners' });
    await fireEvent.click(screen.getByRole('button', { name: 'Dismiss' }));
    expect(made.notice).toBeNull();
    expect(screen.queryByText('x.json was not opened.')).toBeNull();
  });
});

describe('search', () => {
  it('counts matches, goes to each in turn, and leaves the cursor on the last', async () => {
    const made = await session();
    const closed = vi.fn();
    render(ShellStage, { session: made, part: 'search', onDone: closed });
    const field = screen.getByRole('textbox', { name: 'Search' });
    await fireEvent.input(field, { target: { value: 'ferry' } });
    expect(screen.getByText('2 lines')).toBeTruthy();
    await fireEvent.keyDown(field, { key: 'Enter' });
    expect(screen.getByText('1 of 2')).toBeTruthy();
    expect(made.focusRequest).toMatchObject({ quiet: true, focus: { lineIds: ['I_ferry'], field: 'symbol' } });
    await fireEvent.keyDown(field, { key: 'Enter' });
    expect(made.focusRequest).toMatchObject({ quiet: true, focus: { lineIds: ['N_tot'], field: 'entry' } });
    await fireEvent.keyDown(field, { key: 'Escape' });
    expect(closed).toHaveBeenCalledOnce();
    expect(made.focusRequest).toMatchObject({ edit: false, focus: { lineIds: ['N_tot'], field: 'entry' } });
    expect(made.focusRequest?.quiet).toBeUndefined();
  });

  it('is known to the page while it is open, so that rows can mark what is found', async () => {
    const made = await session();
    const { unmount } = render(ShellStage, { session: made, part: 'search' });
    await fireEvent.input(screen.getByRole('textbox', { name: 'Search' }), { target: { value: 'ferry' } });
    expect(made.searched).toBe('ferry');
    unmount();
    expect(made.searched).toBe('');
  });

  it('says when nothing is found', async () => {
    render(ShellStage, { session: await session(), part: 'search' });
    await fireEvent.input(screen.getByRole('textbox', { name: 'Search' }), { target: { value: 'nowhere' } });
    expect(screen.getByText('nothing found')).toBeTruthy();
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Next' }).disabled).toBe(true);
  });
});

describe('the button for cases', () => {
  it('opens the menu of the case chosen, which names it and offers the others', async () => {
    const made = await session();
    made.selection.caseId = 'storm';
    render(ShellStage, { session: made, part: 'cases' });
    await fireEvent.click(screen.getByRole('button', { name: 'Cases ▾' }));
    const items = screen.getAllByRole('menuitem').map((item) => item.textContent.trim());
    expect(items).toEqual([
      'Rename “Storm”',
      'Add a case',
      'Add a case with the entries of “Storm”',
      'Move “Storm” to the left',
      'Move “Storm” to the right',
      'Remove “Storm”',
      'Go on with “Calm”',
    ]);
    await fireEvent.click(screen.getByRole('menuitem', { name: 'Remove “Storm”' }));
    expect(made.worksheet.cases.map(({ name }) => name)).toEqual(['Calm']);
    expect(screen.queryByRole('menu')).toBeNull();
  });
});

describe('the reference of functions', () => {
  it('puts a call into the entry of the line with the cursor, and closes', async () => {
    const made = await session();
    made.selection.put('P_tx');
    made.dialog = 'functions';
    render(ShellStage, { session: made, part: 'dialogs' });
    await fireEvent.click(screen.getByRole('button', { name: 'Insert powersum into the line' }));
    await tick();
    expect(made.dialog).toBeNull();
    expect(made.focusRequest).toEqual({
      focus: { kind: 'lines', lineIds: ['P_tx'], field: 'entry' },
      edit: true,
      insert: { text: 'powersum()', caret: 9 },
    });
  });

  it('offers that only where a line has the cursor', async () => {
    const made = await session();
    made.selection.put(null);
    made.dialog = 'functions';
    render(ShellStage, { session: made, part: 'dialogs' });
    expect(screen.getByRole('searchbox', { name: 'Search the reference' })).toBeTruthy();
    expect(screen.queryByRole('button', { name: /^Insert/ })).toBeNull();
  });
});

describe('a page that has failed', () => {
  it('names the worksheet, offers the file, and says what happened', async () => {
    const reset = vi.fn();
    render(ShellStage, { session: await session(), part: 'broken', onDone: reset });
    expect(screen.getByRole('alert').textContent).toMatch(/“Test sheet”.*NOT saved.*the roof fell in/s);
    expect(screen.getByRole('button', { name: 'Save as a file' })).toBeTruthy();
    await fireEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(reset).toHaveBeenCalledOnce();
  });
});
