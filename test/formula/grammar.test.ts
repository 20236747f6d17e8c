/**
 * The contract with hot-formula-parser 4.0.0: every fact of its grammar that the adaptor relies on, first on the grammar alone,
 * then through `parseEntry`. A new version of the package has to pass here before it is taken.
 */
import { Parser } from 'hot-formula-parser/grammar';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseEntry, type Tree } from '../../src/formula';

type Call = readonly [hook: string, ...details: unknown[]];

/** The bare grammar with arithmetic hooks that write down what was called. Variables are 7, cells 5, calls 9. */
function rawParser(calls: Call[] = []): Parser {
  const parser = new Parser();
  parser.yy = {
    callVariable: (name) => (calls.push(['variable', name]), 7),
    callFunction: (name, parameters) => (calls.push(['function', name, parameters?.length ?? 0]), 9),
    evaluateByOperator: (operator, [left, right]) => {
      calls.push(['operator', operator]);
      return operate(operator, Number(left), Number(right));
    },
    toNumber: (value) => Number(value),
    invertNumber: (value) => -Number(value),
    trimEdges: (text) => (calls.push(['text', text]), text),
    cellValue: (address) => (calls.push(['cell', address]), 5),
    rangeValue: (start, end) => (calls.push(['range', start, end]), 6),
    throwError: (name) => (calls.push(['error', name]), 0),
    parseError: (_message, { token, loc }) => {
      calls.push(['refused', token, loc?.last_column]);
      throw new Error('refused');
    },
  };
  return parser;
}

function operate(operator: string, left: number, right: number): number {
  const results: Readonly<Record<string, number>> = {
    '+': left + right,
    '-': left - right,
    '*': left * right,
    '/': left / right,
    '^': left ** right,
  };
  return results[operator] ?? NaN;
}

function raw(text: string): { value: unknown; calls: readonly Call[] } {
  const calls: Call[] = [];
  try {
    return { value: rawParser(calls).parse(text), calls };
  } catch (thrown) {
    if (!(thrown instanceof Error) || thrown.message !== 'refused') throw thrown;
    return { value: 'refused', calls };
  }
}

const names = (calls: readonly Call[], hook: string): unknown[] =>
  calls.filter(([name]) => name === hook).map(([, detail]) => detail);

describe('the grammar alone', () => {
  it.each([
    ['1-2-3', -4, 'subtraction from the left'],
    ['2/4/2', 0.25, 'division from the left'],
    ['2*3+4', 10, 'product before sum'],
    ['-2^2', -4, 'power before sign'],
    ['2^3^2', 64, 'powers from the left: (2^3)^2'],
    ['2^-1', 0.5, 'a sign in an exponent'],
    ['1++2', 3, 'signs in a row'],
    ['--7', 7, 'two signs'],
    ['10%', 0.1, 'per cent'],
    ['(1+2)*3', 9, 'brackets'],
  ])('%s is %d: %s', (text, value) => {
    expect(raw(text).value).toBe(value);
  });

  it.each(['L1', 'NF1', 'f0', 'Gt2'])('takes the radio symbol %s for a cell address', (text) => {
    expect(names(raw(text).calls, 'cell')).toEqual([text]);
  });

  it.each(['A1b', 'λ', '1e3', '1.5e-3', '.5', '5.', '1,5+1', '20 MHz', 'v_0 v_1', '(v_0', 'v_0)', 'v_0+', ''])(
    'refuses “%s”',
    (text) => {
      expect(raw(text).value).toBe('refused');
    },
  );

  it('drops what follows the dot in a name', () => {
    expect(names(raw('rx.nf').calls, 'variable')).toEqual(['rx']);
    expect(names(raw('a.b.c').calls, 'variable')).toEqual(['a']);
  });

  it('takes ranges, absolute addresses, text joining and error names, which entries must not reach', () => {
    expect(names(raw('A1:B2').calls, 'range')).toEqual(['A1']);
    expect(names(raw('$A$1').calls, 'cell')).toEqual(['$A$1']);
    expect(names(raw('"a"&"b"').calls, 'operator')).toEqual(['&']);
    expect(names(raw('#REF!').calls, 'error')).toEqual(['#REF!']);
  });

  it('takes , and ; for separators alike', () => {
    expect(names(raw('F_0(v_1,v_2;v_3)').calls, 'variable')).toEqual(['v_1', 'v_2', 'v_3']);
    expect(raw('F_0(v_1;v_2)').calls.at(-1)).toEqual(['function', 'F_0', 2]);
    expect(raw('F_0()').calls.at(-1)).toEqual(['function', 'F_0', 0]);
  });

  it('hands the placeholders of shapes on as they are written', () => {
    expect(raw('v_0+F_12(v_13)*v_100').calls).toEqual([
      ['variable', 'v_0'],
      ['variable', 'v_13'],
      ['function', 'F_12', 1],
      ['variable', 'v_100'],
      ['operator', '*'],
      ['operator', '+'],
    ]);
  });

  it.each(['=', '<>', '<', '>', '<=', '>='])('hands the comparison %s to evaluateByOperator', (operator) => {
    expect(names(raw(`v_0${operator}v_1`).calls, 'operator')).toEqual([operator]);
  });

  it('reads its hooks at the start of each parse', () => {
    const parser = rawParser();
    expect(parser.parse('v_0')).toBe(7);
    parser.yy = { ...parser.yy, callVariable: () => 8 };
    expect(parser.parse('v_0')).toBe(8);
  });

  it('replaces what reaches a sign by 0 unless it has a numeric valueOf', () => {
    class Valued {
      valueOf(): number {
        return 1;
      }
    }
    const signed = (operand: object, result: object): unknown => {
      const parser = rawParser();
      parser.yy = { ...parser.yy, callVariable: () => operand, toNumber: (value) => value, invertNumber: () => result };
      return parser.parse('-v_0');
    };
    const result = new Valued();
    expect(signed(new Valued(), result)).toBe(result);
    expect(signed(new Valued(), {})).toBe(0);
  });

  it('tells the column of the last token it took; nothing when its lexer refuses', () => {
    expect(raw('v_0 v_1').calls.at(-1)).toEqual(['refused', 'VARIABLE', 3]);
    expect(raw('v_0)').calls.at(-1)).toEqual(['refused', ')', 3]);
    expect(raw('λ').calls.at(-1)).toEqual(['refused', null, undefined]);
  });
});

/** A tree as text with all its brackets. */
function written(tree: Tree): string {
  switch (tree.type) {
    case 'literal': {
      const text = `${String(tree.figure)}${tree.unit === null ? '' : ` ${tree.unit.word}`}`;
      // Before ^ a sign belongs to the power and not to the figure.
      return tree.figure < 0 ? `(${text})` : text;
    }
    case 'text':
      return `"${tree.text}"`;
    case 'symbol':
      return tree.name;
    case 'negation':
      return `(-${written(tree.operand)})`;
    case 'binary':
      return `(${written(tree.left)} ${tree.operator} ${written(tree.right)})`;
    case 'call':
      return `${tree.name}(${tree.parameters.map(written).join(', ')})`;
  }
}

function parsed(entry: string): string {
  const result = parseEntry(entry);
  return result.ok ? written(result.value) : `refused at ${String(result.fault.place.start)}: ${result.fault.sentence}`;
}

describe('entries', () => {
  it.each([
    ['a + b*c', '(a + (b * c))'],
    ['a*b + c', '((a * b) + c)'],
    ['a - b - c', '((a - b) - c)'],
    ['a - (b - c)', '(a - (b - c))'],
    ['a/b/c', '((a / b) / c)'],
    ['a/b*c', '((a / b) * c)'],
    ['-a^2', '(-(a ^ 2))'],
    ['(-a)^2', '((-a) ^ 2)'],
    ['2^3^2', '((2 ^ 3) ^ 2)'],
    ['a^-b', '(a ^ (-b))'],
    ['-a*b', '(-(a * b))'],
    ['-a + b', '((-a) + b)'],
    ['+a + b', '(a + b)'],
    ['--a', '(-(-a))'],
    ['a - -b', '(a - (-b))'],
    ['a > b + c', '(a > (b + c))'],
    ['a <= b', '(a <= b)'],
    ['a <> b', '(a <> b)'],
    ['a = b', '(a = b)'],
    ['f(a, b)', 'f(a, b)'],
    ['f(a; b)', 'f(a, b)'],
    ['f(a,b;c)', 'f(a, b, c)'],
    ['f()', 'f()'],
    ['f (a)', 'f(a)'],
    ['f(g(a), (b + c)*d)', 'f(g(a), ((b + c) * d))'],
    ['powersum(N, I_1) + 3 dB', '(powersum(N, I_1) + 3 dB)'],
    ['L1 + Gt2', '(L1 + Gt2)'],
    ['NF1 + f0', '(NF1 + f0)'],
    ['A1b', 'A1b'],
    ['rx.nf - 1 dB', '(rx.nf - 1 dB)'],
    ['λ_0*η', '(λ_0 * η)'],
    ['1e3', '1000'],
    ['1.5e-3*a', '(0.0015 * a)'],
    ['.5*a', '(0.5 * a)'],
    ['5.*a', '(5 * a)'],
    ['10 W / m', '(10 W / m)'],
    ['-174 dBm/Hz + B', '((-174 dBm/Hz) + B)'],
    ['a - 174 dBm/Hz', '(a - 174 dBm/Hz)'],
    ['a - -174 dBm/Hz', '(a - (-174 dBm/Hz))'],
    ['-3 dB^2', '(-(3 dB ^ 2))'],
    ['-3^2', '(-(3 ^ 2))'],
    ['rain(5, "vertical")', 'rain(5, "vertical")'],
    ['a − b', '(a - b)'],
    ['a – b', '(a - b)'],
    ['a × b ÷ c', '((a * b) / c)'],
    ['a·b', '(a * b)'],
    ['a ≤ b', '(a <= b)'],
    ['a ≥ b', '(a >= b)'],
    ['a ≠ b', '(a <> b)'],
    ['  a +\tb ', '(a + b)'],
    ['((a))', 'a'],
    ['toString + __proto', 'refused at 11: A symbol begins with a letter.'],
    ['toString + constructor', '(toString + constructor)'],
  ])('%s is read as %s', (entry, expected) => {
    expect(parsed(entry)).toBe(expected);
  });

  it.each([
    '$A$1',
    '#REF!',
    '"a" & "b"',
    'A1:B2',
    '[x]',
    '{1}',
    'a;',
    'a, b',
    '1,5 + 1',
    '(a',
    'a)',
    'a +',
    '* a',
    'a b',
    'a (b) c',
    'f(a,)',
    'f(,a)',
    "f('x')",
    '"x',
    'a ! b',
    '= a',
    'x%',
    '(',
    ')',
    '@',
    '\\',
    'a = = b',
  ])('refuses “%s” in words, at a place in the text', (entry) => {
    const result = parseEntry(entry);
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.fault.sentence.length).toBeGreaterThan(10);
    expect(result.fault.place.start).toBeGreaterThanOrEqual(0);
    expect(result.fault.place.end).toBeLessThanOrEqual(entry.length);
    expect(result.fault.place.start).toBeLessThanOrEqual(result.fault.place.end);
  });

  it.each([
    ['a + b', 'a + b'],
    ['(a + b) * c', '(a + b) * c'],
    ['  (a + b)  ', 'a + b'],
    ['-(a + b)', '-(a + b)'],
    ['f(a , b) + c', 'f(a , b) + c'],
  ])('the tree of “%s” knows its place', (entry, place) => {
    const result = parseEntry(entry);
    expect(result.ok && entry.slice(result.value.place.start, result.value.place.end)).toBe(place);
  });

  it('every part of a tree stands where its text stands', () => {
    const entry = '3*(P_in + G) - powersum(N, -174 dBm/Hz + db(B))/2';
    const result = parseEntry(entry);
    const texts: string[] = [];
    const visit = (tree: Tree): void => {
      texts.push(entry.slice(tree.place.start, tree.place.end));
      if (tree.type === 'negation') visit(tree.operand);
      if (tree.type === 'binary') [tree.left, tree.right].forEach(visit);
      if (tree.type === 'call') tree.parameters.forEach(visit);
    };
    if (result.ok) visit(result.value);
    expect(texts).toEqual([
      entry,
      '3*(P_in + G)',
      '3',
      'P_in + G',
      'P_in',
      'G',
      'powersum(N, -174 dBm/Hz + db(B))/2',
      'powersum(N, -174 dBm/Hz + db(B))',
      'N',
      '-174 dBm/Hz + db(B)',
      '-174 dBm/Hz',
      'db(B)',
      'B',
      '2',
    ]);
  });

  it('entries of one shape share a parse, and keep their own texts', () => {
    expect(parsed('a + b*2')).toBe('(a + (b * 2))');
    expect(parsed('x_1 +   y*7.5')).toBe('(x_1 + (y * 7.5))');
    expect(parsed('a + b*')).toMatch(/^refused/);
    expect(parsed('q + b*')).toMatch(/^refused at 5/);
  });

  it('whatever is typed is either read or refused, never thrown', () => {
    const pieces = fc.constantFrom(
      'a',
      'b_1',
      'dBm',
      '3',
      '-',
      '+',
      '*',
      '/',
      '^',
      '(',
      ')',
      ',',
      ';',
      ' ',
      '10 dBm',
      'f(',
      '"',
      '"x"',
      '%',
      '.',
      '1e',
      'µ',
      'λ',
      '$',
      '&',
      '=',
      '<',
      '>',
      '≤',
      '−',
      '\u00a0',
      '\u202e',
      '\0',
      '__proto__',
      '😀',
      '{',
      '}',
      'A1:B2',
      'toString(',
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.array(pieces, { maxLength: 14 }).map((all) => all.join('')),
          fc.string({ maxLength: 30, unit: 'binary' }),
        ),
        (entry) => {
          const result = parseEntry(entry);
          if (result.ok) return;
          expect(result.fault.sentence).not.toBe('');
          expect(result.fault.place.end).toBeLessThanOrEqual(entry.length);
        },
      ),
      { numRuns: 2000 },
    );
  });

  it('what is read and written with all its brackets reads the same', () => {
    const leaves = fc.constantFrom('a', 'b_1', 'λ', '2', '3.5', '10 dBm', '3 dB');
    const trees = fc.letrec<{ tree: string }>((tie) => ({
      tree: fc.oneof(
        { depthSize: 'small', withCrossShrink: true },
        leaves,
        fc
          .tuple(tie('tree'), fc.constantFrom('+', '-', '*', '/', '^', '<', '>=', '='), tie('tree'))
          .map(([left, operator, right]) => `(${left} ${operator} ${right})`),
        fc
          .tuple(fc.constantFrom('f', 'powersum'), fc.array(tie('tree'), { minLength: 1, maxLength: 3 }))
          .map(([name, all]) => `${name}(${all.join(', ')})`),
        tie('tree').map((tree) => `(-${tree})`),
      ),
    })).tree;
    fc.assert(
      fc.property(trees, (entry) => {
        const once = parsed(entry);
        fc.pre(!once.startsWith('refused'));
        expect(parsed(once)).toBe(once);
      }),
    );
  });
});
