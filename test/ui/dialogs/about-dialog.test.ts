import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';

import { cleanup, render, screen } from '@testing-library/svelte';
import { afterEach, describe, expect, it, vi } from 'vitest';

import AboutDialog from '../../../src/ui/dialogs/AboutDialog.svelte';
import { knowModalDialogs } from './modal';

knowModalDialogs();
afterEach(cleanup);

describe('About', () => {
  it('gives the three cautions', () => {
    render(AboutDialog, { version: '1.2.3', onClose: vi.fn() });
    const text = screen.getByRole('dialog', { name: 'About Levelwright' }).textContent;
    expect(text).toMatch(/estimates from the figures entered; confirm .*by measurement/);
    expect(text).toMatch(/Transmitting needs the licence and limits of the place/);
    expect(text).toMatch(/Exposure of people .* is not assessed: follow local law and qualified practice/);
  });

  it('tells the version and where things are kept', () => {
    render(AboutDialog, { version: '1.2.3', onClose: vi.fn() });
    expect(screen.getByText(/Version 1\.2\.3/)).toBeDefined();
    expect(screen.getByText(/kept in this browser, on this machine/)).toBeDefined();
    expect(screen.getByText(/Nothing is sent anywhere/)).toBeDefined();
  });

  it('links every licence that is served, and no other', () => {
    render(AboutDialog, { version: '1.2.3', onClose: vi.fn() });
    const linked = screen.getAllByRole('link').map((link) => link.getAttribute('href'));
    const served = readdirSync(resolve(import.meta.dirname, '../../../static/licences')).map(
      (name) => `licences/${name}`,
    );
    expect(linked.sort()).toEqual(served.sort());
  });
});
