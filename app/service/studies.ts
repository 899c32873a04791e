import { explainStudy, type PreparedStudy, prepareStudy } from '#engine';
import { memoryBudget } from '../calculation/memory';
import type { StudyCheck, StudyIssue } from '../contract/requests';
import { parseStudy } from '../study/parse-study';
import { studySentence } from '../study/sentence';
import { serializeError } from './answer';

/** A study read from its text and accepted by the engine, or everything that is wrong with it. */
export type ReadStudy =
  | { readonly ok: true; readonly prepared: PreparedStudy }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

export function readStudy(text: string): ReadStudy {
  const parsed = parseStudy(text);
  if (!parsed.ok) return parsed;
  const { study } = parsed;
  if (typeof study.basis === 'object' && 'file' in study.basis) {
    return { ok: false, issues: [fileOutOfReach(study.basis.file)] };
  }
  const preparation = prepareStudy(study, { memoryLimit: memoryBudget() });
  if (preparation.ok) return preparation;
  return {
    ok: false,
    issues: preparation.errors.map((error) => serializeError(error)),
  };
}

export function checkStudy(text: string): StudyCheck {
  const read = readStudy(text);
  if (!read.ok) return read;
  const { study } = read.prepared;
  return {
    ok: true,
    study,
    sentence: studySentence(study),
    explanation: explainStudy(read.prepared),
  };
}

/** The window hands over the text of a study and not its place on the disk, so there is no place to look from. */
function fileOutOfReach(file: string): StudyIssue {
  return {
    code: 'basis.file',
    place: 'basis.file',
    message: `The window reads no other files than the study itself, so the basis set in “${file}” is out of its reach.`,
    remedy: 'Run this study with `farwell run`, or write the shells of the basis set into the study.',
  };
}
