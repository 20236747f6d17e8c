/**
 * The columns of a line-up: what a stage's data sheet says, and what has come about behind the stage.
 * Holds: a column that any stage uses is shown unless a person has put it away; gain and noise figure are always there to be
 * typed in.
 */
import type { Evaluation } from '../engine';
import { stageItemId } from '../engine';
import { saysAnything, type ChainSection, type StageField } from '../worksheet';

/** A column of values typed. */
export interface ValueColumn {
  readonly kind: 'value';
  readonly key: StageField;
  /** Above the column. */
  readonly title: string;
  /** In full, for menus and for reading aloud. */
  readonly name: string;
}

/** A column of figures computed. */
export interface RunningColumn {
  readonly kind: 'running';
  readonly key: RunningKey;
  readonly title: string;
  readonly name: string;
}

export type ChainColumn = ValueColumn | RunningColumn;
export type ChainColumnKey = StageField | RunningKey;

const value = (key: StageField, title: string, name: string): ValueColumn => ({ kind: 'value', key, title, name });

export const VALUE_COLUMNS: readonly ValueColumn[] = [
  value('gain', 'gain', 'gain'),
  value('noiseFigure', 'noise figure', 'noise figure'),
  value('temperature', 'temperature', 'physical temperature'),
  value('inputIntercept', 'IIP3', 'third-order intercept at the input'),
  value('outputIntercept', 'OIP3', 'third-order intercept at the output'),
  value('inputIntercept2', 'IIP2', 'second-order intercept at the input'),
  value('outputIntercept2', 'OIP2', 'second-order intercept at the output'),
  value('inputCompression', 'IP1dB', '1 dB compression at the input'),
  value('outputCompression', 'OP1dB', '1 dB compression at the output'),
  value('noiseBandwidth', 'bandwidth', 'noise bandwidth'),
  value('selectivity', 'selectivity', 'selectivity towards the interferer'),
];

/** Running columns: the heading, and what it is in words; the key names the engine's item. */
const RUNNING = {
  'out.gain': ['gain', 'gain so far'],
  'out.nf': ['noise figure', 'noise figure so far'],
  'out.te': ['noise temp.', 'noise temperature so far'],
  'out.signal': ['wanted', 'wanted level behind the stage'],
  'out.noise': ['noise', 'noise level behind the stage'],
  'out.snr': ['S/N', 'S/N behind the stage'],
  'out.iip3': ['IIP3', 'input intercept so far'],
  headroom: ['headroom', 'headroom to compression'],
  noise_share: ['share of noise', 'share of the noise'],
  distortion_share: ['share of distortion', 'share of the third-order distortion'],
} as const;

export type RunningKey = keyof typeof RUNNING;

export const RUNNING_COLUMNS: readonly RunningColumn[] = (Object.keys(RUNNING) as RunningKey[]).map((key) => ({
  kind: 'running',
  key,
  title: RUNNING[key][0],
  name: RUNNING[key][1],
}));

export const CHAIN_COLUMNS: readonly ChainColumn[] = [...VALUE_COLUMNS, ...RUNNING_COLUMNS];

/** The id of the figure in a running column. */
export const runningId = (sectionId: string, stageId: string, key: RunningKey): string =>
  stageItemId(sectionId, stageId, key);

/** What a person has chosen to show or put away, by column. */
export type ColumnChoices = ReadonlyMap<ChainColumnKey, boolean>;

const ALWAYS: readonly string[] = ['gain', 'noiseFigure'];

/** The columns to show, in their order. */
export function columnsOfChain(
  evaluation: Evaluation,
  chain: ChainSection,
  choices: ColumnChoices,
): readonly ChainColumn[] {
  const isUsed = (column: ChainColumn): boolean =>
    column.kind === 'value'
      ? ALWAYS.includes(column.key) || chain.stages.some((stage) => saysAnything(stage, column.key))
      : chain.stages.some(({ id }) => evaluation.line(runningId(chain.id, id, column.key)) !== undefined);
  return CHAIN_COLUMNS.filter((column) => choices.get(column.key) ?? isUsed(column));
}
