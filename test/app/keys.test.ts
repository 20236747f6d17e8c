// The key table: what each stroke does, where, and that no two actions claim one key.
import { describe, expect, it } from 'vitest';

import {
  actionFor,
  EDITOR_KEYS,
  KEY_BINDINGS,
  keyLabel,
  strokeName,
  typesText,
  type KeyStroke,
} from '../../src/app/keys';

const stroke = (key: string, more: Partial<KeyStroke> = {}): KeyStroke => ({
  key,
  code: '',
  ctrlKey: false,
  metaKey: false,
  altKey: false,
  shiftKey: false,
  ...more,
});

describe('the name of a stroke', () => {
  const cases: readonly (readonly [KeyStroke, string])[] = [
    [stroke('ArrowDown'), 'ArrowDown'],
    [stroke('z', { ctrlKey: true }), 'Ctrl+Z'],
    [stroke('Z', { ctrlKey: true, shiftKey: true }), 'Ctrl+Shift+Z'],
    [stroke('z', { metaKey: true }), 'Ctrl+Z'],
    [stroke('¬', { altKey: true, code: 'KeyL' }), 'Alt+L'],
    [stroke('?', { shiftKey: true }), '?'],
    [stroke(' '), 'Space'],
    [stroke('Enter', { altKey: true, shiftKey: true }), 'Alt+Shift+Enter'],
    [stroke('F10', { shiftKey: true }), 'Shift+F10'],
  ];
  it.each(cases)('%o is %s', (one, name) => {
    expect(strokeName(one)).toBe(name);
  });
});

describe('what a stroke does', () => {
  it.each([
    [stroke('Enter'), 'edit'],
    [stroke('Enter', { ctrlKey: true }), 'insert-below'],
    [stroke('Enter', { altKey: true }), 'repair'],
    [stroke('Enter', { altKey: true, shiftKey: true }), 'accept'],
    [stroke('Delete'), 'clear'],
    [stroke('Delete', { ctrlKey: true }), 'delete-lines'],
    [stroke('ArrowUp', { altKey: true }), 'move-up'],
    [stroke('ArrowUp', { shiftKey: true }), 'extend-up'],
    [stroke('z', { ctrlKey: true }), 'undo'],
    [stroke('y', { ctrlKey: true }), 'redo'],
    [stroke('F8'), 'next-finding'],
  ] as const)('%o: %s', (one, action) => {
    expect(actionFor(one, 'grid')).toBe(action);
  });

  it('keeps the keys of the grid to the grid', () => {
    expect(actionFor(stroke('Delete'), 'page')).toBeUndefined();
    expect(actionFor(stroke('F8'), 'page')).toBe('next-finding');
  });

  it('leaves letters alone', () => {
    expect(actionFor(stroke('p'), 'grid')).toBeUndefined();
  });
});

describe('the table', () => {
  const keys = KEY_BINDINGS.flatMap((one) => one.keys);

  it('gives no key to two actions', () => {
    expect(new Set(keys).size).toBe(keys.length);
  });

  it('takes none of the keys that browsers do not let pages have', () => {
    const reserved = [
      'Ctrl+N',
      'Ctrl+T',
      'Ctrl+W',
      'Ctrl+Shift+N',
      'Ctrl+Shift+T',
      'Ctrl+Shift+W',
      'Ctrl+Tab',
      'F11',
      'F12',
    ];
    expect(keys.filter((key) => reserved.includes(key))).toEqual([]);
  });

  it('says of every key what it does, each once', () => {
    const says = [...KEY_BINDINGS, ...EDITOR_KEYS].map((one) => one.says);
    expect(new Set(says).size).toBe(says.length);
    expect(says.every((sentence) => sentence.length > 3)).toBe(true);
  });

  it('shows arrows as arrows', () => {
    expect(keyLabel('Alt+ArrowUp')).toBe('Alt+↑');
  });
});

describe('keys that type', () => {
  it.each([
    [stroke('p'), true],
    [stroke('-'), true],
    [stroke('Process'), true],
    [stroke('Dead'), true],
    [stroke('{', { ctrlKey: true, altKey: true }), true],
    [stroke('p', { ctrlKey: true }), false],
    [stroke('p', { metaKey: true }), false],
    [stroke('Enter'), false],
    [stroke('Shift'), false],
  ] as const)('%o: %s', (one, types) => {
    expect(typesText(one)).toBe(types);
  });
});
