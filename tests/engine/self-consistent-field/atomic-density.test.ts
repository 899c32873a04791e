import { describe, expect, it } from 'vitest';
import { findBasisSet } from '../../../engine/basis/library-index';
import { placeBasis } from '../../../engine/basis/place-basis';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { atomicDensity } from '../../../engine/self-consistent-field/atomic-density';

const NITROGEN = { atomicNumber: 7, nuclearCharge: 7 };
const GHOST = { atomicNumber: 7, nuclearCharge: 0 };

function place(basis: string, position: Vector3) {
  return placeBasis(findBasisSet(basis, ['N']), { atoms: [{ symbol: 'N', position }] });
}

describe('atomicDensity', () => {
  it('identity: tr(DS) is the number of electrons, and D is spherical', () => {
    const basis = place('6-31G', [0.3, -1, 2]);
    const density = atomicDensity(NITROGEN, basis.shells, basis.harmonics);
    const overlap = overlapMatrix(basis);
    const n = basis.functionCount;
    expect(density.reduce((sum, value, i) => sum + value * overlap[i], 0)).toBeCloseTo(7, 10);
    for (const { angularMomentum, firstFunction: first } of basis.shells) {
      if (angularMomentum !== 1) continue;
      const [x, y, z] = [0, 1, 2].map((m) => density[(first + m) * (n + 1)]);
      expect([y, z]).toEqual([x, x]);
    }
  });

  it('identity: is the same to the last bit wherever the atom stands, also where it was not known before', () => {
    const set = findBasisSet('6-31G', ['N']);
    const copy = structuredClone(set);
    const at = (basisSet: typeof set, position: Vector3) => {
      const { shells, harmonics } = placeBasis(basisSet, { atoms: [{ symbol: 'N', position }] });
      return atomicDensity(NITROGEN, shells, harmonics);
    };
    const here = at(set, [0, 0, 0]);
    expect(at(set, [7, 1.1, -3.3])).toBe(here);
    const afresh = at(copy, [7, 1.1, -3.3]);
    expect(afresh).not.toBe(here);
    expect(afresh).toEqual(here);
  });

  it('identity: what is known of one basis or charge is not taken for another', () => {
    const small = place('STO-3G', [0, 0, 0]);
    const large = place('6-31G', [0, 0, 0]);
    const first = atomicDensity(NITROGEN, small.shells, small.harmonics);
    expect(atomicDensity(NITROGEN, large.shells, large.harmonics)).toHaveLength(81);
    expect(first).toHaveLength(25);
    expect(atomicDensity(GHOST, small.shells, small.harmonics)).toEqual(new Float64Array(25));
    // s functions alone, with the same arrays: three p electrons have no place
    const inner = small.shells.slice(0, 2);
    expect(atomicDensity(NITROGEN, inner, small.harmonics)).toHaveLength(4);
  });
});
