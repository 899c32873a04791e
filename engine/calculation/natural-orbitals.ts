import type { OrbitalSpecies } from '../configuration-interaction/vector-symmetry';
import { dot, multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { axialMomentum } from '../symmetry/axial-momentum';
import { orbitalLabels } from '../symmetry/orbital-labels';
import type { MolecularSymmetry } from '../symmetry/point-group';
import type { PreparedStudy } from './prepare-study';
import type { NaturalOrbitals } from './result';

/** Numbers that a results file takes for natural orbitals unasked: with line breaks and digits about 2 MB. */
const MOST_NUMBERS = 60_000;

/** Whether results hold natural orbitals: as the study says, else where all points and levels make few numbers. */
export function wantsNaturalOrbitals({ study, levels, coordinates, functionCount }: PreparedStudy): boolean {
  const correlated = levels.filter(({ kind }) => kind === 'correlated').length;
  return (
    study.findings?.naturalOrbitals ?? functionCount ** 2 * coordinates.length * correlated <= MOST_NUMBERS
  );
}

export interface NaturalOrbitalInput {
  /** spin-summed over all orbitals, m×m */
  readonly density: Float64Array;
  /** functions × m */
  readonly coefficients: Float64Array;
  readonly functionCount: number;
  /** orbitals that CI leaves doubly occupied, the first ones */
  readonly frozen: number;
  /** orbitals of the CI, which follow; those above stay empty and are left out */
  readonly active: number;
  readonly symmetry: MolecularSymmetry;
  /** of all orbitals; absent where they have none */
  readonly species?: OrbitalSpecies;
}

/** Elements of a density between representations, against occupations of order 1: more is a state without symmetry. */
const NO_MIXING = 1e-6;

/**
 * Natural orbitals of a state – eigenvectors of its one-particle density, the largest coefficient of each positive –
 * by falling occupation, frozen ones first and as they are.
 *
 * Where the state has a symmetry, each representation is diagonalised by itself, so that orbitals of equal occupation
 * are not mixed.
 *
 * Source: P.-O. Löwdin, Phys. Rev. 97, 1474 (1955).
 */
export function naturalOrbitals(input: NaturalOrbitalInput): NaturalOrbitals {
  const { density, coefficients, functionCount: n, frozen, active, symmetry, species } = input;
  const m = coefficients.length / n;
  const { irreps, axialRotation } = species ?? {};
  const isSymmetric = irreps !== undefined && !mixes(density, irreps);
  const orbitals = [
    ...Array.from({ length: frozen }, (_, i) => frozenOrbital(i, m, isSymmetric ? irreps[i] : undefined)),
    ...groupByIrrep(frozen, frozen + active, isSymmetric ? irreps : undefined)
      .flatMap(({ irrep, members }) => diagonalise(density, m, members, irrep))
      .sort((a, b) => b.occupation - a.occupation),
  ];
  const lambdas = orbitals.map(({ vector, irrep }) => {
    if (irrep === undefined || !axialRotation) return undefined;
    const turned = multiply(axialRotation, vector, m, m, 1);
    return axialMomentum(irrep, dot(turned, turned));
  });
  return {
    coefficients: orbitals.map(({ vector }) => largestPositive(multiply(coefficients, vector, n, m, 1))),
    ...(isSymmetric && {
      symmetries: orbitalLabels(symmetry, { irreps: orbitals.map(({ irrep }) => irrep), lambdas }),
    }),
  };
}

interface NaturalOrbital {
  readonly occupation: number;
  /** over all m orbitals */
  readonly vector: Float64Array;
  readonly irrep: number | undefined;
}

function frozenOrbital(place: number, m: number, irrep: number | undefined): NaturalOrbital {
  const vector = new Float64Array(m);
  vector[place] = 1;
  return { occupation: 2, vector, irrep };
}

function mixes(density: Float64Array, irreps: readonly number[]): boolean {
  const m = irreps.length;
  return density.some(
    (value, place) => Math.abs(value) > NO_MIXING && irreps[Math.trunc(place / m)] !== irreps[place % m],
  );
}

/** Orbitals first … end − 1 by representation; all together where they have none. */
function groupByIrrep(
  first: number,
  end: number,
  irreps: readonly number[] | undefined,
): { readonly irrep: number | undefined; readonly members: readonly number[] }[] {
  const groups = new Map<number | undefined, number[]>();
  for (let p = first; p < end; p++) groups.set(irreps?.[p], [...(groups.get(irreps?.[p]) ?? []), p]);
  return Array.from(groups, ([irrep, members]) => ({ irrep, members }));
}

function diagonalise(
  density: Float64Array,
  m: number,
  members: readonly number[],
  irrep: number | undefined,
): NaturalOrbital[] {
  const size = members.length;
  const block = Float64Array.from(
    { length: size * size },
    (_, place) => density[members[Math.trunc(place / size)] * m + members[place % size]],
  );
  const { values, vectors } = symmetricEigen(block, size);
  return Array.from(values, (occupation, k) => {
    const vector = new Float64Array(m);
    members.forEach((p, i) => {
      vector[p] = vectors[i * size + k];
    });
    return { occupation, vector, irrep };
  });
}

function largestPositive(coefficients: Float64Array): number[] {
  const largest = coefficients.reduce((a, b) => (Math.abs(b) > Math.abs(a) ? b : a), 0);
  return Array.from(coefficients, (value) => (largest < 0 ? -value : value));
}
