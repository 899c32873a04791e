import process from 'node:process';

/** Where the command line writes. */
export interface Terminal {
  /** the product of a command, on standard output */
  print(text: string): Promise<void>;
  /** a line for whoever is watching, on standard error */
  say(line: string): void;
  /** standard error, if somebody watches it on a screen that can redraw lines */
  readonly screen: NodeJS.WriteStream | undefined;
}

/** The standard streams of this process. A reader that leaves early (`| head`) is no error. */
export function standardTerminal(): Terminal {
  const { stdout, stderr } = process;
  for (const stream of [stdout, stderr]) stream.on('error', ignoreLeftReader);
  return {
    // a long text is out only when the stream says so
    print: (text) => new Promise((resolve) => void stdout.write(text, () => resolve())),
    say: (line) => void stderr.write(`${line}\n`),
    screen: stderr.isTTY ? stderr : undefined,
  };
}

function ignoreLeftReader(error: NodeJS.ErrnoException): void {
  if (error.code !== 'EPIPE') throw error;
}
