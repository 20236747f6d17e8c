/** README.md: its first budget gives the figures printed, its commands print what it shows, and what it quotes is so. */
import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

import { KEY_BINDINGS } from '../../src/app/keys';
import { run } from '../../src/command/run';
import { Evaluation, type Figure } from '../../src/engine';
import { FILE_BYTES_LIMIT, NESTING_LIMIT, readWorksheetFile } from '../../src/exchange';
import { linearFigure, writeQuantity } from '../../src/quantity';
import { CAUTIONS } from '../../src/review';
import { LINE_KEYS, LINES_LIMIT } from '../../src/worksheet';
import { sheetOfLines } from '../engine/notation';
import { plain, README, ROOT, sectionOf, tableIn } from './documents';

const world = { readFile: (path: string): Uint8Array => readFileSync(ROOT + path) };
const usage = run(['--help'], world).results;

/** A figure as the page words it. */
function worded(figure: Figure): string {
  switch (figure.state) {
    case 'value':
      return writeQuantity(figure.value, figure.unit, { isFitted: figure.isFitted });
    case 'waiting':
      return `waits for ${figure.roots.join(', ')}`;
    default:
      return figure.state;
  }
}

it('begins with the job: a paragraph that says for whom and for what', () => {
  const [title, first = ''] = README.text.split('\n\n');
  expect(title).toBe('# Levelwright');
  expect(first).toMatch(/^Levelwright is a worksheet for radio .* systems engineer/s);
});

describe('the first budget', () => {
  const section = sectionOf(README, '## A first budget, by keyboard');
  const [, ...rows] = tableIn(section);
  const lines = rows.map(([symbol, label = '', entry], index) => ({
    id: `l${String(index)}`,
    symbol: plain(symbol),
    label,
    entry: plain(entry),
  }));
  const figuresOf = (evaluation: Evaluation): Record<string, string> =>
    Object.fromEntries(lines.map(({ id, symbol }) => [symbol, worded(evaluation.figure(id, 'nominal'))]));

  it('gives the figures of its table', () => {
    expect(lines.length).toBeGreaterThan(8);
    expect(figuresOf(new Evaluation(sheetOfLines(lines)))).toEqual(
      Object.fromEntries(rows.map(([symbol, , , shown]) => [plain(symbol), shown])),
    );
  });

  it('has the one finding that the tour is about, with the repair named', () => {
    const findings = new Evaluation(sheetOfLines(lines)).sheetFindings().filter(({ code }) => code !== 'waiting');
    expect(findings.map(({ code }) => code)).toEqual(['levels-summed']);
    expect(findings[0]?.repairs[0]).toMatchObject({ entry: 'powersum(N, I)' });
    expect(section).toContain('`powersum(N, I)`');
  });

  it('gives the figures of the tour after the repair, linear ones too', () => {
    const repaired = lines.map((line) => (line.symbol === 'N_tot' ? { ...line, entry: 'powersum(N, I)' } : line));
    const evaluation = new Evaluation(sheetOfLines(repaired));
    const { N_tot: total = '', SINR: ratio = '' } = figuresOf(evaluation);
    expect(section).toContain(`\`N_tot\` becomes ${total} and \`SINR\` ${ratio}.`);
    const [noise, sinr] = ['N_tot', 'SINR'].map((symbol) => {
      const figure = evaluation.figure(lines.find((line) => line.symbol === symbol)?.id ?? '', 'nominal');
      return figure.state === 'value' ? linearFigure(figure.value, figure.unit) : undefined;
    });
    expect(section).toMatch(
      new RegExp(
        `${noise?.text ?? '-'} ${noise?.unit ?? '-'} under ${total} and × ${sinr?.text ?? '-'}\\s+under ${ratio}`,
      ),
    );
  });

  it('is right about 25 mW in a line in dBm', () => {
    const evaluation = new Evaluation(sheetOfLines([{ id: 'l', symbol: 'P', label: '', entry: '25 mW', unit: 'dBm' }]));
    expect(section).toContain(`is ${worded(evaluation.figure('l', 'nominal'))} and adds as decibels`);
  });

  it.each([
    ['Alt+Enter', 'repair'],
    ['Ctrl+Z', 'undo'],
    ['F8', 'next-finding'],
    ['Alt+Shift+Enter', 'accept'],
    ['Alt+L', 'linear'],
    ['Delete', 'clear'],
    ['Ctrl+S', 'save-file'],
    ['Ctrl+O', 'open-file'],
    ['F1', 'keys'],
  ])('names the key %s, which does “%s”', (key, action) => {
    expect(section).toMatch(new RegExp(`${key.replaceAll('+', '\\+')}\\b`));
    expect(KEY_BINDINGS.find(({ keys }) => keys.includes(key))?.action).toBe(action);
  });
});

describe('the command line', () => {
  const section = sectionOf(README, '## On the command line');

  it('has the commands and options of the program, and no others', () => {
    const [, ...rows] = tableIn(section);
    const commands = [...usage.matchAll(/^ {2}([a-z]+) /gm)].map(([, command]) => command);
    expect(rows.map(([command]) => plain(command).split(' ')[0])).toEqual(commands);
    const options = (text: string): readonly string[] => [...new Set(text.match(/--(?!silent)[a-z]+/g))].sort();
    expect(options(section)).toEqual(options(usage));
  });

  it('has the exit codes of the program', () => {
    const sheet = 'src/starters/harbour-buoy-uplink.budget.json';
    expect(section).toMatch(
      /\| 0 +\| computed; .*\n\| 1 +\| .*error finding or an unmet.*\n\| 2 +\| bad usage or a bad file/,
    );
    expect(run(['evaluate', sheet], world).exitCode).toBe(0);
    expect(run(['check', 'test/docs/two-interferers.budget.json'], world).exitCode).toBe(1);
    const unknown = readFileSync(`${ROOT}test/docs/two-interferers.budget.json`, 'utf8').replace(
      '"entry": "N + I"',
      '"entry": "", "requirement": { "atMost": "-95 dBm" }',
    );
    expect(run(['check', 'unknown'], { readFile: () => Buffer.from(unknown) }).exitCode).toBe(1);
    expect(run(['evaluate', 'package.json'], world)).toMatchObject({ exitCode: 2, results: '' });
    expect(run(['judge', sheet], world)).toMatchObject({ exitCode: 2, results: '' });
  });

  const [, ...examples] = section.split('```sh\n');
  const shown = examples.map((example) => {
    const [command = '', output = ''] = example.split('```\n\n```text\n');
    return { command: command.trim(), output: output.slice(0, output.indexOf('```')) };
  });

  it('shows an example of each command', () => {
    expect(new Set(shown.map(({ command }) => command.split(' ')[5]))).toEqual(
      new Set(['check', 'evaluate', 'explain', 'functions', 'trials', 'sensitivity', 'sweep', 'solve']),
    );
  });

  it.each(shown)('prints what is shown: $command', ({ command, output }) => {
    const [start, ...words] = command.split(' -- ').flatMap((part, index) => (index === 0 ? [part] : part.split(' ')));
    expect(start).toBe('npm run --silent levelwright');
    expect(run(words, world).results).toBe(output);
  });

  it('names the file that npm pack makes', () => {
    const { name, version } = JSON.parse(readFileSync(`${ROOT}package.json`, 'utf8')) as Record<string, string>;
    expect(section).toContain(`npm install ${String(name)}-${String(version)}.tgz`);
  });
});

describe('the file', () => {
  const section = sectionOf(README, '## The file');
  const example = /```json\n([\s\S]*?)```/.exec(section)?.[1] ?? '';

  it('is shown by an example that is read without a message and computes', () => {
    const read = readWorksheetFile(example);
    expect(read).toMatchObject({ ok: true, value: { messages: [] } });
    if (!read.ok) return;
    const evaluation = new Evaluation(read.value.worksheet);
    expect(evaluation.sheetFindings()).toEqual([]);
    expect(evaluation.reading('l3', 'night').requirement).toMatchObject({ met: true });
  });

  it('has every field of a line, in the example or named behind it', () => {
    const named = section.slice(section.indexOf('A line may also have'), section.indexOf('The JSON Schema'));
    const fields = [...example.matchAll(/"(\w+)":/g), ...named.matchAll(/`(\w+)`/g)].map(([, field]) => field);
    expect(LINE_KEYS.filter((field) => !fields.includes(field))).toEqual([]);
  });

  it('tells the limits that hold', () => {
    const mebibytes = FILE_BYTES_LIMIT / 1024 / 1024;
    const limits = `over ${String(mebibytes)} MiB, with more than ${LINES_LIMIT.toLocaleString('en-GB')} lines or nested deeper than ${String(NESTING_LIMIT)} is refused`;
    expect(section.replace(/\s+/g, ' ')).toContain(limits);
  });
});

it('says the cautions word for word', () => {
  const section = sectionOf(README, '## Cautions');
  expect(section.match(/^- .+$/gm)).toEqual(CAUTIONS.map((caution) => `- ${caution}`));
});

it('tells the address and the options of npm start', () => {
  const server = readFileSync(`${ROOT}src/command/serve.mjs`, 'utf8');
  const port = /const usualPort = (\d+);/.exec(server)?.[1];
  const section = sectionOf(README, '## Two commands');
  expect(section).toContain(`http://127.0.0.1:${String(port)}/`);
  expect(section).toContain('npm start -- --port 8080 --no-open');
  expect(server).toMatch(/options: \{ port: .*'no-open': /);
});

describe('what is claimed', () => {
  const [, ...rows] = tableIn(sectionOf(README, '## What is claimed, and the test that proves it'));

  it('is a list', () => {
    expect(rows.length).toBeGreaterThan(8);
  });

  it.each(rows.map(([claim = '', tests = '']) => ({ claim, tests })))('$claim', ({ tests }) => {
    const paths = [...tests.matchAll(/`([^`]+)`/g)].map(([, path = '']) => path);
    expect(paths.length).toBeGreaterThan(0);
    for (const path of paths) {
      expect(path).toMatch(/^(test|e2e)\/.+\.(test|spec)\.ts$/);
      expect(existsSync(ROOT + path), path).toBe(true);
      expect(readFileSync(ROOT + path, 'utf8')).toMatch(/\b(it|[a-z]*[tT]est)(\.each)?\(/);
    }
  });
});
