import yargs, { type Argv } from 'yargs';
import { didYouMean } from '../diagnostics/nearest-name.js';
import type { ExitStatus } from './exit-status.js';
import { reportDefect, visibleLines } from './report-defect.js';
import { UsageError, type Streams } from './streams.js';
import { version } from './version.js';

const epilogue = `Every dimensional value of a case carries its unit: 12 mm, 350 degC, 0.085 mol/(kg s bar^2).
Results go to out/NAME, NAME being the case file's name, or to the folder given with --out:
profile.csv, pellet.csv, summary.json and charts. A folder is written whole or not at all.

Exit status: 0 done; 2 the case or the command line is at fault, nothing written; 3 the run
stopped short, what was computed is written; 1 anything else, a defect. With several cases the
gravest counts: 1, then 2, then 3.

Estimates for study under the supervision of qualified engineers; local codes and licensed
practice govern.`;

const commandNames = ['run', 'check', 'species', 'completion'];
const commonOptions = ['--quiet', '--json', '--debug', '--help', '--version'];
/** Options of one command alone, by its name. */
const ownOptions: Readonly<Record<string, readonly string[]>> = {
  run: ['--out', '--charts', '--no-charts'],
  species: ['--from', '--to', '--step', '--out'],
};

/** What the command line asks for, once it is known to be without fault. */
type Action = () => Promise<ExitStatus>;

/**
 * Runs one command line.
 *
 * @param words - arguments behind the program's name
 * @returns the exit status; never throws for the user's mistakes
 */
export async function commandLine(words: readonly string[], streams: Streams): Promise<ExitStatus> {
  let action: Action | undefined;
  let printed = '';
  let complaint: string | undefined;
  const parser = define((chosen) => {
    action = chosen;
  }, streams);
  try {
    await parser
      .fail((message, error) => {
        // eslint-disable-next-line @typescript-eslint/no-unnecessary-condition -- yargs hands in null, whatever its types say
        if (error && !message) throw error;
        complaint ??= reword(message, words);
      })
      .parseAsync(plainWords(words), {}, (_error, _argv, output) => {
        printed = output;
      });
    // yargs calls the command's handler in spite of a complaint, so that nothing may be done before this line.
    if (complaint !== undefined) throw new UsageError(complaint);
    if (printed !== '') streams.out(`${printed}\n`);
    return action === undefined ? 0 : await action();
  } catch (error) {
    if (!(error instanceof UsageError)) {
      streams.error(reportDefect(error, words.includes('--debug')));
      return 1;
    }
    streams.error(`${visibleLines(error.message)}\nSee \`bedwright --help\`.\n`);
    return 2;
  }
}

/** Words behind `--` are case files, even with a dash in front. */
function plainWords(words: readonly string[]): string[] {
  const end = words.indexOf('--');
  if (end < 0) return [...words];
  const files = words.slice(end + 1).map((word) => (word.startsWith('-') ? `./${word}` : word));
  return [...words.slice(0, end), ...files];
}

/** The complaint of yargs in our words, with the nearest command or option. */
function reword(message: string, words: readonly string[]): string {
  if (message.startsWith('Not enough non-option')) return 'Name at least one case file.';
  const unknown = /^Unknown (?:argument|command)s?: (.*)$/s.exec(message)?.[1]?.split(', ');
  if (unknown === undefined) return message;
  const first = words.find((word) => !word.startsWith('-')) ?? '';
  if (!commandNames.includes(first) && unknown.includes(first)) {
    return complain('command', first, commandNames);
  }
  const known = [...commonOptions, ...(Object.hasOwn(ownOptions, first) ? ownOptions[first]! : [])];
  const asTyped = (name: string): string =>
    words.includes(name) ? name : `${name.length === 1 ? '-' : '--'}${name}`;
  return unknown.map((name) => complain('argument', asTyped(name), known)).join('\n');
}

function complain(what: string, name: string, known: readonly string[]): string {
  const hint = didYouMean(name, known);
  return `Unknown ${what}: ${name}${hint === undefined ? '' : `; ${hint}`}`;
}

function define(choose: (action: Action) => void, streams: Streams): Argv {
  return yargs()
    .scriptName('bedwright')
    .usage('$0 <command>\n\nPacked-bed catalytic reactors with reaction and diffusion solved in the pellet.')
    .exitProcess(false)
    .locale('en')
    .parserConfiguration({ 'camel-case-expansion': false, 'dot-notation': false })
    .strict()
    .version(version)
    .help()
    .alias('help', 'h')
    .wrap(100)
    .command(
      'run <cases..>',
      'solve cases and write profiles, charts and a summary',
      (command) =>
        common(command)
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
          .example('$0 run cases/salt-cooled-oxidation.yaml', 'results in out/salt-cooled-oxidation')
          .example('$0 run a.yaml b.yaml --out study --no-charts', 'results in study/a and study/b'),
      ({ cases, out, quiet, json, charts, debug }) =>
        choose(async () => {
          // Of an option given twice yargs makes an array, whatever its types say.
          if (Array.isArray(out)) throw new UsageError('Give --out once.');
          if (out === '') throw new UsageError('--out names no folder.');
          const { runCommand } = await import('./run-command.js');
          return runCommand({ cases, out, quiet, json, charts, debug }, streams);
        }),
    )
    .command(
      'check <cases..>',
      'look for faults, list assumptions and the groups at the inlet; writes nothing',
      (command) => common(command).example('$0 check cases/*.yaml', 'check every case of a folder'),
      ({ cases, quiet, json, debug }) =>
        choose(async () => {
          const { checkCommand } = await import('./check-command.js');
          return checkCommand({ cases, quiet, json, debug }, streams);
        }),
    )
    .command(
      'species [query]',
      'list the species library, search it, or show one species with its properties',
      (command) =>
        command
          .positional('query', {
            type: 'string',
            describe: 'id, name, formula or CAS number; all species where absent',
          })
          .option('from', { type: 'string', requiresArg: true, describe: 'lowest temperature: 300 K' })
          .option('to', { type: 'string', requiresArg: true, describe: 'highest temperature' })
          .option('step', { type: 'string', requiresArg: true, describe: 'step of the table: 50 K' })
          .option('out', {
            type: 'string',
            requiresArg: true,
            describe: 'folder for table and charts of one species',
          })
          .option('json', { type: 'boolean', default: false, describe: 'print as JSON' })
          .option('debug', { type: 'boolean', default: false, describe: 'show where a defect happened' })
          .example('$0 species ammonia', 'everything known of ammonia')
          .example('$0 species NH3 --to 1500 K --out ammonia', 'its table and charts in ammonia/'),
      ({ query, from, to, step, out, json }) =>
        choose(async () => {
          for (const [name, value] of Object.entries({ query, from, to, step, out })) {
            if (Array.isArray(value)) throw new UsageError(`Give --${name} once.`);
          }
          if (out === '') throw new UsageError('--out names no folder.');
          const { speciesCommand } = await import('./species-command.js');
          return speciesCommand({ query, from, to, step, out, json }, streams);
        }),
    )
    .completion('completion', 'print a script for shell completion')
    .demandCommand(1, 'Say what to do: `bedwright run CASE` or `bedwright check CASE`.')
    .epilogue(epilogue);
}

interface CommonOptions {
  cases: string[];
  quiet: boolean;
  json: boolean;
  debug: boolean;
}

function common(command: Argv): Argv<CommonOptions> {
  return command
    .positional('cases', {
      type: 'string',
      array: true,
      demandOption: true,
      describe: 'case files (YAML)',
    })
    .option('quiet', { type: 'boolean', default: false, describe: 'print faults only' })
    .option('json', { type: 'boolean', default: false, describe: 'print the outcome as JSON' })
    .option('debug', { type: 'boolean', default: false, describe: 'show where a defect happened' });
}
