import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { workingOf } from '../../../src/review';
import WorkingPanel from '../../../src/ui/panels/WorkingPanel.svelte';
import { findLine } from '../../../src/worksheet';
import { evaluate, SHEET } from './sheet';

afterEach(cleanup);

const evaluation = evaluate();

function show(lineId?: string, caseId = 'calm', more: { readOnly?: boolean } = {}) {
  const calls = { onCase: vi.fn(), onSelect: vi.fn(), onKind: vi.fn(), onSide: vi.fn() };
  const given = {
    line: lineId === undefined ? undefined : findLine(SHEET, lineId)?.line,
    working: lineId === undefined ? undefined : workingOf(evaluation, lineId, caseId),
    usedBy: (lineId === undefined ? [] : evaluation.usedBy(lineId)).map((id) => ({
      ...{ lineId: id, symbol: findLine(SHEET, id)?.line.symbol ?? '', label: findLine(SHEET, id)?.line.label ?? '' },
    })),
    lineIdOf: (symbol: string) => evaluation.lineOf(symbol)?.id,
    ...{ cases: SHEET.cases, caseId },
  };
  const { container } = render(WorkingPanel, { ...given, ...calls, ...more });
  return { ...calls, container, text: () => container.textContent.replace(/\s+/g, ' ') };
}

/** What stands under a heading, up to the next one. */
const under = (heading: string | RegExp): HTMLElement => {
  const next = screen.getByRole('heading', { name: heading }).nextElementSibling;
  if (!(next instanceof HTMLElement)) throw new Error('nothing stands there');
  return next;
};

describe('the working of a line', () => {
  it('says what it is for while no line is selected', () => {
    const { text } = show();
    expect(text()).toMatch(/Select a line to see how its figure comes about/);
  });

  it('gives the figure with its linear value, in the case chosen', async () => {
    const { text, onCase } = show('e');
    expect(text()).toMatch(/15\.00 dBm = 31\.62 mW/);
    expect(screen.getByRole<HTMLInputElement>('radio', { name: 'Calm' }).checked).toBe(true);
    await fireEvent.click(screen.getByRole('radio', { name: 'Storm' }));
    expect(onCase.mock.calls).toEqual([['storm']]);
  });

  it('gives the steps, each symbol leading to its line', async () => {
    const { onSelect } = show('e');
    const steps = screen.getByText('in symbols').parentElement;
    if (steps === null) throw new Error('the steps are in a list');
    expect(
      within(steps)
        .getAllByRole('term')
        .map((term) => term.textContent),
    ).toEqual(['in symbols', 'with values', 'in linear terms', 'result']);
    const [symbols, values, linear] = within(steps).getAllByRole('definition');
    expect(symbols?.textContent.replace(/\s+/g, ' ').trim()).toBe('Ptx − Lfeed + 3 dBi');
    expect(values?.textContent.replace(/\s+/g, ' ').trim()).toBe('14.00 dBm − 2.00 dB + 3 dBi');
    expect(linear?.textContent).toMatch(/25\.12.mW/);
    if (symbols !== undefined) await fireEvent.click(within(symbols).getByRole('button', { name: /^L ?feed$/ }));
    expect(onSelect.mock.calls).toEqual([['l']]);
  });

  it('gives what it rests on with values, and what uses it', async () => {
    const { onSelect } = show('e');
    expect(under('Rests on').textContent.replace(/\s+/g, ' ')).toMatch(/Transmit power 14\.00 dBm .*Feeder 2\.00 dB/);
    await fireEvent.click(within(under('Used by')).getByRole('button', { name: 'SINR' }));
    expect(onSelect.mock.calls).toEqual([['w']]);
  });

  it('gives shares where powers add', () => {
    show('good');
    const list = under('Adds up from');
    expect(within(list).getAllByRole('listitem')).toHaveLength(2);
    expect(within(list).getAllByText('50 %')).toHaveLength(2);
  });

  it('says when nothing uses it', () => {
    show('good');
    expect(under('Used by').textContent).toBe('No other line.');
  });

  it('gives source and note', () => {
    show('l');
    expect(under('Source').textContent).toBe('Invented.');
    expect(under('Note').textContent).toBe('Two metres.');
  });
});

describe('where there is no figure', () => {
  it('says why it is withheld', () => {
    const { text } = show('bad');
    expect(text()).toMatch(/withheld Levels are added as decibels\. A figure is shown once that is put right\./);
    expect(text()).not.toMatch(/-?234/);
  });

  it('leads to the line that is waited for', async () => {
    const { text, onSelect } = show('w');
    expect(text()).toMatch(/waits for Nbad/);
    const [link] = screen.getAllByRole('button', { name: /^N ?bad$/ });
    if (link !== undefined) await fireEvent.click(link);
    expect(onSelect.mock.calls).toEqual([['bad']]);
  });
});

describe('the requirement', () => {
  it('is told with its standing, in words', () => {
    expect(show('e').text()).toMatch(/Required at most 14\.5 dBm: ✗ not met, 0\.50 dB short/);
    cleanup();
    expect(show('e', 'storm').text()).toMatch(/Required at most 14\.5 dBm: ✓ met, 0\.50 dB to spare/);
  });

  it('is told alone while there is no figure', () => {
    expect(show('w').text()).toMatch(/Required at least 3 dB(?!:)/);
  });
});

describe('kind and side', () => {
  const kind = () => screen.getByRole<HTMLSelectElement>('combobox', { name: 'Kind' });

  it('are told with how they came about, and confirmed in one step', async () => {
    const { text, onKind } = show('l');
    expect(kind().value).toBe('loss');
    expect(text()).toContain('assumed from the name');
    await fireEvent.click(screen.getByRole('button', { name: 'Confirm: kind loss' }));
    expect(onKind.mock.calls).toEqual([['loss']]);
  });

  it('are changed in one step', async () => {
    const { onKind } = show('l');
    await fireEvent.change(kind(), { target: { value: 'gain' } });
    expect(onKind.mock.calls).toEqual([['gain']]);
  });

  it('that were declared can be left to the worksheet again', async () => {
    const { onSide, text } = show('n');
    const side = screen.getByRole<HTMLSelectElement>('combobox', { name: 'Side' });
    expect(side.value).toBe('unwanted');
    expect(text()).toContain('as declared');
    await fireEvent.change(side, { target: { value: '' } });
    expect(onSide.mock.calls).toEqual([[undefined]]);
  });

  it('have no side where none can be', () => {
    show('l');
    expect(screen.queryByRole('combobox', { name: 'Side' })).toBeNull();
  });

  it('cannot be changed where nothing can', () => {
    show('l', 'calm', { readOnly: true });
    expect(kind().disabled).toBe(true);
    expect(screen.queryByRole('button', { name: /^Confirm/ })).toBeNull();
  });
});

describe('the caution', () => {
  it('stands beside radiated power, and not beside other lines', () => {
    const caution =
      /Transmitting needs the licence and limits of the place\. Exposure of people is not assessed here\./;
    expect(show('e').text()).toMatch(caution);
    cleanup();
    expect(show('l').text()).not.toMatch(caution);
  });
});
