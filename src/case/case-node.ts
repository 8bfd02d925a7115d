import type { Span } from '../diagnostics/problem.js';

/** A plain value of a case file with where it stands. */
export interface CaseScalar {
  readonly kind: 'scalar';
  readonly span: Span;
  readonly value: string | number | boolean | null;
  /** Offset in the file of the first character of the value's text, quotes and `>` aside. */
  readonly textStart: number;
}

/** Part of a case file: plain data with where they stand, free of anything of YAML's own. */
export type CaseNode =
  | {
      readonly kind: 'map';
      readonly span: Span;
      readonly entries: ReadonlyMap<string, { readonly keySpan: Span; readonly value: CaseNode }>;
    }
  | { readonly kind: 'list'; readonly span: Span; readonly items: readonly CaseNode[] }
  | CaseScalar;
