import { basisCautions } from './basis-cautions';
import { curveCautions } from './curve-cautions';
import type { FieldKind } from './follow-neighbours';
import type { PreparedStudy } from './prepare-study';
import { number, type RaisedCaution } from './raised-caution';
import type { LevelFindings, PointResult } from './result';
import { stepCautions } from './step-cautions';

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
): readonly RaisedCaution[] {
  return [
    ...crossings.map((crossing) => crossingCaution(prepared, crossing)),
    ...stepCautions(prepared, points, crossings),
    ...singlesCautions(prepared),
    ...basisCautions(prepared),
    ...curveCautions(prepared, points, findings),
    ...unconvergedCautions(points),
  ];
}

function crossingCaution({ study }: PreparedStudy, { kind, range, gap }: SolutionCrossing): RaisedCaution {
  const reference = study.molecule.multiplicity === 1 ? 'RHF' : 'ROHF';
  const name = kind === 'restricted' ? reference : 'UHF';
  const places = range.map((value) => Number(value.toPrecision(6))).join(' and ');
  return {
    code: 'scf.crossing',
    range,
    ...(kind === 'unrestricted' && { level: 'UHF' }),
    message:
      `Between ${places} the lowest ${name} solution gives way to another; followed on, the first would lie ` +
      `${gap.toPrecision(2)} hartree higher.`,
    meaning:
      kind === (study.orbitals ?? 'restricted')
        ? 'The curve has a kink there, and CI levels that depend on the orbitals may jump.'
        : 'The curve has a kink there.',
    remedy: 'Read nothing off across this place, or take full CI, which does not depend on the orbitals.',
    numbers: [number('distance of the two solutions', gap, 'hartree')],
  };
}

function singlesCautions({ levels }: PreparedStudy): RaisedCaution[] {
  if (levels.every((level) => level.kind !== 'singles')) return [];
  return [
    {
      code: 'cis.noGroundState',
      level: 'CIS',
      message: 'Single excitations do not mix with the RHF determinant (Brillouin’s theorem).',
      meaning: 'CIS gives excited states, and its ground state is RHF itself.',
      remedy: 'For a correlated ground state, take CISD or a higher level.',
    },
  ];
}

function unconvergedCautions(points: readonly PointResult[]): RaisedCaution[] {
  const count = points.filter(({ levels }) => Object.values(levels).some((level) => !level.converged)).length;
  if (count === 0) return [];
  return [
    {
      code: 'level.unconverged',
      message: `At ${count} of ${points.length} points some level did not converge; those numbers are marked.`,
      meaning: 'Curves, depths and levels leave these points out.',
      remedy: 'Compute the points around them closer by, or with a looser convergence.',
      numbers: [number('points', count), number('points computed', points.length)],
    },
  ];
}
