import { inspectReactor } from '../bed/inspect-reactor.js';
import { CaseError } from '../diagnostics/case-error.js';
import {
  formatCaseError,
  formatProblems,
  reportProblems,
  visibleText,
} from '../diagnostics/format-problem.js';
import type { Json } from '../output/summary.js';
import { bullet, significant, table } from '../output/terminal-report.js';
import { gravest, type ExitStatus } from './exit-status.js';
import { loadCase } from './load-case.js';
import { reportDefect } from './report-defect.js';
import type { Streams } from './streams.js';

export interface CheckOptions {
  readonly cases: readonly string[];
  readonly quiet: boolean;
  readonly json: boolean;
  readonly debug: boolean;
}

/** Everything short of integrating: faults, warnings, assumptions, dimensionless groups at the inlet. Writes no file. */
export function checkCommand(options: CheckOptions, streams: Streams): ExitStatus {
  const outcomes = options.cases.map((path) => checkOne(path, options, streams));
  if (options.json) {
    streams.out(
      `${JSON.stringify(
        outcomes.map(({ outcome }) => outcome),
        null,
        2,
      )}\n`,
    );
  }
  return gravest(outcomes.map(({ status }) => status));
}

function checkOne(
  path: string,
  options: CheckOptions,
  streams: Streams,
): { status: ExitStatus; outcome: Json } {
  try {
    const { specification, warnings, source } = loadCase(path);
    const { groups, assumptions } = inspectReactor(specification);
    if (!options.json && warnings.length > 0) streams.error(`${formatProblems(warnings, path, source)}\n\n`);
    if (!options.json && !options.quiet) {
      const rows = groups.map(({ name, of, value, unit }): readonly [string, string] => [
        of === undefined ? name : `${name}, ${of}`,
        `${significant(value, 4)}${unit === '1' ? '' : ` ${unit}`}`,
      ]);
      const notes = assumptions.map(({ about, statement, source: origin }) =>
        bullet(visibleText(`${about}: ${statement} (${origin})`)),
      );
      streams.out(
        [
          `${visibleText(specification.title)}: no faults found`,
          `At the inlet\n${table(rows)}`,
          `Taken for granted\n${notes.join('\n')}`,
        ].join('\n\n') + (options.cases.length > 1 ? '\n\n' : '\n'),
      );
    }
    const problems = reportProblems(warnings, path, source);
    return {
      status: 0,
      outcome: {
        case: path,
        exit_status: 0,
        problems: problems as unknown as Json,
        groups: groups.map((group) => ({ ...group, of: group.of ?? null })),
        assumptions: assumptions.map((assumption) => ({ ...assumption })),
      },
    };
  } catch (error) {
    if (!(error instanceof CaseError)) {
      streams.error(`${visibleText(path)}: ${reportDefect(error, options.debug)}`);
      const message = error instanceof Error ? error.message : String(error);
      return { status: 1, outcome: { case: path, exit_status: 1, problems: [], message } };
    }
    if (!options.json) streams.error(`${formatCaseError(error)}\n\n`);
    const problems = reportProblems(error.problems, error.fileName, error.sourceText);
    return { status: 2, outcome: { case: path, exit_status: 2, problems: problems as unknown as Json } };
  }
}
