import { describe, expect, it } from 'vitest';
import type { BasisSet } from '../../../engine/basis/basis-set';
import { primitiveNorm } from '../../../engine/basis/normalisation';
import { placeBasis, shellFunctionCount } from '../../../engine/basis/place-basis';
import type { Atom, Molecule } from '../../../engine/molecule/molecule';
import { integrateOverRadius } from '../../support/radial-quadrature';

const atom = (symbol: string, atomicNumber: number, z: number, nuclearCharge = atomicNumber): Atom => ({
  symbol,
  atomicNumber,
  nuclearCharge,
  position: [0, 0, z],
});
const molecule = (...atoms: Atom[]): Molecule => ({ atoms, charge: 0, multiplicity: 1 });

const basisSet: BasisSet = {
  name: 'trial',
  harmonics: 'spherical',
  elements: {
    H: [{ angularMomentum: 0, exponents: [2, 0.5, 0.1], coefficients: [0.3, 0, 2] }],
    Li: [
      { angularMomentum: 0, exponents: [3], coefficients: [1] },
      { angularMomentum: 1, exponents: [0.9, 0.2], coefficients: [-0.5, 7] },
      { angularMomentum: 3, exponents: [0.6], coefficients: [1] },
    ],
  },
  citations: [],
  notes: [],
};

describe('placeBasis', () => {
  it('identity: functions are numbered through the atoms in order, ghosts included', () => {
    const basis = placeBasis(basisSet, molecule(atom('Li', 3, 0), atom('H', 1, 3, 0), atom('H', 1, -3)));
    expect(basis.shells.map((shell) => [shell.atom, shell.firstFunction, shell.functionCount])).toEqual([
      [0, 0, 1],
      [0, 1, 3],
      [0, 4, 7],
      [1, 11, 1],
      [2, 12, 1],
    ]);
    expect(basis.functionCount).toBe(13);
    expect(basis.shells[3].centre).toEqual([0, 0, 3]);
  });

  it('independent: every contracted x^l is normalised, by quadrature', () => {
    const { shells } = placeBasis(basisSet, molecule(atom('Li', 3, 0), atom('H', 1, 3)));
    for (const { angularMomentum: l, exponents, coefficients } of shells) {
      const radial = (r: number) =>
        exponents.reduce((sum, exponent, i) => sum + coefficients[i] * Math.exp(-exponent * r * r), 0);
      const norm = integrateOverRadius((r) => r ** (2 * l + 2) * radial(r) ** 2);
      expect(((4 * Math.PI) / (2 * l + 1)) * norm).toBeCloseTo(1, 13);
    }
  });

  it('identity: primitives with coefficient 0 are left out, the others keep their proportions', () => {
    const [shell] = placeBasis(basisSet, molecule(atom('H', 1, 0))).shells;
    expect([...shell.exponents]).toEqual([2, 0.1]);
    const [tight, wide] = shell.coefficients;
    expect(tight / wide).toBeCloseTo((0.3 * primitiveNorm(2, 0)) / (2 * primitiveNorm(0.1, 0)), 14);
  });

  it('identity: shells of one definition share their arrays, on every atom and at every geometry', () => {
    const near = placeBasis(basisSet, molecule(atom('H', 1, 0), atom('H', 1, 1)));
    const far = placeBasis(basisSet, molecule(atom('H', 1, 9)));
    expect(near.shells[1].exponents).toBe(near.shells[0].exponents);
    expect(far.shells[0].coefficients).toBe(near.shells[0].coefficients);
  });

  it('identity: Cartesian shells have all products', () => {
    const cartesian = placeBasis({ ...basisSet, harmonics: 'cartesian' }, molecule(atom('Li', 3, 0)));
    expect(cartesian.functionCount).toBe(1 + 3 + 10);
    expect([0, 1, 2, 3, 4].map((l) => shellFunctionCount(l, 'cartesian'))).toEqual([1, 3, 6, 10, 15]);
    expect([0, 1, 2, 3, 4].map((l) => shellFunctionCount(l, 'spherical'))).toEqual([1, 3, 5, 7, 9]);
  });

  it('identity: an element that the set lacks, or a basis of nothing, is refused', () => {
    expect(() => placeBasis(basisSet, molecule(atom('He', 2, 0)))).toThrow(
      expect.objectContaining({ code: 'basis.elementMissing', details: { basis: 'trial', symbol: 'He' } }),
    );
    const empty = { ...basisSet, elements: { H: [] } };
    expect(() => placeBasis(empty, molecule(atom('H', 1, 0)))).toThrow(
      expect.objectContaining({ code: 'basis.empty' }),
    );
  });
});
