import type { z } from 'zod';
import type { StudyIssue } from '../contract/requests';
import { MOST_ISSUES } from './json-text';
import { nearest } from './nearest';
import { type Path, placeOf } from './place';
import type { IssueParams } from './schema-fields';

/**
 * Puts what a schema found into plain words: place, what is wrong with which value, line, and what to do; at most
 * `MOST_ISSUES` of them.
 *
 * @param value - what the schema was given
 * @param lineOf - line of a path in the file
 */
export function explainIssues(
  issues: readonly z.core.$ZodIssue[],
  value: unknown,
  lineOf: (path: Path) => number,
): readonly StudyIssue[] {
  const explained = issues
    .slice(0, MOST_ISSUES)
    .map((issue) => explain(issue, issue.path as Path, value, lineOf));
  // a misspelt key is one mistake, not also a missing one
  const meant = new Set(explained.map(({ meantPlace }) => meantPlace));
  return explained
    .filter(({ issue }) => !(issue.code === 'study.missing' && meant.has(issue.place)))
    .map(({ issue }) => issue);
}

interface Explained {
  readonly issue: StudyIssue;
  /** place of the key that a misspelt one was meant to be */
  readonly meantPlace?: string;
}

function explain(
  issue: z.core.$ZodIssue,
  path: Path,
  root: unknown,
  lineOf: (path: Path) => number,
): Explained {
  const place = placeOf(path);
  const line = `(line ${lineOf(path)})`;
  const value = path.reduce<unknown>(
    (object, key) => (object as Record<string | number, unknown>)[key],
    root,
  );
  const params = issue.code === 'custom' ? (issue.params as IssueParams | undefined) : undefined;
  if (value === undefined) {
    const remedy = `Add it: it ${issue.message}.`;
    return { issue: { code: 'study.missing', place, message: `${place} is missing ${line}.`, remedy } };
  }
  if (params?.code === 'study.unknownKey') {
    const meant = nearest(String(path.at(-1)), params.known);
    const remedy = meant
      ? `Write “${meant}” if that is meant, or remove it.`
      : `Remove it; possible here: ${params.known.join(', ')}.`;
    const message = `${place} is not a key of a study ${line}.`;
    return {
      issue: { code: params.code, place, message, remedy },
      ...(meant ? { meantPlace: placeOf([...path.slice(0, -1), meant]) } : {}),
    };
  }
  if (params?.code === 'level.unknown' && typeof value === 'string') {
    const meant = nearest(value, params.known);
    const remedy = meant ? `Write "${meant}" if that is meant.` : `Choose from ${params.known.join(', ')}.`;
    return {
      issue: { code: params.code, place, message: `There is no level ${show(value)} ${line}.`, remedy },
    };
  }
  const message = `${place || 'The study'} ${issue.message}; it is ${show(value)} ${line}.`;
  return { issue: { code: 'study.value', place, message, remedy: 'Change the value there.' } };
}

/** A value short enough for a sentence. */
function show(value: unknown): string {
  const text = JSON.stringify(value);
  return text.length <= 60 ? text : `${text.slice(0, 57)}…`;
}
