import { describe, expect, it } from 'vitest';
import type { StudyAtom } from '#engine';
import { buildMolecule } from '../../../engine/molecule/build-molecule';
import type { Molecule } from '../../../engine/molecule/molecule';
import { dot, subtract } from '../../../engine/molecule/vector';
import { findSymmetry } from '../../../engine/symmetry/point-group';
import { anywhere } from '../../support/orientation';
import { seededRandom } from '../../support/random';
import { atom } from '../../support/studies';
import * as molecules from '../../support/symmetric-molecules';

function moleculeOf(atoms: readonly StudyAtom[]): Molecule {
  const built = buildMolecule({ unit: 'bohr', atoms });
  if (!built.ok) throw built.errors[0];
  return built.molecule;
}

const random = seededRandom(7);

describe('findSymmetry', () => {
  it.each([
    ['H2', molecules.hydrogen, 'D2h', 'D∞h'],
    ['HF', molecules.hydrogenFluoride, 'C2v', 'C∞v'],
    ['acetylene', molecules.acetylene, 'D2h', 'D∞h'],
    ['water', molecules.water, 'C2v', undefined],
    ['formaldehyde', molecules.formaldehyde, 'C2v', undefined],
    ['boron trifluoride (D3h)', molecules.boronTrifluoride, 'C2v', undefined],
    ['ammonia (C3v)', molecules.ammonia, 'Cs', undefined],
    ['methane (Td)', molecules.methane, 'D2', undefined],
    ['allene (D2d)', molecules.allene, 'D2', undefined],
    ['ethylene', molecules.ethylene, 'D2h', undefined],
    ['benzene (D6h)', molecules.benzene, 'D2h', undefined],
    ['staggered ethane (D3d)', molecules.staggeredEthane, 'C2h', undefined],
    ['trans-diazene', molecules.transDiazene, 'C2h', undefined],
    ['twisted hydrogen peroxide', molecules.twistedPeroxide, 'C2', undefined],
    ['meso-1,2-dichloro-1,2-difluoroethane', molecules.mesoEthane, 'Ci', undefined],
    ['a carbon with four different neighbours', molecules.chiralMethane, 'C1', undefined],
    ['one atom', [atom('He')], 'D2h', undefined],
  ])('identity: %s is found in any orientation', (_, atoms, pointGroup, linear) => {
    for (let trial = 0; trial < 20; trial++) {
      const { axes, ...found } = findSymmetry(moleculeOf(anywhere(atoms, random)));
      expect(found.pointGroup).toBe(pointGroup);
      expect(found.linear).toBe(linear);
      axes.forEach((a, i) => {
        axes.forEach((b, j) => {
          expect(dot(a, b)).toBeCloseTo(Number(i === j), 12);
        });
      });
    }
  });

  it.each([
    ['water', molecules.water, 1],
    ['ethylene', molecules.ethylene, 1],
    ['formaldehyde', molecules.formaldehyde, 1],
    ['benzene', molecules.benzene, 2],
  ])(
    'published: planar %s lies in yz (R. S. Mulliken, J. Chem. Phys. 23, 1997 (1955), value from memory)',
    (_, atoms) => {
      const molecule = moleculeOf(anywhere(atoms, random));
      const { axes, centre } = findSymmetry(molecule);
      for (const { position } of molecule.atoms) {
        expect(dot(subtract(position, centre), axes[0])).toBeCloseTo(0, 10);
      }
    },
  );

  it.each([
    ['both carbons of ethylene', molecules.ethylene, 'C', 2],
    ['all carbons of allene', molecules.allene, 'C', 3],
    ['two carbons of benzene', molecules.benzene, 'C', 2],
  ])('published: z passes through %s (Mulliken 1955, value from memory)', (_, atoms, symbol, count) => {
    const molecule = moleculeOf(anywhere(atoms, random));
    const { axes, centre } = findSymmetry(molecule);
    const onAxis = molecule.atoms.filter(({ position }) => {
      const r = subtract(position, centre);
      return Math.abs(dot(r, axes[0])) + Math.abs(dot(r, axes[1])) < 1e-9;
    });
    expect(onAxis.map((found) => found.symbol).filter((found) => found === symbol)).toHaveLength(count);
  });

  it('identity: isotopes do not matter, ghosts do', () => {
    const [first, second] = molecules.hydrogen;
    expect(findSymmetry(moleculeOf([{ ...first, isotope: 2 }, second])).linear).toBe('D∞h');
    expect(
      findSymmetry(moleculeOf([{ ...molecules.nitrogen[0], ghost: true }, molecules.nitrogen[1]])).linear,
    ).toBe('C∞v');
    const withGhosts = [...molecules.nitrogen, { ...atom('H', 3, 0, 1.037), ghost: true }];
    expect(findSymmetry(moleculeOf(withGhosts)).pointGroup).toBe('C2v');
    const fourGhosts = [3, -3].flatMap((x) => [{ ...atom('H', x, 0, 1.037), ghost: true }]);
    expect(findSymmetry(moleculeOf([...molecules.nitrogen, ...fourGhosts])).pointGroup).toBe('D2h');
  });

  it('identity: a distortion of a thousandth of a bohr lowers the group, one of a millionth does not', () => {
    const moved = (size: number) => {
      const [oxygen, first, second] = molecules.water;
      return moleculeOf([oxygen, { ...first, at: [first.at[0] + size, first.at[1], first.at[2]] }, second]);
    };
    expect(findSymmetry(moved(1e-6)).pointGroup).toBe('C2v');
    expect(findSymmetry(moved(1e-3)).pointGroup).toBe('Cs');
  });

  it('identity: a bend of a thousandth of a bohr ends the linear molecule', () => {
    const [c1, c2, h1, h2] = molecules.acetylene;
    expect(findSymmetry(moleculeOf([c1, c2, { ...h1, at: [1e-3, 0, h1.at[2]] }, h2])).linear).toBeUndefined();
  });
});
