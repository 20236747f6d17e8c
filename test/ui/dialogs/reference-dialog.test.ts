import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import { CONSTANTS, FUNCTIONS } from '../../../src/formula';
import { UNIT_WORDS } from '../../../src/quantity';
import { CHAPTERS, searchReference } from '../../../src/ui/dialogs/reference-search';
import ReferenceDialog from '../../../src/ui/dialogs/ReferenceDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

const namesOf = (
  search: string,
  ...chapter: Parameters<typeof searchReference> extends [string, ...infer R] ? R : never
) => searchReference(search, ...chapter).groups.flatMap(({ entries }) => entries.map(({ name }) => name));

describe('searching the reference', () => {
  it('finds everything when nothing is asked for', () => {
    const { count, constants, units } = searchReference('  ');
    expect(namesOf('').sort()).toEqual(FUNCTIONS.map(({ name }) => name).sort());
    expect(constants).toEqual(CONSTANTS);
    expect(units.map(({ word }) => word)).toEqual(UNIT_WORDS);
    expect(count).toBe(FUNCTIONS.length + CONSTANTS.length + UNIT_WORDS.length);
  });

  it('finds by name, by text, by parameter and by source, whatever the case', () => {
    expect(namesOf('THERMAL_NOISE')).toContain('thermal_noise');
    expect(namesOf('friis')).toEqual(['cascade_nf']);
    expect(namesOf('free space isotropic')).toEqual(['free_space_loss']);
    expect(searchReference('boltzmann').constants.map(({ name }) => name)).toEqual(['k_B']);
    expect(searchReference('half-wave dipole').units.map(({ word }) => word)).toContain('dBd');
  });

  it('keeps to a chapter', () => {
    expect(namesOf('noise', 'Propagation')).toEqual([]);
    expect(searchReference('', 'Units')).toMatchObject({ groups: [], constants: [], count: UNIT_WORDS.length });
  });

  it('has a chapter for every function', () => {
    expect(FUNCTIONS.every(({ group }) => CHAPTERS.includes(group))).toBe(true);
  });
});

describe('the reference', () => {
  const show = (onInsert?: (text: string, caret: number) => void) =>
    render(ReferenceDialog, { onClose: vi.fn(), ...(onInsert && { onInsert }) });
  const search = (words: string) =>
    fireEvent.input(screen.getByRole('searchbox', { name: 'Search the reference' }), { target: { value: words } });

  it('starts in the search field', () => {
    show();
    expect(document.activeElement).toBe(screen.getByRole('searchbox', { name: 'Search the reference' }));
  });

  it('gives a function as its catalogue does: signature, text, parameters, formula, source, validity, example', async () => {
    show();
    await search('free_space_loss');
    const entry = FUNCTIONS.find(({ name }) => name === 'free_space_loss');
    if (entry?.form !== 'ordinary') throw new Error('the catalogue has no such function');
    const region = screen.getByRole('region', { name: entry.group });
    const told = region.textContent.replace(/\s+/g, ' ');
    for (const words of [
      'free_space_loss(d, f)',
      entry.text,
      ...entry.parameters.flatMap(({ text, unit }) => [`${text}, in ${unit}`]),
      entry.formula,
      entry.source,
      entry.validity?.range ?? 'no range',
      entry.example,
      entry.result,
    ])
      expect(told).toContain(words);
  });

  it('says when nothing is found', async () => {
    show();
    await search('zeppelin');
    expect(screen.getByText(/Nothing holds these words/)).toBeDefined();
    expect(screen.getByRole('status').textContent).toBe('0 entries');
  });

  it('shows one chapter, and all again', async () => {
    show();
    const button = screen.getByRole('button', { name: 'Constants' });
    await fireEvent.click(button);
    expect(button.getAttribute('aria-pressed')).toBe('true');
    expect(screen.queryByRole('region', { name: 'Noise' })).toBeNull();
    expect(within(screen.getByRole('region', { name: 'Constants' })).getByText('299792458 m/s')).toBeDefined();
    await fireEvent.click(button);
    expect(screen.getByRole('region', { name: 'Noise' })).toBeDefined();
  });

  it('inserts a call with the caret between its brackets, and a constant', async () => {
    const onInsert = vi.fn();
    show(onInsert);
    await search('thermal_noise');
    await fireEvent.click(screen.getByRole('button', { name: 'Insert thermal_noise into the line' }));
    await search('k_B');
    await fireEvent.click(screen.getByRole('button', { name: 'Insert k_B into the line' }));
    expect(onInsert.mock.calls).toEqual([
      ['thermal_noise()', 'thermal_noise('.length],
      ['k_B', 3],
    ]);
  });

  it('offers no insertion where nothing is being written', () => {
    show();
    expect(screen.queryByRole('button', { name: /^Insert/ })).toBeNull();
  });
});
