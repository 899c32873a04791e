import { mostAbundantIsotope, requireElement } from '../molecule/elements';
import table from './measured/diatomic-constants.json';
import type { MassOfAtom } from './reduced-mass';

/** What was measured; the symbol that spectroscopists use stands behind it. */
export type MeasuredQuantity =
  /** ωe */
  | 'harmonicWavenumber'
  /** ωexe */
  | 'anharmonicity'
  /** ωeye */
  | 'secondAnharmonicity'
  /** Be */
  | 'rotationalConstant'
  /** αe */
  | 'vibrationRotationCoupling'
  /** γe */
  | 'secondVibrationRotationCoupling'
  /** D̄e */
  | 'centrifugalDistortion'
  /** re */
  | 'equilibriumDistance'
  /** D0 */
  | 'dissociationEnergy'
  /** Te, from the ground state */
  | 'termEnergy'
  /** ν₀₀, between the lowest levels of the ground state and this one */
  | 'originOfLowestLevels'
  /** lowest level above the minimum */
  | 'zeroPointEnergy'
  /** ΔG(½), from v = 0 to v = 1 */
  | 'firstInterval'
  /** B₀ */
  | 'lowestRotationalConstant'
  | 'dunhamY10'
  | 'dunhamY20'
  | 'dunhamY01'
  | 'dunhamY11'
  | 'dunhamY02';

export interface MeasuredConstant {
  readonly quantity: MeasuredQuantity;
  /** as printed, with brackets and uncertainties */
  readonly printed: string;
  readonly value: number;
  readonly unit: 'cm⁻¹' | 'Å' | 'eV' | 'MHz';
  /** full citation */
  readonly source: string;
  /** whether the number was read in the source or an open copy of it, or is only remembered */
  readonly status: 'seen' | 'memory';
  readonly note?: string;
}

export interface MeasuredState {
  /** such as `X ¹Σg⁺`; X is the ground state */
  readonly state: string;
  readonly isGroundState: boolean;
  /** the same quantity from two sources stands twice */
  readonly constants: readonly MeasuredConstant[];
}

/**
 * Measured constants of a diatomic molecule.
 *
 * Source: `measured/diatomic-constants.json`, mostly K. P. Huber, G. Herzberg, Constants of Diatomic Molecules (1979);
 * each constant names its own.
 *
 * @param first, second - in either order; without isotope the most abundant one
 * @returns its electronic states, the ground state first; empty where nothing is known of this isotopologue
 * @throws EngineError `molecule.unknownElement`
 */
export function measuredStates(
  first: MassOfAtom,
  second: MassOfAtom,
  charge: number,
): readonly MeasuredState[] {
  return byMolecule.get(keyOf(first, second, charge)) ?? [];
}

function keyOf(first: MassOfAtom, second: MassOfAtom, charge: number): string {
  const atoms = [first, second].map(({ element, isotope }) => {
    const massNumber = isotope ?? mostAbundantIsotope(requireElement(element)).massNumber;
    return `${massNumber}${element}`;
  });
  return [...atoms.sort(), charge].join(' ');
}

const sources: Readonly<Record<string, string>> = table.sources;

const byMolecule: ReadonlyMap<string, readonly MeasuredState[]> = table.states.reduce((map, entry) => {
  const [first, second] = entry.atoms;
  const key = keyOf(first, second, entry.charge);
  const state: MeasuredState = {
    state: entry.state,
    isGroundState: entry.state.startsWith('X '),
    constants: entry.constants.map((constant) => ({
      ...(constant as Omit<MeasuredConstant, 'value' | 'source'>),
      value: numberIn(constant.printed),
      source: sources[constant.source],
    })),
  };
  return map.set(key, [...(map.get(key) ?? []), state]);
}, new Map<string, readonly MeasuredState[]>());

/** The number in a print such as `[280.96]`, `0.8617E-3` or `2857.5692(92)`. */
function numberIn(printed: string): number {
  return Number(printed.replace(/\(\d+\)|[[\]]/g, ''));
}
