import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';

/** A fresh folder that is deleted after the tests of the calling file. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'farwell-test-'));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}
