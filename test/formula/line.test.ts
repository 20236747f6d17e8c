/** One line checked by itself: what is read of its entry, and how other lines meet it. */
import { describe, expect, it } from 'vitest';
import { checkLine, readEntry, type LineResult, type LineSpec, type Scope, type SymbolInfo } from '../../src/formula';

/** A scope made of lines that are checked one after the other. */
function scopeOf(lines: readonly Partial<LineSpec>[]): Scope {
  const infos = new Map<string, SymbolInfo | 'withheld'>();
  const scope: Scope = {
    find: (symbol) => infos.get(symbol),
    *all() {
      for (const info of infos.values()) if (info !== 'withheld') yield info;
    },
    names: () => infos.keys(),
  };
  lines.forEach((line, slot) => {
    const spec: LineSpec = { symbol: '', label: '', entry: '', ...line };
    const { unit, type, kind, side, constant } = checkLine(spec, scope);
    infos.set(
      spec.symbol,
      unit === undefined || type === undefined
        ? 'withheld'
        : {
            symbol: spec.symbol,
            label: spec.label,
            slot,
            unit,
            type,
            kind: kind?.kind,
            side: side?.side,
            isDeclared: kind?.origin === 'declared',
            constant,
          },
    );
  });
  return scope;
}

const check = (line: Partial<LineSpec>, others: readonly Partial<LineSpec>[] = []): LineResult =>
  checkLine({ symbol: 'y', label: '', entry: '', ...line }, scopeOf(others));

const codes = ({ remarks }: LineResult): readonly string[] => remarks.map(({ code }) => code);

describe('entries as read', () => {
  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['14 dBm', 'quantity'],
    ['14,5', 'quantity'],
    ['14 dBm + 1 dB', 'expression'],
    ['P', 'expression'],
    ['-P', 'expression'],
    ['14 furlong', 'unreadable'],
    ['14 +', 'unreadable'],
  ])('“%s” is %s', (entry, form) => {
    expect(readEntry(entry).form).toBe(form);
  });

  it('tell the symbols they use, each once, constants and what may be curves among them', () => {
    const read = readEntry('P + G - L + P + k_B*f(T_0)');
    expect(read.form === 'expression' && read.symbols).toEqual(['P', 'G', 'L', 'k_B', 'f', 'T_0']);
  });
});

describe('units of lines', () => {
  it.each([
    [{ entry: '14 dBm' }, 'dBm'],
    [{ entry: '14', unit: 'dBm' }, 'dBm'],
    [{ entry: '14 dBm', unit: 'mW' }, 'mW'],
    [{ entry: '14' }, '1'],
    [{ entry: '2 W + 3 W' }, 'W'],
    [{ entry: 'k_B*290 K*1 MHz' }, 'W'],
    [{ entry: '10 dBm - 3 dB' }, 'dBm'],
    [{ entry: '10 dBm - 3 dBm' }, 'dB'],
    [{ entry: '', unit: 'dBm' }, 'dBm'],
    [{ entry: '' }, undefined],
    [{ entry: '3 dB/km' }, 'dB/km'],
  ] as const)('%j: %s', (line, word) => {
    expect(check(line).unit?.word).toBe(word);
  });

  it('are free to take a prefix only when nobody chose them', () => {
    expect([
      check({ entry: 'k_B*290 K*1 MHz' }).isFitted,
      check({ entry: '14 mW' }).isFitted,
      check({ entry: '14 mW', unit: 'W' }).isFitted,
    ]).toEqual([true, false, false]);
  });

  it('that do not exist are told, with the nearest', () => {
    const result = check({ entry: '3', unit: 'dBn' });
    expect(codes(result)).toEqual(['bad-entry']);
    expect(result.remarks[0]?.facts['what']).toContain('dBn');
    expect(result.isInError).toBe(true);
  });

  it('typed digits are kept for display', () => {
    expect([check({ entry: '868.125 MHz' }).typedDigits, check({ entry: '14 dBm + 0 dB' }).typedDigits]).toEqual([
      6,
      undefined,
    ]);
  });
});

describe('bare numbers in lines', () => {
  it('are coefficients where they are used', () => {
    const result = check({ entry: 'n*P - 2*P' }, [
      { symbol: 'n', entry: '3' },
      { symbol: 'P', entry: '10 dBm' },
    ]);
    expect([codes(result), result.unit?.word]).toEqual([[], 'dBm']);
  });

  it('with a unit of their own are not', () => {
    expect(
      codes(
        check({ entry: 'P^n' }, [
          { symbol: 'n', entry: '3 %' },
          { symbol: 'P', entry: '2 W' },
        ]),
      ),
    ).toEqual(['unit-mismatch']);
  });
});

describe('what a line waits for, and looks at', () => {
  const broken = [
    { symbol: 'a', entry: '1 dBm + 1 K' },
    { symbol: 'b', entry: '3 dB' },
  ];

  it('names symbols without a type', () => {
    const result = check({ entry: 'a + b' }, broken);
    expect([result.waitsFor, result.isInError, codes(result)]).toEqual([['a'], true, []]);
  });

  it('with a unit and kind of its own is known to others all the same', () => {
    const result = check({ entry: 'a + b', unit: 'dBm' }, broken);
    expect([result.unit?.word, result.type?.form]).toEqual(['dBm', 'decibel']);
  });

  it('looks at other lines only where a repair needs them', () => {
    const others = [
      { symbol: 'N_0', entry: '-174 dBm/Hz' },
      { symbol: 'B', entry: '1 MHz' },
    ];
    expect(check({ entry: 'N_0 + 3 dB' }, others).looksAround).toBe(false);
    expect(check({ entry: 'N_0 + 3 dB', unit: 'dBm' }, others).looksAround).toBe(true);
  });
});

describe('kinds and sides', () => {
  it.each([
    [{ symbol: 'L_1', entry: '3 dB' }, 'loss', 'name'],
    [{ symbol: 'x', label: 'Feeder loss', entry: '3 dB' }, 'loss', 'name'],
    [{ symbol: 'L_1', entry: '3 dB', quantity: 'gain' }, 'gain', 'declared'],
    [{ symbol: 'x', entry: '3 dBi' }, 'gain', 'unit'],
    [{ symbol: 'x', entry: '3 dB' }, undefined, undefined],
    [{ symbol: 'x', entry: 'noise_temperature(3 dB)' }, 'temperature', 'expression'],
    [{ symbol: 'x', entry: 'free_space_loss(1 km, 1 GHz)' }, 'loss', 'expression'],
    [{ symbol: 'x', entry: 'cascade_nf(1 dB, 10 dB, 5 dB)' }, 'noise figure', 'expression'],
    [{ symbol: 'x', entry: '20 dB/K' }, 'figure of merit', 'unit'],
  ] as const)('%j: %s, from the %s', (line, kind, origin) => {
    expect(check(line).kind).toEqual(kind === undefined ? undefined : { kind, origin });
  });

  it.each([
    [{ symbol: 'N', entry: '-100 dBm' }, 'unwanted', 'name'],
    [{ symbol: 'P', entry: '-100 dBm' }, undefined, undefined],
    [{ symbol: 'P', entry: '-100 dBm', side: 'wanted' }, 'wanted', 'declared'],
    [{ symbol: 'x', entry: 'thermal_noise(290 K, 1 MHz)' }, 'unwanted', 'expression'],
    [{ symbol: 'x', entry: 'thermal_noise(290 K, 1 MHz) + 10 dB' }, 'unwanted', 'expression'],
  ] as const)('%j: side %s', (line, side, origin) => {
    expect(check(line).side).toEqual(side === undefined ? undefined : { side, origin });
  });
});

describe('whatever is typed', () => {
  it.each([
    '(',
    '1/0',
    'a a',
    '10^400',
    'f(',
    'if(1,2)',
    'sum()',
    '"',
    '\u0000',
    '9'.repeat(400),
    '+',
    '1e',
    '1e+',
    'powersum(powersum(), 3)',
    'lin(lin(3))',
    '--3 dB',
    'pi pi',
    'T_0^T_0',
    'k_B + T_0',
    'if(1 > 2, if(3 > 4, 5, 6), "x")',
  ])('%j gives a result and no exception', (entry) => {
    const result = check({ entry });
    expect(result.isEmpty || result.isInError || result.unit !== undefined).toBe(true);
  });
});
