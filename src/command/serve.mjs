// Serves the built page to this machine alone, says where, and opens the default browser if there is one. What must stay
// true: the address is the same from day to day where possible, because browsers keep the worksheets by address.
import { spawn } from 'node:child_process';
import { parseArgs } from 'node:util';

import { preview } from 'vite';

import { freshenPage, root } from './freshness.mjs';

const usualPort = 4173;

const { values } = parseArgs({ options: { port: { type: 'string' }, 'no-open': { type: 'boolean', default: false } } });
const askedPort = values.port === undefined ? usualPort : Number(values.port);
if (!Number.isInteger(askedPort) || askedPort < 1 || askedPort > 65535) {
  process.stderr.write(`levelwright: --port takes a whole number from 1 to 65535, not "${values.port ?? ''}".\n`);
  process.exit(2);
}

/**
 * Opens the address in the default browser; says nothing when there is none, for the address is on the screen.
 * @param {string} address
 * @returns {void}
 */
const openBrowser = (address) => {
  const openers = { darwin: ['open'], win32: ['cmd', '/c', 'start', ''], linux: ['xdg-open'] };
  const [program, ...options] = openers[/** @type {keyof typeof openers} */ (process.platform)] ?? ['xdg-open'];
  const hasScreen = process.platform === 'darwin' || process.platform === 'win32' || hasDisplay();
  if (program === undefined || !hasScreen) return;
  const browser = spawn(program, [...options, address], { detached: true, stdio: 'ignore' });
  browser.on('error', () => browser.unref());
  browser.unref();
};

const hasDisplay = () => process.env['DISPLAY'] !== undefined || process.env['WAYLAND_DISPLAY'] !== undefined;

freshenPage();
const server = await preview({
  root,
  configFile: `${root}vite.config.ts`,
  logLevel: 'error',
  preview: { port: askedPort, strictPort: values.port !== undefined },
});
const bound = server.httpServer.address();
const port = bound !== null && typeof bound === 'object' ? bound.port : askedPort;
const address = `http://127.0.0.1:${String(port)}/`;
process.stdout.write(
  `\n  Levelwright is at  ${address}\n  Stop it with Ctrl+C. Your worksheets stay in your browser.\n\n`,
);
if (port !== askedPort) {
  process.stdout.write(
    `  Port ${String(askedPort)} is taken, perhaps by another Levelwright. A browser keeps worksheets by address: those kept\n` +
      `  under port ${String(askedPort)} are not shown here.\n\n`,
  );
}
if (!values['no-open']) openBrowser(address);
