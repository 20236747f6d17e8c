/** Runs of trials through pools: the same for any workers and chunks, stopped, and done again where a worker dies. */
import { describe, expect, it } from 'vitest';
import { runJob } from '../../src/analysis';
import { inlineRunner, type Account, type Progress } from '../../src/jobs';
import { openInline } from '../../src/jobs/inline-runner';
import { Pool } from '../../src/jobs/pool';
import { PIECE } from '../../src/jobs/trials-run';
import { exactly, faultOf, lateWorkers, lineIdOf, mortalWorkers, outcomeOf, runOf, started } from './support';

const COUNT = 5 * PIECE + 1234;

describe('the outcome', () => {
  it('is that of analysis on one thread', async () => {
    const run = runOf(COUNT);
    const outcome = await outcomeOf(run, openInline, { size: 1 });
    const figures = runJob({ ...run, from: 0, to: COUNT });
    expect(outcome.figures).toEqual(figures);
    expect(outcome.statistics).toEqual(exactly(figures));
    expect(outcome.isBinned).toBe(false);
    expect(outcome.least).toBe(figures.reduce((a, b) => Math.min(a, b)));
    expect(outcome.spectrum.counts.reduce((sum, count) => sum + count, 0)).toBe(COUNT);
  });

  it('is bit for bit the same for any number of workers and any chunk', async () => {
    const run = runOf(COUNT);
    const { statistics, drivers, figures, spectrum } = await outcomeOf(run, openInline, { size: 1 });
    for (const [size, chunk] of [
      [1, PIECE],
      [2, 2 * PIECE],
      [4, PIECE],
      [3, 64 * PIECE],
    ] as const) {
      const other = await outcomeOf(run, lateWorkers(), { size, chunk });
      expect(other.figures).toEqual(figures);
      expect(other.statistics).toEqual(statistics);
      expect(other.drivers).toEqual(drivers);
      expect(other.spectrum).toEqual(spectrum);
    }
  });

  it('is the same too where no figures are kept', async () => {
    const run = runOf(2_000_001);
    const one = await outcomeOf(run, openInline, { size: 1, chunk: 16 * PIECE });
    const four = await outcomeOf(run, lateWorkers(), { size: 4, chunk: 5 * PIECE });
    expect(one.figures).toBeUndefined();
    expect(one.isBinned).toBe(true);
    expect(four).toEqual(one);
  });

  it('differs with the seed', async () => {
    const [one, two] = await Promise.all(
      [7, 8].map((seed) => outcomeOf(runOf(5000, { seed }), openInline, { size: 1 })),
    );
    expect(one?.statistics.mean).not.toBe(two?.statistics.mean);
    expect(Math.abs((one?.statistics.mean ?? 0) - (two?.statistics.mean ?? 9))).toBeLessThan(0.1);
  });

  it('names what drives the failures, as far off as it was in them', async () => {
    const run = runOf(COUNT);
    const { drivers = [], statistics } = await outcomeOf(run, openInline, { size: 2 });
    expect(drivers.map(({ lineId }) => lineId)).toEqual([lineIdOf('L'), lineIdOf('P'), lineIdOf('G')]);
    const [loss, power] = drivers;
    expect(loss?.shift).toBeGreaterThan(0.5);
    expect(power?.shift).toBeLessThan(-0.2);
    // Against the line itself: z − mean = P − L + G − …, each by its deviation, averaged over the failing trials.
    const figures = runJob({ ...run, from: 0, to: COUNT });
    const failing = figures.filter((figure) => figure < -69);
    expect(failing.length / COUNT).toBeCloseTo(1 - (statistics.met?.share ?? 0), 12);
    const off = failing.reduce((sum, figure) => sum + figure, 0) / failing.length - (-68 - 0.1);
    const deviations: Record<string, number> = { P: 1 / Math.sqrt(3), G: Math.sqrt(0.39 / 18), L: -1 };
    const sum = Object.entries(deviations).reduce(
      (total, [symbol, deviation]) =>
        total + deviation * (drivers.find(({ lineId }) => lineId === lineIdOf(symbol))?.shift ?? NaN),
      0,
    );
    expect(sum).toBeCloseTo(off, 9);
  });

  it('of a line that nothing moves is that line, and the account says so', async () => {
    let account: Account | undefined;
    const { handle } = started(
      runOf(3000, { lineId: lineIdOf('N') }),
      openInline,
      { size: 1 },
      { onAccount: (told) => (account = told) },
    );
    const result = await handle.result;
    expect(result.ok && result.value.statistics).toMatchObject({ mean: -80, standardDeviation: 0, median: -80 });
    expect(account).toMatchObject({ nominal: -80, inputIds: [] });
  });

  it('comes with the limits and the root sum square', async () => {
    let account: Account | undefined;
    const { handle } = started(runOf(3000), openInline, { size: 1 }, { onAccount: (told) => (account = told) });
    await handle.result;
    expect(account).toMatchObject({ nominal: -68, unitWord: 'dBm', troubles: [], direction: 'higher' });
    expect(account?.extremes.adverse).toBeCloseTo(-68 - 1 - 0.5 - 3, 9);
    expect(account?.extremes.favourable).toBeCloseTo(-68 + 1 + 0.2 + 3, 9);
    expect(account?.rootSumSquare.standardDeviation).toBeCloseTo(Math.sqrt(1 / 3 + 0.39 / 18 + 1), 9);
  });
});

describe('on the way', () => {
  it('progress grows, and tells what the trials so far give', async () => {
    const told: Progress[] = [];
    const listener = { onProgress: (progress: Progress): unknown => told.push(progress) };
    const { handle } = started(runOf(COUNT), openInline, { size: 2, chunk: PIECE, tellEveryMs: 0 }, listener);
    await handle.result;
    const dones = told.map(({ done }) => done);
    expect(dones.length).toBeGreaterThan(4);
    expect([...dones].sort((a, b) => a - b)).toEqual(dones);
    const { soFar } = told[2] as Progress;
    expect(soFar?.statistics.count).toBe(told[2]?.done);
    expect(soFar?.statistics.mean).toBeCloseTo(-68.1, 1);
  });

  it('the thread is free again every few milliseconds', async () => {
    const runner = inlineRunner();
    const handle = runner.start(runOf(1_900_000));
    const gapsMs: number[] = [];
    let last = performance.now();
    const timer = setInterval(() => {
      const now = performance.now();
      gapsMs.push(now - last);
      last = now;
    }, 0);
    await new Promise((resolve) => setTimeout(resolve, 250));
    clearInterval(timer);
    handle.stop();
    runner.close();
    // Nearly all of them: compiling is one piece of work, and another process may take the machine for a while.
    const sorted = gapsMs.sort((a, b) => a - b);
    expect(sorted.length).toBeGreaterThan(5);
    expect(sorted[Math.floor(sorted.length * 0.8)]).toBeLessThan(30);
  });
});

describe('stopping', () => {
  it('ends a run at once, and nothing of it comes later', async () => {
    let told = 0;
    const listener = { onProgress: (): unknown => told++ };
    const { handle, pool } = started(runOf(1_000_000), openInline, { size: 2, tellEveryMs: 0 }, listener);
    handle.stop();
    expect(await faultOf(handle)).toEqual({ kind: 'stopped' });
    const toldByThen = told;
    await new Promise((resolve) => setTimeout(resolve, 60));
    expect(told).toBe(toldByThen);
    handle.stop();
    pool.close();
  });

  it('comes with a new run for the same purpose, and only then', async () => {
    const pool = new Pool(openInline, { size: 2 });
    const old = pool.start(runOf(1_000_000));
    const other = pool.start(runOf(20_000, { purpose: 'another' }));
    const fresh = pool.start(runOf(20_000, { seed: 3 }));
    expect(await faultOf(old)).toEqual({ kind: 'stopped' });
    const [first, second] = await Promise.all([other.result, fresh.result]);
    expect(first.ok && second.ok).toBe(true);
    const alone = await outcomeOf(runOf(20_000, { seed: 3 }), openInline, { size: 1 });
    expect(second.ok && second.value.statistics).toEqual(alone.statistics);
    pool.close();
  });

  it('comes with closing', async () => {
    const { handle, pool } = started(runOf(1_000_000), openInline, { size: 1 });
    pool.close();
    expect(await faultOf(handle)).toEqual({ kind: 'stopped' });
  });
});

describe('a worker that dies', () => {
  it.each([1, 2, 3])('of its order %i is replaced, told of, and its part done again', async (atOrder) => {
    const workers = mortalWorkers(1, atOrder);
    const told: Progress[] = [];
    const listener = { onProgress: (progress: Progress): unknown => told.push(progress) };
    const { handle } = started(runOf(COUNT), workers.open, { size: 2, chunk: PIECE, tellEveryMs: 1e9 }, listener);
    const result = await handle.result;
    expect(workers.opened).toBe(3);
    expect(told.at(-1)?.lostWorkers).toBe(1);
    const whole = await outcomeOf(runOf(COUNT), openInline, { size: 1 });
    expect(result.ok && result.value).toEqual({ ...whole, lostWorkers: 1 });
  });

  it('ends the run when the same part kills the next one too; the pool goes on', async () => {
    const workers = mortalWorkers(2, 1);
    const { handle, pool } = started(runOf(COUNT), workers.open, { size: 1 });
    expect(await faultOf(handle)).toEqual({ kind: 'worker-died' });
    const next = await pool.start(runOf(1000)).result;
    expect(next.ok).toBe(true);
    pool.close();
  });

  it('of the statistics loses nothing', async () => {
    // begin, chunk, account, statistics.
    const workers = mortalWorkers(1, 3);
    const { handle } = started(runOf(5000), workers.open, { size: 1 });
    const result = await handle.result;
    expect(workers.opened).toBe(2);
    expect(result.ok && result.value.statistics).toEqual(exactly(runJob({ ...runOf(5000), from: 0, to: 5000 })));
  });

  it('is not what a computation that throws is', async () => {
    const broken = runOf(1000, { worksheet: { sections: 3 } as unknown as ReturnType<typeof runOf>['worksheet'] });
    const { handle } = started(broken, openInline, { size: 1 });
    expect(await faultOf(handle)).toMatchObject({ kind: 'failed' });
  });
});
