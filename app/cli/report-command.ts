import { dirname } from 'node:path';
import { readResultsFile } from '../calculation/read-results-file';
import { ReportError } from '../report/report-error';
import type { Invocation } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import type { Terminal } from './terminal';
import { refusalText } from './wording';

/** `farwell report`: figures and tables of one or several results files. */
export async function reportCommand(
  { results: paths, out }: Extract<Invocation, { kind: 'report' }>,
  terminal: Terminal,
): Promise<ExitCode> {
  const files = [];
  for (const path of paths) {
    const file = await readResultsFile(path);
    if (!file.ok) {
      terminal.say(refusalText(path, file.issues));
      return EXIT.refused;
    }
    files.push(file);
  }
  // drawing needs far more code than everything else, and only here
  const { writeReport } = await import('../report/write-report');
  try {
    const written = await writeReport(
      files.map(({ results }) => results),
      files.map(({ name }) => name),
      out ?? dirname(paths[0] ?? '.'),
    );
    await terminal.print(`${written.join('\n')}\n`);
    return EXIT.done;
  } catch (error) {
    if (!(error instanceof ReportError)) throw error;
    terminal.say(refusalText('the report', [error]));
    return EXIT.refused;
  }
}
