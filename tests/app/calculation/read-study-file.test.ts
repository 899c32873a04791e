import { mkdirSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readStudyFile } from '../../../app/calculation/read-study-file';
import { helium } from '../../support/end-to-end-studies';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();

function written(name: string, study: unknown): string {
  const path = join(folder, name);
  writeFileSync(path, JSON.stringify(study));
  return path;
}

async function issuesOf(study: unknown) {
  const file = await readStudyFile(written('refused.study.json', study));
  if (file.ok) throw new Error('the study was accepted');
  return file.issues.map(({ code, place }) => ({ code, place }));
}

describe('readStudyFile', () => {
  it('takes the name of the study from the name of the file', async () => {
    for (const name of ['a.study.json', 'a.STUDY.JSON', 'a.json', 'a']) {
      expect(await readStudyFile(written(name, helium))).toMatchObject({ ok: true, name: 'a' });
    }
    expect(await readStudyFile(written('.study.json', helium))).toMatchObject({
      ok: true,
      name: '.study.json',
    });
  });

  it('collects what the form and what the engine refuse', async () => {
    expect(await issuesOf({ ...helium, levels: 'RHF' })).toEqual([{ code: 'study.value', place: 'levels' }]);
    expect(await issuesOf({ ...helium, basis: 'STO-9G' })).toEqual([
      { code: 'basis.unknown', place: 'basis' },
    ]);
  });

  it('looks for a basis-set file from the folder of the study, and refuses what is no file there', async () => {
    mkdirSync(join(folder, 'sets'));
    const refused = (file: string) => issuesOf({ ...helium, basis: { file } });
    expect(await refused('sets/missing.json')).toEqual([{ code: 'file.missing', place: 'basis.file' }]);
    expect(await refused('sets')).toEqual([{ code: 'file.notAFile', place: 'basis.file' }]);
    expect(await refused('/etc/passwd')).toEqual([{ code: 'file.absolute', place: 'basis.file' }]);
    symlinkSync('/dev/zero', join(folder, 'sets', 'endless.json'));
    expect(await refused('sets/endless.json')).toEqual([{ code: 'file.notAFile', place: 'basis.file' }]);
  });
});
