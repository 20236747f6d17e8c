// Lint rules. Beside the general ones, this file holds the project's own law: which folder may import which, and which
// package belongs to which folder. The table `mayImport` is that law; everything else here only enforces it.
import { readFileSync } from 'node:fs';
import { dirname, relative, resolve } from 'node:path';

import js from '@eslint/js';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';

import svelteConfig from './svelte.config.js';

const source = resolve(import.meta.dirname, 'src');

/** Folders from the ground up: a folder may import those of the steps below its own, less the exceptions that follow. */
const steps = [
  ['base'],
  ['findings', 'radio'],
  ['quantity'],
  ['formula'],
  ['worksheet'],
  ['engine'],
  ['analysis', 'review', 'exchange'],
  ['starters'],
  ['jobs', 'store'],
  ['app'],
  ['ui'],
];

const below = (folder) => {
  const step = steps.findIndex((folders) => folders.includes(folder));
  return steps.slice(0, step).flat();
};

const without = (folders, excluded) => folders.filter((folder) => !excluded.includes(folder));

/** For each folder of src, the folders that it may import beside itself. */
const mayImport = {
  ...Object.fromEntries(steps.flat().map((folder) => [folder, below(folder)])),
  radio: ['base'],
  quantity: without(below('quantity'), ['radio']),
  command: without(steps.flat(), ['store', 'app', 'ui']),
};

/** For each package that src uses, where it may be imported: folders, or single files. */
const packageHomes = {
  'hot-formula-parser': ['formula/grammar.ts'],
  dexie: ['store'],
  valibot: ['exchange', 'store'],
  svelte: ['app', 'ui', 'main.ts'],
  node: ['command'],
  vite: ['command/serve.mjs'],
};

const importDirection = {
  meta: {
    type: 'problem',
    schema: [],
    messages: {
      folder: '{{from}} may not import {{to}}: imports point one way (see mayImport in eslint.config.js).',
      place: '"{{name}}" may be imported in {{homes}} alone.',
      unknown: '"{{name}}" has no place in packageHomes (eslint.config.js).',
      extension: 'Imports are written without file extension.',
      outside: 'An import may not leave src.',
      entry: '{{from}} is in no folder that mayImport names (eslint.config.js).',
    },
  },
  create(context) {
    const file = relative(source, context.filename).replaceAll('\\', '/');
    const folder = file.includes('/') ? file.slice(0, file.indexOf('/')) : '';

    const checkPackage = (node, specifier) => {
      const name = specifier.startsWith('node:') ? 'node' : specifier.split('/')[specifier.startsWith('@') ? 1 : 0];
      const homes = packageHomes[name];
      if (homes === undefined) return context.report({ node, messageId: 'unknown', data: { name: specifier } });
      if (homes.includes(folder) || homes.includes(file)) return undefined;
      return context.report({ node, messageId: 'place', data: { name: specifier, homes: homes.join(', ') } });
    };

    const checkRelative = (node, specifier) => {
      if (/\.(ts|js|mjs)$/.test(specifier) && !file.endsWith('.mjs')) context.report({ node, messageId: 'extension' });
      const target = relative(source, resolve(dirname(context.filename), specifier)).replaceAll('\\', '/');
      if (target.startsWith('..')) return context.report({ node, messageId: 'outside' });
      const targetFolder = target.split('/')[0] ?? '';
      if (folder === '' || targetFolder === folder) return undefined;
      const allowed = mayImport[folder];
      if (allowed === undefined) return context.report({ node, messageId: 'entry', data: { from: folder } });
      if (allowed.includes(targetFolder)) return undefined;
      return context.report({ node, messageId: 'folder', data: { from: folder, to: targetFolder } });
    };

    const check = (node) => {
      if (node.source === null || typeof node.source.value !== 'string') return;
      const specifier = node.source.value;
      if (specifier.startsWith('.')) checkRelative(node.source, specifier);
      else checkPackage(node.source, specifier);
    };

    return {
      ImportDeclaration: check,
      ImportExpression: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
      TSImportType: check,
    };
  },
};

const noDefaultExport = {
  selector: 'ExportDefaultDeclaration',
  message: 'Export by name: a default export has no name to search for.',
};
const noStaticStyle = {
  selector: 'SvelteAttribute[key.name="style"]',
  message: 'A style attribute is stopped by the content security policy: use a class or a style: directive.',
};
const wholeTests = [
  {
    selector:
      'MemberExpression[object.name=/^(it|test|describe|suite|bench)$/][property.name=/^(only|skip|skipIf|runIf|todo|fixme|fails|fail)$/]',
    message: 'Every test runs and can fail: none is skipped, singled out or expected to fail.',
  },
  {
    selector:
      'MemberExpression[object.property.name=/^(describe|concurrent|sequential)$/][property.name=/^(only|skip|fixme)$/]',
    message: 'Every test runs and can fail: none is skipped or singled out.',
  },
  { selector: 'CallExpression[callee.name=/^(xit|xtest|xdescribe|fit|fdescribe)$/]', message: 'Every test runs.' },
];

const browserGlobals = [
  'window',
  'document',
  'navigator',
  'localStorage',
  'sessionStorage',
  'indexedDB',
  'location',
  'history',
  'fetch',
];

const ignored = readFileSync(resolve(import.meta.dirname, '.gitignore'), 'utf8')
  .split('\n')
  .filter(Boolean);

export default ts.config(
  { ignores: ignored },
  js.configs.recommended,
  ts.configs.strictTypeChecked,
  svelte.configs.recommended,
  {
    languageOptions: {
      parserOptions: {
        projectService: true,
        tsconfigRootDir: import.meta.dirname,
        extraFileExtensions: ['.svelte'],
      },
    },
    rules: {
      'no-eval': 'error',
      'no-implied-eval': 'error',
      'no-new-func': 'error',
      'no-console': 'error',
      eqeqeq: 'error',
      'no-restricted-syntax': ['error', noDefaultExport],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      '@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      'no-undef': 'off',
    },
  },
  {
    files: ['**/*.svelte', '**/*.svelte.ts'],
    languageOptions: { parserOptions: { parser: ts.parser, svelteConfig }, globals: globals.browser },
    rules: {
      'no-restricted-syntax': ['error', noDefaultExport, noStaticStyle],
      'svelte/no-at-html-tags': 'error',
      'svelte/require-each-key': 'error',
      'svelte/button-has-type': 'error',
      'svelte/no-target-blank': 'error',
      'prefer-const': 'off',
      'svelte/prefer-const': ['error', { excludedRunes: ['$props', '$derived'] }],
    },
  },
  {
    files: ['src/**'],
    plugins: { levelwright: { rules: { 'import-direction': importDirection } } },
    rules: { 'levelwright/import-direction': 'error' },
  },
  {
    files: [
      'src/{base,findings,quantity,radio,formula,worksheet,engine,analysis,review,exchange,starters,jobs,command}/**',
    ],
    rules: {
      'no-restricted-globals': [
        'error',
        ...browserGlobals.map((name) => ({ name, message: 'This folder also runs outside the browser.' })),
      ],
    },
  },
  {
    files: ['test/**', 'e2e/**'],
    rules: { 'no-restricted-syntax': ['error', noDefaultExport, ...wholeTests] },
  },
  {
    files: ['*.config.{js,ts}', 'e2e/playwright.config.ts'],
    rules: { 'no-restricted-syntax': 'off' },
  },
  {
    files: ['**/*.js', '**/*.mjs'],
    extends: [ts.configs.disableTypeChecked],
    languageOptions: { globals: globals.node },
  },
);
