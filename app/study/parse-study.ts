import type { Study } from '#engine';
import type { StudyIssue } from '../contract/requests';
import { explainIssues } from './explain-issues';
import { readJson } from './json-text';
import { studySchema } from './schema';

export type StudyReading =
  | { readonly ok: true; readonly study: Study }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

/**
 * Reads a study file's text. A study that comes back has the right form; whether its elements, basis set and
 * levels exist and fit together is for the engine to say.
 */
export function parseStudy(text: string): StudyReading {
  const json = readJson(text);
  if (!json.ok) return json;
  const foreign = checkFormat(json.value);
  if (foreign) return { ok: false, issues: [foreign] };
  const result = studySchema.safeParse(json.value);
  if (result.success) return { ok: true, study: result.data };
  return { ok: false, issues: explainIssues(result.error.issues, json.value, json.lineOf) };
}

/** Another kind of file is refused as a whole: its keys would only make a list of false issues. */
function checkFormat(value: unknown): StudyIssue | undefined {
  const { format, version } = (value ?? {}) as { format?: unknown; version?: unknown };
  if (format === 'farwell/results') {
    return {
      code: 'study.format',
      place: 'format',
      message: 'This file holds results, not a study.',
      remedy: 'Open it as results, or copy its "study" part into a file of its own.',
    };
  }
  if (format !== 'farwell/study') {
    return {
      code: 'study.format',
      place: 'format',
      message:
        format === undefined
          ? 'This is not a study: its "format" is missing.'
          : `This is not a study: its "format" is ${JSON.stringify(format)}.`,
      remedy: 'A study begins with "format": "farwell/study", "version": 1.',
    };
  }
  if (version === 1) return undefined;
  const isNewer = typeof version === 'number' && version > 1;
  return {
    code: 'study.version',
    place: 'version',
    message:
      version === undefined
        ? 'The "version" of the study is missing.'
        : `There is no study version ${JSON.stringify(version)}.`,
    remedy: isNewer ? 'Read it with a newer Farwell, or write "version": 1.' : 'Write "version": 1.',
  };
}
