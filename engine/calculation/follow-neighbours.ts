import { placeBasis } from '../basis/place-basis';
import type { StartingPoint } from '../self-consistent-field/mean-field';
import { DEFAULT_SELF_CONSISTENCY } from '../self-consistent-field/mean-field-problem';
import { solveRestrictedOpen, solveUnrestricted } from '../self-consistent-field/open-shell';
import { solveRestricted } from '../self-consistent-field/restricted';
import { inStage } from '../stages';
import { type RunControl, UNATTENDED } from '../termination';
import { type ComputedPoint, computePoint } from './compute-point';
import type { OccupiedOrbitals, PointCarry } from './mean-fields';
import { molecularIntegrals } from './molecular-integrals';
import type { PreparedStudy } from './prepare-study';

/** Solutions whose energies differ by less, hartree, are the same. */
const SAME_SOLUTION = 1e-7;

const KINDS = ['restricted', 'unrestricted'] as const;
/** The Hartree–Fock that the levels stand on (RHF, for open shells ROHF), and UHF. */
export type FieldKind = (typeof KINDS)[number];

export interface FollowedNeighbours {
  /** the point computed anew, where a neighbour's orbitals lead lower than its own */
  readonly improved?: ComputedPoint;
  /** for each neighbour, hartree by which its solution ends above the lowest here; absent where it is the same */
  readonly higherBy: readonly Partial<Record<FieldKind, number>>[];
}

/**
 * Follows the Hartree–Fock solutions of neighbouring points to this one. Where one ends lower, this point was
 * caught in a higher solution and is computed anew; where one ends higher, two solutions cross between the points.
 *
 * @param own - what this point left; absent where its orbitals did not converge
 */
export function followNeighbours(
  prepared: PreparedStudy,
  coordinate: number | null,
  own: PointCarry | undefined,
  neighbours: readonly PointCarry[],
  control: RunControl = UNATTENDED,
): FollowedNeighbours {
  // With scale factors of its own every point has another basis: its orbitals belong to nobody else.
  if (prepared.scalable) return { higherBy: neighbours.map(() => ({})) };
  const molecule = prepared.moleculeAt(coordinate);
  const { problem } = inStage(control, 'integrals', () =>
    molecularIntegrals(molecule, placeBasis(prepared.basisSet, molecule)),
  );
  const settings = { ...DEFAULT_SELF_CONSISTENCY, energyTolerance: prepared.study.convergence.energy };
  const follow = (kind: FieldKind, orbitals: OccupiedOrbitals | undefined): number => {
    if (!orbitals) return Number.NaN;
    const starts: StartingPoint[] = [{ kind: 'occupiedOrbitals', ...orbitals }];
    const options = { ...settings, ...(own?.[kind] && { stableEnergy: own[kind].energy }) };
    const solve = () => {
      if (kind === 'unrestricted') {
        return solveUnrestricted(problem, prepared.spinElectrons, starts, control, options);
      }
      return molecule.multiplicity === 1
        ? solveRestricted(problem, prepared.electrons, starts, control, options)
        : solveRestrictedOpen(problem, prepared.spinElectrons, starts, control, options);
    };
    const { energy, termination } = inStage(control, 'self-consistency', solve);
    return termination.kind === 'converged' ? energy : Number.NaN;
  };

  const higherBy: Partial<Record<FieldKind, number>>[] = neighbours.map(() => ({}));
  const guess: { restricted?: OccupiedOrbitals; unrestricted?: OccupiedOrbitals } = {};
  for (const kind of KINDS) {
    const ends = neighbours.map((neighbour) => follow(kind, neighbour[kind]));
    let lowest = own?.[kind]?.energy ?? Number.POSITIVE_INFINITY;
    ends.forEach((energy, k) => {
      if (!(energy < lowest - SAME_SOLUTION)) return;
      lowest = energy;
      guess[kind] = neighbours[k][kind]!;
    });
    ends.forEach((energy, k) => {
      if (energy > lowest + SAME_SOLUTION) higherBy[k][kind] = energy - lowest;
    });
  }
  if (!guess.restricted && !guess.unrestricted) return { higherBy };
  return { improved: computePoint(prepared, coordinate, { guess: { ...own, ...guess }, control }), higherBy };
}
