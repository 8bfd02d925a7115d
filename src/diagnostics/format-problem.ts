/** Problems as text for a terminal: place, what was found, what was expected, how to mend it, and the line with a caret. */
import type { CaseError } from './case-error.js';
import { createLineIndex, type LinePlace } from './line-index.js';
import type { Problem } from './problem.js';

/** At most this many problems are shown at once; the error object holds them all. */
const mostShown = 50;
/** Widest part of a source line that is shown. */
const lineWidth = 100;

/** Text from a stranger made harmless for a terminal: control characters and direction marks become visible codes. */
export function visibleText(text: string): string {
  return text.replace(invisible, (character) => {
    if (character === '\t') return ' ';
    return `<U+${character.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0')}>`;
  });
}

/** Control characters, zero-width characters, marks of direction, line and paragraph separators, byte-order mark. */
const invisible = /[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu;

/** In the order of the file; errors before warnings at one place. */
function sortProblems(problems: readonly Problem[]): readonly Problem[] {
  const rank = { error: 0, warning: 1 };
  return [...problems].sort((a, b) => a.span.start - b.span.start || rank[a.severity] - rank[b.severity]);
}

/** One problem as a block of lines, without a line break at the end. */
function formatProblem(
  problem: Problem,
  fileName: string,
  sourceText: string,
  placeOf: (offset: number) => LinePlace,
): string {
  const place = placeOf(problem.span.start);
  const kind = problem.severity === 'warning' ? 'warning: ' : '';
  const path = problem.path === '' ? '' : `  ${visibleText(problem.path)}`;
  // Of a file that could not be read there is no line to name.
  const where = sourceText === '' ? '' : `:${place.line}:${place.column}`;
  const lines = [
    `${visibleText(fileName)}${where}${path}`,
    `  ${kind}found ${visibleText(problem.found)}; expected ${visibleText(problem.expected)}`,
  ];
  if (problem.mend !== undefined) lines.push(`  ${visibleText(problem.mend)}`);
  const excerpt = excerptOf(sourceText, problem, place);
  return excerpt === undefined ? lines.join('\n') : [...lines, ...excerpt].join('\n');
}

/** All problems of a case, and how many more there are. */
export function formatProblems(problems: readonly Problem[], fileName: string, sourceText: string): string {
  const sorted = sortProblems(problems);
  const placeOf = createLineIndex(sourceText);
  const blocks = sorted
    .slice(0, mostShown)
    .map((problem) => formatProblem(problem, fileName, sourceText, placeOf));
  if (sorted.length > mostShown) blocks.push(`… and ${sorted.length - mostShown} more`);
  return blocks.join('\n\n');
}

/** A problem for machines. */
export interface ProblemReport extends LinePlace {
  readonly code: Problem['code'];
  readonly severity: Problem['severity'];
  readonly file: string;
  readonly path: string;
  readonly found: string;
  readonly expected: string;
  readonly mend: string | null;
}

/** All problems for machines, in the order of the file; the text is needed for lines and columns. */
export function reportProblems(
  problems: readonly Problem[],
  fileName: string,
  sourceText: string,
): readonly ProblemReport[] {
  const placeOf = createLineIndex(sourceText);
  return sortProblems(problems).map((problem) => ({
    code: problem.code,
    severity: problem.severity,
    file: fileName,
    ...placeOf(problem.span.start),
    path: problem.path,
    found: problem.found,
    expected: problem.expected,
    mend: problem.mend ?? null,
  }));
}

/** All problems of a case as text for a terminal, see {@link formatProblems}. */
export function formatCaseError(error: CaseError): string {
  return formatProblems(error.problems, error.fileName, error.sourceText);
}

/** The line with a caret below the fault; a long line is shown around the fault. */
function excerptOf(sourceText: string, problem: Problem, place: LinePlace): string[] | undefined {
  if (sourceText === '') return undefined;
  const lineStart = problem.span.start - (place.column - 1);
  const lineEnd = sourceText.indexOf('\n', lineStart);
  const written = sourceText.slice(lineStart, lineEnd < 0 ? undefined : lineEnd).replace(/\r$/, '');
  if (written.trim() === '') return undefined;
  // One sign for a tab: it may be the fault itself, and the caret below stays in its column.
  const line = written.replaceAll('\t', '→');
  const from = line.length <= lineWidth ? 0 : Math.max(0, place.column - 1 - Math.floor(lineWidth / 2));
  const shown = line.slice(from, from + lineWidth);
  const ahead = visibleText(shown.slice(0, place.column - 1 - from));
  const length = Math.max(
    1,
    Math.min(problem.span.end - problem.span.start, shown.length - (place.column - 1 - from)),
  );
  const marked = visibleText(shown.slice(place.column - 1 - from, place.column - 1 - from + length));
  const prefix = `  ${String(place.line)} | `;
  const cut = from > 0 ? '…' : '';
  const tail = from + lineWidth < line.length ? '…' : '';
  return [
    `${prefix}${cut}${visibleText(shown)}${tail}`,
    `${' '.repeat(prefix.length - 2)}| ${' '.repeat(cut.length + ahead.length)}${'^'.repeat(Math.max(1, marked.length))}`,
  ];
}
