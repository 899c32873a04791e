import { execFileSync } from 'node:child_process';
import { copyFileSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, symlinkSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';

/* electron-builder.yml against electron-builder's own rules, without building or fetching anything. */

interface Configuration {
  readonly appId: string;
  readonly files: readonly string[];
  readonly directories: { readonly output: string; readonly buildResources: string };
  readonly extraMetadata: { readonly homepage: string };
  readonly electronFuses: Readonly<Record<string, boolean>>;
  readonly linux: { readonly icon: string; readonly maintainer: string; readonly target: readonly string[] };
  readonly mac: { readonly icon: string; readonly target: readonly { readonly target: string }[] };
  readonly win: { readonly icon: string; readonly target: readonly string[] };
}

// found from where electron-builder itself finds them
const require = createRequire(createRequire(import.meta.url).resolve('electron-builder'));
const builderRequire = createRequire(require.resolve('app-builder-lib'));
const { load } = builderRequire('js-yaml') as { load(text: string): unknown };
const { validateConfiguration } = require('app-builder-lib/out/util/config/config') as {
  validateConfiguration(configuration: unknown, log: { readonly isEnabled: boolean }): Promise<void>;
};

const read = (): Configuration => load(readFileSync('electron-builder.yml', 'utf8')) as Configuration;
const validate = (configuration: unknown) => validateConfiguration(configuration, { isEnabled: false });
let configuration: Configuration;
beforeAll(() => {
  configuration = read();
});

describe('electron-builder.yml', () => {
  it('is valid by the schema that electron-builder checks it with', async () => {
    await expect(validate(read())).resolves.toBeUndefined();
  });

  it('would not be valid with a misspelt key, at the top or below', async () => {
    await expect(validate({ ...read(), electronFuse: {} })).rejects.toThrow('electronFuse');
    await expect(validate({ ...read(), linux: { catgory: 'Science' } })).rejects.toThrow(
      'configuration.linux',
    );
  });

  it('makes the packages that are promised', () => {
    expect(configuration.linux.target).toEqual(['AppImage', 'deb']);
    expect(configuration.mac.target.map(({ target }) => target)).toEqual(['dmg']);
    expect(configuration.win.target).toEqual(['nsis']);
  });

  it('names only files that exist', () => {
    const names = configuration.files.filter(
      (pattern) => !pattern.startsWith('!') && !pattern.startsWith('out/'),
    );
    const paths = names.map((pattern) => pattern.replace(/\/\*\*.*$/, ''));
    const { linux, mac, win, directories } = configuration;
    for (const path of [...paths, directories.buildResources, linux.icon, mac.icon, win.icon]) {
      expect(existsSync(path), path).toBe(true);
    }
  });

  it('packs the program that package.json starts, and keeps packages out of the repository', () => {
    const { main, version } = JSON.parse(readFileSync('package.json', 'utf8'));
    expect(main).toBe('./out/electron-main.js');
    expect(version).toMatch(/^\d+\.\d+\.\d+$/);
    expect(configuration.files).toContain('out/**/*');
    expect(readFileSync('.gitignore', 'utf8').split('\n')).toContain(`/${configuration.directories.output}/`);
  });

  it('gives the deb package the page and the person that it must name', () => {
    expect(configuration.extraMetadata.homepage).toMatch(/^https:\/\//);
    expect(configuration.linux.maintainer).toMatch(/^.+ <.+@.+>$/);
  });

  it('closes the ways in that Electron leaves open', () => {
    expect(configuration.electronFuses).toMatchObject({
      runAsNode: false,
      enableNodeOptionsEnvironmentVariable: false,
      enableNodeCliInspectArguments: false,
      enableEmbeddedAsarIntegrityValidation: true,
      onlyLoadAppFromAsar: true,
      grantFileProtocolExtraPrivileges: false,
    });
  });
});

describe('the icon', () => {
  it('is a square picture large enough for every system', () => {
    const picture = readFileSync(configuration.linux.icon);
    expect(picture.subarray(1, 4).toString()).toBe('PNG');
    expect([picture.readUInt32BE(16), picture.readUInt32BE(20)]).toEqual([512, 512]);
  });

  it('is drawn from icon.svg as it is now', () => {
    const folder = mkdtempSync(join(tmpdir(), 'farwell-icon-test-'));
    try {
      mkdirSync(join(folder, 'resources'));
      symlinkSync(join(process.cwd(), 'node_modules'), join(folder, 'node_modules'));
      for (const name of ['draw-icon.mjs', 'icon.svg']) {
        copyFileSync(join('app/resources', name), join(folder, 'resources', name));
      }
      execFileSync(process.execPath, [join(folder, 'resources', 'draw-icon.mjs')]);
      const drawn = readFileSync(join(folder, 'resources', 'icon.png'));
      expect(drawn.equals(readFileSync('app/resources/icon.png'))).toBe(true);
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });
});
