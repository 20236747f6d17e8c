// Settings are kept at once, and what is read back is checked field by field.
import { describe, expect, it } from 'vitest';

import { Settings } from '../../src/app/settings.svelte';
import { fail, ok } from '../../src/base';
import type { JsonValue } from '../../src/store';

function memory(kept?: unknown) {
  const written: JsonValue[] = [];
  const store = {
    getSetting: () => Promise.resolve(ok(kept)),
    setSetting: (_key: string, value: JsonValue) => {
      written.push(value);
      return Promise.resolve(ok(undefined));
    },
  };
  return { store, written };
}

describe('settings', () => {
  it('are kept with each change', async () => {
    const { store, written } = memory();
    const settings = new Settings();
    await settings.readFrom(store);
    settings.theme = 'dark';
    settings.showLinear = true;
    settings.setColumn('note', 'hidden');
    expect(written).toHaveLength(3);
    expect(written[2]).toEqual({
      theme: 'dark',
      showLinear: true,
      columns: { requirement: 'shown', tolerance: 'auto', source: 'auto', note: 'hidden' },
      lastWorksheetId: null,
    });
  });

  it('come back', async () => {
    const settings = new Settings();
    await settings.readFrom(
      memory({ theme: 'light', showLinear: true, lastWorksheetId: 'x', columns: { note: 'shown' } }).store,
    );
    expect([settings.theme, settings.showLinear, settings.lastWorksheetId]).toEqual(['light', true, 'x']);
    expect(settings.columns).toEqual({ requirement: 'shown', tolerance: 'auto', source: 'auto', note: 'shown' });
  });

  it.each([
    undefined,
    null,
    'dark',
    7,
    { theme: 'pink', showLinear: 'yes', columns: 3, lastWorksheetId: 4 },
    { columns: { note: 1 } },
  ])('have their defaults in place of what is strange: %o', async (kept) => {
    const settings = new Settings();
    await settings.readFrom(memory(kept).store);
    expect([settings.theme, settings.showLinear, settings.lastWorksheetId]).toEqual(['system', false, null]);
    expect(settings.columns).toEqual({ requirement: 'shown', tolerance: 'auto', source: 'auto', note: 'auto' });
  });

  it('hold without a store that answers', async () => {
    const settings = new Settings();
    const fault = { code: 'unavailable', sentence: '', detail: '' } as const;
    await settings.readFrom({
      getSetting: () => Promise.resolve(fail(fault)),
      setSetting: () => Promise.resolve(fail(fault)),
    });
    settings.theme = 'dark';
    expect(settings.theme).toBe('dark');
  });
});
