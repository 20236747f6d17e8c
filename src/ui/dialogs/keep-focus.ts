/** Keeping the focus in a dialog when what had it is taken away. */
import { tick } from 'svelte';

/** Once the page is up to date: when nothing has the focus any more, gives it to the first button found in `place`. */
export async function focusIfLost(place: () => HTMLElement | undefined): Promise<void> {
  await tick();
  const holder = document.activeElement;
  // A browser may leave the focus on the dialog itself.
  if (holder === null || holder === document.body || holder instanceof HTMLDialogElement)
    place()?.querySelector('button')?.focus();
}
