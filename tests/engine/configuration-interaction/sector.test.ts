import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  buildSectors,
  placesInSpace,
  putSector,
  takeSector,
} from '../../../engine/configuration-interaction/sector';

const IRREPS = [0, 3, 1, 0, 2, 1];

describe('buildSectors', () => {
  it.each([2, 3, Number.POSITIVE_INFINITY])(
    'identity: every determinant up to rank %d is in one sector, that of its orbitals',
    (rank) => {
      const space = buildDeterminantSpace(6, 3, 2, rank);
      const sectors = buildSectors(space, IRREPS);
      const seen = new Float64Array(space.dimension);
      for (const sector of sectors) {
        const places = placesInSpace(
          sector,
          Int32Array.from({ length: sector.dimension }, (_, i) => sector.dimension - 1 - i),
        );
        const part = Float64Array.from({ length: sector.dimension }, (_, i) => i + 1);
        const whole = new Float64Array(space.dimension);
        putSector(sector, part, whole);
        places.forEach((place, i) => {
          expect(whole[place]).toBe(sector.dimension - i);
          seen[place]++;
          const { alpha, beta } = determinantAt(space, place);
          const irrep = [...occupiedOrbitals(alpha), ...occupiedOrbitals(beta)].reduce(
            (product, p) => product ^ IRREPS[p],
            0,
          );
          expect(irrep).toBe(sector.irrep);
        });
        expect(takeSector(sector, whole)).toEqual(part);
      }
      expect(seen.every((count) => count === 1)).toBe(true);
    },
  );

  it('identity: without representations the one sector is the whole space in its order', () => {
    const space = buildDeterminantSpace(5, 2, 2, 3);
    const sectors = buildSectors(space, undefined);
    expect(sectors).toHaveLength(1);
    const whole = Float64Array.from({ length: space.dimension }, (_, i) => i);
    expect(takeSector(sectors[0], whole)).toEqual(whole);
  });
});
