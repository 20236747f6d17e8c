/**
 * How much script the built page loads, gzipped, in bytes: at start (to open a worksheet, edit it and keep it: the entry, the
 * store's script that the start fetches, and what the two import), and in all. Read from the build's manifest.
 * Holds: every script of the page is in `all`; a script is counted once.
 */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';

interface ManifestEntry {
  readonly file: string;
  readonly imports?: readonly string[];
}

type Manifest = Readonly<Record<string, ManifestEntry>>;

/** What the start cannot do without: the page, and the store, which it fetches by itself. */
const START = ['index.html', 'store/open-store.ts'];

/** Gzipped bytes of script. */
export interface ScriptSize {
  readonly startBytes: number;
  readonly allBytes: number;
  /** The scripts for the start by file. */
  readonly startFiles: Readonly<Record<string, number>>;
}

/** The size of the page that was built into `folder`, with its manifest. */
export function scriptSize(folder: string): ScriptSize {
  const manifest = JSON.parse(readFileSync(join(folder, '.vite/manifest.json'), 'utf8')) as Manifest;
  const gzipped = (file: string): number => gzipSync(readFileSync(join(folder, file)), { level: 9 }).byteLength;
  const sum = (figures: readonly number[]): number => figures.reduce((total, bytes) => total + bytes, 0);

  const atStart = new Set<string>();
  const load = (key: string): void => {
    const entry = manifest[key];
    if (entry === undefined) throw new Error(`The page's manifest does not have ${key}.`);
    if (atStart.has(entry.file)) return;
    atStart.add(entry.file);
    entry.imports?.forEach(load);
  };
  START.forEach(load);

  const scripts = new Set(Object.values(manifest).map(({ file }) => file));
  const startFiles = Object.fromEntries([...atStart].map((file) => [file, gzipped(file)]));
  return {
    startBytes: sum(Object.values(startFiles)),
    allBytes: sum([...scripts].filter((file) => file.endsWith('.js')).map(gzipped)),
    startFiles,
  };
}
