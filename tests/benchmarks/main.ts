import { readFileSync } from 'node:fs';
import { computePoint, prepareStudy, type Study } from '#engine';
import { placeBasis } from '../../engine/basis/place-basis';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../engine/configuration-interaction/hamiltonian-product';
import { hamiltonianElement } from '../../engine/configuration-interaction/matrix-elements';
import { electronRepulsionTensor } from '../../engine/integrals/electron-repulsion';
import { randomOrbitalIntegrals } from '../support/random-orbital-integrals';
import { atom, prepare, study } from '../support/studies';
import { callsPerSecond, type Measurement } from './measure';

/** Multiply–adds a second of a plain loop over typed arrays: what this machine gives TypeScript today. */
function plainLoopRate(): number {
  const length = 4096;
  const a = new Float64Array(length).fill(1.000001);
  const b = new Float64Array(length).fill(0.999999);
  let sink = 0;
  const calls = callsPerSecond(() => {
    let sum = 0;
    for (let i = 0; i < length; i++) sum += a[i] * b[i];
    sink += sum;
  }, 0.4);
  if (!Number.isFinite(sink)) throw new Error('the plain loop overflowed');
  return calls * length;
}

function repulsionIntegrals(loopRate: number): Measurement {
  const prepared = prepare(study([atom('N'), atom('N', 0, 0, 2.07)], { basis: '6-31G' }));
  const basis = placeBasis(prepared.basisSet, prepared.moleculeAt(null));
  const count = electronRepulsionTensor(basis).length;
  const rate = callsPerSecond(() => electronRepulsionTensor(basis)) * count;
  return {
    name: 'repulsion integrals, N2 in 6-31G',
    ours: rate,
    yardstick: loopRate,
    unit: '1/s',
    against: 'multiply–adds of a plain loop',
  };
}

function hamiltonianProduct(): Measurement {
  const orbitals = 8;
  const integrals = randomOrbitalIntegrals(orbitals, 1);
  const space = buildDeterminantSpace(orbitals, 4, 4, Number.POSITIVE_INFINITY);
  const { apply } = prepareHamiltonianProduct(space, integrals);
  const vector = new Float64Array(space.dimension).fill(1 / Math.sqrt(space.dimension));
  const product = new Float64Array(space.dimension);
  const ours = callsPerSecond(() => apply(vector, product)) * space.dimension;
  // Element by element a row costs as many rules as there are determinants; some rows give the rate.
  const determinants = Array.from({ length: space.dimension }, (_, place) => determinantAt(space, place));
  let row = 0;
  const plain = callsPerSecond(() => {
    let sum = 0;
    for (let j = 0; j < determinants.length; j++) {
      sum += hamiltonianElement(determinants[row], determinants[j], integrals) * vector[j];
    }
    product[row] = sum;
    row = (row + 1) % determinants.length;
  });
  return {
    name: `full-CI product, 8 electrons in ${orbitals} orbitals (${space.dimension} determinants)`,
    ours,
    yardstick: plain,
    unit: 'determinants/s',
    against: 'Slater–Condon rules element by element',
  };
}

function curvePoints(file: string): Measurement {
  const request = JSON.parse(readFileSync(`sample-molecules/${file}.study.json`, 'utf8')) as Study;
  const preparation = prepareStudy(request);
  if (!preparation.ok) throw preparation.errors[0];
  const { prepared } = preparation;
  let next = 0;
  const rate = (levels?: readonly string[]) =>
    callsPerSecond(() => {
      computePoint(prepared, prepared.coordinates[next], { levels });
      next = (next + 1) % prepared.coordinates.length;
    });
  return {
    name: `curve points of ${file}, ${request.levels.join(' + ')}`,
    ours: rate(),
    yardstick: rate(['RHF']),
    unit: 'points/s',
    against: 'the same points with RHF alone',
  };
}

function table(rows: readonly Measurement[]): string {
  const number = (value: number) => value.toLocaleString('en-GB', { maximumSignificantDigits: 3 });
  return rows
    .map(
      ({ name, ours, yardstick, unit, against }) =>
        `${name}\n    ${number(ours)} ${unit}; ${against}: ${number(yardstick)}; ratio ${number(ours / yardstick)}`,
    )
    .join('\n');
}

const loopRate = plainLoopRate();
const rows = [
  repulsionIntegrals(loopRate),
  hamiltonianProduct(),
  ...['h2', 'heh-plus', 'lih', 'h2o'].map(curvePoints),
];
console.log(
  process.argv.includes('--json')
    ? JSON.stringify(
        rows.map(({ name, ours, yardstick, unit }) => ({
          name,
          ours,
          yardstick,
          unit,
          ratio: ours / yardstick,
        })),
        null,
        2,
      )
    : table(rows),
);
