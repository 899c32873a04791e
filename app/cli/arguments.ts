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
  | {
      readonly kind: 'report';
      readonly results: readonly string[];
      readonly out?: string;
      /** of the figure, millimetres */
      readonly width?: number;
      readonly height?: number;
      /** whether the study sentence stands in the picture */
      readonly hasCaption: boolean;
      /** prints geometries instead of writing a report: at this coordinate, or at all */
      readonly geometry?: number | 'all';
    }
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
  farwell report RESULTS...     makes report, figures and tables of results files
      --out DIR                   writes them into DIR
      --width MM --height MM      makes the figure of this size (default: 85 and 170 mm wide)
      --no-caption                leaves the study sentence out of the picture
      --geometry PLACE            prints the atoms at that distance or angle, or at \`all\`, and writes no files

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
/** Narrower figures have no room for their labels, wider ones no paper. */
const FIGURE_MILLIMETRES = { least: 40, most: 500 };

interface ReportFlags {
  readonly out?: string;
  readonly width?: number;
  readonly height?: number;
  readonly caption: boolean;
  readonly geometry?: number | 'all';
}

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
    .addOption(new Option('--width <mm>').argParser(parseMillimetres))
    .addOption(new Option('--height <mm>').argParser(parseMillimetres))
    .option('--no-caption')
    .addOption(new Option('--geometry <place>').argParser(parsePlace).conflicts(['out', 'width', 'height']))
    .action((results: string[], { caption, ...options }: ReportFlags) => {
      invocation = { kind: 'report', results, ...options, hasCaption: caption };
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
  if (!/^\d+$/.test(text) || workers < 1 || workers > MOST_WORKERS)
    throw new InvalidArgumentError(
      `“${text}” is no number of workers.\nGive a whole number from 1 to ${MOST_WORKERS}, or leave it out for one for every core.`,
    );
  return workers;
}

function parseMillimetres(text: string): number {
  const length = Number(text);
  const { least, most } = FIGURE_MILLIMETRES;
  if (!/^\d+(\.\d+)?$/.test(text) || length < least || length > most)
    throw new InvalidArgumentError(
      `“${text}” is no size of a figure.\nGive millimetres from ${least} to ${most}, as \`--width 85 --height 60\`.`,
    );
  return length;
}

function parsePlace(text: string): number | 'all' {
  if (text === 'all') return 'all';
  if (!/^-?\d+(\.\d+)?$/.test(text))
    throw new InvalidArgumentError(
      `“${text}” is no place along a scan.\nGive a distance or angle in the unit of the study, or \`all\`.`,
    );
  return Number(text);
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
      return misuse(conflictText(message), 'Leave one of the two out.');
    case 'commander.invalidArgument': {
      // what our own parsers say, message and remedy, behind the general words
      const [text = '', help] = message.replace(/^.*? is invalid\. (?=“)/s, '').split('\n');
      return misuse(text, help);
    }
    default:
      return misuse(message.replace(/^error: /, ''));
  }
}

/** Of the two options that exclude each other the first writes no files, which the second is about. */
function conflictText(message: string): string {
  const [printing = '', other = ''] = [...message.matchAll(/'(--[\w-]+)/g)].map(([, option]) => option);
  return `“${printing}” writes no files, so “${other}” has no meaning with it.`;
}
