import { describe, expect, it } from 'vitest';
import { computePoint, findLevelMinimum, type Study, type StudyAtom } from '#engine';
import { counterpoise } from '../../../engine/calculation/counterpoise';
import { dissociationLimit } from '../../../engine/calculation/fragments';
import { atom, compute, correlated, prepare, study } from '../../support/studies';

const bond = (...values: number[]) => ({ scan: { coordinate: { bonds: [[0, 1]] }, values } }) as const;
const H2 = [atom('H'), atom('H', 0, 0, 1.4)];

/** As if the curve had its minimum at the first point of the scan, one hartree deep. */
function superpositionOf(
  atoms: readonly StudyAtom[],
  level: string,
  changes: Partial<Study> & { charge?: number },
) {
  const prepared = prepare(study(atoms, { levels: [level], ...changes }));
  const [x = Number.NaN] = prepared.coordinates.filter((coordinate) => coordinate !== null);
  const dissociation = dissociationLimit(prepared, level, { x, energy: 0 });
  return counterpoise(prepared, level, {
    minimum: { kind: 'found', equilibriumDistance: x, energy: 0, uncertainty: 0 },
    ...(dissociation && { dissociation }),
    wellDepth: { value: 1, against: 'fragments', farEnd: x, valueAgainstFarEnd: 1 },
  });
}

function foundOf(...request: Parameters<typeof superpositionOf>) {
  const superposition = superpositionOf(...request);
  if (superposition?.kind !== 'found') throw new Error('no superposition error');
  return superposition;
}

describe('counterpoise', () => {
  it('published: the electron of H over its own STO-3G function and one 1.4 bohr away', () => {
    const { fragments, error } = foundOf(H2, 'RHF', bond(1.4));
    const [own, other, between, overlap] = [0.76 - 1.2266, 0.76 - 0.6538, 0.2365 - 0.5974, 0.6593];
    // lowest root of |H − E·S| = 0
    const square = 1 - overlap ** 2;
    const half = (own + other - 2 * between * overlap) / 2;
    const lowest = (half - Math.sqrt(half ** 2 - square * (own * other - between ** 2))) / square;
    expect(fragments[0].energyInWholeBasis).toMatchPublished({
      printed: lowest.toFixed(4),
      tolerance: 2e-4,
      because: 'a closed form of five numbers rounded to four decimals',
      source:
        'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989), sec. 3.5.2, integrals of H2 in STO-3G at 1.4 bohr, value from memory',
    });
    expect(error).toBeCloseTo(2 * fragments[0].error, 14);
  });

  it('identity: of HeH⁺ the proton has nothing to gain, helium gains what a ghost beside it gives', () => {
    const { fragments, error, wellDepth, alongCurve } = foundOf([atom('He'), atom('H', 0, 0, 1.5)], 'CISD', {
      charge: 1,
      basis: '6-31G',
      ...bond(1.5, 2),
    });
    const helium = (...ghosts: StudyAtom[]) =>
      correlated(compute(study([atom('He'), ...ghosts], { levels: ['CISD'], basis: '6-31G' })), 'CISD')
        .energy;
    const ghost = (z: number) => ({ ...atom('H', 0, 0, z), ghost: true });
    expect(fragments[1].error).toBe(0);
    expect(fragments[0].error).toBeCloseTo(helium() - helium(ghost(1.5)), 9);
    expect(alongCurve?.[1]).toBeCloseTo(helium() - helium(ghost(2)), 9);
    expect(wellDepth).toBe(1 - error);
    expect(error).toBeGreaterThan(1e-4);
  });

  it('identity: functions far away give nothing, at any level', () => {
    for (const level of ['UHF', 'MP2', 'FCI']) {
      expect(foundOf(H2, level, { basis: '6-31G', ...bond(40) }).error).toBeCloseTo(0, 9);
    }
    const lithiumHydride = [atom('Li'), atom('H', 0, 0, 3)];
    expect(foundOf(lithiumHydride, 'CISD', bond(50)).error).toBeCloseTo(0, 8);
  });

  it('identity: fragments of several atoms keep their shape', () => {
    const twoMolecules = [atom('H'), atom('H', 0, 0, 4), atom('H', 1.4), atom('H', 1.4, 0, 4)];
    const { fragments } = foundOf(twoMolecules, 'CISD', bond(4, 30));
    const pair = correlated(compute(study([atom('H'), atom('H', 1.4)], { levels: ['CISD'] })), 'CISD');
    for (const { energyInWholeBasis, error } of fragments) {
      expect(energyInWholeBasis + error).toBeCloseTo(pair.energy, 9);
      expect(error).toBeGreaterThan(0);
    }
  });

  it('identity: where molecule and parts share no basis, or nothing parts, it is said', () => {
    const scaled = { basis: { name: 'STO-3G', optimiseScale: true }, ...bond(1.4) } as const;
    expect(superpositionOf(H2, 'RHF', scaled)).toMatchObject({ kind: 'none' });
    const both = {
      scan: {
        coordinate: {
          bonds: [
            [0, 1],
            [0, 2],
          ],
        },
        values: [1.5],
      },
    } as const;
    expect(superpositionOf([atom('Be'), atom('H', 0, 0, 2), atom('H', 0, 0, -2)], 'RHF', both)).toMatchObject(
      { kind: 'none' },
    );
  });

  it('identity: the findings have it where the study asks for it, with a minimum only', () => {
    const findingsIn = (...values: number[]) => {
      const prepared = prepare(
        study(H2, { levels: ['RHF'], findings: { counterpoise: true }, ...bond(...values) }),
      );
      const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
      return findLevelMinimum(prepared, 'RHF', points);
    };
    const { counterpoise: found, wellDepth } = findingsIn(1.2, 1.3, 1.4, 1.6);
    expect(found?.kind === 'found' && found.wellDepth + found.error).toBeCloseTo(wellDepth?.value ?? 0, 14);
    expect(findingsIn(3, 4, 5).counterpoise).toBeUndefined();
  });
});
