import type { Harmonics, ShellDefinition } from './contracted-gaussian';

/** A paper that a set's numbers come from. */
export interface Citation {
  readonly key: string;
  /** authors, journal, volume, pages, year, doi — ready to print */
  readonly text: string;
}

/** A basis set ready to be placed on atoms. */
export interface BasisSet {
  readonly name: string;
  readonly harmonics: Harmonics;
  /** by element symbol */
  readonly elements: Readonly<Record<string, readonly ShellDefinition[]>>;
  readonly citations: readonly Citation[];
  /** corrections made to the published numbers and other remarks for the user */
  readonly notes: readonly string[];
}
