// A browser process of a test's own, with a profile on disk that outlives it: to be killed without warning and started again.
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createInterface } from 'node:readline';

import { chromium, type Browser, type Page } from '@playwright/test';

import { test } from './fixtures';
import { WorksheetPage } from './pages/worksheet-page';

/** A running browser with one page in it. */
interface OwnBrowser {
  readonly page: Page;
  /** Ends every process of the browser at once, without a chance to write anything. */
  readonly kill: () => Promise<void>;
}

/** How a browser of the test's own is started: as the other tests start theirs. */
interface OwnBrowserOptions {
  readonly executablePath: string;
  readonly args: readonly string[];
  readonly profile: string;
}

/** Starts a browser on a profile, in a process group of its own. */
async function startOwnBrowser({ executablePath, args, profile }: OwnBrowserOptions): Promise<OwnBrowser> {
  const flags = ['--headless', '--remote-debugging-port=0', `--user-data-dir=${profile}`, '--no-default-browser-check'];
  const process = spawn(executablePath, [...args, ...flags, 'about:blank'], {
    detached: true,
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  const browser = await connect(process);
  const context = browser.contexts()[0];
  if (context === undefined) throw new Error('The browser has no profile open.');
  const page = context.pages()[0] ?? (await context.newPage());
  return { page, kill: () => kill(process, browser) };
}

async function connect(process: ChildProcess): Promise<Browser> {
  if (process.stderr === null) throw new Error('The browser has no standard error.');
  const said: string[] = [];
  for await (const line of createInterface({ input: process.stderr })) {
    const [, address] = /^DevTools listening on (ws:\S+)/.exec(line) ?? [];
    // What it says later is let go: a full pipe would stop it.
    if (address !== undefined) {
      process.stderr.resume();
      return chromium.connectOverCDP(address);
    }
    said.push(line);
  }
  throw new Error(`The browser did not start:\n${said.join('\n')}`);
}

async function kill(process: ChildProcess, browser: Browser): Promise<void> {
  if (process.pid === undefined) throw new Error('The browser has not been started.');
  const hasEnded = once(process, 'exit');
  const isGone = new Promise((resolve) => browser.once('disconnected', resolve));
  // The group is this test's own: it holds the browser and its helpers, and nothing else.
  globalThis.process.kill(-process.pid, 'SIGKILL');
  await Promise.all([hasEnded, isGone]);
}

interface Fixtures {
  /**
   * Opens the page in a browser on this test's profile; kills the one before. `first` is done before the page is opened.
   */
  readonly startAgain: (first?: (page: Page) => Promise<void>) => Promise<WorksheetPage>;
}

/** A test that starts and kills browsers on a profile of its own. */
export const profileTest = test.extend<Fixtures>({
  startAgain: async ({ launchOptions, baseURL }, use, testInfo) => {
    const profile = testInfo.outputPath('profile');
    const { executablePath = '', args = [] } = launchOptions;
    let running: OwnBrowser | undefined;
    await use(async (first = () => Promise.resolve()) => {
      await running?.kill();
      running = await startOwnBrowser({ executablePath, args, profile });
      const { page } = running;
      await page.setViewportSize({ width: 1280, height: 800 });
      await first(page);
      await page.goto(baseURL ?? '');
      const sheet = new WorksheetPage(page);
      await sheet.expectReady();
      return sheet;
    });
    await running?.kill();
  },
});
