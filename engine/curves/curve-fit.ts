import { HARTREE_IN_WAVENUMBERS } from '../constants';
import type { Termination } from '../termination';
import type { EnergyPoint } from './curve-tails';
import { fitLeastSquares } from './least-squares';

/** V = limit + D[(1 − e^(−a(r−re)))² − 1]. */
export interface MorseParameters {
  readonly depth: number;
  /** bohr */
  readonly equilibrium: number;
  /** a, bohr⁻¹ */
  readonly steepness: number;
  /** hartree */
  readonly limit: number;
}

/** V = limit − D(1 + a₁ρ + a₂ρ² + a₃ρ³)e^(−a₁ρ), ρ = r − re. */
export interface ExtendedRydbergParameters {
  readonly depth: number;
  /** bohr */
  readonly equilibrium: number;
  /** a₁ bohr⁻¹, a₂ bohr⁻², a₃ bohr⁻³ */
  readonly coefficients: readonly [number, number, number];
  /** hartree */
  readonly limit: number;
}

export interface CurveFit<Parameters> {
  readonly parameters: Parameters;
  /** hartree */
  readonly energyAt: (distance: number) => number;
  /** fit minus point, cm⁻¹, for the points used */
  readonly residuals: readonly { readonly distance: number; readonly residualPerCm: number }[];
  readonly rootMeanSquarePerCm: number;
  readonly largestPerCm: number;
  readonly termination: Termination;
}

export interface CurveFitOptions {
  /** energy of the separated atoms, kept fixed; absent: fitted too */
  readonly limit?: number;
  /**
   * points above this energy are left out, hartree; absent: the limit, or the energy at the largest distance, so that
   * the fit describes the well and not the wall
   */
  readonly highest?: number;
}

/**
 * Fit of a Morse curve, all points with equal weight.
 *
 * Source: P. M. Morse, Phys. Rev. 34, 57 (1929).
 *
 * @returns undefined with fewer points in the well than parameters
 */
export function fitMorse(
  points: readonly EnergyPoint[],
  options: CurveFitOptions = {},
): CurveFit<MorseParameters> | undefined {
  const well = wellOf(points, options);
  if (well.length < MORSE.count) return undefined;
  return fitForm(MORSE, well, morseStart(well, options.limit), options.limit);
}

/**
 * Fit of the extended Rydberg form, all points with equal weight, starting from the Morse fit.
 *
 * Source: J. N. Murrell, K. S. Sorbie, J. Chem. Soc., Faraday Trans. 2 70, 1552 (1974).
 *
 * @returns undefined with fewer points in the well than parameters
 */
export function fitExtendedRydberg(
  points: readonly EnergyPoint[],
  options: CurveFitOptions = {},
): CurveFit<ExtendedRydbergParameters> | undefined {
  const well = wellOf(points, options);
  if (well.length < EXTENDED_RYDBERG.count) return undefined;
  const morse = fitForm(MORSE, well, morseStart(well, options.limit), options.limit).parameters;
  const a = morse.steepness;
  const [a1, a2, a3] = RYDBERG_FROM_MORSE;
  const start = [morse.depth, morse.equilibrium, a1 * a, a2 * a ** 2, a3 * a ** 3, morse.limit];
  return fitForm(EXTENDED_RYDBERG, well, start, options.limit);
}

/**
 * a₁/a, a₂/a², a₃/a³ of the extended Rydberg curve with the second to fourth derivative of a Morse curve: a₁/a is a
 * root of x⁴ − 12x² + 24x − 14.
 */
const RYDBERG_FROM_MORSE = [1.45679, 0.06111, 0.05849] as const;

/** A curve with parameters, of which the last is the limit. */
interface Form<Parameters> {
  /** number of parameters */
  readonly count: number;
  /** value and derivatives by all parameters */
  readonly evaluate: (parameters: readonly number[], distance: number) => [number, number[]];
  readonly name: (parameters: readonly number[]) => Parameters;
}

const MORSE: Form<MorseParameters> = {
  count: 4,
  evaluate: ([depth, equilibrium, steepness, limit], distance) => {
    const displacement = distance - equilibrium;
    const decay = Math.exp(-steepness * displacement);
    const stretch = 1 - decay;
    const common = 2 * depth * stretch * decay;
    const shape = stretch * stretch - 1;
    return [limit + depth * shape, [shape, -common * steepness, common * displacement, 1]];
  },
  name: ([depth, equilibrium, steepness, limit]) => ({ depth, equilibrium, steepness, limit }),
};

const EXTENDED_RYDBERG: Form<ExtendedRydbergParameters> = {
  count: 6,
  evaluate: ([depth, equilibrium, a1, a2, a3, limit], distance) => {
    const rho = distance - equilibrium;
    const decay = Math.exp(-a1 * rho);
    const polynomial = 1 + rho * (a1 + rho * (a2 + rho * a3));
    const slope = decay * (a1 + rho * (2 * a2 + 3 * a3 * rho) - a1 * polynomial);
    return [
      limit - depth * polynomial * decay,
      [
        -polynomial * decay,
        depth * slope,
        -depth * decay * rho * (1 - polynomial),
        -depth * decay * rho ** 2,
        -depth * decay * rho ** 3,
        1,
      ],
    ];
  },
  name: ([depth, equilibrium, a1, a2, a3, limit]) => ({
    depth,
    equilibrium,
    coefficients: [a1, a2, a3],
    limit,
  }),
};

function wellOf(points: readonly EnergyPoint[], { limit, highest }: CurveFitOptions): EnergyPoint[] {
  const sorted = [...points].sort((a, b) => a.distance - b.distance);
  const top = highest ?? limit ?? sorted[sorted.length - 1]?.energy;
  return sorted.filter(({ energy }) => energy <= top);
}

/** From the lowest point, its neighbours' curvature and the limit. */
function morseStart(well: readonly EnergyPoint[], limit?: number): number[] {
  const lowest = well.reduce((best, point, k) => (point.energy < well[best].energy ? k : best), 0);
  const middle = Math.min(well.length - 2, Math.max(1, lowest));
  const [left, centre, right] = well.slice(middle - 1, middle + 2);
  const slope = (a: EnergyPoint, b: EnergyPoint) => (b.energy - a.energy) / (b.distance - a.distance);
  const curvature = (2 * (slope(centre, right) - slope(left, centre))) / (right.distance - left.distance);
  const top = limit ?? well[well.length - 1].energy;
  const depth = top - well[lowest].energy;
  const steepness = Math.sqrt(Math.abs(curvature) / (2 * depth));
  return [depth, well[lowest].distance, steepness, top];
}

function fitForm<Parameters>(
  { evaluate, name }: Form<Parameters>,
  well: readonly EnergyPoint[],
  start: readonly number[],
  fixedLimit?: number,
): CurveFit<Parameters> {
  // energies counted from the start's limit, so that the limit's own digits do not hide those of the well
  const zero = start[start.length - 1];
  const free = (all: readonly number[]) => (fixedLimit === undefined ? all : all.slice(0, -1));
  const complete = (parameters: readonly number[]) =>
    fixedLimit === undefined ? parameters : [...parameters, 0];
  const fit = fitLeastSquares(
    (parameters) => {
      const values = well.map(({ distance }) => evaluate(complete(parameters), distance));
      return {
        residuals: values.map(([value], i) => value - (well[i].energy - zero)),
        derivatives: values.map(([, derivatives]) => free(derivatives)),
      };
    },
    free([...start.slice(0, -1), 0]),
  );
  const relative = complete(fit.parameters);
  const parameters = [...relative.slice(0, -1), relative[relative.length - 1] + zero];
  const residuals = fit.residuals.map((residual, i) => ({
    distance: well[i].distance,
    residualPerCm: residual * HARTREE_IN_WAVENUMBERS,
  }));
  const sizes = residuals.map(({ residualPerCm }) => Math.abs(residualPerCm));
  return {
    parameters: name(parameters),
    energyAt: (distance) => evaluate(parameters, distance)[0],
    residuals,
    rootMeanSquarePerCm: Math.hypot(...sizes) / Math.sqrt(sizes.length),
    largestPerCm: Math.max(...sizes),
    termination: fit.termination,
  };
}
