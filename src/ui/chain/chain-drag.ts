/**
 * Moving a stage by dragging its handle with the pointer. Keys do the same (Alt and the arrows).
 * Holds: a press without a drag stays a press; Escape leaves a drag, and nothing has changed.
 */
import type { Attachment } from 'svelte/attachments';
import { on } from 'svelte/events';
import { dropPlace, moveStage } from './chain-commands';
import type { ChainModel } from './chain-model.svelte';

/** So many CSS px make a press a drag. */
const LEAST_WAY = 4;

/** Makes an element the handle of a stage. */
export function dragOf(model: ChainModel, stageId: string): Attachment<HTMLElement> {
  return (handle) => {
    let startY: number | undefined;
    let wasDragged = false;

    const end = (): void => {
      startY = undefined;
      model.dragging = null;
    };
    const move = (event: PointerEvent): void => {
      if (startY === undefined || model.readOnly) return;
      if (model.dragging === null && Math.abs(event.clientY - startY) < LEAST_WAY) return;
      wasDragged = true;
      const rows = [...(model.table?.querySelectorAll('[data-stage]') ?? [])].slice(0, model.rows.length - 1);
      const middles = rows.map((row) => {
        const { top, bottom } = row.getBoundingClientRect();
        return (top + bottom) / 2;
      });
      const to = dropPlace(middles, model.rows.indexOf(stageId), event.clientY);
      if (model.dragging?.to !== to) model.dragging = { stageId, to };
    };
    const offs = [
      on(handle, 'pointerdown', (event) => {
        if (event.button !== 0) return;
        startY = event.clientY;
        wasDragged = false;
        handle.setPointerCapture(event.pointerId);
      }),
      on(handle, 'pointermove', move),
      on(handle, 'pointerup', () => {
        const dragged = model.dragging;
        end();
        if (dragged === null) return;
        model.put({ row: stageId, cell: 'place' });
        moveStage(model, stageId, dragged.to);
        void model.focusCursor();
      }),
      on(handle, 'pointercancel', end),
      on(
        handle,
        'click',
        (event) => {
          if (!wasDragged) return;
          // The release of a drag is no press of the menu.
          wasDragged = false;
          event.stopImmediatePropagation();
        },
        { capture: true },
      ),
      on(handle, 'keydown', (event) => {
        if (event.key !== 'Escape' || model.dragging === null) return;
        event.stopPropagation();
        end();
      }),
    ];
    return () => offs.forEach((off) => off());
  };
}
