/**
 * What the page says aloud: one sentence at a time in a polite live region.
 * Holds: what is said within a short while is said together, once, the last three sentences of it; saying the same sentence again is heard again.
 */

const MOST_TOGETHER = 3;

/** Collects sentences and lets them be heard after a short silence. */
export class Announcer {
  /** The text of the live region. */
  text = $state('');
  #waiting: string[] = [];
  #timer: ReturnType<typeof setTimeout> | undefined;
  readonly #silenceMs: number;

  constructor(silenceMs = 250) {
    this.#silenceMs = silenceMs;
  }

  /** Says a sentence, after those that wait already. */
  say(sentence: string): void {
    if (sentence === '' || this.#waiting.includes(sentence)) return;
    this.#waiting.push(sentence);
    // A key held down does many things; what came last is what counts.
    this.#waiting = this.#waiting.slice(-MOST_TOGETHER);
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => this.flush(), this.#silenceMs);
  }

  /** Says what waits, at once. */
  flush(): void {
    clearTimeout(this.#timer);
    if (this.#waiting.length === 0) return;
    const text = this.#waiting.join(' ');
    // A live region is read when its text changes: a repeated sentence gets a blank that cannot be heard.
    this.text = text === this.text ? `${text}\u00a0` : text;
    this.#waiting = [];
  }
}
