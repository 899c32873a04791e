import type { AtomDraft } from './draft';

/** A pasted table of atoms, or the first line that is not one. */
export type PastedAtoms =
  | { readonly ok: true; readonly atoms: readonly AtomDraft[] }
  | { readonly ok: false; readonly line: number; readonly text: string };

const ATOM_LINE = /^\s*([A-Za-z]{1,2})[\s,;]+(\S+?)[\s,;]+(\S+?)[\s,;]+(\S+)\s*$/;

/**
 * Reads plain lines `element x y z`. Lines that begin with `#` are remarks, as `farwell report --geometry` writes; others
 * are not guessed at: a line that is neither blank nor an atom is reported.
 */
export function readPastedAtoms(text: string): PastedAtoms {
  const atoms: AtomDraft[] = [];
  for (const [index, line] of text.split(/\r?\n/).entries()) {
    if (/^\s*(#|$)/.test(line)) continue;
    const match = ATOM_LINE.exec(line);
    const [, element = '', x = '', y = '', z = ''] = match ?? [];
    if (match === null || [x, y, z].some((number) => !Number.isFinite(Number(number))))
      return { ok: false, line: index + 1, text: line.trim() };
    atoms.push({ element, at: [x, y, z], isotope: '', ghost: false });
  }
  return atoms.length === 0 ? { ok: false, line: 1, text: '' } : { ok: true, atoms };
}
