import fc from 'fast-check';
import { it } from 'vitest';
import { Evaluation } from '../../src/engine';
import { applyAll } from '../../src/worksheet';
import { changesOf, steps, worksheets } from './scripts';
import { snapshotOf } from './snapshot';
import { isDeepStrictEqual } from 'node:util';
const script = fc.record({ worksheet: worksheets, script: fc.array(steps, { minLength: 1, maxLength: 12 }) });
it('x', { timeout: 600000 }, () => {
  const out = fc.check(fc.property(script, ({ worksheet, script: drawn }) => {
        const evaluation = new Evaluation(worksheet);
        let current = worksheet;
        const log: unknown[] = [];
        for (const step of drawn) {
          const changes = changesOf(current, step);
          if (changes.length === 0) continue;
          const was = current;
          log.push(changes);
          current = applyAll(current, changes).worksheet;
          const pass = evaluation.edit(current, [...changes, { kind: 'set-worksheet', field: 'title', value: 'random' }]);
          const N = (x: unknown) => JSON.parse(JSON.stringify(x, (k, v) => (k === "message" ? String(v).replace(/ Is it “.*”\?/g, "").replace(/itself: .*/,"") : k === "repairs" ? [] : v === -Infinity ? "-inf" : v))); const a = N(snapshotOf(evaluation)), b = N(snapshotOf(new Evaluation(current)));
          if (!JSON.stringify(a).includes("\"loop\"") && !isDeepStrictEqual(a, b)) {
            const diff = a.lines.map((l: any, i: number) => isDeepStrictEqual(l, b.lines[i]) ? null : { got: l, want: b.lines[i] }).filter(Boolean);
            throw new Error(JSON.stringify({ start: worksheet.sections.flatMap(s => (s as any).lines), cases: was.cases.map(c => c.id), was: was.sections.flatMap(s => (s as any).lines), log, diff }, null, 1));
          }
        }
  }), { numRuns: Number(process.env.RUNS ?? 300), ...(process.env.SEED ? { seed: Number(process.env.SEED) } : {}) });
  console.log(out.failed, out.seed, (out.errorInstance as Error)?.message);
});
