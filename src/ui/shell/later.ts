/** What the page needs only after it stands: dialogs and the print view, in one script of their own. */
export { default as DialogSet } from './DialogSet.svelte';
export { default as PrintHost } from './PrintHost.svelte';
