import type { PlacedBasis } from '../../engine/basis/contracted-gaussian';
import { placeBasis } from '../../engine/basis/place-basis';
import { withQuartets } from '../../engine/integrals/coulomb-quartets';
import { electronRepulsionTensor } from '../../engine/integrals/electron-repulsion';
import { blockOfShells } from '../../engine/integrals/shell-block';
import { buildShellPair } from '../../engine/integrals/shell-pair';
import type { Vector3 } from '../../engine/molecule/molecule';
import { placedBasis } from '../support/gaussian-integrals';
import { inForm } from '../support/kernel-forms';
import { atom, prepare, study } from '../support/studies';
import { callsPerSecond, type Measurement } from './measure';

const SECONDS = 0.4;
/** Calls between two looks at the clock. */
const QUARTETS = 50;
const CENTRES: readonly Vector3[] = [
  [0.1, -0.2, 0.3],
  [0.5, 0.4, -0.6],
  [-0.4, 0.7, 0.2],
  [0.3, 0.1, 0.9],
];
const EXPONENTS = [5, 1.2, 0.3];

/** Quartets by class, on four centres, then all integrals of molecules, shell pairs included. */
export function electronRepulsion(): Measurement[] {
  return [
    quartets('(ss|ss)', 0, 3),
    quartets('(pp|pp)', 1, 3),
    quartets('(dd|dd)', 2, 1),
    ...['6-31G', 'cc-pVDZ', 'cc-pVTZ'].flatMap((name) => [
      molecule(`N2, ${name}`, [atom('N'), atom('N', 0, 0, 2.07)], name),
      molecule(`H2O, ${name}`, [atom('O'), atom('H', 0, 1.43, 1.11), atom('H', 0, -1.43, 1.11)], name),
    ]),
  ];
}

function quartets(name: string, l: number, primitives: number): Measurement {
  const exponents = EXPONENTS.slice(0, primitives);
  const { shells } = placedBasis(
    CENTRES.map((centre) => ({ centre, l, exponents })),
    'spherical',
  );
  const [a, b, c, d] = shells.map((shell) => blockOfShells([shell]));
  const pairs = [buildShellPair(a, b, 'spherical'), buildShellPair(c, d, 'spherical')];
  const rate = () =>
    withQuartets(pairs, (quartet) =>
      callsPerSecond(() => {
        for (let i = 0; i < QUARTETS; i++) quartet(0, 1, 1e-17);
      }, SECONDS),
    ) * QUARTETS;
  return {
    name: `${name} quartets, ${primitives} primitive${primitives === 1 ? '' : 's'} a shell`,
    ours: inForm('fast', rate),
    yardstick: inForm('plain', rate),
    unit: '1/s',
    against: 'the TypeScript form',
  };
}

function molecule(name: string, atoms: Parameters<typeof study>[0], basis: string): Measurement {
  const prepared = prepare(study(atoms, { basis }));
  const placed = placeBasis(prepared.basisSet, prepared.moleculeAt(null));
  const { length } = electronRepulsionTensor(placed);
  const rate = () => callsPerSecond(() => electronRepulsionTensor(asNew(placed)), SECONDS) * length;
  return {
    name: `repulsion integrals of ${name}`,
    ours: inForm('fast', rate),
    yardstick: inForm('plain', rate),
    unit: '1/s',
    against: 'the TypeScript form',
  };
}

/** A basis for which nothing is known yet. */
function asNew(basis: PlacedBasis): PlacedBasis {
  return { ...basis };
}
