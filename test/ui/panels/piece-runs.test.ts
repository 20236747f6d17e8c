import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import type { Piece } from '../../../src/review';
import { runsOf } from '../../../src/ui/panels/piece-runs';

const text = (words: string): Piece => ({ type: 'text', text: words });
const symbol = (name: string): Piece => ({ type: 'symbol', symbol: name });
const figure = (figureText: string, unit: string): Piece => ({ type: 'figure', text: figureText, unit });

const written = (pieces: readonly Piece[]): string =>
  pieces.map((piece) => (piece.type === 'symbol' ? piece.symbol : piece.text)).join('');
const runs = (...pieces: Piece[]): string[] => runsOf(pieces).map(written);

describe('what is kept together in a line of text', () => {
  it('a separator with what it follows, a bracket with what it precedes', () => {
    expect(runs(text('powersum'), text('('), symbol('N'), text(', '), symbol('I'), text(')'))).toEqual([
      'powersum(N,',
      'I)',
    ]);
  });

  it('a prefix sign with what it stands before, not an operator', () => {
    expect(runs(text('−'), figure('2.00', 'dB'), text(' − '), symbol('L'))).toEqual(['−2.00', '−', 'L']);
  });

  it('a typed figure with its unit', () => {
    expect(runs(text('−150 dBm'), text(')'))).toEqual(['−150\u00a0dBm)']);
  });
});

describe('the law of runs', () => {
  const piece = fc.oneof(
    fc.string({ unit: fc.constantFrom('(', ')', ',', ' ', '+', '−', 'f') }).map(text),
    fc.constantFrom(symbol('P_tx'), figure('3', 'dB')),
  );

  it('everything but blanks is there once, in order', () => {
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => {
        expect(runsOf(pieces).map(written).join('')).toBe(written(pieces).replaceAll(' ', ''));
      }),
    );
  });

  it('no run is empty', () => {
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => runsOf(pieces).every((run) => written(run) !== '')),
    );
  });
});
