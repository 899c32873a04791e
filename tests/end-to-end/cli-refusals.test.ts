import { closeSync, ftruncateSync, openSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { farwell } from '../support/built-program';
import { helium } from '../support/end-to-end-studies';
import { temporaryFolder } from '../support/temporary-folder';

const folder = temporaryFolder();
let files = 0;

function written(text: string | Uint8Array): string {
  const path = join(folder, `${++files}.study.json`);
  writeFileSync(path, text);
  return path;
}

/** Refused by `check` and by `run` alike, with a message and no trace of the program's inside. */
async function refusal(path: string): Promise<string> {
  const [check, run] = await Promise.all([farwell('check', path), farwell('run', path)]);
  for (const { status, stdout, stderr } of [check, run]) {
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).not.toMatch(/^\s+at |node:internal|\.js:\d|Error:|undefined|\[object/m);
    expect(stderr).toContain(`farwell: ${path} was refused.`);
  }
  expect(run.stderr).toBe(check.stderr);
  expect(readdirSync(folder).filter((name) => !name.endsWith('.study.json'))).toEqual([]);
  return check.stderr;
}

/** The place and the words that a refusal must have. */
async function expectRefusal(
  study: unknown,
  place: string,
  ...words: readonly (string | RegExp)[]
): Promise<void> {
  const text = await refusal(written(typeof study === 'string' ? study : JSON.stringify(study)));
  expect(text).toContain(`\n  ${place}`);
  for (const word of words) expect(text).toMatch(word);
}

const { molecule, scan } = helium;
const withAtoms = (...atoms: readonly unknown[]) => ({ ...helium, molecule: { ...molecule, atoms } });
const atom = (element: string, ...at: readonly number[]) => ({ element, at });

describe('farwell check and run refuse', () => {
  it('a multiplicity that the electrons cannot have', () =>
    expectRefusal(
      { ...helium, molecule: { ...molecule, charge: 0, multiplicity: 1 } },
      'molecule.multiplicity',
      /3 electrons/,
    ));

  it('an unknown element', () =>
    expectRefusal(withAtoms(atom('He', 0, 0, 0), atom('Hx', 0, 0, 1)), 'molecule.atoms[1].element', /Hx/));

  it('an unknown basis set, with the nearest name', () =>
    expectRefusal({ ...helium, basis: 'STO-3' }, 'basis', /STO-3G/));

  it('an unknown level', () => expectRefusal({ ...helium, levels: ['RHF', 'CISQ'] }, 'levels[1]', /CISQ/));

  it('atoms on top of each other', () =>
    expectRefusal(withAtoms(atom('He', 0, 0, 1), atom('H', 0, 0, 1)), 'molecule.atoms[1].at'));

  it('a scan that brings atoms onto each other', () =>
    expectRefusal({ ...helium, scan: { ...scan, from: 0 } }, 'scan.from'));

  it('numbers that are none', async () => {
    const text = JSON.stringify(helium);
    await expectRefusal(text.replace('0.7743', 'NaN'), 'Line 1', /NaN/);
    await expectRefusal(text.replace('0.7743', '1e999'), 'molecule.atoms[1].at');
    await expectRefusal(text.replace('0.7743', '"0.7743"'), 'molecule.atoms[1].at');
    await expectRefusal(text.replace('0.7743', 'null'), 'molecule.atoms[1].at');
  });

  it('a million points', () =>
    expectRefusal({ ...helium, scan: { ...scan, count: 1_000_000 } }, 'scan.count', /1000000|1,000,000/));

  it('a misspelt key, with the one that may be meant', () =>
    expectRefusal({ ...helium, frozencore: true }, 'frozencore', /frozenCore/));

  it('a key named __proto__', () =>
    expectRefusal(
      JSON.stringify(helium).replace('"title"', '"__proto__": {"levels": []}, "title"'),
      '__proto__',
    ));

  it('truncated JSON, wherever it is cut', async () => {
    const text = JSON.stringify(helium, null, 2);
    for (const share of [0.3, 0.6, 0.99])
      await refusal(written(text.slice(0, Math.floor(text.length * share))));
    await refusal(written(''));
  });

  it('another kind of file', async () => {
    await expectRefusal({ ...helium, format: 'farwell/results' }, 'format');
    for (const text of ['[]', 'null', '7', '"text"', '{}']) await refusal(written(text));
    expect(await refusal(written(Uint8Array.of(0x7b, 0xff, 0x7d)))).toContain('UTF-8');
  });

  it('a file of 100 MB, at once', async () => {
    const path = join(folder, 'large.study.json');
    const file = openSync(path, 'w');
    ftruncateSync(file, 100e6);
    closeSync(file);
    const started = Date.now();
    expect(await refusal(path)).toContain('100 MB');
    expect(Date.now() - started).toBeLessThan(10_000);
  });

  it('a file that is not there, and a folder', async () => {
    expect(await refusal(join(folder, 'missing.study.json'))).toContain('no file');
    expect(await refusal(folder)).toContain('not a file');
  });

  it('a basis-set file that is not there or leads away from the study', async () => {
    await expectRefusal({ ...helium, basis: { file: 'missing.json' } }, 'basis.file', /missing\.json/);
    await expectRefusal({ ...helium, basis: { file: '/etc/hostname' } }, 'basis.file', /absolute/);
  });

  it('several mistakes at once, all of them', async () => {
    const text = await refusal(
      written(
        JSON.stringify({
          ...helium,
          states: 1000,
          molecule: { ...molecule, charge: 0, multiplicity: 1 },
        }),
      ),
    );
    for (const place of ['states', 'molecule.multiplicity']) expect(text).toContain(`  ${place}`);
  });
});

describe('the command line refuses', () => {
  it.each([
    [[], 'A command is missing.'],
    [['rnu', 'a.study.json'], 'There is no command “rnu”.'],
    [['run', 'a.study.json', '--fast'], 'There is no option “--fast” here.'],
    [['run'], '“farwell run” needs a file to work on.'],
    [['basis', 'STO-3'], 'There is no basis set “STO-3”.'],
    [['report', 'missing.results.json'], 'There is no file “missing.results.json”.'],
  ])('%j', async (argv, message) => {
    const { status, stdout, stderr } = await farwell(...argv);
    expect(stderr).toContain(message);
    expect(stdout).toBe('');
    expect(status).toBe(2);
  });

  it('results that cannot be written, with status 4 and the place', async () => {
    const path = written(JSON.stringify(helium));
    const { status, stderr } = await farwell('run', path, '--out', '/proc/farwell');
    expect(status).toBe(4);
    expect(stderr).toContain('/proc/farwell');
    expect(stderr).not.toMatch(/^\s+at /m);
  });

  it('an output folder that is a file', async () => {
    const path = written(JSON.stringify(helium));
    const { status, stderr } = await farwell('run', path, '--out', path);
    expect(status).toBe(2);
    expect(stderr).toContain('is not a folder');
  });

  it('a damaged results file', async () => {
    const path = written('{"format": "farwell/results", "version": 1, "points": [');
    const { status, stderr } = await farwell('report', path);
    expect(status).toBe(2);
    expect(stderr).toContain('damaged');
  });
});
