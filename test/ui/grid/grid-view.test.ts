// The view over many rows: which are placed, and that the row looked at stays where it is when rows above change.
import { describe, expect, it } from 'vitest';

import { GridView } from '../../../src/ui/grid/grid-view.svelte';
import type { Row } from '../../../src/ui/grid/rows';
import { ViewedState } from './viewed-state.svelte';

const HEIGHT = 30;

/** A scroller as high as its content lets it be. */
function scrollerOver(content: () => number, view: number): HTMLElement {
  let top = 0;
  const scroller = {
    get scrollTop() {
      return top;
    },
    set scrollTop(wanted: number) {
      top = Math.max(0, Math.min(wanted, content() - view));
    },
  };
  return scroller as unknown as HTMLElement;
}

function viewOver(count: number) {
  const state = new ViewedState();
  state.rows = rowsFrom(count);
  const view = new GridView({
    get rows() {
      return state.rows;
    },
    indexOf: (key) => state.rows.findIndex((row) => row.key === key),
    cursorKey: () => state.cursor,
    expectedHeight: () => HEIGHT,
    get setting() {
      return state.setting;
    },
  });
  view.height = 300;
  view.headerHeight = 0;
  const scroller = scrollerOver(() => 1e6, 300);
  view.attach(scroller);
  return { state, view, scroller };
}

function rowsFrom(count: number, extra: readonly string[] = []): Row[] {
  const keys = [...extra, ...Array.from({ length: count }, (_, i) => `row ${String(i)}`)];
  return keys.map((key) => ({ kind: 'new-section', key }) as const);
}

const keys = (view: GridView): string[] => view.placed.map(({ row }) => row.key);

describe('placed rows', () => {
  it('are those in view and some beyond, each below the one before', () => {
    const { view, scroller } = viewOver(1000);
    scroller.scrollTop = 3000;
    view.scrolled();
    const placed = view.placed.filter(({ row }) => row.key !== 'row 0');
    expect(placed[0]?.index).toBeLessThan(100);
    expect(placed[placed.length - 1]?.index).toBeGreaterThan(110);
    expect(placed.length).toBeLessThan(40);
    placed.forEach(({ index, top }) => expect(top).toBe(index * HEIGHT));
  });

  it('have the cursor’s row among them wherever it is, once, in order', () => {
    const { state, view, scroller } = viewOver(1000);
    state.cursor = 'row 5';
    scroller.scrollTop = 15_000;
    view.scrolled();
    expect(keys(view)[0]).toBe('row 5');
    state.cursor = 'row 505';
    scroller.scrollTop = 15_001;
    view.scrolled();
    expect(keys(view).filter((key) => key === 'row 505')).toHaveLength(1);
    state.cursor = 'row 990';
    scroller.scrollTop = 15_002;
    view.scrolled();
    expect(keys(view).at(-1)).toBe('row 990');
  });
});

describe('the row looked at', () => {
  it('stays where it is when a row above turns out higher', () => {
    const { state, view, scroller } = viewOver(1000);
    state.cursor = 'row 110';
    scroller.scrollTop = 3200;
    view.scrolled();
    const before = view.middleOf(110) - view.scrollTop;
    view.measured([
      ['row 20', 90],
      ['row 109', 42],
      ['row 112', 200],
    ]);
    expect(view.scrollTop).toBe(3200 + 60 + 12);
    expect(view.middleOf(110) - view.scrollTop).toBe(before);
  });

  it('stays where it is when it is revealed after rows have come above it', () => {
    const { state, view } = viewOver(1000);
    state.cursor = 'row 6';
    view.reveal('row 6');
    expect(view.scrollTop).toBe(0);
    const extra = ['a', 'b', 'c'];
    state.rows = rowsFrom(1000, extra);
    view.measured([['a', 50]]);
    view.reveal('row 6');
    expect(view.scrollTop).toBe(50 + 2 * HEIGHT);
  });

  it('comes into view with as little scrolling as needed, or amid its neighbours', () => {
    const { view } = viewOver(1000);
    view.reveal('row 9');
    expect(view.scrollTop).toBe(0);
    view.reveal('row 10');
    expect(view.scrollTop).toBe(38);
    view.reveal('row 4');
    expect(view.scrollTop).toBe(38);
    view.reveal('row 500', true);
    expect(view.scrollTop).toBe(500 * HEIGHT - 100);
    view.reveal('row 490');
    expect(view.scrollTop).toBe(490 * HEIGHT);
  });

  it('is reached later when the page is not high enough yet', () => {
    const { view } = viewOver(100);
    let content = 300;
    const scroller = scrollerOver(() => content, 300);
    view.attach(scroller);
    view.reveal('row 50', true);
    expect(view.scrollTop).toBe(0);
    content = 4000;
    view.holdAnchor();
    expect(view.scrollTop).toBe(50 * HEIGHT - 100);
  });
});

it('what was measured is forgotten when all rows are set otherwise', () => {
  const { state, view } = viewOver(3);
  view.measured([['row 0', 80]]);
  expect(view.contentHeight).toBe(80 + 2 * HEIGHT);
  state.setting = 'linear';
  expect(view.contentHeight).toBe(3 * HEIGHT);
});
