import { describe, expect, it } from 'vitest';

import { Evaluation } from '../../src/engine';
import { levelDiagramOfChain, levelDiagramOfLine, type LevelDiagram } from '../../src/review';
import type { ChainSection, Section, Worksheet } from '../../src/worksheet';
import { sheetOf } from '../engine/notation';

const CHAIN: ChainSection = {
  id: 'rx',
  kind: 'chain',
  symbol: 'rx',
  title: 'Receiver',
  signal: '-80 dBm',
  noise: '290 K',
  bandwidth: '1 MHz',
  interferer: '-40 dBm',
  stages: [
    {
      ...{ id: 's1', symbol: 'lna', label: 'Low-noise amplifier', gain: '20 dB', noiseFigure: '1 dB' },
      ...{ outputIntercept: '30 dBm', inputCompression: '-5 dBm' },
    },
    { id: 's2', symbol: 'pad', label: 'Attenuator', gain: '-10 dB', off: true, outputIntercept: '50 dBm' },
    { id: 's3', symbol: '', label: 'Filter', gain: '-2 dB', selectivity: '30 dB' },
  ],
};

const sheetWith = (...sections: Section[]): Worksheet => ({
  id: 'w',
  title: 'w',
  cases: [{ id: 'only', name: 'Only' }],
  sections,
});

const ofChain = (chain: ChainSection, caseId = 'only'): LevelDiagram | undefined =>
  levelDiagramOfChain(new Evaluation(sheetWith(chain)), chain.id, caseId);

function present(diagram: LevelDiagram | undefined): LevelDiagram {
  if (diagram === undefined) throw new Error('there is no diagram');
  return diagram;
}

/** The diagram of the last line of a text, in the first case. */
function ofLast(text: string): LevelDiagram | undefined {
  const worksheet = sheetOf(text);
  const evaluation = new Evaluation(worksheet);
  return levelDiagramOfLine(evaluation, evaluation.lines().at(-1)?.id ?? '', worksheet.cases[0]?.id ?? '');
}

const written = ({ points }: LevelDiagram): string[] =>
  points.map(({ name, wanted }) => `${name} ${wanted?.value.toFixed(2) ?? '-'}`);

describe('the level diagram of a chain', () => {
  const { points, unit, title } = present(ofChain(CHAIN));
  const [input, lna, pad, filter] = points;

  it('has the input and a point behind each stage, in signal order and in dBm', () => {
    expect(title).toBe('Receiver');
    expect(unit.word).toBe('dBm');
    expect(points.map(({ name, isSymbol, label }) => [name, isSymbol, label])).toEqual([
      ['input', false, 'input of the chain'],
      ['lna', true, 'Low-noise amplifier'],
      ['pad', true, 'Attenuator'],
      ['Filter', false, ''],
    ]);
    expect(points.map(({ link }) => link)).toEqual([
      { to: 'section', sectionId: 'rx' },
      { to: 'stage', sectionId: 'rx', stageId: 's1' },
      { to: 'stage', sectionId: 'rx', stageId: 's2' },
      { to: 'stage', sectionId: 'rx', stageId: 's3' },
    ]);
  });

  it('gives the wanted level with its linear value, and each step', () => {
    expect(points.map(({ wanted }) => wanted?.value)).toEqual([-80, -60, -60, -62]);
    expect(points.map(({ wanted }) => wanted?.linear)).toEqual(['10 pW', '1 nW', '1 nW', '631 pW']);
    expect(points.map(({ stepDb }) => stepDb)).toEqual([undefined, 20, 0, -2]);
  });

  it('gives noise and S/N as the engine has them', () => {
    // k · 290 K · 1 MHz: −113.98 dBm.
    expect(input?.noise?.value).toBeCloseTo(-113.975, 3);
    expect(lna?.noise?.value).toBeCloseTo(-92.975, 3);
    expect(input?.snrDb).toBeCloseTo(33.975, 3);
    expect(lna?.snrDb).toBeCloseTo(32.975, 3);
  });

  it('gives the interferer, which selectivity takes down', () => {
    expect(points.map(({ interferer }) => interferer?.value)).toEqual([-40, -20, -20, -52]);
  });

  it('refers compression and intercept to the output of the stage in front', () => {
    expect(lna?.compression?.value).toBe(14);
    expect(lna?.intercept?.value).toBe(30);
    expect([input?.compression, filter?.compression, filter?.intercept]).toEqual([undefined, undefined, undefined]);
  });

  it('marks a bypassed stage, which passes levels on and limits nothing', () => {
    expect(points.map(({ isBypassed }) => isBypassed)).toEqual([false, false, true, false]);
    expect(pad?.intercept).toBeUndefined();
    expect(pad?.noise?.value).toBe(lna?.noise?.value);
  });

  it('leaves out what the chain does not give', () => {
    const bare = present(ofChain({ ...CHAIN, noise: '', bandwidth: '', interferer: '' }));
    expect(bare.points.map(({ noise, snrDb, interferer }) => [noise, snrDb, interferer])).toEqual(
      bare.points.map(() => [undefined, undefined, undefined]),
    );
  });

  it('is not there without stages, without any level, or for a section that is no chain', () => {
    expect(ofChain({ ...CHAIN, stages: [] })).toBeUndefined();
    expect(ofChain({ ...CHAIN, signal: '', bandwidth: '', interferer: '' })).toBeUndefined();
    expect(levelDiagramOfChain(new Evaluation(sheetWith(CHAIN)), 'other', 'only')).toBeUndefined();
  });

  it('follows the case', () => {
    const [first, ...others] = CHAIN.stages;
    if (first === undefined) throw new Error('the chain has stages');
    const worksheet: Worksheet = {
      ...sheetWith({ ...CHAIN, stages: [{ ...first, byCase: { hot: { gain: '18 dB' } } }, ...others] }),
      cases: [
        { id: 'only', name: 'Only' },
        { id: 'hot', name: 'Hot' },
      ],
    };
    const evaluation = new Evaluation(worksheet);
    expect(levelDiagramOfChain(evaluation, 'rx', 'hot')?.points[1]?.wanted?.value).toBe(-62);
    expect(levelDiagramOfChain(evaluation, 'rx', 'only')?.points[1]?.wanted?.value).toBe(-60);
  });
});

describe('the level diagram of a line', () => {
  it('cumulates the terms in the order written, the level first', () => {
    const diagram = present(
      ofLast(`P_tx = 20 dBm # Transmit power
        L_path = 100 dB # Path loss
        P_rx | dBm = 3 dBi - L_path + P_tx - 1 dB # Received`),
    );
    expect(diagram.title).toBe('Received');
    expect(written(diagram)).toEqual(['P_tx 20.00', '3 dBi 23.00', 'L_path -77.00', '1 dB -78.00']);
    expect(diagram.points.map(({ stepDb }) => stepDb)).toEqual([undefined, 3, -100, -1]);
    expect(diagram.points.map(({ label }) => label)).toEqual(['Transmit power', '', 'Path loss', '']);
    expect(diagram.points.map(({ link }) => link?.to)).toEqual(['line', undefined, 'line', undefined]);
    expect(diagram.points[0]?.wanted?.linear).toBe('100 mW');
  });

  it('writes out a level that is such a sum itself, in whatever unit', () => {
    const diagram = present(
      ofLast(`P_tx = -10 dBW
        EIRP | dBW = P_tx - 1 dB + 11 dBi
        P_in | dBm = EIRP - 130 dB
        P_out | dBm = P_in
        P_end | dBm = P_out + 2*10 dB`),
    );
    expect(diagram.unit.word).toBe('dBm');
    expect(written(diagram)).toEqual([
      'P_tx 20.00',
      '1 dB 19.00',
      '11 dBi 30.00',
      '130 dB -100.00',
      '2 × 10 dB -80.00',
    ]);
  });

  it('ends at the figure of the line', () => {
    const worksheet = sheetOf(`P = 17.3 dBm
      L = 3.21 dB
      Q | dBm = P - 2*L + 0.7 dB`);
    const evaluation = new Evaluation(worksheet);
    const line = evaluation.lineOf('Q');
    const caseId = worksheet.cases[0]?.id ?? '';
    const diagram = present(levelDiagramOfLine(evaluation, line?.id ?? '', caseId));
    const figure = evaluation.figure(line?.id ?? '', caseId);
    expect(figure.state === 'value' ? figure.value : NaN).toBeCloseTo(diagram.points.at(-1)?.wanted?.value ?? NaN, 9);
    expect(diagram.points.map(({ name }) => name)).toEqual(['P', '2 × L', '0.7 dB']);
  });

  it.each([
    ['a ratio', 'P = 1 dBm\nN = -100 dBm\nSNR | dB = P - N'],
    ['gains alone', 'G = 3 dB\nH | dB = G - 1 dB'],
    ['a typed figure', 'P = 1 dBm'],
    ['a sum of powers', 'P = 1 dBm\nQ = 2 dBm\nR | dBm = powersum(P, Q)'],
    ['a line without a figure', 'P = 1 dBm\nQ | dBm = P - missing'],
    ['a level over a density', 'P = 1 dBm\nB = 10 dBHz\nR | dBm/Hz = P - B'],
  ])('is not there for %s', (_, text) => {
    expect(ofLast(text)).toBeUndefined();
  });

  it('does not follow lines in a loop', () => {
    expect(ofLast('A | dBm = B - 1 dB\nB | dBm = A - 1 dB')).toBeUndefined();
  });

  describe('that has come through a chain', () => {
    const sheet = sheetOf(
      'P_tx = 20 dBm # Transmit power\nP_rx | dBm = P_tx - 100 dB\nP_demod | dBm = rx.signal - 3 dB',
    );
    const behindLna = sheetOf('P_rx = -80 dBm\nP_demod | dBm = rx.lna.out.signal + 1 dB');
    const through = (lines: Worksheet, signal: string): LevelDiagram => {
      const worksheet = { ...lines, sections: [...lines.sections, { ...CHAIN, signal }] };
      const evaluation = new Evaluation(worksheet);
      const lineId = evaluation.lineOf('P_demod')?.id ?? '';
      const diagram = present(levelDiagramOfLine(evaluation, lineId, worksheet.cases[0]?.id ?? ''));
      const figure = evaluation.figure(lineId, worksheet.cases[0]?.id ?? '');
      expect(figure.state === 'value' ? figure.value : NaN).toBeCloseTo(diagram.points.at(-1)?.wanted?.value ?? 0, 9);
      return diagram;
    };

    it('is followed from the transmitter through each stage', () => {
      const diagram = through(sheet, 'P_rx + 2 dBi');
      expect(written(diagram)).toEqual([
        ...['P_tx 20.00', '100 dB -80.00', '2 dBi -78.00', 'lna -58.00', 'pad -58.00', 'Filter -60.00'],
        '3 dB -63.00',
      ]);
      expect(diagram.points[3]?.link).toEqual({ to: 'stage', sectionId: 'rx', stageId: 's1' });
      expect(diagram.points.map(({ isBypassed }) => isBypassed).indexOf(true)).toBe(4);
    });

    it('begins at the chain where a typed level enters it', () => {
      const diagram = through(sheet, '-70 dBm');
      expect(written(diagram)[0]).toBe('rx.input.signal -70.00');
      expect(diagram.points[0]?.link).toEqual({ to: 'section', sectionId: 'rx' });
    });

    it('is followed up to the stage that is asked for', () => {
      expect(written(through(behindLna, 'P_rx'))).toEqual(['P_rx -80.00', 'lna -60.00', '1 dB -59.00']);
    });
  });

  it('stops writing out before it has more points than anybody reads', () => {
    const long = Array.from({ length: 90 }, (_, i) => `P${String(i + 2)}x | dBm = P${String(i + 1)}x - 0.5 dB`);
    const diagram = present(ofLast(['P1x = 50 dBm', ...long].join('\n')));
    expect(diagram.points).toHaveLength(60);
    expect(diagram.points.at(-1)?.wanted?.value).toBeCloseTo(5, 9);
    expect(new Set(diagram.points.map(({ key }) => key)).size).toBe(60);
  });
});
