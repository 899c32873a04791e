import type { OrbitalLabels, PointResult } from './result';

/** A determinant of a state; the orbitals of each spin in rising order. */
export interface StateComponent {
  readonly coefficient: number;
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

/** The orbitals of CI at two points. */
export interface OrbitalMatch {
  /** which orbital of the second point continues an orbital of the first */
  readonly partner: (orbital: number) => number;
  /** both spins have the same orbitals, and so the same free signs; false: those of UHF */
  readonly isPaired: boolean;
}

/**
 * Matches the orbitals of CI at two geometries: those of one symmetry label by their order within it, those without
 * a partner by their order among the rest, and all by order where there are no labels.
 */
export function matchOrbitals(first: PointResult, second: PointResult, level: string): OrbitalMatch {
  if (isUnrestricted(first, level) || isUnrestricted(second, level)) {
    return { partner: (orbital) => orbital, isPaired: false };
  }
  const from = occurrences(referenceLabels(first));
  const to = occurrences(referenceLabels(second));
  const count = Math.min(from.length, to.length);
  const placeOf = new Map(to.slice(0, count).map((label, place) => [label, place]));
  const match = from.slice(0, count).map((label) => (label === null ? undefined : placeOf.get(label)));
  const taken = new Set(match);
  const free = Array.from({ length: count }, (_, place) => place).filter((place) => !taken.has(place));
  const full = match.map((place) => place ?? free.shift()!);
  return { partner: (orbital) => full[orbital] ?? orbital, isPaired: true };
}

/**
 * Estimate of |⟨first|second⟩|² between two geometries from the leading determinants alone, each scaled to 1.
 *
 * Orbitals are matched one to one, and their signs are free at every geometry. Determinants with the same singly
 * occupied orbitals change sign together (over UHF orbitals none do), so that relative signs within such a set count
 * and those between sets do not: the estimate is the largest value that the free signs allow.
 *
 * @returns undefined where a state has no determinants
 */
export function stateOverlap(
  first: readonly StateComponent[],
  second: readonly StateComponent[],
  { partner, isPaired }: OrbitalMatch,
): number | undefined {
  if (first.length === 0 || second.length === 0) return undefined;
  const coefficients = new Map(second.map(({ alpha, beta, coefficient }) => [key(alpha, beta), coefficient]));
  const sums = new Map<string, number>();
  for (const { coefficient, alpha, beta } of first) {
    const up = sorted(alpha.map(partner));
    const down = sorted(beta.map(partner));
    const other = coefficients.get(key(up.orbitals, down.orbitals));
    if (other === undefined) continue;
    const signs = isPaired ? openOrbitals(up.orbitals, down.orbitals) : key(up.orbitals, down.orbitals);
    sums.set(signs, (sums.get(signs) ?? 0) + up.sign * down.sign * coefficient * other);
  }
  const overlap = [...sums.values()].reduce((sum, value) => sum + Math.abs(value), 0);
  return overlap ** 2 / (norm(first) * norm(second));
}

function isUnrestricted({ levels }: PointResult, level: string): boolean {
  const result = levels[level];
  return result?.kind === 'correlated' && result.reference === 'UHF';
}

/** Labels of the orbitals that CI is built on, as far as the study has their Hartree–Fock among its levels. */
function referenceLabels({ levels }: PointResult): OrbitalLabels {
  // those of RHF are not the labels of UHF orbitals
  if (Object.values(levels).some((level) => level.kind === 'correlated' && level.reference)) return [];
  const reference = levels.RHF ?? levels.ROHF;
  const labels = reference?.kind === 'hartreeFock' ? reference.orbitalSymmetries : undefined;
  return labels && 'length' in labels ? labels : [];
}

/** Partners of a degenerate pair share a label: each gets the number of its occurrence. */
function occurrences(labels: OrbitalLabels): (string | null)[] {
  const seen = new Map<string, number>();
  return labels.map((label) => {
    if (label === null) return null;
    const occurrence = seen.get(label) ?? 0;
    seen.set(label, occurrence + 1);
    return `${label} ${occurrence}`;
  });
}

/** With the sign of the permutation that brings the orbitals into rising order. */
function sorted(orbitals: readonly number[]): {
  readonly orbitals: readonly number[];
  readonly sign: 1 | -1;
} {
  let inversions = 0;
  orbitals.forEach((orbital, i) => {
    for (const later of orbitals.slice(i + 1)) inversions += Number(orbital > later);
  });
  return { orbitals: [...orbitals].sort((a, b) => a - b), sign: inversions % 2 === 0 ? 1 : -1 };
}

/** What the free signs act on: in an orbital with both spins they cancel. */
const openOrbitals = (alpha: readonly number[], beta: readonly number[]): string =>
  [...without(alpha, beta), ...without(beta, alpha)].sort((a, b) => a - b).join();

const without = (orbitals: readonly number[], others: readonly number[]): number[] =>
  orbitals.filter((orbital) => !others.includes(orbital));

const key = (alpha: readonly number[], beta: readonly number[]): string => `${alpha.join()}|${beta.join()}`;

const norm = (components: readonly StateComponent[]): number =>
  components.reduce((sum, { coefficient }) => sum + coefficient ** 2, 0);
