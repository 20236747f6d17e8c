/** How the documents are worded: no places of one machine, no addresses elsewhere, British spelling, nothing promised. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

import { FUNCTIONS } from '../../src/formula';
import { STARTERS } from '../../src/starters';
import { DOCUMENTS, ROOT } from './documents';

const withoutSpans = (text: string): string => text.replace(/`[^`\n]*`/g, '');

const AMERICAN =
  /\b(colou?r(?<!colour)|favorite|behavior|neighbor|center|meters?|kilometers?|gray|catalog|dialog box|analyz\w*|normaliz\w*|serializ\w*|initializ\w*|recogniz\w*|organiz\w*|optimiz\w*|summariz\w*|labeled|modeled|canceled|fulfill|artifact)\b/gi;
const PROMISES =
  /\b(simply|easily|just|powerful|seamless\w*|blazing\w*|robust|intuitive|world-class|cutting-edge|state-of-the-art|revolutionary|effortless\w*)\b/gi;

describe.each(DOCUMENTS)('$name', ({ text, prose }) => {
  it('names no place of one machine but Chromium’s', () => {
    const absolute = text.match(/(?<![\w.:/>)*₀-₉]|\d )\/[a-z][\w.-]*(?:\/[\w.-]+)*/gi) ?? [];
    expect(absolute.filter((path) => path !== '/usr/bin/chromium')).toEqual([]);
  });

  it('names no address but this machine’s', () => {
    const addresses = text.match(/https?:\/\/[^\s/)`]+/g) ?? [];
    expect(addresses.filter((address) => !address.startsWith('http://127.0.0.1'))).toEqual([]);
    expect(text.match(/\b[\w-]+\.(?:com|org|net|io|dev)\b/g)).toBeNull();
  });

  it('is spelt as the British do', () => {
    expect(withoutSpans(prose).match(AMERICAN)).toBeNull();
  });

  it('promises nothing', () => {
    expect(withoutSpans(prose).match(PROMISES)).toBeNull();
  });

  it('leaves nothing to be written', () => {
    expect(text.match(/\b(TODO|TBD|FIXME|XXX|lorem)\b/g)).toBeNull();
  });
});

it('finds what it looks for', () => {
  expect('The center color; simply analyze'.match(AMERICAN)).toEqual(['center', 'color', 'analyze']);
  expect('colour, metre, licence, dialogue'.match(AMERICAN)).toBeNull();
  expect('It just works'.match(PROMISES)).toEqual(['just']);
});

it('texts for users are spelt as the British do', () => {
  const texts = [
    readFileSync(`${ROOT}src/findings/catalogue.ts`, 'utf8'),
    ...FUNCTIONS.map((entry) => `${entry.text} ${entry.result} ${entry.parameters.map(({ text }) => text).join(' ')}`),
    ...STARTERS.map(({ text }) => text),
  ];
  expect(texts.flatMap((text) => text.match(AMERICAN) ?? [])).toEqual([]);
});
