import { SPIN_NAMES } from '../configuration-interaction/spin';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import { explainStudy } from './explain-study';
import { bareNuclei, correlatedElectrons } from './fragment-energy';
import type { Level } from './levels';
import { type PreparedStudy, prepareFragment } from './prepare-study';
import type { StudyAtom } from './study';

/** Enough for all terms of a 2p shell that lie below the next shell: ⁴S, ²D and ²P of nitrogen are nine states. */
export const STATES_OF_A_FRAGMENT = 10;
/** A fragment whose states take longer is left, seconds as estimated. */
const MOST_SECONDS = 2;

/** A state of a fragment; of a degenerate level each component is one. */
export interface FragmentState {
  /** 2S + 1 */
  readonly multiplicity: number;
  /** hartree */
  readonly energy: number;
}

export type FragmentStates =
  | {
      readonly kind: 'found';
      /** by rising energy, at least one */
      readonly states: readonly FragmentState[];
      /** false: there are more above the last of them */
      readonly isComplete: boolean;
    }
  /** the basis has no room for its electrons */
  | { readonly kind: 'impossible' }
  | { readonly kind: 'unknown'; readonly reason: string };

/**
 * The lowest states of every spin of a part of a study's molecule, by a CI that is full CI for it.
 *
 * @param atoms - in the study's unit
 */
export function fragmentStates(
  prepared: PreparedStudy,
  atoms: readonly StudyAtom[],
  charge: number,
  level: Extract<Level, { readonly kind: 'correlated' }>,
  control: RunControl,
): FragmentStates {
  const nuclei = bareNuclei({ unit: prepared.study.molecule.unit, atoms, charge });
  if (nuclei !== undefined) return only({ multiplicity: 1, energy: nuclei });
  const { unit } = prepared.study.molecule;
  // without a multiplicity the lowest: its determinants have states of every spin among them
  const preparation = prepareFragment(prepared, { unit, atoms, charge }, level.name, STATES_OF_A_FRAGMENT);
  if (!preparation.ok) {
    const isImpossible = preparation.errors.every(({ code }) => code === 'basis.tooFewFunctions');
    return isImpossible ? { kind: 'impossible' } : unknown(preparation.errors[0].message);
  }
  const fragment = preparation.prepared;
  const electrons = correlatedElectrons(fragment);
  if (electrons > level.maximumRank) {
    return unknown(
      `${level.name} leaves out a part of the states of fragments with more than ${level.maximumRank} electrons.`,
    );
  }
  if (electrons === 0) return closedCore(prepared, atoms, charge, control);
  const [{ seconds }] = explainStudy(fragment).levels;
  if (seconds > MOST_SECONDS) return unknown('The states of a fragment would take too long.');
  const result = computePoint(fragment, null, { describesStates: false, control }).result.levels[level.name];
  if (result?.kind !== 'correlated' || !result.converged) return unknown('A fragment did not converge.');
  const states = result.states.flatMap(({ spin, energy }): FragmentState[] =>
    spin === 'mixed' ? [] : [{ multiplicity: SPIN_NAMES.indexOf(spin) + 1, energy }],
  );
  if (states.length < result.states.length) return unknown('A state of a fragment has no definite spin.');
  return { kind: 'found', states, isComplete: states.length < STATES_OF_A_FRAGMENT };
}

/** All electrons frozen: there is one state, that of Hartree–Fock. */
function closedCore(
  prepared: PreparedStudy,
  atoms: readonly StudyAtom[],
  charge: number,
  control: RunControl,
): FragmentStates {
  const { unit } = prepared.study.molecule;
  const preparation = prepareFragment(prepared, { unit, atoms, charge, multiplicity: 1 }, 'RHF');
  if (!preparation.ok) return unknown(preparation.errors[0].message);
  const { RHF } = computePoint(preparation.prepared, null, { describesStates: false, control }).result.levels;
  if (RHF?.kind !== 'hartreeFock' || !RHF.converged) return unknown('A fragment did not converge.');
  return only({ multiplicity: 1, energy: RHF.energy });
}

const only = (state: FragmentState): FragmentStates => ({ kind: 'found', states: [state], isComplete: true });

const unknown = (reason: string): FragmentStates => ({ kind: 'unknown', reason });
