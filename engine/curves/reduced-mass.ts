import { DALTON_IN_ELECTRON_MASSES } from '../constants';
import { isotopeMassDalton, requireElement } from '../molecule/elements';

/** One end of a diatomic molecule. */
export interface MassOfAtom {
  readonly element: string;
  /** mass number; absent: the most abundant isotope */
  readonly isotope?: number;
}

/** Whether the electrons ride along with their atoms (the usual choice) or only the bare nuclei move. */
export type MassKind = 'atomic' | 'nuclear';

/**
 * Reduced mass of two atoms: m₁m₂/(m₁ + m₂).
 *
 * With `nuclear` each mass is that of the atom less its Z electrons; the electrons' binding energy, at most
 * 1e-8 of the mass up to argon, is left out. An ion is given its neutral atoms' masses.
 *
 * @returns in electron masses
 * @throws EngineError `molecule.unknownElement`, `molecule.unknownIsotope`
 */
export function reducedMass(first: MassOfAtom, second: MassOfAtom, kind: MassKind = 'atomic'): number {
  const a = massOf(first, kind);
  const b = massOf(second, kind);
  return (a * b) / (a + b);
}

function massOf({ element, isotope }: MassOfAtom, kind: MassKind): number {
  const atom = isotopeMassDalton(element, isotope) * DALTON_IN_ELECTRON_MASSES;
  return kind === 'atomic' ? atom : atom - requireElement(element).atomicNumber;
}
