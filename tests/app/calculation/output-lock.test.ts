import { spawn, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, readdirSync, readFileSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { acquireLock, type LockAttempt } from '../../../app/calculation/output-lock';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
let files = 0;
const newPath = () => join(folder, `${++files}.lock`);

function expectHeld(attempt: LockAttempt): { release: () => void } {
  if (attempt.kind !== 'held') throw new Error(`the lock is taken by ${attempt.by}`);
  return attempt;
}

/** The lock of this process with some of its entries changed. */
function writeLock(path: string, changes: Record<string, unknown>): void {
  const own = newPath();
  const { release } = expectHeld(acquireLock(own));
  const holder = JSON.parse(readFileSync(own, 'utf8')) as Record<string, unknown>;
  release();
  writeFileSync(path, JSON.stringify({ ...holder, ...changes }));
}

const minutesAgo = (minutes: number) => new Date(Date.now() - minutes * 60_000);

describe('acquireLock', () => {
  it('is held once, and can be had again after its release', () => {
    const path = newPath();
    const { release } = expectHeld(acquireLock(path));
    expect(acquireLock(path)).toMatchObject({
      kind: 'taken',
      by: expect.stringContaining(String(process.pid)),
    });
    release();
    expect(existsSync(path)).toBe(false);
    expectHeld(acquireLock(path)).release();
  });

  it('takes over from a process that was killed', () => {
    const path = newPath();
    const { pid } = spawnSync(process.execPath, ['-e', '0']);
    writeLock(path, { process: pid });
    expectHeld(acquireLock(path)).release();
  });

  it('leaves a living process its lock', async () => {
    const path = newPath();
    const child = spawn(process.execPath, ['-e', 'setTimeout(() => {}, 60000)']);
    await once(child, 'spawn');
    writeLock(path, { process: child.pid, started: processStart(child.pid) });
    expect(acquireLock(path).kind).toBe('taken');
    child.kill('SIGKILL');
    await once(child, 'exit');
    expectHeld(acquireLock(path)).release();
  });

  it.runIf(process.platform === 'linux')('is not misled by a later process with the same number', () => {
    const path = newPath();
    writeLock(path, { started: '1' });
    expectHeld(acquireLock(path)).release();
  });

  it('believes another machine while it keeps touching the file', () => {
    const path = newPath();
    writeLock(path, { host: 'another-machine' });
    expect(acquireLock(path)).toMatchObject({
      kind: 'taken',
      by: expect.stringContaining('another-machine'),
    });
    utimesSync(path, minutesAgo(10), minutesAgo(10));
    expectHeld(acquireLock(path)).release();
  });

  it('gives a lock that is not fully written time to become so', () => {
    const path = newPath();
    writeFileSync(path, '{"host":');
    expect(acquireLock(path).kind).toBe('taken');
    utimesSync(path, minutesAgo(10), minutesAgo(10));
    expectHeld(acquireLock(path)).release();
  });

  it('leaves no files behind', () => {
    expect(readdirSync(folder).filter((name) => !name.endsWith('.lock'))).toEqual([]);
  });
});

function processStart(pid: number | undefined): string {
  if (process.platform !== 'linux') return '';
  const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
  return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? '';
}
