/**
 * The syntax tree of an entry. Every node knows its place in the text as typed, brackets around it left out.
 */
import type { Place } from '../findings';
import type { Unit } from '../quantity';

export interface LiteralTree {
  readonly type: 'literal';
  readonly place: Place;
  /** The figure as typed, in `unit`; a sign typed directly before a figure with a unit belongs to it. */
  readonly figure: number;
  readonly unit: Unit | null;
}

export interface TextTree {
  readonly type: 'text';
  readonly place: Place;
  readonly text: string;
}

export interface SymbolTree {
  readonly type: 'symbol';
  readonly place: Place;
  readonly name: string;
}

export interface NegationTree {
  readonly type: 'negation';
  readonly place: Place;
  readonly operand: Tree;
}

/** Arithmetic and comparison operators of entries; `=` compares, `<>` means different. */
export type Operator = '+' | '-' | '*' | '/' | '^' | '=' | '<>' | '<' | '>' | '<=' | '>=';

export interface BinaryTree {
  readonly type: 'binary';
  readonly place: Place;
  readonly operator: Operator;
  readonly left: Tree;
  readonly right: Tree;
}

export interface CallTree {
  readonly type: 'call';
  readonly place: Place;
  readonly name: string;
  readonly namePlace: Place;
  readonly parameters: readonly Tree[];
}

export type Tree = LiteralTree | TextTree | SymbolTree | NegationTree | BinaryTree | CallTree;

/** Calls `visit` for the tree and everything in it, parents first. */
export function walkTree(tree: Tree, visit: (node: Tree) => void): void {
  visit(tree);
  switch (tree.type) {
    case 'negation':
      walkTree(tree.operand, visit);
      break;
    case 'binary':
      walkTree(tree.left, visit);
      walkTree(tree.right, visit);
      break;
    case 'call':
      for (const parameter of tree.parameters) walkTree(parameter, visit);
      break;
    default:
  }
}

/** The symbols that a tree uses, each once, in order of appearance; those of curves among them, where they are called. */
export function symbolsOf(tree: Tree, isCurveName: (name: string) => boolean): readonly string[] {
  if (tree.type === 'symbol') return [tree.name];
  if (tree.type === 'literal' || tree.type === 'text') return [];
  const names = new Set<string>();
  walkTree(tree, (node) => {
    if (node.type === 'symbol' || (node.type === 'call' && isCurveName(node.name))) names.add(node.name);
  });
  return [...names];
}
