// Builds the benchmark as the page is built, bundled and minified, and runs it on Node; and builds the page itself, whose
// script is weighed. Only the benchmark writes to standard output (one JSON document); the bundler's messages go to standard
// error.
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../../', import.meta.url));

/**
 * Runs Node and ends this process when that fails.
 * @param {readonly string[]} words
 * @param {'inherit' | 2} output
 * @returns {void}
 */
const node = (words, output) => {
  const result = spawnSync(process.execPath, words, { cwd: root, stdio: ['ignore', output, 2] });
  if (result.status !== 0) process.exit(result.status ?? 1);
};

const vite = 'node_modules/vite/bin/vite.js';
const page = `${root}node_modules/.cache/levelwright-bench-page`;

node([vite, 'build', '--mode', 'bench', '--logLevel', 'error'], 2);
node([vite, 'build', '--outDir', page, '--manifest', '--logLevel', 'error'], 2);
node(['--expose-gc', 'node_modules/.cache/levelwright-bench/bench.js', page], 'inherit');
