import type { PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import { coulombExchangeInto } from '../integrals/coulomb-exchange';
import { electronRepulsionTensor } from '../integrals/electron-repulsion';
import { kineticMatrix } from '../integrals/kinetic';
import { nuclearAttractionMatrix } from '../integrals/nuclear-attraction';
import { overlapMatrix } from '../integrals/overlap';
import { multiply } from '../linear-algebra/dense';
import type { Atom, Vector3 } from '../molecule/molecule';
import { diagonaliseFock } from './orbitals';
import { orthogonalise } from './orthogonalisation';

/** Plain iterations with half of the new density mixed in: a guess needs no more than a few digits. */
const ITERATIONS = 40;
const MIXING = 0.5;
const DENSITY_TOLERANCE = 1e-5;

/**
 * Density of the spherically averaged neutral atom in its own functions: electrons of an open shell are spread
 * evenly over its m components and over both spins.
 *
 * @param shells - the atom's shells, in the molecule's basis
 * @returns spin-summed density over the atom's functions, row-major; zero for a ghost; shared, not to be written into
 *
 * Source: the start from atomic densities, J. Almlöf, K. Faegri, K. Korsell, J. Comput. Chem. 3, 385 (1982).
 */
export function atomicDensity(
  atom: Pick<Atom, 'nuclearCharge' | 'atomicNumber'>,
  shells: readonly PlacedShell[],
  harmonics: PlacedBasis['harmonics'],
): Float64Array {
  const known = shells.length > 0 ? (densitiesOfShells.get(shells[0].exponents) ?? []) : [];
  const found = known.find(
    (entry) =>
      entry.nuclearCharge === atom.nuclearCharge &&
      entry.atomicNumber === atom.atomicNumber &&
      entry.harmonics === harmonics &&
      haveEqualPrimitives(entry.shells, shells),
  );
  if (found) return found.density;
  const density = convergeDensity(atom, isolate(shells, harmonics));
  if (shells.length > 0) {
    const { nuclearCharge, atomicNumber } = atom;
    const entry = { nuclearCharge, atomicNumber, harmonics, shells, density };
    densitiesOfShells.set(shells[0].exponents, [...known, entry]);
  }
  return density;
}

interface KnownDensity extends Pick<Atom, 'nuclearCharge' | 'atomicNumber'> {
  readonly harmonics: PlacedBasis['harmonics'];
  readonly shells: readonly PlacedShell[];
  readonly density: Float64Array;
}

/** By the exponents of the first shell: the points of a scan share the arrays of their shells. */
const densitiesOfShells = new WeakMap<Float64Array, readonly KnownDensity[]>();

function haveEqualPrimitives(some: readonly PlacedShell[], others: readonly PlacedShell[]): boolean {
  return (
    some.length === others.length &&
    some.every(
      ({ angularMomentum, exponents, coefficients }, i) =>
        angularMomentum === others[i].angularMomentum &&
        exponents === others[i].exponents &&
        coefficients === others[i].coefficients,
    )
  );
}

function convergeDensity(
  atom: Pick<Atom, 'nuclearCharge' | 'atomicNumber'>,
  basis: PlacedBasis,
): Float64Array {
  const n = basis.functionCount;
  let density: Float64Array = new Float64Array(n * n);
  if (atom.nuclearCharge === 0) return density;

  const overlap = overlapMatrix(basis);
  const core = kineticMatrix(basis);
  const attraction = nuclearAttractionMatrix(basis, [{ charge: atom.nuclearCharge, position: ORIGIN }]);
  for (let i = 0; i < n * n; i++) core[i] += attraction[i];
  const repulsion = electronRepulsionTensor(basis);

  const coulomb = new Float64Array(n * n);
  const exchange = new Float64Array(n * n);
  for (let iteration = 0; iteration < ITERATIONS; iteration++) {
    coulombExchangeInto(density, repulsion, n, coulomb, exchange);
    const fock = core.map((h, i) => h + coulomb[i] - 0.5 * exchange[i]);
    const next = occupySpherically(atom.atomicNumber, fock, overlap, basis);
    let change = 0;
    for (let i = 0; i < n * n; i++) {
      const mixed = iteration === 0 ? next[i] : density[i] + MIXING * (next[i] - density[i]);
      change = Math.max(change, Math.abs(mixed - density[i]));
      next[i] = mixed;
    }
    density = next;
    if (change < DENSITY_TOLERANCE) break;
  }
  return density;
}

const ORIGIN: Vector3 = [0, 0, 0];

/** The atom's shells alone, numbered from 0, at the origin: so the density does not depend on where it was first asked for. */
function isolate(shells: readonly PlacedShell[], harmonics: PlacedBasis['harmonics']): PlacedBasis {
  let first = 0;
  const own = shells.map((shell) => {
    const moved = { ...shell, atom: 0, centre: ORIGIN, firstFunction: first };
    first += shell.functionCount;
    return moved;
  });
  return { shells: own, functionCount: first, harmonics };
}

/** Electrons in s and in p shells of the ground-state configuration, H to Ar: 1s 2s 2p 3s 3p. */
function electronsByMomentum(atomicNumber: number): readonly [number, number] {
  const capacities = [2, 2, 6, 2, 6];
  const momenta = [0, 0, 1, 0, 1];
  const electrons: [number, number] = [0, 0];
  let left = atomicNumber;
  capacities.forEach((capacity, k) => {
    const taken = Math.min(left, capacity);
    electrons[momenta[k]] += taken;
    left -= taken;
  });
  return electrons;
}

/** Fills the lowest radial functions of s and of p, each p function with a third of the shell's electrons. */
function occupySpherically(
  atomicNumber: number,
  fock: Float64Array,
  overlap: Float64Array,
  basis: PlacedBasis,
): Float64Array {
  const n = basis.functionCount;
  const density = new Float64Array(n * n);
  electronsByMomentum(atomicNumber).forEach((electrons, momentum) => {
    const shells = basis.shells.filter((shell) => shell.angularMomentum === momentum);
    const k = shells.length;
    if (electrons === 0 || k === 0) return;
    const components = 2 * momentum + 1;
    const radialFock = averageOverComponents(fock, n, shells, components);
    const { transformation, orbitalCount } = orthogonalise(
      averageOverComponents(overlap, n, shells, components),
      k,
    );
    const { coefficients } = diagonaliseFock(radialFock, transformation, k, orbitalCount);

    const occupations = new Float64Array(orbitalCount);
    let left = electrons / components;
    for (let i = 0; i < orbitalCount; i++) {
      occupations[i] = Math.min(2, left);
      left -= occupations[i];
    }
    const weighted = coefficients.map((c, place) => c * occupations[place % orbitalCount]);
    const transposed = new Float64Array(orbitalCount * k);
    for (let a = 0; a < k; a++)
      for (let i = 0; i < orbitalCount; i++) transposed[i * k + a] = coefficients[a * orbitalCount + i];
    const radial = multiply(weighted, transposed, k, orbitalCount, k);
    for (let a = 0; a < k; a++) {
      for (let b = 0; b < k; b++) {
        for (let m = 0; m < components; m++) {
          density[(shells[a].firstFunction + m) * n + shells[b].firstFunction + m] = radial[a * k + b];
        }
      }
    }
  });
  return density;
}

/** A spherical operator's matrix over radial functions: the mean of its diagonal blocks over m. */
function averageOverComponents(
  matrix: Float64Array,
  n: number,
  shells: readonly PlacedShell[],
  components: number,
): Float64Array {
  const k = shells.length;
  const mean = new Float64Array(k * k);
  for (let a = 0; a < k; a++) {
    for (let b = 0; b < k; b++) {
      let sum = 0;
      for (let m = 0; m < components; m++) {
        sum += matrix[(shells[a].firstFunction + m) * n + shells[b].firstFunction + m];
      }
      mean[a * k + b] = sum / components;
    }
  }
  return mean;
}
