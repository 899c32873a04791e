import { placeBasis } from '../basis/place-basis';
import { configurationInteractionBytes, countDeterminants } from '../configuration-interaction/size';
import type { LevelExplanation, StudyExplanation } from './explanation';
import type { Level } from './levels';
import type { PreparedStudy } from './prepare-study';

/*
 * Costs measured with `npm run bench` on one core of a 2.x GHz server of 2024; they only need to tell seconds from
 * hours. Unit: seconds.
 */
const PER_PRIMITIVE_INTEGRAL = 4e-9;
const PER_INTEGRAL = 4e-8;
const PER_FOCK_ELEMENT = 3e-9;
const PER_TRANSFORMATION_STEP = 2e-9;
const PER_CONNECTION = 1.5e-9;
const FIELD_ITERATIONS = 30;
const EIGENVALUE_ITERATIONS = 14;
/** Of a search for scale factors. */
const SCALE_STEPS = 10;

/** Sizes, memory and time of a study, without computing it. */
export function explainStudy(prepared: PreparedStudy): StudyExplanation {
  const { functionCount: n, electrons, frozenOrbitals, study } = prepared;
  const pairs = (n * (n + 1)) / 2;
  const repulsionIntegrals = (pairs * (pairs + 1)) / 2;
  const integralSeconds =
    repulsionIntegrals * (PER_INTEGRAL + PER_PRIMITIVE_INTEGRAL * meanPrimitives(prepared) ** 4);
  // four energies for every derivative, one at every step, three at the start for every factor
  const factors = Object.values(prepared.scalable?.start ?? {}).flatMap(Object.keys).length;
  const searches = factors === 0 ? 1 : 3 * factors + SCALE_STEPS * (1 + 4 * factors);
  const field: Omit<LevelExplanation, 'level'> = {
    bytes: 8 * repulsionIntegrals + 8 * 40 * n * n,
    seconds: searches * (integralSeconds + FIELD_ITERATIONS * repulsionIntegrals * PER_FOCK_ELEMENT),
  };
  const active = prepared.activeOrbitals ?? n - frozenOrbitals;
  const [alpha, beta] = prepared.spinElectrons.map((count) => count - frozenOrbitals) as [number, number];
  const spinsDiffer = study.orbitals === 'unrestricted';
  const transformed = {
    // half-transformed over all pairs of functions and orbitals, then the packed results: of one set of orbitals,
    // or of two and, unpacked, between them
    bytes:
      field.bytes + 8 * (pairs * pairs * (spinsDiffer ? 3 : 1) + repulsionIntegrals * (spinsDiffer ? 2 : 1)),
    seconds: field.seconds + PER_TRANSFORMATION_STEP * n ** 5 * (spinsDiffer ? 2.5 : 1),
  };

  const explainLevel = (level: Level): LevelExplanation => {
    if (level.kind === 'hartreeFock') return { level: level.name, ...field };
    const singlesOf = (electrons: number) => electrons * (active - electrons);
    const doublesOf = (electrons: number) => {
      const virtuals = active - electrons;
      return (electrons * (electrons - 1) * virtuals * (virtuals - 1)) / 4;
    };
    if (level.kind === 'perturbation') {
      const excitations = singlesOf(alpha);
      return {
        level: level.name,
        bytes: field.bytes + 8 * excitations * (pairs + excitations),
        seconds: field.seconds + PER_TRANSFORMATION_STEP * n ** 4 * alpha,
      };
    }
    if (level.kind === 'singles') {
      const singles = singlesOf(alpha);
      return {
        level: level.name,
        determinants: 2 * singles,
        bytes: transformed.bytes + 16 * Math.min(singles, 500) ** 2,
        seconds: transformed.seconds + PER_CONNECTION * singles ** 2 * EIGENVALUE_ITERATIONS,
      };
    }
    const determinants = countDeterminants(active, alpha, beta, level.maximumRank);
    const connections = Math.min(
      determinants,
      1 +
        singlesOf(alpha) * singlesOf(beta) +
        singlesOf(alpha) +
        doublesOf(alpha) +
        singlesOf(beta) +
        doublesOf(beta),
    );
    return {
      level: level.name,
      determinants,
      bytes:
        transformed.bytes +
        configurationInteractionBytes(active, alpha, beta, level.maximumRank, study.states, spinsDiffer),
      seconds:
        transformed.seconds +
        study.states * EIGENVALUE_ITERATIONS * determinants * connections * PER_CONNECTION,
    };
  };

  return {
    electrons,
    points: prepared.coordinates.length,
    functions: n,
    frozenOrbitals,
    ...(prepared.activeOrbitals !== undefined && { activeOrbitals: prepared.activeOrbitals }),
    repulsionIntegrals,
    levels: prepared.levels.map(explainLevel),
  };
}

/** Primitives of a function, averaged over the molecule's functions. */
function meanPrimitives(prepared: PreparedStudy): number {
  const basis = placeBasis(prepared.basisSet, prepared.moleculeAt(prepared.coordinates[0]));
  const total = basis.shells.reduce((sum, shell) => sum + shell.functionCount * shell.exponents.length, 0);
  return total / basis.functionCount;
}
