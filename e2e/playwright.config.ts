// Browser tests against the built page, served as a user would have it. Only Chromium from the system is used; the
// variable CHROMIUM names another one.
import { fileURLToPath } from 'node:url';

import { defineConfig } from '@playwright/test';

const root = fileURLToPath(new URL('../', import.meta.url));
const port = 4317;

/** Flags under which Chromium starts in a container, as root too, and asks nothing of the network. */
const chromiumFlags = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export default defineConfig({
  testDir: '.',
  outputDir: '../node_modules/.cache/levelwright-e2e',
  forbidOnly: true,
  fullyParallel: true,
  workers: 2,
  retries: 0,
  // A journey is long and the machine may be small and busy: these bound a test that hangs, they are no measure of speed.
  timeout: 180_000,
  expect: { timeout: 20_000 },
  reporter: [['list'], ['json', { outputFile: '../node_modules/.cache/levelwright-test/browser.json' }]],
  use: {
    baseURL: `http://127.0.0.1:${port}/`,
    locale: 'en-GB',
    timezoneId: 'UTC',
    trace: 'off',
    video: 'off',
    screenshot: 'off',
    actionTimeout: 30_000,
    viewport: { width: 1280, height: 800 },
    launchOptions: { executablePath: process.env['CHROMIUM'] ?? '/usr/bin/chromium', args: chromiumFlags },
  },
  projects: [{ name: 'chromium', use: { browserName: 'chromium' } }],
  webServer: {
    command: `node src/command/serve.mjs --no-open --port ${port}`,
    cwd: root,
    url: `http://127.0.0.1:${port}/`,
    reuseExistingServer: false,
    timeout: 120_000,
  },
});
