/** Cases: lines without differences share one node; an override gives the line, and what rests on it, nodes of their own. */
import { describe, expect, it } from 'vitest';
import { Live } from './live';
import type { Change } from '../../src/worksheet';

const SHEET = `a = 1 dB
               b = a + 1 dB
               c = 5 dB
               d = b + c`;

/** How many nodes there are: all are computed when everything is. */
const nodes = (live: Live): number => live.evaluation.recomputeAll();

describe('cases', () => {
  it('share every node while nothing differs', () => {
    const live = new Live(SHEET, 'clear', 'rain', 'worst');
    expect(nodes(live)).toBe(4);
    expect(live.entry('a', '2 dB').computed).toBe(3);
    expect([live.value('d', 'clear'), live.value('d', 'rain'), live.value('d', 'worst')]).toEqual([8, 8, 8]);
  });

  it('have nodes of their own downstream of an override, and only there', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    expect(nodes(live)).toBe(4 + 3);
    expect([live.value('d', 'clear'), live.value('d', 'rain')]).toEqual([7, 16]);
  });

  it('an edit of the line’s own entry does not touch a case that overrides it', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    const pass = live.entry('a', '3 dB');
    expect(pass.computed).toBeLessThanOrEqual(4);
    expect([live.value('d', 'clear'), live.value('d', 'rain')]).toEqual([9, 16]);
  });

  it('an edit of a shared line reaches every case', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    expect(live.entry('c', '6 dB').computed).toBe(3);
    expect([live.value('d', 'clear'), live.value('d', 'rain')]).toEqual([8, 17]);
  });

  it('an edit of an override touches its case alone', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    live.overrides('a', { rain: '20 dB' });
    expect([live.value('d', 'clear'), live.value('d', 'rain')]).toEqual([7, 26]);
  });

  it('give their nodes back when the override goes', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    const pass = live.overrides('a', undefined);
    expect(nodes(live)).toBe(4);
    expect([live.value('d', 'clear'), live.value('d', 'rain')]).toEqual([7, 7]);
    expect(live.changedIn(pass)).toEqual(['a', 'b', 'd']);
  });

  it('need no shared node when all of them override', () => {
    const live = new Live('a = 1 dB @ clear: 2 dB @ rain: 3 dB\nb = a + 1 dB', 'clear', 'rain');
    expect(nodes(live)).toBe(4);
    expect([live.value('b', 'clear'), live.value('b', 'rain')]).toEqual([3, 4]);
  });

  it('may use other lines in an override', () => {
    const live = new Live('a = 1 dB\nz = 50 dB\nb = a + 1 dB @ rain: z + 1 dB', 'clear', 'rain');
    expect([live.value('b', 'clear'), live.value('b', 'rain')]).toEqual([2, 51]);
    live.entry('z', '60 dB');
    expect([live.value('b', 'clear'), live.value('b', 'rain')]).toEqual([2, 61]);
  });

  it('reach a line that begins to use one that every case overrides', () => {
    const live = new Live('x = 1 dB @ clear: 2 dB\ny = 3 dB', 'clear');
    live.entry('y', 'x + 1 dB');
    expect([live.value('y', 'clear'), live.evaluation.usedBy(live.line('x').id)]).toEqual([3, [live.line('y').id]]);
  });

  it('an override of an unknown case is kept and counts for nothing', () => {
    const live = new Live('a = 1 dB @ snow: 9 dB\nb = a', 'clear');
    expect([nodes(live), live.value('b', 'clear')]).toEqual([2, 1]);
  });

  it('an override without a unit of its own takes the line’s', () => {
    const live = new Live('a = 10 dBm @ rain: 7\nb = a + 1 dB', 'clear', 'rain');
    expect([live.figure('a', 'rain'), live.value('b', 'rain')]).toMatchObject([
      { state: 'value', value: 7, unit: { word: 'dBm' } },
      8,
    ]);
  });

  it('come and go', () => {
    const live = new Live(SHEET, 'clear', 'rain');
    live.overrides('a', { rain: '10 dB' });
    const add: Change = { kind: 'insert-case', index: 2, case: { id: 'worst', name: 'Worst' } };
    live.edit(add);
    expect([live.value('d', 'worst'), live.value('d', 'rain')]).toEqual([7, 16]);
    live.overrides('a', { rain: '10 dB', worst: '30 dB' });
    expect(live.value('d', 'worst')).toBe(36);
    live.edit(
      { kind: 'set-line', lineId: live.line('a').id, field: 'byCase', value: { worst: '30 dB' } },
      { kind: 'remove-case', caseId: 'rain' },
    );
    expect([live.value('d', 'clear'), live.value('d', 'worst')]).toEqual([7, 36]);
  });

  it('tell a finding once, with the cases that have it', () => {
    const live = new Live('P = 10 dBm\nQ = 7 dBm\nR = P - 3 dB @ rain: P + Q @ worst: P + Q', 'clear', 'rain', 'worst');
    expect(live.evaluation.findings(live.line('R').id).map(({ code, caseIds }) => [code, caseIds])).toEqual([
      ['levels-summed', ['rain', 'worst']],
    ]);
  });

  it('keep findings apart whose figures differ', () => {
    const live = new Live('P = 10 dBm @ rain: 4 dBm\nQ = 7 dBm\nR = P + Q', 'clear', 'rain');
    const found = live.evaluation.findings(live.line('R').id);
    expect(found.map(({ caseIds }) => caseIds)).toEqual([['clear'], ['rain']]);
    expect(found[0]?.message).toContain('11.76 dBm');
    expect(found[1]?.message).toContain('8.76 dBm');
  });
});

describe('accepted findings', () => {
  const accepted = (live: Live): unknown =>
    live.evaluation.findings(live.line('R').id).map(({ code, accepted: reason }) => [code, reason]);
  const accept = (live: Live, code: string, entry: string): void => {
    live.edit({
      kind: 'set-line',
      lineId: live.line('R').id,
      field: 'accepted',
      value: [{ code, entry, reason: 'referred back' }],
    });
  };

  it('carry their reason', () => {
    const live = new Live('P = 10 dBm\nL_1 = 3 dB\nR = P + L_1');
    accept(live, 'loss-added', 'P + L_1');
    expect(accepted(live)).toEqual([['loss-added', 'referred back']]);
  });

  it('are answered for that entry alone', () => {
    const live = new Live('P = 10 dBm\nL_1 = 3 dB\nR = P + L_1');
    accept(live, 'loss-added', 'P + L_1');
    live.entry('R', 'P + L_1 + 1 dB');
    expect(accepted(live)).toEqual([['loss-added', undefined]]);
  });

  it('are answered for that code alone', () => {
    const live = new Live('P = 10 dBm\nL_1 = 3 dB\nR = P + L_1');
    accept(live, 'ratios-summed', 'P + L_1');
    expect(accepted(live)).toEqual([['loss-added', undefined]]);
  });

  it('are not errors: those stay', () => {
    const live = new Live('P = 10 dBm\nQ = 3 dBm\nR = P + Q');
    accept(live, 'levels-summed', 'P + Q');
    expect(accepted(live)).toEqual([['levels-summed', undefined]]);
    expect(live.value('R')).toBe('withheld: levels-summed');
  });

  it('hold in the cases that have that entry', () => {
    const live = new Live('P = 10 dBm\nL_1 = 3 dB\nL_2 = 4 dB\nR = P + L_1 @ rain: P + L_2', 'clear', 'rain');
    accept(live, 'loss-added', 'P + L_1');
    expect(
      live.evaluation.findings(live.line('R').id).map(({ caseIds, accepted: reason }) => [caseIds, reason]),
    ).toEqual([
      [['clear'], 'referred back'],
      [['rain'], undefined],
    ]);
  });
});

describe('requirements', () => {
  const requirement = (text: string): unknown => {
    const live = new Live(text);
    return live.evaluation.reading(live.line('M').id, 'nominal').requirement;
  };

  it.each([
    ['at least, met', 'M = 5 dB require >= 3 dB', { bound: 'at least', limit: 3, met: true, margin: 2, unit: 'dB' }],
    [
      'at least, missed',
      'M = 1 dB require >= 3 dB',
      { bound: 'at least', limit: 3, met: false, margin: -2, unit: 'dB' },
    ],
    [
      'at least, met exactly',
      'M = 3 dB require >= 3 dB',
      { bound: 'at least', limit: 3, met: true, margin: 0, unit: 'dB' },
    ],
    [
      'at most, met',
      'M = -95 dBm require <= -90 dBm',
      { bound: 'at most', limit: -90, met: true, margin: 5, unit: 'dB' },
    ],
    [
      'at most, missed',
      'M = -85 dBm require <= -90 dBm',
      { bound: 'at most', limit: -90, met: false, margin: -5, unit: 'dB' },
    ],
    [
      'over another reference',
      'M = 40 dBm require >= 8 dBW',
      { bound: 'at least', limit: 38, met: true, margin: 2, unit: 'dB' },
    ],
    [
      'a linear bound on decibels',
      'M = 40 dBm require >= 1 W',
      { bound: 'at least', limit: 30, met: true, margin: 10, unit: 'dB' },
    ],
    [
      'a decibel bound on watts',
      'M = 2 W require >= 30 dBm',
      { bound: 'at least', limit: 1, met: true, margin: 1, unit: 'W' },
    ],
    [
      'a bare number has the line’s unit',
      'M = 5 MHz require >= 4',
      { bound: 'at least', limit: 4, met: true, margin: 1, unit: 'MHz' },
    ],
    [
      'in another prefix',
      'M = 5 MHz require <= 6000 kHz',
      { bound: 'at most', limit: 6, met: true, margin: 1, unit: 'MHz' },
    ],
    [
      'with a decimal comma',
      'M = 5 dB require >= 2,5 dB',
      { bound: 'at least', limit: 2.5, met: true, margin: 2.5, unit: 'dB' },
    ],
    [
      'of degrees',
      'M = 300 K require <= 30 °C',
      { bound: 'at most', limit: 303.15, met: true, margin: 3.1499999999999773, unit: 'K' },
    ],
  ])('%s', (_, text, expected) => {
    expect(requirement(text)).toEqual(expected);
  });

  it('give no margin while the figure is withheld', () => {
    expect(requirement('M = db(0 W) require >= 3 dB')).toBeUndefined();
  });

  it.each(['3 K', 'soon', '', '3 dB + 1 dB'])('that cannot be read (%s) are told, and give no margin', (bound) => {
    const live = new Live('M = 5 dB');
    live.edit({ kind: 'set-line', lineId: 'l0', field: 'requirement', value: { atLeast: bound } });
    expect(live.evaluation.reading('l0', 'nominal').requirement).toBeUndefined();
    expect(live.codes('M')).toEqual(['bad-entry']);
    expect(live.message('M')).toContain('requirement');
  });

  it('follow the figure of each case', () => {
    const live = new Live('M = 5 dB @ rain: 1 dB require >= 3 dB', 'clear', 'rain');
    const met = (caseId: string): unknown => live.evaluation.reading('l0', caseId).requirement?.met;
    expect([met('clear'), met('rain')]).toEqual([true, false]);
  });

  it('follow a change of the bound', () => {
    const live = new Live('M = 5 dB require >= 3 dB');
    live.edit({ kind: 'set-line', lineId: 'l0', field: 'requirement', value: { atLeast: '7 dB' } });
    expect(live.evaluation.reading('l0', 'nominal').requirement).toMatchObject({ met: false, margin: -2 });
  });

  it('of no power are missed by everything', () => {
    const live = new Live('M | dBm = 0 W require >= -100 dBm');
    expect(live.evaluation.reading('l0', 'nominal').requirement).toMatchObject({ met: false, margin: -Infinity });
  });
});
