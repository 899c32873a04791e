import { readdirSync, readFileSync } from 'node:fs';
import { join, posix, sep } from 'node:path';
import { describe, expect, it } from 'vitest';

/**
 * What each layer may import besides itself; anything unlisted is forbidden. A rule names a layer, a package or the
 * beginning of one; `type:` allows types only, `file:` one file.
 */
const ALLOWED: Readonly<Record<string, readonly string[]>> = {
  engine: ['ml-matrix', 'chemical-elements'],
  'app/contract': ['type:#engine'],
  // of the engine's values only the constants: the window uses these files too
  'app/study': [
    'app/contract',
    'type:#engine',
    'file:engine/constants',
    'zod',
    'fastest-levenshtein',
    '@humanwhocodes/momoa',
  ],
  'app/calculation': ['app/contract', 'app/study', '#engine', 'node:', 'write-file-atomic'],
  'app/report': [
    'app/contract',
    'app/study',
    '#engine',
    'node:',
    'vega',
    '@resvg/resvg-wasm',
    'pdfmake',
    'fontkit',
    'write-file-atomic',
  ],
  'app/service': ['app/contract', 'app/study', 'app/calculation', 'app/report', '#engine', 'node:', 'zod'],
  'app/cli': [
    'app/contract',
    'app/study',
    'app/calculation',
    'app/report',
    '#engine',
    'node:',
    'commander',
    'cli-progress',
    'write-file-atomic',
    'zod',
  ],
  'app/main': ['app/contract', 'app/service', 'app/cli', 'electron', 'node:'],
  'app/browser-host': ['app/contract', 'app/service', 'node:'],
  'app/preload': ['app/contract', 'electron'],
  // the constants are numbers for unit conversion, kept in one place; nothing of the engine runs in the window
  'app/renderer': [
    'app/contract',
    'app/study',
    'type:#engine',
    'file:engine/constants',
    'react',
    'plotly.js-dist',
  ],
};

/** Inside engine/, a folder may import only folders named before it, and the files directly in engine/. */
const ENGINE_ORDER = [
  'kernels',
  'linear-algebra',
  'special-functions',
  'molecule',
  'basis',
  'integrals',
  'symmetry',
  'self-consistent-field',
  'perturbation',
  'configuration-interaction',
  'curves',
  'calculation',
];

/** Import and re-export statements, which begin a line, and imports in the middle of code. */
const IMPORT = new RegExp(
  [
    String.raw`^(?:import|export)\s+(?<type>type\b)?[\w\s{},*$]*?\bfrom\s+(?<from>'[^'\s]+'|"[^"\s]+")`,
    String.raw`^import\s+(?<bare>'[^'\s]+'|"[^"\s]+")`,
    String.raw`\b(?:import|require)\(\s*(?<called>'[^'\s]+'|"[^"\s]+")`,
  ].join('|'),
  'gm',
);

function layerOf(path: string): string {
  return Object.keys(ALLOWED).find((layer) => path.startsWith(`${layer}/`)) ?? 'outside';
}

function engineRank(path: string): number {
  if (path === 'engine/index.ts') return Number.POSITIVE_INFINITY; // the public door may name everything
  const [, folder = '', rest] = path.split('/');
  return rest === undefined ? -1 : ENGINE_ORDER.indexOf(folder);
}

interface Import {
  /** a layer, or the specifier of a package */
  readonly target: string;
  /** of a relative import */
  readonly path: string | undefined;
  readonly isType: boolean;
}

function isAllowed(rule: string, { target, path, isType }: Import): boolean {
  if (rule.startsWith('type:')) return isType && target === rule.slice('type:'.length);
  if (rule.startsWith('file:')) return path === rule.slice('file:'.length);
  return target.startsWith(rule);
}

/** One line for each forbidden import in `text`, read as the source of `file`. */
function violations(file: string, text: string): string[] {
  const layer = layerOf(file);
  return [...text.matchAll(IMPORT)].flatMap(({ groups }) => {
    const specifier = (groups?.from ?? groups?.bare ?? groups?.called ?? '').slice(1, -1);
    const path = specifier.startsWith('.') ? posix.join(posix.dirname(file), specifier) : undefined;
    const target = path === undefined ? specifier : layerOf(path);
    const isFine =
      target === layer && path !== undefined
        ? layer !== 'engine' || engineRank(path) <= engineRank(file)
        : ALLOWED[layer]?.some((rule) =>
            isAllowed(rule, { target, path, isType: groups?.type !== undefined }),
          );
    return isFine ? [] : [`${file} must not import ${specifier}`];
  });
}

const sourceFiles = (folder: string) =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.tsx?$/.test(name))
    .map((name) => join(folder, name).split(sep).join('/'));

describe('dependency direction', () => {
  const files = [...sourceFiles('engine'), ...sourceFiles('app')];

  it('every source file imports only what its layer may', () => {
    expect(files.length).toBeGreaterThan(50);
    expect(files.flatMap((file) => violations(file, readFileSync(file, 'utf8')))).toEqual([]);
  });

  it('every source file of app/ belongs to a layer', () => {
    const configuration = /^app\/[^/]+\.ts$/;
    expect(files.filter((file) => layerOf(file) === 'outside' && !configuration.test(file))).toEqual([]);
  });

  it('every folder of engine/ has a place in the order', () => {
    const folders = readdirSync('engine', { withFileTypes: true }).filter((entry) => entry.isDirectory());
    expect(folders.map(({ name }) => name).filter((name) => !ENGINE_ORDER.includes(name))).toEqual([]);
  });

  it('the contract consists of types', () => {
    const values = /^\s*(?:export\s+)?(?:default|const|let|var|function|class|enum|async)\b/m;
    for (const file of sourceFiles('app/contract'))
      expect(readFileSync(file, 'utf8'), file).not.toMatch(values);
  });
});

describe('the rules themselves', () => {
  it.each([
    ['engine/basis/x.ts', "import fs from 'node:fs'"],
    ['engine/basis/x.ts', "const m = await import('../../app/contract/y')"],
    ['engine/basis/x.ts', "import { fockMatrix } from '../self-consistent-field/fock'"],
    ['engine/constants.ts', "import { fockMatrix } from './self-consistent-field/fock'"],
    ['engine/curves/x.ts', "import { run } from '#engine'"],
    ['app/contract/x.ts', "import { computePoint } from '#engine'"],
    ['app/study/x.ts', "import { BOHR_IN_ANGSTROM } from '#engine'"],
    ['app/study/x.ts', "import { readFile } from 'node:fs/promises'"],
    ['app/calculation/x.ts', "import { createService } from '../service/service'"],
    ['app/service/x.ts', "import { startBrowserHost } from '../browser-host/server'"],
    ['app/service/x.ts', "import { BrowserWindow } from 'electron'"],
    ['app/main/windows.ts', "import { computePoint } from '#engine'"],
    ['app/main/windows.ts', "import { startBrowserHost } from '../browser-host/server'"],
    ['app/browser-host/x.ts', "import { BrowserWindow } from 'electron'"],
    ['app/preload/x.ts', "import { readFile } from 'node:fs/promises'"],
    ['app/renderer/x.tsx', "import { computePoint } from '#engine'"],
    ['app/renderer/x.tsx', "import { EngineError } from '../../engine/errors'"],
    ['app/renderer/x.tsx', "import { ipcRenderer } from 'electron'"],
    ['app/renderer/x.tsx', "import { createService } from '../service/service'"],
    ['app/cli/x.ts', "import { fockMatrix } from '../../engine/self-consistent-field/fock'"],
  ])('forbid, in %s, %s', (file, text) => {
    expect(violations(file, text)).toHaveLength(1);
  });

  it.each([
    ['engine/self-consistent-field/x.ts', "import { overlapMatrix } from '../integrals/overlap'"],
    ['engine/integrals/x.ts', "import { EngineError } from '../errors'"],
    ['app/contract/x.ts', "import type { StudyResults } from '#engine'"],
    ['app/contract/x.ts', "export type {\n  StudyResults,\n} from '#engine'"],
    ['app/calculation/x.ts', "import { computePoint } from '#engine'"],
    ['app/browser-host/x.ts', "import { answer } from '../service/answer'"],
    ['app/main/x.ts', "import { app } from 'electron'"],
    ['app/renderer/x.tsx', "import { parseStudy } from '../study/parse-study'"],
    ['app/renderer/x.ts', "import { BOHR_IN_ANGSTROM } from '../../engine/constants'"],
    ['app/renderer/panels/x.tsx', "import { Button } from 'react-aria-components'"],
  ])('allow, in %s, %s', (file, text) => {
    expect(violations(file, text)).toEqual([]);
  });
});
