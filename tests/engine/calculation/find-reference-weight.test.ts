import { describe, expect, it } from 'vitest';
import { computePoint, findLevelMinimum, type PointResult, type Study } from '#engine';
import { findReferenceWeight } from '../../../engine/calculation/find-reference-weight';
import { atom, compute, correlated, prepare, singles, study } from '../../support/studies';

const scan = (values: readonly number[], changes: Partial<Study> = {}): Study => ({
  ...study([atom('H'), atom('H', 0, 0, 1.4)], { levels: ['RHF', 'FCI'], ...changes }),
  scan: { coordinate: { bonds: [[0, 1]] }, values },
});

function pointsOf(request: Study) {
  const prepared = prepare(request);
  return { prepared, points: prepared.coordinates.map((r) => computePoint(prepared, r).result) };
}

function findingOf(request: Study, level = 'FCI') {
  const { prepared, points } = pointsOf(request);
  return findReferenceWeight(prepared, level, points);
}

function weightAt(distance: number, changes: Partial<Study> = {}): number {
  const request = study([atom('H'), atom('H', 0, 0, distance)], { levels: ['FCI'], ...changes });
  return correlated(compute(request)).referenceWeight;
}

/**
 * In a minimal basis the weight follows from the 2×2 matrix over both doubly occupied orbitals; it is
 * ½(1 + Δ/√(Δ² + K²)), where √(Δ² + K²) − Δ is what full CI lies below RHF, and K that same exchange integral which
 * parts the singlet and triplet of one electron in each orbital: so E(singlet) − E(triplet) = 2K.
 */
function closedForm(distance: number): number {
  const point = compute(study([atom('H'), atom('H', 0, 0, distance)], { levels: ['RHF', 'CIS', 'FCI'] }));
  const cis = singles(point);
  const energyOf = (spin: string) => cis.states.find((state) => state.spin === spin)!.energy;
  const exchange = (energyOf('singlet') - energyOf('triplet')) / 2;
  const below = -correlated(point).correlation;
  const half = (exchange ** 2 - below ** 2) / (2 * below);
  return (1 + half / Math.hypot(half, exchange)) / 2;
}

describe('findReferenceWeight', () => {
  it.each([
    ['coarse', [1, 6]],
    ['fine', [1, 1.6, 2.2, 2.6, 3, 4, 6]],
    ['falling order', [6, 3, 1]],
  ])('independent: H2 in a minimal basis, %s grid: there the closed form has that weight', (_, values) => {
    for (const threshold of [0.9, 0.75]) {
      const finding = findingOf(scan(values, { findings: { referenceWeight: threshold } }));
      if (finding.kind === 'none') throw new Error(finding.reason);
      const { coordinate, uncertainty } = finding;
      expect(finding.threshold).toBe(threshold);
      expect(uncertainty).toBeLessThanOrEqual(5e-4);
      expect(closedForm(coordinate - uncertainty - 1e-5)).toBeGreaterThan(threshold);
      expect(closedForm(coordinate + uncertainty + 1e-5)).toBeLessThan(threshold);
      expect(finding.crossings).toEqual([{ coordinate, uncertainty, direction: 'falling' }]);
    }
  });

  it('identity: 0.9 where the study names no threshold, in a larger basis and for truncated CI too', () => {
    const changes = { basis: '6-31G', levels: ['RHF', 'CISD'] };
    const finding = findingOf(scan([1.4, 5], changes), 'CISD');
    if (finding.kind === 'none') throw new Error(finding.reason);
    expect(finding.threshold).toBe(0.9);
    expect(weightAt(finding.coordinate - 1e-3, { basis: '6-31G' })).toBeGreaterThan(0.9);
    expect(weightAt(finding.coordinate + 1e-3, { basis: '6-31G' })).toBeLessThan(0.9);
  });

  it('identity: says so where there is no such distance', () => {
    expect(findingOf(scan([1, 1.2, 1.4]))).toEqual({
      kind: 'none',
      threshold: 0.9,
      crossings: [],
      reason: 'The weight is not below 0.9 at any point.',
    });
    expect(findingOf(scan([5, 6]))).toMatchObject({ reason: 'The weight is below 0.9 at every point.' });
  });

  it('identity: a weight that has risen again at the end is no such distance, but its crossings are named', () => {
    // the points are exchanged, so that the weight seems to rise with the distance
    const { prepared, points } = pointsOf(scan([1.4, 6]));
    const mirrored: PointResult[] = points.map((point, i) => ({
      ...point,
      coordinate: points[1 - i]!.coordinate,
    }));
    const finding = findReferenceWeight(prepared, 'FCI', mirrored);
    expect(finding).toMatchObject({
      kind: 'none',
      reason: 'At the end of the scan the weight is not below 0.9.',
    });
    expect(finding.crossings).toMatchObject([{ direction: 'rising' }]);
  });

  it('identity: points that did not converge are not read', () => {
    const { prepared, points } = pointsOf(scan([1.4, 6]));
    const failed = points.map((point) => ({
      ...point,
      levels: { FCI: { ...correlated(point), converged: false } },
    }));
    expect(findReferenceWeight(prepared, 'FCI', failed)).toMatchObject({
      kind: 'none',
      reason: 'The level has not converged at any point.',
    });
  });

  it('identity: belongs to the findings of CI levels, and to no other level’s', () => {
    const { prepared, points } = pointsOf(scan([1, 1.4, 2, 3, 4]));
    expect(findLevelMinimum(prepared, 'FCI', points).referenceWeight).toEqual(
      findReferenceWeight(prepared, 'FCI', points),
    );
    expect(findLevelMinimum(prepared, 'RHF', points)).not.toHaveProperty('referenceWeight');
  });
});
