import { describe, expect, it } from 'vitest';
import {
  addScaledRows,
  emptyRowList,
  gatherSigned,
  scatterAdd,
} from '../../../engine/configuration-interaction/product-kernels';
import { randomArray, seededRandom } from '../../support/random';

describe('product kernels', () => {
  it.each([0, 1, 3, 4, 5, 11])('identity: %i rows of unequal length, added with their factors', (count) => {
    const random = seededRandom(count);
    const source = randomArray(100, random);
    const rows = emptyRowList(12);
    const target = randomArray(40, random);
    const expected = target.slice();
    for (let row = 0; row < count; row++) {
      rows.start[row] = Math.floor(60 * random());
      rows.length[row] = Math.floor(30 * random());
      rows.factor[row] = random();
      for (let k = 0; k < rows.length[row]; k++)
        expected[5 + k] += rows.factor[row] * source[rows.start[row] + k];
    }
    rows.count = count;
    addScaledRows(target, 5, source, rows);
    target.forEach((value, k) => {
      expect(value).toBeCloseTo(expected[k], 13);
    });
  });

  it('identity: scattering what was gathered adds the signed source', () => {
    const source = Float64Array.from([10, 11, 12, 13, 14, 15]);
    const place = Int32Array.from([5, 0, 2, 3]);
    const sign = Int8Array.from([1, -1, -1, 1]);
    const gathered = new Float64Array(5);
    gatherSigned(
      gathered,
      2,
      source,
      1,
      place.map((p) => p - 1),
      sign,
      2,
      4,
    );
    expect(Array.from(gathered)).toEqual([0, 0, -12, 13, 0]);
    const target = new Float64Array(8);
    scatterAdd(target, 1, Float64Array.from([7, 8]), place, 1, 3);
    expect(Array.from(target)).toEqual([0, 7, 0, 8, 0, 0, 0, 0]);
  });
});
