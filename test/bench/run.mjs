// Builds the benchmark as the page is built, bundled and minified, and runs it on Node. Only the benchmark writes to
// standard output (one JSON document); the bundler's messages go to standard error.
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

node(['node_modules/vite/bin/vite.js', 'build', '--mode', 'bench', '--logLevel', 'error'], 2);
node(['--expose-gc', 'node_modules/.cache/levelwright-bench/bench.js', ...process.argv.slice(2)], 'inherit');
