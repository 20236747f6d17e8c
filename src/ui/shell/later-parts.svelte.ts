/**
 * The parts of the page that come in a script of their own, fetched as soon as the first view stands and the page has nothing
 * better to do: the account does not wait for them, and they are there also when the server has been stopped since.
 * Holds: this is the only place that fetches `later`, and every part of it appears in one step.
 */
import type * as Later from './later';

/** How long a busy page may put the fetching off, in milliseconds. */
const PATIENCE_MS = 500;

/** The later parts: undefined until they are there. */
export class LaterParts {
  parts = $state.raw<typeof Later | undefined>(undefined);

  /** Fetches them. `onFault` is called when they cannot be had. */
  async fetch(onFault: () => void): Promise<void> {
    await pageIsIdle();
    try {
      this.parts = await import('./later');
    } catch {
      onFault();
    }
  }
}

function pageIsIdle(): Promise<void> {
  return new Promise((resolve) => {
    if ('requestIdleCallback' in window) requestIdleCallback(() => resolve(), { timeout: PATIENCE_MS });
    // Not every browser tells; a frame has been shown by then.
    else setTimeout(resolve, 50);
  });
}
