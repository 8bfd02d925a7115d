import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { solveReactor } from '../bed/solve-reactor.js';
import { CaseError } from '../diagnostics/case-error.js';
import {
  formatCaseError,
  formatProblems,
  reportProblems,
  visibleText,
} from '../diagnostics/format-problem.js';
import { pelletCsv, profileCsv } from '../output/profile-csv.js';
import { summarise, type Json } from '../output/summary.js';
import { terminalReport } from '../output/terminal-report.js';
import { gravest, type ExitStatus } from './exit-status.js';
import { loadCase } from './load-case.js';
import { reportDefect } from './report-defect.js';
import { checkTarget, folderNameOf, writeResultFolder, type ResultFile } from './result-folder.js';
import { UsageError, type Streams } from './streams.js';
import { uninterrupted } from './uninterrupted.js';
import { version } from './version.js';

export interface RunOptions {
  readonly cases: readonly string[];
  /** Result folder for one case, parent of the result folders for several. */
  readonly out: string | undefined;
  readonly quiet: boolean;
  readonly json: boolean;
  readonly charts: boolean;
  readonly debug: boolean;
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

interface Outcome {
  readonly status: ExitStatus;
  readonly outcome: Json;
}

async function runOne(path: string, target: string, options: RunOptions, streams: Streams): Promise<Outcome> {
  try {
    checkTarget(target);
    return await solveOne(path, target, options, streams);
  } catch (error) {
    return refusal(error, path, options, streams);
  }
}

async function solveOne(
  path: string,
  target: string,
  options: RunOptions,
  streams: Streams,
): Promise<Outcome> {
  const loaded = loadCase(path);
  const { specification, fileName: caseFile, hash: caseHash } = loaded;
  if (!options.json && loaded.warnings.length > 0) {
    streams.error(`${formatProblems(loaded.warnings, path, loaded.source)}\n\n`);
  }
  const begin = performance.now();
  const result = solveReactor(specification);
  const seconds = (performance.now() - begin) / 1000;
  const files: ResultFile[] = [
    { name: 'profile.csv', content: profileCsv(result) },
    { name: 'pellet.csv', content: pelletCsv(result) },
    { name: 'case.yaml', content: loaded.bytes },
    ...loaded.speciesFiles.map(({ name, bytes }) => ({ name, content: bytes })),
  ];
  if (options.charts) {
    const { drawCharts } = await import('../output/draw-charts.js');
    files.push(...drawCharts(result, specification));
  }
  const names = [...files.map(({ name }) => name), 'summary.json'];
  const speciesFiles = loaded.speciesFiles.map(({ name, hash }) => ({ name, hash }));
  const provenance = { tool: 'bedwright', version, caseFile, caseHash, speciesFiles, files: names } as const;
  const summary = summarise(result, specification, provenance, seconds);
  files.push({ name: 'summary.json', content: `${JSON.stringify(summary, null, 2)}\n` });
  await uninterrupted(() => writeResultFolder(target, files));
  if (!options.quiet && !options.json) {
    const report = terminalReport(result, specification, streams.useColour);
    streams.out(
      `${report}\n\nResults are in ${visibleText(target)}\n${options.cases.length > 1 ? '\n' : ''}`,
    );
  } else if (result.stop && !options.json) {
    const { position, message } = result.stop;
    streams.error(`${visibleText(path)}: stopped at ${position.toPrecision(4)} m: ${message}\n`);
  }
  const status: ExitStatus = result.status === 'complete' ? 0 : 3;
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
}

/** What keeps one case from being run; the others are run all the same. */
function refusal(error: unknown, path: string, options: RunOptions, streams: Streams): Outcome {
  const nothing = { folder: null, summary: null };
  if (error instanceof CaseError) {
    if (!options.json) streams.error(`${formatCaseError(error)}\n\n`);
    const problems = reportProblems(error.problems, error.fileName, error.sourceText) as unknown as Json;
    return { status: 2, outcome: { case: path, exit_status: 2, ...nothing, problems } };
  }
  const status = error instanceof UsageError ? 2 : 1;
  const message = error instanceof Error ? error.message : String(error);
  if (status === 1) streams.error(`${visibleText(path)}: ${reportDefect(error, options.debug)}`);
  else if (!options.json) streams.error(visibleText(`${path}: ${message}`) + '\n');
  return { status, outcome: { case: path, exit_status: status, ...nothing, problems: [], message } };
}
