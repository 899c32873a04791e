import { describe, expect, it } from 'vitest';
import { computePoint, findLevelMinimum, prepareStudy, type Study } from '#engine';
import { EQUILIBRIUM_DISTANCES } from '../../reference-data/szabo-ostlund';

/** Five coarse points around a distance in bohr, then the minimum from points of its own. */
function minimumOf(elements: readonly [string, string], basis: string, level: string, near: number) {
  const study: Study = {
    format: 'farwell/study',
    version: 1,
    molecule: {
      unit: 'bohr',
      atoms: [
        { element: elements[0], at: [0, 0, 0] },
        { element: elements[1], at: [0, 0, near] },
      ],
    },
    scan: { coordinate: { bonds: [[0, 1]] }, values: [-0.6, -0.3, 0, 0.3, 0.6].map((step) => near + step) },
    basis,
    levels: [level],
  };
  const preparation = prepareStudy(study);
  if (!preparation.ok) throw preparation.errors[0];
  const { prepared } = preparation;
  const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
  const { minimum } = findLevelMinimum(prepared, level, points);
  if (minimum.kind !== 'found') throw new Error(`no minimum: ${minimum.kind}`);
  return minimum;
}

const ATOMS: Readonly<Record<string, readonly [string, string]>> = { H2: ['H', 'H'], N2: ['N', 'N'] };

describe('findLevelMinimum', () => {
  it.each(EQUILIBRIUM_DISTANCES)('published: $system, $level/$basis, equilibrium distance', (row) => {
    // starting points off the minimum on either side: the range, not the print, decides
    const near = row.system === 'H2' ? 1.5 : 2.2;
    const { equilibriumDistance, uncertainty } = minimumOf(ATOMS[row.system]!, row.basis, row.level, near);
    expect(equilibriumDistance).toMatchPublished(row);
    expect(uncertainty).toBeLessThan(1e-4);
  });

  it('identity: the energy at the minimum is not above that of points beside it', () => {
    const { equilibriumDistance, energy } = minimumOf(['H', 'H'], 'STO-3G', 'FCI', 1.5);
    for (const step of [-1e-3, 1e-3]) {
      const preparation = prepareStudy({
        format: 'farwell/study',
        version: 1,
        molecule: {
          unit: 'bohr',
          atoms: [
            { element: 'H', at: [0, 0, 0] },
            { element: 'H', at: [0, 0, equilibriumDistance + step] },
          ],
        },
        basis: 'STO-3G',
        levels: ['FCI'],
      });
      if (!preparation.ok) throw preparation.errors[0];
      const beside = computePoint(preparation.prepared, null).result.levels.FCI;
      expect(beside?.kind === 'correlated' && beside.energy).toBeGreaterThan(energy);
    }
  });
});
