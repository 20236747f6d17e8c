/**
 * The worst and the best that tolerances can do to a line, computed jointly.
 * How: each input (a group as one) is tried at both limits and at places between them with the others at their values; each takes
 * the place that moves the line furthest, whichever limit that is; and from there each is tried again with the others where they
 * stand, until no place moves the line further. A place between the limits is kept only where it does more than either limit (a
 * line that does not rise or fall all the way), and is then made precise. It finds the extreme of every line that rises or falls
 * with each input, whatever the directions, and of lines with a single hump in each; of others it finds a local one at least.
 * Places at which the line is withheld are passed over.
 */
import type { Evaluation } from '../engine';
import { compileColumns } from './columns';
import type { Direction } from './directions';
import { baseOf, variedOf, type Input } from './inputs';

/** Places tried over an input's range, in steps of 1/16. */
const STEPS = 16;
const ROUNDS = 8;
const ZOOMS = 5;

/** NaN: at its value. Else 0 to 1: from its lower limit to its upper, or for a group from adverse to favourable. */
type Place = number;

export interface Extremes {
  readonly adverse: number;
  readonly favourable: number;
}

/** The least and the greatest figure within all tolerances, told as adverse and favourable. */
export function extremesOf(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  inputs: readonly Input[],
  direction: Direction,
): Extremes {
  const search = makeSearch(evaluation, lineId, caseId, inputs);
  const least = search(-1);
  const greatest = search(1);
  return direction === 'higher' ? { adverse: least, favourable: greatest } : { adverse: greatest, favourable: least };
}

/** The index of each input's variable: groups deviate together. */
export function variablesOf(inputs: readonly Input[]): readonly (readonly number[])[] {
  const variables: number[][] = [];
  const groups = new Map<string, number[]>();
  inputs.forEach(({ group }, index) => {
    const known = group === undefined ? undefined : groups.get(group);
    if (known !== undefined) {
      known.push(index);
      return;
    }
    const members = [index];
    variables.push(members);
    if (group !== undefined) groups.set(group, members);
  });
  return variables;
}

function deviationAt({ spread, group, direction }: Input, place: Place): number {
  if (Number.isNaN(place)) return 0;
  const { below, above } = spread;
  return group !== undefined && direction === 'lower'
    ? above - place * (above + below)
    : place * (above + below) - below;
}

function makeSearch(
  evaluation: Evaluation,
  lineId: string,
  caseId: string,
  inputs: readonly Input[],
): (sign: 1 | -1) => number {
  const variables = variablesOf(inputs);
  const ofInput = inputs.map((_, index) => variables.findIndex((members) => members.includes(index)));
  const program = compileColumns(evaluation, [lineId], caseId, inputs.map(variedOf), 2 * STEPS);

  /** The line's figures with one variable at several places and the others where they stand. */
  const tryPlaces = (stand: readonly Place[], variable: number, places: readonly Place[]): Float64Array => {
    const results = new Float64Array(places.length);
    program.run(
      0,
      places.length,
      (index, column, start, count) => {
        const input = inputs[index] as Input;
        const own = ofInput[index] as number;
        for (let i = 0; i < count; i++) {
          const place = own === variable ? (places[start + i] as Place) : (stand[own] as Place);
          column[i] = baseOf(input) + deviationAt(input, place);
        }
      },
      [results],
    );
    return results;
  };
  const grid = [0, 1, ...Array.from({ length: STEPS - 1 }, (_, i) => (i + 1) / STEPS)];

  return (sign) => {
    /** The best of some places for one variable; where it stands unless another is better. Limits come first. */
    const best = (
      stand: readonly Place[],
      variable: number,
      places: readonly Place[],
    ): { place: Place; figure: number } => {
      const tried = [stand[variable] as Place, ...places];
      const figures = tryPlaces(stand, variable, tried);
      let at = 0;
      figures.forEach((figure, i) => {
        const now = figures[at] as number;
        const gain = sign * (figure - now);
        // The limits are tried before all others; what is between them has to do better than rounding.
        if (gain > 1e-12 * Math.max(1, Math.abs(now)) || (Number.isNaN(now) && !Number.isNaN(figure))) at = i;
      });
      return { place: tried[at] as Place, figure: figures[at] as number };
    };
    const nominal: readonly Place[] = variables.map(() => NaN);
    let figure = tryPlaces(nominal, -1, [NaN])[0] as number;
    let stand = variables.map((_, variable) => best(nominal, variable, grid).place);
    const joint = tryPlaces(stand, -1, [NaN])[0] as number;
    // What moves the line one way by itself may not do so together with the others.
    if (Number.isNaN(joint) || sign * (joint - figure) < 0) stand = [...nominal];
    else figure = joint;
    const improve = (placesOf: (place: Place) => readonly Place[]): boolean => {
      let hasMoved = false;
      variables.forEach((_, variable) => {
        const found = best(stand, variable, placesOf(stand[variable] as Place));
        hasMoved ||= !Object.is(found.place, stand[variable]);
        stand[variable] = found.place;
        figure = found.figure;
      });
      return hasMoved;
    };
    for (let round = 0; round < ROUNDS && improve(() => grid); round++);
    for (let zoom = 1; zoom <= ZOOMS; zoom++) {
      const reach = STEPS ** -zoom;
      improve((place) =>
        place > 0 && place < 1
          ? Array.from({ length: STEPS }, (_, i) =>
              Math.min(1, Math.max(0, place + reach * ((2 * (i + 0.5)) / STEPS - 1))),
            )
          : [],
      );
    }
    return figure;
  };
}
