/** Starting the page: the store, the settings, and the worksheet that was open last. */
import { WORKSHEET_VERSION } from '../exchange';
import type { StoreTrouble } from '../store';
import { Session } from './session.svelte';
import { Settings } from './settings.svelte';
import { worksheetOfThisTab } from './tab-memory';

/** The session of this page, with the worksheet that this tab, or else the last one, had open; or with an empty one. */
export async function startSession(): Promise<Session> {
  let session: Session | null = null;
  // The database library is a fifth of all script: it comes by itself, so that the page does not wait for it to be read.
  const { openStore } = await import('../store/open-store');
  const opened = await openStore({
    formatVersion: WORKSHEET_VERSION,
    onTrouble: (trouble) => {
      if (session !== null) session.notice = { text: TROUBLES[trouble] };
    },
  });
  const settings = new Settings();
  if (opened.ok) await settings.readFrom(opened.value);
  const lastId = worksheetOfThisTab() ?? settings.lastWorksheetId;
  session = new Session(settings, opened);
  if (opened.ok) {
    const last = lastId === null ? undefined : await session.opening.openWorksheet(lastId);
    if (last?.ok !== true) await session.opening.newWorksheet();
    if (last?.ok === false && last.fault.code !== 'missing') session.notice = { text: last.fault.sentence };
  }
  return session;
}

const TROUBLES: Readonly<Record<StoreTrouble, string>> = {
  blocked: 'Another tab keeps an older version of this page open. Close the other tabs of this page.',
  superseded:
    'A later version of this page is open in another tab, so nothing more is kept from this one. Save the worksheet as a file if the header says that it is not saved, then reload.',
  closed: 'The browser closed the storage; it is opened again with the next edit.',
};
