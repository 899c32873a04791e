import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** The npm package `electron`: its program may have to be fetched before the first start. */
export interface ElectronPackage {
  readonly folder: string;
  readonly version: string;
}

export type Outcome = { readonly ok: true } | { readonly ok: false; readonly reason: string };

/** A download that does not grow for this long will not arrive. */
const STALL_MS = 20_000;
const LOOK_EVERY_MS = 1000;
/** An Electron that ends with an error within this time has not shown a window. */
const EARLY_EXIT_MS = 15_000;
const KEPT_OUTPUT = 4000;

export function findElectronPackage(root: string): ElectronPackage | undefined {
  const folder = join(root, 'node_modules', 'electron');
  const description = join(folder, 'package.json');
  if (!existsSync(description)) return undefined;
  const { version } = JSON.parse(readFileSync(description, 'utf8')) as { readonly version: string };
  return { folder, version };
}

/** @returns the program, if it has been fetched in the version that the package asks for */
export function findElectronProgram({ folder, version }: ElectronPackage): string | undefined {
  const read = (...names: string[]) => {
    const path = join(folder, ...names);
    return existsSync(path) ? readFileSync(path, 'utf8').trim() : undefined;
  };
  const name = read('path.txt');
  if (name === undefined || read('dist', 'version')?.replace(/^v/, '') !== version) return undefined;
  const program = join(folder, 'dist', name);
  return existsSync(program) ? program : undefined;
}

/**
 * Fetches the program with the package's own installer, for as long as data keep arriving: a time limit alone would
 * either cut off slow lines or wait long where nothing comes at all.
 *
 * @param stallMs - how long nothing may arrive
 */
export async function fetchElectron(
  { folder }: ElectronPackage,
  signal: AbortSignal,
  stallMs = STALL_MS,
): Promise<Outcome> {
  const temporary = mkdtempSync(join(tmpdir(), 'farwell-fetch-'));
  const child = spawn(process.execPath, [join(folder, 'install.js')], {
    stdio: ['ignore', 'ignore', 'pipe'],
    // the installer downloads into the folder for temporary files, where its growth can be seen
    env: {
      ...process.env,
      TMPDIR: temporary,
      TEMP: temporary,
      TMP: temporary,
      ELECTRON_GET_NO_PROGRESS: '1',
    },
    signal,
    killSignal: 'SIGKILL',
  });
  const output = tail(child.stderr);
  let arrived = 0;
  let lastGrowth = Date.now();
  let isStalled = false;
  const watch = setInterval(
    () => {
      const size = sizeOfFolder(temporary) + sizeOfFolder(join(folder, 'dist'));
      if (size !== arrived) {
        arrived = size;
        lastGrowth = Date.now();
      } else if (Date.now() - lastGrowth >= stallMs) {
        isStalled = true;
        child.kill('SIGKILL');
      }
    },
    Math.min(LOOK_EVERY_MS, stallMs),
  );
  const status = await ended(child);
  clearInterval(watch);
  rmSync(temporary, { recursive: true, force: true });
  if (status === 0) return { ok: true };
  return { ok: false, reason: isStalled ? 'the download does not arrive' : reasonIn(output()) };
}

/** Shows the window in Electron and waits for its end. @returns the reason if no window came up */
export async function runElectron(program: string, root: string, signal: AbortSignal): Promise<Outcome> {
  const started = Date.now();
  const child = spawn(program, [root], { stdio: ['ignore', 'inherit', 'pipe'], signal });
  const output = tail(child.stderr);
  const status = await ended(child);
  const hasFailed = status !== 0 && !signal.aborted && Date.now() - started < EARLY_EXIT_MS;
  return hasFailed ? { ok: false, reason: reasonIn(output()) } : { ok: true };
}

function ended(child: ReturnType<typeof spawn>): Promise<number | null> {
  return new Promise((resolve) => {
    child.once('error', () => resolve(null));
    child.once('close', resolve);
  });
}

/** Keeps the end of what is written; what Chromium says to itself is of no use on the user's terminal. */
function tail(stream: NodeJS.ReadableStream): () => string {
  let text = '';
  stream.on('data', (chunk: Buffer) => {
    text = (text + chunk.toString()).slice(-KEPT_OUTPUT);
  });
  return () => text;
}

/** The line that names the error, without its class or its place in Chromium's sources. */
function reasonIn(output: string): string {
  const lines = output.split('\n').map((line) => line.trim());
  const telling =
    lines.find((line) => /\w*Error: |FATAL|ERROR/.test(line)) ?? lines.find((line) => line !== '');
  return telling?.replace(/^(\w*Error: |\[[^\]]*\] ?)+/, '') ?? 'no reason was given';
}

function sizeOfFolder(folder: string): number {
  try {
    const names = readdirSync(folder, { recursive: true, encoding: 'utf8' });
    const sizes = names.map((name) => statSync(join(folder, name), { throwIfNoEntry: false })?.size ?? 0);
    return sizes.reduce((sum, size) => sum + size, 0);
  } catch {
    // not there, or its folders come and go while the installer works
    return 0;
  }
}
