/** Pieces of work one after another, each in a task of its own, so that the page answers between them. */

/** Does the pieces and gives all that they gave; calling the answer ends it before. */
export function inTurn<T>(pieces: readonly (() => T)[], done: (all: readonly T[]) => void): () => void {
  const all: T[] = [];
  const next = (): void => {
    const piece = pieces[all.length];
    if (piece === undefined) {
      done(all);
      return;
    }
    all.push(piece());
    timer = setTimeout(next);
  };
  let timer = setTimeout(next);
  return () => clearTimeout(timer);
}
