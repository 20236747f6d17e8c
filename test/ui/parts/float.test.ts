// Where things float: below, above where there is more room, never outside.
import { describe, expect, it } from 'vitest';

import { placeBeside } from '../../../src/ui/parts/float';

const box = (left: number, top: number) => ({ left, top, right: left + 100, bottom: top + 30 });
const sizes = { width: 200, height: 150, windowWidth: 1000, windowHeight: 600 };

describe('a floating place', () => {
  it('is below where there is room', () => {
    expect(placeBeside(box(300, 100), sizes)).toMatchObject({ left: 300, top: 133 });
  });

  it('is above near the foot of the window', () => {
    expect(placeBeside(box(300, 520), sizes).top).toBe(520 - 3 - 150);
  });

  it('is lined up with the right edge when asked to', () => {
    expect(placeBeside(box(300, 100), sizes, 'right').left).toBe(200);
  });

  it.each([box(900, 100), box(-50, 100), box(300, 590), box(300, 0)])('stays in the window beside %o', (anchor) => {
    for (const align of ['left', 'right'] as const) {
      const { left, top, maxHeight } = placeBeside(anchor, sizes, align);
      expect(left).toBeGreaterThanOrEqual(8);
      expect(left + sizes.width).toBeLessThanOrEqual(992);
      expect(top).toBeGreaterThanOrEqual(0);
      expect(top + Math.min(sizes.height, maxHeight)).toBeLessThanOrEqual(600);
    }
  });
});
