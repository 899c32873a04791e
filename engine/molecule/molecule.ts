/** A point or displacement in bohr. */
export type Vector3 = readonly [number, number, number];

/** A nucleus (or, as a ghost, the bare place where one would be). */
export interface Atom {
  readonly symbol: string;
  readonly atomicNumber: number;
  /** in e; 0 for a ghost, which keeps its basis functions only */
  readonly nuclearCharge: number;
  /** in bohr */
  readonly position: Vector3;
  /** mass number; absent: the most abundant isotope */
  readonly isotope?: number;
}

/** Nuclei in space with a total charge and a spin multiplicity 2S + 1. */
export interface Molecule {
  readonly atoms: readonly Atom[];
  readonly charge: number;
  readonly multiplicity: number;
}
