import { mkdir, stat } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import type { PreparedStudy, StudyResults } from '#engine';
import { cacheSettings } from '../calculation/cache-settings';
import { type Journal, openJournal } from '../calculation/journal';
import { affordableWorkers } from '../calculation/memory';
import { acquireLock } from '../calculation/output-lock';
import { readStudyFile, type StudyFile } from '../calculation/read-study-file';
import { type RunOutcome, runStudy } from '../calculation/run-study';
import { studyKey } from '../calculation/study-key';
import { endThreadsAhead, startThreadsAhead } from '../calculation/worker-thread';
import { usualWorkers } from '../calculation/workers';
import { resultsJson, writeResults } from '../calculation/write-results';
import type { SerializedError, StudyIssue } from '../contract/requests';
import { studySentence } from '../study/sentence';
import type { Invocation } from './arguments';
import { EXIT, type ExitCode } from './exit-codes';
import { type Profile, startProfile } from './profile';
import { progressDisplay } from './progress-display';
import { summarise } from './run-summary';
import type { Terminal } from './terminal';
import { counted, refusalText } from './wording';

type RunInvocation = Extract<Invocation, { kind: 'run' }>;
type ReadableStudy = Extract<StudyFile, { ok: true }>;

/** Threads that are started before the study is read: few, as it may have a single point. */
const MOST_AHEAD = 2;

/** `farwell run`: computes a study, and writes its results or prints them. */
export async function runCommand(
  invocation: RunInvocation,
  terminal: Terminal,
  signal: AbortSignal,
): Promise<ExitCode> {
  startThreadsAhead(Math.min(invocation.workers ?? usualWorkers(), MOST_AHEAD));
  const file = await readStudyFile(invocation.study);
  if (!file.ok) {
    terminal.say(refusalText(invocation.study, file.issues));
    return EXIT.refused;
  }
  terminal.say(studySentence(file.prepared.study));
  const profile = startProfile();
  const exit = invocation.print
    ? await runToOutput(file, invocation, profile, terminal, signal)
    : await runToFolder(file, invocation, profile, terminal, signal);
  if (invocation.timings) terminal.say(profile.table(file.prepared.study.levels));
  return exit;
}

async function runToOutput(
  file: ReadableStudy,
  invocation: RunInvocation,
  profile: Profile,
  terminal: Terminal,
  signal: AbortSignal,
): Promise<ExitCode> {
  const outcome = await compute(file, invocation, profile, terminal, signal);
  if (outcome.kind === 'failed') return sayFailure(outcome.error, invocation.study, terminal);
  if (outcome.kind === 'cancelled') {
    terminal.say('Interrupted. With --print nothing is kept; without it the finished points are.');
    return EXIT.interrupted;
  }
  await terminal.print(resultsJson(outcome.results));
  return saySummary(outcome.results, terminal);
}

async function runToFolder(
  file: ReadableStudy,
  invocation: RunInvocation,
  profile: Profile,
  terminal: Terminal,
  signal: AbortSignal,
): Promise<ExitCode> {
  const folder = invocation.out ?? dirname(invocation.study);
  const refusal = await prepareFolder(folder);
  if (refusal) {
    terminal.say(refusalText('--out', [refusal]));
    return EXIT.refused;
  }
  const lockPath = join(folder, `${file.name}.lock`);
  const lock = acquireLock(lockPath);
  if (lock.kind === 'taken') {
    terminal.say(
      `farwell: ${lock.by} is computing ${file.name} into this folder.\n` +
        `  Wait for it, or choose another folder with --out. If it is gone, delete ${lockPath}.`,
    );
    return EXIT.failed;
  }
  try {
    return await runWithJournal(file, invocation, folder, profile, terminal, signal);
  } finally {
    lock.release();
  }
}

async function prepareFolder(folder: string): Promise<StudyIssue | undefined> {
  try {
    await makeFolder(folder);
    return undefined;
  } catch (error) {
    if (!['EEXIST', 'ENOTDIR'].includes((error as NodeJS.ErrnoException).code ?? '')) throw error;
    return {
      code: 'folder.isFile',
      place: '',
      message: `“${folder}” is not a folder.`,
      remedy: 'Give a folder; it is made if it does not exist.',
    };
  }
}

/** Unlike Node's own recursive way, this does not try for ever where a system takes no new folders (/proc). */
async function makeFolder(folder: string): Promise<void> {
  if (await isFolder(folder)) return;
  if (dirname(folder) !== folder) await makeFolder(dirname(folder));
  await mkdir(folder).catch(async (error: unknown) => {
    // another process may have been faster
    if (!(await isFolder(folder))) throw error;
  });
}

async function isFolder(path: string): Promise<boolean> {
  try {
    return (await stat(path)).isDirectory();
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return false;
    throw error;
  }
}

async function runWithJournal(
  file: ReadableStudy,
  invocation: RunInvocation,
  folder: string,
  profile: Profile,
  terminal: Terminal,
  signal: AbortSignal,
): Promise<ExitCode> {
  const key = studyKey(file.prepared);
  // with the key in its name, the journal of an earlier wording of the study is neither mixed in nor lost
  const journal = openJournal(join(folder, `${file.name}.partial-${key.slice(0, 8)}.jsonl`), key);
  const kept = () => `${journal.size} of ${counted(pointsOf(file.prepared), 'point')}`;
  try {
    if (journal.size > 0) terminal.say(`Going on from ${kept()} computed before.`);
    const outcome = await compute(file, invocation, profile, terminal, signal, journal);
    if (outcome.kind === 'failed') {
      const exit = sayFailure(outcome.error, invocation.study, terminal);
      terminal.say(`  Finished and kept: ${kept()}.`);
      return exit;
    }
    if (outcome.kind === 'cancelled') {
      terminal.say(`Interrupted. Finished and kept: ${kept()}; the same command goes on from there.`);
      return EXIT.interrupted;
    }
    const { results } = outcome;
    const paths = await profile.stretch('writing', () => writeResults(results, folder, file.name));
    journal.remove();
    await terminal.print(`${paths.join('\n')}\n`);
    return saySummary(results, terminal);
  } finally {
    journal.close();
  }
}

async function compute(
  { prepared, basisFileText }: ReadableStudy,
  invocation: RunInvocation,
  profile: Profile,
  terminal: Terminal,
  signal: AbortSignal,
  journal?: Journal,
): Promise<RunOutcome> {
  const workers = affordableWorkers(prepared, invocation.workers);
  if (workers.notice) terminal.say(workers.notice);
  endThreadsAhead(workers.count);
  const cache = invocation.cache ? cacheSettings() : undefined;
  const display = progressDisplay(terminal);
  let outcome: RunOutcome;
  try {
    outcome = await profile.stretch('computing', () =>
      runStudy(
        { prepared, ...(basisFileText !== undefined && { basisFileText }) },
        {
          signal,
          workers: workers.count,
          ...(cache && { cache }),
          onProgress: display.show,
          ...(invocation.timings && { onTimes: profile.add }),
          ...(journal && { finished: journal.finished, onPoint: journal.append }),
        },
      ),
    );
  } finally {
    display.end();
  }
  if (outcome.kind === 'done' && outcome.keptPoints > 0) {
    const total = counted(pointsOf(prepared), 'point');
    terminal.say(`${outcome.keptPoints} of ${total} came from the cache of earlier runs.`);
  }
  return outcome;
}

/** In all bases together. */
function pointsOf({ coordinates, furtherBases }: PreparedStudy): number {
  return coordinates.length * (1 + furtherBases.length);
}

/** Failures that the study is not to blame for; any other comes from the engine and refuses the study. */
const OWN_FAILURES: ReadonlySet<string> = new Set([
  'internal',
  'calculation.workerDied',
  'calculation.outOfMemory',
]);

function sayFailure(error: SerializedError, study: string, terminal: Terminal): ExitCode {
  if (!OWN_FAILURES.has(error.code)) {
    terminal.say(refusalText(study, [error]));
    return EXIT.refused;
  }
  terminal.say(`farwell: ${error.message}\n  ${error.remedy}`);
  return EXIT.failed;
}

function saySummary(results: StudyResults, terminal: Terminal): ExitCode {
  const { lines, exit } = summarise(results);
  for (const line of lines) terminal.say(line);
  return exit;
}
