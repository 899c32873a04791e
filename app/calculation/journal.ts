import { closeSync, fsyncSync, ftruncateSync, openSync, readFileSync, rmSync, writeSync } from 'node:fs';
import { deserialize, serialize } from 'node:v8';
import type { FinishedPoint } from './messages';
import { sha256 } from './sha256';

/*
 * The journal of a run: what survives when the run is interrupted, killed, or the machine stops.
 *
 * The first line names the study by its key, every further one holds a finished point:
 *   {"format":"farwell/journal","version":1,"key":"…"}
 *   {"index":3,"data":"…","check":"…"}
 * `data` is the point and what its neighbour starts from, in Node's own binary form (base64): JSON would lose
 * what is not a finite number, and with it the identity of a resumed run with an unbroken one. `check` is the
 * start of the SHA-256 of the line's other parts. A line is written whole before the next; what a kill left torn
 * at the end is cut off when the journal is opened again.
 */

export interface Journal {
  /** points taken over from an earlier run */
  readonly finished: ReadonlyMap<number, FinishedPoint>;
  /** points in it, taken over and appended */
  readonly size: number;
  /** returns when the point is in the hands of the operating system, where a killed process cannot lose it */
  append(index: number, point: FinishedPoint): void;
  /** deletes the file, once the results are safe elsewhere */
  remove(): void;
  close(): void;
}

/** Longest stretch of work that a power cut can take: waiting for the disk at each point would slow small studies. */
const SYNC_EVERY_MS = 250;

/**
 * Opens the journal of a run, or starts one. The caller holds the lock of the results (output-lock.ts).
 *
 * @param key - of the study; a journal that begins otherwise is started anew
 */
export function openJournal(path: string, key: string): Journal {
  const header = `${JSON.stringify({ format: 'farwell/journal', version: 1, key })}\n`;
  const { finished, validBytes } = readJournal(path, header);
  const file = openSync(path, validBytes === 0 ? 'w' : 'r+');
  ftruncateSync(file, validBytes);
  let position = validBytes;
  const write = (text: string) => {
    const bytes = Buffer.from(text);
    let done = 0;
    while (done < bytes.length) done += writeSync(file, bytes, done, bytes.length - done, position + done);
    position += done;
  };
  if (validBytes === 0) write(header);
  fsyncSync(file);
  let lastSync = performance.now();
  let { size } = finished;

  return {
    finished,
    get size() {
      return size;
    },
    append(index, point) {
      write(journalLine(index, point));
      size++;
      if (performance.now() - lastSync < SYNC_EVERY_MS) return;
      fsyncSync(file);
      lastSync = performance.now();
    },
    remove: () => rmSync(path),
    close() {
      fsyncSync(file);
      closeSync(file);
    },
  };
}

function journalLine(index: number, point: FinishedPoint): string {
  const data = serialize(point).toString('base64');
  return `${JSON.stringify({ index, data, check: checkOf(index, data) })}\n`;
}

function checkOf(index: number, data: string): string {
  return sha256(`${index}:${data}`).slice(0, 16);
}

/** Everything up to the first line that is not whole; nothing at all if the header is another one. */
function readJournal(
  path: string,
  header: string,
): { finished: Map<number, FinishedPoint>; validBytes: number } {
  const finished = new Map<number, FinishedPoint>();
  const text = readIfPresent(path);
  if (!text.startsWith(header)) return { finished, validBytes: 0 };
  let valid = header.length;
  for (;;) {
    const end = text.indexOf('\n', valid);
    const entry = end < 0 ? undefined : parseLine(text.slice(valid, end));
    // the journal is plain ASCII, so that characters count bytes
    if (!entry) return { finished, validBytes: valid };
    finished.set(entry.index, entry.point);
    valid = end + 1;
  }
}

function readIfPresent(path: string): string {
  try {
    return readFileSync(path, 'latin1');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return '';
    throw error;
  }
}

function parseLine(line: string): { index: number; point: FinishedPoint } | undefined {
  try {
    const { index, data, check } = JSON.parse(line) as { index: number; data: string; check: string };
    if (check !== checkOf(index, data)) return undefined;
    return { index, point: deserialize(Buffer.from(data, 'base64')) as FinishedPoint };
  } catch {
    return undefined; // torn, or not a line of ours
  }
}
