import { describe, expect, it } from 'vitest';

import { migrate, MIGRATIONS, WORKSHEET_VERSION, type Migration } from '../../src/exchange/migrations';

const registry: readonly Migration[] = [
  { to: 2, title: 'title becomes name', apply: ({ title, ...rest }) => ({ ...rest, name: title }) },
  { to: 3, title: 'name is told twice', apply: (document) => ({ ...document, again: document['name'] }) },
];

describe('migrations', () => {
  it('are none yet: version 1 is the first and the one written', () => {
    expect(MIGRATIONS).toEqual([]);
    expect(WORKSHEET_VERSION).toBe(1);
  });

  it('are applied in order from the version of the document on', () => {
    const document = { version: 1, title: 'Buoy' };
    expect(migrate(document, 1, registry)).toEqual({ version: 3, name: 'Buoy', again: 'Buoy' });
    expect(migrate({ version: 2, name: 'Buoy' }, 2, registry)).toEqual({ version: 3, name: 'Buoy', again: 'Buoy' });
    expect(migrate({ version: 3 }, 3, registry)).toEqual({ version: 3 });
    expect(document).toEqual({ version: 1, title: 'Buoy' });
  });

  it('out of order, or from a version that is none, are a broken program', () => {
    expect(() => migrate({}, 1, [...registry].reverse())).toThrow(/leads to version 2/);
    expect(() => migrate({}, 4, registry)).toThrow(/known version/);
    expect(() => migrate({}, 0)).toThrow(/known version/);
  });
});
