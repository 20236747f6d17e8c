/** What the page needs only after its first view stands: the side panel, search, dialogs, the print view, and the help and
 *  menus of the grid: one script of their own. */
export { helpFor } from '../grid/editor-help';
export { default as CaseMenu } from '../grid/CaseMenu.svelte';
export { default as EditorHelp } from '../grid/EditorHelp.svelte';
export { default as RowMenu } from '../grid/RowMenu.svelte';
export { default as UnitMenu } from '../grid/UnitMenu.svelte';
export { default as Menu } from '../parts/Menu.svelte';
export { default as DialogSet } from './DialogSet.svelte';
export { default as PanelHost } from './PanelHost.svelte';
export { default as PrintHost } from './PrintHost.svelte';
export { default as SearchBar } from './SearchBar.svelte';
