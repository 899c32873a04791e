import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

/** The folder of package.json, found from the sources as well as from a bundle in `out/`. */
function findProgramFolder(): string {
  let folder = import.meta.dirname;
  while (!existsSync(join(folder, 'package.json'))) folder = dirname(folder);
  return folder;
}

const FOLDER = findProgramFolder();

/** What a results file says about the program that made it. */
export const PROGRAM = {
  name: 'farwell',
  version: (JSON.parse(readFileSync(join(FOLDER, 'package.json'), 'utf8')) as { version: string }).version,
} as const;

/** The built file that a worker thread runs, also for a caller that itself runs from the sources. */
export const WORKER_FILE = join(FOLDER, 'out', 'worker.js');

/** The same for a thread that helps one. */
export const HELPER_FILE = join(FOLDER, 'out', 'helper.js');
