// One configuration for the page, the command and the unit tests. What must stay true: all three resolve
// hot-formula-parser's grammar module through the same alias, and the built page loads nothing from elsewhere.
import { fileURLToPath } from 'node:url';

import { svelte } from '@sveltejs/vite-plugin-svelte';
import type { Plugin } from 'vite';
import { defineConfig } from 'vitest/config';
import type { ViteUserConfig } from 'vitest/config';

const path = (relative: string): string => fileURLToPath(new URL(relative, import.meta.url));

// The package's export map hides its grammar from imports; the grammar alone is wanted, not the function library.
const alias = {
  // The same library without the helpers for browsers that cannot run this page anyway.
  dexie: path('./node_modules/dexie/dist/modern/dexie.mjs'),
  'hot-formula-parser/grammar': path('./node_modules/hot-formula-parser/grammar-parser/grammar-parser.mjs'),
};

/** The development server injects inline styles, which the page's policy forbids; the built page keeps the policy. */
const dropPolicyInDevelopment: Plugin = {
  name: 'drop-policy-in-development',
  apply: 'serve',
  transformIndexHtml: (html) => html.replace(/<meta\s+http-equiv="Content-Security-Policy"[^>]*>/, ''),
};

const page: ViteUserConfig = {
  root: path('./src'),
  publicDir: path('./static'),
  plugins: [svelte({ configFile: path('./svelte.config.js') }), dropPolicyInDevelopment],
  resolve: { alias },
  build: {
    outDir: path('./dist'),
    emptyOutDir: true,
    target: 'es2022',
    // Inlined data: fonts and images would be stopped by the content security policy.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
    // Importing a module of the project does nothing but define, save for styles and the start itself. Without this the index
    // of a folder draws all of that folder into the script for the start, also what only a dialog uses.
    rolldownOptions: {
      treeshake: {
        moduleSideEffects: [
          { test: /[\\/]src[\\/](?:.*[\\/])?(?!main\.ts$)[^\\/?]*\.(?:ts|svelte)$/, sideEffects: false },
        ],
      },
    },
  },
  worker: { format: 'es' },
  preview: {
    host: '127.0.0.1',
    // What a policy in the page itself cannot say.
    headers: {
      'Content-Security-Policy': "frame-ancestors 'none'",
      'Cross-Origin-Opener-Policy': 'same-origin',
      'X-Content-Type-Options': 'nosniff',
      'Cache-Control': 'no-cache',
    },
  },
  server: { host: '127.0.0.1' },
};

/** A Node build of one entry with every dependency inside, so that it starts fast and runs without node_modules. */
const nodeProgram = (entry: string, outDir: string, name: string, banner: string): ViteUserConfig => ({
  root: path('./src'),
  publicDir: false,
  resolve: { alias },
  ssr: { noExternal: true, target: 'node' },
  build: {
    ssr: path(entry),
    outDir: path(outDir),
    emptyOutDir: true,
    target: 'node20',
    minify: true,
    rolldownOptions: { output: { format: 'es', entryFileNames: name, codeSplitting: false, banner } },
  },
});

const unitTests: ViteUserConfig = {
  root: path('./'),
  publicDir: false,
  plugins: [svelte({ configFile: path('./svelte.config.js') })],
  resolve: { alias },
  test: {
    allowOnly: false,
    // A slow machine is no failure: only a test that hangs runs into this.
    testTimeout: 120_000,
    hookTimeout: 120_000,
    server: { deps: { inline: ['hot-formula-parser'] } },
    coverage: { provider: 'v8', include: ['src/**/*.ts'], reportsDirectory: 'node_modules/.cache/coverage' },
    projects: [
      {
        extends: true,
        test: { name: 'unit', environment: 'node', include: ['test/**/*.test.ts'], exclude: ['test/ui/**'] },
      },
      {
        extends: true,
        resolve: { conditions: ['browser'] },
        test: { name: 'dom', environment: 'jsdom', include: ['test/ui/**/*.test.ts'] },
      },
    ],
  },
};

export default defineConfig(({ mode }) => {
  if (process.env['VITEST'] !== undefined) return unitTests;
  if (mode === 'command') {
    return nodeProgram('./src/command/main.ts', './dist-command', 'levelwright.js', '#!/usr/bin/env node');
  }
  if (mode === 'bench') {
    return nodeProgram('./test/bench/main.ts', './node_modules/.cache/levelwright-bench', 'bench.js', '');
  }
  return page;
});
