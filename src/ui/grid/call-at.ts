/** The function call that a caret stands in, for telling its signature while it is typed. */

/** A call around the caret. */
export interface CallAtCaret {
  readonly name: string;
  /** Which argument the caret is in, from 0. */
  readonly argument: number;
}

const NAME_BEFORE = /(\p{L}[\p{L}\p{M}\p{N}_]*)\s*$/u;

/** The innermost call whose brackets the caret is in; undefined outside of calls. */
export function callAt(entry: string, caret: number): CallAtCaret | undefined {
  let depth = 0;
  let argument = 0;
  for (let at = caret - 1; at >= 0; at--) {
    const character = entry[at];
    if (character === ')') depth += 1;
    else if ((character === ',' || character === ';') && depth === 0) argument += 1;
    else if (character === '(' && depth > 0) depth -= 1;
    else if (character === '(') {
      const name = NAME_BEFORE.exec(entry.slice(0, at))?.[1];
      if (name !== undefined) return { name, argument };
      // A bracket that only groups: what it separates is no argument of the call outside it.
      argument = 0;
    }
  }
  return undefined;
}

/** A signature cut into what stands before, in and after the argument that the caret is in. */
export function signatureParts(
  signature: string,
  argument: number,
): readonly [before: string, at: string, after: string] {
  const open = signature.indexOf('(');
  const close = signature.lastIndexOf(')');
  if (open < 0 || close < open) return [signature, '', ''];
  const parameters = signature.slice(open + 1, close).split(',');
  const index = Math.min(argument, parameters.length - 1);
  const before = parameters
    .slice(0, index)
    .map((one) => `${one},`)
    .join('');
  const at = parameters[index] ?? '';
  const lead = at.length - at.trimStart().length;
  const start = open + 1 + before.length + lead;
  const end = open + 1 + before.length + at.length;
  return [signature.slice(0, start), signature.slice(start, end), signature.slice(end)];
}
