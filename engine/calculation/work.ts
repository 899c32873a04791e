import { placeBasis } from '../basis/place-basis';
import {
  countDeterminants,
  goesByAmplitudes,
  guessLimit,
  isTwoElectrons,
  PROBES,
} from '../configuration-interaction/size';
import { findSymmetry } from '../symmetry/point-group';
import { POINT_GROUPS } from '../symmetry/point-groups';
import { coreOrbitals } from './frozen-core';
import type { Level } from './levels';
import type { PreparedStudy } from './prepare-study';

/** Kinds of operations, each of which has a speed of its own on a machine. */
export type WorkKind = 'integrals' | 'fields' | 'transformation' | 'modelSpace' | 'products' | 'rest';

/** How many operations of each kind one point takes. */
export type Work = Readonly<Record<WorkKind, number>>;

/** Seconds that one operation of each kind takes. */
export type Speeds = Work;

/**
 * Of one core of a 2.x GHz server of 2024; only to tell seconds from hours where nothing was measured. What results
 * depend on (whether an extra point is worth its time) is always judged by these, so that results are the same on
 * every machine.
 */
export const NOMINAL_SPEEDS: Speeds = Object.freeze({
  integrals: 1.4e-8,
  fields: 1e-8,
  transformation: 2e-11,
  modelSpace: 6e-8,
  products: 2e-10,
  rest: 8e-6,
});

/*
 * What a kind of work costs however small it is – calls, copies, bookkeeping –, in its own operations. Together with
 * the counts below they were fitted to the samples (tests/benchmarks/predictions.ts).
 */
const CONTRACTED = 10;
const BUILD = 20_000;
const PRODUCT = 2_000_000;
const TRANSFORMATION = 20_000_000;
const LEVEL = 2000;
const LEVEL_PER_DETERMINANT = 20;
const PER_DETERMINANT = 0.1;

/**
 * What a multiplication in a product over amplitudes takes, in connections between determinants: of these a kernel sums
 * several at once, and symmetry leaves out more.
 */
const IN_DENSE_PRODUCT = 2;

/** Fock matrices built for one field: by iterations, and for the curvature that shows its stability. */
const FIELD_BUILDS = 45;
const FIELDS = { RHF: 1, ROHF: 2, UHF: 3 } as const;
/** Of the eigensolver. */
const ITERATIONS = 12;
/**
 * How many times more work configuration interaction takes over a scan than near equilibrium, at least: at long distances
 * determinants mix strongly, the more the more bonds are broken at once. Fitted to the samples.
 */
const STRETCHED = 1.7;
/** Products with guards, for each state. */
const GUARDS = 2;
/** Determinants of the model space that starts the eigensolver. */
const MODEL_SPACE = 300;
/** Of a search for scale factors. */
const SCALE_STEPS = 10;

/** What all levels of a point share, and what each takes beside that. */
export interface PointWork {
  readonly shared: Work;
  /** where a level is computed alone, in the order of the study's levels */
  readonly alone: readonly Work[];
  /** all levels together */
  readonly together: Work;
}

export function countWork(prepared: PreparedStudy): PointWork {
  const integrals = integralsAndField(prepared);
  const needsTransformation = (level: Level) => level.kind === 'singles' || level.kind === 'correlated';
  const transformation = transformationWork(prepared);
  const shared = prepared.levels.some(needsTransformation) ? sum([integrals, transformation]) : integrals;
  const own = prepared.levels.map((level) => levelWork(prepared, level));
  return {
    shared,
    alone: prepared.levels.map((level, i) =>
      sum(needsTransformation(level) ? [integrals, transformation, own[i]] : [integrals, own[i]]),
    ),
    together: sum([shared, ...own]),
  };
}

export function secondsOf(work: Work, speeds: Speeds): number {
  return KINDS.reduce((seconds, kind) => seconds + work[kind] * speeds[kind], 0);
}

const KINDS = Object.keys(NOMINAL_SPEEDS) as readonly WorkKind[];
const NONE: Work = { integrals: 0, fields: 0, transformation: 0, modelSpace: 0, products: 0, rest: 0 };

function sum(works: readonly Work[]): Work {
  return Object.fromEntries(
    KINDS.map((kind) => [kind, works.reduce((total, work) => total + work[kind], 0)]),
  ) as Work;
}

function integralsAndField(prepared: PreparedStudy): Work {
  const { functionCount: n, levels, spinElectrons, study } = prepared;
  const pairs = (n * (n + 1)) / 2;
  const repulsion = (pairs * (pairs + 1)) / 2;
  // four energies for every derivative, one at every step, three at the start for every factor
  const factors = Object.values(prepared.scalable?.start ?? {}).flatMap(Object.keys).length;
  const searches = factors === 0 ? 1 : 3 * factors + SCALE_STEPS * (1 + 4 * factors);
  const isClosed = spinElectrons[0] === spinElectrons[1];
  const wants = (name: string) => levels.some((level) => level.name === name);
  const fields =
    (isClosed ? FIELDS.RHF : 0) +
    (!isClosed || wants('ROHF') ? FIELDS.ROHF : 0) +
    (wants('UHF') || study.orbitals === 'unrestricted' || (wants('MP2') && !isClosed) ? FIELDS.UHF : 0);
  return {
    ...NONE,
    integrals: searches * (repulsion * CONTRACTED + primitiveIntegrals(prepared)),
    fields: searches * FIELD_BUILDS * fields * (repulsion + BUILD),
    rest: searches * n,
  };
}

/** Quartets of primitive functions: half the square of the number of pairs. */
function primitiveIntegrals({ basisSet, moleculeAt, coordinates }: PreparedStudy): number {
  const { shells } = placeBasis(basisSet, moleculeAt(coordinates[0]));
  let pairs = 0;
  shells.forEach((a, i) => {
    for (const b of shells.slice(0, i + 1)) {
      pairs += a.exponents.length * b.exponents.length * a.functionCount * b.functionCount;
    }
  });
  return pairs ** 2 / 2;
}

/** Two sweeps over pairs of indices, from functions to orbitals. */
function transformationWork({
  functionCount: n,
  frozenOrbitals,
  activeOrbitals,
  study,
}: PreparedStudy): Work {
  const active = activeOrbitals ?? n - frozenOrbitals;
  const sweep = (outer: number, inner: number) =>
    ((outer * outer) / 2) * (n * n * inner + (n * inner * inner) / 2);
  return {
    ...NONE,
    transformation:
      TRANSFORMATION +
      (sweep(n, active) + sweep(active, active)) * (study.orbitals === 'unrestricted' ? 3 : 1),
  };
}

function levelWork(prepared: PreparedStudy, level: Level): Work {
  const { functionCount: n, frozenOrbitals, study } = prepared;
  const active = prepared.activeOrbitals ?? n - frozenOrbitals;
  const [alpha, beta] = prepared.spinElectrons.map((count) => count - frozenOrbitals) as [number, number];
  const vectors = guessLimit(study.states) + PROBES + ITERATIONS * (study.states + PROBES);
  switch (level.kind) {
    case 'hartreeFock':
      return { ...NONE, rest: n };
    case 'perturbation':
      return { ...NONE, transformation: n ** 4 * Math.max(alpha, 1) };
    case 'singles': {
      const singles = alpha * (active - alpha);
      const model = Math.min(singles, MODEL_SPACE);
      return {
        ...NONE,
        modelSpace: 2 * (model ** 2 + model ** 3 / 100),
        products: 2 * singles ** 2 * vectors,
      };
    }
    case 'correlated': {
      const determinants = countDeterminants(active, alpha, beta, level.maximumRank);
      const model = Math.min(determinants, MODEL_SPACE);
      const spinsDiffer = study.orbitals === 'unrestricted';
      const elements = elementsOfProduct(active, [alpha, beta], level.maximumRank, spinsDiffer);
      const product = elements + PRODUCT;
      const isByLists =
        !isTwoElectrons(alpha, beta, level.maximumRank, spinsDiffer) &&
        !goesByAmplitudes(active, alpha, beta, level.maximumRank, spinsDiffer);
      const mixing = mixingOf(prepared);
      const products = determinants <= MODEL_SPACE ? 0 : isByLists ? countVectors(prepared) : vectors;
      return {
        ...NONE,
        modelSpace: mixing * (model ** 2 + model ** 3 / 100),
        products: mixing * products * product,
        // vectors are combined and made orthogonal, states described
        rest:
          mixing *
          study.states *
          (PER_DETERMINANT * determinants + Math.min(LEVEL, LEVEL_PER_DETERMINANT * determinants)),
      };
    }
  }
}

/** The order of the highest bond that the scan stretches, as far as valences allow; `STRETCHED` for single ones. */
function mixingOf({ study, moleculeAt, coordinates }: PreparedStudy): number {
  const coordinate = study.scan?.coordinate;
  if (!coordinate || !('bonds' in coordinate)) return 1;
  const { atoms } = moleculeAt(coordinates[0]);
  const orders = coordinate.bonds.map((bond) =>
    Math.min(...bond.map((k) => valenceOf(atoms[k].atomicNumber))),
  );
  return Math.max(STRETCHED, ...orders);
}

/** Unpaired electrons of an atom outside its core, H to Ar. */
function valenceOf(atomicNumber: number): number {
  const outer = atomicNumber - 2 * coreOrbitals(atomicNumber);
  if (outer <= 2) return outer % 2;
  return outer <= 5 ? outer - 2 : 8 - outer;
}

/**
 * Products with vectors of all determinants, or what stands for so many: one symmetry is iterated in, and of the others
 * a few vectors show that they hold nothing lower.
 */
function countVectors({ study, coordinates, moleculeAt }: PreparedStudy): number {
  const { pointGroup } = findSymmetry(moleculeAt(coordinates[0]));
  const symmetries = study.orbitals === 'unrestricted' ? 1 : POINT_GROUPS[pointGroup].irreps.length;
  const looks = (study.states + PROBES) * (symmetries - 1);
  return (PROBES + (ITERATIONS + GUARDS) * study.states + looks) / symmetries;
}

/** What one product with H takes, in multiplications of a list. */
function elementsOfProduct(
  active: number,
  [alpha, beta]: readonly [number, number],
  rank: number,
  spinsDiffer: boolean,
): number {
  if (isTwoElectrons(alpha, beta, rank, spinsDiffer)) return (IN_DENSE_PRODUCT * active ** 4) / 4;
  if (goesByAmplitudes(active, alpha, beta, rank, spinsDiffer)) {
    return IN_DENSE_PRODUCT * amplitudeProducts(alpha, active - alpha);
  }
  const determinants = countDeterminants(active, alpha, beta, rank);
  return determinants * connections(active, alpha, beta, determinants);
}

/** Multiplications of one product over the amplitudes of single and double excitations: see `prepareClosedShellProduct`. */
function amplitudeProducts(holes: number, particles: number): number {
  const [symmetric, antisymmetric] = [1, -1].map((sign) => (particles * (particles + sign)) / 2);
  const ladders = ((holes * holes) / 2) * (symmetric ** 2 + 2 * antisymmetric ** 2);
  return ladders + 4 * (holes * particles) ** 3 + 4 * holes ** 2 * particles ** 3;
}

/** Determinants that the Hamiltonian joins to one. */
function connections(active: number, alpha: number, beta: number, determinants: number): number {
  const singlesOf = (electrons: number) => electrons * (active - electrons);
  const doublesOf = (electrons: number) =>
    (singlesOf(electrons) * (electrons - 1) * (active - electrons - 1)) / 4;
  const ofBoth = singlesOf(alpha) * singlesOf(beta);
  const ofOne = [alpha, beta].reduce((total, count) => total + singlesOf(count) + doublesOf(count), 0);
  return Math.min(determinants, 1 + ofBoth + ofOne);
}
