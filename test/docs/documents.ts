/**
 * The two documents, taken apart for the tests that keep them honest: paragraphs, code spans, fenced blocks, tables, links.
 * What must stay true: fenced blocks are no part of the prose, and nothing of a document is left out of both.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** A fenced block: the word behind the fence, and what stands in it. */
export interface FencedBlock {
  readonly language: string;
  readonly text: string;
}

/** One document. */
export interface Document {
  readonly name: string;
  readonly text: string;
  /** The text without fenced blocks. */
  readonly prose: string;
  readonly fenced: readonly FencedBlock[];
  /** What stands between single backquotes, each once. */
  readonly spans: readonly string[];
  /** Targets of links and images, each once. */
  readonly targets: readonly string[];
}

/** The repository's root, with a separator at its end. */
export const ROOT = fileURLToPath(new URL('../../', import.meta.url));

const FENCE = /^```(\w*)\n([\s\S]*?)^```$/gm;

const unique = (items: Iterable<string>): readonly string[] => [...new Set(items)];

function readDocument(name: string): Document {
  const text = readFileSync(ROOT + name, 'utf8');
  const fenced = [...text.matchAll(FENCE)].map(([, language = '', block = '']) => ({ language, text: block }));
  const prose = text.replace(FENCE, '');
  return {
    name,
    text,
    prose,
    fenced,
    spans: unique([...prose.matchAll(/`([^`\n]+)`/g)].map(([, span = '']) => span)),
    targets: unique([...prose.matchAll(/\]\(([^)\s]+)\)/g)].map(([, target = '']) => target)),
  };
}

export const README = readDocument('README.md');
export const DEVELOPERS = readDocument('DEVELOPERS.md');
export const DOCUMENTS: readonly Document[] = [README, DEVELOPERS];

/** The part of a document from a heading to the next of the same rank or a higher one. Throws when there is none. */
export function sectionOf({ name, text }: Document, heading: string): string {
  const start = text.indexOf(`\n${heading}\n`);
  if (start < 0) throw new Error(`${name} has no heading “${heading}”`);
  const rank = /^#+/.exec(heading)?.[0].length ?? 1;
  const rest = text.slice(start + heading.length + 1);
  const end = rest.search(new RegExp(`^#{1,${String(rank)}} `, 'm'));
  return end < 0 ? rest : rest.slice(0, end);
}

/** The rows of the first table in a text, the heading first, cell by cell. */
export function tableIn(text: string): readonly (readonly string[])[] {
  const rows = /^\|.*(?:\n\|.*)*/m.exec(text)?.[0].split('\n') ?? [];
  return rows
    .filter((_, index) => index !== 1)
    .map((row) =>
      row
        .slice(1, -1)
        .split(/(?<!\\)\|/)
        .map((cell) => cell.trim()),
    );
}

/** A table's cell without the marks of a code span. */
export const plain = (cell: string | undefined): string => (cell ?? '').replace(/`/g, '');

/** Every file below a folder, relative to the root, with `/`. */
export function filesBelow(folder: string): readonly string[] {
  return readdirSync(ROOT + folder, { withFileTypes: true }).flatMap((entry) => {
    const path = `${folder}/${entry.name}`;
    return entry.isDirectory() ? filesBelow(path) : [path];
  });
}
