import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { PastePreview } from '../../../src/exchange';
import PasteDialog from '../../../src/ui/dialogs/PasteDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

const TABLE = 'Name\tFigure\tUnit\nTransmit power\t14\tdBm\nFeeder loss\t1,5\tdB\nMargin\t=B2-B3\tdB';

function show(text = TABLE) {
  const onConfirm = vi.fn<(preview: PastePreview) => void>();
  const onClose = vi.fn();
  render(PasteDialog, { text, onConfirm, onClose });
  return { onConfirm, onClose };
}

const column = (number: number) =>
  screen.getByRole<HTMLSelectElement>('combobox', { name: `Column ${String(number)} is` });
const lines = () => screen.getByRole('region', { name: /^What they become/ });
const entries = () =>
  within(lines())
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('cell')[3]?.textContent.trim());

describe('the preview of a pasted table', () => {
  it('shows what each column was taken for and what the lines will be', () => {
    show();
    expect([1, 2, 3].map((number) => column(number).value)).toEqual(['label', 'value', 'unit']);
    expect(screen.getByRole<HTMLInputElement>('checkbox', { name: 'The first row is a heading' }).checked).toBe(true);
    expect(entries()).toEqual(['14 dBm', '1.5 dB', 'none']);
  });

  it('says what to look at, in a list and at the row', () => {
    show();
    const problems = screen.getByRole('region', { name: /^To look at/ });
    expect(problems.textContent).toMatch(/Row 4: the formula =B2-B3 of the other program was kept in the note/);
    expect(within(lines()).getByRole('row', { name: /Margin/ }).textContent).toContain('see what is said about it');
    expect(within(lines()).getByRole('row', { name: /Feeder/ }).textContent).not.toContain('see what is said');
  });

  it('follows another choice of column, heading and decimal sign', async () => {
    show();
    await fireEvent.change(column(3), { target: { value: 'left out' } });
    expect(entries()).toEqual(['14', '1.5', 'none']);
    await fireEvent.change(screen.getByRole('combobox', { name: 'Decimal sign' }), { target: { value: 'point' } });
    expect(screen.getByRole<HTMLSelectElement>('combobox', { name: 'Decimal sign' }).value).toBe('point');
    await fireEvent.click(screen.getByRole('checkbox', { name: 'The first row is a heading' }));
    expect(entries()).toHaveLength(4);
    expect(column(3).value).toBe('left out');
  });
});

describe('confirming', () => {
  it('hands over the preview as it stands, once', async () => {
    const { onConfirm } = show();
    await fireEvent.change(column(3), { target: { value: 'left out' } });
    await fireEvent.click(screen.getByRole('button', { name: 'Make 3 lines' }));
    expect(onConfirm).toHaveBeenCalledTimes(1);
    expect(onConfirm.mock.calls[0]?.[0].columns).toEqual(['label', 'value', 'left out']);
    expect(onConfirm.mock.calls[0]?.[0].rows.map(({ entry }) => entry)).toEqual(['14', '1.5', '']);
  });

  it('is not offered for a text without any cell', () => {
    show(' \n ');
    expect(screen.getByText('There is no text to make lines of.')).toBeDefined();
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Make 0 lines' }).disabled).toBe(true);
  });

  it('can be cancelled', async () => {
    const { onClose, onConfirm } = show();
    await fireEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    expect(onClose).toHaveBeenCalledTimes(1);
    expect(onConfirm).not.toHaveBeenCalled();
  });

  it('shows at most a hundred lines of a long table and makes them all', () => {
    show(Array.from({ length: 150 }, (_, i) => `Line ${String(i)}\t${String(i)} dB`).join('\n'));
    expect(within(lines()).getAllByRole('row')).toHaveLength(101);
    expect(lines().textContent).toContain('and 50 more.');
    expect(screen.getByRole('button', { name: 'Make 150 lines' })).toBeDefined();
  });
});
