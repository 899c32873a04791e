import { curveCautions } from './curve-cautions';
import type { FieldKind } from './follow-neighbours';
import type { MeanFields } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { Caution, LevelFindings, LevelResult, PointResult, ScaleOptimisation } from './result';
import type { Study } from './study';

/** A triplet Hessian eigenvalue below this, hartree, counts as an instability. */
const TRIPLET_INSTABILITY = -1e-5;
/** ⟨S²⟩ above S(S + 1) by more than this is said. */
const SPIN_CONTAMINATION = 0.1;
/** Below this weight of the reference a single determinant no longer describes the state; studies may say otherwise. */
export const LOW_REFERENCE_WEIGHT = 0.9;

export function lowReferenceWeight({ findings }: Pick<Study, 'findings'>): number {
  return findings?.referenceWeight ?? LOW_REFERENCE_WEIGHT;
}

/** What to mistrust at one point. */
export function pointCautions(
  prepared: PreparedStudy,
  { reference, restricted, unrestricted }: MeanFields,
  levels: Readonly<Record<string, LevelResult>>,
  scale?: ScaleOptimisation,
): readonly Caution[] {
  const cautions: Caution[] = [];
  if (scale && !scale.converged) {
    cautions.push({
      code: 'scale.unconverged',
      message:
        scale.atLimit === undefined
          ? 'The search for the best scale factors did not converge here; these are the last ones reached.'
          : `No best scale factor of ${scale.atLimit.join(' and ')} was found here: it ran to the end of its range.`,
    });
  }
  const { orthogonalisation } = reference;
  if (restricted?.stability && restricted.stability.triplet < TRIPLET_INSTABILITY) {
    cautions.push({
      code: 'rhf.unstable',
      message:
        'The RHF determinant is unstable: one with different orbitals for different spins lies lower, ' +
        'so the pairing forced by RHF makes its energy too high here.',
    });
  }
  if (unrestricted) {
    const [alpha, beta] = prepared.spinElectrons;
    const spin = (alpha - beta) / 2;
    const excess = unrestricted.sSquared - spin * (spin + 1);
    if (excess > SPIN_CONTAMINATION) {
      cautions.push({
        code: 'uhf.contaminated',
        level: 'UHF',
        message:
          `UHF has ⟨S²⟩ = ${unrestricted.sSquared.toFixed(2)} here instead of ${spin * (spin + 1)}: ` +
          'states of higher spin are mixed in, so its energy belongs to no pure spin state.',
      });
    }
  }
  if (orthogonalisation.dropped > 0) {
    cautions.push({
      code: 'basis.nearlyDependent',
      message:
        `${orthogonalisation.dropped} combination${orthogonalisation.dropped === 1 ? '' : 's'} of basis functions ` +
        `left out: nearly linearly dependent (smallest overlap eigenvalue ${orthogonalisation.smallestEigenvalue.toExponential(1)}).`,
    });
  }
  for (const [level, result] of Object.entries(levels)) {
    if (!result.converged) {
      cautions.push({
        code: 'level.unconverged',
        level,
        message: `${level} did not converge here; its numbers are the last ones reached and not results.`,
      });
    }
    if (result.kind === 'correlated' && result.referenceWeight < lowReferenceWeight(prepared.study)) {
      const isFull = result.davidsonCorrected === undefined;
      cautions.push({
        code: 'reference.weightLow',
        level,
        message:
          `The reference determinant has a weight of only ${result.referenceWeight.toFixed(2)} in ${level}: ` +
          (isFull
            ? 'a single determinant does not describe the molecule here.'
            : 'excitations from it alone do not describe the molecule here.'),
      });
    }
  }
  return cautions;
}

/** Two Hartree–Fock solutions whose order changes between neighbouring points of a scan. */
export interface SolutionCrossing {
  readonly kind: FieldKind;
  readonly range: readonly [number, number];
  /** how far apart the two are at one of the points, hartree */
  readonly gap: number;
}

/** What to mistrust about the curve as a whole. */
export function studyCautions(
  prepared: PreparedStudy,
  points: readonly PointResult[],
  crossings: readonly SolutionCrossing[] = [],
  findings: Readonly<Record<string, LevelFindings>> = {},
): readonly Caution[] {
  const cautions: Caution[] = crossings.map((crossing) => crossingCaution(prepared, crossing));
  if (prepared.levels.some((level) => level.kind === 'singles')) {
    cautions.push({
      code: 'cis.noGroundState',
      level: 'CIS',
      message:
        'Single excitations do not mix with the RHF determinant (Brillouin’s theorem): CIS gives excited states, ' +
        'and its ground state is RHF itself.',
    });
  }
  if (/^STO-\dG$/i.test(prepared.basisSet.name)) {
    cautions.push({
      code: 'basis.minimal',
      message:
        'A minimal basis shows how the methods differ; its distances and well depths are not to be compared with ' +
        'measured ones.',
    });
  }
  cautions.push(...curveCautions(prepared, points, findings));
  const unconverged = points.filter((point) =>
    Object.values(point.levels).some((level) => !level.converged),
  ).length;
  if (unconverged > 0) {
    cautions.push({
      code: 'level.unconverged',
      message: `At ${unconverged} of ${points.length} points some level did not converge; those numbers are marked.`,
    });
  }
  return cautions;
}

function crossingCaution({ study }: PreparedStudy, { kind, range, gap }: SolutionCrossing): Caution {
  const reference = study.molecule.multiplicity === 1 ? 'RHF' : 'ROHF';
  const name = kind === 'restricted' ? reference : 'UHF';
  const places = range.map((value) => Number(value.toPrecision(6))).join(' and ');
  return {
    code: 'scf.crossing',
    range,
    ...(kind === 'unrestricted' && { level: 'UHF' }),
    message:
      `Between ${places} the lowest ${name} solution gives way to another; followed on, the first would lie ` +
      `${gap.toPrecision(2)} hartree higher. ` +
      (kind === (study.orbitals ?? 'restricted')
        ? 'The curve has a kink there, and CI levels that depend on the orbitals may jump.'
        : 'The curve has a kink there.'),
  };
}
