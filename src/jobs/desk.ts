/** The worker's side of the messages: takes orders, and gives a reply to each that asks for one. It knows several jobs at once. */
import { exactStatistics } from './exact';
import type { Order, Reply } from './messages';
import { spectrumOf } from './spectrum';
import { TrialsWork } from './trials-work';
import type { TrialsRun } from './trials-run';

export class Desk {
  private readonly runs = new Map<number, TrialsRun>();
  private readonly works = new Map<number, TrialsWork>();

  /** Carries out an order, stopping for breath in between; what it throws becomes a reply. */
  *answer(order: Order): Generator<undefined, Reply | undefined> {
    const { job } = order;
    try {
      switch (order.kind) {
        case 'begin':
          this.runs.set(job, order.run);
          return undefined;
        case 'forget':
          this.runs.delete(job);
          this.works.delete(job);
          return undefined;
        case 'chunk': {
          const work = this.work(job);
          const part = yield* work.chunk(order.from, order.to, order.isKept);
          return { kind: 'part', job, part, inputs: work.inputs };
        }
        case 'account':
          return { kind: 'account', job, account: this.work(job).account() };
        case 'statistics': {
          const { figures } = order;
          const spectrum = spectrumOf(figures);
          return {
            kind: 'statistics',
            job,
            statistics: exactStatistics(figures, this.work(job).requirement),
            spectrum,
          };
        }
      }
    } catch (error) {
      return { kind: 'failed', job, why: error instanceof Error ? error.message : String(error) };
    }
  }

  private work(job: number): TrialsWork {
    const known = this.works.get(job);
    if (known !== undefined) return known;
    const run = this.runs.get(job);
    if (run === undefined) throw new Error('The worker was not told of this job.');
    const work = new TrialsWork(run);
    this.works.set(job, work);
    return work;
  }
}
