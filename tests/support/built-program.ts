import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';

const ROOT = join(import.meta.dirname, '..', '..');

/** Brings `out/` up to date with the sources; costs nothing if it is. */
export function buildProgram(): void {
  execFileSync(process.execPath, [join(ROOT, 'app', 'build.mjs'), '--if-changed'], {
    stdio: ['ignore', 'ignore', 'inherit'],
  });
}

export interface Ended {
  /** exit status, or the name of the signal that ended the process */
  readonly status: number | NodeJS.Signals;
  readonly stdout: string;
  readonly stderr: string;
}

export interface RunningProgram {
  readonly process: ChildProcess;
  readonly ended: Promise<Ended>;
  /** resolves when standard error holds the text */
  saw(text: string): Promise<void>;
}

/**
 * Starts a program of `out/` as a child process.
 *
 * @param environment - instead of the tests' own
 */
export function startProgram(
  name: string,
  argv: readonly string[],
  environment: NodeJS.ProcessEnv = process.env,
): RunningProgram {
  const child = spawn(process.execPath, [join(ROOT, 'out', name), ...argv], {
    stdio: ['ignore', 'pipe', 'pipe'],
    env: environment,
  });
  let stdout = '';
  let stderr = '';
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    stdout += text;
  });
  child.stderr.setEncoding('utf8').on('data', (text: string) => {
    stderr += text;
  });
  const ended = once(child, 'close').then(([code, signal]: (number | NodeJS.Signals | null)[]) => ({
    status: code ?? signal ?? 'SIGKILL',
    stdout,
    stderr,
  })) as Promise<Ended>;
  return {
    process: child,
    ended,
    async saw(text) {
      while (!stderr.includes(text) && child.exitCode === null) await once(child.stderr, 'data');
    },
  };
}

/** Starts the built `farwell`. */
export function startFarwell(...argv: readonly string[]): RunningProgram {
  return startProgram('farwell.js', argv);
}

/** Runs the built `farwell` to its end. */
export function farwell(...argv: readonly string[]): Promise<Ended> {
  return startFarwell(...argv).ended;
}
