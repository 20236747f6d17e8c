/** The script of a worker: orders come in, replies go out, through the codec alone. */
import { Desk } from './desk';
import { decodeOrder, encode } from './messages';

/** What of a worker's surroundings is used here. */
interface WorkerScope {
  onmessage: ((event: MessageEvent<unknown>) => void) | null;
  postMessage(data: unknown, transfer: readonly ArrayBuffer[]): void;
}

const scope = globalThis as unknown as WorkerScope;
const desk = new Desk();

scope.onmessage = ({ data }) => {
  const order = decodeOrder(data);
  // The page is of another version than this script: thrown, so that the page hears of a death and not of nothing.
  if (!order.ok) throw new Error(order.fault);
  const work = desk.answer(order.value);
  let step = work.next();
  while (step.done !== true) step = work.next();
  if (step.value === undefined) return;
  const { data: reply, transfer } = encode(step.value);
  scope.postMessage(reply, transfer);
};
