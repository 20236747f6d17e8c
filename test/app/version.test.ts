// The version shown is the package's.
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

import { VERSION } from '../../src/app/version';

it('is the version of package.json', () => {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  expect(VERSION).toBe((JSON.parse(text) as { version: string }).version);
});
