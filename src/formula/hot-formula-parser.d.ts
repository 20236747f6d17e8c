// Types for the grammar module of hot-formula-parser 4.0.0, which ships none. The specifier is an alias set in
// vite.config.ts, for the package's export map hides the module. Only grammar.ts may import it.
declare module 'hot-formula-parser/grammar' {
  /** A place in the parsed text; lines count from 1, columns from 0, the last column is exclusive. */
  export interface GrammarPlace {
    readonly first_line: number;
    readonly last_line: number;
    readonly first_column: number;
    readonly last_column: number;
  }

  /**
   * What `parseError` is told. `loc`, the place of the last token that was accepted, and `expected` are absent when the
   * lexer, not the grammar, refuses the text.
   */
  export interface GrammarErrorDetail {
    readonly text: string;
    readonly token: string | null;
    readonly line: number;
    readonly loc?: GrammarPlace;
    readonly expected?: readonly string[];
  }

  /**
   * The semantic actions. What a hook returns becomes the value of its part of the text. Values that reach unary plus
   * and minus must have a numeric `valueOf`: the grammar replaces what `isNaN` calls not a number by 0.
   */
  export interface GrammarHooks {
    callVariable(name: string): unknown;
    callFunction(name: string, parameters?: unknown[]): unknown;
    evaluateByOperator(operator: string, operands: unknown[]): unknown;
    toNumber(value: unknown): unknown;
    invertNumber(value: unknown): unknown;
    trimEdges(text: string): unknown;
    cellValue(address: string): unknown;
    rangeValue(start: string, end: string): unknown;
    throwError(name: string): unknown;
    /** Called for a lexical or a grammatical error; must throw. */
    parseError?(message: string, detail: GrammarErrorDetail): never;
  }

  /** What `this` is in a semantic action: the value that it makes, and the place of the text that it stands for. */
  export interface GrammarValue {
    $: unknown;
    readonly _$: GrammarPlace;
  }

  export class Parser {
    /** Read at the start of each parse; only own properties count. */
    yy: GrammarHooks;
    /** Runs the action of one rule; may be replaced on an instance by a function that calls it and then reads `_$`. */
    performAction: (this: GrammarValue, ...details: unknown[]) => unknown;
    /** The value of the whole text; throws what `parseError` throws. */
    parse(text: string): unknown;
  }
}
