import { describe, expect, it } from 'vitest';
import { layClosedShellIntegrals } from '../../../engine/configuration-interaction/closed-shell-integrals';
import {
  closedShellPlaces,
  particlePairPlaces,
} from '../../../engine/configuration-interaction/closed-shell-places';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { buildSectors } from '../../../engine/configuration-interaction/sector';
import { scratchMemory } from '../../../engine/kernels/kernel-memory';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

describe('closedShellPlaces', () => {
  it.each([
    ['without symmetry', undefined],
    ['with representations', [1, 0, 3, 2, 0, 1, 3, 0]],
  ])('identity: every determinant of a sector has one place, %s', (_, species) => {
    const space = buildDeterminantSpace(8, 3, 3, 2);
    const memory = scratchMemory();
    memory.scope(() => {
      const random = randomOrbitalIntegrals(8, 1, { species: species ?? [] });
      const integrals = layClosedShellIntegrals(memory, random, 3, species);
      const ofParticles = particlePairPlaces(integrals);
      for (const sector of buildSectors(space, species)) {
        const { mixed, stretches, particlePairs, ...places } = closedShellPlaces(
          sector,
          integrals,
          ofParticles,
        );
        const found = new Set<number>();
        const singles = integrals.singles.size[sector.irrep];
        if (places.reference !== undefined) found.add(places.reference);
        for (let k = 0; k < singles; k++) {
          found.add(places.alphaSingles + k);
          found.add(places.betaSingles + k * places.betaSinglesStride);
        }
        for (const { start, holeIrrep } of places.pairs) {
          particlePairs[holeIrrep ^ sector.irrep].place.forEach((_place, k) => {
            found.add(places.alphaDoubles + start + k);
            found.add(places.betaDoubles + start + k);
          });
        }
        for (const { stretch, inVector } of stretches) {
          for (let y = 0; y < stretch.count; y++) {
            found.add(inVector.straight + y);
            found.add(inVector.crossed + y * inVector.crossedStep);
            found.add(inVector.turned + y);
            found.add(inVector.mirrored + y * inVector.mirroredStep);
          }
        }
        expect([...found].sort((a, b) => a - b)).toEqual(
          Array.from({ length: sector.dimension }, (_v, i) => i),
        );
      }
    });
  });
});
