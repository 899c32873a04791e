import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  transposeInto,
} from '../../../engine/configuration-interaction/determinant-space';
import { buildSectors, putSector, takeSector } from '../../../engine/configuration-interaction/sector';
import {
  EXACT_PARITY,
  makeEvenOrOdd,
  mirror,
  spinFlipParity,
} from '../../../engine/configuration-interaction/spin-flip';
import { randomArray, seededRandom } from '../../support/random';

describe('exchange of spins within a sector', () => {
  // 84 strings: rows and columns beyond one tile
  const space = buildDeterminantSpace(9, 3, 3, 5);
  const sectors = buildSectors(space, [0, 1, 2, 3, 0, 0, 1, 2, 3]);

  it.each([1, -1])(
    'identity: makes vectors of parity %i, which the transposition of the whole space confirms',
    (parity) => {
      for (const sector of sectors) {
        const vector = randomArray(sector.dimension, seededRandom(sector.irrep));
        expect(spinFlipParity(sector, vector, EXACT_PARITY)).toBe(0);
        makeEvenOrOdd(sector, vector, parity);
        expect(spinFlipParity(sector, vector, EXACT_PARITY)).toBe(parity);
        const whole = new Float64Array(space.dimension);
        putSector(sector, vector, whole);
        const image = new Float64Array(space.dimension);
        transposeInto(space, whole, image);
        takeSector(sector, image).forEach((value, i) => {
          expect(value === parity * vector[i]).toBe(true);
        });
      }
    },
  );

  it('identity: fills the upper half from the lower one', () => {
    const [sector] = sectors;
    const even = randomArray(sector.dimension, seededRandom(4));
    makeEvenOrOdd(sector, even, 1);
    const mirrored = even.slice();
    mirror(sector, mirrored, 1);
    expect(mirrored).toEqual(even);
  });
});
