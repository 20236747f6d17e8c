/** Entry of the command line: hands arguments to `run` and its answer to the streams. */
import { readFileSync } from 'node:fs';
import { run } from './run';

// A reader that stops early (`| head`) is no error.
for (const stream of [process.stdout, process.stderr])
  stream.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EPIPE') throw error;
    process.exit();
  });

const answer = run(process.argv.slice(2), {
  readFile: (path) => readFileSync(path),
  tellProgress: (sentence) => process.stderr.write(`${sentence}\n`),
});
process.stderr.write(answer.messages);
process.stdout.write(answer.results);
process.exitCode = answer.exitCode;
