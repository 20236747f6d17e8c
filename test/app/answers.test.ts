// Findings answered with a reason: where the answer is kept, and when it falls away.
import { describe, expect, it } from 'vitest';

import { answerEdit, canAnswer } from '../../src/app/answers';
import { Evaluation, type LineFinding } from '../../src/engine';
import { readWorksheetFile, writeWorksheetFile } from '../../src/exchange';
import { applyAll, setStageValue, setStageText, type Edit, type Stage, type Worksheet } from '../../src/worksheet';
import { chainSheet } from './chain-sheet';

const PAD: Stage = { id: 's1', symbol: 'pad', label: 'Pad', gain: '-3 dB', noiseFigure: '2 dB' };
const AMPLIFIER: Stage = { id: 's2', symbol: 'lna', label: 'Amplifier', gain: '20 dB', noiseFigure: '1 dB' };
const SECOND: Stage = { ...AMPLIFIER, id: 's3', symbol: 'amp', inputCompression: '-80 dBm' };
const THIRD: Stage = { ...AMPLIFIER, id: 's4', symbol: 'drv', inputCompression: '-60 dBm' };
const SHEET = chainSheet({ stages: [PAD, AMPLIFIER, SECOND, THIRD] });

const after = (worksheet: Worksheet, edit: Edit): Worksheet => applyAll(worksheet, edit.changes).worksheet;
const findingsOf = (worksheet: Worksheet, code: string): readonly LineFinding[] =>
  new Evaluation(worksheet).sheetFindings().filter((finding) => finding.code === code);
const acceptedOf = (worksheet: Worksheet, code: string): readonly (string | undefined)[] =>
  findingsOf(worksheet, code).map(({ accepted }) => accepted);

function answered(worksheet: Worksheet, finding: LineFinding | undefined, reason?: string): Worksheet {
  if (finding === undefined) throw new Error('there is a finding');
  const answer = { code: finding.code, caseId: finding.caseIds[0], ...(reason === undefined ? {} : { reason }) };
  return after(worksheet, answerEdit(worksheet, new Evaluation(worksheet), finding.lineId, answer));
}

describe.each([
  ['on a stage', 'stage-compressed', SHEET],
  ['on a stage’s own figures', 'figure-below-loss', SHEET],
  ['on the whole chain', 'source-temperature', chainSheet({ noise: '40 K', stages: [PAD, AMPLIFIER] })],
])('an answer to a finding %s', (_, code, sheet) => {
  const first = findingsOf(sheet, code)[0];
  const kept = answered(sheet, first, 'measured so');

  it('is offered, kept with its reason, and survives the file', () => {
    expect(first !== undefined && canAnswer(sheet, new Evaluation(sheet), first.lineId)).toBe(true);
    expect(acceptedOf(kept, code)[0]).toBe('measured so');
    const read = readWorksheetFile(writeWorksheetFile(kept));
    if (!read.ok) throw new Error('the file reads');
    expect(read.value.worksheet).toEqual(kept);
  });

  it('is taken back whole', () => {
    expect(answered(kept, findingsOf(kept, code)[0])).toEqual(sheet);
  });

  it('answers no other finding of its kind', () => {
    expect(acceptedOf(kept, code).slice(1)).toEqual(acceptedOf(sheet, code).slice(1));
    expect(acceptedOf(sheet, code)[0]).toBeUndefined();
  });
});

describe('an answer on a stage', () => {
  const compressed = findingsOf(SHEET, 'stage-compressed');
  const kept = answered(SHEET, compressed[0], 'a short burst only');

  it('falls away when the stage changes, not when its note does', () => {
    const noted = after(kept, setStageText(kept, 'rx', 's3', 'note', 'Checked again.'));
    expect(acceptedOf(noted, 'stage-compressed')[0]).toBe('a short burst only');
    const changed = after(kept, setStageValue(kept, 'rx', 's3', 'inputCompression', '-85 dBm'));
    expect(acceptedOf(changed, 'stage-compressed')[0]).toBeUndefined();
  });

  it('stands beside an answer on another stage', () => {
    expect(compressed).toHaveLength(2);
    const both = answered(kept, compressed[1], 'rebuilt next year');
    expect(acceptedOf(both, 'stage-compressed')).toEqual(['a short burst only', 'rebuilt next year']);
  });
});

it('no answer can be kept on a figure that the chain works out', () => {
  const evaluation = new Evaluation(SHEET);
  const figure = evaluation.lineOf('rx.nf');
  if (figure === undefined) throw new Error('the chain has a noise figure');
  expect(canAnswer(SHEET, evaluation, figure.id)).toBe(false);
  const answer = { code: 'waiting', caseId: 'calm', reason: 'later' };
  expect(answerEdit(SHEET, evaluation, figure.id, answer).changes).toEqual([]);
});
