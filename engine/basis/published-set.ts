import type { BasisSet } from './basis-set';
import type { Harmonics, ShellDefinition } from './contracted-gaussian';
import { elementMissing } from './element-missing';
import citationTexts from './library/citations.json';
import { normalisationNotes, withoutZeros } from './normalisation';

/** A file of library/: the numbers of one published basis set, as printed. */
export interface PublishedSet {
  readonly name: string;
  readonly aliases: readonly string[];
  readonly description: string;
  readonly harmonics: Harmonics;
  /** for the user of any of these elements */
  readonly remarks: readonly { readonly elements: readonly string[]; readonly text: string }[];
  readonly elements: Readonly<Record<string, PublishedElement>>;
}

interface PublishedElement {
  /** keys of library/citations.json */
  readonly citations: readonly string[];
  /** the functions for which no paper is known */
  readonly uncited?: readonly string[];
  readonly suspect?: readonly SuspectRow[];
  readonly shells: readonly PublishedShell[];
}

/**
 * One `l` with several rows is a general contraction; `l` of [0, 1] with two rows is an s and a p function on shared
 * exponents. Exponents in bohr⁻², final; coefficients multiply normalised primitives.
 */
interface PublishedShell {
  readonly l: readonly number[];
  readonly exponents: readonly number[];
  readonly coefficients: readonly (readonly number[])[];
}

/** A row that cannot have been meant as printed, with what takes its place. */
interface SuspectRow {
  readonly shell: number;
  readonly row: number;
  readonly corrected: readonly number[];
  readonly why: string;
}

const CITATIONS: Readonly<Record<string, string>> = citationTexts;

/** @throws RangeError for a key that library/citations.json does not have */
export function citation(key: string): { key: string; text: string } {
  const text = CITATIONS[key];
  if (text === undefined) throw new RangeError(`no citation ${key}`);
  return { key, text };
}

/**
 * The elements asked for out of a published set. Suspect rows are replaced, with a note; zeros of general
 * contractions are dropped.
 *
 * @throws EngineError `basis.elementMissing`
 */
export function loadPublishedSet(set: PublishedSet, symbols: readonly string[]): BasisSet {
  const wanted = new Set(symbols);
  const elements = new Map<string, readonly ShellDefinition[]>();
  const citationKeys = new Set<string>();
  const notes = set.remarks
    .filter((remark) => remark.elements.some((symbol) => wanted.has(symbol)))
    .map((remark) => remark.text);
  for (const symbol of wanted) {
    if (!Object.hasOwn(set.elements, symbol)) {
      throw elementMissing(set.name, symbol, Object.keys(set.elements));
    }
    const { citations, uncited = [], suspect = [], shells } = set.elements[symbol];
    for (const key of citations) citationKeys.add(key);
    elements.set(
      symbol,
      shells.flatMap((shell, index) =>
        contractions(
          shell,
          suspect.filter((row) => row.shell === index),
        ),
      ),
    );
    if (uncited.length > 0) notes.push(`${symbol}: no paper is known for the ${uncited.join(' and the ')}.`);
    for (const { shell, why, corrected } of suspect) {
      notes.push(`${symbol}, shell ${shell + 1}: coefficients corrected to ${corrected.join(', ')}; ${why}.`);
    }
  }
  return {
    name: set.name,
    harmonics: set.harmonics,
    elements: Object.fromEntries(elements),
    citations: [...citationKeys].map(citation),
    notes: [...notes, ...normalisationNotes(elements)],
  };
}

function contractions({ l, exponents, coefficients }: PublishedShell, suspect: readonly SuspectRow[]) {
  return coefficients.map((printed, row) =>
    withoutZeros({
      angularMomentum: l[l.length === 1 ? 0 : row],
      exponents,
      coefficients: suspect.find((entry) => entry.row === row)?.corrected ?? printed,
    }),
  );
}
