import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { farwell, type RunningProgram, startFarwell } from '../support/built-program';
import { water } from '../support/end-to-end-studies';
import { temporaryFolder } from '../support/temporary-folder';

const folder = temporaryFolder();
const study = join(folder, 'water.study.json');
const unbroken = join(folder, 'unbroken');
let expected: { readonly results: string; readonly csv: string };

const filesIn = (out: string) => ({
  results: readFileSync(join(out, 'water.results.json'), 'utf8'),
  csv: readFileSync(join(out, 'water.csv'), 'utf8'),
});

function journalLines(out: string): readonly string[] {
  const names = existsSync(out) ? readdirSync(out) : [];
  const journal = names.find((name) => /^water\.partial-[0-9a-f]{8}\.jsonl$/.test(name));
  return journal === undefined ? [] : readFileSync(join(out, journal), 'utf8').split('\n').slice(1, -1);
}

/** Waits until a run has kept some points but not all. */
async function midway(out: string, running: RunningProgram): Promise<void> {
  while (journalLines(out).length < 2) {
    if (running.process.exitCode !== null) throw new Error('the run ended before it could be interrupted');
    await new Promise((resolve) => setTimeout(resolve, 5));
  }
}

async function expectToGoOn(out: string): Promise<void> {
  const kept = journalLines(out).length;
  expect(kept).toBeLessThan(9);
  const { status, stderr } = await farwell('run', study, '--out', out);
  expect(stderr).toContain(`Going on from ${kept} of 9 points`);
  expect(status).toBe(0);
  expect(filesIn(out)).toEqual(expected);
  expect(readdirSync(out).sort()).toEqual(['water.csv', 'water.results.json']);
}

beforeAll(async () => {
  writeFileSync(study, JSON.stringify(water));
  const { status } = await farwell('run', study, '--out', unbroken);
  expect(status).toBe(0);
  expected = filesIn(unbroken);
});

describe('farwell run, interrupted', () => {
  it('goes on after kill -9, to the same files to the last byte', async () => {
    const out = join(folder, 'killed');
    const running = startFarwell('run', study, '--out', out);
    await midway(out, running);
    running.process.kill('SIGKILL');
    expect((await running.ended).status).toBe('SIGKILL');
    expect(existsSync(join(out, 'water.results.json'))).toBe(false);
    await expectToGoOn(out);
  });

  it('goes on after being killed again and again', async () => {
    const out = join(folder, 'killed-often');
    for (const points of [1, 3, 5]) {
      const running = startFarwell('run', study, '--out', out, '--workers', '1');
      while (journalLines(out).length < points) await new Promise((resolve) => setTimeout(resolve, 5));
      running.process.kill('SIGKILL');
      await running.ended;
    }
    await expectToGoOn(out);
  });

  it.each(['SIGINT', 'SIGTERM'] as const)(
    'keeps the finished points on %s, says so, and goes on',
    async (signal) => {
      const out = join(folder, signal);
      const running = startFarwell('run', study, '--out', out);
      await midway(out, running);
      const sent = Date.now();
      running.process.kill(signal);
      const { status, stdout, stderr } = await running.ended;
      expect(Date.now() - sent).toBeLessThan(5000);
      expect(status).toBe(3);
      expect(stdout).toBe('');
      expect(stderr.trimEnd().split('\n').at(-1)).toBe(
        `Interrupted. Finished and kept: ${journalLines(out).length} of 9 points; the same command goes on from there.`,
      );
      await expectToGoOn(out);
    },
  );

  it('never mixes points of a changed study in, and goes on with the first one when it comes back', async () => {
    const out = join(folder, 'changed');
    const running = startFarwell('run', study, '--out', out);
    await midway(out, running);
    running.process.kill('SIGKILL');
    await running.ended;
    const changed = join(folder, 'changed', 'water.study.json');
    writeFileSync(changed, JSON.stringify({ ...water, levels: ['RHF'] }));
    const other = await farwell('run', changed);
    expect(other.status).toBe(0);
    expect(other.stderr).not.toContain('Going on');
    const { stderr } = await farwell('run', study, '--out', out);
    expect(stderr).toContain('Going on from');
    expect(filesIn(out)).toEqual(expected);
  });

  it('refuses a second run into the same folder while the first goes on', async () => {
    const out = join(folder, 'twice');
    const first = startFarwell('run', study, '--out', out);
    await midway(out, first);
    const second = await farwell('run', study, '--out', out);
    expect(second.status).toBe(4);
    expect(second.stderr).toContain(`process ${first.process.pid}`);
    expect((await first.ended).status).toBe(0);
    expect(filesIn(out)).toEqual(expected);
  });

  it('keeps nothing with --print, and says that', async () => {
    const running = startFarwell('run', study, '--print');
    await running.saw('H₂O');
    running.process.kill('SIGINT');
    const { status, stdout, stderr } = await running.ended;
    expect(status).toBe(3);
    expect(stdout).toBe('');
    expect(stderr).toContain('nothing is kept');
  });
});
