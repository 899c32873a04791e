import { isUtf8 } from 'node:buffer';
import { readFile, stat } from 'node:fs/promises';
import type { StudyIssue } from '../contract/requests';

export type FileText =
  | { readonly ok: true; readonly text: string }
  | { readonly ok: false; readonly issue: StudyIssue };

/** What a file is called in messages, and how large it may be. */
export interface FileKind {
  /** starts a sentence, as in “The study” */
  readonly name: string;
  readonly mostBytes: number;
}

/**
 * The text of a UTF-8 file (without a byte-order mark), or why it is not to be had. Too large a file is refused by
 * its size, before it is read.
 *
 * @param place - where in the study the file is named; empty for the command line
 */
export async function readTextFile(path: string, kind: FileKind, place = ''): Promise<FileText> {
  const refuse = (code: string, message: string, remedy: string): FileText => ({
    ok: false,
    issue: { code: `file.${code}`, place, message, remedy },
  });
  try {
    // before opening: to open a pipe would wait for whoever writes into it
    const stats = await stat(path);
    if (!stats.isFile()) return refuse('notAFile', `“${path}” is not a file.`, 'Give the path of a file.');
    if (stats.size > kind.mostBytes) {
      return refuse(
        'tooLarge',
        `${kind.name} “${path}” has ${megabytes(stats.size)}; at most ${megabytes(kind.mostBytes)} are read.`,
        'Check that this is the right file.',
      );
    }
    const bytes = await readFile(path);
    if (!isUtf8(bytes))
      return refuse('notText', `${kind.name} “${path}” is not UTF-8 text.`, 'Save it as UTF-8.');
    return { ok: true, text: bytes.toString('utf8').replace(/^\ufeff/, '') };
  } catch (error) {
    const { code, message } = error as NodeJS.ErrnoException;
    if (code === 'ENOENT')
      return refuse('missing', `There is no file “${path}”.`, 'Check the name and the folder.');
    if (code === 'EACCES')
      return refuse('forbidden', `“${path}” may not be read.`, 'Ask for the right to read it.');
    return refuse('unreadable', `“${path}” cannot be read: ${message}.`, 'Check the path.');
  }
}

function megabytes(bytes: number): string {
  return `${Number((bytes / 1e6).toPrecision(3))} MB`;
}
