import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { createService } from '../service/service';
import { browserCommands, hasDisplay, openInBrowser, THIS_MACHINE } from './browser';
import { fetchElectron, findElectronPackage, findElectronProgram, runElectron } from './electron-runtime';
import { startBrowserHost } from './server';

/*
 * `npm start`: the window in Electron, or else in the installed browser. Built to out/start.js, beside the window.
 */

const ROOT = join(import.meta.dirname, '..');
const USAGE = `npm start [-- --browser | --no-open]
  --browser   opens the window in the installed browser instead of Electron
  --no-open   opens nothing: prints the window's address and serves it until stopped
FARWELL_WORKERS=N in the environment computes N points at a time instead of one for every core.
`;

const stop = new AbortController();
for (const name of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.once(name, () => stop.abort());

process.exitCode = await start(process.argv.slice(2));

/** @returns the exit status, with the meanings that the command line gives them */
async function start(argv: readonly string[]): Promise<number> {
  const options = readOptions(argv);
  if (options === undefined) return 2;
  if (options.help) {
    process.stdout.write(USAGE);
    return 0;
  }
  const rendererFolder = join(ROOT, 'out', 'renderer');
  if (!existsSync(join(rendererFolder, 'index.html'))) {
    say(`The window is not built: ${rendererFolder} is missing. Run \`npm ci\`, then start again.`);
    return 4;
  }
  if (!options['no-open'] && !options.browser) {
    const refusal = await showInElectron();
    if (refusal === undefined || stop.signal.aborted) return 0;
    say(`${refusal}; the same window opens in the browser instead.`);
  }
  await showInBrowser(rendererFolder, !options['no-open']);
  return 0;
}

function readOptions(argv: readonly string[]) {
  const flag = { type: 'boolean', default: false } as const;
  try {
    return parseArgs({ args: [...argv], options: { browser: flag, 'no-open': flag, help: flag } }).values;
  } catch (error) {
    say(`${error instanceof Error ? error.message : String(error)}\n${USAGE}`);
    return undefined;
  }
}

/** Waits until the window is closed. @returns why there was none, as the beginning of a sentence */
async function showInElectron(): Promise<string | undefined> {
  if (!hasDisplay(THIS_MACHINE)) return 'There is no display for a desktop window';
  const electron = findElectronPackage(ROOT);
  if (electron === undefined) return 'Electron is not installed';
  if (findElectronProgram(electron) === undefined) {
    say(`Fetching Electron ${electron.version} (about 120 MB, once) …`);
    const fetched = await fetchElectron(electron, stop.signal);
    if (!fetched.ok) return `Electron could not be fetched (${fetched.reason})`;
  }
  const program = findElectronProgram(electron);
  if (program === undefined) return 'Electron was fetched but is not complete';
  const shown = await runElectron(program, ROOT, stop.signal);
  return shown.ok ? undefined : `Electron could not open its window (${shown.reason})`;
}

/** Serves the window until the program is stopped. */
async function showInBrowser(rendererFolder: string, isOpened: boolean): Promise<void> {
  const samplesFolder = join(ROOT, 'sample-molecules');
  const host = await startBrowserHost({
    rendererFolder,
    service: (post) => createService({ host: 'browser', samplesFolder, post }),
  });
  process.stdout.write(`${host.address}\n`);
  const isShown = isOpened && (await openInBrowser(browserCommands(host.address, THIS_MACHINE)));
  if (isOpened && !isShown) say('No browser could be started from here: open the address above in one.');
  say('Serving until stopped: Ctrl+C ends it.');
  if (!stop.signal.aborted) await new Promise((resolve) => stop.signal.addEventListener('abort', resolve));
  await host.close();
}

function say(text: string): void {
  process.stderr.write(`${text}\n`);
}
