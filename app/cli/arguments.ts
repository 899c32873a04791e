import { Command, CommanderError, InvalidArgumentError, Option } from 'commander';
import { PROGRAM } from '../calculation/program';

/** What the program is asked to do. */
export type Invocation =
  | {
      readonly kind: 'run';
      readonly study: string;
      readonly out?: string;
      readonly print: boolean;
      readonly workers?: number;
      /** whether points computed before are used again */
      readonly cache: boolean;
      /** whether to say where the time went */
      readonly timings: boolean;
    }
  | { readonly kind: 'check'; readonly study: string }
  | { readonly kind: 'basis'; readonly name?: string }
  | { readonly kind: 'report'; readonly results: readonly string[]; readonly out?: string }
  | { readonly kind: 'show'; readonly text: string }
  | { readonly kind: 'misuse'; readonly message: string; readonly remedy: string };

export const HELP = `farwell pulls a bond apart: potential-energy curves by Hartree–Fock and configuration interaction.

  farwell run STUDY             computes a study; writes NAME.results.json and NAME.csv beside it
      --out DIR                   writes them into DIR
      --print                     prints the results as JSON and writes no files
      --workers N                 computes N points at a time (default: one for every core)
      --no-cache                  computes every point anew, and keeps none for other studies
      --timings                   says where the time went
  farwell check STUDY           explains a study, with its memory and time, without computing it
  farwell basis [NAME]          lists the basis sets, or prints one as a study can hold it
  farwell report RESULTS...     makes figures and tables of results files
      --out DIR                   writes them into DIR

  farwell --version             prints the version

STUDY is a file NAME.study.json. Interrupted, \`run\` keeps the finished points; the same command goes on from there.
Exit status: 0 all converged, 1 some point did not converge, 2 input refused, 3 interrupted, 4 anything else.
`;

interface RunFlags {
  readonly out?: string;
  readonly print?: true;
  readonly workers?: number;
  readonly cache: boolean;
  readonly timings?: true;
}

const MOST_WORKERS = 1024;

/** Reads the arguments after the program's name. */
export function parseArguments(argv: readonly string[]): Invocation {
  let invocation: Invocation = { kind: 'show', text: HELP };
  const program = new Command('farwell')
    .exitOverride()
    .configureOutput({ writeOut: () => undefined, writeErr: () => undefined })
    .version(PROGRAM.version);
  // created with `command`, a sub-command takes over how errors leave and what is written
  program
    .command('run <study>')
    .option('--out <dir>')
    .addOption(new Option('--print').conflicts('out'))
    .addOption(new Option('--workers <n>').argParser(parseWorkers))
    .option('--no-cache')
    .option('--timings')
    .action((study: string, options: RunFlags) => {
      const { print = false, timings = false } = options;
      invocation = { kind: 'run', study, ...options, print, timings };
    });
  program.command('check <study>').action((study: string) => {
    invocation = { kind: 'check', study };
  });
  program.command('basis [name]').action((name: string | undefined) => {
    invocation = { kind: 'basis', ...(name !== undefined && { name }) };
  });
  program
    .command('report <results...>')
    .option('--out <dir>')
    .action((results: string[], options: { out?: string }) => {
      invocation = { kind: 'report', results, ...options };
    });
  try {
    program.parse(argv, { from: 'user' });
    return invocation;
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    return explain(error, argv);
  }
}

function parseWorkers(text: string): number {
  const workers = Number(text);
  if (!/^\d+$/.test(text) || workers < 1 || workers > MOST_WORKERS) throw new InvalidArgumentError('');
  return workers;
}

/** The argument parser's complaint in our words; the culprit's name is only in its text, as the first in quotes. */
function explain({ code, message }: CommanderError, argv: readonly string[]): Invocation {
  const culprit = /'([^']*)'/.exec(message)?.[1] ?? '';
  const suggestion = /Did you mean (?:one of )?(.*?)\?/.exec(message)?.[1];
  const remedy = suggestion ? `Did you mean ${suggestion}?` : '`farwell --help` shows what there is.';
  const misuse = (text: string, help = remedy): Invocation => ({
    kind: 'misuse',
    message: text,
    remedy: help,
  });
  switch (code) {
    case 'commander.version':
      return { kind: 'show', text: `${PROGRAM.version}\n` };
    case 'commander.helpDisplayed':
      return { kind: 'show', text: HELP };
    case 'commander.help':
      // `farwell help` asks for it, `farwell` alone forgot what to ask
      return argv[0] === 'help' ? { kind: 'show', text: HELP } : misuse('A command is missing.');
    case 'commander.unknownCommand':
      return misuse(`There is no command “${culprit}”.`);
    case 'commander.unknownOption':
      return misuse(`There is no option “${culprit}” here.`);
    case 'commander.missingArgument':
      return misuse(`“farwell ${argv[0] ?? ''}” needs a file to work on.`);
    case 'commander.excessArguments':
      return misuse(
        `“farwell ${argv[0] ?? ''}” takes one file or name only.`,
        'Quote a name that holds spaces.',
      );
    case 'commander.optionMissingArgument':
      return misuse(`A value is missing after “${culprit.split(' ')[0]}”.`);
    case 'commander.conflictingOption':
      return misuse(
        '“--print” writes no files, so “--out” has no meaning with it.',
        'Leave one of the two out.',
      );
    case 'commander.invalidArgument':
      return misuse(
        `“${/argument '(.*)' is invalid/.exec(message)?.[1] ?? ''}” is no number of workers.`,
        `Give a whole number from 1 to ${MOST_WORKERS}, or leave it out for one for every core.`,
      );
    default:
      return misuse(message.replace(/^error: /, ''));
  }
}
