/**
 * The pieces of a working's step in runs: a line of text is broken between runs, not inside one.
 * Holds: the runs hold all pieces' texts but the blanks between them, in order; a sign stays with what it stands before or
 * behind, and a figure with its unit.
 */
import type { Piece } from '../../review';

const FIGURE_WITH_UNIT = /^([−-]?[\d.][^ ]*) (\S+)$/;

/** The runs of a step, each with the pieces that are kept together. */
export function runsOf(pieces: readonly Piece[]): Piece[][] {
  const runs: Piece[][] = [[]];
  const add = (piece: Piece): void => void runs.at(-1)?.push(piece);
  for (const piece of pieces) {
    if (piece.type !== 'text') {
      add(piece);
      continue;
    }
    const words = piece.text.replace(FIGURE_WITH_UNIT, '$1\u00a0$2').split(' ');
    words.forEach((text, index) => {
      if (index > 0) runs.push([]);
      if (text !== '') add({ type: 'text', text });
    });
  }
  return runs.filter((run) => run.length > 0);
}
