import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/svelte';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

import type { LevelPoint } from '../../../src/review';
import CurvePlot from '../../../src/ui/plots/CurvePlot.svelte';
import LevelDiagram from '../../../src/ui/plots/LevelDiagram.svelte';
import { facesOf, plotFileName, svgText } from '../../../src/ui/plots/save-plot';
import type { CurveSection } from '../../../src/worksheet';
import { chainOf, diagramOf } from './support';

/** Nothing is laid out here, so that nothing ever changes its size. */
class StillSizes {
  observe = (): void => undefined;
  unobserve = (): void => undefined;
  disconnect = (): void => undefined;
}

beforeEach(() => {
  vi.stubGlobal('ResizeObserver', StillSizes);
});

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  vi.unstubAllGlobals();
});

function showLevels(more: { showLinear?: boolean } = {}) {
  const onselect = vi.fn<(point: LevelPoint) => void>();
  const { container } = render(LevelDiagram, {
    ...{ diagram: diagramOf(chainOf(3)), showLinear: more.showLinear ?? false, onselect },
  });
  const drawing = container.querySelector<SVGSVGElement>('svg');
  if (drawing === null) throw new Error('nothing is drawn');
  return { onselect, container, drawing };
}

describe('a level diagram', () => {
  it('has a name, and says in words what it shows', () => {
    const { drawing } = showLevels();
    expect(drawing.getAttribute('aria-label')).toBe('Levels: Receiver');
    const said = document.getElementById(drawing.getAttribute('aria-describedby') ?? '');
    expect(said?.textContent).toMatch(/^4 points from input to mixer: wanted −85\.00 to −75\.50 dBm; noise /);
  });

  it('has a point for each stage, which leads to it', async () => {
    const { onselect, drawing } = showLevels();
    const points = within(drawing as unknown as HTMLElement).getAllByRole('button');
    expect(points.map((point) => point.getAttribute('aria-label')?.split(':')[0])).toEqual([
      'input, input of the chain',
      'bpf, Band filter',
      'lna, Low-noise amplifier',
      'mixer, Mixer',
    ]);
    if (points[2] !== undefined) await fireEvent.click(points[2]);
    expect(onselect.mock.calls.map(([point]) => point.link)).toEqual([{ to: 'stage', sectionId: 'rx', stageId: 's1' }]);
  });

  it('is one stop for the Tab key, and arrows go from point to point', async () => {
    const { onselect, drawing } = showLevels();
    const points = within(drawing as unknown as HTMLElement).getAllByRole('button');
    const stops = (): (string | null)[] => points.map((point) => point.getAttribute('tabindex'));
    expect(stops()).toEqual(['0', '-1', '-1', '-1']);
    points[0]?.focus();
    await fireEvent.keyDown(points[0] as Element, { key: 'ArrowRight' });
    expect(document.activeElement).toBe(points[1]);
    expect(stops()).toEqual(['-1', '0', '-1', '-1']);
    await fireEvent.keyDown(points[1] as Element, { key: 'End' });
    await fireEvent.keyDown(points[3] as Element, { key: 'ArrowRight' });
    expect(document.activeElement).toBe(points[3]);
    await fireEvent.keyDown(points[3] as Element, { key: 'Enter' });
    expect(onselect.mock.calls.map(([point]) => point.key)).toEqual(['s2']);
  });

  it('shows linear values when asked', () => {
    expect(showLevels().drawing.textContent).not.toContain('pW');
    cleanup();
    expect(showLevels({ showLinear: true }).drawing.textContent).toContain('3.162 pW');
  });

  it('is there as a table with all figures', async () => {
    const { onselect, container } = showLevels();
    await fireEvent.click(screen.getByRole('button', { name: 'as table' }));
    expect(container.querySelector('svg')).toBeNull();
    expect(screen.getAllByRole('columnheader').map((head) => head.textContent)).toEqual([
      ...['Behind', 'step, dB', 'wanted, dBm', 'noise, dBm', 'interferer, dBm'],
      ...['1 dB compression, dBm', 'third-order intercept, dBm', 'S/N, dB'],
    ]);
    const row = screen.getByRole('row', { name: /lna/ });
    expect(
      within(row)
        .getAllByRole('cell')
        .map((cell) => cell.textContent.trim()),
    ).toEqual([...['+18.00', '−68.50', '−101.76', '−28.50', '', '28.00', '33.26']]);
    await fireEvent.click(within(row).getByRole('button'));
    expect(onselect.mock.calls.map(([point]) => point.key)).toEqual(['s1']);
  });
});

describe('a saved plot', () => {
  it('stands on its own: no class, no style, no part of the page', () => {
    const { drawing } = showLevels();
    const text = svgText(drawing, 'Levels: Receiver');
    const saved = new DOMParser().parseFromString(text, 'image/svg+xml').documentElement;
    expect(saved.localName).toBe('svg');
    expect(saved.querySelector('title')?.textContent).toBe('Levels: Receiver');
    expect([saved.getAttribute('width'), saved.getAttribute('height')]).toEqual(
      (drawing.getAttribute('viewBox') ?? '').split(' ').slice(2),
    );
    for (const part of [saved, ...saved.querySelectorAll('*')])
      expect(
        part.getAttributeNames().filter((name) => /^(class|style|id|role|tabindex|data-|aria-)/.test(name)),
      ).toEqual([]);
    expect(text).not.toMatch(/levelwright/i);
    expect(text).not.toContain('<!--');
    expect(saved.querySelectorAll('polyline').length).toBe(drawing.querySelectorAll('polyline').length);
  });

  it('leaves the page and its theme as they were', () => {
    const { drawing } = showLevels();
    document.documentElement.setAttribute('data-theme', 'dark');
    svgText(drawing, 'x');
    expect(document.documentElement.getAttribute('data-theme')).toBe('dark');
    document.documentElement.removeAttribute('data-theme');
    svgText(drawing, 'x');
    expect(document.documentElement.hasAttribute('data-theme')).toBe(false);
    expect(document.querySelectorAll('svg')).toHaveLength(1);
  });

  it('is downloaded as an SVG under the name of what it shows', async () => {
    const blobs: Blob[] = [];
    const names: string[] = [];
    URL.createObjectURL = (blob: Blob) => {
      blobs.push(blob);
      return 'blob:x';
    };
    vi.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(function (this: HTMLAnchorElement) {
      names.push(this.download);
    });
    showLevels();
    await fireEvent.click(screen.getByRole('button', { name: 'Save as SVG' }));
    await waitFor(() => expect(names).toEqual(['levels-receiver.svg']));
    expect(blobs[0]?.type).toBe('image/svg+xml');
  });

  it('says so when it could not be saved', async () => {
    URL.createObjectURL = () => {
      throw new Error('No room is left.');
    };
    showLevels();
    await fireEvent.click(screen.getByRole('button', { name: 'Save as SVG' }));
    await waitFor(() =>
      expect(screen.getByRole('status').textContent).toBe('The picture could not be saved. No room is left.'),
    );
  });

  it('names faces that other programs may have, a generic one last', () => {
    expect(facesOf("'Levelwright Sans', 'Source Sans 3', sans-serif")).toBe("'Source Sans 3', sans-serif");
    expect(facesOf('"Levelwright Serif", Georgia, serif')).toBe('Georgia, serif');
    expect(facesOf('"Levelwright Sans"')).toBe('sans-serif');
  });

  it('has a name of letters and digits', () => {
    expect(plotFileName('Levels: Réception / 2', 'png')).toBe('levels-réception-2.png');
    expect(plotFileName('…', 'svg')).toBe('plot.svg');
  });
});

describe('a plot of a curve', () => {
  const section: CurveSection = {
    ...{ id: 'c', kind: 'curve', symbol: 'pattern', title: 'Antenna pattern' },
    x: { label: 'Angle', unit: 'deg' },
    y: { label: 'Gain', unit: 'dBi' },
    points: [
      [0, 10],
      [90, -8],
    ],
  };
  const uses = [
    { lineId: 'g', symbol: 'G_tx', label: 'Towards the gateway', x: 45, y: 1 },
    { lineId: 'h', symbol: 'G_far', label: '', x: 120, y: undefined },
  ];

  it('draws the points and the places in use, each leading to its line', async () => {
    const onselect = vi.fn();
    const { container } = render(CurvePlot, { section, uses, onselect });
    expect(container.querySelectorAll('circle.hollow')).toHaveLength(2);
    await fireEvent.click(screen.getByRole('button', { name: 'G_tx: 1 dBi at 45 deg' }));
    expect(onselect.mock.calls).toEqual([['g']]);
    expect(container.textContent).toContain('G_far reads the curve at 120 deg, where it has no value.');
    const drawing = container.querySelector('svg');
    const said = document.getElementById(drawing?.getAttribute('aria-describedby') ?? '');
    expect(said?.textContent).toBe('Gain, dBi over Angle, deg, 2 points. Read by G_tx: 1 dBi at 45 deg.');
  });

  it('is there as a table', async () => {
    const onselect = vi.fn();
    render(CurvePlot, { section, uses, onselect });
    await fireEvent.click(screen.getByRole('button', { name: 'as table' }));
    const cells = screen.getAllByRole('row').map((row) => [...row.children].map((cell) => cell.textContent.trim()));
    expect(cells).toEqual([
      ['Angle, deg', 'Gain, dBi', 'read by'],
      ['0', '10', ''],
      ['45', '1', 'Gtx'],
      ['90', '−8', ''],
      ['120', 'no value', 'Gfar'],
    ]);
    await fireEvent.click(screen.getByRole('button', { name: /^G ?far$/ }));
    expect(onselect.mock.calls).toEqual([['h']]);
  });

  it('draws a curve that one line reads twice at one place', () => {
    const twice = [...uses, ...uses].map((use) => ({ ...use, lineId: 'g', symbol: 'G_tx' }));
    const { container } = render(CurvePlot, { section, uses: twice, onselect: vi.fn() });
    expect(screen.getAllByRole('button', { name: /^G_tx: / })).toHaveLength(1);
    expect(container.textContent).toMatch(/(G_tx reads the curve at 120 deg, where it has no value\.\s*){2}/);
  });

  it('says what is missing while there is no curve', () => {
    render(CurvePlot, { section: { ...section, points: [] }, uses: [], onselect: vi.fn() });
    expect(screen.getByText(/There is no curve to draw yet/).tagName).toBe('P');
  });
});
