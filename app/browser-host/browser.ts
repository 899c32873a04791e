import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { posix, win32 } from 'node:path';

/** What the choice of a browser depends on. */
export interface Surroundings {
  readonly platform: NodeJS.Platform;
  readonly environment: Readonly<Record<string, string | undefined>>;
  exists(path: string): boolean;
}

export interface Command {
  readonly program: string;
  readonly arguments: readonly string[];
}

/** Browsers that show one page without tabs and address bar, by the names of their programs. */
const APP_WINDOW_PROGRAMS = [
  'chromium',
  'chromium-browser',
  'google-chrome',
  'google-chrome-stable',
  'microsoft-edge',
  'microsoft-edge-stable',
  'brave-browser',
];
const APP_WINDOW_APPLICATIONS = ['Google Chrome', 'Microsoft Edge', 'Chromium', 'Brave Browser'];
const APP_WINDOW_EXECUTABLES = [
  'Google\\Chrome\\Application\\chrome.exe',
  'Microsoft\\Edge\\Application\\msedge.exe',
];

/** A command that fails within this time has not shown the page. */
const EARLY_EXIT_MS = 3000;

/** Ways to show a page, the best first: a window without browser furniture, then the user's own browser. */
export function browserCommands(address: string, surroundings: Surroundings): readonly Command[] {
  const { platform, environment, exists } = surroundings;
  const appWindow = `--app=${address}`;
  switch (platform) {
    case 'darwin':
      return [
        ...APP_WINDOW_APPLICATIONS.filter((name) => exists(`/Applications/${name}.app`)).map((name) => ({
          program: 'open',
          arguments: ['-n', '-a', name, '--args', appWindow],
        })),
        { program: 'open', arguments: [address] },
      ];
    case 'win32': {
      const bases = [environment.PROGRAMFILES, environment['PROGRAMFILES(X86)'], environment.LOCALAPPDATA];
      const paths = APP_WINDOW_EXECUTABLES.flatMap((path) =>
        bases.flatMap((base) => (base === undefined ? [] : [win32.join(base, path)])),
      );
      return [
        ...paths.filter(exists).map((program) => ({ program, arguments: [appWindow] })),
        { program: 'rundll32', arguments: ['url.dll,FileProtocolHandler', address] },
      ];
    }
    default: {
      if (!hasDisplay(surroundings)) return [];
      const folders = (environment.PATH ?? '').split(posix.delimiter).filter((folder) => folder !== '');
      const find = (name: string) =>
        folders
          .map((folder) => posix.join(folder, name))
          .filter(exists)
          .slice(0, 1);
      return [
        ...APP_WINDOW_PROGRAMS.flatMap(find).map((program) => ({ program, arguments: [appWindow] })),
        ...find('xdg-open').map((program) => ({ program, arguments: [address] })),
        ...find('firefox').map((program) => ({ program, arguments: ['--new-window', address] })),
      ];
    }
  }
}

/** On Linux and its relatives a window needs a display server; elsewhere there is always one. */
export function hasDisplay({ platform, environment }: Omit<Surroundings, 'exists'>): boolean {
  if (platform === 'darwin' || platform === 'win32') return true;
  return Boolean(environment.DISPLAY || environment.WAYLAND_DISPLAY);
}

export const THIS_MACHINE: Surroundings = {
  platform: process.platform,
  environment: process.env,
  exists: existsSync,
};

/** @returns whether one of the commands showed the page, as far as can be told from outside */
export async function openInBrowser(commands: readonly Command[]): Promise<boolean> {
  for (const command of commands) {
    if (await startsWell(command)) return true;
  }
  return false;
}

function startsWell(command: Command): Promise<boolean> {
  return new Promise((resolve) => {
    const child = spawn(command.program, command.arguments, { detached: true, stdio: 'ignore' });
    child.unref();
    const timer = setTimeout(() => resolve(true), EARLY_EXIT_MS);
    const settle = (good: boolean) => {
      clearTimeout(timer);
      resolve(good);
    };
    child.once('error', () => settle(false));
    child.once('exit', (status) => settle(status === 0));
  });
}
