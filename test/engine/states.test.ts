/** What a line is when it has no figure, and whom it waits for; symbols claimed twice; empty lines. */
import { describe, expect, it } from 'vitest';
import { Live } from './live';

describe('waiting', () => {
  it('names the line at fault, however far up', () => {
    const live = new Live('a = db(0 W)\nb = a + 1 dB\nc = b + 1 dB\nd = c + 1 dB');
    expect(live.value('d')).toBe('waiting: a');
    expect(live.codes('d')).toEqual(['waiting']);
    expect(live.message('d')).toContain('Waits for a');
  });

  it('names every line at fault, in the order of the entry, each once', () => {
    const live = new Live('a = 1/0\nb = db(0 W)\nc = a + 1\nd = lin(b)*c + lin(b)*a');
    expect(live.value('d')).toBe('waiting: b, a');
  });

  it('ends when the line at fault is put right', () => {
    const live = new Live('a = db(0 W)\nb = a + 1 dB');
    const pass = live.entry('a', 'db(1 W)');
    expect([live.value('b'), live.codes('b'), live.changedIn(pass)]).toEqual([1, [], ['a', 'b']]);
  });

  it('does not hide an error of the line itself', () => {
    const live = new Live('a = db(0 W)\nb = a + P_none');
    expect(live.value('b')).toBe('withheld: unknown-symbol');
    expect(live.codes('b')).toEqual(['unknown-symbol']);
  });

  it('for a line without a symbol that is used by nothing does not come up', () => {
    const live = new Live(' = db(0 W) # loose\nb = 1 dB');
    expect(live.value('b')).toBe(1);
  });

  it.each([
    ['an unreadable entry', '3 dB +', 'bad-entry'],
    ['an unknown symbol', 'Q + 1 dB', 'unknown-symbol'],
    ['a finding of the checker', '1 dBm + 2 dBm', 'levels-summed'],
    ['a value that is not finite', '1/0', 'not-finite'],
    ['no power', 'db(0 W)', 'no-power'],
    ['a unit that does not fit', '1 dBm + 3 K', 'mixed-forms'],
  ])('on %s', (_, entry, code) => {
    const live = new Live(`a = ${entry}\nb = max(a, a)`);
    expect([live.value('a'), live.value('b')]).toEqual([`withheld: ${code}`, 'waiting: a']);
  });
});

describe('empty lines', () => {
  it('have no figure and no finding', () => {
    const live = new Live('a = \nb = 1 dB');
    expect([live.value('a'), live.codes('a'), live.value('b')]).toEqual(['empty', [], 1]);
  });

  it('keep their users waiting, by name', () => {
    const live = new Live('a = \nb = a + 1 dB\nc = b + 1 dB');
    expect([live.value('b'), live.value('c')]).toEqual(['waiting: a', 'waiting: a']);
    live.entry('a', '2 dB');
    expect([live.value('b'), live.value('c')]).toEqual([3, 4]);
    live.entry('a', '   ');
    expect([live.value('a'), live.value('b')]).toEqual(['empty', 'waiting: a']);
  });

  it('with a unit do not make their users wrong', () => {
    const live = new Live('a | dBm = \nb = a - 3 dB');
    expect(live.codes('b')).toEqual(['waiting']);
  });
});

describe('a symbol claimed twice', () => {
  it('belongs to the first line; the second is withheld', () => {
    const live = new Live('x = 1 dB\nx = 2 dB\ny = x + 1 dB');
    const second = live.evaluation.lines()[1]?.id ?? '';
    expect(live.evaluation.figure(second, 'nominal')).toEqual({ state: 'withheld', code: 'duplicate-symbol' });
    expect(live.evaluation.findings(second).map(({ code }) => code)).toEqual(['duplicate-symbol']);
    expect([live.value('x'), live.value('y')]).toEqual([1, 2]);
  });

  it('passes to the second when the first goes', () => {
    const live = new Live('x = 1 dB\nx = 2 dB\ny = x + 1 dB');
    live.remove('x');
    expect([live.value('x'), live.value('y'), live.codes('x')]).toEqual([2, 3, []]);
  });

  it('passes to the first when it comes', () => {
    const live = new Live('x = 2 dB\ny = x + 1 dB');
    live.insert('x = 7 dB');
    expect(live.value('y')).toBe(8);
  });

  it('goes with the order of the worksheet', () => {
    const live = new Live('x = 1 dB\nx = 2 dB\ny = x + 1 dB');
    live.edit({ kind: 'move-line', lineId: 'l1', sectionId: 's', index: 0 });
    expect(live.value('y')).toBe(3);
  });

  it.each(['pi', 'c_0', 'k_B', 'T_0'])('%s is a constant’s, which expressions go on using', (name) => {
    const live = new Live(`${name} = 3\ny = ${name}/${name}`);
    expect(live.evaluation.figure('l0', 'nominal')).toEqual({ state: 'withheld', code: 'duplicate-symbol' });
    expect(live.value('y')).toBe(1);
  });

  it('lines without a symbol do not clash', () => {
    const live = new Live(' = 1 dB # one\n = 2 dB # two');
    expect([live.value('one'), live.value('two')]).toEqual([1, 2]);
  });
});

describe('symbols', () => {
  it('appear when a line takes them, and leave their users without', () => {
    const live = new Live('a = 1 dB\nb = Q + 1 dB');
    expect(live.value('b')).toBe('withheld: unknown-symbol');
    live.edit({ kind: 'set-line', lineId: 'l0', field: 'symbol', value: 'Q' });
    expect(live.value('b')).toBe(2);
    live.edit({ kind: 'set-line', lineId: 'l0', field: 'symbol', value: 'R' });
    expect(live.value('b')).toBe('withheld: unknown-symbol');
  });

  it('are told apart by case', () => {
    const live = new Live('p = 1 dB\nP = 2 dB\nx = p + 2*P');
    expect(live.value('x')).toBe(5);
  });

  it('may be Greek, with digits and underscores', () => {
    const live = new Live('λ_0 = 0.3 m\nη = 60 %\nG₀ = 1\nΩ_1 = λ_0*η');
    expect(Number(live.value('Ω_1')).toFixed(3)).toBe('0.180');
  });
});

describe('the evaluation', () => {
  it('counts its edits and tells subscribers, until they leave', () => {
    const live = new Live('a = 1 dB');
    const heard: number[] = [];
    const leave = live.evaluation.subscribe(({ computed }) => heard.push(computed));
    live.entry('a', '2 dB');
    leave();
    live.entry('a', '3 dB');
    expect([live.evaluation.version, heard]).toEqual([2, [1]]);
  });

  it('tells what a line rests on and who uses it', () => {
    const live = new Live('a = 1 dB\nb = a + 1 dB\nc = a + b\nd = c');
    const { evaluation } = live;
    const symbols = (ids: Iterable<string>): string[] => [...ids].map((id) => evaluation.line(id)?.symbol ?? '').sort();
    const id = (symbol: string): string => live.line(symbol).id;
    expect(symbols(evaluation.restsOn(id('c')))).toEqual(['a', 'b']);
    expect(symbols(evaluation.usedBy(id('a')))).toEqual(['b', 'c']);
    expect(symbols(evaluation.upstream(id('d')))).toEqual(['a', 'b', 'c']);
    expect(symbols(evaluation.downstream(id('a')))).toEqual(['b', 'c', 'd']);
    expect(evaluation.lineOf('c')?.id).toBe(id('c'));
    expect(evaluation.lineOf('none')).toBeUndefined();
  });

  it('previews an entry without taking it', () => {
    const live = new Live('a = 1 dBm\nb = 2 dBm\nc = a - 1 dB');
    const preview = live.evaluation.preview(live.line('c').id, 'nominal', 'a + b');
    expect(preview.reading.figure).toEqual({ state: 'withheld', code: 'levels-summed' });
    expect(preview.findings.map(({ code }) => code)).toEqual(['levels-summed']);
    const good = live.evaluation.preview(live.line('c').id, 'nominal', 'a + 3 dB');
    expect(good.reading.figure.state === 'value' && good.reading.figure.value).toBe(4);
    expect([live.value('c'), live.codes('c'), live.evaluation.version]).toEqual([0, [], 0]);
  });

  it('previews in a case by that case’s figures', () => {
    const live = new Live('a = 1 dB @ rain: 5 dB\nb = a', 'clear', 'rain');
    const valueIn = (caseId: string): unknown => {
      const { figure } = live.evaluation.preview(live.line('b').id, caseId, 'a + 1 dB').reading;
      return figure.state === 'value' && figure.value;
    };
    expect([valueIn('clear'), valueIn('rain')]).toEqual([2, 6]);
  });

  it('previews in a case also where the line itself has no difference between cases yet', () => {
    const live = new Live('a = 1 dB @ rain: 5 dB\nb = 7 dB', 'clear', 'rain');
    const valueIn = (caseId: string): unknown => {
      const { figure } = live.evaluation.preview(live.line('b').id, caseId, 'a + 1 dB').reading;
      return figure.state === 'value' && figure.value;
    };
    expect([valueIn('clear'), valueIn('rain')]).toEqual([2, 6]);
  });

  it('previews an entry for a line that is not there yet, in each case, and takes nothing', () => {
    const live = new Live('a = 1 dBm @ rain: 5 dBm\nb = 2 dBm\nc = a + missing', 'clear', 'rain');
    const { evaluation } = live;
    const figureIn = (caseId: string, entry: string): unknown => {
      const { figure } = evaluation.previewNew(caseId, entry).reading;
      return figure.state === 'value' ? figure.value : figure;
    };
    expect([figureIn('clear', 'a + 1 dB'), figureIn('rain', 'a + 1 dB')]).toEqual([2, 6]);
    expect(figureIn('clear', 'c + 1 dB')).toEqual({ state: 'waiting', roots: ['c'] });
    const summed = evaluation.previewNew('rain', 'a + b');
    expect(summed.reading.figure).toEqual({ state: 'withheld', code: 'levels-summed' });
    expect(summed.findings.map(({ code, repairs }) => [code, repairs[0]?.kind])).toEqual([['levels-summed', 'entry']]);
    expect([evaluation.version, evaluation.lines().length, live.value('b')]).toEqual([0, 3, 2]);
  });

  it('knows nothing of lines that are not there', () => {
    const { evaluation } = new Live('a = 1 dB');
    expect(evaluation.reading('none', 'nominal')).toEqual({ figure: { state: 'empty' } });
    expect(evaluation.findings('none')).toEqual([]);
    expect(evaluation.preview('none', 'nominal', '1 dB')).toEqual({
      reading: { figure: { state: 'empty' } },
      findings: [],
    });
  });

  it('lists all findings in the order of the worksheet', () => {
    const live = new Live('a = 1 dBm + 2 dBm\nb = 3\nc = a + 1 dB\nd = 1/0');
    expect(live.evaluation.sheetFindings().map(({ code, lineId }) => [code, lineId])).toEqual([
      ['levels-summed', 'l0'],
      ['waiting', 'l2'],
      ['not-finite', 'l3'],
    ]);
  });
});
