#!/usr/bin/env node
import { isatty } from 'node:tty';
import { commandLine } from './command-line.js';

const closed = new Set<NodeJS.WriteStream>();
for (const stream of [process.stdout, process.stderr]) {
  stream.on('error', (error: NodeJS.ErrnoException) => {
    closed.add(stream);
    // A reader that stops reading (`| head`) is no fault; the results are still written.
    if (error.code === 'EPIPE') return;
    if (stream === process.stdout) write(process.stderr, `The output cannot be printed: ${error.message}\n`);
    process.exit(2);
  });
}

function write(stream: NodeJS.WriteStream, text: string): void {
  if (!closed.has(stream)) stream.write(text);
}

process.exitCode = await commandLine(process.argv.slice(2), {
  out: (text) => write(process.stdout, text),
  error: (text) => write(process.stderr, text),
  useColour: isatty(1) && !process.env['NO_COLOR'] && process.env['TERM'] !== 'dumb',
});
