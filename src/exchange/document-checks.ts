/** What a worksheet must hold beyond the shape of its parts: ids that name one thing each. */
import { isLinesSection, type Worksheet } from '../worksheet';
import type { FileFault } from './file-fault';
import { REFUSED_KEYS } from './json-text';

/** The first fault of a worksheet whose shape is right, or undefined. */
export function checkDocument(worksheet: Worksheet): FileFault | undefined {
  return checkCases(worksheet) ?? checkSections(worksheet) ?? checkLines(worksheet);
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
    sections.flatMap((section, i) => {
      const lines = isLinesSection(section) ? section.lines : section.kind === 'pool' ? section.content['lines'] : [];
      return (lines as readonly { readonly id: string }[]).map((line, j) => ({
        id: line.id,
        path: `sections[${String(i)}].lines[${String(j)}].id`,
      }));
    }),
  );
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
