import { describe, expect, it } from 'vitest';

import { askPersistence, estimateStorage } from '../../src/store';
import type { StorageAccess } from '../../src/store';

function storage(answers: { persisted?: boolean; persist?: boolean; estimate?: StorageEstimate }): StorageAccess {
  const answer = <T>(value: T | undefined): Promise<T> =>
    value === undefined ? Promise.reject(new TypeError('switched off')) : Promise.resolve(value);
  return {
    persisted: () => answer(answers.persisted),
    persist: () => answer(answers.persist),
    estimate: () => answer(answers.estimate),
  };
}

describe('asking for persistent storage', () => {
  it.each([
    ['granted before', storage({ persisted: true, persist: false }), 'granted'],
    ['granted now', storage({ persisted: false, persist: true }), 'granted'],
    ['refused', storage({ persisted: false, persist: false }), 'refused'],
    ['switched off', storage({}), 'unknown'],
    ['not offered', undefined, 'unknown'],
  ])('%s', async (_what, access, expected) => {
    expect(await askPersistence(access)).toBe(expected);
  });
});

describe('the estimate of room', () => {
  it.each([
    ['both figures', storage({ estimate: { usage: 5, quota: 90 } }), { usedBytes: 5, quotaBytes: 90 }],
    ['no quota', storage({ estimate: { usage: 5 } }), null],
    ['switched off', storage({}), null],
    ['not offered', undefined, null],
  ])('%s', async (_what, access, expected) => {
    expect(await estimateStorage(access)).toEqual(expected);
  });
});
