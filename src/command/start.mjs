// Runs the command line from the repository: freshens the built command, then hands this process over to it.
import { pathToFileURL } from 'node:url';

import { freshenCommand } from './freshness.mjs';

await import(pathToFileURL(freshenCommand()).href);
