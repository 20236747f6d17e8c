/** The built command as a process: it prints and exits as `run` says, and bears a reader that stops early. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

import { afterAll, describe, expect, it } from 'vitest';

import { run } from '../../src/command/run';
import { fileOf } from './support';

const ROOT = fileURLToPath(new URL('../../', import.meta.url));
const START = join(ROOT, 'src/command/start.mjs');
const STARTER = 'src/starters/harbour-buoy-uplink.budget.json';

const folder = mkdtempSync(join(tmpdir(), 'levelwright-'));
afterAll(() => rmSync(folder, { recursive: true }));

/** A file in the folder that goes when the tests are done. */
function fileNamed(name: string, content: string): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

/** A busy machine takes its time to start a process; nothing here is about time. */
const PATIENCE_MS = 120_000;

interface Ended {
  readonly status: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

// Without the variables of the test runner, which the build would take for its own.
const env = { PATH: process.env['PATH'], HOME: process.env['HOME'] };
const start = (program: string, words: readonly string[]): Ended =>
  spawnSync(program, words, { cwd: ROOT, env, encoding: 'utf8', maxBuffer: 64 * 1024 * 1024 });

// Builds the command when it is missing or older than its sources, so that no test below waits for that or tells of it.
start(process.execPath, [START, 'help']);

const broken = fileNamed('broken.budget.json', fileOf('N = 1 dBm + 2 dBm\nM = N + 3 dB require >= 1 dB'));
const bad = fileNamed('bad.budget.json', '{');
const later = fileNamed('later.budget.json', fileOf('x = 1 dB').replace('"version": 1', '"version": 9'));

describe('the command', { timeout: PATIENCE_MS }, () => {
  it.each([
    [['evaluate', STARTER]],
    [['evaluate', STARTER, '--format', 'json', '--case', 'storm']],
    [['evaluate', STARTER, '--format', 'csv', '--linear']],
    [['evaluate', STARTER, '--format', 'markdown', '--line', 'SINR']],
    [['evaluate', broken]],
    [['evaluate', later]],
    [['evaluate', bad]],
    [['evaluate', join(folder, 'missing.budget.json')]],
    [['evaluate', folder]],
    [['check', STARTER, broken]],
    [['explain', STARTER, 'N_tot']],
    [['explain', STARTER, 'N_tto']],
    [['functions', 'powersum']],
    [['help']],
    [['--speed']],
    [[]],
  ])('%j does as it says', (words) => {
    const { status, stdout, stderr } = start(process.execPath, [START, ...words]);
    const answer = run(words, { readFile: (path) => readFileSync(resolve(ROOT, path)) });
    expect({ status, stdout, stderr }).toEqual({
      status: answer.exitCode,
      stdout: answer.results,
      stderr: answer.messages,
    });
  });
});

describe('a reader that stops early', { timeout: PATIENCE_MS }, () => {
  // More than a pipe holds, so that the writer is still at it when the reader goes.
  const long = fileNamed(
    'long.budget.json',
    fileOf(Array.from({ length: 800 }, (_, at) => `x${String(at)} = 1 dB # ${'label '.repeat(50)}`).join('\n')),
  );
  const wrong = fileNamed(
    'wrong.budget.json',
    fileOf(Array.from({ length: 400 }, (_, at) => `x${String(at)} = 1 dBm + 2 dBm`).join('\n')),
  );

  it.each([
    ['evaluate', long, 'head -n 1', 0],
    ['evaluate', long, 'true', 0],
    ['check', wrong, 'head -n 1', 1],
  ])('is no failure: %s %s | %s', (command, file, reader, exitCode) => {
    const whole = run([command, file], { readFile: (path) => readFileSync(path) });
    expect(whole.results.length).toBeGreaterThan(100_000);
    const ended = start('sh', [
      '-c',
      `( "$0" "$1" ${command} "$2"; echo "exit $?" >&2 ) | ${reader}`,
      process.execPath,
      START,
      file,
    ]);
    expect(ended.stderr).toBe(`exit ${String(exitCode)}\n`);
    expect(ended.stdout).toBe(reader === 'true' ? '' : `${whole.results.split('\n')[0] ?? ''}\n`);
  });

  it('of the messages is none either', () => {
    const named = 'no such case '.repeat(20_000);
    const script = `( "$0" "$1" evaluate "$2" --case "$(cat "$3")" 2>&1 >/dev/null; echo "exit $?" >"$4" ) | true`;
    const status = join(folder, 'status');
    const ended = start('sh', [
      '-c',
      script,
      process.execPath,
      START,
      long,
      fileNamed('case', named.slice(0, 100_000)),
      status,
    ]);
    expect(ended.stderr).toBe('');
    expect(readFileSync(status, 'utf8')).toBe('exit 2\n');
  });
});
