import { describe, expect, it } from 'vitest';
import {
  browserCommands,
  hasDisplay,
  openInBrowser,
  type Surroundings,
} from '../../../app/browser-host/browser';

const ADDRESS = 'http://127.0.0.1:4321/token/';

function machine(
  platform: NodeJS.Platform,
  files: readonly string[],
  environment: Readonly<Record<string, string>> = {},
): Surroundings {
  return { platform, environment, exists: (path) => files.includes(path) };
}

const LINUX = { PATH: '/usr/local/bin:/usr/bin', DISPLAY: ':0' };

describe('browserCommands', () => {
  it('prefers a window without tabs and address bar, then the browser that the user has chosen', () => {
    const linux = machine('linux', ['/usr/bin/xdg-open', '/usr/bin/firefox', '/usr/bin/chromium'], LINUX);
    expect(browserCommands(ADDRESS, linux)).toEqual([
      { program: '/usr/bin/chromium', arguments: [`--app=${ADDRESS}`] },
      { program: '/usr/bin/xdg-open', arguments: [ADDRESS] },
      { program: '/usr/bin/firefox', arguments: ['--new-window', ADDRESS] },
    ]);
  });

  it('has nothing to offer on Linux without a display', () => {
    expect(browserCommands(ADDRESS, machine('linux', ['/usr/bin/chromium'], { PATH: '/usr/bin' }))).toEqual(
      [],
    );
  });

  it('leaves the choice to macOS where no Chromium is installed', () => {
    expect(browserCommands(ADDRESS, machine('darwin', []))).toEqual([
      { program: 'open', arguments: [ADDRESS] },
    ]);
    expect(browserCommands(ADDRESS, machine('darwin', ['/Applications/Google Chrome.app']))[0]).toEqual({
      program: 'open',
      arguments: ['-n', '-a', 'Google Chrome', '--args', `--app=${ADDRESS}`],
    });
  });

  it('finds the browsers of Windows in the folders for programs', () => {
    const edge = 'C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe';
    const windows = machine('win32', [edge], { 'PROGRAMFILES(X86)': 'C:\\Program Files (x86)' });
    expect(browserCommands(ADDRESS, windows)).toEqual([
      { program: edge, arguments: [`--app=${ADDRESS}`] },
      { program: 'rundll32', arguments: ['url.dll,FileProtocolHandler', ADDRESS] },
    ]);
  });
});

describe('hasDisplay', () => {
  it('asks for a display server on Linux only', () => {
    expect(hasDisplay({ platform: 'linux', environment: {} })).toBe(false);
    expect(hasDisplay({ platform: 'linux', environment: { WAYLAND_DISPLAY: 'wayland-0' } })).toBe(true);
    expect(hasDisplay({ platform: 'darwin', environment: {} })).toBe(true);
  });
});

describe('openInBrowser', () => {
  const exitsWith = (status: number) => ({
    program: process.execPath,
    arguments: ['-e', `process.exit(${status})`],
  });

  it('takes the next command where one is missing or fails', async () => {
    const missing = { program: '/nowhere/browser', arguments: [] };
    expect(await openInBrowser([missing, exitsWith(1), exitsWith(0)])).toBe(true);
  });

  it('says so when none of them works', async () => {
    expect(await openInBrowser([exitsWith(1)])).toBe(false);
    expect(await openInBrowser([])).toBe(false);
  });
});
