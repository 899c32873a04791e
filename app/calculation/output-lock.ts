import { linkSync, readFileSync, renameSync, rmSync, statSync, utimesSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import process from 'node:process';

/*
 * Keeps two processes from writing the same results at once. A lock is a small file; whoever creates it holds it.
 * After a kill -9 it stays behind, so it says who holds it: on the same machine the process is looked up, on
 * another (a shared folder of a cluster) the holder is alive as long as it keeps touching the file.
 */

interface Holder {
  readonly host: string;
  readonly process: number;
  /** of the process; tells it from a later one with the same number. Empty where the system does not say. */
  readonly started: string;
}

export type LockAttempt =
  | { readonly kind: 'held'; readonly release: () => void }
  | { readonly kind: 'taken'; readonly by: string };

const TOUCH_EVERY_MS = 20_000;
/** Far above the time between touches, because clocks of machines that share a folder may differ. */
const DEAD_AFTER_MS = 180_000;

/** Tries to lock `path`; a lock left behind by a dead process is taken over. */
export function acquireLock(path: string): LockAttempt {
  const own: Holder = { host: hostname(), process: process.pid, started: processStart(process.pid) };
  const ownText = `${JSON.stringify(own)}\n`;
  for (;;) {
    if (create(path, ownText)) return hold(path);
    const text = readIfPresent(path);
    if (text === undefined) continue; // released just now
    const holder = parseHolder(text);
    if (holder ? isAlive(holder, path) : !isOlderThan(path, DEAD_AFTER_MS)) {
      return {
        kind: 'taken',
        by: holder ? `process ${holder.process} on ${holder.host}` : 'another process',
      };
    }
    removeDead(path, text);
  }
}

function create(path: string, text: string): boolean {
  try {
    writeFileSync(path, text, { flag: 'wx' });
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false;
    throw error;
  }
}

function hold(path: string): LockAttempt {
  const touching = setInterval(() => {
    const now = new Date();
    try {
      utimesSync(path, now, now);
    } catch {
      // somebody deleted the lock by hand: nothing to keep alive any more
    }
  }, TOUCH_EVERY_MS);
  touching.unref();
  return {
    kind: 'held',
    release() {
      clearInterval(touching);
      rmSync(path, { force: true });
    },
  };
}

/** Moves the file away before deleting it: of two processes that find the same dead lock, one succeeds. */
function removeDead(path: string, text: string): void {
  const aside = `${path}.${process.pid}`;
  try {
    renameSync(path, aside);
    // the other one was faster, and this is its fresh lock
    if (readFileSync(aside, 'utf8') !== text) linkSync(aside, path);
  } catch (error) {
    if (!['ENOENT', 'EEXIST'].includes((error as NodeJS.ErrnoException).code ?? '')) throw error;
  }
  rmSync(aside, { force: true });
}

function readIfPresent(path: string): string | undefined {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

function parseHolder(text: string): Holder | undefined {
  try {
    const { host, process: number, started } = JSON.parse(text) as Partial<Holder>;
    return typeof host === 'string' && typeof number === 'number' && typeof started === 'string'
      ? { host, process: number, started }
      : undefined;
  } catch {
    return undefined; // not yet written, or torn
  }
}

function isAlive(holder: Holder, path: string): boolean {
  if (holder.host !== hostname()) return !isOlderThan(path, DEAD_AFTER_MS);
  try {
    process.kill(holder.process, 0);
  } catch (error) {
    // no permission to signal it means that it is there
    if ((error as NodeJS.ErrnoException).code !== 'EPERM') return false;
  }
  return holder.started === processStart(holder.process);
}

function isOlderThan(path: string, milliseconds: number): boolean {
  const modified = statSync(path, { throwIfNoEntry: false })?.mtimeMs;
  return modified === undefined || Date.now() - modified > milliseconds;
}

/**
 * When a process started, as Linux tells it (field 22 of /proc/PID/stat); empty on other systems, and for a
 * process that has ended and that only its parent has not taken note of yet.
 */
function processStart(pid: number): string {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // the name in parentheses may itself hold spaces and parentheses
    const [state, ...rest] = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return state === 'Z' ? '' : (rest[18] ?? '');
  } catch {
    return '';
  }
}
