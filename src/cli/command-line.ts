import yargs, { type Argv } from 'yargs';
import type { ExitStatus } from './exit-status.js';
import { UsageError, type Streams } from './streams.js';
import { version } from './version.js';

const epilogue = `Every dimensional value of a case carries its unit: 12 mm, 350 degC, 0.085 mol/(kg s bar^2).
Results go to out/NAME, NAME being the case file's name, or to the folder given with --out:
profile.csv, pellet.csv, summary.json and charts. A folder is written whole or not at all.

Exit status: 0 done; 2 the case or the command line is at fault, nothing written; 3 the run
stopped short, what was computed is written; 1 anything else, a defect.

Estimates for study under the supervision of qualified engineers; local codes and licensed
practice govern.`;

/**
 * Runs one command line.
 *
 * @param words - arguments behind the program's name
 * @returns the exit status; never throws for the user's mistakes
 */
export async function commandLine(words: readonly string[], streams: Streams): Promise<ExitStatus> {
  let status: ExitStatus | undefined;
  let printed = '';
  let complaint: string | undefined;
  const parser = define((outcome) => {
    status = outcome;
  }, streams);
  try {
    await parser
      .fail((message, error) => {
        // A failure inside a command is not one of the command line.
        // eslint-disable-next-line @typescript-eslint/no-unnecessary-condition -- yargs hands in null, whatever its types say
        if (error && !message) throw error;
        complaint ??= message.startsWith('Not enough non-option') ? 'Name at least one case file.' : message;
      })
      .parseAsync([...words], {}, (_error, _argv, output) => {
        printed = output;
      });
    if (complaint !== undefined) throw new UsageError(complaint);
  } catch (error) {
    if (!(error instanceof UsageError)) return reportDefect(error, words, streams);
    streams.error(`${error.message}\nSee \`bedwright --help\`.\n`);
    return 2;
  }
  if (printed !== '') streams.out(`${printed}\n`);
  return status ?? (printed === '' ? 2 : 0);
}

function define(finish: (status: ExitStatus) => void, streams: Streams): Argv {
  const caseFiles = (command: Argv): Argv<{ cases: string[] }> =>
    command.positional('cases', {
      type: 'string',
      array: true,
      demandOption: true,
      describe: 'case files (YAML)',
    });
  return yargs()
    .scriptName('bedwright')
    .usage('$0 <command>\n\nPacked-bed catalytic reactors with reaction and diffusion solved in the pellet.')
    .exitProcess(false)
    .strict()
    .recommendCommands()
    .version(version)
    .help()
    .alias('help', 'h')
    .wrap(100)
    .command(
      'run <cases..>',
      'solve cases and write profiles, charts and a summary',
      (command) =>
        caseFiles(command)
          .option('out', {
            type: 'string',
            requiresArg: true,
            describe: 'result folder; with several cases the folder that receives theirs',
          })
          .option('charts', {
            type: 'boolean',
            default: true,
            describe: 'draw charts; --no-charts leaves them out',
          })
          .option('quiet', { type: 'boolean', default: false, describe: 'print faults only' })
          .option('json', { type: 'boolean', default: false, describe: 'print the outcome as JSON' })
          .option('debug', { type: 'boolean', default: false, describe: 'show where a defect happened' })
          .example('$0 run cases/salt-cooled-oxidation.yaml', 'results in out/salt-cooled-oxidation')
          .example('$0 run a.yaml b.yaml --out study --no-charts', 'results in study/a and study/b'),
      async ({ cases, out, quiet, json, charts }) => {
        const { runCommand } = await import('./run-command.js');
        finish(await runCommand({ cases, out, quiet, json, charts }, streams));
      },
    )
    .command(
      'check <cases..>',
      'look for faults, list assumptions and the groups at the inlet; writes nothing',
      (command) =>
        caseFiles(command)
          .option('quiet', { type: 'boolean', default: false, describe: 'print faults only' })
          .option('json', { type: 'boolean', default: false, describe: 'print the outcome as JSON' })
          .option('debug', { type: 'boolean', default: false, describe: 'show where a defect happened' })
          .example('$0 check cases/*.yaml', 'check every case of a folder'),
      async ({ cases, quiet, json }) => {
        const { checkCommand } = await import('./check-command.js');
        finish(checkCommand({ cases, quiet, json }, streams));
      },
    )
    .completion('completion', 'print a script for shell completion')
    .demandCommand(1, 'Say what to do: `bedwright run CASE` or `bedwright check CASE`.')
    .epilogue(epilogue);
}

function reportDefect(error: unknown, words: readonly string[], streams: Streams): ExitStatus {
  const text = error instanceof Error ? error.message : String(error);
  streams.error(`A defect of bedwright: ${text}\n`);
  if (words.includes('--debug') && error instanceof Error) streams.error(`${error.stack ?? ''}\n`);
  else streams.error('Please report it with the case and the output of the same command with --debug.\n');
  return 1;
}
