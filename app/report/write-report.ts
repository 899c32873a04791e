import { mkdir } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import type { StudyResults } from '#engine';
import type { ReportOptions } from '../contract/requests';
import { reportFiles } from './report-files';

/**
 * Writes all files of a report into a folder that is made if need be. All are made before any is written.
 *
 * @param names - one a results file, without folder and endings
 * @returns the paths written
 * @throws ReportError `report.coordinatesDiffer` or `report.figureTooSmall`, before anything is written
 */
export async function writeReport(
  results: readonly StudyResults[],
  names: readonly string[],
  outDir: string,
  options: ReportOptions = {},
): Promise<readonly string[]> {
  const made = [];
  for (const { name, content } of reportFiles(results, names, options))
    made.push({ path: join(outDir, name), body: await content() });
  for (const { path, body } of made) {
    await mkdir(dirname(path), { recursive: true });
    await writeFileAtomic(path, typeof body === 'string' ? body : Buffer.from(body));
  }
  return made.map(({ path }) => path);
}
