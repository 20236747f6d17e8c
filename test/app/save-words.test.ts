// The save state in words.
import { describe, expect, it } from 'vitest';

import { isInDanger, saveWords } from '../../src/app/save-words';
import type { KeepState } from '../../src/app/keeping.svelte';

const fault = { code: 'quota', sentence: 'The disk is full.', detail: '' } as const;
const at = new Date(2026, 10, 3, 14, 2).getTime();

describe('save words', () => {
  it.each<[KeepState, string, boolean]>([
    [{ kind: 'new' }, 'nothing to save yet', false],
    [{ kind: 'saved', at }, 'saved here 14:02', false],
    [{ kind: 'saving' }, 'saving …', false],
    [{ kind: 'failed', fault }, 'NOT saved', true],
    [{ kind: 'nowhere', fault }, 'NOT saved: no storage', true],
  ])('%o', (state, words, danger) => {
    expect(saveWords(state)).toBe(words);
    expect(isInDanger(state)).toBe(danger);
  });
});
