/** Half-open range of character offsets in a text, `start <= end`. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

/** Every kind of fault a case file or a text inside it can have. Stable: scripts may rely on them. */
export type ProblemCode =
  | 'file_unreadable'
  | 'file_too_large'
  | 'not_text'
  | 'yaml_syntax'
  | 'yaml_forbidden'
  | 'duplicate_key'
  | 'empty_case'
  | 'unknown_key'
  | 'missing_key'
  | 'wrong_type'
  | 'wrong_value'
  | 'not_supported_yet'
  | 'bad_identifier'
  | 'unknown_name'
  | 'missing_unit'
  | 'unknown_unit'
  | 'wrong_dimension'
  | 'bad_quantity'
  | 'out_of_range'
  | 'bad_formula'
  | 'element_balance'
  | 'fraction_sum'
  | 'missing_property'
  | 'inconsistent'
  | 'thermodynamic_disagreement';

/**
 * A fault found in a text, before anyone knows which file the text came from.
 * Offsets count from the start of that text.
 */
export interface Fault {
  readonly code: ProblemCode;
  readonly severity: 'error' | 'warning';
  readonly span: Span;
  /** What stands there, as the reader would recognise it. */
  readonly found: string;
  /** What would have been accepted. */
  readonly expected: string;
  /** One way to put it right, in the imperative; absent when `expected` already says it. */
  readonly mend?: string;
}

/** A fault placed in a case file. `span` counts from the start of the file; `path` is dotted, empty for the whole file. */
export interface Problem extends Fault {
  readonly path: string;
}

/** Receives faults while a check goes on; checks never throw for the user's mistakes. */
export type ReportFault = (fault: Fault) => void;
export type ReportProblem = (problem: Problem) => void;
