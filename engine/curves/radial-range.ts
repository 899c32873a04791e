import { stretchAt } from './radial-grid';

/** A potential-energy curve as the radial equation needs it. */
export interface RadialCurve {
  /** hartree; called for any distance > 0 in bohr, so it must go on beyond its points in both directions */
  readonly energyAt: (distance: number) => number;
  /** energy at infinite distance, hartree: levels below it are bound */
  readonly limit: number;
  /** distances between which the curve is computed and not extrapolated, bohr */
  readonly computed: { readonly from: number; readonly to: number };
}

/** Where the radial equation is solved, and how finely to begin with. */
export interface RadialRange {
  readonly from: number;
  readonly to: number;
  /** distance of the curve's lowest point, bohr */
  readonly centre: number;
  /** energy there, hartree */
  readonly lowest: number;
  /** largest of (dr/dy)·k over the range, for the map scaled by `centre`: phase per unit of y */
  readonly phase: number;
}

/** Points of the search for the minimum, evenly spaced in ln r. */
const SEARCH_POINTS = 2000;
/** Inside the well the range ends where the wave of the highest level has fallen by e to this power. */
const INNER_ACTION = 45;
/** It never goes closer than this fraction of the equilibrium distance. */
const CLOSEST = 0.02;
/** Default outer end, in equilibrium distances: holds levels bound by a few thousandths of a cm⁻¹. */
const OUTERMOST = 200;
/**
 * Beyond the computed points the range ends where the phase per unit of y passes this. Wells of atoms up to argon
 * stay below it, and so do tails that fall faster than 1/r³; a tail of 1/r, two ions, has no last level and is cut.
 */
const LARGEST_PHASE = 1500;
/** Golden sections of the bracket around the lowest point found: to a part in 1e9, where the energy is flat. */
const SECTIONS = 44;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * The range that holds every bound level, and the finest oscillation in it.
 *
 * @param mass - reduced mass, electron masses
 * @param outermost - outer end, bohr; absent: 200 equilibrium distances
 */
export function radialRange(curve: RadialCurve, mass: number, outermost?: number): RadialRange {
  const { energyAt, limit, computed } = curve;
  const ratio = (computed.to / computed.from) ** (1 / SEARCH_POINTS);
  const centre = lowestPoint(energyAt, computed.from, ratio);
  const waveNumber = (energy: number) => Math.sqrt(2 * mass * Math.abs(energy - limit));
  let from = centre;
  for (let action = 0; from > CLOSEST * centre && action < INNER_ACTION; ) {
    const step = from * (1 - 1 / ratio);
    from -= step;
    const energy = energyAt(from);
    if (energy > limit) action += step * waveNumber(energy);
  }
  const farthest = outermost ?? OUTERMOST * centre;
  let phase = 0;
  let to = from;
  for (; to < farthest && (to < computed.to || phase < LARGEST_PHASE); to = Math.min(farthest, to * ratio)) {
    const energy = energyAt(to);
    if (energy < limit) phase = Math.max(phase, waveNumber(energy) * stretchAt(to, centre));
  }
  return { from, to, centre, lowest: energyAt(centre), phase };
}

/** The lowest of many points, then golden sections between its neighbours. */
function lowestPoint(energyAt: (distance: number) => number, from: number, ratio: number): number {
  let lowest = from;
  let energyThere = energyAt(from);
  for (let i = 1; i <= SEARCH_POINTS; i++) {
    const r = from * ratio ** i;
    const energy = energyAt(r);
    if (energy < energyThere) [lowest, energyThere] = [r, energy];
  }
  let [left, right] = [lowest / ratio, lowest * ratio];
  for (let section = 0; section < SECTIONS; section++) {
    const reach = GOLDEN * (right - left);
    if (energyAt(right - reach) < energyAt(left + reach)) right = left + reach;
    else left = right - reach;
  }
  return (left + right) / 2;
}
