import { execFileSync } from 'node:child_process';
import { closeSync, ftruncateSync, openSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readTextFile } from '../../../app/calculation/read-text-file';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
const kind = { name: 'The study', mostBytes: 100 };

async function refusal(path: string) {
  const file = await readTextFile(path, kind, 'basis.file');
  if (file.ok) throw new Error('the file was accepted');
  expect(file.issue.place).toBe('basis.file');
  expect(file.issue.remedy).not.toBe('');
  return file.issue;
}

function written(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('readTextFile', () => {
  it('gives the text without a byte-order mark', async () => {
    expect(await readTextFile(written('a', '\ufeffHeH⁺'), kind)).toEqual({ ok: true, text: 'HeH⁺' });
  });

  it('refuses a file above the limit by its size, without reading it', async () => {
    const path = join(folder, 'sparse');
    const file = openSync(path, 'w');
    ftruncateSync(file, 5e9);
    closeSync(file);
    const { code, message } = await refusal(path);
    expect(code).toBe('file.tooLarge');
    expect(message).toContain('5000 MB');
  });

  it('accepts a file of exactly the limit', async () => {
    expect((await readTextFile(written('limit', 'x'.repeat(100)), kind)).ok).toBe(true);
    expect((await refusal(written('limit', 'x'.repeat(101)))).code).toBe('file.tooLarge');
  });

  it('refuses what is not there, a folder, a pipe and bytes that are not UTF-8', async () => {
    expect((await refusal(join(folder, 'missing'))).code).toBe('file.missing');
    expect((await refusal(folder)).code).toBe('file.notAFile');
    expect((await refusal(written('latin1', Uint8Array.of(0x48, 0xe9, 0x48)))).code).toBe('file.notText');
    expect((await refusal(join(folder, 'limit', 'below'))).code).toBe('file.unreadable');
    expect((await refusal('a\0b')).code).toBe('file.unreadable');
  });

  it.skipIf(process.platform === 'win32')('does not wait for somebody to write into a pipe', async () => {
    const path = join(folder, 'pipe');
    execFileSync('mkfifo', [path]);
    expect((await refusal(path)).code).toBe('file.notAFile');
  });
});
