import process from 'node:process';
import { type Invocation, parseArguments } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import { standardTerminal, type Terminal } from './terminal';

/**
 * The program on the command line. Never rejects and never shows a stack trace.
 *
 * @param argv - arguments after the program's name
 * @returns the exit status
 */
export async function runCommandLine(argv: readonly string[]): Promise<ExitCode> {
  const terminal = standardTerminal();
  const invocation = parseArguments(argv);
  const interruption = new AbortController();
  const interrupt = () => {
    // only `run` has something to put away first, and only once
    if (invocation.kind !== 'run' || interruption.signal.aborted) process.exit(EXIT.interrupted);
    interruption.abort();
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, interrupt);
  const fail = (error: unknown): ExitCode => {
    terminal.say(`farwell: ${unforeseenText(error)}`);
    return EXIT.failed;
  };
  process.on('uncaughtException', (error) => process.exit(fail(error)));
  try {
    return await perform(invocation, terminal, interruption.signal);
  } catch (error) {
    return fail(error);
  }
}

/** Each command loads its own part of the program only: the rest would slow the start of the others. */
async function perform(invocation: Invocation, terminal: Terminal, signal: AbortSignal): Promise<ExitCode> {
  switch (invocation.kind) {
    case 'run':
      return (await import('./run-command')).runCommand(invocation, terminal, signal);
    case 'check':
      return (await import('./check-command')).checkCommand(invocation, terminal);
    case 'basis':
      return (await import('./basis-command')).basisCommand(invocation, terminal);
    case 'report':
      return (await import('./report-command')).reportCommand(invocation, terminal);
    case 'show':
      await terminal.print(invocation.text);
      return EXIT.done;
    case 'misuse':
      terminal.say(`farwell: ${invocation.message}\n  ${invocation.remedy}`);
      return EXIT.refused;
  }
}

/** What the system refused, in its words; else that something is wrong with the program itself. */
function unforeseenText(error: unknown): string {
  const { code, path, message } = error as NodeJS.ErrnoException;
  if (path !== undefined) {
    // “EACCES: permission denied, open '/a/b'”
    const reason = /^\w+: ([^,]*)/.exec(message)?.[1] ?? message;
    return `${path}: ${reason}.\n  Check that the folder can be written to and that the disk is not full.`;
  }
  if (code === 'ENOSPC')
    return 'the disk is full.\n  Make room; the same command then goes on from what is kept.';
  const text = error instanceof Error ? error.message : String(error);
  return `something failed inside the program: ${text}\n  Please report this together with the study.`;
}
