import type { Problem } from './problem.js';

/**
 * The user's case is at fault. Thrown once per case and carries all problems, errors and warnings alike.
 * `sourceText` is the file as read (empty when it could not be read), so that lines can be shown.
 */
export class CaseError extends Error {
  override readonly name = 'CaseError';
  readonly fileName: string;
  readonly sourceText: string;
  readonly problems: readonly Problem[];

  constructor(fileName: string, sourceText: string, problems: readonly Problem[]) {
    super(`${fileName}: ${problems.length} problem(s)`);
    this.fileName = fileName;
    this.sourceText = sourceText;
    this.problems = problems;
  }
}
