import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { Molecule } from '../molecule/molecule';
import { atomicDensity } from './atomic-density';

/**
 * Spin-summed starting density of a molecule: the sum of its atoms' spherical densities, n×n row-major. Its
 * trace is the neutral atoms' electron count; for an ion the first diagonalisation puts that right.
 */
export function superposeAtomicDensities(molecule: Molecule, basis: PlacedBasis): Float64Array {
  const n = basis.functionCount;
  const density = new Float64Array(n * n);
  // atoms of one element have the same functions in the same order, so one calculation serves them all
  const known = new Map<string, Float64Array>();
  molecule.atoms.forEach((atom, index) => {
    const shells = basis.shells.filter((shell) => shell.atom === index);
    if (shells.length === 0) return;
    const key = `${atom.symbol} ${atom.nuclearCharge}`;
    const block = known.get(key) ?? atomicDensity(atom, shells, basis.harmonics);
    known.set(key, block);
    const size = shells.reduce((sum, shell) => sum + shell.functionCount, 0);
    const first = shells[0].firstFunction;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) density[(first + i) * n + first + j] = block[i * size + j];
    }
  });
  return density;
}
