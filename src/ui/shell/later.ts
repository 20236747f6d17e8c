/** What the page needs only after its first view stands: the side panel, search, dialogs, the print view: one script of their own. */
export { default as DialogSet } from './DialogSet.svelte';
export { default as PanelHost } from './PanelHost.svelte';
export { default as PrintHost } from './PrintHost.svelte';
export { default as SearchBar } from './SearchBar.svelte';
