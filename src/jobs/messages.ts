/**
 * What passes between a runner and its workers. Every message carries the id of its job; all of it is plain data, and columns of
 * figures are handed over, not copied. `encode` and `decode` are the only way in and out.
 */
import { fail, ok, type Result } from '../base';
import type { TrialStatistics } from '../analysis';
import type { Account, Spectrum } from './outcome';
import type { InputMoments, Part } from './trials-work';
import type { TrialsRun } from './trials-run';

/** To a worker. */
export type Order =
  | { readonly kind: 'begin'; readonly job: number; readonly run: TrialsRun }
  | {
      readonly kind: 'chunk';
      readonly job: number;
      readonly from: number;
      readonly to: number;
      readonly isKept: boolean;
    }
  | { readonly kind: 'account'; readonly job: number }
  | { readonly kind: 'statistics'; readonly job: number; readonly figures: Float64Array<ArrayBuffer> }
  | { readonly kind: 'forget'; readonly job: number };

/** From a worker. Each order but `begin` and `forget` has one reply. */
export type Reply =
  | { readonly kind: 'part'; readonly job: number; readonly part: Part; readonly inputs: readonly InputMoments[] }
  | { readonly kind: 'account'; readonly job: number; readonly account: Account }
  | {
      readonly kind: 'statistics';
      readonly job: number;
      readonly statistics: TrialStatistics;
      readonly spectrum: Spectrum;
    }
  | { readonly kind: 'failed'; readonly job: number; readonly why: string };

export type Message = Order | Reply;

/** A message on its way: what is posted, and what is handed over with it. */
export interface Posted {
  readonly data: unknown;
  readonly transfer: ArrayBuffer[];
}

/** Bumped with every change of the messages: a worker of another version than the page is not understood. */
const VERSION = 1;

export function encode(message: Message): Posted {
  return { data: { version: VERSION, message }, transfer: buffersOf(message) };
}

function buffersOf(message: Message): ArrayBuffer[] {
  switch (message.kind) {
    case 'part': {
      const { bins, figures } = message.part;
      return figures === undefined ? [bins.buffer] : [bins.buffer, figures.buffer];
    }
    case 'statistics':
      return 'figures' in message ? [message.figures.buffer] : [message.spectrum.counts.buffer];
    default:
      return [];
  }
}

const ORDERS: ReadonlySet<string> = new Set(['begin', 'chunk', 'account', 'statistics', 'forget']);
const REPLIES: ReadonlySet<string> = new Set(['part', 'account', 'statistics', 'failed']);

export const decodeOrder = (data: unknown): Result<Order, string> => decode(data, ORDERS) as Result<Order, string>;
export const decodeReply = (data: unknown): Result<Reply, string> => decode(data, REPLIES) as Result<Reply, string>;

function decode(data: unknown, kinds: ReadonlySet<string>): Result<Message, string> {
  if (typeof data !== 'object' || data === null || !('version' in data) || !('message' in data))
    return fail('This is no message of a job.');
  if (data.version !== VERSION) return fail(`A message of version ${String(data.version)} is not understood.`);
  const { message } = data;
  if (typeof message !== 'object' || message === null || !('kind' in message) || !('job' in message))
    return fail('The message has no kind or no job.');
  const { kind, job } = message;
  if (typeof kind !== 'string' || !kinds.has(kind) || typeof job !== 'number')
    return fail(`A message of the kind ${String(kind)} is not understood.`);
  return ok(message as Message);
}
