import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readResultsFile } from '../../../app/calculation/read-results-file';
import { resultsJson } from '../../../app/calculation/write-results';
import { sampleResults } from '../../support/sample-results';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();

function written(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

describe('readResultsFile', () => {
  it('takes the name of the study from the name of the file', async () => {
    const text = resultsJson(sampleResults());
    for (const name of ['a.results.json', 'a.json', 'a']) {
      expect(await readResultsFile(written(name, text))).toMatchObject({ ok: true, name: 'a' });
    }
  });

  it('refuses what is missing, cut off, or something else', async () => {
    const text = resultsJson(sampleResults());
    const codeOf = async (path: string) => {
      const file = await readResultsFile(path);
      return file.ok ? 'accepted' : file.issues[0]?.code;
    };
    expect(await codeOf(join(folder, 'missing'))).toBe('file.missing');
    expect(await codeOf(written('cut', text.slice(0, text.length / 2)))).toBe('json.syntax');
    expect(await codeOf(written('study', '{"format": "farwell/study", "version": 1}'))).toBe(
      'results.format',
    );
  });
});
