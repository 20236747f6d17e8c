/**
 * `npm run bench`: load, full recompute, and one edit to settled values, for each sheet, in milliseconds (medians), with ratios
 * to hand-written closures in the same process; and the page's script, built into the folder named by the first argument, in
 * gzipped bytes. Prints one JSON object and nothing else.
 */
import { compileTrials, inputsOf, runTrials } from '../../src/analysis';
import { Evaluation } from '../../src/engine';
import { applyAll, applyChange, setEntry, setStageValue, type Worksheet } from '../../src/worksheet';
import { handChain, handFanOut, handLattice, handTens, type Baseline } from './closures';
import { drawAll, handTrials } from './hand-trials';
import { scriptSize } from './script-size';
import { budget, chain, fanOut, lattice, lineUp, tens, toleranced } from './sheets';

const COUNT = 10_000;

function median(figures: readonly number[]): number {
  const sorted = [...figures].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? NaN;
}

/** Median time of one call, ms, after a warm-up. */
function time(run: (round: number) => void, rounds: number): number {
  for (let round = 0; round < Math.max(3, Math.ceil(rounds / 5)); round++) run(round);
  return median(
    Array.from({ length: rounds }, (_, round) => {
      const start = performance.now();
      run(round);
      return performance.now() - start;
    }),
  );
}

interface Case {
  readonly name: string;
  readonly sheet: Worksheet;
  readonly hand: Baseline;
  /** The line edited, by index, and its figures in turn. */
  readonly edited: number;
  readonly entries: readonly [string, string];
  readonly figures: readonly [number, number];
}

function measure({ name, sheet, hand, edited, entries, figures }: Case): Record<string, unknown> {
  const loadMs = time(() => new Evaluation(sheet), 7);
  const evaluation = new Evaluation(sheet);
  hand.full();
  const fullMs = time(() => evaluation.recomputeAll(), 60);
  const handFullMs = time(() => {
    hand.full();
  }, 60);
  const lineId = `l${String(edited)}`;
  let worksheet = sheet;
  let computed = 0;
  const editMs = time((round) => {
    const change = { kind: 'set-line', lineId, field: 'entry', value: entries[round % 2] ?? '' } as const;
    worksheet = applyChange(worksheet, change).worksheet;
    const start = performance.now();
    computed = evaluation.edit(worksheet, [change]).computed;
    settling.push(performance.now() - start);
  }, 60);
  const settleMs = median(settling.splice(0));
  const handEditMs = time((round) => {
    hand.edit(edited, figures[round % 2] ?? 0);
  }, 60);
  return {
    name,
    lines: evaluation.lines().length,
    loadMs,
    fullRecomputeMs: fullMs,
    handFullRecomputeMs: handFullMs,
    fullRatio: fullMs / handFullMs,
    editWithDocumentMs: editMs,
    editToSettledMs: settleMs,
    handEditMs,
    editRatio: settleMs / handEditMs,
    computedByEdit: computed,
  };
}

const settling: number[] = [];

const rows = 100;
const width = COUNT / rows;
const results = [
  measure({
    name: 'chain',
    sheet: chain(COUNT),
    hand: handChain(COUNT),
    edited: 0,
    entries: ['11 dBm', '12 dBm'],
    figures: [11, 12],
  }),
  measure({
    name: 'fan-out',
    sheet: fanOut(COUNT),
    hand: handFanOut(COUNT),
    edited: 0,
    entries: ['11 dBm', '12 dBm'],
    figures: [11, 12],
  }),
  measure({
    name: 'lattice',
    sheet: lattice(rows, width),
    hand: handLattice(rows, width),
    edited: 0,
    entries: ['-90 dBm', '-91 dBm'],
    figures: [-90, -91],
  }),
  measure({
    name: 'ten of 10,000',
    sheet: tens(COUNT),
    hand: handTens(COUNT),
    edited: 5000,
    entries: ['11 dBm', '12 dBm'],
    figures: [11, 12],
  }),
];

const sixty = budget();
const evaluation = new Evaluation(sixty);
let current = sixty;
const sixtyEdit = time((round) => {
  const change = {
    kind: 'set-line',
    lineId: 'l3',
    field: 'entry',
    value: round % 2 === 0 ? '15 dBm' : '16 dBm',
  } as const;
  current = applyChange(current, change).worksheet;
  evaluation.edit(current, [change]);
}, 200);
const withheld = evaluation.sheetFindings().filter(({ severity }) => severity === 'error').length;

const STAGES = 200;
const longChain = lineUp(STAGES);
const chainEvaluation = new Evaluation(longChain);
let chainSheet = longChain;
const stageEdit = time((round) => {
  const { changes } = setStageValue(chainSheet, 'rx', 's0', 'gain', round % 2 === 0 ? '6 dB' : '6.2 dB');
  chainSheet = applyAll(chainSheet, changes).worksheet;
  chainEvaluation.edit(chainSheet, changes);
}, 30);

/** An edit after which a line rests on another one: the graph has to be built anew. */
const large = chain(COUNT);
const largeEvaluation = new Evaluation(large);
let largeSheet = large;
const graphEdit = time((round) => {
  const { changes } = setEntry(largeSheet, 'l5000', round % 2 === 0 ? '10 dBm' : 'P_4999 - 2 dB');
  largeSheet = applyAll(largeSheet, changes).worksheet;
  largeEvaluation.edit(largeSheet, changes);
  largeEvaluation.sheetFindings();
}, 15);

/** A million trials on one thread, by turns with the hand-written ones, so that both meet the same machine. */
const TRIALS = 1_000_000;
const tolerant = new Evaluation(toleranced());
const marginId = tolerant.lineOf('M')?.id ?? '';
const tolerances = inputsOf(tolerant, marginId, 'nominal');
const program = compileTrials(tolerances.evaluation, marginId, 'nominal', tolerances.inputs);
let [margins, handMargins]: [Float64Array, Float64Array] = [new Float64Array(0), new Float64Array(0)];
const trialTimes: number[] = [];
const handTrialTimes: number[] = [];
const drawTimes: number[] = [];
for (let round = 0; round < 7; round++) {
  const start = performance.now();
  margins = runTrials(program, tolerances.inputs, 1, 0, TRIALS);
  const between = performance.now();
  handMargins = handTrials(1, TRIALS);
  const after = performance.now();
  drawAll(1, TRIALS, () => undefined);
  // The first round warms up.
  if (round === 0) continue;
  trialTimes.push(between - start);
  handTrialTimes.push(after - between);
  drawTimes.push(performance.now() - after);
}
const mostOff = margins.reduce((most, margin, at) => Math.max(most, Math.abs(margin - (handMargins[at] ?? NaN))), 0);
if (!(mostOff < 1e-9)) throw new Error(`the trials are not the hand-written ones: ${String(mostOff)} dB off`);

const pageFolder = process.argv[2];

process.stdout.write(
  `${JSON.stringify(
    {
      node: process.version,
      sheets: results,
      budget: {
        lines: evaluation.lines().length,
        errors: withheld,
        loadMs: time(() => new Evaluation(sixty), 60),
        fullRecomputeMs: time(() => evaluation.recomputeAll(), 200),
        editMs: sixtyEdit,
      },
      lineUp: {
        stages: STAGES,
        loadMs: time(() => new Evaluation(longChain), 7),
        fullRecomputeMs: time(() => chainEvaluation.recomputeAll(), 60),
        editMs: stageEdit,
      },
      graphEditOf10000LinesMs: graphEdit,
      trials: {
        lines: tolerant.lines().length,
        inputs: tolerances.inputs.length,
        trials: TRIALS,
        ms: median(trialTimes),
        handMs: median(handTrialTimes),
        // Of both: random numbers and shapes. The rest is the arithmetic of the budget.
        drawMs: median(drawTimes),
        ratio: median(trialTimes) / median(handTrialTimes),
      },
      ...(pageFolder === undefined ? {} : { script: scriptSize(pageFolder) }),
    },
    null,
    2,
  )}\n`,
);
