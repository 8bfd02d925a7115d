/**
 * Bedwright as a library: read a case, solve it, look at the result. All data are plain and in SI.
 *
 * @example
 * const { specification } = readCase(text, 'tube.yaml');
 * const result = solveReactor(specification);
 * result.outlet.temperature; // K
 *
 * @module
 */
export { inspectReactor, type Inspection } from './bed/inspect-reactor.js';
export type { ReactorSpecification } from './bed/reactor-specification.js';
export type { RunResult } from './bed/run-result.js';
export { solveReactor } from './bed/solve-reactor.js';
export { decodeCase } from './case/decode-case.js';
export { readCase, type ReadCase } from './case/read-case.js';
export { CaseError } from './diagnostics/case-error.js';
export { formatCaseError } from './diagnostics/format-problem.js';
export type { Problem } from './diagnostics/problem.js';
export { pelletCsv, profileCsv } from './output/profile-csv.js';
export { summarise, type Provenance } from './output/summary.js';
