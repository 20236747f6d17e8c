import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { scanEntry } from '../../src/formula/scan';
import {
  freeSymbol,
  isSymbol,
  proposeSymbol,
  RESERVED_SYMBOLS,
  splitSymbol,
  symbolFault,
  symbolProblem,
  symbolsIn,
  symbolWords,
  type Worksheet,
} from '../../src/worksheet';

describe('the form of a symbol', () => {
  it.each(['P', 'P_tx', 'λ', 'Ω_1', 'N0', 'P1dB', 'été', 'SINR', 'x__y', 'a_'])('%s has it', (symbol) => {
    expect(isSymbol(symbol)).toBe(true);
    expect(symbolFault(symbol)).toBeUndefined();
  });

  it.each(['', '_P', '1P', 'P tx', 'P-tx', 'P.tx', 'P_tx ', '°C', 'a"'])('“%s” has not', (symbol) => {
    expect(isSymbol(symbol)).toBe(false);
    expect(symbolFault(symbol)).toMatch(/^A symbol/);
  });

  it.each([...RESERVED_SYMBOLS])('%s is a constant', (symbol) => {
    expect(symbolFault(symbol)).toMatch(/is a constant/);
  });

  it.each(['constructor', 'prototype'])('%s cannot be recorded by', (symbol) => {
    expect(symbolFault(symbol)).toMatch(/cannot be a symbol/);
  });

  it('counts case: PI is no constant', () => {
    expect(symbolFault('PI')).toBeUndefined();
  });

  it('is what the scanner reads as one symbol', () => {
    fc.assert(
      fc.property(
        fc.oneof(fc.stringMatching(/^[A-Za-zλΩ_0-9.]{1,8}$/u), fc.string({ unit: 'grapheme', maxLength: 6 })),
        (text) => {
          const scan = scanEntry(text);
          const tokens = scan.ok ? scan.value.tokens : [];
          const isOneSymbol = tokens.length === 1 && tokens[0]?.type === 'symbol' && tokens[0].name === text;
          expect(isSymbol(text)).toBe(isOneSymbol && !text.includes('.'));
        },
      ),
      { numRuns: 500 },
    );
  });
});

describe('symbols in use', () => {
  const worksheet: Worksheet = {
    id: 'w',
    title: '',
    cases: [{ id: 'c', name: 'C' }],
    sections: [
      {
        id: 's',
        kind: 'lines',
        title: '',
        lines: [
          { id: 'l', symbol: 'P_tx', label: '', entry: '' },
          { id: 'm', symbol: '', label: '', entry: '' },
        ],
      },
      { id: 'p', kind: 'pool', symbol: 'N_I', title: '', lines: [{ id: 'q', symbol: 'I_1', label: '', entry: '' }] },
      { id: 'o', kind: 'waterfall', title: '', content: { symbol: 'Z', lines: [null] } },
    ],
  };

  it('are those of lines, sections and the lines in these', () => {
    expect([...symbolsIn(worksheet)].sort()).toEqual(['I_1', 'N_I', 'P_tx', 'Z']);
  });

  it('are refused to others, not to the line itself', () => {
    expect(symbolProblem(worksheet, 'P_tx')).toMatch(/Another line has the symbol P_tx/);
    expect(symbolProblem(worksheet, 'P_tx', 'l')).toBeUndefined();
    expect(symbolProblem(worksheet, 'I_1', 'l')).toMatch(/Another line/);
    expect(symbolProblem(worksheet, 'p_tx')).toBeUndefined();
    expect(symbolProblem(worksheet, 'T_0')).toMatch(/constant/);
  });

  it.each([
    ['P_tx', [], 'P_tx'],
    ['P_tx', ['P_tx'], 'P_tx_2'],
    ['P_tx', ['P_tx', 'P_tx_2'], 'P_tx_3'],
    ['P_tx_2', ['P_tx_2'], 'P_tx_3'],
    ['P_1', ['P_1', 'P_2'], 'P_3'],
    ['N_0', ['N_0'], 'N_0_2'],
    ['T_0', [], 'T_0_2'],
    ['', ['P'], ''],
  ])('a free one for %s beside %j is %s', (symbol, taken, expected) => {
    expect(freeSymbol(symbol, new Set(taken))).toBe(expected);
  });

  it('in a text are each found once', () => {
    expect([...symbolWords('P_tx + 3*λ - P_tx')]).toEqual(['P_tx', 'λ']);
  });
});

describe('proposals', () => {
  it.each([
    ['Transmit power', 'P_tx'],
    ['Transmitter power', 'P_tx'],
    ['Receive antenna gain', 'G_rx_ant'],
    ['Gain', 'G'],
    ['Feeder loss', 'L_feed'],
    ['Free-space loss', 'L_fs'],
    ['Rain attenuation', 'L_rain'],
    ['Noise figure', 'NF'],
    ['Noise density', 'N_0'],
    ['Noise bandwidth', 'B'],
    ['System noise temperature', 'T_sys'],
    ['Interference', 'I'],
    ['Interferer 2', 'I_2'],
    ['Distance', 'd'],
    ['EIRP', 'EIRP'],
    ['P_out', 'P_out'],
    ['Widget factor', 'Widget'],
    ['pi', 'pi_2'],
    ['???', ''],
    ['', ''],
  ])('for “%s” is %s', (label, symbol) => {
    expect(proposeSymbol(label, new Set())).toBe(symbol);
  });

  it('are always well formed and free, or empty', () => {
    fc.assert(
      fc.property(
        fc.oneof(fc.string({ unit: 'grapheme' }), fc.constantFrom('constructor', 'T_0', 'Gain', 'N')),
        fc.array(fc.constantFrom('G', 'N', 'P_tx')),
        (label, list) => {
          const taken = new Set<string>(list);
          const symbol = proposeSymbol(label, taken);
          if (symbol !== '') expect([symbolFault(symbol), taken.has(symbol)]).toEqual([undefined, false]);
        },
      ),
      { numRuns: 500 },
    );
  });
});

describe('display', () => {
  it.each([
    ['P', 'P', undefined],
    ['P_tx', 'P', 'tx'],
    ['P_tx_2', 'P', 'tx,2'],
    ['λ_0', 'λ', '0'],
    ['P_', 'P_', undefined],
    ['_P', '_P', undefined],
    ['', '', undefined],
  ])('%s is set as %s with %s below', (symbol, base, subscript) => {
    expect(splitSymbol(symbol)).toEqual(subscript === undefined ? { base } : { base, subscript });
  });
});
