/**
 * Graph shapes, each with the exact work that one edit costs: how many nodes are computed, which lines changed. Every node is
 * computed at most once, and nothing beyond a figure that stayed the same.
 */
import { describe, expect, it } from 'vitest';
import { Live } from './live';

interface Shape {
  readonly name: string;
  readonly lines: string;
  /** Symbol and new entry. */
  readonly edit: readonly [symbol: string, entry: string];
  readonly computed: number;
  readonly changed: readonly string[];
  readonly after: Readonly<Record<string, number | string>>;
}

const SHAPES: readonly Shape[] = [
  {
    name: 'a chain: everything downstream, once',
    lines: `a = 1 dB
            b = a + 1 dB
            c = b + 1 dB
            z = 7 dB`,
    edit: ['a', '2 dB'],
    computed: 3,
    changed: ['a', 'b', 'c'],
    after: { a: 2, b: 3, c: 4, z: 7 },
  },
  {
    name: 'a chain written from its end: order on the sheet does not matter',
    lines: `c = b + 1 dB
            b = a + 1 dB
            a = 1 dB`,
    edit: ['a', '2 dB'],
    computed: 3,
    changed: ['c', 'b', 'a'],
    after: { c: 4 },
  },
  {
    name: 'a diamond: the join is computed once, after both arms',
    lines: `a = 1 dB
            b = a + 1 dB
            c = a + 2 dB
            d = b + c`,
    edit: ['a', '5 dB'],
    computed: 4,
    changed: ['a', 'b', 'c', 'd'],
    after: { d: 13 },
  },
  {
    name: 'a diamond with a tail',
    lines: `a = 1 dB
            b = a + 1 dB
            c = a + 2 dB
            d = b + c
            e = d - 1 dB
            f = e*2`,
    edit: ['a', '5 dB'],
    computed: 6,
    changed: ['a', 'b', 'c', 'd', 'e', 'f'],
    after: { f: 24 },
  },
  {
    name: 'a jagged diamond: arms of different length',
    lines: `a = 1 dB
            b = a + 1 dB
            c = a + 2 dB
            d = c + 3 dB
            e = d + 4 dB
            f = b + e
            g = a + f`,
    edit: ['a', '2 dB'],
    computed: 7,
    changed: ['a', 'b', 'c', 'd', 'e', 'f', 'g'],
    after: { f: 14, g: 16 },
  },
  {
    name: 'a triangle: one input both directly and through another',
    lines: `a = 1 dB
            b = a + 1 dB
            c = a + b`,
    edit: ['a', '2 dB'],
    computed: 3,
    changed: ['a', 'b', 'c'],
    after: { c: 5 },
  },
  {
    name: 'a lattice of diamonds: not once for each path',
    lines: `a = 1 dB
            b = a + 1 dB
            c = a - 1 dB
            d = b + c
            e = d + 1 dB
            f = d - 1 dB
            g = e + f
            h = g + 1 dB
            i = g - 1 dB
            j = h + i`,
    edit: ['a', '2 dB'],
    computed: 10,
    changed: ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h', 'i', 'j'],
    after: { j: 16 },
  },
  {
    name: 'a line used twice in one entry counts as one input',
    lines: `a = 1 dB
            b = a + a + 2*a`,
    edit: ['a', '2 dB'],
    computed: 2,
    changed: ['a', 'b'],
    after: { b: 8 },
  },
  {
    name: 'cut-off: a figure that stays the same stops the pass',
    lines: `a = 1 dB
            b = max(a, 10 dB)
            c = b + 1 dB
            d = c + 1 dB`,
    edit: ['a', '2 dB'],
    computed: 2,
    changed: ['a'],
    after: { b: 10, c: 11, d: 12 },
  },
  {
    name: 'cut-off in one arm only: the join is computed for the sake of the other',
    lines: `a = 1 dB
            b = max(a, 10 dB)
            c = a + 2 dB
            d = b + c`,
    edit: ['a', '2 dB'],
    computed: 4,
    changed: ['a', 'c', 'd'],
    after: { d: 14 },
  },
  {
    name: 'cut-off at the entry itself: the same figure in other words',
    lines: `a = 1 dB
            b = a + 1 dB`,
    edit: ['a', '1.00 dB'],
    computed: 1,
    changed: ['a'],
    after: { b: 2 },
  },
  {
    name: 'a figure that cancels out of its user',
    lines: `a = 1 dB
            b = a - a
            c = b + 3 dB`,
    edit: ['a', '9 dB'],
    computed: 2,
    changed: ['a'],
    after: { b: 0, c: 3 },
  },
  {
    name: 'the NaN trap: withheld before and after is no change',
    lines: `a = 0 W
            b = db(a)
            c = b + 1 dB
            d = c + 1 dB`,
    edit: ['a', '-3 W'],
    computed: 2,
    changed: ['a'],
    after: { b: 'withheld: no-power', c: 'waiting: b', d: 'waiting: b' },
  },
  {
    name: 'no power stays no power',
    lines: `a | dBm = 0 W
            b = powersum(a, 0 mW)
            c = powersum(b, 10 dBm)`,
    edit: ['a', '0 mW'],
    computed: 1,
    changed: ['a'],
    after: { a: -Infinity, b: -Infinity, c: 10 },
  },
  {
    name: 'a branch not taken is an input all the same',
    lines: `a = 1 dB
            b = if(a > 3 dB, a, 2 dB)
            c = b + 1 dB`,
    edit: ['a', '2 dB'],
    computed: 2,
    changed: ['a'],
    after: { c: 3 },
  },
];

describe('one edit', () => {
  it.each(SHAPES)('$name', ({ lines, edit: [symbol, entry], computed, changed, after }) => {
    const live = new Live(lines);
    const pass = live.entry(symbol, entry);
    expect({ computed: pass.computed, changed: live.changedIn(pass) }).toEqual({ computed, changed });
    expect(Object.fromEntries(Object.keys(after).map((name) => [name, live.value(name)]))).toEqual(after);
    expect(pass.structure).toBe(false);
  });

  it('to a note computes nothing', () => {
    const live = new Live('a = 1 dB\nb = a + 1 dB');
    const pass = live.edit({ kind: 'set-line', lineId: live.line('a').id, field: 'note', value: 'seen' });
    expect([pass.computed, live.changedIn(pass)]).toEqual([0, ['a']]);
  });

  it('to a line that nothing uses computes that line', () => {
    const live = new Live('a = 1 dB\nb = a + 1 dB');
    expect(live.entry('b', 'a + 2 dB').computed).toBe(1);
    expect(live.value('b')).toBe(3);
  });

  it('that makes a new connection computes the user and what rests on it', () => {
    const live = new Live('a = 1 dB\nb = 2 dB\nc = a + 1 dB\nd = c + 1 dB');
    const pass = live.entry('c', 'b + 1 dB');
    expect([pass.computed, pass.structure, live.changedIn(pass)]).toEqual([2, true, ['c', 'd']]);
    expect(live.entry('a', '9 dB').computed).toBe(1);
    expect(live.value('d')).toBe(4);
  });

  it('to the unit converts the line, and its users keep their figures', () => {
    const live = new Live('a = 1 W\nb | dBm = a\nc | dBm = a + 1 W');
    live.edit({ kind: 'set-line', lineId: live.line('a').id, field: 'unit', value: 'mW' });
    expect([live.value('a'), live.value('b'), Number(live.value('c')).toFixed(4)]).toEqual([1000, 30, '33.0103']);
  });

  it('with nothing in it changes nothing', () => {
    const live = new Live('a = 1 dB\nb = a + 1 dB');
    const pass = live.edit();
    expect([pass.computed, live.changedIn(pass), live.value('b')]).toEqual([0, [], 2]);
  });
});

describe('loops', () => {
  it('of two lines are named, with their path, and contained', () => {
    const live = new Live(`a = b + 1 dB
                           b = a - 1 dB
                           c = 3 dB
                           d = c + 1 dB
                           e = a + d`);
    expect([live.value('a'), live.value('b'), live.value('d'), live.value('e')]).toEqual([
      'withheld: loop',
      'withheld: loop',
      4,
      'waiting: a',
    ]);
    expect(live.message('a')).toContain('a → b → a');
    expect(live.message('b')).toContain('b → a → b');
    expect(live.codes('e')).toEqual(['waiting']);
  });

  it('of one line', () => {
    const live = new Live('x = x + 1 dB\ny = 2 dB');
    expect([live.value('x'), live.value('y')]).toEqual(['withheld: loop', 2]);
    expect(live.message('x')).toContain('x → x');
  });

  it('of three lines tell a path that comes back', () => {
    const live = new Live('a = b + 1 dB\nb = c + 1 dB\nc = a + 1 dB');
    expect(live.message('a')).toContain('a → b → c → a');
  });

  it('side by side are separate', () => {
    const live = new Live('a = b\nb = a\nc = d\nd = c\ne = a + c');
    expect(live.message('c')).toContain('c → d → c');
    expect(live.value('e')).toBe('waiting: a, c');
  });

  it('open when a line is put right, and close again', () => {
    const live = new Live('a = b + 1 dB\nb = a - 1 dB\nc = a + b');
    live.entry('b', '4 dB');
    expect([live.value('a'), live.value('b'), live.value('c'), live.codes('a')]).toEqual([5, 4, 9, []]);
    live.entry('b', 'a - 1 dB');
    expect([live.value('a'), live.value('c')]).toEqual(['withheld: loop', 'waiting: a, b']);
  });

  it('that cross tell for each line a path of uses through it', () => {
    const live = new Live('G = max(N, x)\nN = P + G\nx = G - 1 dB\nP = 1 dB');
    const paths = ['G', 'N', 'x'].map((symbol) => /itself: (.*?)\./.exec(live.message(symbol))?.[1]);
    expect(paths).toEqual(['G → N → G', 'N → G → N', 'x → G → x']);
    expect(live.value('P')).toBe(1);
  });

  it('in one case only leave the other cases alone', () => {
    const live = new Live('a = b + 1 dB\nb = 2 dB @ rain: a - 1 dB\nc = a + 1 dB', 'clear', 'rain');
    expect([live.value('a', 'clear'), live.value('c', 'clear')]).toEqual([3, 4]);
    expect([live.value('a', 'rain'), live.value('b', 'rain'), live.value('c', 'rain')]).toEqual([
      'withheld: loop',
      'withheld: loop',
      'waiting: a',
    ]);
    expect(live.evaluation.findings(live.line('a').id).map(({ code, caseIds }) => [code, caseIds])).toEqual([
      ['loop', ['rain']],
    ]);
  });

  it('of ten thousand lines are found without exhausting the stack', () => {
    const count = 10_000;
    const lines = Array.from({ length: count }, (_, at) => `s${at} = s${(at + 1) % count} + 1 dB`).join('\n');
    expect(new Live(lines).value('s5000')).toBe('withheld: loop');
  });
});
