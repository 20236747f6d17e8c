// What every browser test starts from: a page that fails its test on any error, and a check for accessibility. Import
// `test` and `expect` from here, never from the test library.
import AxeBuilder from '@axe-core/playwright';
import { test as base, expect, type Page } from '@playwright/test';

import { WorksheetPage } from './pages/worksheet-page';

/** Success criteria checked: WCAG 2.0, 2.1 and 2.2, levels A and AA. */
const wcagTags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

interface Fixtures {
  /** The page's model; it is opened by the test. */
  readonly sheet: WorksheetPage;
  /** Expects that the page, or the part of it that the CSS selector names, breaks no rule of WCAG 2.2 A and AA. */
  readonly expectAccessible: (selector?: string) => Promise<void>;
}

/**
 * Collects what goes wrong on a page: uncaught errors, console errors (Chromium reports breaches of the content
 * security policy there too) and requests to anywhere but the page's own server.
 */
export const watchForErrors = (page: Page): readonly string[] => {
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(`uncaught: ${error.message}`));
  page.on('crash', () => errors.push('the page crashed'));
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(`console: ${message.text()}`);
  });
  page.on('request', (request) => {
    const url = new URL(request.url());
    const isLocal = ['data:', 'blob:'].includes(url.protocol) || url.hostname === '127.0.0.1';
    if (!isLocal) errors.push(`request to elsewhere: ${request.url()}`);
  });
  return errors;
};

export const test = base.extend<Fixtures>({
  page: async ({ page }, use) => {
    const errors = watchForErrors(page);
    await use(page);
    expect(errors, 'errors on the page').toEqual([]);
  },
  sheet: async ({ page }, use) => {
    await use(new WorksheetPage(page));
  },
  expectAccessible: async ({ page }, use) => {
    await use(async (selector) => {
      const scan = new AxeBuilder({ page }).withTags(wcagTags);
      const { violations } = await (selector === undefined ? scan : scan.include(selector)).analyze();
      const broken = violations.map(({ id, help, nodes }) => ({
        id,
        help,
        at: nodes.map((node) => node.target.join(' ')),
      }));
      expect(broken, 'accessibility rules broken').toEqual([]);
    });
  },
});

export { expect };
