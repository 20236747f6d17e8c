// The panel of one section in a page, with a session of its own.
import { render } from '@testing-library/svelte';
import { flushSync, tick } from 'svelte';

import { Session } from '../../../src/app/session.svelte';
import { Settings } from '../../../src/app/settings.svelte';
import { fail } from '../../../src/base';
import { writeWorksheetFile } from '../../../src/exchange';
import type { Section, Worksheet } from '../../../src/worksheet';
import PanelStage from './PanelStage.svelte';

const CASES = [
  { id: 'calm', name: 'Calm' },
  { id: 'storm', name: 'Storm' },
];

/** Shows the first section's panel. */
export async function stage(part: 'pool' | 'curve', ...sections: readonly Section[]): Promise<Session> {
  const worksheet: Worksheet = { id: '0b7c1a52-6a0e-4f39-9f57-6c5e8a1d2f33', title: 'Test', cases: CASES, sections };
  const session = new Session(new Settings(), fail({ code: 'unavailable', sentence: '', detail: '' }));
  await session.opening.importText(writeWorksheetFile(worksheet));
  render(PanelStage, { session, part, sectionId: sections[0]?.id ?? '' });
  await settle();
  return session;
}

/** Lets the page follow. */
export async function settle(): Promise<void> {
  flushSync();
  await tick();
  await tick();
}

/** The text without runs of blanks. */
export const plain = (element: Element): string => element.textContent.replace(/\s+/g, ' ').trim();
