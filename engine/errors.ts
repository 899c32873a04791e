/** Every way the engine can refuse a request, with the facts its message is made of. */
export interface EngineErrorDetails {
  'molecule.empty': Record<string, never>;
  'molecule.coordinate': { readonly atom: number; readonly value: number };
  'molecule.charge': { readonly charge: number };
  'molecule.unknownElement': { readonly symbol: string; readonly nearest?: string };
  'molecule.unknownIsotope': { readonly symbol: string; readonly isotope: number };
  'molecule.atomsCoincide': {
    readonly first: number;
    readonly second: number;
    readonly distanceBohr: number;
  };
  'molecule.noElectrons': { readonly electrons: number };
  'molecule.spinMismatch': { readonly electrons: number; readonly multiplicity: number };
  'scan.atomIndex': { readonly index: number; readonly atoms: number };
  'scan.ring': { readonly bond: readonly [number, number] };
  'scan.tornTwoWays': { readonly atom: number };
  'scan.value': { readonly value: number };
  'scan.count': { readonly count: number };
  'scan.undefinedCoordinate': { readonly reason: string };
  'basis.unknown': { readonly name: string; readonly nearest?: string };
  'basis.elementMissing': { readonly basis: string; readonly symbol: string };
  'basis.shell': { readonly symbol: string; readonly shell: number };
  'basis.scaleFactor': { readonly symbol: string; readonly shell: string };
  'basis.file': { readonly file: string };
  'basis.twice': { readonly name: string };
  'basis.empty': Record<string, never>;
  'basis.linearlyDependent': { readonly smallestEigenvalue: number; readonly threshold: number };
  'basis.tooFewFunctions': { readonly functions: number; readonly orbitalsNeeded: number };
  'level.unknown': { readonly level: string; readonly nearest?: string };
  'level.none': Record<string, never>;
  'level.twice': { readonly level: string };
  'level.needsClosedShell': { readonly level: string; readonly multiplicity: number };
  'level.tooFewOrbitals': { readonly level: string; readonly orbitals: number };
  'study.active': { readonly electrons: number; readonly orbitals: number };
  'study.orbitals': { readonly level: string };
  'study.states': { readonly states: number };
  'study.convergence': { readonly tolerance: number };
  'study.referenceWeight': { readonly weight: number };
  'study.notDiatomic': Record<string, never>;
  'study.isotopologue': { readonly count: number };
  'study.tooLarge': { readonly bytes: number; readonly limit: number };
}

export type EngineErrorCode = keyof EngineErrorDetails;

/** An error as data: what crosses threads and processes, where classes do not survive. */
export interface SerializedEngineError<C extends EngineErrorCode = EngineErrorCode> {
  readonly code: C;
  /** where in the study, as a path such as `molecule.atoms[1].element`; empty: the study as a whole */
  readonly place: string;
  /** what is wrong, in the user's words, with the value */
  readonly message: string;
  /** what to do next */
  readonly remedy: string;
  readonly details: EngineErrorDetails[C];
}

/** A request that the engine refuses, or a broken precondition. */
export class EngineError<C extends EngineErrorCode = EngineErrorCode>
  extends Error
  implements SerializedEngineError<C>
{
  override readonly name = 'EngineError';
  readonly code: C;
  readonly remedy: string;
  readonly details: EngineErrorDetails[C];
  readonly place: string;

  constructor(code: C, message: string, remedy: string, details: EngineErrorDetails[C], place = '') {
    super(message);
    this.code = code;
    this.remedy = remedy;
    this.details = details;
    this.place = place;
  }

  toJSON(): SerializedEngineError<C> {
    return {
      code: this.code,
      place: this.place,
      message: this.message,
      remedy: this.remedy,
      details: this.details,
    };
  }
}
