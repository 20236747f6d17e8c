/** The unit field of the side panel, for whoever wants to type a unit. */
import { tick } from 'svelte';
import type { Session } from '../../app/session.svelte';

/** Shows the side panel and brings the focus to its field for the unit of the selected line. */
export function focusUnitField(session: Session): void {
  session.panel = 'working';
  void tick().then(() => document.querySelector<HTMLElement>('[data-field="unit"]')?.focus());
}
