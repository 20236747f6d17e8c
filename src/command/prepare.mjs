// Builds the page and the command after an install, so that both are ready to run. An install without the build tools
// (`npm ci --omit=dev`) has nothing to build with, and that is no error.
import { existsSync } from 'node:fs';
import { join } from 'node:path';

import { freshenCommand, freshenPage, root } from './freshness.mjs';

if (existsSync(join(root, 'node_modules/vite'))) {
  freshenPage();
  freshenCommand();
}
