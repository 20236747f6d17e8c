/** Runs for the tests of jobs, and ports that behave like workers: late, out of order, and mortal. */
import { statisticsOf, type TrialStatistics } from '../../src/analysis';
import type { Fault, Handle, Listener, TrialsOutcome, TrialsRun } from '../../src/jobs';
import { openInline } from '../../src/jobs/inline-runner';
import { Pool, type OpenPort, type PoolOptions } from '../../src/jobs/pool';
import { sheetOf } from '../engine/notation';
import { both, withTolerances } from '../analysis/support';

/** A small budget in which the losses drive what fails. */
const WORKSHEET = withTolerances(
  sheetOf('P = 30 dBm\nG = 12 dB\nL = 110 dB\nN = -80 dBm\nz = P + G - L require >= -69 dBm\nsnr = z - N'),
  {
    P: both('1 dB', 'uniform'),
    G: { below: '0.5 dB', above: '0.2 dB', shape: 'triangular' },
    L: both('3 dB', 'normal'),
  },
);

export const lineIdOf = (symbol: string): string => {
  for (const section of WORKSHEET.sections)
    for (const line of 'lines' in section ? (section.lines as readonly { id: string; symbol: string }[]) : [])
      if (line.symbol === symbol) return line.id;
  throw new Error(`there is no line ${symbol}`);
};

export const runOf = (count: number, more: Partial<TrialsRun> = {}): TrialsRun => ({
  ...{ purpose: 'test', worksheet: WORKSHEET, lineId: lineIdOf('z'), caseId: 'nominal', seed: 7, count },
  ...more,
});

/** A port that answers after a while that differs from worker to worker, so that parts come in out of order. */
export const lateWorkers = (): OpenPort => {
  let opened = 0;
  return (onReply, onDeath) => {
    const delayMs = (opened++ * 7) % 11;
    return openInline((reply) => setTimeout(() => onReply(reply), delayMs), onDeath);
  };
};

/** Workers of which the first so many die of the order with this number that they are given. */
export const mortalWorkers = (deaths: number, atOrder: number): { readonly open: OpenPort; opened: number } => {
  const workers = {
    opened: 0,
    open: ((onReply, onDeath) => {
      const isMortal = workers.opened++ < deaths;
      let orders = 0;
      let isDead = false;
      const port = openInline((reply) => {
        if (!isDead) onReply(reply);
      }, onDeath);
      return {
        post: (order) => {
          if (isMortal && orders++ === atOrder) {
            isDead = true;
            port.end();
            setTimeout(onDeath, 0);
          } else port.post(order);
        },
        end: () => port.end(),
      };
    }) satisfies OpenPort,
  };
  return workers;
};

/** Starts a run in a pool of its own. */
export function started(
  run: TrialsRun,
  open: OpenPort,
  options: PoolOptions,
  listener?: Listener,
): { readonly handle: Handle; readonly pool: Pool } {
  const pool = new Pool(open, options);
  return { handle: pool.start(run, listener), pool };
}

/** What a run gives. Throws where it gives nothing. */
export async function outcomeOf(run: TrialsRun, open: OpenPort, options: PoolOptions): Promise<TrialsOutcome> {
  const { handle, pool } = started(run, open, options);
  const result = await handle.result;
  pool.close();
  if (!result.ok) throw new Error(JSON.stringify(result.fault));
  return result.value;
}

export async function faultOf(handle: Handle): Promise<Fault | undefined> {
  const result = await handle.result;
  return result.ok ? undefined : result.fault;
}

/** The statistics of figures by analysis alone, with the requirement of z. */
export const exactly = (figures: Float64Array): TrialStatistics =>
  statisticsOf(figures, { bound: 'at least', limit: -69, met: true, margin: 1, unit: 'dB' });
