// The panel of a chain in a page: its roles, its one tab stop, typing, findings in their place, outputs to be copied.
import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { flushSync, tick } from 'svelte';
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import type { WantedStage } from '../../../src/ui/chain/chain-model.svelte';
import { isChainSection, type ChainSection, type Worksheet } from '../../../src/worksheet';
import { chainSheet, FILTER } from '../../app/chain-sheet';
import ChainStage from './ChainStage.svelte';

beforeAll(() => {
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
  vi.stubGlobal('CSS', { escape: (text: string) => text });
});

afterEach(cleanup);

let session: Session;

async function show(worksheet: Worksheet = chainSheet(), wanted?: WantedStage): Promise<void> {
  session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(worksheet));
  render(ChainStage, { session, sectionId: 'rx', wanted });
  flushSync();
  await tick();
}

const chain = (): ChainSection => {
  const section = session.worksheet.sections.find(({ id }) => id === 'rx');
  if (section === undefined || !isChainSection(section)) throw new Error('the chain is there');
  return section;
};
const grid = (): HTMLElement => screen.getByRole('grid', { name: 'Line-up' });
const cell = (stageId: string, name: string): HTMLElement => {
  const found = grid().querySelector<HTMLElement>(`[data-stage="${stageId}"] [data-cell="${name}"]`);
  if (found === null) throw new Error(`no cell ${name} of ${stageId}`);
  return found;
};
const text = (element: Element): string => element.textContent.replace(/\s+/g, ' ').replace(/ ,/g, ',').trim();
const focused = (): HTMLElement => document.activeElement as HTMLElement;
const settle = async (): Promise<void> => {
  flushSync();
  await tick();
  await tick();
};
const press = async (key: string, more: KeyboardEventInit = {}): Promise<void> => {
  focused().dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
  await settle();
};
const type = (typed: string): void => {
  const input = focused() as HTMLInputElement;
  input.value = typed;
  input.dispatchEvent(new InputEvent('input', { bubbles: true }));
  flushSync();
};

describe('the line-up', () => {
  it('is a grid with headings, a row a stage, and one tab stop', async () => {
    await show();
    const heads = within(grid()).getAllByRole('columnheader').map(text);
    expect(heads).toContain('on');
    expect(within(grid()).getByRole('columnheader', { name: 'S/N behind the stage' })).toBeTruthy();
    expect(grid().querySelectorAll('[data-stage]')).toHaveLength(4);
    expect(grid().querySelectorAll('[tabindex="0"]')).toHaveLength(1);
    expect(text(cell('s2', 'gain'))).toBe('18.00 dB');
  });

  it('tells figures worked out and entries of the case, in words too', async () => {
    await show();
    expect(text(cell('s1', 'noiseFigure'))).toBe('2.00 dB, worked out');
    session.selection.caseId = 'storm';
    await settle();
    expect(text(cell('s2', 'gain'))).toBe('16.00 dB, own entry 16 dB');
    expect(cell('s2', 'gain').className).toMatch(/over/);
  });

  it('moves the focus with the arrows, and edits with F2, Enter keeps and goes down', async () => {
    await show();
    cell('s1', 'symbol').focus();
    await press('ArrowRight');
    await press('ArrowRight');
    expect(focused()).toBe(cell('s1', 'gain'));
    await press('F2');
    expect((focused() as HTMLInputElement).value).toBe('-2 dB');
    type('-5 dB');
    expect(text(document.getElementById('cell-help') as Element)).toMatch(/gives −5\.00 dB/);
    await press('Enter');
    expect(chain().stages[0]?.gain).toBe('-5 dB');
    expect(focused()).toBe(cell('s2', 'gain'));
    expect(text(cell('s1', 'gain'))).toBe('−5.00 dB');
  });

  it('leaves an editor with Escape, and nothing has changed', async () => {
    await show();
    cell('s1', 'symbol').focus();
    await press('F2');
    type('xyz');
    await press('Escape');
    expect(chain().stages[0]?.symbol).toBe('fil');
    expect(focused()).toBe(cell('s1', 'symbol'));
  });

  it('takes the cursor to the stage that another part of the page wants', async () => {
    await show(chainSheet(), { stageId: 's3', field: 'gain' });
    await settle();
    expect(focused()).toBe(cell('s3', 'gain'));
  });

  it('keeps what was typed when the focus goes elsewhere, and lets it go', async () => {
    await show();
    cell('s1', 'symbol').focus();
    await press('F2');
    type('front');
    const title = screen.getByRole('textbox', { name: 'Title of the chain' });
    title.focus();
    await settle();
    expect(chain().stages[0]?.symbol).toBe('front');
    expect(grid().querySelector('[data-editor]')).toBeNull();
    expect(focused()).toBe(title);
    cell('s1', 'symbol').focus();
    await press('F2');
    title.focus();
    await settle();
    expect(grid().querySelector('[data-editor]')).toBeNull();
    expect(focused()).toBe(title);
  });

  it('opens an empty editor when a character is typed', async () => {
    await show();
    cell('s1', 'symbol').focus();
    await press('ArrowRight');
    await press('ArrowRight');
    focused().dispatchEvent(new KeyboardEvent('keydown', { key: '7', bubbles: true, cancelable: true }));
    expect((focused() as HTMLInputElement).value).toBe('');
    type('7 dB');
    await press('Tab');
    expect(chain().stages[0]?.gain).toBe('7 dB');
    expect(focused().getAttribute('aria-label')).toBe('noise figure');
  });

  it('bypasses a stage, says so in words, and moves another', async () => {
    await show();
    await fireEvent.click(screen.getByRole('switch', { name: 'lna is in the line-up' }));
    await settle();
    expect(chain().stages[1]?.off).toBe(true);
    expect(text(cell('s2', 'label'))).toMatch(/bypassed/);
    cell('s2', 'symbol').focus();
    await press('ArrowDown');
    await press('ArrowUp', { altKey: true });
    expect(chain().stages.map(({ symbol }) => symbol)).toEqual(['fil', 'mix', 'lna']);
    await press('z', { ctrlKey: true });
    expect(chain().stages.map(({ symbol }) => symbol)).toEqual(['fil', 'lna', 'mix']);
  });

  it('shows more columns from a menu', async () => {
    await show();
    expect(grid().querySelector('[data-cell="temperature"]')).toBeNull();
    await fireEvent.click(screen.getByRole('button', { name: /More columns/ }));
    await fireEvent.click(screen.getByRole('menuitemcheckbox', { name: 'physical temperature', hidden: true }));
    await settle();
    expect(cell('s1', 'temperature')).toBeTruthy();
  });

  it('has a menu for each stage', async () => {
    await show();
    await fireEvent.click(screen.getByRole('button', { name: 'Stage 2, lna: menu' }));
    await settle();
    await fireEvent.click(screen.getByRole('menuitem', { name: /Delete the stage/, hidden: true }));
    await settle();
    expect(chain().stages.map(({ symbol }) => symbol)).toEqual(['fil', 'mix']);
  });

  it('takes a new stage in its last row', async () => {
    await show(chainSheet({ stages: [] }));
    await fireEvent.mouseDown(cell('add', 'symbol'));
    await settle();
    type('lna');
    await press('Enter');
    expect(chain().stages.map(({ symbol }) => symbol)).toEqual(['lna']);
    expect(focused()).toBe(cell('add', 'symbol'));
  });
});

it('keeps the tolerance of the value that has the cursor', async () => {
  await show();
  const [first] = chain().stages;
  if (first === undefined) throw new Error('there is a stage');
  cell(first.id, 'symbol').focus();
  await settle();
  expect(screen.queryByRole('textbox', { name: /^Tolerance/ })).toBeNull();
  await press('ArrowRight');
  await press('ArrowRight');
  screen.getByRole('textbox', { name: `Tolerance of the gain of ${first.symbol}` }).focus();
  type('+0.2/-0.4 dB');
  await press('Enter');
  expect(chain().stages[0]?.tolerance).toEqual({ gain: { above: '0.2 dB', below: '0.4 dB' } });
  session.undo();
  expect(chain().stages[0]?.tolerance).toBeUndefined();
});

it('keeps the source of the stage that has the cursor', async () => {
  await show();
  const [first] = chain().stages;
  if (first === undefined) throw new Error('there is a stage');
  cell(first.id, 'symbol').focus();
  await settle();
  const field = screen.getByRole('textbox', { name: `Source of ${first.symbol}` });
  field.focus();
  type('Data sheet, page 3');
  await press('Enter');
  expect(chain().stages[0]?.source).toBe('Data sheet, page 3');
  session.undo();
  expect(chain().stages[0]?.source).toBe(first.source);
});

describe('the head', () => {
  it('has the inputs with their figures, and keeps what is typed', async () => {
    await show();
    const field = screen.getByRole<HTMLInputElement>('combobox', { name: 'Wanted level' });
    expect(field.value).toBe('S');
    const described = field.getAttribute('aria-describedby') ?? '';
    expect(text(document.getElementById(described) as Element)).toBe('−90.00 dBm');
    field.focus();
    type('S - 3 dB');
    await press('Enter');
    expect(chain().signal).toBe('S - 3 dB');
    expect(text(document.getElementById(described) as Element)).toBe('−93.00 dBm');
    expect(screen.getByRole<HTMLInputElement>('combobox', { name: 'Source temperature' }).placeholder).toMatch(/290 K/);
  });

  it('puts an entry back with Escape, and follows an undo', async () => {
    await show();
    const field = screen.getByRole<HTMLInputElement>('combobox', { name: 'Wanted level' });
    field.focus();
    type('-80 dBm');
    await press('Escape');
    await press('Escape');
    expect(field.value).toBe('S');
    expect(chain().signal).toBe('S');
    type('-80 dBm');
    await press('Enter');
    session.undo();
    await settle();
    expect(field.value).toBe('S');
  });

  it('renames the chain and its symbol, but for one that is taken', async () => {
    await show();
    const symbol = screen.getByRole<HTMLInputElement>('textbox', { name: 'Symbol of the chain' });
    symbol.focus();
    type('S');
    await press('Enter');
    expect(chain().symbol).toBe('rx');
    expect(symbol.getAttribute('aria-invalid')).toBe('true');
    type('front');
    await press('Enter');
    expect(chain().symbol).toBe('front');
    expect(session.evaluation.lineOf('SNR')?.entry).toBe('front.snr');
  });

  it('chooses how intercepts add', async () => {
    await show();
    expect(screen.getByRole<HTMLInputElement>('radio', { name: 'in phase, the worst case' }).checked).toBe(true);
    await fireEvent.click(screen.getByRole('radio', { name: 'as powers' }));
    expect(chain().intercept).toBe('power');
  });
});

describe('findings', () => {
  const hot = { ...FILTER, noiseFigure: '1 dB' };

  it('stand under the line-up, mark their cell, and are accepted with a reason', async () => {
    await show(chainSheet({ stages: [hot] }));
    const list = screen.getByRole('list', { name: 'Findings of the chain' });
    expect(cell('s1', 'noiseFigure').getAttribute('aria-invalid')).toBe('true');
    await fireEvent.click(within(list).getByRole('button', { name: 'Accept…' }));
    type('It is cooled.');
    await fireEvent.click(within(list).getByRole('button', { name: 'Accept' }));
    await settle();
    expect(chain().stages[0]?.accepted?.['noiseFigure']).toMatchObject([{ entry: '1 dB', reason: 'It is cooled.' }]);
    // The form has gone, and the focus is on what can be done next.
    expect(within(list).queryByRole('textbox')).toBeNull();
    expect(document.activeElement?.textContent.trim()).toBe('Withdraw');
    expect(cell('s1', 'noiseFigure').getAttribute('aria-invalid')).toBeNull();
  });

  it('on an input stand with it, and cannot be accepted', async () => {
    await show(chainSheet({ signal: 'S + S' }));
    const list = screen.getByRole('list', { name: 'Findings on Wanted level' });
    expect(within(list).getAllByRole('listitem')).toHaveLength(1);
    expect(within(list).queryByRole('button', { name: 'Accept…' })).toBeNull();
    expect(screen.queryByRole('list', { name: 'Findings of the chain' })).toBeNull();
  });
});

describe('outputs', () => {
  it('are copied as symbols', async () => {
    await show();
    const writeText = vi.fn(() => Promise.resolve());
    vi.stubGlobal('navigator', { clipboard: { writeText } });
    await fireEvent.click(screen.getByRole('button', { name: 'Copy rx.nf' }));
    expect(writeText.mock.calls).toEqual([['rx.nf']]);
    vi.unstubAllGlobals();
  });

  it('lead to who uses them', async () => {
    await show();
    const levels = screen.getByRole('region', { name: 'Levels' });
    await fireEvent.click(within(levels).getByRole('button', { name: 'SNR' }));
    expect(session.focusRequest?.focus).toEqual({ kind: 'lines', lineIds: ['SNR'] });
  });

  it('have linear values when these are shown', async () => {
    await show();
    const group = screen.getByRole('region', { name: 'Gain and noise' });
    expect(text(group)).not.toMatch(/× 10/);
    session.showLinear = true;
    await settle();
    expect(text(group)).toMatch(/10\.00 dB× 10/);
    session.showLinear = false;
  });

  it('leave room below', async () => {
    await show();
    expect(screen.getByText('something below')).toBeTruthy();
  });
});

it('changes nothing in a worksheet that may only be read', async () => {
  await show();
  const reason = vi.spyOn(session, 'readOnlyReason', 'get').mockReturnValue('It is open elsewhere.');
  cell('s1', 'symbol').focus();
  await press('F2');
  expect(grid().querySelector('[data-editor]')).toBeNull();
  await press('Delete', { ctrlKey: true });
  expect(chain().stages).toHaveLength(3);
  reason.mockRestore();
});
