// The panels of sensitivity and sweep, and the field in which a tolerance is typed.
import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import { locateLine, setLineField } from '../../../src/worksheet';
import { worksheetOf } from '../../app/analysis-sheet';
import { plain, settle } from '../panels/stage';
import AnalysisStage from './AnalysisStage.svelte';

/** Nothing is laid out here, so no size changes. */
class StillSizes {
  observe = (): void => undefined;
  unobserve = (): void => undefined;
  disconnect = (): void => undefined;
}

beforeAll(() => {
  vi.stubGlobal('ResizeObserver', StillSizes);
});
afterAll(() => {
  vi.unstubAllGlobals();
});
afterEach(cleanup);

async function stage(part: 'sensitivity' | 'sweep' | 'line', lineId: string): Promise<Session> {
  const session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(worksheetOf()));
  render(AnalysisStage, { session, part, lineId });
  await settle();
  return session;
}

const type = async (field: HTMLElement, text: string): Promise<void> => {
  await fireEvent.input(field, { target: { value: text } });
  await fireEvent.keyDown(field, { key: 'Enter' });
  await settle();
};

describe('sensitivity', () => {
  it('shows totals, swings and cases, and follows edits', async () => {
    const session = await stage('sensitivity', 'S');
    expect(plain(screen.getByRole('row', { name: /all adverse 1\.12 dB/ }))).toContain('1.88 dB short');
    const bar = screen.getByRole('img', { name: /^L:/ });
    expect(bar.getAttribute('aria-label')).toBe('L: −1.50 dB at its adverse limit, +0.50 dB at its favourable limit');
    await vi.waitFor(() => expect(plain(screen.getByRole('row', { name: /^Storm/ }))).toContain('worst case'));
    session.perform(setLineField(session.worksheet, 'L', 'tolerance', { above: '3 dB' }));
    await settle();
    expect(
      screen.getByRole('img', { name: 'L: −3.00 dB at its adverse limit, 0.00 dB at its favourable limit' }),
    ).toBeTruthy();
    session.selection.caseId = 'storm';
    await settle();
    expect(screen.getByRole('row', { name: /nominal 0\.92 dB/ })).toBeTruthy();
  });

  it('leads to an input', async () => {
    const session = await stage('sensitivity', 'S');
    await fireEvent.click(within(screen.getByRole('region', { name: /Swings/ })).getByRole('button', { name: 'd' }));
    expect(session.focusRequest?.focus).toEqual({ kind: 'lines', lineIds: ['d'] });
  });
});

describe('sweep', () => {
  it('begins with the first input and takes another, in words', async () => {
    await stage('sweep', 'S');
    const select = screen.getByLabelText<HTMLSelectElement>('Vary');
    expect(select.value).toBe('P');
    await fireEvent.change(select, { target: { value: 'd' } });
    await settle();
    expect(screen.getByLabelText<HTMLInputElement>('from').value).toBe('0.2 km');
    expect(screen.getByText('3.00 dB is reached at 2.362 km (Calm).')).toBeTruthy();
  });

  it('says what is wrong with a range', async () => {
    await stage('sweep', 'S');
    await type(screen.getByLabelText('from'), '5 parsnips');
    expect(screen.getByRole('alert').textContent).toBe('“5 parsnips” is no quantity in dBm.');
  });

  it('puts an answer in its place as one edit', async () => {
    const session = await stage('sweep', 'S');
    await fireEvent.change(screen.getByLabelText('Vary'), { target: { value: 'd' } });
    await settle();
    await fireEvent.click(screen.getByRole('button', { name: /^use this value/ }));
    expect(locateLine(session.worksheet, 'd').line.entry).toBe('2.36248 km');
    expect(session.reading('S', 'calm').requirement?.met).toBe(true);
    session.undo();
    expect(locateLine(session.worksheet, 'd').line.entry).toBe('2 km');
    expect(session.sheet.undoLabel).toBeUndefined();
  });

  it('looks for a figure typed, and says plainly that there is none', async () => {
    await stage('sweep', 'S');
    await fireEvent.click(screen.getByRole('radio', { name: /is a figure/ }));
    await settle();
    await type(screen.getByLabelText('S is to be'), '500 dB');
    expect(screen.getByText('No value of P between −40.00 dBm and 80.00 dBm gives S = 500.00 dB.')).toBeTruthy();
  });
});

describe('the field of a tolerance', () => {
  it('keeps what is typed, and says in place what cannot be read', async () => {
    const session = await stage('line', 'P');
    const field = screen.getByLabelText<HTMLInputElement>('Tolerance');
    expect(field.value).toBe('±1 dB');
    await fireEvent.input(field, { target: { value: '±1 parsnip' } });
    expect(screen.getByText(/“1 parsnip” is no quantity/)).toBeTruthy();
    await type(field, '+0.3/-0.8 dB 2σ');
    expect(locateLine(session.worksheet, 'P').line.tolerance).toEqual({
      above: '0.45 dB',
      below: '1.2 dB',
      shape: 'normal',
    });
    expect(field.value).toBe('+0.45/−1.2 dB normal 3σ');
  });

  it('says why one that reads well does not count', async () => {
    await stage('line', 'N');
    await vi.waitFor(() =>
      expect(screen.getByRole('note').textContent).toBe(
        'Not counted: its deviation “3 %” is not in dB, as one of a line in dBm has to be.',
      ),
    );
  });
});
