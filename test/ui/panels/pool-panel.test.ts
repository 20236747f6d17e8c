import { cleanup, fireEvent, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it } from 'vitest';

import type { Session } from '../../../src/app/session.svelte';
import type { Line, PoolSection } from '../../../src/worksheet';
import { plain, settle, stage } from './stage';

afterEach(cleanup);

const line = (symbol: string, label: string, entry: string, more: Partial<Line> = {}): Line => ({
  ...{ id: symbol, symbol, label, entry },
  ...more,
});

const POOL: PoolSection = {
  ...{ id: 'pool', kind: 'pool', symbol: 'N_tot', title: 'At the gateway' },
  requirement: { atMost: '-85 dBm' },
  lines: [
    line('N', 'Noise', '-90 dBm'),
    line('I', 'Interference', '-90 dBm', { byCase: { storm: '-80 dBm' } }),
    line('J', 'Crane', '-70 dBm', { off: true }),
  ],
};

const rowOf = (name: string): HTMLElement => screen.getByRole('row', { name: new RegExp(`^${name} `) });
const poolIn = (session: Session): PoolSection => session.worksheet.sections[0] as PoolSection;
const show = (more: Partial<PoolSection> = {}): Promise<Session> => stage('pool', { ...POOL, ...more });

async function type(name: string, text: string): Promise<void> {
  const field = screen.getByRole(name === 'Unit of the total' ? 'combobox' : 'textbox', { name });
  await fireEvent.input(field, { target: { value: text } });
  await fireEvent.keyDown(field, { key: 'Enter' });
  await settle();
}

describe('the total', () => {
  it('stands large with its verdict, and with its linear value when those are shown', async () => {
    const session = await show();
    const { body } = document;
    expect(plain(body)).toContain('−86.99 dBm');
    expect(plain(body)).toMatch(/Required at most -85 dBm: ✓ met, 1\.99 dB to spare/);
    expect(plain(body)).not.toContain('pW');
    session.showLinear = true;
    await settle();
    expect(plain(body)).toMatch(/= 2 pW/);
  });

  it('follows the case', async () => {
    const session = await show();
    await fireEvent.click(screen.getByRole('radio', { name: 'Storm' }));
    await settle();
    expect(session.selectedCaseId).toBe('storm');
    expect(plain(document.body)).toMatch(/✗ not met, 5\.41 dB short/);
    expect(plain(rowOf('N'))).toMatch(/none the others alone exceed it/);
  });

  it('says why there is none, and what the lines are all the same', async () => {
    await show({ lines: [line('N', 'Noise', '-90 dBm'), line('D', 'Density', '-170 dBm/Hz')] });
    const finding = screen.getByRole('list', { name: 'Findings' });
    expect(plain(finding)).toMatch(/N is .+ and D is .+: their powers have no total\./);
    expect(within(finding).queryByRole('button', { name: /Accept|Repair/ })).toBeNull();
    expect(plain(rowOf('N'))).toContain('−90.00 dBm');
  });

  it('says that no line counts', async () => {
    await show({ lines: [] });
    expect(plain(document.body)).toContain('No line counts yet.');
  });
});

describe('the lines', () => {
  it('have figure, share, the total without them, and what is permitted', async () => {
    await show();
    const headings = within(screen.getByRole('table')).getAllByRole('columnheader');
    expect(headings.map(plain)).toEqual(['Counts', 'Line', 'Figure', 'Share', 'Total without it', 'Permitted']);
    const row = plain(rowOf('N'));
    expect(row).toMatch(/Noise.*−90\.00 dBm.*50 %.*−90\.00 dBm/);
    // 10^-8.5 − 10^-9 mW.
    expect(row).toMatch(/≤ −86\.65 dBm 3\.35 dB to spare/);
    expect(plain(rowOf('J'))).toMatch(/−70\.00 dBm switched off$/);
  });

  it('lead to themselves in the sheet', async () => {
    const session = await show();
    await fireEvent.click(within(rowOf('I')).getByRole('button', { name: 'I' }));
    expect(session.focusRequest?.focus).toMatchObject({ kind: 'lines', lineIds: ['I'] });
  });

  it('are switched off and on, and that is undone like any edit', async () => {
    const session = await show();
    const before = session.worksheet;
    await fireEvent.click(screen.getByRole('switch', { name: 'I counts' }));
    await settle();
    expect(poolIn(session).lines[1]?.off).toBe(true);
    expect(plain(rowOf('N'))).toContain('100 %');
    expect(plain(rowOf('N'))).toContain('nothing left');
    await fireEvent.click(screen.getByRole('switch', { name: 'J counts' }));
    await settle();
    expect(poolIn(session).lines[2]).not.toHaveProperty('off');
    session.undo();
    session.undo();
    await settle();
    expect(session.worksheet).toEqual(before);
    expect(screen.getByRole<HTMLInputElement>('switch', { name: 'I counts' }).checked).toBe(true);
  });

  it('have no column of permitted values without a requirement', async () => {
    const { requirement: _none, ...free } = POOL;
    await stage('pool', free);
    expect(screen.queryByRole('columnheader', { name: 'Permitted' })).toBeNull();
  });
});

describe('the fields', () => {
  it('set title, unit and requirement', async () => {
    const session = await show();
    await type('Title', 'At the quay');
    await type('Unit of the total', 'dBW');
    await type('Requirement', '<= -110 dBW');
    expect(poolIn(session)).toMatchObject({
      title: 'At the quay',
      unit: 'dBW',
      requirement: { atMost: '-110 dBW' },
    });
    expect(plain(document.body)).toMatch(/−116\.99 dBW.*Required at most -110 dBW: ✓ met, 6\.99 dB/);
    await type('Requirement', '');
    await type('Unit of the total', '');
    expect(poolIn(session)).not.toHaveProperty('requirement');
    expect(poolIn(session)).not.toHaveProperty('unit');
  });

  it('rename the pool wherever it is used', async () => {
    const session = await stage('pool', POOL, {
      ...{ id: 'rest', kind: 'lines', title: '' },
      lines: [line('M', 'Margin', 'N_tot + 3 dB')],
    });
    await type('Symbol', 'N_all');
    expect(poolIn(session).symbol).toBe('N_all');
    expect(session.evaluation.line('M')?.entry).toBe('N_all + 3 dB');
  });

  it.each([
    ['Symbol', 'N', 'Another line has the symbol N; choose a free one.'],
    ['Symbol', '2x', 'A symbol begins with a letter, for example P_tx.'],
    ['Unit of the total', 'dBfoo', '“dBfoo” is no unit known here.'],
    ['Requirement', '<=', 'The bound is missing: for example ≤ -100 dBm.'],
  ])('refuse in %s: %s', async (name, text, sentence) => {
    const session = await show();
    const before = session.worksheet;
    await type(name, text);
    expect(plain(document.body)).toContain(sentence);
    expect(session.worksheet).toBe(before);
  });
});
