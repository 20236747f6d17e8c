import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { checkJsonText, pathText } from '../../src/exchange/json-text';
import { MANY } from '../worksheet/arbitrary';

const parses = (text: string): boolean => {
  try {
    JSON.parse(text);
    return true;
  } catch (error) {
    if (error instanceof SyntaxError) return false;
    throw error;
  }
};

describe('the check of JSON text', () => {
  it('agrees with JSON.parse on texts made of JSON’s pieces', MANY, () => {
    const piece = fc.constantFrom(
      '{',
      '}',
      '[',
      ']',
      ',',
      ':',
      '"a"',
      '"b\\n"',
      '"\\u00b5"',
      '"\\q"',
      '1',
      '-0.5e+3',
      '01',
      '.5',
      '-',
      'true',
      'nul',
      'null',
      ' ',
      '\n',
      '\t',
      '\f',
    );
    let accepted = 0;
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 7 }), (pieces) => {
        const text = pieces.join('');
        const result = checkJsonText(text, 64);
        if (result.ok) accepted++;
        const isOther = !result.ok && result.fault.code !== 'bad-json';
        if (!isOther) expect([text, result.ok]).toEqual([text, parses(text)]);
      }),
      { numRuns: 20_000, seed: 5 },
    );
    expect(accepted).toBeGreaterThan(100);
  });

  it('lets every value through that JSON.stringify writes, on one line or many', MANY, () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 5 }), fc.constantFrom(0, 2), (value, indent) => {
        const text = JSON.stringify(value, null, indent);
        const hasRefused = /"(?:__proto__|constructor|prototype)":/.test(text);
        expect(checkJsonText(text, 64).ok).toBe(!hasRefused);
      }),
    );
  });

  it('gives line and column after line breaks of any kind, and the path', () => {
    const result = checkJsonText('{\r\n "a": [\n  {"b": }\n]}', 64);
    expect(result.ok ? undefined : result.fault).toEqual({
      code: 'bad-json',
      path: 'a[0].b',
      sentence: 'Line 3, column 9: a value is expected, “}” found.',
    });
  });

  it('writes paths as they are read', () => {
    expect(pathText(['sections', 1, 'lines', 3, 'entry'])).toBe('sections[1].lines[3].entry');
    expect(pathText([0, 'a'])).toBe('[0].a');
    expect(pathText([])).toBe('');
  });
});
