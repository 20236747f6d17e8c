/**
 * A runner over ports, behind each of which sits a worker or what stands in for one: runs are cut into tasks, and a port that is
 * free takes the next. A port that dies is replaced and its task done again, once.
 * Holds: no message of a run that is over has any effect; a run is settled once; a port has one task at a time.
 */
import { fail, ok } from '../base';
import type { Order, Reply } from './messages';
import { newJob, replyTo, tasksOf, type Job, type Task } from './job';
import type { TrialsOutcome } from './outcome';
import type { Fault, Handle, Listener, Runner } from './runner';
import { CHUNK, PIECE, type TrialsRun } from './trials-run';

/** The way to a worker. */
export interface Port {
  post(order: Order): void;
  /** Ends the worker; it says nothing more. */
  end(): void;
}

/** Opens a port. `onDeath` is called at most once, and not from within. */
export type OpenPort = (onReply: (reply: Reply) => void, onDeath: () => void) => Port;

export interface PoolOptions {
  readonly size: number;
  /** Trials in a chunk: a whole number of pieces. */
  readonly chunk?: number;
  /** The least time between two tellings of progress. */
  readonly tellEveryMs?: number;
}

/** As often as somebody can follow. */
const TELL_EVERY_MS = 250;

interface Place {
  port: Port;
  /** Jobs whose run this worker was told. */
  readonly told: Set<number>;
  busy: { readonly job: Job; readonly task: Task } | undefined;
}

export class Pool implements Runner {
  private readonly places: Place[] = [];
  private readonly jobs: Job[] = [];
  private nextJob = 1;
  private readonly chunk: number;

  constructor(
    private readonly openPort: OpenPort,
    private readonly options: PoolOptions,
  ) {
    this.chunk = Math.max(1, Math.round((options.chunk ?? CHUNK) / PIECE)) * PIECE;
  }

  start(run: TrialsRun, listener: Listener = {}): Handle {
    for (const job of [...this.jobs]) if (job.run.purpose === run.purpose) this.settle(job, { kind: 'stopped' });
    const { job, result } = newJob(this.nextJob++, run, listener, tasksOf(run, this.chunk));
    this.jobs.push(job);
    while (this.places.length < Math.max(1, this.options.size)) this.places.push(this.open());
    this.handOut();
    return { result, stop: () => this.settle(job, { kind: 'stopped' }) };
  }

  close(): void {
    for (const job of [...this.jobs]) this.settle(job, { kind: 'stopped' });
    for (const { port } of this.places.splice(0)) port.end();
  }

  private open(): Place {
    const place: Place = {
      port: this.openPort(
        (reply) => this.take(place, reply),
        () => this.bury(place),
      ),
      told: new Set(),
      busy: undefined,
    };
    return place;
  }

  private handOut(): void {
    for (const place of this.places) {
      if (place.busy !== undefined) continue;
      const job = this.jobs.find(({ tasks }) => tasks.length > 0);
      const task = job?.tasks.shift();
      if (job === undefined || task === undefined) return;
      place.busy = { job, task };
      if (!place.told.has(job.id)) place.port.post({ kind: 'begin', job: job.id, run: job.run });
      place.told.add(job.id);
      place.port.post(task.order(job));
    }
  }

  private take(place: Place, reply: Reply): void {
    const { busy } = place;
    if (busy?.job.id !== reply.job) return;
    place.busy = undefined;
    const { job } = busy;
    if (job.isOver) this.forget(place, job);
    else if (reply.kind === 'failed') this.settle(job, { kind: 'failed', why: reply.why });
    else {
      const outcome = replyTo(job, reply);
      if (outcome !== undefined) {
        this.settle(job, outcome);
      } else this.tell(job, false);
    }
    this.handOut();
  }

  private bury(place: Place): void {
    const at = this.places.indexOf(place);
    if (at < 0) return;
    const { busy } = place;
    // A worker that dies idle is replaced when there is work again.
    if (busy === undefined || busy.job.isOver) this.places.splice(at, 1);
    else {
      const { job, task } = busy;
      job.gathering.lostWorkers++;
      if (task.isSecondTry) {
        this.places.splice(at, 1);
        this.settle(job, { kind: 'worker-died' });
      } else {
        job.tasks.unshift({ ...task, isSecondTry: true });
        this.places[at] = this.open();
        this.tell(job, true);
      }
    }
    if (this.jobs.length === 0) return;
    while (this.places.length < Math.max(1, this.options.size)) this.places.push(this.open());
    this.handOut();
  }

  private tell(job: Job, atOnce: boolean): void {
    const { onProgress } = job.listener;
    const now = performance.now();
    if (onProgress === undefined || (!atOnce && now - job.toldAtMs < (this.options.tellEveryMs ?? TELL_EVERY_MS)))
      return;
    job.toldAtMs = now;
    const { gathering } = job;
    onProgress({
      done: gathering.done,
      count: job.run.count,
      soFar: gathering.outcome(),
      lostWorkers: gathering.lostWorkers,
    });
  }

  private settle(job: Job, end: Fault | TrialsOutcome): void {
    const at = this.jobs.indexOf(job);
    if (at < 0) return;
    this.jobs.splice(at, 1);
    job.isOver = true;
    job.tasks.length = 0;
    for (const place of this.places) if (place.busy?.job !== job) this.forget(place, job);
    job.resolve('kind' in end ? fail(end) : ok(end));
  }

  private forget(place: Place, job: Job): void {
    if (place.told.delete(job.id)) place.port.post({ kind: 'forget', job: job.id });
  }
}
