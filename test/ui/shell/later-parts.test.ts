// What the page fetches once it stands.
import { describe, expect, it, vi } from 'vitest';

import { LaterParts } from '../../../src/ui/shell/later-parts.svelte';

describe('the later parts', () => {
  it('are fetched together, and not before they are asked for', async () => {
    const later = new LaterParts();
    const onFault = vi.fn();
    const fetched = later.fetch(onFault);
    expect(later.parts).toBeUndefined();
    await fetched;
    expect(Object.keys(later.parts ?? {}).sort()).toEqual([
      ...['CaseMenu', 'DialogSet', 'EditorHelp', 'Menu', 'PanelHost', 'PrintHost', 'RowMenu', 'SearchBar', 'UnitMenu'],
      'helpFor',
    ]);
    expect(onFault).not.toHaveBeenCalled();
  });

  it('are said to be missing when they cannot be had', async () => {
    vi.doMock('../../../src/ui/shell/later', () => {
      throw new Error('The server has been stopped.');
    });
    vi.resetModules();
    const fresh = await import('../../../src/ui/shell/later-parts.svelte');
    const later = new fresh.LaterParts();
    const onFault = vi.fn();
    await later.fetch(onFault);
    expect(onFault).toHaveBeenCalledOnce();
    expect(later.parts).toBeUndefined();
    vi.doUnmock('../../../src/ui/shell/later');
  });
});
