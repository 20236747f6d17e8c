/** The scanner: literals with their units, signs, limits and places; plain quantities; renaming; the nearest name. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  DEPTH_LIMIT,
  ENTRY_LIMIT,
  nearestName,
  parseEntry,
  readPlainQuantity,
  renameSymbol,
  scanEntry,
  type Token,
} from '../../src/formula';
import { UNIT_WORDS } from '../../src/quantity';

function toldOf(token: Token): string {
  switch (token.type) {
    case 'literal':
      return `${String(token.figure)}${token.unit === null ? '' : `·${token.unit.word}`}`;
    case 'text':
      return `"${token.text}"`;
    case 'symbol':
      return token.name;
    case 'function':
      return `${token.name}(`;
    case 'sign':
      return token.sign;
  }
}

function tokens(entry: string): readonly string[] | string {
  const scan = scanEntry(entry);
  return scan.ok ? scan.value.tokens.map(toldOf) : scan.fault.sentence;
}

describe('literals', () => {
  it.each([
    ['3 dB', ['3·dB']],
    ['3dB', ['3·dB']],
    ['3  dB', 'An operator such as +, − or * is missing before this.'],
    ['-174 dBm/Hz', ['-174·dBm/Hz']],
    ['- 174 dBm/Hz', ['-174·dBm/Hz']],
    ['−174 dBm/Hz', ['-174·dBm/Hz']],
    ['-174', ['-', '174']],
    ['a-174 dBm', ['a', '-', '174·dBm']],
    ['a - -174 dBm', ['a', '-', '-174·dBm']],
    ['(-174 dBm)', ['(', '-174·dBm', ')']],
    ['f(-3 dB, -4 dB)', ['f(', '-3·dB', ',', '-4·dB', ')']],
    ['2*-3 dB', ['2', '*', '-3·dB']],
    ['-3 dB^2', ['-', '3·dB', '^', '2']],
    ['1.5e-3 W', ['0.0015·W']],
    ['1.5E3W', ['1500·W']],
    ['.5 dB', ['0.5·dB']],
    ['5. dB', ['5·dB']],
    ['2.4e9Hz', ['2400000000·Hz']],
    ['10 W/m', ['10·W', '/', 'm']],
    ['10 W / m', ['10·W', '/', 'm']],
    ['10 W/m²', ['10·W/m²']],
    ['10 W/m^2', ['10·W/m²']],
    ['10 W/m2', ['10·W/m²']],
    ['3 dB-L', ['3·dB', '-', 'L']],
    ['80 dB-Hz', ['80·dBHz']],
    ['80 dB-B', ['80·dB', '-', 'B']],
    ['20 uW', ['20·µW']],
    ['20 μW', ['20·µW']],
    ['50 Ω', ['50·Ω']],
    ['50 \u2126', ['50·Ω']],
    ['50 ohm', ['50·Ω']],
    ['25 °C', ['25·°C']],
    ['25°C', ['25·°C']],
    ['30 deg', ['30·deg']],
    ['30°', ['30·deg']],
    ['50 %', ['50·%']],
    ['50%', ['50·%']],
    ['256 kbit/s', ['256·kbit/s']],
    ['256 kbps', ['256·kbit/s']],
    ['5 dB(1 mW)', ['5·dBm']],
    ['5 dB(mW)', ['5·dBm']],
    ['60 dB(µV/m)', ['60·dBµV/m']],
    ['5 dBm/100kHz', ['5·dBm/100kHz']],
    ['9.81 m/s', ['9.81·m/s']],
    ['3\u00a0dB', ['3·dB']],
    ['3\u202fdB', ['3·dB']],
    ['3 dB + L_1', ['3·dB', '+', 'L_1']],
    ['22 dB/100m*l', ['22·dB/100m', '*', 'l']],
    ['5 dBi/K', ['5·dB/K']],
    ['1e400', 'The number is too large.'],
    ['20 log10(x)', '“log10” is no unit known here. To multiply by a symbol write 20 * log10.'],
    ['3x', '“x” is no unit known here. To multiply by a symbol write 3 * x.'],
    ['3 dBmm', '“dBmm” is no unit known here; is it dBm? To multiply by a symbol write 3 * dBmm.'],
    ['20 Mhz', '“Mhz” is no unit known here; is it MHz? To multiply by a symbol write 20 * Mhz.'],
    ['.', 'A number is expected after the point.'],
  ])('%s', (entry, expected) => {
    expect(tokens(entry)).toEqual(expected);
  });

  // Words such as 1/s cannot follow a number inside an expression; as a plain quantity they can.
  it.each(UNIT_WORDS.filter((word) => !word.startsWith('1')))('take the unit %s with and without a space', (word) => {
    expect(tokens(`7 ${word}`)).toEqual([`7·${word}`]);
    expect(tokens(`7${word}`)).toEqual([`7·${word}`]);
  });

  it('end with the longest unit word: dBm/Hz before dBm before dB', () => {
    expect(tokens('1 dBm/Hz')).toEqual(['1·dBm/Hz']);
    expect(tokens('1 dBm/Hzz')).toEqual(['1·dBm', '/', 'Hzz']);
    expect(tokens('1 dBm/L')).toEqual(['1·dBm', '/', 'L']);
    expect(tokens('1 dB/L')).toEqual(['1·dB', '/', 'L']);
  });
});

describe('symbols and functions', () => {
  it.each([
    ['P_tx', ['P_tx']],
    ['λ', ['λ']],
    ['Δf_1', ['Δf_1']],
    ['Ω_2', ['Ω_2']],
    ['P1dB', ['P1dB']],
    ['N_0', ['N_0']],
    ['rx.lna.nf', ['rx.lna.nf']],
    ['rx.2', 'An operator such as +, − or * is missing before this.'],
    ['_a', 'A symbol begins with a letter.'],
    ['f(x)', ['f(', 'x', ')']],
    ['f (x)', ['f(', 'x', ')']],
    ['Gₜ', ['Gₜ']],
    ['é', ['é']],
    ['e\u0301', ['e\u0301']],
    ['P tx', 'An operator such as +, − or * is missing before this.'],
    ['𝛼 + 1', ['𝛼', '+', '1']],
  ])('%s', (entry, expected) => {
    expect(tokens(entry)).toEqual(expected);
  });
});

describe('places', () => {
  it('are those of the text, in UTF-16 units', () => {
    const entry = ' 𝛼*−3 dB + f( "x" )';
    const scan = scanEntry(entry);
    expect(scan.ok && scan.value.tokens.map(({ start, end }) => entry.slice(start, end))).toEqual([
      '𝛼',
      '*',
      '−3 dB',
      '+',
      'f(',
      '"x"',
      ')',
    ]);
  });

  it.each([
    ['a + $', 4, 5],
    ['a + %', 4, 5],
    ['3 dB x', 5, 6],
    ['a)', 1, 2],
    ['(a', 2, 2],
    ['a + "x', 4, 6],
    ['20 log10(x)', 3, 8],
    ['= a', 0, 1],
    ['', 0, 0],
  ])('of the fault in “%s” are %d to %d', (entry, start, end) => {
    const scan = scanEntry(entry);
    expect(scan.ok ? undefined : scan.fault.place).toEqual({ start, end });
  });
});

describe('limits', () => {
  it('take 4,096 characters and refuse one more', () => {
    const longest = `1${'+1'.repeat((ENTRY_LIMIT - 1) / 2)}`.padEnd(ENTRY_LIMIT, ' ');
    expect([ENTRY_LIMIT, longest.length]).toEqual([4096, 4096]);
    expect(parseEntry(longest).ok).toBe(true);
    expect(tokens(`${longest} `)).toBe(
      'The entry has 4097 characters; at most 4096 are read. Split it over several lines.',
    );
  });

  it.each(['(', 'f('])('take 64 levels of %s and refuse 65', (open) => {
    const nested = (depth: number): string => open.repeat(depth) + 'a' + ')'.repeat(depth);
    expect(DEPTH_LIMIT).toBe(64);
    expect(parseEntry(nested(64)).ok).toBe(true);
    expect(tokens(nested(65))).toBe('Brackets are nested more than 64 deep. Split the entry over several lines.');
  });

  it('are looked at before the grammar, which would hang', () => {
    expect(parseEntry('('.repeat(4096)).ok).toBe(false);
    expect(parseEntry('('.repeat(100_000)).ok).toBe(false);
    expect(parseEntry('-'.repeat(4096)).ok).toBe(false);
  });

  it('a closing bracket gives the level back', () => {
    expect(parseEntry(Array.from({ length: 100 }, () => '(a)').join('+')).ok).toBe(true);
  });
});

describe('hostile text', () => {
  it.each([
    '<script>alert(1)</script>',
    '{{constructor}}',
    '${x}',
    'a`b`',
    "'; DROP",
    '\u202ea',
    'a\0b',
    '\ud800',
    '=HYPERLINK("x")',
    '@SUM(1)',
    '\u200b',
    '<!--',
    '\\u0041',
    '%3Cscript',
  ])('is refused or read, and never run: %j', (entry) => {
    const scan = scanEntry(entry);
    if (scan.ok)
      expect(
        scan.value.tokens.every(({ type }) => ['symbol', 'sign', 'text', 'function', 'literal'].includes(type)),
      ).toBe(true);
    else expect(scan.fault.sentence).not.toBe('');
  });

  it.each(['toString', 'constructor', 'hasOwnProperty', 'valueOf', 'prototype'])(
    '%s is a symbol like any other',
    (name) => {
      expect(tokens(`${name} + 1`)).toEqual([name, '+', '1']);
      expect(tokens(`${name}(1)`)).toEqual([`${name}(`, '1', ')']);
    },
  );

  it('tokens and shape correspond: entries that differ in names and figures alone have one shape', () => {
    const shape = (entry: string): string | undefined => {
      const scan = scanEntry(entry);
      return scan.ok ? scan.value.shape : undefined;
    };
    expect(shape('a + f(3 dB)')).toBe('v_0+F_2(v_3)');
    expect(shape('x_9  +  powersum( -7 dBm )')).toBe('v_0+F_2(v_3)');
    expect(shape('a − 3 ≤ b')).toBe('v_0-v_2<=v_4');
  });
});

describe('plain quantities', () => {
  it.each([
    ['14 dBm', 14, 'dBm', 2],
    ['14dBm', 14, 'dBm', 2],
    ['14,5 dBm', 14.5, 'dBm', 3],
    ['14.50 dBm', 14.5, 'dBm', 4],
    ['-3 dB', -3, 'dB', 1],
    ['−3 dB', -3, 'dB', 1],
    ['–3,25 dB', -3.25, 'dB', 3],
    ['- 3 dB', -3, 'dB', 1],
    ['+3 dB', 3, 'dB', 1],
    ['1 000 000 Hz', 1e6, 'Hz', 7],
    ['1\u00a0000\u00a0000 Hz', 1e6, 'Hz', 7],
    ['1\u202f000,5 Hz', 1000.5, 'Hz', 5],
    ['1’000 Hz', 1000, 'Hz', 4],
    ["1'000.5 Hz", 1000.5, 'Hz', 5],
    ['25 °C', 25, '°C', 2],
    ['-40°C', -40, '°C', 2],
    ['25 degC', 25, '°C', 2],
    ['1.5e-3 W', 0.0015, 'W', 2],
    ['2,4E9 Hz', 2.4e9, 'Hz', 2],
    ['.5 dB', 0.5, 'dB', 1],
    ['0,050 W', 0.05, 'W', 2],
    ['50 %', 50, '%', 2],
    ['10 dB (1 mW)', 10, 'dBm', 2],
    ['10 dBuV/m', 10, 'dBµV/m', 2],
    ['  7 dB  ', 7, 'dB', 1],
    ['3', 3, undefined, 1],
    ['3,5', 3.5, undefined, 2],
    ['0', 0, undefined, 0],
  ])('%s', (text, figure, word, digits) => {
    const read = readPlainQuantity(text);
    expect(read && { figure: read.figure, word: read.unit?.word, digits: read.digits }).toEqual({
      figure,
      word,
      digits,
    });
  });

  it.each([
    '',
    ' ',
    '-',
    ',',
    '.',
    'dBm',
    'a',
    '3 + 4',
    '1,2,3',
    '1.234,5',
    '1,234.5',
    '12 34',
    '3 dB + 1 dB',
    '3 furlong',
    '1e400',
    '3 dB dB',
    '--3',
    '3-',
    '(3 dB)',
    '3 1',
    'NaN',
    'Infinity',
    '0x10',
  ])('“%s” is none', (text) => {
    expect(readPlainQuantity(text)).toBeUndefined();
  });

  it('never throws, and gives finite figures alone', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 20, unit: 'binary' }), (text) => {
        const read = readPlainQuantity(text);
        if (read !== undefined) expect(Number.isFinite(read.figure)).toBe(true);
      }),
      { numRuns: 1000 },
    );
  });
});

describe('renaming', () => {
  it.each([
    ['P + G', 'P', 'P_tx', 'P_tx + G'],
    ['P+P_1+PP', 'P', 'X', 'X+P_1+PP'],
    ['3*P - 2*P', 'P', 'Q_1', '3*Q_1 - 2*Q_1'],
    ['f(P, "P")', 'P', 'Q', 'f(Q, "P")'],
    ['P(3) + P', 'P', 'Q', 'Q(3) + Q'],
    ['max(max, 3)', 'max', 'most', 'max(most, 3)'],
    ['10 W / m', 'm', 'len', '10 W / len'],
    ['10 W', 'W', 'X', '10 W'],
    ['rx.nf + rx', 'rx', 'front', 'front.nf + front'],
    ['rxx.nf', 'rx', 'front', 'rxx.nf'],
    ['  P  −  3 dB ', 'P', 'Q', '  Q  −  3 dB '],
    ['P + ', 'P', 'Q', 'Q + '],
    ['P + $', 'P', 'Q', 'P + $'],
    ['λ*2', 'λ', 'l', 'l*2'],
    ['', 'P', 'Q', ''],
  ])('%s with %s as %s', (entry, from, to, expected) => {
    expect(renameSymbol(entry, from, to)).toBe(expected);
  });

  it('and renaming back gives the entry again, when the new name was not in it', () => {
    fc.assert(
      fc.property(
        fc.array(fc.constantFrom('P', 'G', 'x', ' + ', ' - ', '3 dB', 'f(', ')', ' '), { maxLength: 10 }),
        (pieces) => {
          const entry = pieces.join('');
          expect(renameSymbol(renameSymbol(entry, 'P', 'fresh_1'), 'fresh_1', 'P')).toBe(entry);
        },
      ),
    );
  });
});

describe('the nearest name', () => {
  it.each([
    ['P_T', ['P_t', 'P_r'], 'P_t'],
    ['powersumm', ['powersum', 'powerdiff'], 'powersum'],
    ['Powersum', ['powersum'], 'powersum'],
    ['dbm', ['dBm', 'dB'], 'dBm'],
    ['Mhz', ['mHz', 'MHz'], 'MHz'],
    ['GHZ', ['Hz', 'GHz'], 'GHz'],
    ['L2', ['L_2', 'G_2'], 'L_2'],
    ['SINR_total', ['SINR_tot', 'SNR'], 'SINR_tot'],
    ['abcdef', ['uvwxyz'], undefined],
    ['x', [], undefined],
    ['free_space_los', ['free_space_loss'], 'free_space_loss'],
    ['EIPR', ['EIRP', 'G_r'], 'EIRP'],
    ['Zhz', ['mHz', 'zHz'], 'zHz'],
    ['pwoersum', ['powersum'], 'powersum'],
    ['P_rx', ['P_xr', 'L_xy'], 'P_xr'],
    ['abcd', ['badc'], undefined],
  ])('to %s of %j is %s', (name, candidates, expected) => {
    expect(nearestName(name, candidates)).toBe(expected);
  });
});
