// What is said after an edit, and which findings count as open.
import { describe, expect, it } from 'vitest';

import { countFindings, counted, isOpen, passSentence } from '../../src/app/finding-counts';
import type { LineFinding } from '../../src/engine';

const finding = (fields: Partial<LineFinding>): LineFinding => ({
  code: 'levels-summed',
  severity: 'error',
  title: 'Levels are added as decibels',
  message: 'N and I are levels and are added.',
  repairs: [],
  lineId: 'n',
  caseIds: ['calm'],
  ...fields,
});

describe('open findings', () => {
  it('leaves out what was accepted and lines that only wait', () => {
    expect(isOpen(finding({}))).toBe(true);
    expect(isOpen(finding({ severity: 'note', accepted: 'referred back' }))).toBe(false);
    expect(isOpen(finding({ code: 'waiting' }))).toBe(false);
  });

  it('counts by severity', () => {
    const findings = [
      finding({}),
      finding({ severity: 'warning' }),
      finding({ severity: 'warning' }),
      finding({ severity: 'note', accepted: 'yes' }),
      finding({ code: 'waiting' }),
    ];
    expect(countFindings(findings)).toEqual({ errors: 1, warnings: 2, notes: 0 });
  });
});

describe('the sentence after an edit', () => {
  const none = { errors: 0, warnings: 0, notes: 0 };
  const cases = [
    { changed: 0, before: none, after: none, says: '' },
    { changed: 1, before: none, after: none, says: '1 line recalculated.' },
    { changed: 5, before: none, after: { ...none, warnings: 1 }, says: '5 lines recalculated, 1 new warning.' },
    { changed: 2, before: { ...none, errors: 1 }, after: none, says: '2 lines recalculated, 1 error less.' },
    { changed: 0, before: none, after: { ...none, errors: 2, notes: 1 }, says: '2 new errors, 1 new note.' },
  ];
  it.each(cases)('$says', ({ changed, before, after, says }) => {
    expect(passSentence(changed, before, after)).toBe(says);
  });

  it('uses the plural given', () => {
    expect([counted(1, 'entry', 'entries'), counted(3, 'entry', 'entries')]).toEqual(['1 entry', '3 entries']);
  });
});
