import type { RadialEquation, RadialState } from './radial-equation';

/** A hump outside the well that is higher than the limit: levels between the two decay through it. */
export interface CentrifugalBarrier {
  /** hartree, same zero as the potential */
  readonly top: number;
  /** the equation with everything beyond the hump as high as its top: its levels do not decay */
  readonly closed: RadialEquation;
}

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
  if (!isInside || !(top > 0)) return undefined;
  return { top, closed: { ...equation, potential: potential.map((value, i) => (i > summit ? top : value)) } };
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
