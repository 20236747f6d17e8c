/** The geometry of threads: curves in a margin 20 px wide, from one line's middle to others'. */

/** A curve in the margin. */
export interface Thread {
  readonly kind: 'rests-on' | 'used-by';
  /** An SVG path. */
  readonly path: string;
  /** Where the other line is, if in view. */
  readonly end?: number;
}

/** What the threads are drawn from: middles of lines and the view's edges, in CSS px from the top of all rows. */
export interface ThreadsInput {
  readonly from: number;
  readonly restsOn: readonly number[];
  readonly usedBy: readonly number[];
  readonly top: number;
  readonly bottom: number;
}

const EDGE = 17;
/** More stubs than this to lines out of view would be one blot. */
const MOST = 60;

/** The curves from the line at `from`; nothing when that line is out of view. */
export function threadsOf({ from, restsOn, usedBy, top, bottom }: ThreadsInput): readonly Thread[] {
  if (from < top || from > bottom) return [];
  const curves = (kind: Thread['kind'], places: readonly number[]): Thread[] => {
    const seen = places.filter((place) => place >= top && place <= bottom);
    const above = places.some((place) => place < top);
    const below = places.some((place) => place > bottom);
    return [
      ...seen.slice(0, MOST).map((place) => ({ kind, path: curve(from, place), end: place })),
      ...(above ? [{ kind, path: stub(from, top) }] : []),
      ...(below ? [{ kind, path: stub(from, bottom) }] : []),
    ];
  };
  return [...curves('rests-on', restsOn), ...curves('used-by', usedBy)];
}

/** A bow to the left, the deeper the farther the lines are apart. */
function curve(from: number, to: number): string {
  const reach = EDGE - Math.min(4 + Math.abs(to - from) / 14, 15);
  return `M${EDGE} ${from} C${reach} ${from}, ${reach} ${to}, ${EDGE} ${to}`;
}

/** The beginning of a bow, leaving the view. */
function stub(from: number, edge: number): string {
  return `M${EDGE} ${from} C3 ${from}, 3 ${(from + edge) / 2}, 3 ${edge}`;
}
