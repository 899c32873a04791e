import type { RadialGrid } from './radial-grid';

/**
 * The radial Schrödinger equation −u″/(2μ) + W(r)u = Eu on a grid, by Numerov's three-point formula.
 *
 * Written for F_i = (1 − T_i)φ_i with T_i = (h²/12)(dr/dy)²·2μ(W_i − E) it reads F_(i+1) − U_i·F_i + F_(i−1) = 0,
 * U_i = 2 + 12T_i/(1 − T_i): a symmetric tridiagonal matrix N(E) whose eigenvalues fall with E. So the number of its
 * negative pivots is the number of levels below E, and a level is a zero of its smallest eigenvalue.
 *
 * Sources: B. R. Johnson, J. Chem. Phys. 67, 4086 (1977) (ratios, node count); J. W. Cooley, Math. Comp. 15, 363
 * (1961) (energy correction); B. N. Parlett, I. S. Dhillon, Linear Algebra Appl. 267, 247 (1997) (where the two
 * sweeps are joined).
 * Accuracy: energies to O(h⁴).   Cost: O(n) a sweep.
 */
export interface RadialEquation {
  readonly grid: RadialGrid;
  /** W at the grid points: curve and centrifugal term, hartree */
  readonly potential: Float64Array;
  /** (h²/12)·2μ·(dr/dy)² at the grid points, hartree⁻¹ */
  readonly weights: Float64Array;
}

/** One solution. */
export interface RadialState {
  /** hartree, same zero as the potential */
  readonly energy: number;
  /** u(r_i), normalised so that ∫u²dr = 1, positive at its innermost lobe; bohr^(−1/2) */
  readonly amplitude: Float64Array;
}

/** Beyond a turning point the wave is followed until it has fallen by e to this power; the rest is below 1e-17. */
const FORBIDDEN_ACTION = 42;
/** T at which the three-point formula stops making sense (at 1 it breaks down); the wave has long died there. */
const LARGEST_T = 0.4;
/** Sweeps allowed for one level: bisection to isolate it, then a few Newton steps. */
const SWEEPS = 200;
/**
 * A correction below this fraction of the well is the last: with it the energy is right to a power of that, and the
 * wave to less than 1e-5 even where the next level is only 0.01 cm⁻¹ away.
 */
const ENERGY_RESOLUTION = 1e-12;
/**
 * A guess is tried as right to these fractions of the well, one after the other: levels extrapolated from two coarser
 * grids are to the first, those of one to the second.
 */
const GUESS_MARGINS: readonly number[] = [1e-9, 1e-6];
/** Corrections below this fraction of the well that no longer fall are rounding, and taken as the end. */
const ENERGY_ROUNDING = 1e-11;

/**
 * @param energyAt - the curve, hartree
 * @param mass - reduced mass, electron masses
 * @param rotation - J
 */
export function radialEquation(
  grid: RadialGrid,
  energyAt: (distance: number) => number,
  mass: number,
  rotation: number,
): RadialEquation {
  const { distances, stretch, step } = grid;
  return {
    grid,
    potential: distances.map((r) => energyAt(r) + (rotation * (rotation + 1)) / (2 * mass * r * r)),
    weights: stretch.map((s) => (step * step * s * s * mass) / 6),
  };
}

/** The levels of an equation below an energy, or the lowest of them. */
export interface BoundStates {
  /** number of levels below the energy */
  readonly count: number;
  /** from the first that was asked for; ends before a level that did not settle */
  readonly states: readonly RadialState[];
  /** every level that was asked for settled */
  readonly isComplete: boolean;
}

/**
 * @param most - levels from this on are not solved for
 * @param first - nor those before this
 * @param guesses - energies of levels by quantum number, known from coarser grids
 */
export function boundStates(
  equation: RadialEquation,
  below: number,
  most: number,
  first = 0,
  guesses: readonly number[] = [],
): BoundStates {
  const sweeps = sweepsOf(equation);
  const count = countLevelsBelow(sweeps, below);
  const wanted = Math.min(count, most);
  const lowest = equation.potential.reduce((a, b) => Math.min(a, b));
  const brackets = Array.from(
    { length: wanted },
    (): Bracket => ({ low: lowest, high: below, levelsBelowLow: 0, levelsBelowHigh: count }),
  );
  const states: RadialState[] = [];
  for (let v = first; v < wanted; v++) {
    const state = solveLevel(sweeps, v, brackets, below - lowest, guesses[v]);
    if (!state) return { count, states, isComplete: false };
    states.push(state);
  }
  return { count, states, isComplete: true };
}

/** Number of levels below an energy. */
function countLevelsBelow(sweeps: Sweeps, energy: number): number {
  const window = windowOf(sweeps.equation, energy);
  return window ? sweepForward(sweeps, energy, window) : 0;
}

/** Energies that one level lies between, and how many levels lie below each. */
interface Bracket {
  low: number;
  high: number;
  levelsBelowLow: number;
  levelsBelowHigh: number;
}

/** A sweep for one level tells something of all of them. */
function narrow(brackets: readonly Bracket[], energy: number, count: number): void {
  brackets.forEach((bracket, v) => {
    if (count > v && energy < bracket.high) [bracket.high, bracket.levelsBelowHigh] = [energy, count];
    if (count <= v && energy > bracket.low) [bracket.low, bracket.levelsBelowLow] = [energy, count];
  });
}

/** An equation with room for its sweeps. */
interface Sweeps {
  readonly equation: RadialEquation;
  /** 1/(1 − T) and U − 2 at the energy of the last sweep outwards */
  readonly reciprocal: Float64Array;
  readonly excess: Float64Array;
  readonly outward: Float64Array;
  readonly inward: Float64Array;
  readonly wave: Float64Array;
}

function sweepsOf(equation: RadialEquation): Sweeps {
  const room = () => new Float64Array(equation.potential.length);
  return {
    equation,
    reciprocal: room(),
    excess: room(),
    outward: room(),
    inward: room(),
    wave: room(),
  };
}

/**
 * @param quantumNumber - v, counted from 0
 * @param brackets - of all levels; narrowed
 * @param well - depth of the well, hartree
 * @returns undefined if the level does not settle within the sweeps allowed
 */
function solveLevel(
  sweeps: Sweeps,
  quantumNumber: number,
  brackets: readonly Bracket[],
  well: number,
  guess?: number,
): RadialState | undefined {
  const { equation } = sweeps;
  const bracket = brackets[quantumNumber];
  const isInside = (energy: number) => energy > bracket.low && energy < bracket.high;
  const trials =
    guess === undefined
      ? []
      : GUESS_MARGINS.flatMap((margin) => [guess - margin * well, guess + margin * well]);
  let lastCorrection = Number.POSITIVE_INFINITY;
  let corrected: number | undefined;
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let trial = corrected ?? trials.shift();
    while (trial !== undefined && !isInside(trial)) trial = trials.shift();
    const energy = trial ?? (bracket.low + bracket.high) / 2;
    const window = windowOf(equation, energy);
    const count = window ? sweepForward(sweeps, energy, window) : 0;
    narrow(brackets, energy, count);
    const isIsolated =
      bracket.levelsBelowLow === quantumNumber && bracket.levelsBelowHigh === quantumNumber + 1;
    corrected = undefined;
    if (!window || !isIsolated) continue;
    const correction = join(sweeps, window);
    const size = Math.abs(correction);
    const isRounding = size <= ENERGY_ROUNDING * well && size >= lastCorrection / 2;
    if (size <= ENERGY_RESOLUTION * well || isRounding) {
      return { energy: energy + correction, amplitude: amplitudeOf(sweeps, window) };
    }
    lastCorrection = size;
    corrected = energy + correction;
  }
  return undefined;
}

type Window = readonly [first: number, last: number];

/** The points between which the wave of this energy is not negligible; undefined: the energy is below the well. */
function windowOf({ potential, weights }: RadialEquation, energy: number): Window | undefined {
  const reach = (turning: number, direction: -1 | 1): number => {
    let action = 0;
    let i = turning;
    for (; i + direction >= 0 && i + direction < potential.length; i += direction) {
      const t = weights[i + direction] * (potential[i + direction] - energy);
      // also ends where the curve has no number, at r = 0
      if (!(t < LARGEST_T)) break;
      action += Math.sqrt(12 * t);
      if (action > FORBIDDEN_ACTION) break;
    }
    return i;
  };
  let inner = 0;
  while (inner < potential.length && !(potential[inner] < energy)) inner++;
  if (inner === potential.length) return undefined;
  let outer = potential.length - 1;
  while (!(potential[outer] < energy)) outer--;
  return [reach(inner, -1), reach(outer, 1)];
}

/**
 * d_i = F_(i+1)/F_i − 1 from the inside outwards, into `outward`; kept less one so that no digits of the small
 * q_i = U_i − 2 are lost beside it.
 *
 * @returns the number of negative ratios
 */
function sweepForward(
  { equation: { potential, weights }, reciprocal, excess, outward }: Sweeps,
  energy: number,
  [first, last]: Window,
): number {
  let count = 0;
  // beyond the window F = 0: the ratio is infinite and 1 − 1/ratio is 1
  let carried = 1;
  for (let i = first; i <= last; i++) {
    const t = weights[i] * (potential[i] - energy);
    reciprocal[i] = 1 / (1 - t);
    excess[i] = 12 * t * reciprocal[i];
    const d = excess[i] + carried;
    outward[i] = d;
    if (d < -1) count++;
    carried = d / (1 + d);
  }
  return count;
}

/**
 * Sweeps inwards, joins both sweeps where they fit best, and gives the first-order correction of the energy,
 * γ·F_m²/Σ12·w_i·φ_i², γ being the mismatch at the joint m.
 */
function join(
  { equation: { weights }, reciprocal, excess, outward, inward, wave }: Sweeps,
  [first, last]: Window,
): number {
  let carried = 1;
  let joint = first;
  let mismatch = Number.POSITIVE_INFINITY;
  for (let i = last; i >= first; i--) {
    inward[i] = excess[i] + carried;
    carried = inward[i] / (1 + inward[i]);
    const gap = outward[i] + inward[i] - excess[i];
    if (Math.abs(gap) < Math.abs(mismatch)) [joint, mismatch] = [i, gap];
  }
  wave[joint] = 1;
  for (let i = joint - 1; i >= first; i--) wave[i] = wave[i + 1] / (1 + outward[i]);
  for (let i = joint + 1; i <= last; i++) wave[i] = wave[i - 1] / (1 + inward[i]);
  let denominator = 0;
  for (let i = first; i <= last; i++) {
    const phi = wave[i] * reciprocal[i];
    denominator += 12 * weights[i] * phi * phi;
  }
  return mismatch / denominator;
}

/** u of the wave that was joined last, normalised. */
function amplitudeOf(
  { equation: { grid, potential }, reciprocal, wave }: Sweeps,
  [first, last]: Window,
): Float64Array {
  const amplitude = new Float64Array(potential.length);
  let norm = 0;
  for (let i = first; i <= last; i++) {
    // u² dr = (dr/dy)²φ² dy
    amplitude[i] = Math.sqrt(grid.stretch[i]) * wave[i] * reciprocal[i];
    norm += amplitude[i] ** 2 * grid.stretch[i] * grid.step;
  }
  const scale = Math.sign(amplitude[first]) / Math.sqrt(norm);
  for (let i = first; i <= last; i++) amplitude[i] *= scale;
  return amplitude;
}

/**
 * ∫ f(r)·u₁(r)·u₂(r) dr by the trapezoidal rule, which converges faster than any power of h for waves that vanish
 * at both ends.
 */
export function integrateProduct(
  { distances, stretch, step }: RadialGrid,
  first: Float64Array,
  second: Float64Array,
  f: (distance: number) => number,
): number {
  let sum = 0;
  for (let i = 0; i < first.length; i++) {
    const product = first[i] * second[i];
    // outside the window f need not have a value
    if (product !== 0) sum += product * f(distances[i]) * stretch[i];
  }
  return sum * step;
}
