import { cleanup, fireEvent, render, screen, within } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { LineFinding } from '../../../src/engine';
import FindingsPanel from '../../../src/ui/panels/FindingsPanel.svelte';
import { evaluate, SHEET } from './sheet';

afterEach(cleanup);

const found = evaluate().sheetFindings();

function show(findings: readonly LineFinding[] = found, more: { readOnly?: boolean } = {}) {
  const calls = { onJump: vi.fn(), onRepair: vi.fn(), onAccept: vi.fn(), onWithdraw: vi.fn() };
  return { ...calls, ...render(FindingsPanel, { worksheet: SHEET, findings, ...calls, ...more }) };
}

const item = (title: RegExp | string): HTMLElement => {
  const listed = screen.getByText(title).closest('li');
  if (listed === null) throw new Error('the finding is not in a list');
  return listed;
};
const first = (code: string): LineFinding => {
  const one = found.find((finding) => finding.code === code);
  if (one === undefined) throw new Error(`the sheet has no finding ${code}`);
  return one;
};
const levels = first('levels-summed');
const ratios = first('ratios-summed');

describe('the list of findings', () => {
  it('says when there is none', () => {
    show([]);
    expect(screen.getByText(/^No findings/)).toBeDefined();
  });

  it('groups them by severity, with line, sentence and counts', () => {
    show();
    const errors = screen.getByRole('region', { name: 'Errors' });
    expect(within(errors).getAllByRole('listitem')).toHaveLength(1);
    expect(errors.textContent).toContain('Sum of decibels');
    expect(errors.textContent).toContain(levels.message);
    expect(within(screen.getByRole('region', { name: 'Warnings' })).getByText(ratios.message)).toBeDefined();
    expect(screen.getByRole('button', { name: 'Errors 1' }).getAttribute('aria-pressed')).toBe('true');
  });

  it('hides and shows a severity', async () => {
    show();
    await fireEvent.click(screen.getByRole('button', { name: 'Errors 1' }));
    expect(screen.queryByRole('region', { name: 'Errors' })).toBeNull();
    expect(screen.getByRole('region', { name: 'Warnings' })).toBeDefined();
    await fireEvent.click(screen.getByRole('button', { name: 'Errors 1' }));
    expect(screen.getByRole('region', { name: 'Errors' })).toBeDefined();
  });

  it('shows lines that only wait when asked for', async () => {
    show();
    expect(screen.queryByRole('region', { name: 'Lines that wait for another' })).toBeNull();
    await fireEvent.click(screen.getByRole('button', { name: 'Waiting 1' }));
    expect(screen.getByRole('region', { name: 'Lines that wait for another' }).textContent).toContain('N_bad');
  });

  it('keeps a long list short and goes on when asked', async () => {
    show(Array.from({ length: 130 }, () => ratios));
    const list = screen.getByRole('region', { name: 'Warnings' });
    expect(within(list).getAllByRole('listitem')).toHaveLength(50);
    await fireEvent.click(screen.getByRole('button', { name: 'Show more (80 left)' }));
    expect(within(list).getAllByRole('listitem')).toHaveLength(100);
  });
});

describe('what can be done with a finding', () => {
  it('goes to its line', async () => {
    const { onJump } = show();
    await fireEvent.click(within(item(levels.title)).getByRole('button', { name: /Sum of decibels/ }));
    expect(onJump.mock.calls).toEqual([[levels]]);
  });

  it('does a repair', async () => {
    const { onRepair } = show();
    const [repair] = levels.repairs;
    if (repair === undefined) throw new Error('levels-summed has a repair');
    await fireEvent.click(within(item(levels.title)).getByRole('button', { name: `Repair: ${repair.title}` }));
    expect(onRepair.mock.calls).toEqual([[levels, repair]]);
  });

  it('leaves the focus on the finding that stands there after a repair', async () => {
    const { rerender } = show();
    const repair = within(item(levels.title)).getAllByRole('button', { name: /^Repair/ })[0];
    repair?.focus();
    if (repair !== undefined) void fireEvent.click(repair);
    await rerender({ findings: found.filter((finding) => finding !== levels) });
    await vi.waitFor(() => expect(item(ratios.title).contains(document.activeElement)).toBe(true));
  });

  it('accepts a warning with a reason, not without', async () => {
    const { onAccept } = show();
    await fireEvent.click(within(item(ratios.title)).getByRole('button', { name: 'Accept…' }));
    const field = screen.getByRole('textbox', { name: `Why it is right as it is: ${ratios.title}` });
    expect(document.activeElement).toBe(field);
    await fireEvent.input(field, { target: { value: '  ' } });
    await fireEvent.click(screen.getByRole('button', { name: 'Accept' }));
    expect(onAccept).not.toHaveBeenCalled();
    expect(screen.getByRole('alert').textContent).toMatch(/Write a reason/);
    await fireEvent.input(field, { target: { value: ' They do not meet. ' } });
    await fireEvent.click(screen.getByRole('button', { name: 'Accept' }));
    expect(onAccept.mock.calls).toEqual([[ratios, 'They do not meet.']]);
  });

  it('leaves accepting on Escape and gives the focus back', async () => {
    show();
    await fireEvent.click(within(item(ratios.title)).getByRole('button', { name: 'Accept…' }));
    await fireEvent.keyDown(screen.getByRole('textbox'), { key: 'Escape' });
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(document.activeElement?.textContent).toBe('Accept…');
  });

  it('does not let an error be accepted', () => {
    show([levels]);
    expect(screen.queryByRole('button', { name: 'Accept…' })).toBeNull();
  });

  it('shows an accepted one with its reason, and withdraws it', async () => {
    const accepted = { ...ratios, accepted: 'They do not meet.' };
    const { onWithdraw } = show([accepted]);
    const region = screen.getByRole('region', { name: 'Accepted' });
    expect(region.textContent).toContain('Warning, accepted.');
    expect(region.textContent).toContain('They do not meet.');
    expect(within(region).queryByRole('button', { name: /^Repair/ })).toBeNull();
    await fireEvent.click(within(region).getByRole('button', { name: 'Withdraw' }));
    expect(onWithdraw.mock.calls).toEqual([[accepted]]);
  });

  it('offers no change where nothing can be changed', () => {
    show(found, { readOnly: true });
    expect(screen.queryByRole('button', { name: /^(Repair|Accept…)/ })).toBeNull();
    expect(screen.getByRole('button', { name: /Sum of decibels/ })).toBeDefined();
  });
});
