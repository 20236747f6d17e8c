/** The key table as the overview shows it. */
import { EDITOR_KEYS, KEY_BINDINGS, keyLabel, type KeyGroup } from '../../app/keys';

/** A group of keys in the overview. */
export interface ShownKeyGroup {
  readonly title: string;
  readonly keys: readonly { readonly keys: readonly string[]; readonly says: string }[];
}

const GROUPS: readonly KeyGroup[] = ['Moving', 'Lines', 'Findings', 'The page'];

/** All keys, in the groups and the order of the table; those of the editor and the clipboard last. */
export function keyGroups(): readonly ShownKeyGroup[] {
  const groups = GROUPS.map((title) => ({
    title,
    keys: KEY_BINDINGS.filter((one) => one.group === title).map((one) => ({
      keys: one.keys.map(keyLabel),
      says: one.says,
    })),
  }));
  const editor = EDITOR_KEYS.map((one) => ({ keys: one.keys.map(keyLabel), says: one.says }));
  return [...groups, { title: 'While typing in a cell', keys: editor }];
}
