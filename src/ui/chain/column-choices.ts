/** What a person has chosen to see of line-ups: it lasts as long as the session, for each chain. */
import type { ChainColumnKey, ColumnChoices } from '../../app/chain-columns';
import type { Session } from '../../app/session.svelte';

/** Nothing chosen: columns are shown by their use. */
export const NO_COLUMN_CHOICES: ColumnChoices = new Map();

const bySession = new WeakMap<Session, Map<string, ColumnChoices>>();

/** The choices for a chain. */
export function columnChoices(session: Session, sectionId: string): ColumnChoices {
  return bySession.get(session)?.get(sectionId) ?? NO_COLUMN_CHOICES;
}

/** Keeps one more choice; the answer are all of them. */
export function chooseColumn(session: Session, sectionId: string, key: ChainColumnKey, shown: boolean): ColumnChoices {
  const chosen = new Map(columnChoices(session, sectionId)).set(key, shown);
  const known = bySession.get(session) ?? new Map<string, ColumnChoices>();
  bySession.set(session, known.set(sectionId, chosen));
  return chosen;
}
