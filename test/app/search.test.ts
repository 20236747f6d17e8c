// Searching lines, and going round the matches.
import { describe, expect, it } from 'vitest';

import { foundPlaces } from '../../src/app/found-places';
import { Evaluation } from '../../src/engine';
import { matchesOf, nextMatch } from '../../src/app/search';
import { sheet } from './support';

const worksheet = sheet([
  ['P_tx', 'Transmit power', '14 dBm', { source: 'data sheet of the buoy' }],
  ['I_ferry', 'Ferry telemetry', '-112 dBm', { byCase: { storm: '-109.5 dBm' } }],
  ['N_tot', 'Both', 'powersum(N, I_ferry)', { note: 'Buoy alone' }],
]);

describe('matches', () => {
  it.each([
    [
      'ferry',
      [
        { lineId: 'I_ferry', field: 'symbol' },
        { lineId: 'N_tot', field: 'entry' },
      ],
    ],
    [
      'BUOY',
      [
        { lineId: 'P_tx', field: 'source' },
        { lineId: 'N_tot', field: 'note' },
      ],
    ],
    ['109.5', [{ lineId: 'I_ferry', field: 'entry' }]],
    ['  ', []],
    ['nowhere', []],
  ] as const)('%s', (text, matches) => {
    expect(matchesOf(new Evaluation(worksheet), text)).toEqual(matches);
  });
});

describe('going round', () => {
  it.each([
    [0, -1, 1, -1],
    [3, -1, 1, 0],
    [3, -1, -1, 2],
    [3, 2, 1, 0],
    [3, 0, -1, 2],
  ] as const)('%i matches from %i by %i', (count, from, direction, to) => {
    expect(nextMatch(count, from, direction)).toBe(to);
  });
});

describe('the places that are found', () => {
  const marked = (text: string, searched: string): string =>
    foundPlaces(text, searched).reduceRight(
      (all, { start, end }) => `${all.slice(0, start)}[${all.slice(start, end)}]${all.slice(end)}`,
      text,
    );

  it.each([
    ['Ferry and ferryman', 'FERRY ', '[Ferry] and [ferry]man'],
    ['aaa', 'aa', '[aa]a'],
    ['P_tx - L', 'g', 'P_tx - L'],
    ['P_tx', '  ', 'P_tx'],
    // A letter that grows when it is made small moves nothing.
    ['İİ mast', 'mast', 'İİ [mast]'],
  ])('%s by %s', (text, searched, expected) => {
    expect(marked(text, searched)).toBe(expected);
  });
});
