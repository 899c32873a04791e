import { boundStates, type RadialEquation, type RadialState } from './radial-equation';

/** A hump outside the well that is higher than the limit: levels between the two decay through it. */
export interface CentrifugalBarrier {
  /** hartree, same zero as the potential */
  readonly top: number;
  /** index of the grid point there */
  readonly summit: number;
}

/** A level's wave does not depend on what lies beyond the barrier by more than this, hartree: below 1e-6 cm⁻¹. */
const SELF_CONSISTENT = 1e-12;
const MOST_ROUNDS = 8;

/**
 * The barrier that holds a rotating molecule together above its limit.
 *
 * @param equation - counted from the limit of the curve
 * @param centre - distance of the minimum of the curve without rotation, bohr: the well is sought from there outwards
 * @returns undefined where the potential has no well there, or nothing beyond it stands above the limit
 */
export function centrifugalBarrier(equation: RadialEquation, centre: number): CentrifugalBarrier | undefined {
  const { grid, potential } = equation;
  let bottom = Math.max(
    0,
    grid.distances.findIndex((distance) => distance >= centre),
  );
  while (bottom + 1 < potential.length && potential[bottom + 1] < potential[bottom]) bottom++;
  let summit = bottom;
  for (let i = bottom + 1; i < potential.length; i++) if (potential[i] > potential[summit]) summit = i;
  const isInside = summit > bottom && summit < potential.length - 1;
  const top = potential[summit];
  return isInside && top > 0 ? { top, summit } : undefined;
}

/** Levels between the limit and the top of a barrier. */
export interface LevelsBehindBarrier {
  readonly states: readonly RadialState[];
  /** every level that there is settled */
  readonly isComplete: boolean;
}

/**
 * Beyond its outer turning point the wave of a level is made to die away, by a potential that rises there as it falls
 * in truth: a level then lies within its width of where the resonance is. (Closed at its top already, the barrier would
 * move a level by the square root of that.) A level just below the top that finds no such place is none.
 *
 * @param most - levels from this quantum number on are not solved for
 * @param first - nor those before this, which lie below the limit
 * @param guesses - energies by quantum number, known from a coarser grid
 */
export function levelsBehindBarrier(
  equation: RadialEquation,
  { top, summit }: CentrifugalBarrier,
  most: number,
  first: number,
  guesses?: readonly number[],
): LevelsBehindBarrier {
  const closedAtTop = (value: number, i: number) => (i > summit ? top : value);
  const closed = boundStates(withPotential(equation, closedAtTop), top, most, first, guesses);
  const states: RadialState[] = [];
  for (const [k, start] of closed.states.entries()) {
    let state: RadialState | undefined = start;
    let { energy } = start;
    for (let round = 0; round < MOST_ROUNDS; round++) {
      const turned = (value: number, i: number) => (i > summit ? energy + Math.abs(value - energy) : value);
      [state] = boundStates(withPotential(equation, turned), top, first + k + 1, first + k).states;
      // so close below the top that there is no level any more, only a broad resonance
      if (!state) return { states, isComplete: closed.isComplete };
      const change = Math.abs(state.energy - energy);
      energy = state.energy;
      if (change <= SELF_CONSISTENT) break;
    }
    states.push(state);
  }
  return { states, isComplete: closed.isComplete };
}

function withPotential(
  equation: RadialEquation,
  change: (value: number, index: number) => number,
): RadialEquation {
  return { ...equation, potential: equation.potential.map(change) };
}

/**
 * Width of a level behind a barrier: the rate at which it runs against the barrier times the chance to pass, as waves
 * do that vary slowly. Good to some tenths of itself where the level lies well below the top.
 *
 * Source: G. Gamow, Z. Phys. 51, 204 (1928); R. W. Gurney, E. U. Condon, Phys. Rev. 33, 127 (1929). The chance
 * 1/(1 + e^(2θ)), which holds up to the top: E. C. Kemble, Phys. Rev. 48, 549 (1935).
 *
 * @param equation - with the potential as it is, beyond the barrier too
 * @param mass - reduced mass, electron masses
 * @returns full width at half maximum, hartree
 */
export function barrierWidth(
  { grid, potential }: RadialEquation,
  { energy }: RadialState,
  mass: number,
): number {
  const { stretch, step } = grid;
  const isForbidden = (i: number) => potential[i] > energy;
  // by rising distance: wall, well, barrier, free
  const wellStart = potential.findIndex((_, i) => !isForbidden(i));
  const barrierStart = potential.findIndex((_, i) => i > wellStart && isForbidden(i));
  if (wellStart < 0 || barrierStart < 0) return 0;
  let period = 0;
  for (let i = wellStart; i < barrierStart; i++) {
    period += (2 * mass * stretch[i] * step) / Math.sqrt(2 * mass * (energy - potential[i]));
  }
  let action = 0;
  for (let i = barrierStart; i < potential.length && isForbidden(i); i++) {
    action += Math.sqrt(2 * mass * (potential[i] - energy)) * stretch[i] * step;
  }
  return 1 / ((1 + Math.exp(2 * action)) * period);
}
