import type { Study, StudyResults } from '#engine';
import type { StudyIssue } from '../../contract/requests';
import { parseResults } from '../../study/parse-results';
import { parseStudy } from '../../study/parse-study';

/** What a file turned out to hold. */
export type OpenedFile =
  | { readonly kind: 'study'; readonly study: Study }
  | { readonly kind: 'results'; readonly results: StudyResults }
  | { readonly kind: 'refused'; readonly issues: readonly StudyIssue[] };

/** Told apart by the `format` that the text names, not by its file name. */
export function readOpened(text: string): OpenedFile {
  if (namesResults(text)) {
    const read = parseResults(text);
    return read.ok ? { kind: 'results', results: read.results } : { kind: 'refused', issues: read.issues };
  }
  const read = parseStudy(text);
  return read.ok ? { kind: 'study', study: read.study } : { kind: 'refused', issues: read.issues };
}

const namesResults = (text: string): boolean => /"format"\s*:\s*"farwell\/results"/.test(text);
