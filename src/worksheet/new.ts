/** New worksheets: an empty one, and a copy under an id of its own. */
import { newShortId, newUuid } from '../base';
import type { Line, PlainSection, PoolSection, Worksheet } from './document';
import type { ChainSection, Stage } from './chain';
import type { CurveSection } from './curve';
import { withKey, WORKSHEET_KEYS } from './keys';

/** An empty section of lines with a fresh id. */
export function newSection(title = ''): PlainSection {
  return { id: newShortId(), kind: 'lines', title, lines: [] };
}

/** An empty pool. */
export function newPool(symbol: string, title: string, lines: readonly Line[] = []): PoolSection {
  return { id: newShortId(), kind: 'pool', symbol, title, lines };
}

/** A chain without stages. */
export function newChain(symbol: string, title: string): ChainSection {
  return { id: newShortId(), kind: 'chain', symbol, title, stages: [] };
}

/** A stage that says nothing yet. */
export function newStage(fields: Partial<Omit<Stage, 'id'>> = {}): Stage {
  return { id: newShortId(), symbol: '', label: '', ...fields };
}

/** A curve without points. */
export function newCurve(symbol: string, title: string): CurveSection {
  return {
    id: newShortId(),
    kind: 'curve',
    symbol,
    title,
    x: { label: 'x', unit: '1' },
    y: { label: 'y', unit: 'dB' },
    points: [],
  };
}

/** An empty worksheet: one case, *Nominal*, and one section without lines. */
export function newWorksheet(title = 'New worksheet'): Worksheet {
  return { id: newUuid(), title, cases: [{ id: 'nominal', name: 'Nominal' }], sections: [newSection()] };
}

/** The same worksheet as a document of its own: a new id, and `Copy of …` as title unless another is given. */
export function duplicateWorksheet(worksheet: Worksheet, title = `Copy of ${worksheet.title}`): Worksheet {
  return withKey(withKey(worksheet, 'id', newUuid(), WORKSHEET_KEYS), 'title', title, WORKSHEET_KEYS);
}
