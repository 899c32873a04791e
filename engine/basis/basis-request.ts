import type { Harmonics, ShellDefinition } from './contracted-gaussian';

/** Uncontracted exponents smallest·ratio^k, k = 0 … count − 1. */
export interface EvenTemperedShells {
  readonly angularMomentum: number;
  /** bohr⁻² */
  readonly smallest: number;
  readonly ratio: number;
  readonly count: number;
}

/** The basis as a study asks for it. */
export type BasisRequest =
  | string
  | {
      readonly name: string;
      /** Slater exponents by element and shell (`1s`, `2sp`, `3sp`), for STO-nG */
      readonly scaleFactors: Readonly<Record<string, Readonly<Record<string, number>>>>;
      /** true: the factors of lowest Hartree–Fock energy at every geometry, starting from those given */
      readonly optimiseScale?: boolean | undefined;
    }
  | {
      readonly name: string;
      /** the same, starting from the standard factors */
      readonly optimiseScale: boolean;
    }
  | {
      readonly name: string;
      readonly shells: Readonly<Record<string, readonly ShellDefinition[]>>;
      readonly harmonics?: Harmonics | undefined;
    }
  | {
      readonly name: string;
      readonly evenTempered: Readonly<Record<string, readonly EvenTemperedShells[]>>;
      readonly harmonics?: Harmonics | undefined;
    }
  | {
      /** path of a basis set in the open MolSSI JSON schema, relative to the study file */
      readonly file: string;
    };
