/** Chains and pools that are not finished, or share symbols with others: what is said about them, and that no figure is another's. */
import { describe, expect, it } from 'vitest';
import { Evaluation } from '../../src/engine';
import type { Line, Section, Stage, Worksheet } from '../../src/worksheet';

const line = (id: string, symbol: string, entry: string): Line => ({ id, symbol, label: '', entry });
const lines = (...all: readonly Line[]): Section => ({ id: 'lines', kind: 'lines', title: '', lines: all });
const pool = (unit: string, ...all: readonly Line[]): Section => ({
  id: 'pool',
  kind: 'pool',
  symbol: 'N_I',
  title: 'Pool',
  unit,
  lines: all,
});
const chain = (inputs: Readonly<Record<string, string>>, ...stages: readonly Stage[]): Section => ({
  id: 'chain',
  kind: 'chain',
  symbol: 'rx',
  title: 'Receiver',
  stages,
  ...inputs,
});
const AMPLIFIER: Stage = { id: 's1', symbol: 'lna', label: 'Amplifier', gain: '10 dB', noiseFigure: '2 dB' };

function evaluate(...sections: readonly Section[]): Evaluation {
  const worksheet: Worksheet = {
    id: '6f1c2d3e-0000-4000-8000-000000000001',
    title: '',
    cases: [{ id: 'one', name: 'One' }],
    sections,
  };
  return new Evaluation(worksheet);
}

const messages = (evaluation: Evaluation): string[] =>
  evaluation.sheetFindings().map(({ code, message }) => `${code}: ${message}`);

function figureOf(evaluation: Evaluation, symbol: string): number | string {
  const figure = evaluation.figure(evaluation.lineOf(symbol)?.id ?? '', 'one');
  return figure.state === 'value' ? figure.value : figure.state;
}

describe('the total of a pool', () => {
  it('never counts a line elsewhere in place of one of its own with the same symbol', () => {
    const evaluation = evaluate(
      lines(line('l1', 'A', '-50 dBm')),
      pool('dBm', line('p1', 'A', '-100 dBm'), line('p2', 'B', '-100 dBm')),
    );
    expect(figureOf(evaluation, 'N_I')).toBe('waiting');
    const apart = evaluation.worksheet.sections.slice(1);
    evaluation.edit({ ...evaluation.worksheet, sections: apart }, []);
    expect(figureOf(evaluation, 'N_I')).toBeCloseTo(-96.9897, 4);
  });

  it('counts a line whose symbol from a file is none', () => {
    const evaluation = evaluate(pool('dB', line('p1', 'C/N', '20 dB'), line('p2', 'C/I', '20 dB')));
    expect(messages(evaluation).filter((message) => message.startsWith('unknown-symbol'))).toEqual([]);
  });

  it('names what cannot be added as systems people do', () => {
    const evaluation = evaluate(pool('dBm', line('p1', 'D', '-170 dBm/Hz'), line('p2', 'P', '-100 dBm')));
    expect(messages(evaluation)).toEqual([
      'pool-mixed: D is a power density and P is a level of power: their powers have no total. Bring them into one form, or move one to another pool.',
    ]);
  });
});

describe('a part that a chain does not give', () => {
  const said = (entry: string, ...stages: readonly Stage[]): string | undefined =>
    messages(evaluate(chain({ signal: '-100 dBm' }, ...stages), lines(line('l1', 'X', entry))))[0];

  it.each([
    ['rx.snr', 'is told a wanted level, a bandwidth and the noise figure of every stage that amplifies.'],
    ['rx.lna.out.noise', 'is told a bandwidth and the noise figure of every stage that amplifies.'],
    ['rx.iip3', 'is told a third-order intercept of a stage.'],
  ])('%s says what is missing and is not mended into another quantity', (entry, end) => {
    expect(said(entry, AMPLIFIER)).toBe(`unknown-symbol: “${entry}” is not given: rx gives it once it ${end}`);
  });

  it('is still taken for a mistyped stage', () => {
    expect(said('rx.lnb.nf', AMPLIFIER)).toBe(
      'unknown-symbol: The symbol “rx.lnb.nf” is not known here. Is it “rx.lna.nf”?',
    );
  });

  it('of a stage that is not there is not mended into one of another stage', () => {
    expect(said('rx.pre.out.gain', AMPLIFIER)).toBe('unknown-symbol: The symbol “rx.pre.out.gain” is not known here.');
  });

  it.each(['rx', 'rx.lna'])('%s by itself is sent to a part', (entry) => {
    expect(said(entry, AMPLIFIER)).toBe(
      `unknown-symbol: “${entry}” is a chain or a stage and has no figure by itself: write a part of it, such as ${entry}.gain.`,
    );
  });
});

it('finds a bandwidth below nothing', () => {
  expect(messages(evaluate(chain({ signal: '-100 dBm', bandwidth: '-1 MHz' }, AMPLIFIER)))).toEqual([
    'negative-figure: The line is a bandwidth and reads −1 MHz; it cannot be below 0 Hz.',
  ]);
});
