import { basename, join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { solveReactor } from '../bed/solve-reactor.js';
import { CaseError } from '../diagnostics/case-error.js';
import { formatCaseError, formatProblems, reportProblems } from '../diagnostics/format-problem.js';
import { pelletCsv, profileCsv } from '../output/profile-csv.js';
import { summarise, type Json } from '../output/summary.js';
import { terminalReport } from '../output/terminal-report.js';
import { gravest, type ExitStatus } from './exit-status.js';
import { loadCase } from './load-case.js';
import { checkTarget, folderNameOf, writeResultFolder, type ResultFile } from './result-folder.js';
import { UsageError, type Streams } from './streams.js';
import { version } from './version.js';

export interface RunOptions {
  readonly cases: readonly string[];
  /** Result folder for one case, parent of the result folders for several. */
  readonly out: string | undefined;
  readonly quiet: boolean;
  readonly json: boolean;
  readonly charts: boolean;
}

/** Solves each case and writes its results; a case at fault does not keep the others from being run. */
export async function runCommand(options: RunOptions, streams: Streams): Promise<ExitStatus> {
  const targets = resultFolders(options);
  const outcomes: Json[] = [];
  const statuses: ExitStatus[] = [];
  for (const [index, path] of options.cases.entries()) {
    const { status, outcome } = await runOne(path, targets[index]!, options, streams);
    statuses.push(status);
    outcomes.push(outcome);
  }
  if (options.json) streams.out(`${JSON.stringify(outcomes, null, 2)}\n`);
  return gravest(statuses);
}

function resultFolders({ cases, out }: RunOptions): string[] {
  const isSingle = cases.length === 1;
  const targets = cases.map((path) =>
    isSingle && out !== undefined ? out : join(out ?? 'out', folderNameOf(path)),
  );
  const twice = targets.find((target, index) => targets.indexOf(target) !== index);
  if (twice !== undefined)
    throw new UsageError(`two cases would write to ${twice}; run them with different --out`);
  return targets;
}

async function runOne(
  path: string,
  target: string,
  options: RunOptions,
  streams: Streams,
): Promise<{ status: ExitStatus; outcome: Json }> {
  const show = !options.quiet && !options.json;
  try {
    checkTarget(target);
    const loaded = loadCase(path);
    if (!options.json && loaded.warnings.length > 0) {
      streams.error(`${formatProblems(loaded.warnings, path, loaded.source)}\n\n`);
    }
    const { specification } = loaded;
    const begin = performance.now();
    const result = solveReactor(specification);
    const seconds = (performance.now() - begin) / 1000;
    const provenance = {
      tool: 'bedwright',
      version,
      caseFile: basename(path),
      caseHash: loaded.hash,
    } as const;
    const summary = summarise(result, specification, provenance, seconds);
    const files: ResultFile[] = [
      { name: 'profile.csv', content: profileCsv(result) },
      { name: 'pellet.csv', content: pelletCsv(result) },
      { name: 'summary.json', content: `${JSON.stringify(summary, null, 2)}\n` },
      { name: 'case.yaml', content: loaded.source },
    ];
    if (options.charts) {
      const { drawCharts } = await import('../output/draw-charts.js');
      files.push(...drawCharts(result, specification));
    }
    writeResultFolder(target, files);
    const status: ExitStatus = result.status === 'complete' ? 0 : 3;
    if (show) {
      streams.out(
        `${terminalReport(result, specification, streams.useColour)}\n\nResults are in ${target}\n`,
      );
    } else if (result.stop && !options.json) {
      streams.error(`${path}: stopped at ${result.stop.position.toPrecision(4)} m: ${result.stop.message}\n`);
    }
    const problems = reportProblems(loaded.warnings, path, loaded.source);
    return {
      status,
      outcome: {
        case: path,
        exit_status: status,
        folder: target,
        problems: problems as unknown as Json,
        summary,
      },
    };
  } catch (error) {
    if (error instanceof CaseError) {
      if (!options.json) streams.error(`${formatCaseError(error)}\n\n`);
      const problems = reportProblems(error.problems, error.fileName, error.sourceText);
      return {
        status: 2,
        outcome: {
          case: path,
          exit_status: 2,
          folder: null,
          problems: problems as unknown as Json,
          summary: null,
        },
      };
    }
    if (error instanceof UsageError) {
      if (!options.json) streams.error(`${path}: ${error.message}\n`);
      return {
        status: 2,
        outcome: { case: path, exit_status: 2, folder: null, message: error.message, summary: null },
      };
    }
    throw error;
  }
}
