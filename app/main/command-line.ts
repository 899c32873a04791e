/** First words that make the program a command-line tool instead of a window. */
const COMMANDS: ReadonlySet<string> = new Set([
  'run',
  'check',
  'basis',
  'report',
  'help',
  '--help',
  '-h',
  '--version',
  '-V',
]);

/**
 * What the program was asked on the command line.
 *
 * @param argv - of the process: the packaged program itself, or else Electron and the folder it runs, come first
 * @returns the arguments for `farwell`, or undefined where a window is wanted
 */
export function commandLineOf(argv: readonly string[], isPackaged: boolean): readonly string[] | undefined {
  const given = argv.slice(isPackaged ? 1 : 2);
  return given[0] !== undefined && COMMANDS.has(given[0]) ? given : undefined;
}
