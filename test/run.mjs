// Runs every check and test of the project in order, goes on after a failure, and closes with one line:
// `N passed, N failed`. Each step (format, lint, types, build) counts as one; each unit and browser test counts as one.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../', import.meta.url));
const results = join(root, 'node_modules/.cache/levelwright-test');
const chromium = process.env['CHROMIUM'] ?? '/usr/bin/chromium';

const tally = { passed: 0, failed: 0 };

/**
 * Runs a program with its output on this one's.
 * @param {string} program
 * @param {readonly string[]} options
 * @returns {boolean} whether it ended well
 */
const run = (program, options) => {
  const result = spawnSync(program, options, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] });
  return result.status === 0;
};

/**
 * Runs a development tool of the project.
 * @param {string} script its file below node_modules
 * @param {readonly string[]} options
 * @returns {boolean}
 */
const tool = (script, options) => run(process.execPath, [join(root, 'node_modules', script), ...options]);

/**
 * Counts one step.
 * @param {string} name
 * @param {() => boolean} action
 * @returns {void}
 */
const step = (name, action) => {
  process.stdout.write(`\n== ${name}\n`);
  const ok = action();
  if (ok) tally.passed += 1;
  else {
    tally.failed += 1;
    process.stdout.write(`== ${name}: FAILED\n`);
  }
};

/**
 * Runs a test runner and counts its tests. A run that fails without a failed test, or that counts no test at all, counts
 * as one failure; a skipped test counts as failed, for it checked nothing.
 * @param {string} name
 * @param {() => boolean} action
 * @param {() => { passed: number, failed: number }} count
 * @returns {void}
 */
const tests = (name, action, count) => {
  process.stdout.write(`\n== ${name}\n`);
  const ok = action();
  let { passed, failed } = { passed: 0, failed: 0 };
  try {
    ({ passed, failed } = count());
  } catch (error) {
    process.stdout.write(`== ${name}: no result to read (${error instanceof Error ? error.message : String(error)})\n`);
  }
  if ((!ok || passed === 0) && failed === 0) failed = 1;
  tally.passed += passed;
  tally.failed += failed;
  process.stdout.write(`== ${name}: ${String(passed)} right, ${String(failed)} wrong\n`);
};

/** @param {string} file */
const readResult = (file) => JSON.parse(readFileSync(join(results, file), 'utf8'));

const countUnit = () => {
  const report = readResult('unit.json');
  /** @type {{ status: string, assertionResults: unknown[] }[]} */
  const files = report.testResults;
  const unread = files.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length;
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests + report.numPendingTests + report.numTodoTests + unread,
  };
};

const countBrowser = () => {
  const { stats, errors } = readResult('browser.json');
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped + errors.length };
};

/** Makes sure that there is a Chromium, from Debian's packages where it is missing. */
const haveChromium = () => {
  if (existsSync(chromium)) return true;
  const isRoot = process.getuid?.() === 0;
  const asRoot = (/** @type {readonly string[]} */ words) =>
    isRoot ? run(words[0] ?? '', words.slice(1)) : run('sudo', ['-n', ...words]);
  process.stdout.write(`${chromium} is missing: installing the package chromium\n`);
  const installed =
    existsSync('/usr/bin/apt-get') &&
    asRoot(['apt-get', 'update', '-qq']) &&
    asRoot(['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', 'install', '-y', '-qq', 'chromium']);
  if (!installed || !existsSync(chromium)) {
    process.stdout.write(
      `The browser tests need Chromium, and it could not be installed. Install it as root with\n` +
        `\`apt-get install chromium\`, or set CHROMIUM to the path of one, and run the tests again.\n`,
    );
  }
  return existsSync(chromium);
};

rmSync(results, { recursive: true, force: true });
mkdirSync(results, { recursive: true });

step('format', () => tool('prettier/bin/prettier.cjs', ['--check', '--log-level', 'warn', '.']));
step('lint', () => tool('eslint/bin/eslint.js', ['.', '--max-warnings', '0']));
step('types', () =>
  tool('svelte-check/bin/svelte-check', ['--tsconfig', './tsconfig.json', '--fail-on-warnings', '--output', 'human']),
);
tests(
  'unit tests',
  () =>
    tool('vitest/vitest.mjs', [
      'run',
      '--reporter=dot',
      '--reporter=json',
      `--outputFile.json=${join(results, 'unit.json')}`,
    ]),
  countUnit,
);
step('build of the page', () => tool('vite/bin/vite.js', ['build', '--logLevel', 'warn']));
step('build of the command', () => tool('vite/bin/vite.js', ['build', '--mode', 'command', '--logLevel', 'warn']));
tests(
  'browser tests',
  () => haveChromium() && tool('@playwright/test/cli.js', ['test', '-c', 'e2e/playwright.config.ts']),
  countBrowser,
);

process.stdout.write(`\n${String(tally.passed)} passed, ${String(tally.failed)} failed\n`);
process.exitCode = tally.failed === 0 ? 0 : 1;
