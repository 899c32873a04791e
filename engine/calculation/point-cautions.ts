import { LINEAR_DEPENDENCE_THRESHOLD } from '../self-consistent-field/orthogonalisation';
import type { MeanFields } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import { number, type RaisedCaution } from './raised-caution';
import { lowReferenceWeight } from './reference-weight';
import type { CorrelatedResult, LevelResult, ScaleOptimisation } from './result';

/** A triplet Hessian eigenvalue below this, hartree, counts as an instability. */
const TRIPLET_INSTABILITY = -1e-5;
/** ⟨S²⟩ above S(S + 1) by more than this is said. */
const SPIN_CONTAMINATION = 0.1;

/** What to mistrust at one point. */
export function pointCautions(
  prepared: PreparedStudy,
  fields: MeanFields,
  levels: Readonly<Record<string, LevelResult>>,
  scale?: ScaleOptimisation,
): readonly RaisedCaution[] {
  return [
    ...scaleCautions(scale),
    ...instabilityCautions(fields),
    ...contaminationCautions(prepared, fields, Object.keys(levels)),
    ...dependenceCautions(fields),
    ...Object.entries(levels).flatMap(([level, result]) => [
      ...(result.converged ? [] : [unconverged(level, result)]),
      ...(result.kind === 'correlated' ? weightCautions(prepared, level, result) : []),
    ]),
  ];
}

function scaleCautions(scale: ScaleOptimisation | undefined): RaisedCaution[] {
  if (!scale || scale.converged) return [];
  return [
    {
      code: 'scale.unconverged',
      message:
        scale.atLimit === undefined
          ? 'The search for the best scale factors did not converge here; these are the last ones reached.'
          : `No best scale factor of ${scale.atLimit.join(' and ')} was found here: it ran to the end of its range.`,
      meaning: 'The energies here are not the lowest that functions of this form can give.',
      remedy: 'Start from other scale factors, or leave this geometry out.',
      numbers: [number('largest derivative of the energy', scale.residual, 'hartree')],
    },
  ];
}

function instabilityCautions({ restricted }: MeanFields): RaisedCaution[] {
  const lowest = restricted?.stability?.triplet;
  if (lowest === undefined || lowest >= TRIPLET_INSTABILITY) return [];
  return [
    {
      code: 'rhf.unstable',
      message:
        'The RHF determinant is unstable: one with different orbitals for different spins lies lower here.',
      meaning:
        'The pairing that RHF forces makes its energy too high, and CIS, MP2 and truncated CI start from a poor determinant.',
      remedy: 'Rely on full CI or UHF here, and on what stands on RHF only where it is stable.',
      numbers: [
        number('lowest eigenvalue of the triplet orbital Hessian', lowest, 'hartree'),
        number('bound', TRIPLET_INSTABILITY, 'hartree'),
      ],
    },
  ];
}

/** Only of determinants that the study shows or builds on. */
function contaminationCautions(
  prepared: PreparedStudy,
  { unrestricted }: MeanFields,
  levels: readonly string[],
): RaisedCaution[] {
  if (!unrestricted) return [];
  const isListed = levels.includes('UHF');
  const onUnrestricted = levels.filter((level) => isBuiltOnUnrestricted(prepared, level));
  if (!isListed && onUnrestricted.length === 0) return [];
  const [alpha, beta] = prepared.spinElectrons;
  const spin = (alpha - beta) / 2;
  const pure = spin * (spin + 1);
  const { sSquared } = unrestricted;
  if (sSquared - pure <= SPIN_CONTAMINATION) return [];
  const what = isListed ? 'UHF' : `The UHF determinant that ${onUnrestricted.join(', ')} stands on`;
  return [
    {
      code: 'uhf.contaminated',
      ...(isListed ? { level: 'UHF' } : onUnrestricted.length === 1 ? { level: onUnrestricted[0] } : {}),
      message: `${what} has ⟨S²⟩ = ${sSquared.toFixed(2)} here instead of ${pure}: states of higher spin are mixed in.`,
      meaning: isListed
        ? 'Its energy belongs to no pure spin state.'
        : 'Perturbation theory converges slowly from it, and truncated CI does not restore the spin in full.',
      remedy: 'Take full CI, or CI on restricted orbitals, for a pure spin state.',
      numbers: [
        number('⟨S²⟩', sSquared),
        number('S(S + 1)', pure),
        number('largest excess not said', SPIN_CONTAMINATION),
      ],
    },
  ];
}

function isBuiltOnUnrestricted({ levels, study }: PreparedStudy, name: string): boolean {
  const kind = levels.find((level) => level.name === name)?.kind;
  if (kind === 'perturbation') return study.molecule.multiplicity !== 1;
  return kind === 'correlated' && study.orbitals === 'unrestricted';
}

function dependenceCautions({ reference: { orthogonalisation } }: MeanFields): RaisedCaution[] {
  const { dropped, smallestEigenvalue } = orthogonalisation;
  if (dropped === 0) return [];
  return [
    {
      code: 'basis.nearlyDependent',
      message: `${dropped} ${dropped === 1 ? 'combination' : 'combinations'} of basis functions left out here: nearly linearly dependent.`,
      meaning:
        'The basis is a little smaller here than elsewhere, and energies may step where their number changes.',
      remedy: 'Leave the most diffuse functions out of the basis, or this distance out of the scan.',
      numbers: [
        number('combinations left out', dropped),
        number('smallest eigenvalue of the overlap', smallestEigenvalue),
        number('bound', LINEAR_DEPENDENCE_THRESHOLD),
      ],
    },
  ];
}

function unconverged(level: string, result: LevelResult): RaisedCaution {
  return {
    code: 'level.unconverged',
    level,
    message: `${level} did not converge here.`,
    meaning: 'Its numbers are the last ones reached and not results.',
    remedy:
      'Compute neighbouring points closer by, so that each starts from a better one, or a looser convergence.',
    ...('iterations' in result && { numbers: [number('iterations', result.iterations)] }),
  };
}

function weightCautions(
  { study }: PreparedStudy,
  level: string,
  { referenceWeight, davidsonCorrected }: CorrelatedResult,
): RaisedCaution[] {
  const bound = lowReferenceWeight(study);
  if (referenceWeight >= bound) return [];
  const isFull = davidsonCorrected === undefined;
  return [
    {
      code: 'reference.weightLow',
      level,
      message: `The reference determinant has a weight of only ${referenceWeight.toFixed(2)} in ${level} here.`,
      meaning: isFull
        ? 'A single determinant does not describe the molecule here, and levels that start from one are in doubt.'
        : 'Excitations from it alone do not describe the molecule here; its size-consistency corrections are in doubt too.',
      remedy: isFull
        ? 'Compare other levels with full CI here before they are used.'
        : 'Take full CI or a higher excitation rank here, if need be within active orbitals.',
      numbers: [number('weight of the reference', referenceWeight), number('bound', bound)],
    },
  ];
}
