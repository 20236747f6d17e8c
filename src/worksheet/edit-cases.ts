/**
 * Edits of cases.
 * Holds: a case's id is made from its first name, so that files and commands read well, and never is an id that some line
 * still holds an entry for; removing a case takes its entries with it, and undoing brings them back.
 */
import { assert } from '../base';
import type { Change } from './changes';
import type { Stage } from './chain';
import { isChainSection, type Line, type Worksheet } from './document';
import { changesBetween, type Edit, type Focus } from './edit';
import { chainChanges } from './edit-symbols';
import { STAGE_KEYS, withKey } from './keys';
import { withCurrentAcceptances, withOverride } from './edit-fields';
import { allLines, caseOf, overrideIn } from './lookup';

const onCase = (caseId: string): Focus => ({ kind: 'case', caseId });

/** Adds a case at the end. With `copyFrom`, every entry that stands for that case alone stands for the new one too. */
export function addCase(worksheet: Worksheet, name: string, copyFrom?: string): Edit {
  const id = freeCaseId(worksheet, name);
  const source = copyFrom === undefined ? undefined : caseOf(worksheet, copyFrom).id;
  const copied = allLines(worksheet).flatMap((line) => {
    const entry = source === undefined ? undefined : overrideIn(line, source);
    return entry === undefined ? [] : changesBetween(line, withOverride(worksheet, line, id, entry));
  });
  const ofStages = stageChanges(worksheet, (byCase) => {
    const values = source === undefined ? undefined : ownValue(byCase, source);
    return values === undefined ? byCase : { ...byCase, [id]: values };
  });
  const last = worksheet.cases[worksheet.cases.length - 1];
  return {
    label: `Add case ${name}`,
    changes: [{ kind: 'insert-case', index: worksheet.cases.length, case: { id, name } }, ...copied, ...ofStages],
    focus: onCase(id),
    ...(last && { focusBefore: onCase(last.id) }),
  };
}

/** Gives a case another name; its id stays. */
export function renameCase(worksheet: Worksheet, caseId: string, name: string): Edit {
  const one = caseOf(worksheet, caseId);
  return {
    label: `Rename case ${one.name}`,
    changes: one.name === name ? [] : [{ kind: 'rename-case', caseId, name }],
    focus: onCase(caseId),
    focusBefore: onCase(caseId),
  };
}

/** Removes a case with its entries and recorded values. Throws for the only case: a worksheet keeps at least one. */
export function removeCase(worksheet: Worksheet, caseId: string): Edit {
  const one = caseOf(worksheet, caseId);
  assert(worksheet.cases.length > 1, 'a worksheet keeps at least one case');
  const without = (line: Line): Line => withCurrentAcceptances(withOverride(worksheet, line, caseId, undefined));
  const index = worksheet.cases.indexOf(one);
  const next = worksheet.cases[index + 1] ?? worksheet.cases[index - 1];
  return {
    label: `Remove case ${one.name}`,
    changes: [
      ...allLines(worksheet).flatMap((line) =>
        overrideIn(line, caseId) === undefined ? [] : changesBetween(line, without(line)),
      ),
      ...stageChanges(worksheet, (byCase) =>
        ownValue(byCase, caseId) === undefined
          ? byCase
          : Object.fromEntries(Object.entries(byCase).filter(([key]) => key !== caseId)),
      ),
      ...withoutRecorded(worksheet, caseId),
      { kind: 'remove-case', caseId },
    ],
    ...(next && { focus: onCase(next.id) }),
    focusBefore: onCase(caseId),
  };
}

type ByCase = NonNullable<Stage['byCase']>;

const ownValue = (byCase: ByCase, caseId: string): ByCase[string] | undefined =>
  Object.hasOwn(byCase, caseId) ? byCase[caseId] : undefined;

/** The changes that give every stage the entries of single cases that `map` makes of those it has. */
function stageChanges(worksheet: Worksheet, map: (byCase: ByCase) => ByCase): Change[] {
  return worksheet.sections.filter(isChainSection).flatMap((chain) => {
    const stages = chain.stages.map((stage) => {
      if (stage.byCase === undefined) return stage;
      const mapped = map(stage.byCase);
      if (mapped === stage.byCase) return stage;
      return withKey(stage, 'byCase', Object.keys(mapped).length === 0 ? undefined : mapped, STAGE_KEYS);
    });
    return chainChanges(chain, stages.some((stage, i) => stage !== chain.stages[i]) ? { ...chain, stages } : chain);
  });
}

function withoutRecorded(worksheet: Worksheet, caseId: string): Change[] {
  const { recorded } = worksheet;
  if (recorded === undefined) return [];
  if (!Object.values(recorded).some((values) => Object.hasOwn(values, caseId))) return [];
  const value = Object.fromEntries(
    Object.entries(recorded).map(([symbol, values]) => [
      symbol,
      Object.fromEntries(Object.entries(values).filter(([id]) => id !== caseId)),
    ]),
  );
  return [{ kind: 'set-worksheet', field: 'recorded', value }];
}

/** Moves a case one place to the left or right; an edit without changes at the edge. */
export function moveCase(worksheet: Worksheet, caseId: string, direction: 'left' | 'right'): Edit {
  const one = caseOf(worksheet, caseId);
  const index = worksheet.cases.indexOf(one) + (direction === 'left' ? -1 : 1);
  const isPossible = index >= 0 && index < worksheet.cases.length;
  return {
    label: `Move case ${one.name}`,
    changes: isPossible ? [{ kind: 'move-case', caseId, index }] : [],
    focus: onCase(caseId),
    focusBefore: onCase(caseId),
  };
}

/** An id of small letters, digits and hyphens made from the name, that no case has and no line knows. */
function freeCaseId(worksheet: Worksheet, name: string): string {
  const used = new Set(worksheet.cases.map((one) => one.id));
  for (const { byCase = {} } of [
    ...allLines(worksheet),
    ...worksheet.sections.filter(isChainSection).flatMap(({ stages }) => stages),
  ])
    for (const id of Object.keys(byCase)) used.add(id);
  const plain = name.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase();
  const words = plain.match(/[a-z0-9]+/g) ?? [];
  const stem = (/^[a-z]/.test(words[0] ?? '') ? words : ['case', ...words]).join('-');
  // A name such as “Constructor” would make an id that every object already has.
  for (const word of Object.getOwnPropertyNames(Object.prototype)) used.add(word);
  used.add('prototype');
  if (!used.has(stem)) return stem;
  let number = 2;
  while (used.has(`${stem}-${String(number)}`)) number++;
  return `${stem}-${String(number)}`;
}
