import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import type { ShellDefinition } from '../../../engine/basis/contracted-gaussian';
import { findBasisSet, listBasisSets } from '../../../engine/basis/library-index';
import { primitiveOverlap, selfOverlap } from '../../../engine/basis/normalisation';
import { shellFunctionCount } from '../../../engine/basis/place-basis';
import { ELEMENTS } from '../../../engine/molecule/elements';

const SETS = listBasisSets();

function functionCount(name: string, symbol: string): number {
  const { elements, harmonics } = findBasisSet(name, [symbol]);
  return elements[symbol].reduce(
    (sum, shell) => sum + shellFunctionCount(shell.angularMomentum, harmonics),
    0,
  );
}

/**
 * Lowest eigenvalue of −½∇² − 1/r over the s functions of one centre. For normalised s primitives with
 * p = α + β: T = 3αβ/p·S and ⟨1/r⟩ = 2√(p/π)·S.
 */
function hydrogenAtomEnergy(shells: readonly ShellDefinition[]): number {
  const functions = shells.filter((shell) => shell.angularMomentum === 0);
  const between = (integral: (alpha: number, beta: number) => number) =>
    new Matrix(
      functions.map((first) =>
        functions.map((second) => {
          let sum = 0;
          for (const [i, alpha] of first.exponents.entries()) {
            for (const [j, beta] of second.exponents.entries()) {
              sum += first.coefficients[i] * second.coefficients[j] * integral(alpha, beta);
            }
          }
          return sum;
        }),
      ),
    );
  const overlap = between((alpha, beta) => primitiveOverlap(alpha, beta, 0));
  const energy = between((alpha, beta) => {
    const total = alpha + beta;
    return ((3 * alpha * beta) / total - 2 * Math.sqrt(total / Math.PI)) * primitiveOverlap(alpha, beta, 0);
  });
  const { eigenvectorMatrix, realEigenvalues } = new EigenvalueDecomposition(overlap, {
    assumeSymmetric: true,
  });
  const inverseRoot = eigenvectorMatrix.mmul(
    Matrix.diag(realEigenvalues.map((value) => 1 / Math.sqrt(value))),
  );
  const orthonormal = inverseRoot.transpose().mmul(energy).mmul(inverseRoot);
  return Math.min(...new EigenvalueDecomposition(orthonormal, { assumeSymmetric: true }).realEigenvalues);
}

describe('listBasisSets', () => {
  it('identity: every set has another name, a description, and its elements by atomic number', () => {
    expect(new Set(SETS.map((set) => set.name.toLowerCase())).size).toBe(SETS.length);
    const order = ELEMENTS.map((element) => element.symbol);
    for (const { description, elements } of SETS) {
      expect(description).not.toBe('');
      expect(elements).toEqual(order.filter((symbol) => elements.includes(symbol)));
    }
  });
});

describe('the library', () => {
  it.each([
    ['STO-3G', '1', '5', '5'],
    ['3-21G', '2', '9', '9'],
    ['4-31G', '2', '9', '9'],
    ['6-31G', '2', '9', '9'],
    ['6-311G', '3', '13', '13'],
    ['6-31G*', '2', '15', '15'],
    ['6-31G**', '5', '15', '15'],
    ['6-31++G**', '6', '19', '19'],
    ['DZ (Dunning-Hay)', '2', '10', '10'],
    ['SV (Dunning-Hay)', '2', '9', '9'],
    ['cc-pVDZ', '5', '14', '14'],
    ['cc-pVTZ', '14', '30', '30'],
    ['cc-pVQZ', '30', '55', '55'],
    ['aug-cc-pVDZ', '9', '23', '23'],
  ])('published: numbers of functions of %s for H, C, O', (name, ...counts) => {
    for (const [i, symbol] of ['H', 'C', 'O'].entries()) {
      expect(functionCount(name, symbol)).toMatchPublished({
        printed: counts[i],
        source: `size of ${name} as its papers give it (MolSSI Basis Set Exchange data, see SOURCES.md)`,
      });
    }
  });

  it.each([
    ['cc-pVDZ', '-0.499278', 'T. H. Dunning, J. Chem. Phys. 90, 1007 (1989)'],
    ['cc-pVTZ', '-0.499810', 'T. H. Dunning, J. Chem. Phys. 90, 1007 (1989)'],
    ['cc-pVQZ', '-0.499946', 'T. H. Dunning, J. Chem. Phys. 90, 1007 (1989)'],
    [
      'STO-3G',
      '-0.466582',
      'W. J. Hehre, L. Radom, P. v. R. Schleyer, J. A. Pople, Ab Initio Molecular Orbital Theory',
    ],
    [
      '3-21G',
      '-0.496199',
      'W. J. Hehre, L. Radom, P. v. R. Schleyer, J. A. Pople, Ab Initio Molecular Orbital Theory',
    ],
    [
      '6-31G',
      '-0.498233',
      'W. J. Hehre, L. Radom, P. v. R. Schleyer, J. A. Pople, Ab Initio Molecular Orbital Theory',
    ],
    [
      '6-311G',
      '-0.499810',
      'W. J. Hehre, L. Radom, P. v. R. Schleyer, J. A. Pople, Ab Initio Molecular Orbital Theory',
    ],
  ])('published: energy of the hydrogen atom in %s', (name, printed, work) => {
    expect(hydrogenAtomEnergy(findBasisSet(name, ['H']).elements.H)).toMatchPublished({
      printed,
      unit: 'hartree',
      source: `${work}, hydrogen atom; value from memory`,
    });
  });

  it.each(SETS.map((set) => set.name))(
    'identity: every contraction of %s is normalised to its printed digits',
    (name) => {
      const { elements } = SETS.find((set) => set.name === name)!;
      for (const [symbol, shells] of Object.entries(findBasisSet(name, elements).elements)) {
        for (const [index, shell] of shells.entries()) {
          expect(selfOverlap(shell), `${symbol}, contraction ${index + 1}`).toBeCloseTo(1, 4);
        }
      }
    },
  );

  it.each(SETS.map((set) => set.name))(
    'identity: %s gives every element functions for all its electrons',
    (name) => {
      const { elements } = SETS.find((set) => set.name === name)!;
      for (const symbol of elements) {
        const { atomicNumber } = ELEMENTS.find((element) => element.symbol === symbol)!;
        const occupied =
          atomicNumber <= 2 ? 1 : atomicNumber <= 4 ? 2 : atomicNumber <= 10 ? 5 : atomicNumber <= 12 ? 6 : 9;
        expect(functionCount(name, symbol)).toBeGreaterThanOrEqual(occupied);
        const { citations, notes } = findBasisSet(name, [symbol]);
        // a paper, or the remark that there is none
        expect(citations.length + notes.length).toBeGreaterThan(0);
      }
    },
  );

  it('identity: the hydrogen atom is bound by less than half a hartree, more so in a larger set', () => {
    const energy = (name: string) => hydrogenAtomEnergy(findBasisSet(name, ['H']).elements.H);
    for (const { name } of SETS) expect(energy(name)).toBeGreaterThan(-0.5);
    expect(energy('6-311G')).toBeLessThan(energy('6-31G'));
    expect(energy('6-31++G**')).toBeLessThanOrEqual(energy('6-31G**'));
    expect(energy('aug-cc-pVDZ')).toBeLessThanOrEqual(energy('cc-pVDZ'));
  });

  it('identity: corrected rows and numbers without a paper are told to the user', () => {
    const chlorine = findBasisSet('DZ', ['Cl']);
    expect(chlorine.elements.Cl[1].coefficients).toEqual([0.129056, 0.648511, 0.275487]);
    expect(chlorine.notes.filter((note) => note.includes('corrected'))).toHaveLength(2);
    expect(findBasisSet('6-31G*', ['Ne']).notes).toEqual([expect.stringMatching(/^Ne: no paper/)]);
    expect(findBasisSet('6-31G*', ['C']).notes).toEqual([]);
    expect(findBasisSet('6-311G', ['Ar']).notes).toHaveLength(2);
  });
});

describe('findBasisSet', () => {
  it.each([
    ['sto-3g', 'STO-3G'],
    ['  6-31g*  ', '6-31G*'],
    ['6-31G(d)', '6-31G*'],
    ['6-31g(D,P)', '6-31G**'],
    ['6-31++g(d,p)', '6-31++G**'],
    ['CC-PVDZ', 'cc-pVDZ'],
    ['dz', 'DZ (Dunning-Hay)'],
  ])('identity: “%s” is %s', (asked, name) => {
    expect(findBasisSet(asked, ['H']).name).toBe(name);
  });

  it('identity: the 6-31G* family is Cartesian, the correlation-consistent sets are spherical', () => {
    for (const name of ['6-31G*', '6-31G**', '6-31++G**'])
      expect(findBasisSet(name, []).harmonics).toBe('cartesian');
    for (const name of ['cc-pVDZ', 'cc-pVTZ', 'cc-pVQZ', 'aug-cc-pVDZ']) {
      expect(findBasisSet(name, []).harmonics).toBe('spherical');
    }
  });

  it('identity: an unknown name is refused with the nearest one', () => {
    expect(() => findBasisSet('STO3G', ['H'])).toThrow(
      expect.objectContaining({
        code: 'basis.unknown',
        place: 'basis',
        details: { name: 'STO3G', nearest: 'STO-3G' },
      }),
    );
    for (const name of ['something else', '', '__proto__', 'x'.repeat(1e6)]) {
      expect(() => findBasisSet(name, ['H'])).toThrow(expect.objectContaining({ code: 'basis.unknown' }));
    }
  });

  it('identity: an element that the set lacks is refused with those it covers', () => {
    expect(() => findBasisSet('4-31G', ['H', 'Si'])).toThrow(
      expect.objectContaining({
        code: 'basis.elementMissing',
        message: expect.stringMatching(/4-31G.*Si.*H, He, B, C/),
        details: { basis: '4-31G', symbol: 'Si' },
      }),
    );
  });

  it('identity: Slater exponents are for STO-nG only', () => {
    expect(findBasisSet('sto-2g', ['H'], { H: { '1s': 1 } }).name).toBe('STO-2G');
    expect(() => findBasisSet('6-31G', ['H'], { H: { '1s': 1 } })).toThrow(
      expect.objectContaining({ code: 'basis.scaleFactor', place: 'basis.scaleFactors' }),
    );
  });
});
