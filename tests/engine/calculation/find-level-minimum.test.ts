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

describe('levels of isotopologues and rotations in the findings', () => {
  const DISTANCES = [0.8, 1, 1.2, 1.4, 1.6, 1.9, 2.3, 2.8, 3.5, 4.5, 6, 8];
  function vibrationOf(isotopes: readonly [number, number], findings: Study['findings']) {
    const preparation = prepareStudy({
      format: 'farwell/study',
      version: 1,
      molecule: {
        unit: 'bohr',
        atoms: [
          { element: 'H', at: [0, 0, 0], isotope: isotopes[0] },
          { element: 'H', at: [0, 0, 1.4], isotope: isotopes[1] },
        ],
      },
      scan: { coordinate: { bonds: [[0, 1]] }, values: DISTANCES },
      basis: 'STO-3G',
      levels: ['FCI'],
      findings,
    });
    if (!preparation.ok) throw preparation.errors[0];
    const { prepared } = preparation;
    const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
    return findLevelMinimum(prepared, 'FCI', points);
  }

  it('identity: an isotopologue has what a study of its own isotopes finds', () => {
    const { isotopologues = [] } = vibrationOf([1, 1], { isotopologues: [[1, 2]], rotation: [3] });
    const own = vibrationOf([1, 2], { rotation: [0, 3] });
    const { vibration, constants, massNumbers } = isotopologues[0]!;
    if (vibration.kind !== 'found' || own.vibration?.kind !== 'found') throw new Error('no levels');
    expect(massNumbers).toEqual([1, 2]);
    expect(vibration.boundLevels).toBe(own.vibration.boundLevels);
    expect(vibration.d0).toBeCloseTo(own.vibration.d0!, 10);
    expect(constants!.harmonicWavenumberPerCm.value).toBeCloseTo(
      own.constants!.diatomic!.harmonicWavenumberPerCm.value,
      6,
    );
    expect(vibration.rotating!.map(({ rotation }) => rotation)).toEqual([3]);
    vibration.rotating![0]!.levels.forEach(({ energyPerCm }, v) => {
      const same = own.vibration?.kind === 'found' ? own.vibration.rotating![0]!.levels[v]! : undefined;
      expect(energyPerCm).toBeCloseTo(same!.energyPerCm, 5);
    });
  });

  it('identity: B_v and D_v predict the levels with a little rotation', () => {
    const { vibration } = vibrationOf([1, 1], { rotation: [1] });
    if (vibration?.kind !== 'found') throw new Error('no levels');
    const rotation = 2;
    vibration.levels.slice(0, 5).forEach((level, v) => {
      const predicted =
        level.energyPerCm +
        level.rotationalConstantPerCm * rotation -
        level.centrifugalDistortionPerCm! * rotation ** 2;
      // the next constant is a thousandth of D_v, times 2³
      expect(vibration.rotating![0]!.levels[v]!.energyPerCm).toBeCloseTo(predicted, 2);
    });
  });
});
