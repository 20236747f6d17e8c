/** Generators of worksheets and of sequences of edits for the property tests. Worksheets come out with their keys in order. */
import fc from 'fast-check';

import { QUANTITY_KINDS, SIDES } from '../../src/quantity';
import * as w from '../../src/worksheet';
import type { Edit, Line, Requirement, Section, Worksheet } from '../../src/worksheet';

const SYMBOLS = ['P_tx', 'G_tx', 'L_feed', 'N_0', 'B', 'λ', 'SINR', 'P_1', 'T'];
const ENTRIES = [
  '14 dBm',
  '-174 dBm/Hz',
  'P_tx + G_tx - L_feed',
  'N_0 + db(B)',
  'powersum(P_tx, P_1)',
  '',
  '2,5 dB',
  'λ*2',
];

const text = fc.oneof(fc.constantFrom(...ENTRIES), fc.string({ maxLength: 12, unit: 'grapheme' }));
const key = fc.stringMatching(/^x[A-Za-z]{1,6}$/);
/** Data of keys that no version of the format knows. */
const unknown = fc.dictionary(key, fc.oneof(fc.integer(), text, fc.boolean(), fc.array(text, { maxLength: 3 })), {
  maxKeys: 2,
  noNullPrototype: true,
});

const maybe = <T>(arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T | undefined> => fc.option(arbitrary, { nil: undefined });

function withoutUndefined<T extends object>(object: T): T {
  return Object.fromEntries(Object.entries(object).filter(([, value]) => value !== undefined)) as T;
}

const tolerance = fc
  .record({
    favourable: maybe(text),
    adverse: maybe(text),
    shape: maybe(fc.constantFrom('uniform' as const, 'normal' as const)),
    group: maybe(text),
  })
  .map((fields) => withoutUndefined(fields) as w.Tolerance);

const requirement: fc.Arbitrary<Requirement> = fc.oneof(
  text.map((atLeast) => ({ atLeast })),
  text.map((atMost) => ({ atMost })),
);

const line = (id: string, caseIds: readonly string[]): fc.Arbitrary<Line> =>
  fc
    .record({
      symbol: fc.constantFrom(...SYMBOLS, ''),
      label: text,
      entry: text,
      unit: maybe(text),
      quantity: maybe(fc.constantFrom(...QUANTITY_KINDS)),
      side: maybe(fc.constantFrom(...SIDES)),
      byCase: maybe(
        fc.dictionary(fc.constantFrom(...caseIds, 'elsewhere'), text, { minKeys: 1, noNullPrototype: true }),
      ),
      digits: maybe(fc.integer({ min: 0, max: 15 })),
      tolerance: maybe(tolerance),
      requirement: maybe(requirement),
      source: maybe(text),
      note: maybe(text),
      accepted: maybe(fc.array(fc.record({ code: text, entry: text, reason: text }), { minLength: 1, maxLength: 3 })),
      signOff: maybe(fc.array(fc.record({ by: text, on: text, basis: text }), { minLength: 1, maxLength: 2 })),
      more: unknown,
    })
    .map(({ more, ...fields }) => withoutUndefined({ id, ...fields, ...more }) as Line);

const values = fc.dictionary(fc.constantFrom(...w.STAGE_FIELDS), text, { maxKeys: 4, noNullPrototype: true });

const stage = (id: string, caseIds: readonly string[]): fc.Arbitrary<w.Stage> =>
  fc
    .record({
      symbol: fc.constantFrom('lna', 'mix', 'pad', ''),
      label: text,
      off: maybe(fc.boolean()),
      values,
      byCase: maybe(
        fc.dictionary(fc.constantFrom(...caseIds, 'elsewhere'), values, { minKeys: 1, noNullPrototype: true }),
      ),
      tolerance: maybe(
        fc.dictionary(fc.constantFrom(...w.STAGE_FIELDS), tolerance, { minKeys: 1, noNullPrototype: true }),
      ),
      source: maybe(text),
      note: maybe(text),
      accepted: maybe(
        fc.dictionary(
          fc.constantFrom(...w.STAGE_FIELDS),
          fc.array(fc.record({ code: text, entry: text, reason: text }), { minLength: 1, maxLength: 2 }),
          { minKeys: 1, noNullPrototype: true },
        ),
      ),
      more: unknown,
    })
    .map(({ symbol, label, off, values: own, more, ...rest }) =>
      w.inOrder(withoutUndefined({ id, symbol, label, off, ...own, ...rest, ...more }) as w.Stage, w.STAGE_KEYS),
    );

const chain = (index: number, caseIds: readonly string[]): fc.Arbitrary<Section> =>
  fc
    .record({
      title: text,
      signal: maybe(text),
      noise: maybe(text),
      bandwidth: maybe(text),
      interferer: maybe(text),
      intercept: maybe(fc.constantFrom(...w.INTERCEPT_ADDITIONS)),
      stages: fc.tuple(...['a', 'b', 'c'].map((id) => stage(id, caseIds))),
      more: unknown,
    })
    .map(({ title, more, ...rest }) =>
      withoutUndefined({
        id: `s${String(index)}`,
        kind: 'chain',
        symbol: `rx${String(index)}`,
        title,
        ...rest,
        ...more,
      } as Section),
    );

const pool = (index: number, caseIds: readonly string[]): fc.Arbitrary<Section> =>
  fc
    .record({
      title: text,
      unit: maybe(text),
      requirement: maybe(requirement),
      lines: fc.tuple(...[0, 1].map((i) => line(`l${String(index)}-${String(i)}`, caseIds))),
      more: unknown,
    })
    .map(({ title, more, ...rest }) =>
      withoutUndefined({
        id: `s${String(index)}`,
        kind: 'pool',
        symbol: `N_${String(index)}`,
        title,
        ...rest,
        ...more,
      } as Section),
    );

const curve = (index: number): fc.Arbitrary<Section> =>
  fc
    .record({
      title: text,
      interpolation: maybe(fc.constantFrom(...w.INTERPOLATIONS)),
      logarithmic: maybe(fc.boolean()),
      points: fc.array(fc.tuple(fc.integer(), fc.integer()), { maxLength: 3 }),
      more: unknown,
    })
    .map(({ title, points, more, ...rest }) => {
      const axis = { label: 'x', unit: 'deg' };
      const symbol = `C_${String(index)}`;
      return withoutUndefined({
        id: `s${String(index)}`,
        kind: 'curve',
        symbol,
        title,
        x: axis,
        y: axis,
        ...rest,
        points,
        ...more,
      } as Section);
    });

const section = (index: number, caseIds: readonly string[]): fc.Arbitrary<Section> =>
  fc.oneof(
    {
      weight: 5,
      arbitrary: fc.integer({ min: 0, max: 5 }).chain((count) =>
        fc
          .record({
            title: text,
            lines: fc.tuple(
              ...Array.from({ length: count }, (_, i) => line(`l${String(index)}-${String(i)}`, caseIds)),
            ),
            more: unknown,
          })
          .map(({ title, lines, more }) => ({
            id: `s${String(index)}`,
            kind: 'lines' as const,
            title,
            lines,
            ...more,
          })),
      ),
    },
    {
      weight: 1,
      arbitrary: fc
        .record({
          title: text,
          anything: fc.array(fc.tuple(fc.integer(), fc.integer()), { maxLength: 3 }),
          more: unknown,
        })
        .map(({ title, anything, more }) => {
          const id = `s${String(index)}`;
          const content = { symbol: `C_${String(index)}`, title, kind: 'waterfall', id, anything, ...more };
          return { id, kind: 'waterfall', title, content };
        }),
    },
    { weight: 1, arbitrary: chain(index, caseIds) },
    { weight: 1, arbitrary: pool(index, caseIds) },
    { weight: 1, arbitrary: curve(index) },
  );

/** Options of tests that try many documents: time for a machine with other work to do. */
export const MANY = { timeout: 60_000 };

/** A worksheet with one to three cases and up to four sections, some of a kind that is kept word for word. */
export const worksheets: fc.Arbitrary<Worksheet> = fc
  .record({ caseCount: fc.integer({ min: 1, max: 3 }), sectionCount: fc.integer({ min: 0, max: 4 }) })
  .chain(({ caseCount, sectionCount }) => {
    const caseIds = Array.from({ length: caseCount }, (_, i) => `case-${String(i)}`);
    return fc
      .record({
        id: fc.uuid(),
        title: text,
        summary: maybe(text),
        cases: fc.tuple(
          ...caseIds.map((id) =>
            fc.record({ name: text, more: unknown }).map(({ name, more }) => ({ id, name, ...more })),
          ),
        ),
        sections: fc.tuple(...Array.from({ length: sectionCount }, (_, i) => section(i, caseIds))),
        recorded: maybe(
          fc.dictionary(
            fc.constantFrom(...SYMBOLS),
            fc.dictionary(fc.constantFrom(...caseIds), text, { noNullPrototype: true }),
            { noNullPrototype: true },
          ),
        ),
        more: unknown,
      })
      .map(({ more, ...fields }) => withoutUndefined({ ...fields, ...more }) as Worksheet);
  });

/** What is drawn for one edit: which edit, and numbers and texts to choose its arguments with. */
export interface EditDraw {
  readonly which: number;
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly text: string;
}

export const editDraws: fc.Arbitrary<EditDraw> = fc.record({
  which: fc.nat(1000),
  a: fc.nat(1000),
  b: fc.nat(1000),
  c: fc.nat(1000),
  text: fc.oneof(fc.constantFrom(...SYMBOLS, ...ENTRIES), text),
});

/** The edit that a draw stands for in this worksheet; undefined where the worksheet has nothing to do it with. */
export function editOf(worksheet: Worksheet, draw: EditDraw): Edit | undefined {
  const { which, a, b, c, text: typed } = draw;
  const pick = <T>(list: readonly T[], n: number): T | undefined => list[n % Math.max(list.length, 1)];
  const lines = w.allLines(worksheet);
  const homes = worksheet.sections.filter(w.isLinesSection);
  const lineId = pick(lines, a)?.id;
  const some = [...new Set([lineId, pick(lines, b)?.id, pick(lines, c)?.id])].filter((id) => id !== undefined);
  const home = pick(homes, b);
  const place = home && { sectionId: home.id, index: c % (home.lines.length + 1) };
  const caseId = pick(worksheet.cases, b)?.id ?? '';
  const anySection = pick(worksheet.sections, a)?.id;
  const direction = c % 2 === 0 ? 'up' : 'down';

  const always: (() => Edit | undefined)[] = [
    () => w.setTitle(worksheet, typed),
    () => w.setSummary(worksheet, typed),
    () => w.addCase(worksheet, typed, c % 2 === 0 ? caseId : undefined),
    () => w.renameCase(worksheet, caseId, typed),
    () => w.moveCase(worksheet, caseId, c % 2 === 0 ? 'left' : 'right'),
    () => (worksheet.cases.length > 1 ? w.removeCase(worksheet, caseId) : undefined),
    () => w.insertSection(worksheet, a % (worksheet.sections.length + 1), typed),
    () => (place === undefined ? undefined : w.insertLine(worksheet, place, { entry: typed, label: 'new' })),
    () => (anySection === undefined ? undefined : w.deleteSection(worksheet, anySection)),
    () => (anySection === undefined ? undefined : w.moveSection(worksheet, anySection, direction)),
    () =>
      anySection === undefined
        ? undefined
        : w.moveSectionTo(worksheet, anySection, c % (worksheet.sections.length + 1)),
    () => (home === undefined ? undefined : w.renameSection(worksheet, home.id, typed)),
    () =>
      place === undefined
        ? undefined
        : w.pasteLines(worksheet, place, { cases: worksheet.cases, lines: lines.slice(0, 3) }).edit,
  ];
  const onLine: ((id: string) => Edit)[] = [
    (id) => w.setEntry(worksheet, id, typed),
    (id) => w.setEntry(worksheet, id, typed, caseId),
    (id) => w.removeOverride(worksheet, id, caseId),
    (id) => w.setSymbol(worksheet, id, typed),
    (id) => w.setLineField(worksheet, id, 'unit', typed),
    (id) => w.setLineField(worksheet, id, 'label', typed),
    (id) => w.setLineField(worksheet, id, 'note', typed),
    (id) => w.setLineField(worksheet, id, 'quantity', pick([...QUANTITY_KINDS, undefined], c)),
    (id) => w.setLineField(worksheet, id, 'requirement', pick([{ atLeast: typed }, { atMost: typed }, undefined], c)),
    (id) => w.acceptFinding(worksheet, id, { code: 'loss-added', entry: typed, reason: 'so it is' }),
    (id) => w.unacceptFinding(worksheet, id, { code: 'loss-added', entry: typed }),
    (id) => w.applyRepair(worksheet, id, { kind: 'entry', title: 'Write it so', entry: typed }, caseId),
    (id) => w.applyRepair(worksheet, id, { kind: 'quantity', title: 'It is a loss', quantity: 'loss', side: 'wanted' }),
    () => w.duplicateLines(worksheet, some),
    () => w.deleteLines(worksheet, some),
    () => w.moveLines(worksheet, some, direction),
    (id) => (place === undefined ? w.setEntry(worksheet, id, typed) : w.moveLinesTo(worksheet, some, place)),
  ];
  const oneChain = pick(worksheet.sections.filter(w.isChainSection), a);
  const oneStage = oneChain && pick(oneChain.stages, b);
  if (oneChain !== undefined && oneStage !== undefined) {
    const field = pick(w.STAGE_FIELDS, c) ?? 'gain';
    const { id } = oneChain;
    always.push(
      () =>
        w.insertStage(worksheet, id, c % 4, {
          id: `new ${String(which)}${String(a)}${String(b)}`,
          symbol: 'x',
          label: typed,
        }),
      () => w.duplicateStage(worksheet, id, oneStage.id),
      () => w.deleteStage(worksheet, id, oneStage.id),
      () => w.moveStageTo(worksheet, id, oneStage.id, c % 4),
      () => w.setStageOff(worksheet, id, oneStage.id, c % 2 === 0),
      () => w.setStageValue(worksheet, id, oneStage.id, field, typed),
      () => w.setStageValue(worksheet, id, oneStage.id, field, typed, caseId),
      () => w.setStageText(worksheet, id, oneStage.id, 'source', typed),
      () => w.setStageTolerance(worksheet, id, oneStage.id, field, c % 3 === 0 ? undefined : { below: typed }),
      () => w.setStageSymbol(worksheet, id, oneStage.id, typed),
      () => w.setChainInput(worksheet, id, pick(w.CHAIN_INPUTS, c) ?? 'noise', typed),
      () => w.setInterceptAddition(worksheet, id, c % 2 === 0 ? 'power' : 'coherent'),
      () => w.setSectionSymbol(worksheet, id, typed),
    );
  }
  const oneCurve = pick(worksheet.sections.filter(w.isCurveSection), a);
  if (oneCurve !== undefined)
    always.push(
      () => w.setPoints(worksheet, oneCurve.id, [[a, b]]),
      () => w.setCurveField(worksheet, oneCurve.id, 'interpolation', c % 2 === 0 ? 'monotone' : undefined),
      () => w.setSectionSymbol(worksheet, oneCurve.id, typed),
    );
  const onePool = pick(worksheet.sections.filter(w.isPoolSection), a);
  if (onePool !== undefined)
    always.push(
      () => w.setPoolField(worksheet, onePool.id, 'unit', c % 2 === 0 ? typed : undefined),
      () => w.setPoolField(worksheet, onePool.id, 'requirement', c % 2 === 0 ? { atMost: typed } : undefined),
    );
  const n = which % (always.length + onLine.length);
  const make =
    n < always.length ? always[n] : lineId === undefined ? undefined : () => onLine[n - always.length]?.(lineId);
  return make?.();
}
