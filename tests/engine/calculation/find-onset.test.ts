import { describe, expect, it } from 'vitest';
import {
  type BasisRequest,
  computePoint,
  findLevelMinimum,
  type InstabilityOnset,
  type PointResult,
  prepareStudy,
  type Study,
  type StudyAtom,
} from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { findInstabilityOnset } from '../../../engine/calculation/find-onset';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { atom, compute, hartreeFock, prepare, study } from '../../support/studies';

const scan = (
  atoms: readonly StudyAtom[],
  values: readonly number[],
  changes: Partial<Study> = {},
): Study => ({ ...study(atoms, changes), scan: { coordinate: { bonds: [[0, 1]] }, values } });

function onsetOf(request: Study): { onset: InstabilityOnset; points: readonly PointResult[] } {
  const prepared = prepare(request);
  const points = prepared.coordinates.map((r) => computePoint(prepared, r).result);
  return { onset: findInstabilityOnset(prepared, points), points };
}

const hydrogen = (r: number) => [atom('H'), atom('H', 0, 0, r)];

/**
 * Lowest eigenvalue of the triplet Hessian of H2 in a minimal basis, ε₂ − ε₁ − J₁₂ − K₁₂, from integrals over the two
 * functions and the orbitals that symmetry fixes. (The mixed-spin determinant with orbitals cosθ ψ₁ ± sinθ ψ₂ has the
 * energy E(θ) with E''(0) = 4(ε₂ − ε₁ − J₁₂ − K₁₂): A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, sec. 3.8.7.)
 */
function closedForm(r: number, basis: BasisRequest = 'STO-3G'): number {
  const prepared = prepare(study(hydrogen(r), { basis }));
  const molecule = prepared.moleculeAt(null);
  const { problem } = molecularIntegrals(molecule, placeBasis(prepared.basisSet, molecule));
  const s = problem.overlap[1]!;
  const [same, cross] = problem.coreHamiltonian;
  const repulsion = (i: number, j: number, k: number, l: number) =>
    problem.repulsion[packedPair(packedPair(i, j), packedPair(k, l))]!;
  const half = (repulsion(0, 0, 0, 0) + repulsion(0, 0, 1, 1)) / 2;
  const exchange = repulsion(1, 0, 1, 0);
  const h1 = (same! + cross!) / (1 + s);
  const h2 = (same! - cross!) / (1 - s);
  const j11 = (half + exchange + 2 * repulsion(1, 0, 0, 0)) / (1 + s) ** 2;
  const j12 = (half - exchange) / (1 - s * s);
  const k12 = (repulsion(0, 0, 0, 0) - repulsion(0, 0, 1, 1)) / 2 / (1 - s * s);
  return h2 + 2 * j12 - k12 - (h1 + j11) - j12 - k12;
}

function closedRoot(): number {
  let [low, high] = [1.5, 4];
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (closedForm(middle) > 0) low = middle;
    else high = middle;
  }
  return low;
}

describe('onset of the RHF instability', () => {
  it.each([1, 1.4, 2, 2.5, 4])(
    'independent: H2 in a minimal basis – the triplet eigenvalue equals ε₂ − ε₁ − J₁₂ − K₁₂ at %f bohr',
    (r) => {
      const { stability } = hartreeFock(compute(study(hydrogen(r))));
      expect(Math.abs((stability as { triplet: number }).triplet - closedForm(r))).toBeLessThan(1e-7);
    },
  );

  it.each([
    ['far grid', [1, 5]],
    ['fine grid', [1.4, 2, 2.2, 2.4, 3, 6]],
    ['falling order', [6, 3, 2, 1]],
  ])('independent: H2 in a minimal basis – the closed form’s root to 1e-3 bohr, %s', (_, values) => {
    const { onset } = onsetOf(scan(hydrogen(1.4), values));
    if (onset.kind !== 'found') throw new Error(onset.reason);
    expect(onset.uncertainty).toBeLessThanOrEqual(5e-4);
    expect(Math.abs(onset.coordinate - closedRoot())).toBeLessThanOrEqual(onset.uncertainty + 1e-7);
  });

  it('identity: UHF leaves RHF just there, in a split basis and where the angular part counts', () => {
    const { onset } = onsetOf(scan([atom('H'), atom('F', 0, 0, 1.7)], [1.7, 2.4, 4], { basis: '6-31G' }));
    if (onset.kind !== 'found') throw new Error(onset.reason);
    const difference = (r: number) => {
      const point = compute(
        study([atom('H'), atom('F', 0, 0, r)], { basis: '6-31G', levels: ['RHF', 'UHF'] }),
      );
      const [rhf, uhf] = ['RHF', 'UHF'].map((level) => (point.levels[level] as { energy: number }).energy);
      return rhf! - uhf!;
    };
    expect(Math.abs(difference(onset.coordinate - 0.02))).toBeLessThan(1e-9);
    // beyond the onset the energy falls off with the square of the distance
    const [near, far] = [difference(onset.coordinate + 0.05), difference(onset.coordinate + 0.1)];
    expect(near!).toBeGreaterThan(1e-7);
    expect(far! / near!).toBeGreaterThan(3);
    expect(far! / near!).toBeLessThan(5);
  });

  it('identity: says so where there is none in the range', () => {
    expect(onsetOf(scan(hydrogen(1.4), [1, 1.2, 1.4])).onset).toEqual({
      kind: 'none',
      reason: 'RHF is stable at every point.',
    });
    expect(onsetOf(scan(hydrogen(4), [4, 5])).onset).toEqual({
      kind: 'none',
      reason: 'RHF is unstable at every point.',
    });
  });

  it('identity: points that did not converge are not read', () => {
    const prepared = prepare(scan(hydrogen(1.4), [1.2, 4]));
    const points = prepared.coordinates.map((r) => computePoint(prepared, r).result);
    const failed = points.map((point) => ({
      ...point,
      levels: { RHF: { ...hartreeFock(point), converged: false } },
    }));
    expect(findInstabilityOnset(prepared, failed)).toMatchObject({ kind: 'none' });
  });

  it('identity: belongs to the findings of RHF, and to no other level’s', () => {
    const preparation = prepareStudy(scan(hydrogen(1.4), [1, 1.4, 2, 3], { levels: ['RHF', 'UHF'] }));
    if (!preparation.ok) throw preparation.errors[0];
    const { prepared } = preparation;
    const points = prepared.coordinates.map((r) => computePoint(prepared, r).result);
    expect(findLevelMinimum(prepared, 'RHF', points).instabilityOnset?.kind).toBe('found');
    expect(findLevelMinimum(prepared, 'UHF', points).instabilityOnset).toBeUndefined();
  });
});
