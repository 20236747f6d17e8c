// Builds what the start scripts run, and only when it is missing or older than its sources. Plain JavaScript, so that it
// runs before anything is built. What must stay true: nothing is written to standard output, which is the command's.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The repository's root, with a separator at its end. */
export const root = fileURLToPath(new URL('../../', import.meta.url));

const configuration = ['package.json', 'vite.config.ts', 'svelte.config.js'];

/**
 * The newest modification time in milliseconds of a file, or of a folder and all that it holds (a removed file counts
 * through its folder); 0 when there is no such path.
 * @param {string} path
 * @returns {number}
 */
const newest = (path) => {
  const status = statSync(path, { throwIfNoEntry: false });
  if (status === undefined) return 0;
  if (!status.isDirectory()) return status.mtimeMs;
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), status.mtimeMs);
};

/**
 * Whether a built file, given relative to the root, is missing or older than any of its sources.
 * @param {string} built
 * @param {readonly string[]} sources
 * @returns {boolean}
 */
const isStale = (built, sources) => {
  const builtAt = statSync(join(root, built), { throwIfNoEntry: false })?.mtimeMs ?? 0;
  return [...sources, ...configuration].some((source) => newest(join(root, source)) > builtAt);
};

/**
 * Runs the bundler with its messages on standard error; ends the process when it fails.
 * @param {readonly string[]} options
 * @returns {void}
 */
const build = (options) => {
  const bundler = join(root, 'node_modules/vite/bin/vite.js');
  if (!existsSync(bundler)) {
    process.stderr.write('levelwright: has to be built first, and the build tools are not installed. Run `npm ci`.\n');
    process.exit(1);
  }
  const result = spawnSync(process.execPath, [bundler, 'build', '--logLevel', 'error', ...options], {
    cwd: root,
    stdio: ['ignore', 2, 2],
  });
  if (result.status !== 0) {
    process.stderr.write('levelwright: the build failed; the messages above say where.\n');
    process.exit(1);
  }
};

/**
 * Builds the page when `dist` is missing or stale.
 * @returns {void}
 */
export const freshenPage = () => {
  if (!isStale('dist/index.html', ['src', 'static'])) return;
  process.stderr.write('levelwright: building the page ...\n');
  build([]);
};

/**
 * Builds the command when `dist-command` is missing or stale, and puts it in place in one step, so that two commands
 * started together never read half a file.
 * @returns {string} the path of the built command
 */
export const freshenCommand = () => {
  const built = join(root, 'dist-command/levelwright.js');
  if (!isStale('dist-command/levelwright.js', ['src'])) return built;
  const scratch = join(root, `node_modules/.cache/levelwright-command-${String(process.pid)}`);
  build(['--mode', 'command', '--outDir', scratch]);
  mkdirSync(join(root, 'dist-command'), { recursive: true });
  renameSync(join(scratch, 'levelwright.js'), built);
  rmSync(scratch, { recursive: true });
  return built;
};
