import {
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { deserialize, serialize } from 'node:v8';
import { threadId } from 'node:worker_threads';
import type { CacheSettings } from './cache-settings';
import { sha256 } from './sha256';

/*
 * A folder of computed things, each in a file named by its key. A file holds 64 hexadecimal digits – the SHA-256 of
 * key and data – and the data in Node's own binary form, which keeps every bit of a number. It appears whole, by
 * renaming, so that any number of processes can share the folder; what fails its checksum is deleted. The time of a
 * file is when it was last used.
 *
 * Nothing here ever fails a calculation: what cannot be read is computed, what cannot be written is not kept.
 */

export interface ResultCache {
  /** undefined where nothing whole is kept under this key */
  find(key: string): unknown;
  keep(key: string, value: unknown): void;
}

const ENDING = '.kept';
const TEMPORARY = '.tmp';
const CHECK_LENGTH = 64;
/** Of the bound: so much is written between two looks at the size of the folder. */
const LOOK_AFTER = 1 / 16;
/** Of the bound: down to this the folder is cleared, so that not every new entry finds it full. */
const CLEAR_TO = 0.9;
/** Left behind by a process that was killed while writing. */
const TEMPORARY_DEAD_AFTER_MS = 3_600_000;

export function openCache({ folder, mostBytes }: CacheSettings): ResultCache {
  let written = Number.POSITIVE_INFINITY;
  return {
    find(key) {
      const path = join(folder, key + ENDING);
      const bytes = attempt(() => readFileSync(path));
      if (!bytes) return undefined;
      const data = bytes.subarray(CHECK_LENGTH);
      if (bytes.toString('latin1', 0, CHECK_LENGTH) !== checkOf(key, data)) {
        attempt(() => rmSync(path, { force: true }));
        return undefined;
      }
      const now = new Date();
      attempt(() => utimesSync(path, now, now));
      // whole, but perhaps of a Node that writes another form
      return attempt(() => deserialize(data) as unknown);
    },
    keep(key, value) {
      attempt(() => {
        const data = serialize(value);
        if (data.length > mostBytes * LOOK_AFTER) return;
        const path = join(folder, key + ENDING);
        const temporary = `${path}.${process.pid}-${threadId}${TEMPORARY}`;
        mkdirSync(folder, { recursive: true });
        writeFileSync(temporary, Buffer.concat([Buffer.from(checkOf(key, data), 'latin1'), data]));
        renameSync(temporary, path);
        written += data.length;
        if (written <= mostBytes * LOOK_AFTER) return;
        written = 0;
        clear(folder, mostBytes);
      });
    },
  };
}

function checkOf(key: string, data: Uint8Array): string {
  return sha256(Buffer.concat([Buffer.from(key, 'latin1'), data]));
}

/** Deletes what was not used for longest, if the folder is over its bound. */
function clear(folder: string, mostBytes: number): void {
  const files = readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    // another process may have deleted it just now
    const stats = statSync(path, { throwIfNoEntry: false });
    if (!stats) return [];
    if (name.endsWith(TEMPORARY) && Date.now() - stats.mtimeMs > TEMPORARY_DEAD_AFTER_MS) {
      rmSync(path, { force: true });
    }
    return name.endsWith(ENDING) ? [{ path, size: stats.size, used: stats.mtimeMs }] : [];
  });
  let total = files.reduce((sum, { size }) => sum + size, 0);
  if (total <= mostBytes) return;
  for (const { path, size } of files.sort((a, b) => a.used - b.used)) {
    if (total <= CLEAR_TO * mostBytes) return;
    rmSync(path, { force: true });
    total -= size;
  }
}

function attempt<T>(work: () => T): T | undefined {
  try {
    return work();
  } catch {
    return undefined;
  }
}
