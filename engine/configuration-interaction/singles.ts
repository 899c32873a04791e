import { type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import { dot } from '../linear-algebra/dense';
import type { Vector3 } from '../molecule/molecule';
import { type RunControl, type Termination, UNATTENDED } from '../termination';
import { LEADING_COUNT, LEADING_WEIGHT } from './describe-state';
import { findLowestStates } from './lowest-states';
import type { LowestStates } from './sector-problem';
import {
  type OrbitalSpecies,
  type SpaceSymmetry,
  singlesSymmetry,
  type VectorSymmetry,
} from './vector-symmetry';

/** Excitations up to which the matrix is kept, 128 MiB; of more, a row is computed each time it is needed. */
const MOST_KEPT = 4096;

export interface SinglesOptions {
  /** doubly occupied orbitals of the closed-shell reference: the first ones */
  readonly occupied: number;
  /** how many lowest states of each spin */
  readonly states: number;
  /** ⟨p|x|q⟩, ⟨p|y|q⟩, ⟨p|z|q⟩, each n×n row-major, bohr */
  readonly dipole: readonly Float64Array[];
  /** largest ‖Ac − ωc‖ of a converged state, hartree; default 1e-6 */
  readonly residualTolerance?: number;
  readonly maximumIterations?: number;
  /** labels the states, and makes degenerate ones of different symmetry definite */
  readonly species?: OrbitalSpecies;
  readonly control?: RunControl;
}

/** Orbitals counted from 0 over those of the integrals. */
export interface SingleExcitation {
  readonly from: number;
  readonly to: number;
  readonly weight: number;
}

export interface SinglesSolution {
  /** total, hartree */
  readonly energy: number;
  /** above the reference determinant */
  readonly excitation: number;
  readonly spin: 'singlet' | 'triplet';
  /** 2/3·ω·|μ|², length form; 0 for triplets */
  readonly oscillatorStrength: number;
  /** ⟨0|−r|state⟩, e·bohr */
  readonly transitionDipole: Vector3;
  /** over pairs of an occupied and a virtual orbital, row-major occupied×virtual; norm 1 */
  readonly amplitudes: Float64Array;
  /** falling weight: the largest `LEADING_COUNT` above `LEADING_WEIGHT` */
  readonly leading: readonly SingleExcitation[];
  /** where the symmetry of the orbitals was given */
  readonly symmetry?: VectorSymmetry;
}

export interface SinglesResult {
  /** of the reference determinant, hartree */
  readonly referenceEnergy: number;
  /** of both spins together, rising */
  readonly states: readonly SinglesSolution[];
  readonly termination: Termination;
  readonly iterations: number;
}

const DEFAULTS = Object.freeze({
  residualTolerance: 1e-6,
  maximumIterations: 100,
  control: UNATTENDED,
});

/**
 * Configuration interaction of single excitations from a closed-shell determinant, singlets and triplets.
 *
 * Over spin-adapted excitations i → a, A(ia, jb) = F(ab) δ(ij) − F(ij) δ(ab) − (ij|ab), and for singlets
 * + 2(ia|jb); F is the Fock matrix of the reference, worked out from the integrals, so that the orbitals need not
 * be canonical. The reference must obey Brillouin's theorem, F(ia) = 0: the excitations are not coupled to it.
 *
 * @throws RangeError if `occupied` does not fit the orbitals or `states` is not positive
 *
 * Source: J. B. Foresman, M. Head-Gordon, J. A. Pople, M. J. Frisch, J. Phys. Chem. 96, 135 (1992).
 */
export function solveSingles(integrals: OrbitalIntegrals, options: SinglesOptions): SinglesResult {
  const settings = { ...DEFAULTS, ...options };
  const { occupied, states } = settings;
  if (!(occupied >= 0 && occupied <= integrals.orbitalCount)) {
    throw new RangeError(`${occupied} occupied of ${integrals.orbitalCount} orbitals`);
  }
  if (!Number.isInteger(states) || states < 1) throw new RangeError(`${states} states`);
  const fock = closedShellFock(integrals, occupied);
  const referenceEnergy = closedShellEnergy(integrals, fock, occupied);
  if (occupied === 0 || occupied === integrals.orbitalCount) {
    return {
      referenceEnergy,
      states: [],
      termination: { kind: 'converged' },
      iterations: 0,
    };
  }

  const symmetry =
    settings.species && singlesSymmetry(occupied, integrals.orbitalCount - occupied, settings.species);
  const found = (['singlet', 'triplet'] as const).map((spin) => ({
    spin,
    ...solveSpin(integrals, fock, spin, settings, symmetry),
  }));
  const solutions = found.flatMap(({ spin, values, vectors }) =>
    vectors.map((vector, k) => ({
      ...describeSingles(integrals, settings, spin, values[k], referenceEnergy, fixSign(vector)),
      ...(symmetry && { symmetry: symmetry.describe(vector) }),
    })),
  );
  const unfinished = found.find(({ termination }) => termination.kind !== 'converged');
  return {
    referenceEnergy,
    states: solutions.sort((a, b) => a.energy - b.energy),
    termination: unfinished?.termination ?? { kind: 'converged' },
    iterations: Math.max(...found.map(({ iterations }) => iterations)),
  };
}

/** F(pq) = h(pq) + Σ over occupied k of 2(pq|kk) − (pk|kq), row-major n×n. */
export function closedShellFock(integrals: OrbitalIntegrals, occupied: number): Float64Array {
  const { orbitalCount: n, twoElectron } = integrals;
  const fock = integrals.oneElectron.slice();
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      for (let k = 0; k < occupied; k++) {
        fock[p * n + q] += 2 * twoElectron[packedPair(packedPair(p, q), packedPair(k, k))];
        fock[p * n + q] -= twoElectron[packedPair(packedPair(p, k), packedPair(k, q))];
      }
    }
  }
  return fock;
}

/** Core energy + Σ over occupied i of h(ii) + F(ii). */
function closedShellEnergy(integrals: OrbitalIntegrals, fock: Float64Array, occupied: number): number {
  const diagonal = integrals.orbitalCount + 1;
  let energy = integrals.coreEnergy;
  for (let i = 0; i < occupied; i++) energy += integrals.oneElectron[i * diagonal] + fock[i * diagonal];
  return energy;
}

function solveSpin(
  integrals: OrbitalIntegrals,
  fock: Float64Array,
  spin: 'singlet' | 'triplet',
  settings: Omit<Required<SinglesOptions>, 'species'>,
  symmetry: SpaceSymmetry | undefined,
): LowestStates {
  const { orbitalCount: n, twoElectron } = integrals;
  const { occupied } = settings;
  const virtuals = n - occupied;
  const dimension = occupied * virtuals;
  const coulombFactor = spin === 'singlet' ? 2 : 0;

  const element = (ia: number, jb: number): number => {
    const i = Math.trunc(ia / virtuals);
    const a = occupied + (ia % virtuals);
    const j = Math.trunc(jb / virtuals);
    const b = occupied + (jb % virtuals);
    let value = -twoElectron[packedPair(packedPair(i, j), packedPair(a, b))];
    value += coulombFactor * twoElectron[packedPair(packedPair(i, a), packedPair(j, b))];
    if (i === j) value += fock[a * n + b];
    if (a === b) value -= fock[i * n + j];
    return value;
  };

  return findLowestStates(
    {
      sectors: [
        {
          dimension,
          diagonal: Float64Array.from({ length: dimension }, (_, ia) => element(ia, ia)),
          apply: productWith(element, dimension),
          elementsAmong: (places) => ({
            hamiltonian: (i, j) => element(places[i], places[j]),
          }),
        },
      ],
      distinguishing: [
        ...(symmetry?.distinguishingOperators() ?? []),
        {
          tolerance: 0,
          // Σ √(p + 1)·n(p) of the excited determinants, less that of the reference
          apply: (vector, product) => {
            for (let ia = 0; ia < dimension; ia++) {
              const a = occupied + (ia % virtuals);
              product[ia] = (Math.sqrt(a + 1) - Math.sqrt(Math.trunc(ia / virtuals) + 1)) * vector[ia];
            }
          },
        },
      ],
    },
    { ...settings, stage: `${spin} singles` },
  );
}

/** vector ↦ matrix·vector. */
function productWith(
  element: (ia: number, jb: number) => number,
  dimension: number,
): (vector: Float64Array, product: Float64Array) => void {
  const rowInto = (row: Float64Array, ia: number): Float64Array => {
    for (let jb = 0; jb < dimension; jb++) row[jb] = element(ia, jb);
    return row;
  };
  let rowOf: (ia: number) => Float64Array;
  if (dimension <= MOST_KEPT) {
    const rows = Array.from({ length: dimension }, (_, ia) => rowInto(new Float64Array(dimension), ia));
    rowOf = (ia) => rows[ia];
  } else {
    const row = new Float64Array(dimension);
    rowOf = (ia) => rowInto(row, ia);
  }
  return (vector, product) => {
    for (let ia = 0; ia < dimension; ia++) product[ia] = dot(rowOf(ia), vector);
  };
}

/** The amplitude of largest size becomes positive, so that transition dipoles have a definite sign. */
function fixSign(vector: Float64Array): Float64Array {
  const largest = vector.reduce((best, value) => (Math.abs(value) > Math.abs(best) + 1e-9 ? value : best), 0);
  return largest < 0 ? vector.map((value) => -value) : vector;
}

function describeSingles(
  integrals: OrbitalIntegrals,
  { occupied, dipole }: SinglesOptions,
  spin: 'singlet' | 'triplet',
  excitation: number,
  referenceEnergy: number,
  amplitudes: Float64Array,
): SinglesSolution {
  const n = integrals.orbitalCount;
  const virtuals = n - occupied;
  // √2: both spins of a singlet excitation add up; those of a triplet cancel
  const moment = (axis: number): number => {
    if (spin === 'triplet') return 0;
    let sum = 0;
    amplitudes.forEach((amplitude, ia) => {
      sum += amplitude * dipole[axis][Math.trunc(ia / virtuals) * n + occupied + (ia % virtuals)];
    });
    return -Math.SQRT2 * sum;
  };
  const transitionDipole: Vector3 = [moment(0), moment(1), moment(2)];
  const strength = transitionDipole.reduce((sum, component) => sum + component ** 2, 0);
  const leading = Array.from(amplitudes, (amplitude, ia) => ({
    from: Math.trunc(ia / virtuals),
    to: occupied + (ia % virtuals),
    weight: amplitude ** 2,
  }))
    .filter(({ weight }) => weight > LEADING_WEIGHT)
    .sort((a, b) => b.weight - a.weight)
    .slice(0, LEADING_COUNT);
  return {
    energy: referenceEnergy + excitation,
    excitation,
    spin,
    oscillatorStrength: (2 / 3) * excitation * strength,
    transitionDipole,
    amplitudes,
    leading,
  };
}
