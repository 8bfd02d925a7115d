#!/usr/bin/env node
import { commandLine } from './command-line.js';
import { removeUnfinished } from './result-folder.js';

// A reader that stops reading (`| head`) is no defect.
for (const stream of [process.stdout, process.stderr]) {
  stream.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code === 'EPIPE') process.exit(0);
    throw error;
  });
}
for (const [signal, status] of [
  ['SIGINT', 130],
  ['SIGTERM', 143],
] as const) {
  process.on(signal, () => {
    removeUnfinished();
    process.exit(status);
  });
}

process.exitCode = await commandLine(process.argv.slice(2), {
  out: (text) => process.stdout.write(text),
  error: (text) => process.stderr.write(text),
  useColour: process.stdout.isTTY && !process.env['NO_COLOR'],
});
