/** What a worksheet must hold beyond the shape of its parts: ids that name one thing each. */
import { isChainSection, isLinesSection, type Worksheet } from '../worksheet';
import type { FileFault } from './file-fault';
import { REFUSED_KEYS } from './json-text';

/** The first fault of a worksheet whose shape is right, or undefined. */
export function checkDocument(worksheet: Worksheet): FileFault | undefined {
  return checkCases(worksheet) ?? checkSections(worksheet) ?? checkLines(worksheet) ?? checkStages(worksheet);
}

function checkCases({ cases }: Worksheet): FileFault | undefined {
  const refused = cases.findIndex((one) => REFUSED_KEYS.has(one.id));
  if (refused >= 0) {
    const path = `cases[${String(refused)}].id`;
    return {
      code: 'refused-key',
      path,
      sentence: `${path}: “${cases[refused]?.id ?? ''}” cannot be a case's id; take another.`,
    };
  }
  return firstRepeated(cases.map((one, i) => ({ id: one.id, path: `cases[${String(i)}].id` })));
}

function checkSections({ sections }: Worksheet): FileFault | undefined {
  return firstRepeated(sections.map((section, i) => ({ id: section.id, path: `sections[${String(i)}].id` })));
}

/** Lines of pools share their ids with all other lines. */
function checkLines({ sections }: Worksheet): FileFault | undefined {
  return firstRepeated(
    sections.flatMap((section, i) =>
      (isLinesSection(section) ? section.lines : []).map((line, j) => ({
        id: line.id,
        path: `sections[${String(i)}].lines[${String(j)}].id`,
      })),
    ),
  );
}

/** Stages have ids of their own within their chain. */
function checkStages({ sections }: Worksheet): FileFault | undefined {
  for (const [i, section] of sections.entries()) {
    if (!isChainSection(section)) continue;
    const fault = firstRepeated(
      section.stages.map(({ id }, j) => ({ id, path: `sections[${String(i)}].stages[${String(j)}].id` })),
    );
    if (fault !== undefined) return fault;
  }
  return undefined;
}

function firstRepeated(ids: readonly { readonly id: string; readonly path: string }[]): FileFault | undefined {
  const met = new Map<string, string>();
  for (const { id, path } of ids) {
    const earlier = met.get(id);
    if (earlier !== undefined)
      return {
        code: 'id-given-twice',
        path,
        sentence: `${path}: the id “${id}” is given to ${earlier} too; give one of the two another.`,
      };
    met.set(id, path);
  }
  return undefined;
}
