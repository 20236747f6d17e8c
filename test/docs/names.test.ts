/**
 * Everything that the documents name exists: files, links, npm scripts, finding codes, functions, identifiers, entries. Each
 * code span has to be of a kind that is checked, or to be one of the few that are listed here.
 */
import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

import { FINDING_CODES } from '../../src/findings';
import { FUNCTIONS, readEntry } from '../../src/formula';
import { findUnit } from '../../src/quantity';
import { DEVELOPERS, DOCUMENTS, filesBelow, ROOT, type Document } from './documents';

const read = (path: string): string => readFileSync(ROOT + path, 'utf8');

interface Package {
  readonly scripts: Readonly<Record<string, string>>;
  readonly devDependencies: Readonly<Record<string, string>>;
}
const project = JSON.parse(read('package.json')) as Package;

const FOLDERS = ['src', 'test', 'e2e', 'static', '.ci'];
const files = FOLDERS.flatMap(filesBelow);
const code = files
  .filter(
    (path) => /\.(ts|js|mjs|svelte|json)$/.test(path) && !path.startsWith('test/docs/') && !path.includes('/data/'),
  )
  .concat('eslint.config.js', 'vite.config.ts', 'package.json')
  .map(read)
  .join('\n');
const words = new Set(code.match(/[\p{L}_$][\p{L}\p{N}_$]*/gu));
const changeKinds = [...read('src/worksheet/changes.ts').matchAll(/kind: '([a-z-]+)'/g)].map(([, kind]) => kind);

const pattern = (path: string): string => path.replace(/[.+]/g, '\\$&').replace(/\*|<\w+>/g, '[^/]+');

/** True for a path that exists; `*` stands for part of a name, `<id>` for any name. */
const pathExists = (path: string): boolean =>
  existsSync(ROOT + path) || (/[*<]/.test(path) && files.some((file) => new RegExp(`^${pattern(path)}$`).test(file)));

/** True for a file of this name in any folder. */
const nameExists = (name: string): boolean =>
  existsSync(ROOT + name) || files.some((file) => new RegExp(`/${pattern(name)}$`).test(file));

const FILE_NAME = /^[\w.*-]+\.(ts|js|mjs|json|md|svelte)$/;

/** Spans that are nothing of the above: what a program prints, what a person types, placeholders, text about text. */
const OTHERS = new Set([
  // Printed by npm test.
  'N passed, N failed',
  '0 failed',
  // Typed into the requirement column, and shown there.
  '≥ 3 dB',
  // Typed as tolerances.
  '±0.5 dB',
  '+0.3/-0.8 dB triangular',
  'fav 0.5 dB adv 1 dB',
  '±2 %',
  '±1 dB 2σ',
  '±1.5 dB normal 3σ',
  '±0.5 dB group supply',
  // Bounds of an option, and what names a stream of random numbers.
  '--between A B',
  'line <id>',
  'group <name>',
  'exact: false',
  // A fault of a run of trials, and the policy that names the workers' address.
  'worker-died',
  'levelwright-worker',
  // What the grammar refuses by itself, and what the scanner writes for it.
  '.5',
  '20 MHz',
  'v_4',
  'F_4(',
  // Operators, and names that the platform gives.
  '+',
  '-',
  'color',
  'normalize',
]);

/** Why a code span is not what the project knows, or undefined. */
function complaint(span: string): string | undefined {
  if (OTHERS.has(span)) return undefined;
  if (/^(npm|npx|RUNS=\d+ npx) /.test(span)) return undefined;
  if (/^https?:/.test(span)) return undefined;
  if (/^--[a-z-]+$/.test(span)) return code.includes(span.slice(2)) ? undefined : 'no such option';
  if (/^(evaluate|check|explain|trials|sensitivity|sweep|solve|functions) [A-Z[]/.test(span)) return undefined;
  if (span.startsWith('/usr/bin/')) return undefined;
  if (FOLDERS.some((folder) => span.startsWith(`${folder}/`))) return pathExists(span) ? undefined : 'no such file';
  if (FILE_NAME.test(span)) return nameExists(span) ? undefined : 'no such file name';
  if (/^[a-z]+(-[a-z]+)+$/.test(span)) {
    const known = [...FINDING_CODES, ...changeKinds, ...Object.keys(project.devDependencies), 'import-direction'];
    return (known as readonly (string | undefined)[]).includes(span)
      ? undefined
      : 'neither a finding nor a change nor a package';
  }
  if (/^[\p{L}_$][\p{L}\p{N}_$]*(\.[\p{L}\p{N}_$]+)*$/u.test(span))
    return span.split('.').every((word) => words.has(word)) || findUnit(span) !== undefined
      ? undefined
      : 'no such name';
  const call = /^(\w+)\(/.exec(span)?.[1];
  if (call !== undefined && !FUNCTIONS.some(({ name }) => name === call) && !words.has(call)) return 'no such function';
  if (/^context\.say\(/.test(span)) return undefined;
  return readEntry(span).form === 'unreadable' ? 'not readable as an entry' : undefined;
}

describe.each(DOCUMENTS)('$name', (document: Document) => {
  it('has no code span that names nothing', () => {
    const wrong = document.spans.flatMap((span) => {
      const reason = complaint(span);
      return reason === undefined ? [] : [`${span}: ${reason}`];
    });
    expect(document.spans.length).toBeGreaterThan(40);
    expect(wrong).toEqual([]);
  });

  it('names files that exist, in its blocks too', () => {
    const named = document.text.match(/(?<![\w/.-])(?:src|test|e2e|static)\/[\w.<>*/-]*[\w>*]/g) ?? [];
    expect(named.length).toBeGreaterThan(5);
    expect(named.filter((path) => !pathExists(path))).toEqual([]);
  });

  it('links to what exists', () => {
    const headings = [...document.prose.matchAll(/^#+ (.+)$/gm)].map(([, title = '']) =>
      title
        .toLowerCase()
        .replace(/[^\w -]/g, '')
        .replace(/ /g, '-'),
    );
    const missing = document.targets.filter((target) =>
      target.startsWith('#') ? !headings.includes(target.slice(1)) : !existsSync(ROOT + target),
    );
    expect(document.targets.length).toBeGreaterThan(0);
    expect(missing).toEqual([]);
  });

  it('uses npm scripts that exist', () => {
    const used = [...document.text.matchAll(/npm (?:(start|test)\b|run (?:--silent )?([\w-]+))/g)].map(
      ([, short, script]) => short ?? script ?? '',
    );
    expect(used.length).toBeGreaterThan(2);
    expect(used.filter((script) => !(script in project.scripts))).toEqual([]);
  });
});

describe('what DEVELOPERS.md says of a file', () => {
  const said = [
    ...[...DEVELOPERS.prose.matchAll(/`([\w.]+)`\s+(?:in|of)\s+`(src\/[^`*<]+)`/g)],
    ...[...DEVELOPERS.text.matchAll(/^ +\| (\w+) +(src\/\S+)/gm)],
    ...[...DEVELOPERS.text.matchAll(/^ ([A-Z]\w+(?:\.\w+)?) +(src\/\S+)/gm)],
  ].map(([, name = '', path = '']) => ({ name, path }));

  it('is found in several places', () => {
    expect(said.length).toBeGreaterThan(20);
  });

  it.each(said)('$name is in $path', ({ name, path }) => {
    const last = name.split('.').at(-1) ?? name;
    expect(read(path).match(/[\p{L}_$][\p{L}\p{N}_$]*/gu)).toContain(last);
  });
});
