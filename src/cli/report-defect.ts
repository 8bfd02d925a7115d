import { visibleText } from '../diagnostics/format-problem.js';

/** What a user sees of a failure that is none of theirs: one line and a request; the stack with `--debug` alone. */
export function reportDefect(error: unknown, debug: boolean): string {
  const text = error instanceof Error ? error.message : String(error);
  const more =
    debug && error instanceof Error
      ? visibleLines(error.stack ?? '')
      : 'Please report it with the case and the output of the same command with --debug.';
  return `A defect of bedwright: ${visibleText(text)}\n${more}\n`;
}

/** Text of several lines with its control characters made visible. */
export function visibleLines(text: string): string {
  return text.split('\n').map(visibleText).join('\n');
}
