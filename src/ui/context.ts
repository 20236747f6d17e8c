/** The session, handed down through Svelte's context: components ask for it, nobody imports an instance. */
import { createContext } from 'svelte';

import type { Session } from '../app/session.svelte';

/** `getSession()` in a component's script gives the page's session; `provideSession` is called once, at the top. */
export const [getSession, provideSession] = createContext<Session>();
