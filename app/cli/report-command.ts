import { dirname } from 'node:path';
import { type ResultsFile, readResultsFile } from '../calculation/read-results-file';
import { ReportError } from '../report/report-error';
import type { Invocation } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import type { Terminal } from './terminal';
import { refusalText } from './wording';

type ReportInvocation = Extract<Invocation, { kind: 'report' }>;
type ReadFile = Extract<ResultsFile, { ok: true }>;

/** `farwell report`: report, figures and tables of one or several results files, or their geometries. */
export async function reportCommand(invocation: ReportInvocation, terminal: Terminal): Promise<ExitCode> {
  const files: ReadFile[] = [];
  for (const path of invocation.results) {
    const file = await readResultsFile(path);
    if (!file.ok) {
      terminal.say(refusalText(path, file.issues));
      return EXIT.refused;
    }
    files.push(file);
  }
  try {
    await (invocation.geometry === undefined
      ? writeFiles(invocation, files, terminal)
      : printGeometries(invocation.geometry, files, terminal));
    return EXIT.done;
  } catch (error) {
    if (!(error instanceof ReportError)) throw error;
    terminal.say(refusalText('the report', [error]));
    return EXIT.refused;
  }
}

async function writeFiles(
  { results: paths, out, width, height, hasCaption }: ReportInvocation,
  files: readonly ReadFile[],
  terminal: Terminal,
): Promise<void> {
  // drawing needs far more code than everything else, and only here
  const { writeReport } = await import('../report/write-report');
  const { comparabilityNotes } = await import('../report/comparability');
  for (const note of comparabilityNotes(files)) terminal.say(`farwell: ${note}`);
  const written = await writeReport(
    files.map(({ results }) => results),
    files.map(({ name }) => name),
    out ?? dirname(paths[0] ?? '.'),
    {
      ...(width !== undefined && { widthMillimetres: width }),
      ...(height !== undefined && { heightMillimetres: height }),
      hasCaption,
    },
  );
  await terminal.print(`${written.join('\n')}\n`);
}

async function printGeometries(
  place: number | 'all',
  files: readonly ReadFile[],
  terminal: Terminal,
): Promise<void> {
  const { geometryLines } = await import('../report/geometry-lines');
  await terminal.print(files.map(({ results }) => geometryLines(results, place)).join('\n'));
}
