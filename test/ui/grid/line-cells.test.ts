// Verdicts on requirements over cases, assumed kinds, marks in the margin.
import { describe, expect, it } from 'vitest';

import { Evaluation, type Reading } from '../../../src/engine';
import { assumption, entryMark, markLabel, verdictOf, worstSeverity } from '../../../src/ui/grid/line-cells';
import { locateLine, type Worksheet } from '../../../src/worksheet';
import { sheet, type LineSpec } from '../../app/support';

const readings = (worksheet: Worksheet, lineId: string): Reading[] => {
  const evaluation = new Evaluation(worksheet);
  return worksheet.cases.map((one) => evaluation.reading(lineId, one.id));
};
const verdict = (...line: LineSpec) => {
  const worksheet = sheet([line]);
  return verdictOf(readings(worksheet, line[0]), worksheet.cases);
};

describe('verdicts', () => {
  it('tell the margin, and no case where cases agree', () => {
    expect(verdict('M', 'Margin', '4 dB', { requirement: { atLeast: '3 dB' } })).toEqual({
      met: true,
      text: 'met by 1.00 dB',
    });
  });

  it('are those of the worst case, by name', () => {
    const more = { requirement: { atLeast: '3 dB' }, byCase: { storm: '1.5 dB' } } as const;
    expect(verdict('M', 'Margin', '4 dB', more)).toEqual({ met: false, text: 'missed by 1.50 dB, Storm' });
  });

  it('hold for upper bounds and linear units', () => {
    expect(verdict('P', 'Power', '2 W', { requirement: { atMost: '5 W' } })).toEqual({ met: true, text: 'met by 3 W' });
  });

  it('wait for a figure', () => {
    expect(verdict('P', 'Power', 'x', { requirement: { atMost: '5 W' } })).toBeUndefined();
  });
});

describe('assumed kinds', () => {
  const assumed = (...line: LineSpec): string | undefined => {
    const [reading] = readings(sheet([line]), line[0]);
    return reading && assumption(reading, line[1]);
  };

  it('are told where the name alone says so', () => {
    expect(assumed('L_fade', 'Fade allowance', '8 dB')).toBe('assumed: a loss');
  });

  it('are not told where the label or the unit says it in so many words', () => {
    expect(assumed('L_path', 'Path loss', '8 dB')).toBeUndefined();
    expect(assumed('I', 'Interference', '-110 dBm')).toBeUndefined();
  });

  it('are not told where they were declared', () => {
    expect(assumed('L_fade', 'Fade allowance', '8 dB', { quantity: 'loss' })).toBeUndefined();
  });
});

describe('marks', () => {
  const worksheet = sheet([
    ['N', 'Noise', '-110 dBm'],
    ['I', 'Interference', '-112 dBm'],
    ['N_tot', 'Both', 'N + I'],
    ['L', 'Loss', '-3 dB'],
  ]);
  const evaluation = new Evaluation(worksheet);
  const sums = evaluation.findings('N_tot');
  const notes = evaluation.findings('L');

  it('show the worst that is open', () => {
    expect(worstSeverity([...notes, ...sums])).toBe('error');
    expect(worstSeverity(notes)).toBe('note');
    expect(worstSeverity(notes.map((one) => ({ ...one, accepted: 'yes' })))).toBeNull();
  });

  it('say how many and what pressing them does', () => {
    expect(markLabel(sums, true)).toBe('1 error: fold');
    expect(markLabel([...sums, ...notes], false)).toBe('2 findings: show');
    expect(
      markLabel(
        notes.map((one) => ({ ...one, accepted: 'yes' })),
        false,
      ),
    ).toBe('1 accepted: show');
  });

  it('underline the place in the line’s own entry, not one that only an override has', () => {
    const { line } = locateLine(worksheet, 'N_tot');
    expect(entryMark(line, sums)).toMatchObject({ severity: 'error' });
    expect(entryMark({ ...line, byCase: { calm: 'N + I', storm: 'N + I' } }, sums)).toBeUndefined();
    expect(entryMark(line, notes)).toBeUndefined();
  });
});
