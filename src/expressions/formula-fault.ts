import type { ProblemCode, Span } from '../diagnostics/problem.js';

/** Carries the first fault of a formula out of its reading; `parseFormula` alone catches it. */
export class FormulaFault extends Error {
  readonly code: ProblemCode;
  readonly span: Span;
  readonly found: string;
  readonly expected: string;
  readonly mend: string | undefined;
  constructor(code: ProblemCode, span: Span, found: string, expected: string, mend?: string) {
    super(found);
    this.code = code;
    // Often a token: only its place goes out.
    this.span = { start: span.start, end: span.end };
    this.found = found;
    this.expected = expected;
    this.mend = mend;
  }
}
