import {
  curvatureOfExpansion,
  evaluateExpansion,
  localExpansion,
  minimumOfExpansion,
} from './local-expansion';

/** One computed point of a curve; energy undefined where the level did not converge. */
export interface CurvePoint {
  readonly x: number;
  readonly energy: number | undefined;
}

export interface LocalMinimum {
  readonly x: number;
  readonly energy: number;
  readonly uncertainty: number;
  /** second derivative there */
  readonly curvature: number;
  readonly curvatureUncertainty: number;
  /** Taylor coefficients c_k about `centre`, the point computed nearest to the minimum */
  readonly expansion: { readonly centre: number; readonly coefficients: readonly number[] };
}

/** The lowest minimum of a curve. */
export interface LowestMinimum extends LocalMinimum {
  readonly kind: 'found';
  /** higher minima, from the lowest */
  readonly others: readonly LocalMinimum[];
}

export interface WithoutMinimum {
  readonly kind: 'none';
  readonly reason: string;
}

export type CurveMinimum = LowestMinimum | { readonly kind: 'atEdge'; readonly x: number } | WithoutMinimum;

/** Points of the local expansion: 7 give the minimum with an error of order h⁶, and 5 of them its error estimate. */
const EXPANSION_POINTS = 7;
/** Re-centrings allowed before the search is given up. */
const CENTRINGS = 12;
/** A dip shallower than this, hartree, is convergence noise and not a minimum. */
const SHALLOWEST_DIP = 1e-7;

/**
 * The lowest minimum of a curve, and those above it, from energies computed around each. The scan only says where to look; the result is the
 * zero of the derivative of a polynomial through freshly computed, closely spaced points.
 *
 * @param scan - computed points, any order
 * @param energyAt - computes one more point; undefined if it does not converge
 * @param spacing - distance of the new points, in units of x; about a twentieth of the well's width
 * @returns x and curvature with their uncertainties: the change from the 5-point to the 7-point expansion
 */
export function findCurveMinimum(
  scan: readonly CurvePoint[],
  energyAt: (x: number) => number | undefined,
  spacing: number,
): CurveMinimum {
  const points = scan
    .filter((point): point is { x: number; energy: number } => point.energy !== undefined)
    .sort((a, b) => a.x - b.x);
  if (points.length < 3) return { kind: 'none', reason: 'Fewer than three points of this level converged.' };
  const dips = dipsOf(points);
  if (dips.length === 0) {
    const lowest = points.reduce((a, b) => (b.energy < a.energy ? b : a));
    return { kind: 'atEdge', x: lowest.x };
  }
  const refined = dips.map((k) => {
    const [left, middle, right] = points.slice(k - 1, k + 2);
    const minimum = refine(vertexOfParabola([left, middle, right]), left.x, right.x, energyAt, spacing);
    return { scanned: middle.energy, minimum };
  });
  const [lowest, ...others] = refined
    .map(({ minimum }) => minimum)
    .filter((minimum): minimum is LocalMinimum => !('reason' in minimum))
    .sort((a, b) => a.energy - b.energy);
  // a dip without a minimum, as at a jump of the curve, does no harm where it lies higher
  for (const { scanned, minimum } of refined) {
    if ('reason' in minimum && !(lowest && scanned > lowest.energy)) return minimum;
  }
  return { kind: 'found', ...lowest, others };
}

/** Places of interior minima: the curve falls to them and rises from them by more than noise. */
function dipsOf(points: readonly { x: number; energy: number }[]): number[] {
  const dips: number[] = [];
  let falling = true;
  let extreme = 0;
  points.forEach(({ energy }, k) => {
    const beyond = energy - points[extreme].energy;
    if (falling ? beyond <= 0 : beyond >= 0) extreme = k;
    else if (Math.abs(beyond) > SHALLOWEST_DIP) {
      if (falling && extreme > 0) dips.push(extreme);
      falling = !falling;
      extreme = k;
    }
  });
  return dips;
}

/** x of the vertex of the parabola through three points, the middle one lowest. */
function vertexOfParabola(points: readonly { x: number; energy: number }[]): number {
  const [a, b, c] = points;
  const left = (b.x - a.x) * (b.energy - c.energy);
  const right = (b.x - c.x) * (b.energy - a.energy);
  return b.x - (0.5 * ((b.x - a.x) * left - (b.x - c.x) * right)) / (left - right);
}

function refine(
  guess: number,
  left: number,
  right: number,
  energyAt: (x: number) => number | undefined,
  spacing: number,
): LocalMinimum | WithoutMinimum {
  const half = (EXPANSION_POINTS - 1) / 2;
  let centre = guess;
  for (let centring = 0; centring < CENTRINGS; centring++) {
    const energies: number[] = [];
    for (let k = -half; k <= half; k++) {
      const energy = energyAt(centre + k * spacing);
      if (energy === undefined) return { kind: 'none', reason: 'A point near the minimum did not converge.' };
      energies.push(energy);
    }
    const full = localExpansion(energies, spacing);
    const inner = localExpansion(energies.slice(1, -1), spacing);
    const reach = half * spacing;
    const shift = minimumOfExpansion(full, reach);
    const innerShift = minimumOfExpansion(inner, reach);
    if (shift !== undefined && innerShift !== undefined && Math.abs(shift) <= spacing) {
      const curvature = curvatureOfExpansion(full, shift);
      return {
        x: centre + shift,
        energy: evaluateExpansion(full, shift),
        uncertainty: Math.abs(shift - innerShift),
        curvature,
        curvatureUncertainty: Math.abs(curvature - curvatureOfExpansion(inner, innerShift)),
        expansion: { centre, coefficients: full },
      };
    }
    // Not centred yet: go to the better place, or down the slope as far as the points reach.
    const downhill = energies[0] < energies[energies.length - 1] ? -reach : reach;
    centre = Math.min(right, Math.max(left, centre + (shift ?? downhill)));
  }
  return { kind: 'none', reason: 'The search for the minimum did not settle.' };
}
