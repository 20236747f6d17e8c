import { cleanup, fireEvent, screen, within } from '@testing-library/svelte';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

import type { Session } from '../../../src/app/session.svelte';
import type { CurvePoint, CurveSection } from '../../../src/worksheet';
import { plain, settle, stage } from './stage';

afterEach(cleanup);

const CURVE: CurveSection = {
  ...{ id: 'curve', kind: 'curve', symbol: 'G_scan', title: 'Pattern' },
  x: { label: 'Angle', unit: 'deg' },
  y: { label: 'Gain', unit: 'dBi', quantity: 'gain' },
  points: [
    [-10, 3],
    [0, 12],
    [10, 3.5],
  ],
};

let session: Session;

const curveNow = (): CurveSection => session.worksheet.sections[0] as CurveSection;
const points = (): readonly CurvePoint[] => curveNow().points;
const focused = (): HTMLElement => document.activeElement as HTMLElement;
const cell = (row: number, column: number): HTMLElement => {
  const found = within(screen.getByRole('grid')).getAllByRole('row')[row + 1];
  const [x, y] = found === undefined ? [] : within(found).getAllByRole('gridcell');
  const at = column === 0 ? x : y;
  if (at === undefined) throw new Error('there is no such cell');
  return at;
};
const rows = (): string[] =>
  within(screen.getByRole('grid'))
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('gridcell').map(plain).join(' | '));

async function press(key: string, more: KeyboardEventInit = {}): Promise<void> {
  await fireEvent.keyDown(focused(), { key, ...more });
  await settle();
}

/** Types as a keyboard does: the first character opens the editor. */
async function type(text: string): Promise<void> {
  if (!(focused() instanceof HTMLInputElement)) await press(text.slice(0, 1));
  await fireEvent.input(focused(), { target: { value: text } });
  await settle();
}

async function paste(text: string): Promise<void> {
  const event = new Event('paste', { bubbles: true, cancelable: true });
  focused().dispatchEvent(Object.assign(event, { clipboardData: { getData: () => text } }));
  await settle();
}

const goTo = async (row: number, column: number): Promise<void> => {
  await fireEvent.mouseDown(cell(row, column));
  await settle();
};

beforeEach(async () => {
  session = await stage('curve', CURVE);
});

describe('the table of points', () => {
  it('has a row for each point as it is, and one to add another, with one cell in the tab order', () => {
    expect(rows()).toEqual(['−10 | 3', '0 | 12', '10 | 3.5', 'new point | ']);
    const grid = screen.getByRole('grid', { name: 'Points' });
    expect(within(grid).getAllByRole('columnheader').map(plain)).toEqual(['Angle, deg', 'Gain, dBi']);
    expect(grid.getAttribute('aria-rowcount')).toBe('5');
    expect(grid.querySelectorAll('[tabindex="0"]')).toHaveLength(1);
  });

  it('moves the focus with the arrows, page and end keys', async () => {
    await goTo(0, 0);
    expect(focused()).toBe(cell(0, 0));
    await press('ArrowDown');
    await press('ArrowRight');
    expect(focused()).toBe(cell(1, 1));
    await press('End', { ctrlKey: true });
    expect(focused()).toBe(cell(3, 0));
    await press('PageUp');
    expect(focused()).toBe(cell(0, 0));
    await press('ArrowUp');
    await press('ArrowLeft');
    expect(focused()).toBe(cell(0, 0));
  });

  it('takes a figure typed over the old one, goes down on Enter, and undoes it in one step', async () => {
    await goTo(0, 1);
    await type('4,25');
    await press('Enter');
    expect(points()[0]).toEqual([-10, 4.25]);
    expect(focused()).toBe(cell(1, 1));
    session.undo();
    await settle();
    expect(points()).toEqual(CURVE.points);
  });

  it('goes right on Tab and to the next row behind it, back with Shift', async () => {
    await goTo(0, 0);
    await type('−12');
    await press('Tab');
    expect(focused()).toBe(cell(0, 1));
    await type('2');
    await press('Tab');
    expect(focused()).toBe(cell(1, 0));
    expect(points()[0]).toEqual([-12, 2]);
    await press('F2');
    expect(focused()).toHaveProperty('value', '0');
    await press('Tab', { shiftKey: true });
    expect(focused()).toBe(cell(0, 1));
  });

  it.each([
    ['twelve', '“twelve” is no number.'],
    ['1 furlong', '“furlong” is no unit known here.'],
    ['3 GHz', 'GHz cannot be brought into dBi.'],
    ['', 'A point needs both figures. Escape brings the figure back; Delete takes the whole point away.'],
  ])('refuses %j where it stands and keeps it', async (text, sentence) => {
    await goTo(1, 1);
    await press('Enter');
    await type(text);
    await press('Enter');
    expect(screen.getByRole('alert').textContent).toBe(sentence);
    expect(focused()).toHaveProperty('value', text);
    expect(focused().getAttribute('aria-invalid')).toBe('true');
    expect(points()).toEqual(CURVE.points);
    await press('Escape');
    expect(plain(cell(1, 1))).toBe('12');
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('brings a figure with another unit into that of its axis', async () => {
    await goTo(1, 0);
    await type('1 rad');
    await press('Enter');
    expect(points()[1]?.[0]).toBeCloseTo(180 / Math.PI, 12);
  });

  it('adds a point typed into the last row, whichever figure comes first, and goes on with the next', async () => {
    await goTo(3, 0);
    expect(focused()).toBeInstanceOf(HTMLInputElement);
    await type('20');
    await press('Enter');
    expect(points()).toHaveLength(3);
    expect(focused()).toBe(cell(3, 1));
    await type('-9');
    await press('Enter');
    expect(points()[3]).toEqual([20, -9]);
    expect(focused()).toBe(cell(4, 0));
    await press('ArrowRight');
    await type('-20');
    await press('Enter');
    expect(focused()).toBe(cell(4, 0));
    await type('30');
    await press('Tab');
    expect(points()[4]).toEqual([30, -20]);
  });

  it('takes a point away with Delete', async () => {
    await goTo(1, 0);
    await press('Delete');
    expect(points()).toEqual([
      [-10, 3],
      [10, 3.5],
    ]);
    expect(focused()).toBe(cell(1, 0));
    session.undo();
    expect(points()).toEqual(CURVE.points);
  });

  it('takes a point away by the button too', async () => {
    await goTo(2, 1);
    await fireEvent.click(screen.getByRole('button', { name: 'Delete point 3' }));
    await settle();
    expect(points()).toEqual(CURVE.points.slice(0, 2));
    expect(screen.getByRole<HTMLButtonElement>('button', { name: 'Delete the point' }).disabled).toBe(true);
  });

  it('keeps what was typed when the field is left', async () => {
    await goTo(1, 1);
    await type('11');
    focused().blur();
    await settle();
    expect(points()[1]).toEqual([0, 11]);
  });
});

describe('a table pasted', () => {
  it('takes the place of all points, with its heading for the axes, in one edit', async () => {
    await goTo(0, 0);
    await paste('Frequency (MHz)\tLoss (dB)\r\n100\t1,5\r\n200\t2,5\r\n');
    expect(curveNow()).toMatchObject({
      x: { label: 'Frequency', unit: 'MHz' },
      points: [
        [100, 1.5],
        [200, 2.5],
      ],
    });
    expect(curveNow().y).toEqual({ label: 'Loss', unit: 'dB', quantity: 'gain' });
    expect(screen.queryByRole('heading', { name: 'Pasted points' })).toBeNull();
    session.undo();
    expect(curveNow()).toEqual(CURVE);
  });

  it('leaves out what the second axis was a quantity of, when that is another now', async () => {
    await goTo(0, 0);
    await paste('deg;K\n0;290\n1;300');
    expect(curveNow().y).toEqual({ label: 'Gain', unit: 'K' });
  });

  it('is added on the last row, in the units of the curve', async () => {
    await goTo(2, 0);
    await press('ArrowDown');
    await paste('20 -9\n30 -12');
    expect(points()).toEqual([...CURVE.points, [20, -9], [30, -12]]);
    await paste('rad\tdBi\n1\t0');
    expect(points()[5]?.[0]).toBeCloseTo(57.29577951308232, 12);
    expect(curveNow().x).toEqual(CURVE.x);
  });

  it('gives a curve that has just been made its labels and units', async () => {
    cleanup();
    session = await stage('curve', {
      ...CURVE,
      x: { label: 'x', unit: '' },
      y: { label: 'y', unit: 'dB' },
      points: [],
    });
    await goTo(0, 0);
    await paste('Angle (deg)\tGain (dBi)\n0\t32\n10\t31.6\n');
    expect(curveNow()).toMatchObject({
      x: { label: 'Angle', unit: 'deg' },
      y: { label: 'Gain', unit: 'dBi' },
      points: [
        [0, 32],
        [10, 31.6],
      ],
    });
  });

  it('is taken while a figure is being typed too', async () => {
    await goTo(0, 0);
    await type('7');
    await paste('0\t1\n1\t2');
    expect(points()).toEqual([
      [0, 1],
      [1, 2],
    ]);
  });

  it('is one figure for the cell when it is no more', async () => {
    await goTo(0, 1);
    await paste(' 4,5 ');
    expect(points()[0]).toEqual([-10, 4.5]);
    await paste('nonsense');
    expect(screen.getByRole('alert').textContent).toBe('“nonsense” is no number.');
    expect(focused()).toHaveProperty('value', 'nonsense');
  });

  it('is shown first where something could not be read, and then taken as chosen', async () => {
    await goTo(0, 0);
    await paste('0\t1\nbroken\t2\n10\t3');
    expect(points()).toEqual(CURVE.points);
    const preview = screen.getByRole('region', { name: 'Pasted points' });
    expect(focused()).toBe(within(preview).getByRole('heading'));
    expect(plain(preview)).toContain('2 points, columns set apart by tabs.');
    expect(plain(preview)).toContain('Row 2: “broken 2” is no pair of numbers.');
    await fireEvent.click(within(preview).getByRole('button', { name: 'Add to the points' }));
    await settle();
    expect(points()).toEqual([...CURVE.points, [0, 1], [10, 3]]);
    expect(screen.queryByRole('region', { name: 'Pasted points' })).toBeNull();
    expect(focused().getAttribute('role')).toBe('gridcell');
  });

  it('changes nothing when it is cancelled, or holds no point', async () => {
    await goTo(0, 0);
    await paste('some\nwords');
    const preview = screen.getByRole('region', { name: 'Pasted points' });
    expect(plain(preview)).toContain('No row of the text has two figures');
    expect(within(preview).queryByRole('button', { name: 'Replace all points' })).toBeNull();
    await fireEvent.click(within(preview).getByRole('button', { name: 'Cancel' }));
    await settle();
    expect(curveNow()).toEqual(CURVE);
    expect(focused()).toBe(cell(0, 0));
  });

  it('asks for the decimal sign where nothing tells it', async () => {
    await goTo(0, 0);
    await paste('1,000\t1\n2,000\t2');
    await fireEvent.change(screen.getByRole('combobox', { name: 'Decimal sign' }), { target: { value: 'point' } });
    await fireEvent.click(screen.getByRole('button', { name: 'Replace all points' }));
    expect(points()).toEqual([
      [1000, 1],
      [2000, 2],
    ]);
  });

  it('is refused with a sentence where its units do not fit those of the curve', async () => {
    await goTo(3, 0);
    await press('Escape');
    await paste('f (MHz)\tG (dBi)\n1\t2');
    expect(screen.getByRole('alert').textContent).toBe('The first column is in MHz, the curve in deg.');
    expect(points()).toEqual(CURVE.points);
  });
});

describe('the fields', () => {
  const field = (name: string): HTMLElement => screen.getByLabelText(name);
  async function fill(name: string, text: string): Promise<void> {
    await fireEvent.input(field(name), { target: { value: text } });
    await fireEvent.keyDown(field(name), { key: 'Enter' });
    await settle();
  }

  it('set what the curve is called, its axes, and how it goes between its points', async () => {
    await fill('Symbol', 'G_arc');
    await fill('Title', 'Arc');
    await fill('Label of x', 'Elevation');
    await fill('Unit of x', '');
    await fill('Unit of y', 'dB');
    await fireEvent.change(field('Between the points'), { target: { value: 'monotone' } });
    await fireEvent.click(field('x counts by its logarithm'));
    await fireEvent.change(field('y is a quantity of kind'), { target: { value: 'loss' } });
    await settle();
    expect(curveNow()).toMatchObject({
      ...{ symbol: 'G_arc', title: 'Arc', interpolation: 'monotone', logarithmic: true },
      x: { label: 'Elevation', unit: '1' },
      y: { label: 'Gain', unit: 'dB', quantity: 'loss' },
    });
    await fireEvent.change(field('y is a quantity of kind'), { target: { value: '' } });
    await fireEvent.change(field('Between the points'), { target: { value: 'linear' } });
    await fireEvent.click(field('x counts by its logarithm'));
    expect(curveNow()).not.toHaveProperty('y.quantity');
    expect(curveNow()).not.toHaveProperty('interpolation');
    expect(curveNow()).not.toHaveProperty('logarithmic');
  });

  it('refuse a unit that is not known', async () => {
    await fill('Unit of x', 'cubits');
    expect(plain(document.body)).toContain('“cubits” is no unit known here.');
    expect(curveNow()).toEqual(CURVE);
  });
});

it('shows the drawing handed in, and what is wrong with the curve', async () => {
  expect(plain(document.body)).toContain('the drawing');
  expect(screen.queryByRole('list', { name: 'Findings' })).toBeNull();
  await goTo(0, 0);
  await type('10');
  await press('Enter');
  expect(plain(screen.getByRole('list', { name: 'Findings' }))).toContain('Two points stand at 10 deg');
});

it('keeps of a long table the rows in sight alone, and the one of the cursor', async () => {
  cleanup();
  session = await stage('curve', { ...CURVE, points: Array.from({ length: 5000 }, (_, i) => [i, -i] as const) });
  const grid = screen.getByRole('grid');
  expect(within(grid).getAllByRole('row').length).toBeLessThan(60);
  await goTo(0, 0);
  await press('End', { ctrlKey: true });
  expect(focused().closest('[role="row"]')?.getAttribute('aria-rowindex')).toBe('5002');
  await press('ArrowUp');
  expect(plain(focused())).toBe('4999');
});
