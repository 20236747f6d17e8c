/**
 * The clipboard in the grid: lines go out as lines (for this program) and as a table of shown figures (for others); lines
 * come in as lines, one cell into a cell, and a table through a preview.
 * Holds: each paste is one edit; nothing that comes from outside is taken without `exchange` having read it.
 */
import { LINES_MEDIA_TYPE, readCopiedLines, tableOfLines, writeCopiedLines, writeTabSeparated } from '../../exchange';
import { deleteLines, pasteLines, placeAtEnd, placeBelow, type CopiedLines, type Place } from '../../worksheet';
import { figureText } from '../parts/figure-parts';
import { counted } from '../../app/finding-counts';
import { editOf, isEditable } from './cell-texts';
import type { GridModel } from './grid-model.svelte';

/** What the row menu does with the clipboard. */
export interface ClipboardDeeds {
  readonly copy: () => void;
  readonly cut: () => void;
  readonly paste: () => Promise<void>;
}

/** The clipboard of one grid. */
export class GridClipboard implements ClipboardDeeds {
  readonly #model: GridModel;
  /** What was copied last, for a paste from the menu, where browsers give the plain text alone. */
  #last = { text: '', lines: '' };

  constructor(model: GridModel) {
    this.#model = model;
  }

  /** Copies the selected lines from the menu: the browser then asks for them as it does for Ctrl+C. */
  copy(): void {
    this.#command('copy');
  }

  /** Cuts the selected lines from the menu. */
  cut(): void {
    this.#command('cut');
  }

  #command(name: 'copy' | 'cut'): void {
    void this.#model.focusCursor().then(() => {
      // The only way to the clipboard's own formats that needs no permission and works everywhere.
      // eslint-disable-next-line @typescript-eslint/no-deprecated
      document.execCommand(name);
    });
  }

  /** Pastes from the menu; the browser may ask the person first. */
  async paste(): Promise<void> {
    const { session } = this.#model;
    try {
      const text = await navigator.clipboard.readText();
      this.#take(text === this.#last.text ? this.#last.lines : '', text);
    } catch {
      // Refused, or not offered by this browser: the key works without asking.
      session.notice = {
        text: 'The browser does not let the page read the clipboard from a menu. Press Ctrl+V instead.',
      };
    }
  }

  /** Puts the selected lines on the clipboard. */
  oncopy(event: ClipboardEvent): boolean {
    const { session } = this.#model;
    const ids = this.#model.selectedLineIds;
    if (ids.length === 0 || event.clipboardData === null) return false;
    const lines = writeCopiedLines(session.worksheet, ids);
    const rows = tableOfLines(session.worksheet, ids, (line, caseId) =>
      figureText(session.evaluation.reading(line.id, caseId).figure, line.digits).replaceAll('−', '-'),
    );
    const text = writeTabSeparated(rows);
    event.clipboardData.setData(LINES_MEDIA_TYPE, lines);
    event.clipboardData.setData('text/plain', text);
    event.preventDefault();
    this.#last = { text, lines };
    session.announce(`${counted(ids.length, 'line')} copied.`);
    return true;
  }

  /** Copies the selected lines and deletes them. */
  oncut(event: ClipboardEvent): void {
    const { session } = this.#model;
    const ids = this.#model.selectedLineIds;
    if (session.readOnlyReason === null && this.oncopy(event)) {
      session.perform(deleteLines(session.worksheet, ids, 'Cut'), { follow: true });
    }
  }

  /** Takes what is on the clipboard. */
  onpaste(event: ClipboardEvent): void {
    if (event.clipboardData === null) return;
    event.preventDefault();
    this.#take(event.clipboardData.getData(LINES_MEDIA_TYPE), event.clipboardData.getData('text/plain'));
  }

  #take(lines: string, text: string): void {
    const { session } = this.#model;
    const copied = lines === '' ? undefined : readCopiedLines(lines);
    if (copied?.ok === true) this.#insert(copied.value);
    else if (text.trim() === '') session.announce('There is no text on the clipboard.');
    else if (/[\t\n\r]/.test(text.trim())) {
      session.paste = { text, place: this.#place() };
      session.dialog = 'paste';
    } else this.#intoCell(text.trim());
  }

  #insert(copied: CopiedLines): void {
    const { session } = this.#model;
    const { edit, messages } = pasteLines(session.worksheet, this.#place(), copied);
    if (!session.perform(edit, { follow: true })) return;
    if (messages.length > 0) session.notice = { text: messages.join(' ') };
  }

  #intoCell(text: string): void {
    const { session, cursor, cursorRow: row } = this.#model;
    if (row === undefined || !isEditable(row, cursor.cell)) return;
    const edit = editOf(session.worksheet, row, cursor.cell, text);
    if (edit.ok) session.perform(edit.value, { follow: true });
    else session.notice = { text: `“${text}” was not pasted. ${edit.fault}` };
  }

  /** Below the last selected line, or at the end of the section that the cursor is in. */
  #place(): Place {
    const { session, selectedLineIds, cursorRow: row } = this.#model;
    const { worksheet } = session;
    const last = selectedLineIds[selectedLineIds.length - 1];
    if (last !== undefined) return placeBelow(worksheet, last);
    if (row?.kind === 'section') return { sectionId: row.section.id, index: 0 };
    if (row?.kind === 'add') return placeAtEnd(worksheet, row.section.id);
    const section = worksheet.sections.findLast((one) => one.kind === 'lines');
    return section === undefined ? { sectionId: '', index: 0 } : placeAtEnd(worksheet, section.id);
  }
}
