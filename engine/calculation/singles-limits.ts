import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import { bareNuclei } from './fragment-energy';
import { type FragmentState, fragmentStates, STATES_OF_A_FRAGMENT } from './fragment-states';
import { findLevel } from './levels';
import { type PreparedStudy, prepareFragment } from './prepare-study';
import type { ProductState } from './product-states';
import type { StudyAtom } from './study';

/** A part that RHF leaves with all its electrons paired. */
export interface ClosedShellPart {
  readonly charge: number;
  /** RHF, hartree */
  readonly energy: number;
  /** orbital energies that an electron can be excited from, rising */
  readonly occupied: readonly number[];
  /** and to; of a part without electrons those of one electron */
  readonly virtual: readonly number[];
  /** states of CIS within the part */
  readonly excited: readonly FragmentState[];
  /** energies, relative to RHF, from which on states are missing: within the part, and of an electron added */
  readonly completeBelow: { readonly excited: number; readonly virtual: number };
}

/**
 * RHF and CIS of a part with an even number of electrons.
 *
 * @returns undefined where it cannot be computed
 */
export function closedShellPart(
  prepared: PreparedStudy,
  atoms: readonly StudyAtom[],
  charge: number,
  control: RunControl,
): ClosedShellPart | undefined {
  const { unit } = prepared.study.molecule;
  const nuclei = bareNuclei({ unit, atoms, charge });
  if (nuclei !== undefined) return withoutElectrons(prepared, atoms, charge, nuclei, control);
  const molecule = { unit, atoms, charge, multiplicity: 1 };
  const preparations = [
    prepareFragment(prepared, molecule, 'RHF'),
    prepareFragment(prepared, molecule, 'CIS', STATES_OF_A_FRAGMENT),
  ];
  const [field, singles] = preparations.map(
    (preparation) =>
      preparation.ok && {
        ...preparation.prepared,
        levels: computePoint(preparation.prepared, null, { describesStates: false, control }).result.levels,
      },
  );
  if (!field || !singles) return undefined;
  const { RHF } = field.levels;
  const { CIS } = singles.levels;
  if (RHF?.kind !== 'hartreeFock' || !RHF.converged || 'alpha' in RHF.orbitalEnergies) return undefined;
  if (CIS?.kind !== 'singles' || !CIS.converged) return undefined;
  const [filled] = field.spinElectrons;
  const ofSpin = (['singlet', 'triplet'] as const).map((spin) =>
    CIS.states.filter((state) => state.spin === spin),
  );
  return {
    charge,
    energy: RHF.energy,
    occupied: RHF.orbitalEnergies.slice(field.frozenOrbitals, filled),
    virtual: RHF.orbitalEnergies.slice(filled),
    excited: CIS.states.map(({ spin, energy }) => ({ multiplicity: spin === 'singlet' ? 1 : 3, energy })),
    completeBelow: {
      excited: Math.min(
        ...ofSpin.map((states) =>
          states.length < STATES_OF_A_FRAGMENT ? Number.POSITIVE_INFINITY : states.at(-1)!.excitation,
        ),
      ),
      virtual: Number.POSITIVE_INFINITY,
    },
  };
}

/** Its virtual orbitals are those of a single electron. */
function withoutElectrons(
  prepared: PreparedStudy,
  atoms: readonly StudyAtom[],
  charge: number,
  energy: number,
  control: RunControl,
): ClosedShellPart | undefined {
  const level = findLevel('FCI', 'levels');
  if (level.kind !== 'correlated') return undefined;
  const one = fragmentStates(prepared, atoms, charge - 1, level, control);
  if (one.kind !== 'found') return undefined;
  const virtual = one.states.map((state) => state.energy - energy);
  return {
    charge,
    energy,
    occupied: [],
    virtual,
    excited: [],
    completeBelow: {
      excited: Number.POSITIVE_INFINITY,
      virtual: one.isComplete ? Number.POSITIVE_INFINITY : virtual.at(-1)!,
    },
  };
}

/**
 * The states of CIS at infinite distance of two closed shells: an excitation within either, by CIS, or an electron taken
 * from an orbital of one to an orbital of the other, which costs the difference of their energies.
 *
 * @param distance - of the parts at the far end, bohr
 */
export function singlesProducts(
  parts: readonly [ClosedShellPart, ClosedShellPart],
  distance: number,
): { readonly all: readonly ProductState[]; readonly completeBelow: number } {
  const reference = parts[0].energy + parts[1].energy;
  const inOrder = <T>(part: number, own: T, other: T): readonly [T, T] =>
    part === 0 ? [own, other] : [other, own];
  const all: ProductState[] = [];
  let completeBelow = Number.POSITIVE_INFINITY;
  for (const part of [0, 1]) {
    const [own, other] = [parts[part], parts[1 - part]];
    for (const state of own.excited) {
      all.push({
        energy: state.energy + other.energy,
        attraction: (own.charge * other.charge) / distance,
        multiplicities: [state.multiplicity],
        charges: inOrder(part, own.charge, other.charge),
        states: inOrder(part, state, { multiplicity: 1, energy: other.energy }),
        lowest: inOrder(part, own.energy, other.energy),
      });
    }
    completeBelow = Math.min(completeBelow, reference + own.completeBelow.excited);
    if (own.occupied.length === 0) continue;
    const highest = own.occupied[own.occupied.length - 1];
    for (const from of own.occupied) {
      for (const to of other.virtual) {
        const cation = { multiplicity: 2, energy: own.energy - from };
        const anion = { multiplicity: 2, energy: other.energy + to };
        all.push({
          energy: cation.energy + anion.energy,
          attraction: ((own.charge + 1) * (other.charge - 1)) / distance,
          multiplicities: [1, 3],
          charges: inOrder(part, own.charge + 1, other.charge - 1),
          states: inOrder(part, cation, anion),
          lowest: inOrder(part, own.energy - highest, other.energy + other.virtual[0]),
        });
      }
    }
    completeBelow = Math.min(completeBelow, reference - highest + other.completeBelow.virtual);
  }
  return { all: all.sort((a, b) => a.energy - b.energy), completeBelow };
}
