// The panel of trials in a page: it runs by itself, follows edits, is stopped, and says what it found.
import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/svelte';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail, type Result } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import {
  inlineRunner,
  type Fault,
  type Listener,
  type Runner,
  type TrialsOutcome,
  type TrialsRun,
} from '../../../src/jobs';
import { setEntry, type Line, type Worksheet } from '../../../src/worksheet';
import { plain, settle } from '../panels/stage';
import TrialsStage from './TrialsStage.svelte';

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

const line = (symbol: string, entry: string, more: Partial<Line> = {}): Line => ({
  ...{ id: symbol, symbol, label: '', entry },
  ...more,
});

const LINES: readonly Line[] = [
  line('P', '30 dBm', { tolerance: { below: '1 dB', above: '1 dB' } }),
  line('L', '98 dB', { quantity: 'loss', tolerance: { below: '3 dB', above: '3 dB', shape: 'normal' } }),
  line('C', 'P - L', { requirement: { atLeast: '-69 dBm' } }),
  line('T', '290 K'),
];

/** Counts what is asked of it, and does it. */
class Watched implements Runner {
  readonly runs: TrialsRun[] = [];
  stopped = 0;
  private readonly inner = inlineRunner();

  start(run: TrialsRun, listener?: Listener): { result: Promise<Result<TrialsOutcome, Fault>>; stop: () => void } {
    this.runs.push(run);
    const handle = this.inner.start(run, listener);
    return {
      result: handle.result,
      stop: () => {
        this.stopped++;
        handle.stop();
      },
    };
  }

  close(): void {
    this.inner.close();
  }
}

async function show(lineId: string): Promise<{ session: Session; runner: Watched }> {
  const worksheet: Worksheet = {
    ...{ id: '0b7c1a52-6a0e-4f39-9f57-6c5e8a1d2f33', title: 'Test', cases: [{ id: 'calm', name: 'Calm' }] },
    sections: [{ id: 's', kind: 'lines', title: '', lines: LINES }],
  };
  const session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(worksheet));
  const runner = new Watched();
  render(TrialsStage, { session, runner, lineId });
  await settle();
  return { session, runner };
}

/** The cells of a row, apart. */
const cells = (row: Element): string => [...row.children].map(plain).join(' ').trim();
const rowOf = (name: string): string => {
  const row = screen.getAllByRole('rowheader', { name }).at(-1)?.parentElement;
  return row === null || row === undefined ? '' : cells(row);
};
const body = (): string => plain(document.body);
const has = (words: RegExp): Promise<void> => waitFor(() => expect(body()).toMatch(words), { timeout: 20_000 });

describe('the panel of trials', () => {
  it('runs by itself and says in words what it found', async () => {
    const { runner } = await show('C');
    expect(runner.runs.map(({ count, seed }) => [count, seed])).toEqual([[100_000, 1]]);
    await has(/100.000 trials with seed 1\./);
    // P(−68 + U(−1, 1) + N(0, 1) ≥ −69) = ½ ∫ Φ(1 + u) du over −1 to 1 = 0.804…
    expect(body()).toMatch(/Required at least -69 dBm: met in 80\.\d % of the trials\./);
    expect(body()).toMatch(/between 80\.\d % and 80\.\d % \(with 95 % confidence\)/);
    expect(rowOf('mean')).toMatch(/^mean −68\.0\d dBm$|^mean −67\.99 dBm$/);
    expect(rowOf('standard deviation')).toMatch(/1\.1[56] dB$/);
    expect(rowOf('all adverse')).toBe('all adverse −72.00 dBm');
    expect(rowOf('all favourable')).toBe('all favourable −64.00 dBm');
    expect(rowOf('mean − 3σ')).toBe('mean − 3σ −71.46 dBm');
    expect(rowOf('99.9 %')).toMatch(/−6[45]\.\d\d dBm$/);
  });

  it('marks requirement, nominal figure and limits in the plot, which is a table too', async () => {
    await show('C');
    await has(/Trials of C/);
    const plot = screen.getByRole('group', { name: 'Trials of C' });
    const words = [...plot.querySelectorAll('text.small')].map(plain).sort();
    expect(words).toEqual(
      ['all adverse', 'all favourable', 'mean + 3σ', 'mean − 3σ', 'nominal', 'required at least'].sort(),
    );
    expect(plot.querySelectorAll('rect.failing').length).toBeGreaterThan(3);
    await fireEvent.click(screen.getByRole('button', { name: 'Cumulative curve' }));
    expect(screen.getByRole('group', { name: 'Cumulative trials of C' }).querySelector('polyline')).not.toBeNull();
    await fireEvent.click(screen.getByRole('button', { name: 'as table' }));
    const rows = within(screen.getByRole('region', { name: /as a table/ })).getAllByRole('row');
    expect(rows.length).toBeGreaterThan(20);
    expect(cells(rows.at(-6) as Element)).toBe('required at least −69.00 dBm');
  });

  it('names the inputs that drive the failures, the worst first', async () => {
    await show('C');
    await has(/Which inputs drive the failures/);
    const rows = within(screen.getByRole('region', { name: 'Which inputs drive the failures' })).getAllByRole('row');
    expect(rows.slice(1).map(cells)).toEqual([
      expect.stringMatching(/^L +1\.\d\d σ higher$/),
      expect.stringMatching(/^P +0\.\d\d σ lower$/),
    ]);
  });

  it('follows an edit with a new run, after stopping the one before', async () => {
    const { session, runner } = await show('C');
    session.perform(setEntry(session.worksheet, 'P', '31 dBm'));
    await settle();
    expect(runner.runs).toHaveLength(2);
    expect(runner.stopped).toBe(1);
    await waitFor(() => expect(rowOf('nominal')).toBe('nominal −67.00 dBm'));
  });

  it('takes another seed and another number, and refuses what is no seed', async () => {
    const { runner } = await show('C');
    await has(/100.000 trials with seed 1\./);
    const seed = screen.getByRole('textbox', { name: 'Seed' });
    await fireEvent.input(seed, { target: { value: '-3' } });
    await fireEvent.keyDown(seed, { key: 'Enter' });
    expect(body()).toContain('A seed is a whole number from 0 up.');
    expect(runner.runs).toHaveLength(1);
    await fireEvent.input(seed, { target: { value: '42' } });
    await fireEvent.keyDown(seed, { key: 'Enter' });
    await fireEvent.change(screen.getByRole('combobox', { name: 'Trials' }), { target: { value: '10000' } });
    await has(/10.000 trials with seed 42\./);
    expect(runner.runs.map(({ count, seed: one }) => [count, one])).toEqual([
      [100_000, 1],
      [100_000, 42],
      [10_000, 42],
    ]);
  });

  it('shows how far a long run is, and stops it', async () => {
    const { runner } = await show('C');
    await has(/100.000 trials with seed 1\./);
    await fireEvent.change(screen.getByRole('combobox', { name: 'Trials' }), { target: { value: '10000000' } });
    const bar = await screen.findByRole('progressbar', { name: 'Trials done' }, { timeout: 20_000 });
    expect(bar.getAttribute('max')).toBe('10000000');
    await has(/trials with seed 1 so far\./);
    await fireEvent.click(screen.getByRole('button', { name: 'Stop' }));
    await has(/Stopped\./);
    expect(screen.queryByRole('progressbar')).toBeNull();
    expect(runner.runs.at(-1)?.count).toBe(10_000_000);
  });

  it('says how to give a tolerance where there is none', async () => {
    await show('T');
    await has(/Nothing that T rests on has a tolerance that counts.*field “Tolerance”/);
    expect(screen.queryByRole('group', { name: /Trials of/ })).toBeNull();
  });

  it('stops when it goes', async () => {
    const { runner } = await show('C');
    cleanup();
    expect(runner.stopped).toBe(1);
  });
});
