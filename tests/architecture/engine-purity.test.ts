import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

/** What a pure engine must not see, one statement each. */
const FORBIDDEN = [
  'document.title;',
  'window.alert;',
  'process.env;',
  'Buffer.from("");',
  'console.log(1);',
  'performance.now();',
  'setTimeout(() => undefined);',
  'structuredClone(1);',
  'fetch("x");',
  'import("node:fs");',
  'import("electron");',
];

/** Compiles `text` under the settings that engine/tsconfig.json gives. @returns the numbers of the lines with errors */
function linesWithErrors(folder: string, text: string): readonly number[] {
  writeFileSync(join(folder, 'snippet.ts'), text);
  const project = {
    extends: resolve('engine/tsconfig.json'),
    compilerOptions: {
      rootDir: folder,
      outDir: join(folder, 'out'),
      composite: false,
      noEmit: true,
      emitDeclarationOnly: false,
      declaration: false,
    },
    include: ['snippet.ts'],
  };
  writeFileSync(join(folder, 'tsconfig.json'), JSON.stringify(project));
  const output = compile(['-p', join(folder, 'tsconfig.json')]);
  return [
    ...new Set([...output.matchAll(/^.*snippet\.ts\((\d+),\d+\): error/gm)].map((match) => Number(match[1]))),
  ];
}

function compile(args: readonly string[]): string {
  try {
    return execFileSync(process.execPath, [resolve('node_modules/typescript/bin/tsc'), ...args], {
      encoding: 'utf8',
    });
  } catch (error) {
    return String((error as { readonly stdout?: string }).stdout);
  }
}

describe('engine/tsconfig.json', () => {
  let folder: string;
  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'farwell-purity-test-'));
  });
  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  it('gives the engine the language and nothing around it', () => {
    const shown = JSON.parse(compile(['-p', 'engine/tsconfig.json', '--showConfig']));
    expect(shown.compilerOptions).toMatchObject({ lib: ['es2023'], types: [], strict: true });
  });

  it('lets plain numerical code through', () => {
    expect(
      linesWithErrors(folder, 'export const root: number = Math.sqrt(new Float64Array([2])[0] ?? 0);\n'),
    ).toEqual([]);
  });

  it(`refuses ${FORBIDDEN.join(' ')}`, () => {
    const text = ['export {};', ...FORBIDDEN].join('\n');
    expect(linesWithErrors(folder, text)).toEqual(FORBIDDEN.map((_, index) => index + 2));
  });
});

describe('the engine', () => {
  it('draws no random numbers and asks no clock, which the compiler would allow', () => {
    const impure = /\bMath\.random\b|\bDate\.now\b|\bnew Date\b/;
    const names = readdirSync('engine', { recursive: true, encoding: 'utf8' });
    const files = names.filter((name) => name.endsWith('.ts')).map((name) => join('engine', name));
    expect(files.length).toBeGreaterThan(20);
    expect(files.filter((file) => impure.test(readFileSync(file, 'utf8')))).toEqual([]);
  });
});
