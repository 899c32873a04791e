import { join } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import type { StudyResults } from '#engine';
import { studyCsv } from '../study/csv';

/** The results file as text: every number with all the digits of a double, numbers that are not finite as null. */
export function resultsJson(results: StudyResults): string {
  return `${JSON.stringify(results, null, 2)}\n`;
}

/**
 * Writes `NAME.results.json` and `NAME.csv`. Each appears whole or not at all, and stays after a power cut.
 *
 * @returns the paths written
 */
export async function writeResults(
  results: StudyResults,
  folder: string,
  name: string,
): Promise<readonly string[]> {
  const files = [
    { path: join(folder, `${name}.results.json`), text: resultsJson(results) },
    { path: join(folder, `${name}.csv`), text: studyCsv(results) },
  ];
  for (const { path, text } of files) await writeFileAtomic(path, text);
  return files.map(({ path }) => path);
}
