import type { Vector3 } from '../molecule/molecule';

/** Which functions a shell of angular momentum l ≥ 2 has: 2l + 1 real solid harmonics, or all (l + 1)(l + 2)/2 products. */
export type Harmonics = 'spherical' | 'cartesian';

/** A contracted shell as published: no centre, coefficients multiply *normalised* primitives. */
export interface ShellDefinition {
  readonly angularMomentum: number;
  /** bohr⁻² */
  readonly exponents: readonly number[];
  readonly coefficients: readonly number[];
}

/**
 * A contracted shell on an atom.
 *
 * Function order inside a shell: s; p as x, y, z; Cartesian l ≥ 2 in lexical order xx, xy, xz, yy, yz, zz, …
 * (x exponent falling, then y); spherical l ≥ 2 with m = −l … +l. Every *function* is normalised to 1, the
 * Cartesian ones too.
 */
export interface PlacedShell {
  readonly atom: number;
  /** bohr */
  readonly centre: Vector3;
  readonly angularMomentum: number;
  /** bohr⁻² */
  readonly exponents: Float64Array;
  /**
   * multiply the bare primitive x^l·exp(−αr²) of the shell, so that the contracted function x^l is normalised;
   * what other Cartesian components need beyond that is applied by the integral code
   */
  readonly coefficients: Float64Array;
  /** index of the shell's first function in the molecule's basis */
  readonly firstFunction: number;
  readonly functionCount: number;
}

/** All functions of a molecule, in the order of its atoms. */
export interface PlacedBasis {
  readonly shells: readonly PlacedShell[];
  readonly functionCount: number;
  readonly harmonics: Harmonics;
}
