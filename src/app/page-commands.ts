/** What the page's buttons and keys do beyond the grid: files, findings, starters, pasted tables. */
import type { LineFinding } from '../engine';
import { isLinesSection, pasteLines, type Line } from '../worksheet';
import { downloadText, chooseFile } from './files';
import { isOpen } from './finding-counts';
import { itemRows, rowOfItem } from './item-rows';
import type { Session } from './session.svelte';

/** Saves the worksheet as a file. */
export function saveFile(session: Session): void {
  const { name, text } = session.exportFile();
  downloadText(name, text);
  session.announce(`Saved as the file ${name}.`);
}

/** Opens a file that the person chooses. */
export async function openFile(session: Session): Promise<void> {
  const file = await chooseFile('.json,application/json');
  if (file !== null) await openGivenFile(session, file);
}

/** Opens a file that was chosen or dropped; what is wrong with it is said, and the open worksheet stays. */
export async function openGivenFile(session: Session, file: File): Promise<void> {
  const read = await session.opening.importBytes(new Uint8Array(await file.arrayBuffer()));
  if (!read.ok) session.notice = { text: `${file.name} was not opened. ${read.fault.sentence}` };
}

/** Begins a worksheet from a starter. */
export async function beginFrom(session: Session, starterId: string): Promise<void> {
  const { STARTERS } = await import('../starters');
  const starter = STARTERS.find((one) => one.id === starterId);
  if (starter === undefined) return;
  const begun = await session.opening.newWorksheet(starter.text);
  if (!begun.ok) session.notice = { text: begun.fault.sentence };
}

/** Makes lines of a pasted table that the person has looked at. */
export function takePastedTable(session: Session, lines: readonly Line[]): void {
  const { paste, worksheet } = session;
  session.paste = null;
  session.dialog = null;
  if (paste === null) return;
  const { edit, messages } = pasteLines(worksheet, paste.place, { cases: [], lines });
  if (session.perform(edit, { follow: true }) && messages.length > 0) session.notice = { text: messages.join(' ') };
}

/** Brings the cursor to the next row with an open finding below the selected line, or the one before; round the end. */
export function goToFinding(session: Session, direction: 1 | -1): void {
  const { evaluation } = session;
  const sections = session.worksheet.sections.map((section) => ({
    id: section.id,
    lines: isLinesSection(section) ? section.lines : [],
    items: itemRows(evaluation, section),
  }));
  // By the rows as they are shown: what is found on parts of a chain stands with a stage, or with the chain's first output.
  const order = new Map(
    sections
      .flatMap(({ lines, items }) => [...lines.map(({ id }) => id), ...items.map(({ line }) => line.id)])
      .map((id, at) => [id, at]),
  );
  const rowIdOf = (lineId: string): string => {
    const items = sections.find(({ id }) => id === evaluation.originOf(lineId)?.sectionId)?.items;
    return (items === undefined ? undefined : rowOfItem(items, evaluation, lineId)?.line.id) ?? lineId;
  };
  const place = (id: string | null): number => (id === null ? -1 : (order.get(id) ?? -1));
  const found = new Map<number, string>();
  for (const { lineId } of session.sheetFindings().filter(isOpen)) {
    const at = place(rowIdOf(lineId));
    if (!found.has(at)) found.set(at, lineId);
  }
  if (found.size === 0) {
    session.announce('There are no open findings.');
    return;
  }
  const places = [...found.keys()].sort((a, b) => direction * (a - b));
  const here = place(session.selectedLineId);
  const next = places.find((at) => direction * (at - here) > 0) ?? places[0];
  const target = next === undefined ? undefined : found.get(next);
  if (target !== undefined) jumpToFinding(session, target);
}

/** Brings the cursor to a line with findings and says the first of them. */
export function jumpToFinding(session: Session, lineId: string, finding?: LineFinding): void {
  session.select(lineId, finding?.caseIds[0]);
  const first = finding ?? session.findings(lineId).find(isOpen);
  if (first !== undefined) session.announce(first.message);
}
