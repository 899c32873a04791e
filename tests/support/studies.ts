import {
  type ComputedPoint,
  type CorrelatedResult,
  computePoint,
  type HartreeFockResult,
  type LengthUnit,
  type PreparedStudy,
  prepareStudy,
  type SinglesResult,
  type Study,
  type StudyAtom,
} from '#engine';

export type Place = readonly [number, number, number];

export const atom = (element: string, x = 0, y = 0, z = 0): StudyAtom => ({ element, at: [x, y, z] });

/** A single-point study; lengths in bohr unless said. */
export function study(
  atoms: readonly StudyAtom[],
  changes: Partial<Study> & { charge?: number; unit?: LengthUnit } = {},
): Study {
  const { charge = 0, unit = 'bohr', ...rest } = changes;
  return {
    format: 'farwell/study',
    version: 1,
    molecule: { unit, atoms, charge },
    basis: 'STO-3G',
    levels: ['RHF'],
    ...rest,
  };
}

export function prepare(request: Study): PreparedStudy {
  const preparation = prepareStudy(request);
  if (!preparation.ok) throw preparation.errors[0];
  return preparation.prepared;
}

/** The point of a study without a scan. */
export function compute(request: Study): ComputedPoint['result'] {
  return computePoint(prepare(request), null).result;
}

export const hartreeFock = (point: ComputedPoint['result']) => point.levels.RHF as HartreeFockResult;
export const singles = (point: ComputedPoint['result']) => point.levels.CIS as SinglesResult;
export const correlated = (point: ComputedPoint['result'], level = 'FCI') =>
  point.levels[level] as CorrelatedResult;

/** H–X–H and the like: water at an O–H distance and an angle in degrees, symmetric about z. */
export function waterAtoms(distance: number, degrees: number): StudyAtom[] {
  const half = (degrees * Math.PI) / 360;
  const x = distance * Math.sin(half);
  const z = distance * Math.cos(half);
  return [atom('O'), atom('H', x, 0, z), atom('H', -x, 0, z)];
}

/** Orbital energies of a Hartree–Fock with one set of orbitals. */
export function pairedOrbitalEnergies({ orbitalEnergies }: HartreeFockResult): readonly number[] {
  if ('alpha' in orbitalEnergies) throw new Error('the spins have orbitals of their own');
  return orbitalEnergies;
}
