/** `functions`: the catalogue as a list, and each entry by its name. */
import { describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { Evaluation } from '../../src/engine';
import { FUNCTION_GROUPS, FUNCTIONS, signatureOf } from '../../src/formula';
import { sheetOfLines } from '../engine/notation';
import { worldOf } from './support';

const world = worldOf({});
const listing = run(['functions'], world);

describe('the list', () => {
  it('has every group as a heading and every function once, on a line by itself with its text', () => {
    const rows = listing.results.split('\n').filter((row) => row !== '');
    expect(rows.filter((row) => !row.startsWith(' '))).toEqual(FUNCTION_GROUPS);
    const entries = rows
      .filter((row) => row.startsWith('  '))
      .map((row) => /^ {2}(\S.*?) {2,}(\S.*)$/.exec(row)?.slice(1));
    expect(entries).toHaveLength(FUNCTIONS.length);
    expect(new Map(entries.map((entry) => [entry?.[0], entry?.[1]]))).toEqual(
      new Map(FUNCTIONS.map((entry) => [signatureOf(entry), entry.text])),
    );
    expect(listing).toMatchObject({ messages: '', exitCode: 0 });
  });

  it('has each function under its own group', () => {
    for (const block of listing.results.split('\n\n')) {
      const [group, ...rows] = block.split('\n').filter((row) => row !== '');
      const names = rows.map((row) => row.trim().split('(')[0]);
      expect(names).toEqual(FUNCTIONS.filter((entry) => entry.group === group).map(({ name }) => name));
    }
  });
});

describe.each(FUNCTIONS)('$name', (entry) => {
  const answer = run(['functions', entry.name], world);
  const rows = answer.results.split('\n');

  it('is told in full', () => {
    expect(answer).toMatchObject({ messages: '', exitCode: 0 });
    expect(rows.slice(0, 3)).toEqual([signatureOf(entry), `  ${entry.text}`, '  parameters']);
    for (const { name, text } of entry.parameters) expect(answer.results).toContain(`\n    ${name}: ${text}`);
    for (const [word, text] of [
      ['result', entry.result],
      ['formula', entry.formula],
      ['source', entry.source],
      ['example', entry.example],
    ] as const) {
      expect(text).not.toBe('');
      expect(rows).toContain(`  ${word}: ${text}`);
    }
    expect(rows.some((row) => row.startsWith('  holds for '))).toBe(
      entry.form === 'ordinary' && entry.validity !== undefined,
    );
  });

  it('has an example that can be evaluated as it stands', () => {
    const example = rows.find((row) => row.startsWith('  example: '))?.slice('  example: '.length) ?? '';
    const evaluation = new Evaluation(sheetOfLines([{ id: 'l', symbol: 'x', label: '', entry: example }]));
    expect(evaluation.figure('l', 'nominal').state).toBe('value');
    expect(evaluation.sheetFindings()).toEqual([]);
  });
});
