import { basename } from 'node:path';
import type { StudyResults } from '#engine';
import type { StudyIssue } from '../contract/requests';
import { parseResults } from '../study/parse-results';
import { type FileKind, readTextFile } from './read-text-file';

/** Thousands of points of a large study. */
const RESULTS_FILE: FileKind = { name: 'The results file', mostBytes: 400_000_000 };

export type ResultsFile =
  | {
      readonly ok: true;
      /** the file's name without its endings: `NAME` of `NAME.results.json` */
      readonly name: string;
      readonly results: StudyResults;
    }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

/** Reads results and checks that they have the form of results. */
export async function readResultsFile(path: string): Promise<ResultsFile> {
  const file = await readTextFile(path, RESULTS_FILE);
  if (!file.ok) return { ok: false, issues: [file.issue] };
  const parsed = parseResults(file.text);
  if (!parsed.ok) return parsed;
  return { ok: true, name: basename(path).replace(/(\.results)?\.json$/i, ''), results: parsed.results };
}
