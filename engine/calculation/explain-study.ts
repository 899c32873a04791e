import { configurationInteractionBytes, countDeterminants } from '../configuration-interaction/size';
import type { LevelExplanation, StudyExplanation } from './explanation';
import type { Level } from './levels';
import type { PreparedStudy } from './prepare-study';
import { countWork, NOMINAL_SPEEDS, type Speeds, secondsOf } from './work';

/** Points computed around a minimum, for separate fragments, and where a curve's levels are interpolated. */
const POINTS_AROUND_MINIMUM = 10;
const POINTS_BETWEEN = 15;
/** No point is added to a curve of which one takes longer, seconds. */
const LONGEST_ADDED = 2;

/**
 * Sizes, memory and time of a study, without computing it.
 *
 * @param speeds - of the machine at hand; without them times are those of a nominal machine
 */
export function explainStudy(prepared: PreparedStudy, speeds: Speeds = NOMINAL_SPEEDS): StudyExplanation {
  const { functionCount: n, electrons, frozenOrbitals, study } = prepared;
  const pairs = (n * (n + 1)) / 2;
  const repulsionIntegrals = (pairs * (pairs + 1)) / 2;
  const fieldBytes = 8 * repulsionIntegrals + 8 * 40 * n * n;
  const active = prepared.activeOrbitals ?? n - frozenOrbitals;
  const [alpha, beta] = prepared.spinElectrons.map((count) => count - frozenOrbitals) as [number, number];
  const spinsDiffer = study.orbitals === 'unrestricted';
  // half-transformed over all pairs of functions and orbitals, then the packed results: of one set of orbitals,
  // or of two and, unpacked, between them
  const transformedBytes =
    fieldBytes + 8 * (pairs * pairs * (spinsDiffer ? 3 : 1) + repulsionIntegrals * (spinsDiffer ? 2 : 1));

  const sizeOf = (level: Level): Pick<LevelExplanation, 'determinants' | 'bytes'> => {
    const singles = alpha * (active - alpha);
    switch (level.kind) {
      case 'hartreeFock':
        return { bytes: fieldBytes };
      case 'perturbation':
        return { bytes: fieldBytes + 8 * singles * (pairs + singles) };
      case 'singles':
        return { determinants: 2 * singles, bytes: transformedBytes + 16 * Math.min(singles, 500) ** 2 };
      case 'correlated': {
        const rank = level.maximumRank;
        return {
          determinants: countDeterminants(active, alpha, beta, rank),
          bytes:
            transformedBytes +
            configurationInteractionBytes(
              active,
              alpha,
              beta,
              rank,
              study.states,
              spinsDiffer,
              prepared.memoryLimit - transformedBytes,
            ),
        };
      }
    }
  };

  const work = countWork(prepared);
  const levels = prepared.levels.map((level, i) => ({
    level: level.name,
    ...sizeOf(level),
    seconds: secondsOf(work.alone[i], speeds),
  }));
  const points = prepared.coordinates.length;
  const pointSeconds = secondsOf(work.together, speeds);
  return {
    electrons,
    points,
    functions: n,
    frozenOrbitals,
    ...(prepared.activeOrbitals !== undefined && { activeOrbitals: prepared.activeOrbitals }),
    repulsionIntegrals,
    levels,
    pointSeconds,
    afterwardsSeconds: afterwards(prepared, secondsOf(work.shared, speeds), levels),
    ...(prepared.furtherBases.length > 0 && {
      furtherBases: prepared.furtherBases.map((inBasis) => ({
        name: inBasis.basisSet.name,
        ...explainStudy(inBasis, speeds),
      })),
    }),
  };
}

/** Following the neighbours' solutions, and the points that reading the curves takes. */
function afterwards(
  { coordinates, study, scalable, levels: kinds }: PreparedStudy,
  sharedSeconds: number,
  levels: readonly LevelExplanation[],
): number {
  if (!study.scan) return 0;
  const following = scalable ? 0 : coordinates.length * sharedSeconds;
  if (!('bonds' in study.scan.coordinate)) return following;
  const isDiatomic = study.molecule.atoms.length === 2;
  return levels.reduce((total, { seconds }, i) => {
    if (kinds[i].kind === 'singles') return total;
    const between = isDiatomic && seconds <= LONGEST_ADDED ? POINTS_BETWEEN : 0;
    return total + (POINTS_AROUND_MINIMUM + between) * seconds;
  }, following);
}
