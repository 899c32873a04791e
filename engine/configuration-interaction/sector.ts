import type { DeterminantSpace } from './determinant-space';
import { classifyStrings, countUpToRank, IRREPS, type StringClasses } from './string-classes';

/**
 * The determinants of one representation, and where each stands in a vector that holds no others: rows of alpha
 * strings, one for each beta string, as in the whole space. Rows stand in order of the beta string's
 * representation; beside one of h stand the alpha strings of h × that of the sector.
 */
export interface Sector {
  readonly space: DeterminantSpace;
  readonly irrep: number;
  readonly alpha: StringClasses;
  readonly beta: StringClasses;
  readonly dimension: number;
  /** by representation of the beta string, then by its place: where its row starts; one more at the end */
  readonly rowStart: readonly Int32Array[];
}

/** The sectors that have determinants; one that is the whole space where representations are not known. */
export function buildSectors(
  space: DeterminantSpace,
  orbitalIrreps: readonly number[] | undefined,
): readonly Sector[] {
  const alpha = classifyStrings(space.alpha, orbitalIrreps);
  const beta = space.beta === space.alpha ? alpha : classifyStrings(space.beta, orbitalIrreps);
  const sectors = Array.from({ length: IRREPS }, (_, irrep) => layRows(space, irrep, alpha, beta));
  return sectors.filter(({ dimension }) => dimension > 0);
}

/** Most representations have no strings in a small molecule: none of them needs an array of its own. */
const NO_ROWS = new Int32Array(1);

function layRows(space: DeterminantSpace, irrep: number, alpha: StringClasses, beta: StringClasses): Sector {
  let dimension = 0;
  const rowStart = beta.members.map((members, h) => {
    if (members.length === 0) return NO_ROWS;
    const start = new Int32Array(members.length + 1);
    members.forEach((string, place) => {
      start[place] = dimension;
      dimension += countUpToRank(alpha, h ^ irrep, space.maximumRank - space.beta.ranks[string]);
    });
    start[members.length] = dimension;
    return start;
  });
  return { space, irrep, alpha, beta, dimension, rowStart };
}

/** Do vectors of the sector have the order of vectors over the whole space? */
export function isWholeSpace({ space, alpha, beta }: Sector): boolean {
  return alpha.members[0].length === space.alpha.count && beta.members[0].length === space.beta.count;
}

/** Calls for every row: where it starts, the alpha strings in order, and where its beta string's row starts in the space. */
function forEachRow(
  { space, irrep, alpha, beta, rowStart }: Sector,
  take: (start: number, length: number, columns: Int32Array, wholeStart: number) => void,
): void {
  rowStart.forEach((starts, h) => {
    const columns = alpha.members[h ^ irrep];
    beta.members[h].forEach((string, place) => {
      take(starts[place], starts[place + 1] - starts[place], columns, space.rows.start[string]);
    });
  });
}

/** The part of a vector over the whole space that lies in the sector. */
export function takeSector(sector: Sector, whole: Float64Array): Float64Array {
  const part = new Float64Array(sector.dimension);
  forEachRow(sector, (start, length, columns, wholeStart) => {
    for (let k = 0; k < length; k++) part[start + k] = whole[wholeStart + columns[k]];
  });
  return part;
}

/** Writes the sector's part into a vector over the whole space. */
export function putSector(sector: Sector, part: Float64Array, whole: Float64Array): void {
  forEachRow(sector, (start, length, columns, wholeStart) => {
    for (let k = 0; k < length; k++) whole[wholeStart + columns[k]] = part[start + k];
  });
}

/** Places in the whole space of determinants of the sector. */
export function placesInSpace(sector: Sector, places: Int32Array): Int32Array {
  const found = new Int32Array(places.length);
  const order = Array.from(places.keys()).sort((a, b) => places[a] - places[b]);
  let next = 0;
  forEachRow(sector, (start, length, columns, wholeStart) => {
    for (; next < order.length && places[order[next]] < start + length; next++) {
      found[order[next]] = wholeStart + columns[places[order[next]] - start];
    }
  });
  return found;
}
