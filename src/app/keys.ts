/**
 * The keys of the page: one table that the grid obeys and that the key overview prints.
 * Holds: no key that browsers keep for themselves is used; keys with a letter and Alt are told by their place on the
 * keyboard, since Alt changes the letter on some systems. Ctrl stands for the Command key on a Mac.
 */

/** What a key can do. */
export type Action =
  | 'up'
  | 'down'
  | 'left'
  | 'right'
  | 'row-start'
  | 'row-end'
  | 'sheet-start'
  | 'sheet-end'
  | 'page-up'
  | 'page-down'
  | 'extend-up'
  | 'extend-down'
  | 'select-all'
  | 'collapse-selection'
  | 'edit'
  | 'clear'
  | 'insert-below'
  | 'insert-above'
  | 'duplicate'
  | 'delete-lines'
  | 'move-up'
  | 'move-down'
  | 'new-section'
  | 'fold'
  | 'menu'
  | 'repair'
  | 'accept'
  | 'next-finding'
  | 'previous-finding'
  | 'undo'
  | 'redo'
  | 'search'
  | 'linear'
  | 'save-file'
  | 'open-file'
  | 'other-pane'
  | 'keys';

/** Where a key works: in the grid outside an editor, or anywhere on the page. */
export type KeyPlace = 'grid' | 'page';

/** One line of the key overview. */
export interface KeyBinding {
  /** All ways to press it, as shown. */
  readonly keys: readonly string[];
  readonly action: Action;
  readonly place: KeyPlace;
  readonly group: KeyGroup;
  readonly says: string;
}

export type KeyGroup = 'Moving' | 'Lines' | 'Findings' | 'The page';

const binding = (
  place: KeyPlace,
  group: KeyGroup,
  action: Action,
  says: string,
  ...keys: readonly string[]
): KeyBinding => ({ keys, action, place, group, says });

/** Every key outside the editor. */
export const KEY_BINDINGS: readonly KeyBinding[] = [
  binding('grid', 'Moving', 'up', 'One row up', 'ArrowUp'),
  binding('grid', 'Moving', 'down', 'One row down', 'ArrowDown'),
  binding('grid', 'Moving', 'left', 'One cell to the left', 'ArrowLeft'),
  binding('grid', 'Moving', 'right', 'One cell to the right', 'ArrowRight'),
  binding('grid', 'Moving', 'row-start', 'First cell of the row', 'Home'),
  binding('grid', 'Moving', 'row-end', 'Last cell of the row', 'End'),
  binding('grid', 'Moving', 'sheet-start', 'Top of the worksheet', 'Ctrl+Home'),
  binding('grid', 'Moving', 'sheet-end', 'Foot of the worksheet', 'Ctrl+End'),
  binding('grid', 'Moving', 'page-up', 'One view up', 'PageUp'),
  binding('grid', 'Moving', 'page-down', 'One view down', 'PageDown'),
  binding('page', 'Moving', 'other-pane', 'Between the account and the panel', 'F6'),
  binding('page', 'Moving', 'search', 'Search symbols, labels, entries, notes', '/', 'Ctrl+Shift+F'),

  binding('grid', 'Lines', 'edit', 'Edit the cell (typing replaces it); on a section, rename it', 'Enter', 'F2'),
  binding(
    'grid',
    'Lines',
    'clear',
    'Clear the cell (in a case, use the line’s own entry again); delete several selected lines',
    'Delete',
    'Backspace',
  ),
  binding('grid', 'Lines', 'insert-below', 'New line below', 'Ctrl+Enter', 'Insert'),
  binding('grid', 'Lines', 'insert-above', 'New line above', 'Ctrl+Shift+Enter', 'Shift+Insert'),
  binding('grid', 'Lines', 'new-section', 'New section below this one', 'Ctrl+Alt+Enter'),
  binding('grid', 'Lines', 'duplicate', 'Duplicate the selected lines', 'Ctrl+D'),
  binding(
    'grid',
    'Lines',
    'delete-lines',
    'Delete the selected lines, or the section',
    'Ctrl+Delete',
    'Ctrl+Backspace',
  ),
  binding('grid', 'Lines', 'move-up', 'Move the selected lines, or the section, up', 'Alt+ArrowUp'),
  binding('grid', 'Lines', 'move-down', 'Move the selected lines, or the section, down', 'Alt+ArrowDown'),
  binding('grid', 'Lines', 'extend-up', 'Select one more line upwards', 'Shift+ArrowUp'),
  binding('grid', 'Lines', 'extend-down', 'Select one more line downwards', 'Shift+ArrowDown'),
  binding('grid', 'Lines', 'select-all', 'Select all lines', 'Ctrl+A'),
  binding('grid', 'Lines', 'collapse-selection', 'Back to one line', 'Escape'),
  binding('grid', 'Lines', 'fold', 'Fold or open the section, or the findings of the line', 'Space'),
  binding('grid', 'Lines', 'menu', 'Menu of the row', 'Shift+F10', 'ContextMenu'),

  binding('grid', 'Findings', 'repair', 'Do the first repair of the line', 'Alt+Enter'),
  binding('grid', 'Findings', 'accept', 'Accept the finding with a reason', 'Alt+Shift+Enter'),
  binding('page', 'Findings', 'next-finding', 'Next finding', 'F8'),
  binding('page', 'Findings', 'previous-finding', 'Previous finding', 'Shift+F8'),

  binding('page', 'The page', 'undo', 'Undo', 'Ctrl+Z'),
  binding('page', 'The page', 'redo', 'Redo', 'Ctrl+Y', 'Ctrl+Shift+Z'),
  binding('page', 'The page', 'linear', 'Show or hide linear values', 'Alt+L'),
  binding('page', 'The page', 'save-file', 'Save as a file', 'Ctrl+S'),
  binding('page', 'The page', 'open-file', 'Open a file', 'Ctrl+O'),
  binding('page', 'The page', 'keys', 'This overview', 'F1', '?'),
];

/** Keys inside the editor, and the clipboard's, which the browser itself tells the page of: for the overview. */
export const EDITOR_KEYS: readonly { readonly keys: readonly string[]; readonly says: string }[] = [
  { keys: ['Enter'], says: 'Keep what was typed and go down; from the last line to a new one' },
  {
    keys: ['Tab', 'Shift+Tab'],
    says: 'Keep it and go to the next, or the previous, cell. Outside the editor Tab leaves the account',
  },
  { keys: ['Escape'], says: 'Close the suggestions; again: put back what stood there' },
  { keys: ['ArrowUp', 'ArrowDown'], says: 'Choose a suggestion; Enter or Tab takes it' },
  { keys: ['F2'], says: 'Stop editing, keep what was typed' },
  {
    keys: ['Ctrl+C', 'Ctrl+X', 'Ctrl+V'],
    says: 'Copy, cut, paste lines; a table from elsewhere is shown before it is taken',
  },
];

/** What a key handler needs to know of a keyboard event. */
export interface KeyStroke {
  readonly key: string;
  readonly code: string;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly altKey: boolean;
  readonly shiftKey: boolean;
}

const byKey = new Map(KEY_BINDINGS.flatMap((one) => one.keys.map((key) => [key, one] as const)));

/** True for the name of a key that types a character, and not, for instance, `Enter`. */
export function isOneCharacter(key: string): boolean {
  return /^.$/su.test(key);
}

/** A key stroke as the table writes it: `Ctrl+Shift+Z`. Shift is left out where it only makes the character. */
export function strokeName(stroke: KeyStroke): string {
  const { key, code, altKey, shiftKey } = stroke;
  const ctrl = stroke.ctrlKey || stroke.metaKey;
  const isCharacter = isOneCharacter(key);
  let name = key === ' ' ? 'Space' : isCharacter ? key.toUpperCase() : key;
  if (altKey && /^Key[A-Z]$/.test(code)) name = code.slice(3);
  const makesCharacter = isCharacter && key !== ' ' && !ctrl && !altKey;
  return `${ctrl ? 'Ctrl+' : ''}${altKey ? 'Alt+' : ''}${shiftKey && !makesCharacter ? 'Shift+' : ''}${name}`;
}

/** What a key stroke does outside an editor, or undefined. With `place`, only keys that work there. */
export function actionFor(stroke: KeyStroke, place: KeyPlace): Action | undefined {
  const found = byKey.get(strokeName(stroke));
  if (found === undefined) return undefined;
  return place === 'grid' || found.place === 'page' ? found.action : undefined;
}

/**
 * True for a key that types something, and so opens the editor. Keys of input methods and dead keys count: the letter that
 * they make comes later, and goes to the editor if that has the focus by then. AltGr comes as Ctrl and Alt together.
 */
export function typesText(stroke: KeyStroke): boolean {
  if (stroke.key === 'Process' || stroke.key === 'Dead' || stroke.key === 'Unidentified') return true;
  if (!isOneCharacter(stroke.key) || stroke.metaKey) return false;
  return stroke.ctrlKey === stroke.altKey;
}

/** How a key is written for people. */
export function keyLabel(key: string): string {
  return key
    .replace('ArrowUp', '↑')
    .replace('ArrowDown', '↓')
    .replace('ArrowLeft', '←')
    .replace('ArrowRight', '→')
    .replace('ContextMenu', 'Menu key');
}
