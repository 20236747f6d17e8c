/** What Svelte's context hands down: components ask for it, nobody imports an instance. */
import { createContext } from 'svelte';

import type { Session } from '../app/session.svelte';
import type { LaterParts } from './shell/later-parts.svelte';

/** `getSession()` in a component's script gives the page's session; `provideSession` is called once, at the top. */
export const [getSession, provideSession] = createContext<Session>();

/** The parts of the page that come in a script of their own; `provideLater` is called once, at the top. */
export const [getLater, provideLater] = createContext<Pick<LaterParts, 'parts'>>();
