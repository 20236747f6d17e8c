/**
 * The grammar: precedence, calls and separators, from hot-formula-parser, which is imported here and nowhere else.
 * Its evaluation, cell addresses, ranges and function library are not used: its semantic actions are replaced by ones that
 * build a tree. It reads a *shape* (see scan.ts), never an entry, and each shape once: entries of one shape share the parse.
 * Known of it (held by test/formula/grammar.test.ts): −2^2 is −4, 2^3^2 is (2^3)^2, `,` and `;` both separate, and what
 * reaches unary signs must have a numeric `valueOf`, or it is replaced by 0.
 */
import { Parser } from 'hot-formula-parser/grammar';
import { assert, fail, ok, present, type Result } from '../base';
import { scanEntry, type EntryFault, type Scan, type Token } from './scan';
import type { Operator, Tree } from './tree';

/** A node of a shape: spans are token numbers, first and last inclusive, brackets around it left out. */
class ShapeNode {
  constructor(
    readonly type: 'leaf' | 'negation' | 'binary' | 'call',
    readonly first: number,
    readonly last: number,
    readonly children: readonly ShapeNode[],
    readonly operator: string = '',
  ) {}

  /** The grammar drops signed values that are not numbers. */
  valueOf(): number {
    return 1;
  }
}

type ShapeParse = { readonly ok: true; readonly root: ShapeNode } | { readonly ok: false; readonly token: number };

const OPERATORS: readonly string[] = ['+', '-', '*', '/', '^', '=', '<>', '<', '>', '<=', '>='];

class Stopped extends Error {
  constructor(readonly column: number) {
    super('the shape does not parse');
  }
}

const parser = new Parser();

/** Parses one shape; `signs` tells which tokens are brackets, to widen spans over them. */
function parseShape(shape: string, tokens: readonly Token[]): ShapeParse {
  const closing = matchBrackets(tokens);
  const isSign = (index: number, sign: string): boolean => {
    const token = tokens[index];
    return token?.type === 'sign' && token.sign === sign;
  };
  const widened = (node: ShapeNode): { first: number; last: number } => {
    let { first, last } = node;
    while (isSign(first - 1, '(') && isSign(last + 1, ')')) {
      first--;
      last++;
    }
    return { first, last };
  };
  const asNode = (value: unknown): ShapeNode => {
    if (!(value instanceof ShapeNode)) throw new Stopped(-1);
    return value;
  };
  const index = (name: string): number => Number(name.slice(2).replace('(', ''));
  const refused = (): never => {
    throw new Stopped(-1);
  };
  parser.yy = {
    callVariable: (name) => new ShapeNode('leaf', index(name), index(name), []),
    callFunction: (name, parameters = []) => {
      const first = index(name);
      return new ShapeNode('call', first, present(closing.get(first), 'closing bracket'), parameters.map(asNode));
    },
    evaluateByOperator: (operator, operands) => {
      const [left, right] = operands.map(asNode);
      assert(left !== undefined && right !== undefined, 'an operator has two operands');
      if (!OPERATORS.includes(operator)) throw new Stopped(-1);
      return new ShapeNode('binary', widened(left).first, widened(right).last, [left, right], operator);
    },
    toNumber: (value) => value,
    invertNumber: (value) => {
      const operand = asNode(value);
      const span = widened(operand);
      return new ShapeNode('negation', span.first - 1, span.last, [operand]);
    },
    trimEdges: refused,
    cellValue: refused,
    rangeValue: refused,
    throwError: refused,
    parseError: (_message, detail) => {
      // The grammar tells the last token it took; the one it refused comes next.
      throw new Stopped(detail.loc?.last_column ?? -1);
    },
  };
  try {
    return { ok: true, root: asNode(parser.parse(shape)) };
  } catch (thrown) {
    if (!(thrown instanceof Stopped)) throw thrown;
    return { ok: false, token: tokenAtColumn(tokens, shape, thrown.column) };
  }
}

function matchBrackets(tokens: readonly Token[]): ReadonlyMap<number, number> {
  const closing = new Map<number, number>();
  const open: number[] = [];
  tokens.forEach((token, at) => {
    if (token.type === 'function' || (token.type === 'sign' && token.sign === '(')) open.push(at);
    else if (token.type === 'sign' && token.sign === ')') closing.set(present(open.pop(), 'opening bracket'), at);
  });
  return closing;
}

/** The token that stands at a column of the shape; the last one when the grammar gave none or met the end. */
function tokenAtColumn(tokens: readonly Token[], shape: string, column: number): number {
  if (column < 0 || column >= shape.length) return tokens.length - 1;
  let end = 0;
  for (const [at, token] of tokens.entries()) {
    end += token.type === 'sign' ? token.sign.length : `v_${String(at)}`.length + (token.type === 'function' ? 1 : 0);
    if (column < end) return at;
  }
  return tokens.length - 1;
}

const SHAPE_CACHE_LIMIT = 5000;
const shapes = new Map<string, ShapeParse>();

/** Reads an entry's expression. A fault tells the place in the entry and what to do about it. */
export function parseEntry(entry: string, limit?: number): Result<Tree, EntryFault> {
  const scan = scanEntry(entry, limit);
  if (!scan.ok) return scan;
  const { shape, tokens } = scan.value;
  let parse = shapes.get(shape);
  if (parse === undefined) {
    parse = parseShape(shape, tokens);
    if (shapes.size >= SHAPE_CACHE_LIMIT) shapes.clear();
    shapes.set(shape, parse);
  }
  return parse.ok ? ok(instantiate(parse.root, tokens)) : fail(explainStop(scan.value, parse.token));
}

function instantiate(node: ShapeNode, tokens: readonly Token[]): Tree {
  const first = present(tokens[node.first], 'token');
  const place = { start: first.start, end: present(tokens[node.last], 'token').end };
  switch (node.type) {
    case 'leaf':
      if (first.type === 'literal') return { type: 'literal', place, figure: first.figure, unit: first.unit };
      if (first.type === 'text') return { type: 'text', place, text: first.text };
      assert(first.type === 'symbol', 'a leaf is a literal, a text or a symbol');
      return { type: 'symbol', place, name: first.name };
    case 'negation':
      return { type: 'negation', place, operand: instantiate(present(node.children[0], 'operand'), tokens) };
    case 'binary':
      return {
        type: 'binary',
        place,
        operator: node.operator as Operator,
        left: instantiate(present(node.children[0], 'left'), tokens),
        right: instantiate(present(node.children[1], 'right'), tokens),
      };
    case 'call':
      assert(first.type === 'function', 'a call begins with a function name');
      return {
        type: 'call',
        place,
        name: first.name,
        namePlace: { start: first.start, end: first.nameEnd },
        parameters: node.children.map((child) => instantiate(child, tokens)),
      };
  }
}

/** Says in words why the grammar stopped at a token. */
function explainStop({ tokens }: Scan, at: number): EntryFault {
  const token = present(tokens[at], 'token');
  const place = { start: token.start, end: token.end };
  if (token.type === 'sign' && token.sign !== ')' && token.sign !== '(' && at === tokens.length - 1)
    return { place, sentence: `The entry ends with ${token.sign}: something is missing after it.` };
  if (token.type === 'sign' && (token.sign === ',' || token.sign === ';'))
    return {
      place,
      sentence: 'A comma separates the arguments of a function; decimals are written with a point in expressions.',
    };
  if (token.type === 'sign')
    return { place, sentence: `Something is missing before ${token.sign}: a quantity, a symbol or a call.` };
  return { place, sentence: 'The entry cannot be read from here on.' };
}
