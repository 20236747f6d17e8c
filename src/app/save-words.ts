/** The save state in words, for the header. */
import type { KeepState } from './keeping.svelte';

const TIME = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** `saved here 14:02`; states in which edits are in danger begin with *NOT saved*. */
export function saveWords(state: KeepState): string {
  switch (state.kind) {
    case 'new':
      return 'nothing to save yet';
    case 'saved':
      return `saved here ${TIME.format(state.at)}`;
    case 'saving':
      return 'saving …';
    case 'failed':
      return 'NOT saved';
    case 'conflict':
      return 'NOT saved: changed in another tab';
    case 'nowhere':
      return 'NOT saved: no storage';
  }
}

/** True when the person has to do something about it. */
export function isInDanger(state: KeepState): boolean {
  return state.kind === 'failed' || state.kind === 'conflict' || state.kind === 'nowhere';
}
