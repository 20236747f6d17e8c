// The list of worksheets, and what is done with those that are not open.
import { describe, expect, it } from 'vitest';

import { fail } from '../../src/base';
import { Library } from '../../src/app/library.svelte';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { newBrowser, openTab, textOf, valueOf } from '../store/support';
import { sheet } from './support';

async function library() {
  const store = await openTab(newBrowser());
  const worksheet = sheet([['P', 'Power', '1 W']], 'Old title');
  const text = writeWorksheetFile(worksheet);
  valueOf(await store.create({ id: worksheet.id, title: worksheet.title, text, lineCount: 1 }));
  return { store, library: new Library(store), worksheet };
}

const titles = async (store: Awaited<ReturnType<typeof openTab>>): Promise<string[]> =>
  valueOf(await store.list()).map((entry) => `${entry.title}${entry.deletedAt === null ? '' : ' (trash)'}`);

describe('library', () => {
  it('renames a worksheet in its text and in the list', async () => {
    const { store, library: shelf, worksheet } = await library();
    expect(await shelf.rename(worksheet.id, 'New title')).toEqual({ ok: true, value: undefined });
    expect(await titles(store)).toEqual(['New title']);
    expect(valueOf(readWorksheetFile(await textOf(store, worksheet.id))).worksheet).toEqual({
      ...worksheet,
      title: 'New title',
    });
  });

  it('duplicates under an id of its own', async () => {
    const { store, library: shelf, worksheet } = await library();
    await shelf.duplicate(worksheet.id);
    const entries = valueOf(await store.list());
    expect(entries.map((entry) => entry.title).sort()).toEqual(['Copy of Old title', 'Old title']);
    expect(new Set(entries.map((entry) => entry.id)).size).toBe(2);
  });

  it('moves to the trash, takes back, and empties the trash', async () => {
    const { store, library: shelf, worksheet } = await library();
    await shelf.remove(worksheet.id);
    expect(await titles(store)).toEqual(['Old title (trash)']);
    await shelf.restore(worksheet.id);
    expect(await titles(store)).toEqual(['Old title']);
    await shelf.remove(worksheet.id);
    shelf.entries = valueOf(await store.list());
    expect(await shelf.emptyTrash()).toEqual({ ok: true, value: undefined });
    expect(await titles(store)).toEqual([]);
  });

  it('says in a sentence what cannot be done', async () => {
    const { library: shelf } = await library();
    const answer = await shelf.rename('nowhere', 'X');
    expect(!answer.ok && answer.fault).toMatch(/not in the browser’s storage/);
    const none = await new Library(null).duplicate('x');
    expect(!none.ok && none.fault).toMatch(/no storage/);
  });

  it('tells of a store that cannot say which copies there are, and does not pass that for none', async () => {
    const { store, library: shelf, worksheet } = await library();
    expect(await shelf.copies(worksheet.id)).toEqual({ ok: true, value: [] });
    const broken = Object.create(store, {
      recoverable: {
        value: () => Promise.resolve(fail({ code: 'failed', sentence: 'The storage does not answer.', detail: '' })),
      },
    }) as typeof store;
    expect(await new Library(broken).copies(worksheet.id)).toEqual(fail('The storage does not answer.'));
    const none = await new Library(null).copies(worksheet.id);
    expect(!none.ok && none.fault).toMatch(/no storage/);
  });
});
