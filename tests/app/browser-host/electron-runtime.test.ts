import { chmodSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import {
  fetchElectron,
  findElectronPackage,
  findElectronProgram,
  runElectron,
} from '../../../app/browser-host/electron-runtime';

const NEVER = new AbortController().signal;
let root: string;
let folder: string;

beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'farwell-runtime-test-'));
  folder = join(root, 'node_modules', 'electron');
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, 'package.json'), JSON.stringify({ version: '45.5.0' }));
});
afterEach(() => rmSync(root, { recursive: true, force: true }));

const electron = () => findElectronPackage(root)!;
const writeInstaller = (script: string) => writeFileSync(join(folder, 'install.js'), script);
const INSTALL = `
  const { mkdirSync, writeFileSync } = require('node:fs');
  mkdirSync(__dirname + '/dist', { recursive: true });
  writeFileSync(__dirname + '/dist/version', '45.5.0');
  writeFileSync(__dirname + '/dist/program', '');
  writeFileSync(__dirname + '/path.txt', 'program');`;

describe('findElectronPackage', () => {
  it('is undefined where the package is not installed', () => {
    expect(findElectronPackage(join(root, 'elsewhere'))).toBeUndefined();
    expect(electron()).toEqual({ folder, version: '45.5.0' });
  });
});

describe('fetchElectron', () => {
  it('leaves a program that is then found', async () => {
    writeInstaller(INSTALL);
    expect(findElectronProgram(electron())).toBeUndefined();
    expect(await fetchElectron(electron(), NEVER)).toEqual({ ok: true });
    expect(findElectronProgram(electron())).toBe(join(folder, 'dist', 'program'));
  });

  it('is repeated for another version', async () => {
    writeInstaller(INSTALL);
    await fetchElectron(electron(), NEVER);
    expect(findElectronProgram({ folder, version: '46.0.0' })).toBeUndefined();
  });

  it('tells in one line why it failed', async () => {
    writeInstaller('throw new Error("the proxy refuses\\nand more")');
    expect(await fetchElectron(electron(), NEVER)).toEqual({ ok: false, reason: 'the proxy refuses' });
  });

  it('gives up on a download that does not arrive, and leaves no temporary files', async () => {
    writeInstaller('setInterval(() => {}, 1000)');
    const before = temporaryFolders();
    const outcome = await fetchElectron(electron(), NEVER, 200);
    expect(outcome).toEqual({ ok: false, reason: 'the download does not arrive' });
    expect(temporaryFolders()).toEqual(before);
  });

  it('is patient with a slow download that keeps arriving', async () => {
    writeInstaller(`
      const { appendFileSync } = require('node:fs');
      const file = require('node:os').tmpdir() + '/download';
      const timer = setInterval(() => appendFileSync(file, 'x'), 50);
      setTimeout(() => { clearInterval(timer); ${INSTALL} }, 2500);`);
    expect(await fetchElectron(electron(), NEVER, 1000)).toEqual({ ok: true });
  });

  it('ends with the program that it was started by', async () => {
    writeInstaller('setInterval(() => {}, 1000)');
    const stop = new AbortController();
    const outcome = fetchElectron(electron(), stop.signal);
    stop.abort();
    expect(await outcome).toMatchObject({ ok: false });
  });
});

describe('runElectron', () => {
  function writeProgram(script: string): string {
    const program = join(root, 'program');
    writeFileSync(program, `#!/bin/sh\n${script}\n`);
    chmodSync(program, 0o755);
    return program;
  }

  it('is content when the window was closed', async () => {
    expect(await runElectron(writeProgram('exit 0'), root, NEVER)).toEqual({ ok: true });
  });

  it('gives the reason of a program that ends before it can have shown a window', async () => {
    const program = writeProgram('echo "[12:00:00:FATAL:sandbox.cc(1)] no usable sandbox" >&2; exit 133');
    expect(await runElectron(program, root, NEVER)).toEqual({ ok: false, reason: 'no usable sandbox' });
  });

  it('gives a reason for a program that cannot be started', async () => {
    expect(await runElectron(join(root, 'absent'), root, NEVER)).toMatchObject({ ok: false });
  });
});

function temporaryFolders(): readonly string[] {
  return readdirSync(tmpdir()).filter((name) => name.startsWith('farwell-fetch-'));
}
