import { basename, dirname, isAbsolute, resolve } from 'node:path';
import { type PreparedStudy, prepareStudy, type Study } from '#engine';
import type { StudyIssue } from '../contract/requests';
import { parseStudy } from '../study/parse-study';
import { memoryBudget } from './memory';
import { type FileKind, readTextFile } from './read-text-file';

/** Far above any study written by hand, with its basis set spelled out. */
const STUDY_FILE: FileKind = { name: 'The study', mostBytes: 4_000_000 };
/** Collections of basis sets for the whole periodic table have a few megabytes. */
const BASIS_FILE: FileKind = { name: 'The basis-set file', mostBytes: 32_000_000 };

export type StudyFile =
  | {
      readonly ok: true;
      /** the file's name without its endings: `NAME` of `NAME.study.json` */
      readonly name: string;
      readonly prepared: PreparedStudy;
      readonly basisFileText?: string;
    }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

/** Reads a study with the basis-set file that it may name, and checks it completely. */
export async function readStudyFile(path: string): Promise<StudyFile> {
  const file = await readTextFile(path, STUDY_FILE);
  if (!file.ok) return { ok: false, issues: [file.issue] };
  const parsed = parseStudy(file.text);
  if (!parsed.ok) return parsed;
  const basisFile = await readBasisFile(parsed.study, dirname(path));
  if (basisFile && !basisFile.ok) return { ok: false, issues: [basisFile.issue] };
  const options = basisFile ? { basisFileText: basisFile.text } : {};
  const preparation = prepareStudy(parsed.study, { ...options, memoryLimit: memoryBudget() });
  if (!preparation.ok) return { ok: false, issues: preparation.errors };
  return { ok: true, name: studyName(path), prepared: preparation.prepared, ...options };
}

/** Undefined if the study names no file. */
async function readBasisFile({ basis }: Study, folder: string) {
  if (typeof basis === 'string' || !('file' in basis)) return undefined;
  const place = 'basis.file';
  if (isAbsolute(basis.file)) {
    const issue: StudyIssue = {
      code: 'file.absolute',
      place,
      message: `“${basis.file}” is an absolute path, which would tie the study to one computer.`,
      remedy: 'Give the path from the folder of the study.',
    };
    return { ok: false, issue } as const;
  }
  return readTextFile(resolve(folder, basis.file), BASIS_FILE, place);
}

function studyName(path: string): string {
  return basename(path).replace(/(\.study)?\.json$/i, '') || basename(path);
}
