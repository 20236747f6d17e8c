/** DEVELOPERS.md: the house is the one that stands, imports point as lint has it, and what it quotes from the code is so. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

import { DEPTH_LIMIT, ENTRY_LIMIT, scanEntry } from '../../src/formula';
import { QUANTITY_KINDS } from '../../src/quantity';
import { HISTORY_LIMIT } from '../../src/worksheet';
import { DEVELOPERS, ROOT, sectionOf, tableIn } from './documents';

const read = (path: string): string => readFileSync(ROOT + path, 'utf8');
const folders = (path: string): readonly string[] =>
  readdirSync(ROOT + path, { withFileTypes: true })
    .filter((entry) => entry.isDirectory())
    .map(({ name }) => name)
    .sort();
const written = (count: number): string => count.toLocaleString('en-GB');

describe('the house', () => {
  const [plan = '', picture = ''] = [...sectionOf(DEVELOPERS, '## The house').matchAll(/```text\n([\s\S]*?)```/g)].map(
    ([, block]) => block,
  );

  it('has every folder of src, and no other', () => {
    const named = [...plan.matchAll(/^ {2}([a-z]+)\/ /gm)].map(([, folder]) => folder);
    expect(named.sort()).toEqual(folders('src'));
  });

  it('has the steps of imports that lint enforces', () => {
    const steps = /const steps = \[([\s\S]*?)\n\];/.exec(read('eslint.config.js'))?.[1] ?? '';
    const enforced = [...steps.matchAll(/\[(.+)\]/g)].map(([, names = '']) => names.match(/[a-z]+/g));
    expect(enforced.length).toBeGreaterThan(8);
    const drawn = picture
      .trim()
      .split('\n')
      .map((line) => line.trim().split(/\s+/));
    const inOrder = (step: readonly string[] | null): string => [...(step ?? [])].sort().join(' ');
    expect(drawn.map(inOrder)).toEqual([...enforced].reverse().map(inOrder));
  });

  it('says which places are empty still', () => {
    const empty = picture.match(/[a-z]+/g)?.filter((folder) => !existsSync(`${ROOT}src/${folder}`)) ?? [];
    const said = empty.map((folder) => `\`${folder}\``).join(' and ');
    expect(
      said === '' ||
        [
          said,
          empty
            .map((folder) => `\`${folder}\``)
            .reverse()
            .join(' and '),
        ].some((text) => DEVELOPERS.prose.includes(`${text} have their places`)),
    ).toBe(true);
  });

  it('is right about who has an entry point that says what lives there', () => {
    const without = folders('src').filter((folder) => !existsSync(`${ROOT}src/${folder}/index.ts`));
    expect(without).toEqual(['app', 'command', 'ui']);
    for (const folder of folders('src').filter((name) => !without.includes(name)))
      expect(read(`src/${folder}/index.ts`)).toMatch(new RegExp(`^/\\*\\*\\s+(\\* )?${folder}: `));
  });
});

it('has a glossary with every quantity kind, each word once', () => {
  const rows = tableIn(sectionOf(DEVELOPERS, '## Glossary')).slice(1);
  const words = rows.map(([word]) => word);
  expect(new Set(words).size).toBe(words.length);
  expect(rows.find(([word]) => word === 'quantity kind')?.[1]).toContain(QUANTITY_KINDS.join(', '));
});

it('tells the limits that the code has', () => {
  const { prose } = DEVELOPERS;
  expect(prose).toContain(`${written(ENTRY_LIMIT)} characters and ${written(DEPTH_LIMIT)} brackets`);
  expect(prose).toContain(`the last ${written(HISTORY_LIMIT)} edits are kept`);
  const shapes = /const SHAPE_CACHE_LIMIT = (\d+);/.exec(read('src/formula/grammar.ts'))?.[1];
  expect(prose).toContain(`up to ${written(Number(shapes))}, then the\ncache is emptied`);
});

it('shows the shape that the scanner writes', () => {
  const [, entry = '', shape = ''] = /"(P_tx [^"]+)"[\s\S]*?shape "([^"]+)"/.exec(DEVELOPERS.text) ?? [];
  expect(scanEntry(entry)).toMatchObject({ ok: true, value: { shape } });
});

it('has a recipe for each thing that is added often', () => {
  const recipes = [...sectionOf(DEVELOPERS, '## Recipes').matchAll(/^\*\*(.+)\.\*\*$/gm)].map(([, title]) => title);
  expect(recipes).toEqual([
    'A unit word',
    'A function',
    'A finding',
    'A kind of change',
    'A file migration',
    'A starter',
    'A command or key of the page',
  ]);
});

describe('decisions', () => {
  const decisions = sectionOf(DEVELOPERS, '## Decisions')
    .split(/^(?=\*\*\d+\. )/m)
    .slice(1);

  it('are numbered', () => {
    expect(decisions.length).toBeGreaterThan(10);
    expect(decisions.map((text) => Number(/^\*\*(\d+)\./.exec(text)?.[1]))).toEqual(decisions.map((_, i) => i + 1));
  });

  it.each(decisions.map((text) => ({ text, title: /^\*\*(.+)\*\*/.exec(text)?.[1] ?? '' })))('$title', ({ text }) => {
    expect(text).toMatch(/- _Question:_ [\s\S]+\?\n|- _Question:_ [\s\S]+\./);
    expect(text).toMatch(/- _Options:_ [\s\S]+- _Choice:_ [\s\S]+ \d{4}-\d{2}-\d{2}\.\s*$/);
  });
});

it('maps every folder of tests', () => {
  const mapped = tableIn(sectionOf(DEVELOPERS, '## Tests'))
    .slice(1)
    .map(([where = '']) => where);
  const all = [...folders('test').map((folder) => `test/${folder}`), 'e2e'];
  expect(all.filter((folder) => !mapped.some((where) => where.includes(`\`${folder}\``)))).toEqual([]);
});
