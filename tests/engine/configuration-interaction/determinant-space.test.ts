import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
  transposeBackInto,
  transposeInto,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import { placeOf } from '../../../engine/configuration-interaction/string-space';
import { allOccupations } from '../../support/operator-algebra';

const SPACES = [
  [6, 3, 3, 2],
  [6, 3, 2, 3],
  [7, 2, 4, Number.POSITIVE_INFINITY],
  [10, 5, 1, 3],
  [4, 4, 0, 2],
] as const;

describe('buildDeterminantSpace', () => {
  it.each(SPACES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: every determinant once, the reference first',
    (n, alpha, beta, rank) => {
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const name = ({ alpha: a, beta: b }: { alpha: readonly number[]; beta: readonly number[] }) =>
        `${a}|${b}`;
      const found = Array.from({ length: space.dimension }, (_, place) => {
        const determinant = determinantAt(space, place);
        return name({ alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) });
      });
      const expected = allOccupations(n, alpha, beta, rank).map(name);
      expect(found.slice().sort()).toEqual(expected.sort());
      expect(found[0]).toBe(name({ alpha: [...Array(alpha).keys()], beta: [...Array(beta).keys()] }));
    },
  );

  it.each(SPACES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: transposed and back',
    (n, alpha, beta, rank) => {
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const vector = Float64Array.from({ length: space.dimension }, (_, place) => place + 1);
      const transposed = new Float64Array(space.dimension);
      transposeInto(space, vector, transposed);
      for (let place = 0; place < space.dimension; place += 7) {
        const determinant = determinantAt(space, place);
        const row = placeOf(space.alpha, determinant.alpha);
        expect(transposed[space.transposedRows.start[row] + placeOf(space.beta, determinant.beta)]).toBe(
          place + 1,
        );
      }
      const back = new Float64Array(space.dimension);
      transposeBackInto(space, transposed, back);
      expect(back).toEqual(vector);
    },
  );
});
