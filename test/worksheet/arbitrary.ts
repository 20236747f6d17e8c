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
          points: fc.array(fc.tuple(fc.integer(), fc.integer()), { maxLength: 3 }),
          more: unknown,
        })
        .map(({ title, points, more }) => {
          const id = `s${String(index)}`;
          const axis = { label: 'x', unit: 'deg' };
          const content = { symbol: `C_${String(index)}`, title, kind: 'curve', id, y: axis, x: axis, points, ...more };
          return { id, kind: 'curve', title, content };
        }),
    },
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
  const n = which % (always.length + onLine.length);
  const make =
    n < always.length ? always[n] : lineId === undefined ? undefined : () => onLine[n - always.length]?.(lineId);
  return make?.();
}
