/** A run at the runner's side: its tasks, and what becomes of their replies. */
import type { Result } from '../base';
import { Gathering } from './gather';
import type { Order, Reply } from './messages';
import type { TrialsOutcome } from './outcome';
import type { Fault, Listener } from './runner';
import { EXACT_LIMIT, type TrialsRun } from './trials-run';

export interface Task {
  /** Made when it is sent: what is handed over with an order is gone. */
  readonly order: (job: Job) => Order;
  /** True: a worker died of it once. */
  readonly isSecondTry: boolean;
}

export interface Job {
  readonly id: number;
  readonly run: TrialsRun;
  readonly listener: Listener;
  /** Not yet handed out, in order. */
  readonly tasks: Task[];
  readonly gathering: Gathering;
  hasAccount: boolean;
  isOver: boolean;
  toldAtMs: number;
  /** The end of it, while the account is still wanting. */
  outcome: TrialsOutcome | undefined;
  readonly resolve: (result: Result<TrialsOutcome, Fault>) => void;
}

const isKept = (run: TrialsRun): boolean => run.count <= EXACT_LIMIT;

/** The account is taken early, by the first worker that is free after each has begun. */
const ACCOUNT_AT = 1;

export function tasksOf(run: TrialsRun, chunk: number): Task[] {
  const tasks: Task[] = [];
  for (let from = 0; from < run.count; from += chunk) {
    const to = Math.min(run.count, from + chunk);
    tasks.push({
      order: ({ id }) => ({ kind: 'chunk', job: id, from, to, isKept: isKept(run) }),
      isSecondTry: false,
    });
  }
  tasks.splice(ACCOUNT_AT, 0, { order: ({ id }) => ({ kind: 'account', job: id }), isSecondTry: false });
  return tasks;
}

export function newJob(
  id: number,
  run: TrialsRun,
  listener: Listener,
  tasks: Task[],
): { readonly job: Job; readonly result: Promise<Result<TrialsOutcome, Fault>> } {
  let resolve: Job['resolve'] = () => undefined;
  const result = new Promise<Result<TrialsOutcome, Fault>>((settle) => (resolve = settle));
  const job: Job = {
    ...{ id, run, listener, tasks, resolve },
    gathering: new Gathering(isKept(run), run.count),
    hasAccount: false,
    isOver: false,
    toldAtMs: -Infinity,
    outcome: undefined,
  };
  return { job, result };
}

/** Takes a reply in; gives the outcome when that was the last one wanted. */
export function replyTo(job: Job, reply: Exclude<Reply, { readonly kind: 'failed' }>): TrialsOutcome | undefined {
  const { gathering, run } = job;
  switch (reply.kind) {
    case 'account':
      job.hasAccount = true;
      job.listener.onAccount?.(reply.account);
      break;
    case 'part':
      gathering.add(reply.part, reply.inputs);
      if (gathering.done < run.count) break;
      if (gathering.figures === undefined) job.outcome = gathering.outcome();
      else job.tasks.push(STATISTICS);
      break;
    case 'statistics': {
      const binned = gathering.outcome();
      const { figures } = gathering;
      if (binned === undefined || figures === undefined) break;
      const { statistics, spectrum } = reply;
      job.outcome = { ...binned, statistics, spectrum, figures, isBinned: false, quantileError: 0 };
      break;
    }
  }
  return job.hasAccount && job.outcome !== undefined
    ? { ...job.outcome, lostWorkers: gathering.lostWorkers }
    : undefined;
}

/** The exact statistics of all figures: of a copy, since the worker may die of it. */
const STATISTICS: Task = {
  order: ({ id, gathering }) => ({
    kind: 'statistics',
    job: id,
    figures: gathering.figures?.slice() ?? new Float64Array(0),
  }),
  isSecondTry: false,
};
