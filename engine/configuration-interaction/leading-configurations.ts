import { type DeterminantSpace, determinantAt, rowLength } from './determinant-space';
import { type OccupationString, occupationString, occupiedOrbitals } from './determinants';
import { placeOf } from './string-space';

/** All determinants of one occupation of the spatial orbitals, which both spins must share. */
export interface WeightedConfiguration {
  /** Σ c² over its determinants */
  readonly weight: number;
  readonly doublyOccupied: readonly number[];
  readonly singlyOccupied: readonly number[];
}

const CONFIGURATION_COUNT = 8;
const CONFIGURATION_WEIGHT = 1e-3;
/**
 * A configuration is found by a determinant of this weight at least. The heaviest of its determinants is certain to
 * have it as long as they are not more than 100: up to eight unpaired electrons.
 */
const SEEN_WEIGHT = CONFIGURATION_WEIGHT / 100;

/** The configurations of largest weight, falling: at most eight, each above 0.001. */
export function leadingConfigurations(
  space: DeterminantSpace,
  vector: Float64Array,
): readonly WeightedConfiguration[] {
  const found = new Map<string, WeightedConfiguration>();
  for (let place = 0; place < vector.length; place++) {
    if (vector[place] ** 2 < SEEN_WEIGHT) continue;
    const { alpha, beta } = determinantAt(space, place);
    const doubly = alpha.map((word, w) => word & beta[w]);
    const singly = alpha.map((word, w) => word ^ beta[w]);
    const key = `${doubly}/${singly}`;
    if (!found.has(key)) found.set(key, weighConfiguration(space, vector, doubly, singly));
  }
  return [...found.values()]
    .filter(({ weight }) => weight > CONFIGURATION_WEIGHT)
    .sort((a, b) => b.weight - a.weight)
    .slice(0, CONFIGURATION_COUNT);
}

function weighConfiguration(
  space: DeterminantSpace,
  vector: Float64Array,
  doubly: OccupationString,
  singly: OccupationString,
): WeightedConfiguration {
  const doublyOccupied = occupiedOrbitals(doubly);
  const singlyOccupied = occupiedOrbitals(singly);
  let weight = 0;
  for (const up of choices(singlyOccupied, space.alpha.electrons - doublyOccupied.length)) {
    const alpha = occupationString(space.orbitalCount, [...doublyOccupied, ...up]);
    const beta = alpha.map((word, w) => doubly[w] | (singly[w] & ~word));
    const column = placeOf(space.alpha, alpha);
    const row = placeOf(space.beta, beta);
    // in truncated CI a configuration may be there in part
    if (column < 0 || row < 0 || column >= rowLength(space.rows, row)) continue;
    weight += vector[space.rows.start[row] + column] ** 2;
  }
  return { weight, doublyOccupied, singlyOccupied };
}

/** Every choice of k of the orbitals. */
function choices(orbitals: readonly number[], k: number): number[][] {
  if (k === 0) return [[]];
  return orbitals.flatMap((orbital, i) =>
    choices(orbitals.slice(i + 1), k - 1).map((rest) => [orbital, ...rest]),
  );
}
