import { type PairList, pairPlace, placeOfRun } from './closed-shell-orbitals';
import type { ClosedShellPlaces, ParticlePairPlaces } from './closed-shell-places';
import type { ClosedShellRoom, PairMatrices, PairStretch } from './closed-shell-room';

/** Takes the amplitudes from a vector over determinants that is even or odd under the exchange of spins. */
export function readAmplitudes(room: ClosedShellRoom, places: ClosedShellPlaces, vector: Float64Array): void {
  const { parity, pairs } = room;
  const [opposite, exchanged, same, both] = [room.opposite, room.exchanged, room.same, room.both].map(
    ({ view }) => view,
  );
  forEachSingle(room, places, (place, single, sign) => {
    room.singles.view[place] = sign * vector[places.betaSingles + single * places.betaSinglesStride];
  });
  forEachHolePair(room, places, pairs.antisymmetric.amplitudes, (row, first, { place, sign }, ofHoles) => {
    const start = places.betaDoubles + first;
    for (let k = 0; k < place.length; k++) row[place[k]] = ofHoles * sign[k] * vector[start + k];
  });

  for (const { stretch, inVector: from, inRoom: to, sign } of places.stretches) {
    const [symmetric, antisymmetric, equal] = pairRows(room, stretch, 'amplitudes');
    for (let y = 0; y < stretch.count; y++) {
      const u = sign * vector[from.straight + y];
      const v = sign * vector[from.crossed + y * from.crossedStep];
      const crossed = to.crossed + y * to.crossedStep;
      const mirrored = to.mirrored + y * to.mirroredStep;
      if (y < symmetric.count) symmetric.view[symmetric.first + y] = 0.5 * (u + v);
      if (y < antisymmetric.count) antisymmetric.view[antisymmetric.first + y] = 0.5 * (u - v);
      const d = y < equal.count ? equal.view[equal.first + y] : 0;
      opposite[to.straight + y] = u;
      opposite[crossed] = v;
      opposite[to.turned + y] = parity * v;
      opposite[mirrored] = parity * u;
      exchanged[to.straight + y] = v;
      exchanged[crossed] = u;
      exchanged[to.turned + y] = parity * u;
      exchanged[mirrored] = parity * v;
      same[to.straight + y] = d;
      same[crossed] = -d;
      same[to.turned + y] = -d;
      same[mirrored] = d;
      both[to.straight + y] = u + d;
      both[crossed] = v - d;
      both[to.turned + y] = parity * v - d;
      both[mirrored] = parity * u + d;
    }
  }
}

/** Puts together what H makes of the amplitudes, by the symmetries that each kind of excitation has. */
export function writeProduct(room: ClosedShellRoom, places: ClosedShellPlaces, product: Float64Array): void {
  const { parity, pairs } = room;
  const [opposite, exchanged, same] = [room.ofOpposite, room.ofExchanged, room.ofSame].map(
    ({ view }) => view,
  );
  forEachSingle(room, places, (place, single, sign) => {
    const value = sign * room.ofSingles.view[place];
    product[places.betaSingles + single * places.betaSinglesStride] = value;
    product[places.alphaSingles + single] = parity * value;
  });

  for (const { stretch, inRoom: from, inVector: to, sign } of places.stretches) {
    const [symmetric, antisymmetric, equal] = pairRows(room, stretch, 'results');
    for (let y = 0; y < stretch.count; y++) {
      const crossed = from.crossed + y * from.crossedStep;
      const mirrored = from.mirrored + y * from.mirroredStep;
      const straight = from.straight + y;
      const turned = from.turned + y;
      const ofBoth = y < symmetric.count ? symmetric.view[symmetric.first + y] : 0;
      const difference = y < antisymmetric.count ? antisymmetric.view[antisymmetric.first + y] : 0;
      const u =
        sign *
        (opposite[straight] +
          exchanged[crossed] +
          parity * (opposite[mirrored] + exchanged[turned]) +
          ofBoth +
          difference);
      const v =
        sign *
        (opposite[crossed] +
          exchanged[straight] +
          parity * (opposite[turned] + exchanged[mirrored]) +
          ofBoth -
          difference);
      product[to.straight + y] = u;
      product[to.crossed + y * to.crossedStep] = v;
      product[to.turned + y] = parity * v;
      product[to.mirrored + y * to.mirroredStep] = parity * u;
      if (y < equal.count) {
        equal.view[equal.first + y] += same[straight] - same[crossed] - same[turned] + same[mirrored];
      }
    }
  }
  forEachHolePair(room, places, pairs.antisymmetric.results, (row, first, { place, sign }, ofHoles) => {
    for (let k = 0; k < place.length; k++) {
      const value = ofHoles * sign[k] * row[place[k]];
      product[places.betaDoubles + first + k] = value;
      product[places.alphaDoubles + first + k] = parity * value;
    }
  });
}

/** Calls for every single excitation of the sector's representation with its place here and among the strings. */
function forEachSingle(
  { integrals: { holes, particles, singles }, irrep }: ClosedShellRoom,
  { mixed: { runs }, signs }: ClosedShellPlaces,
  take: (place: number, single: number, sign: number) => void,
): void {
  for (let i = 0; i < holes.count; i++) {
    const length = particles.counts[holes.irreps[i] ^ irrep];
    for (let a = 0; a < length; a++) take(singles.start[irrep][i] + a, runs[irrep][i] + a, signs[i]);
  }
}

/** Calls for every pair of holes that electrons of equal spin leave, with its row of particle pairs. */
function forEachHolePair(
  { irrep, pairs: { antisymmetric } }: ClosedShellRoom,
  places: ClosedShellPlaces,
  matrices: PairMatrices['results'],
  take: (row: Float64Array, first: number, particlePairs: ParticlePairPlaces, sign: number) => void,
): void {
  for (const { start, holeIrrep, place, sign } of places.pairs) {
    const h = holeIrrep ^ irrep;
    const length = antisymmetric.particlePairs.size[h];
    const first = (antisymmetric.holePairs.size[holeIrrep] + place) * length;
    take(matrices[h].view.subarray(first, first + length), start, places.particlePairs[h], sign);
  }
}

/** Where a stretch stands in its row of pairs: fewer numbers where x = y is no such pair, none where i = j is none. */
interface PairRow {
  readonly view: Float64Array;
  readonly first: number;
  readonly count: number;
}

function pairRows(
  { integrals, pairs: { symmetric, antisymmetric } }: ClosedShellRoom,
  stretch: PairStretch,
  kind: 'amplitudes' | 'results',
): readonly [symmetric: PairRow, antisymmetric: PairRow, equalSpins: PairRow] {
  const equal = integrals.holePairs.antisymmetric;
  const pairIrrep = integrals.holes.irreps[stretch.i] ^ integrals.holes.irreps[stretch.j];
  const ofOpposite = antisymmetric.holePairs.size[pairIrrep];
  return [
    pairRow(symmetric, symmetric[kind], symmetric.holePairs, 0, stretch),
    pairRow(antisymmetric, antisymmetric[kind], antisymmetric.holePairs, 0, stretch),
    pairRow(antisymmetric, antisymmetric[kind], equal, ofOpposite, stretch),
  ];
}

function pairRow(
  { particlePairs }: PairMatrices,
  matrices: PairMatrices['results'],
  holePairs: PairList,
  rowsBefore: number,
  { i, j, ofX, ofY, x, count }: PairStretch,
): PairRow {
  const h = ofX ^ ofY;
  const { view } = matrices[h];
  if (i === j && holePairs.isStrict) return { view, first: 0, count: 0 };
  const row = rowsBefore + pairPlace(holePairs, i, j);
  return {
    view,
    first: row * particlePairs.size[h] + placeOfRun(particlePairs, ofX, ofY, x),
    count: ofX === ofY && particlePairs.isStrict ? count - 1 : count,
  };
}
