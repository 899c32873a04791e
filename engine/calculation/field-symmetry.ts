import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { OrbitalSpecies } from '../configuration-interaction/vector-symmetry';
import type { Molecule } from '../molecule/molecule';
import { alignFreeAxes } from '../symmetry/free-axes';
import { orbitalLabels } from '../symmetry/orbital-labels';
import { type SymmetricOrbitals, symmetriseOrbitals } from '../symmetry/orbital-symmetry';
import { findSymmetry, type MolecularSymmetry } from '../symmetry/point-group';
import { symmetryOfDeterminant } from '../symmetry/state-symmetry';
import type { MeanFields } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { HartreeFockResult } from './result';

export type HartreeFockName = 'RHF' | 'UHF' | 'ROHF';

/** What symmetry says of the Hartree–Fock solutions of a point. */
export interface FieldSymmetry {
  readonly molecule: MolecularSymmetry;
  readonly labels: Partial<
    Record<HartreeFockName, Pick<HartreeFockResult, 'orbitalSymmetries' | 'symmetry'>>
  >;
  /** of all orbitals of the reference */
  readonly species: OrbitalSpecies;
}

/** The same solutions with degenerate orbitals turned so that each has a representation, and their labels. */
export function symmetriseFields(
  prepared: PreparedStudy,
  molecule: Molecule,
  basis: PlacedBasis,
  overlap: Float64Array,
  fields: MeanFields,
): { readonly fields: MeanFields; readonly symmetry: FieldSymmetry } {
  const symmetry = findSymmetry(molecule);
  const { spinElectrons, frozenOrbitals } = prepared;
  const symmetrise = (density: Float64Array, coefficients: Float64Array, energies: Float64Array) => {
    const aligned = alignFreeAxes(molecule, basis, symmetry, density);
    const boundaries = [frozenOrbitals, ...spinElectrons];
    return symmetriseOrbitals(molecule, basis, overlap, aligned, { coefficients, energies }, boundaries);
  };
  const label = (alpha: SymmetricOrbitals, beta = alpha) => {
    const state = symmetryOfDeterminant(symmetry, [alpha, beta], spinElectrons);
    const [ofAlpha, ofBeta] = [alpha, beta].map((set) => orbitalLabels(symmetry, set));
    return {
      orbitalSymmetries: alpha === beta ? ofAlpha : { alpha: ofAlpha, beta: ofBeta },
      ...(state && { symmetry: state }),
    };
  };

  const { restricted, restrictedOpen, unrestricted } = fields;
  const ofRestricted =
    restricted && symmetrise(restricted.density, restricted.coefficients, restricted.orbitalEnergies);
  const ofOpen =
    restrictedOpen &&
    symmetrise(sum(restrictedOpen.densities), restrictedOpen.coefficients, restrictedOpen.orbitalEnergies);
  const ofSpins = unrestricted?.coefficients.map((coefficients, spin) =>
    symmetrise(sum(unrestricted.densities), coefficients, unrestricted.orbitalEnergies[spin]),
  );

  const turned = {
    ...(ofRestricted && { restricted: { ...restricted, ...fieldOf(ofRestricted) } }),
    ...(ofOpen && { restrictedOpen: { ...restrictedOpen, ...fieldOf(ofOpen) } }),
    ...(unrestricted &&
      ofSpins && {
        unrestricted: {
          ...unrestricted,
          coefficients: [ofSpins[0].coefficients, ofSpins[1].coefficients] as const,
          orbitalEnergies: [ofSpins[0].energies, ofSpins[1].energies] as const,
        },
      }),
  };
  return {
    fields: { ...turned, reference: (turned.restricted ?? turned.restrictedOpen)! },
    symmetry: {
      molecule: symmetry,
      labels: {
        ...(ofRestricted && { RHF: label(ofRestricted) }),
        ...(ofOpen && { ROHF: label(ofOpen) }),
        ...(ofSpins && { UHF: label(ofSpins[0], ofSpins[1]) }),
      },
      species: speciesOf((ofRestricted ?? ofOpen)!),
    },
  };
}

function sum([alpha, beta]: readonly [Float64Array, Float64Array]): Float64Array {
  return alpha.map((value, i) => value + beta[i]);
}

function fieldOf({ coefficients, energies }: SymmetricOrbitals) {
  return { coefficients, orbitalEnergies: energies };
}

function speciesOf({ irreps, operations, axialRotation }: SymmetricOrbitals): OrbitalSpecies {
  const all = irreps.filter((irrep) => irrep !== undefined);
  return {
    ...(all.length === irreps.length && { irreps: all }),
    operations,
    ...(axialRotation && { axialRotation }),
  };
}
