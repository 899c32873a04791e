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
  /** first and last point at which the wave is not negligible */
  readonly support: Support;
  /** u(r_i) at these and the points between, normalised so that ∫u²dr = 1, positive at its innermost lobe; bohr^(−1/2) */
  readonly amplitude: Float64Array;
}

type Support = readonly [first: number, last: number];

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
 * So is one below this fraction of the distance to the next level, where that is known: what it leaves of the error is
 * the square of the fraction in the energy, the fraction itself in the wave.
 */
const GAP_RESOLUTION = 1e-10;
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
  const brackets = Array.from({ length: wanted }, (): Bracket => ({ low: lowest, high: below }));
  const states: RadialState[] = [];
  for (let v = first; v < wanted; v++) {
    const expected = guesses[v] ?? continued(states);
    const gap = gapAround(v, guesses, below);
    const state = solveLevel(sweeps, v, brackets, below - lowest, expected, gap);
    if (!state) return { count, states, isComplete: false };
    states.push(state);
  }
  return { count, states, isComplete: true };
}

/** The next level as the last three, or two, lead on to it. */
function continued(states: readonly RadialState[]): number | undefined {
  const [last, second, third] = states.slice(-3).reverse();
  if (!second) return undefined;
  const step = last.energy - second.energy;
  return last.energy + step + (third ? step - (second.energy - third.energy) : 0);
}

/** Distance from a level to the nearer of its neighbours, or to the end of all levels; 0: not known. */
function gapAround(v: number, guesses: readonly number[], below: number): number {
  if (guesses.length === 0) return 0;
  const next = guesses[v + 1] ?? below;
  return (
    Math.max(0, Math.min(guesses[v] - (guesses[v - 1] ?? Number.NEGATIVE_INFINITY), next - guesses[v])) || 0
  );
}

/** Number of levels below an energy. */
function countLevelsBelow(sweeps: Sweeps, energy: number): number {
  const window = windowOf(sweeps.equation, energy);
  return window ? sweepForward(sweeps, energy, window) : 0;
}

/** Energies that one level lies between. */
interface Bracket {
  low: number;
  high: number;
}

/** A sweep for one level tells something of all of them. */
function narrow(brackets: readonly Bracket[], energy: number, count: number): void {
  brackets.forEach((bracket, v) => {
    if (count > v) bracket.high = Math.min(bracket.high, energy);
    else bracket.low = Math.max(bracket.low, energy);
  });
}

/** An equation with room for its sweeps. */
interface Sweeps {
  readonly equation: RadialEquation;
  /** 1/(1 − T) and U − 2 at the energy of the last sweep outwards */
  readonly reciprocal: Float64Array;
  readonly excess: Float64Array;
  /** 1 − F_i/F_(i+1) of the sweep outwards, 1 − F_i/F_(i−1) of the one inwards */
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
 * @param expected - where the level may be, hartree
 * @param gap - distance to the next level, hartree; 0 where not known
 * @returns undefined if the level does not settle within the sweeps allowed
 */
function solveLevel(
  sweeps: Sweeps,
  quantumNumber: number,
  brackets: readonly Bracket[],
  well: number,
  expected: number | undefined,
  gap: number,
): RadialState | undefined {
  const { equation } = sweeps;
  const bracket = brackets[quantumNumber];
  const smallEnough = Math.max(ENERGY_RESOLUTION * well, GAP_RESOLUTION * gap);
  let lastCorrection = Number.POSITIVE_INFINITY;
  let trial = expected;
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    const isInside = trial !== undefined && trial > bracket.low && trial < bracket.high;
    const energy = isInside ? trial! : (bracket.low + bracket.high) / 2;
    const window = windowOf(equation, energy);
    const count = window ? sweepForward(sweeps, energy, window) : 0;
    narrow(brackets, energy, count);
    trial = undefined;
    if (!window || count < quantumNumber || count > quantumNumber + 1) continue;
    const correction = join(sweeps, window);
    // the wave that was joined has as many nodes as levels lie below the energy that it leads to
    if (count === quantumNumber ? correction < 0 : correction > 0) continue;
    const size = Math.abs(correction);
    const isRounding = size <= ENERGY_ROUNDING * well && size >= lastCorrection / 2;
    if (size <= smallEnough || isRounding) {
      return { energy: energy + correction, amplitude: amplitudeOf(sweeps, window), support: window };
    }
    lastCorrection = size;
    trial = energy + correction;
  }
  return undefined;
}

/** The points between which the wave of this energy is not negligible; undefined: the energy is below the well. */
function windowOf({ potential, weights }: RadialEquation, energy: number): Support | undefined {
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
 * With d_i = F_(i+1)/F_i − 1 from the inside outwards, d_i/(1 + d_i) into `outward`; less one so that no digits of the
 * small q_i = U_i − 2 are lost beside it.
 *
 * @returns the number of negative ratios
 */
function sweepForward(
  { equation: { potential, weights }, reciprocal, excess, outward }: Sweeps,
  energy: number,
  [first, last]: Support,
): number {
  let count = 0;
  // beyond the window F = 0: the ratio is infinite and 1 − 1/ratio is 1
  let carried = 1;
  for (let i = first; i <= last; i++) {
    const t = weights[i] * (potential[i] - energy);
    reciprocal[i] = 1 / (1 - t);
    excess[i] = 12 * t * reciprocal[i];
    const d = excess[i] + carried;
    if (d < -1) count++;
    carried = d / (1 + d);
    outward[i] = carried;
  }
  return count;
}

/**
 * Sweeps inwards, joins both sweeps where they fit best, and gives the first-order correction of the energy,
 * γ·F_m²/Σ12·w_i·φ_i², γ being the mismatch at the joint m.
 */
function join(
  { equation: { weights }, reciprocal, excess, outward, inward, wave }: Sweeps,
  [first, last]: Support,
): number {
  let carried = 1;
  let joint = first;
  let mismatch = Number.POSITIVE_INFINITY;
  for (let i = last; i >= first; i--) {
    const d = excess[i] + carried;
    const gap = d + (i > first ? outward[i - 1] : 1);
    if (Math.abs(gap) < Math.abs(mismatch)) {
      joint = i;
      mismatch = gap;
    }
    carried = d / (1 + d);
    inward[i] = carried;
  }
  let denominator = 0;
  let value = 1;
  for (let i = joint; i >= first; i--) {
    if (i < joint) value *= 1 - outward[i];
    wave[i] = value;
    const phi = value * reciprocal[i];
    denominator += weights[i] * phi * phi;
  }
  value = 1;
  for (let i = joint + 1; i <= last; i++) {
    value *= 1 - inward[i];
    wave[i] = value;
    const phi = value * reciprocal[i];
    denominator += weights[i] * phi * phi;
  }
  return mismatch / (12 * denominator);
}

/** u of the wave that was joined last, normalised. */
function amplitudeOf({ equation: { grid }, reciprocal, wave }: Sweeps, [first, last]: Support): Float64Array {
  const amplitude = new Float64Array(last - first + 1);
  let norm = 0;
  for (let i = first; i <= last; i++) {
    // u² dr = (dr/dy)²φ² dy
    const value = Math.sqrt(grid.stretch[i]) * wave[i] * reciprocal[i];
    amplitude[i - first] = value;
    norm += value * value * grid.stretch[i] * grid.step;
  }
  const scale = Math.sign(amplitude[0]) / Math.sqrt(norm);
  for (let i = 0; i < amplitude.length; i++) amplitude[i] *= scale;
  return amplitude;
}

/** f(r_i)·dr/dy·h: what `integrateProduct` takes for the operator f. */
export function integrationWeights(
  { distances, stretch, step }: RadialGrid,
  f: (distance: number) => number,
): Float64Array {
  return distances.map((distance, i) => f(distance) * stretch[i] * step);
}

/**
 * ∫ f(r)·u₁(r)·u₂(r) dr by the trapezoidal rule, which converges faster than any power of h for waves that vanish
 * at both ends.
 *
 * @param weights - of f on the grid of both states
 */
export function integrateProduct(first: RadialState, second: RadialState, weights: Float64Array): number {
  const [a, b] = [first.amplitude, second.amplitude];
  const [startOfA, startOfB] = [first.support[0], second.support[0]];
  const end = Math.min(first.support[1], second.support[1]);
  let sum = 0;
  for (let i = Math.max(startOfA, startOfB); i <= end; i++) {
    sum += a[i - startOfA] * b[i - startOfB] * weights[i];
  }
  return sum;
}
