import type { StudyResults } from '#engine';
import type { StudyIssue } from '../contract/requests';
import { type Path, placeOf } from './place';
import { resultsSchema } from './results-schema';

export type ResultsReading =
  | { readonly ok: true; readonly results: StudyResults }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

/** More issues than this say no more: the file is damaged. */
const MOST_ISSUES = 5;

/** Reads a results file's text. What comes back has the form of results; its numbers are taken as they are. */
export function parseResults(text: string): ResultsReading {
  let value: unknown;
  try {
    value = JSON.parse(text, withoutPrototypes);
  } catch {
    return refuse(
      'json.syntax',
      '',
      'The results file is cut off or damaged: it is not JSON.',
      'Compute the study again.',
    );
  }
  const { format, version } = (value ?? {}) as { format?: unknown; version?: unknown };
  if (format === 'farwell/study') {
    return refuse(
      'results.format',
      'format',
      'This file holds a study, not results.',
      'Open it as a study and compute it.',
    );
  }
  if (format !== 'farwell/results') {
    return refuse(
      'results.format',
      'format',
      'This file does not hold results of Farwell.',
      'Choose a file that ends in .results.json.',
    );
  }
  if (version !== 1) {
    return refuse(
      'results.version',
      'version',
      `These results have version ${JSON.stringify(version) ?? 'none'}, and this Farwell reads version 1.`,
      typeof version === 'number' && version > 1
        ? 'Open them with a newer Farwell.'
        : 'They come from an older Farwell, or were changed. Compute the study again with this one.',
    );
  }
  const result = resultsSchema.safeParse(value);
  if (result.success) return { ok: true, results: result.data };
  const issues = result.error.issues.slice(0, MOST_ISSUES).map(({ path }) => {
    const place = placeOf(path as Path);
    return {
      code: 'results.form',
      place,
      message: `${place} is missing or holds what results do not have there.`,
      remedy: 'The file was changed or damaged: compute the study again.',
    };
  });
  return { ok: false, issues };
}

/** A key `__proto__` in the file must not become anything's prototype when objects are copied. */
function withoutPrototypes(key: string, value: unknown): unknown {
  return key === '__proto__' ? undefined : value;
}

function refuse(code: string, place: string, message: string, remedy: string): ResultsReading {
  return { ok: false, issues: [{ code, place, message, remedy }] };
}
