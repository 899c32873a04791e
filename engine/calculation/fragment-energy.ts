import { buildMolecule, nuclearRepulsion } from '../molecule/build-molecule';
import { requireElement } from '../molecule/elements';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import type { Level } from './levels';
import { type PreparedStudy, prepareFragment } from './prepare-study';
import type { Fragment } from './result';
import type { StudyAtom, StudyMolecule } from './study';

export type FragmentEnergy = Omit<Fragment, 'atoms'> & { readonly isConverged: boolean };

/**
 * A part of a study's molecule by itself. Open shells take ROHF where the molecule takes RHF, one electron takes it
 * at every level but UHF (nothing is left to correlate).
 *
 * @param atoms - in the study's unit; ghosts lend their functions
 * @param multiplicity - 2S + 1 of the determinant to start from
 * @returns undefined where the basis has too few functions for the electrons
 */
export function fragmentEnergy(
  prepared: PreparedStudy,
  atoms: readonly StudyAtom[],
  charge: number,
  multiplicity: number,
  wanted: Level,
  control: RunControl,
): FragmentEnergy | undefined {
  const molecule = { unit: prepared.study.molecule.unit, atoms, charge, multiplicity };
  const nuclei = bareNuclei(molecule);
  if (nuclei !== undefined) {
    return { charge, multiplicity, energy: nuclei, level: wanted.name, isConverged: true };
  }
  const prepareAt = (level: string) => prepareFragment(prepared, molecule, level);
  const meanField = multiplicity === 1 ? 'RHF' : 'ROHF';
  const asked = prepareAt(wanted.name === 'RHF' ? meanField : wanted.name);
  const preparation =
    asked.ok && wanted.kind !== 'hartreeFock' && correlatedElectrons(asked.prepared) < 2
      ? prepareAt(meanField)
      : asked;
  if (!preparation.ok) return undefined;
  const [{ name: level }] = preparation.prepared.levels;
  const result = computePoint(preparation.prepared, null, { describesStates: false, control }).result.levels[
    level
  ];
  if (!('energy' in result)) return undefined;
  // of determinants with equal spins up the lowest CI state may be one of higher spin
  const found =
    result.kind === 'correlated' && result.spin !== 'mixed'
      ? Math.round(Math.sqrt(1 + 4 * result.sSquared))
      : multiplicity;
  return {
    charge,
    multiplicity: found,
    energy: result.energy,
    level,
    ...(found !== multiplicity && { startedFrom: multiplicity }),
    ...('correlation' in result && { correlation: result.correlation }),
    isConverged: result.converged,
  };
}

/** Electrons that a CI moves. */
export function correlatedElectrons({ electrons, frozenOrbitals }: PreparedStudy): number {
  return electrons - 2 * frozenOrbitals;
}

/** Energy of nuclei that no electron is left to; undefined where there are electrons. */
export function bareNuclei(molecule: StudyMolecule & { readonly charge: number }): number | undefined {
  const atoms = molecule.atoms.filter(({ ghost }) => !ghost);
  const nuclearCharge = atoms.reduce((sum, { element }) => sum + requireElement(element).atomicNumber, 0);
  if (nuclearCharge > molecule.charge) return undefined;
  // one electron more is a molecule that can be built
  const built = buildMolecule({ ...molecule, atoms, charge: molecule.charge - 1, multiplicity: 2 });
  return built.ok ? nuclearRepulsion(built.molecule) : undefined;
}
