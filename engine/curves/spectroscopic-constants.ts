import { FORCE_CONSTANT_IN_NEWTON_PER_METRE, HARTREE_IN_WAVENUMBERS } from '../constants';
import { evaluateExpansion, localExpansion, minimumOfExpansion } from './local-expansion';

/** Points of the stencil: enough for the sixth derivative and a smaller stencil beside it. */
export const STENCIL_POINTS = 13;
/** Highest coefficient used: a₄, the sixth derivative. */
const HIGHEST_ORDER = 6;
/** Stencil spacing in units of −c₂/c₃, the length over which the well stops being harmonic (1/a of Morse). */
const RELATIVE_SPACING = 0.13;
/** Noise of a converged total energy, hartree: the default of the estimate. */
const ENERGY_NOISE = 1e-11;

/** The shape of a curve at its minimum; the same for all isotopologues. */
export interface WellShape {
  /** bohr */
  readonly equilibrium: number;
  /** hartree */
  readonly energy: number;
  /** c₀ … c₆ of Σ c_k (r − re)^k, hartree/bohr^k */
  readonly coefficients: readonly number[];
}

/** The shape with what is needed to tell how well it is known. */
export interface WellExpansion extends WellShape {
  /** the same from the stencil without its two outermost points */
  readonly narrower: WellShape;
  /** the same with the noise of one energy added to one point, a shape for each point */
  readonly disturbed: readonly WellShape[];
}

/**
 * Dunham's constants. Those named by a letter are the leading terms, which theory quotes; Y holds the coefficients of
 * (v + ½)^l (J(J + 1))^m with Dunham's next correction where one is known to sixth order, which experiment fits.
 */
export interface SpectroscopicConstants {
  /** re, bohr */
  readonly equilibriumDistance: number;
  /** f₂, hartree/bohr² */
  readonly forceConstant: number;
  /** mdyn/Å is a hundredth of N/m */
  readonly forceConstantMillidynePerAngstrom: number;
  readonly forceConstantNewtonPerMetre: number;
  /** ωe = √(f₂/μ) */
  readonly harmonicWavenumberPerCm: number;
  /** ωexe = −Y20 */
  readonly anharmonicityPerCm: number;
  /** ωeye = Y30 */
  readonly secondAnharmonicityPerCm: number;
  /** Be = 1/(2μre²) */
  readonly rotationalConstantPerCm: number;
  /** αe = −Y11, leading term */
  readonly vibrationRotationCouplingPerCm: number;
  /** D̄e = 4Be³/ωe² = −Y02, leading term */
  readonly centrifugalDistortionPerCm: number;
  /** Y00, the shift of all levels */
  readonly levelShiftPerCm: number;
  /** Y10, ωe with its correction */
  readonly correctedWavenumberPerCm: number;
  /** Y01, Be with its correction */
  readonly correctedRotationalConstantPerCm: number;
}

export interface SpectroscopicAnalysis {
  readonly constants: SpectroscopicConstants;
  /** numerical uncertainty of each constant in its own unit: change to the narrower stencil, and noise */
  readonly uncertainties: SpectroscopicConstants;
}

/**
 * A good distance between stencil points: wide enough to keep noise of 1e-11 hartree out of sixth derivatives, narrow
 * enough for the series.
 *
 * @param coefficients - a first, rough expansion about the minimum, at least c₀ … c₃
 * @param equilibrium - bohr; bounds the spacing where the cubic term happens to vanish
 */
export function stencilSpacing(coefficients: readonly number[], equilibrium: number): number {
  const [, , quadratic, cubic] = coefficients;
  return RELATIVE_SPACING * Math.min(Math.abs(quadratic / cubic), equilibrium / 2);
}

/** Distances at which the energies for `expandWell` are to be computed. */
export function stencilDistances(centre: number, spacing: number): number[] {
  return Array.from({ length: STENCIL_POINTS }, (_, i) => centre + (i - (STENCIL_POINTS - 1) / 2) * spacing);
}

/**
 * Taylor series of a curve about its minimum.
 *
 * @param centre - close to the minimum, bohr
 * @param energies - at `stencilDistances(centre, spacing)`, hartree
 * @param noise - of one energy, hartree
 * @returns undefined if the stencil does not hold the minimum
 */
export function expandWell(
  centre: number,
  spacing: number,
  energies: readonly number[],
  noise = ENERGY_NOISE,
): WellExpansion | undefined {
  const whole = wellShape(centre, spacing, energies);
  const narrower = wellShape(centre, spacing, energies.slice(1, -1));
  if (!whole || !narrower) return undefined;
  const disturbed = energies.map(
    (_, k) =>
      wellShape(
        centre,
        spacing,
        energies.map((energy, i) => (i === k ? energy + noise : energy)),
      ) ?? whole,
  );
  return { ...whole, narrower, disturbed };
}

function wellShape(centre: number, spacing: number, energies: readonly number[]): WellShape | undefined {
  const about = localExpansion(energies, spacing);
  const shift = minimumOfExpansion(about, ((energies.length - 1) / 2) * spacing);
  if (shift === undefined) return undefined;
  const coefficients = Array.from({ length: HIGHEST_ORDER + 1 }, (_, k) =>
    shiftedCoefficient(about, k, shift),
  );
  return { equilibrium: centre + shift, energy: coefficients[0], coefficients };
}

/** f^(k)(shift)/k! = Σ_n C(n, k) c_n shift^(n−k). */
function shiftedCoefficient(coefficients: readonly number[], k: number, shift: number): number {
  let binomial = 1;
  const derivative = coefficients.slice(k).map((c, i) => {
    if (i > 0) binomial *= (k + i) / i;
    return binomial * c;
  });
  return evaluateExpansion(derivative, shift);
}

/**
 * Constants of a diatomic molecule in a ¹Σ-like state from the shape of its well.
 *
 * Source: J. L. Dunham, Phys. Rev. 41, 721 (1932), eqs. (1)–(2) and (15).
 * Symbols: V = a₀ξ²(1 + a₁ξ + a₂ξ² + …), ξ = (r − re)/re.
 * Accuracy: the series is one in Be/ωe, about 1/70 for H2 and less for all others.
 *
 * @param mass - reduced mass, electron masses
 */
export function spectroscopicConstants(well: WellExpansion, mass: number): SpectroscopicAnalysis {
  const constants = dunhamConstants(well, mass);
  const narrower = dunhamConstants(well.narrower, mass);
  const disturbed = well.disturbed.map((shape) => dunhamConstants(shape, mass));
  const uncertainty = (key: keyof SpectroscopicConstants): number => {
    const noise = disturbed.map((changed) => changed[key] - constants[key]);
    return Math.abs(constants[key] - narrower[key]) + Math.hypot(...noise);
  };
  const keys = Object.keys(constants) as (keyof SpectroscopicConstants)[];
  const uncertainties = Object.fromEntries(keys.map((key) => [key, uncertainty(key)]));
  return { constants, uncertainties: uncertainties as unknown as SpectroscopicConstants };
}

function dunhamConstants({ equilibrium, coefficients }: WellShape, mass: number): SpectroscopicConstants {
  const forceConstant = 2 * coefficients[2];
  const omega = Math.sqrt(forceConstant / mass);
  const b = 1 / (2 * mass * equilibrium ** 2);
  const [a1, a2, a3, a4] = [3, 4, 5, 6].map(
    (k) => (coefficients[k] / coefficients[2]) * equilibrium ** (k - 2),
  );
  const ratio = (b / omega) ** 2;
  const perCm = {
    harmonicWavenumberPerCm: omega,
    anharmonicityPerCm: -1.5 * b * (a2 - 1.25 * a1 ** 2),
    secondAnharmonicityPerCm:
      ((b * b) / (2 * omega)) *
      (10 * a4 - 35 * a1 * a3 - 8.5 * a2 ** 2 + (225 / 4) * a1 ** 2 * a2 - (705 / 32) * a1 ** 4),
    rotationalConstantPerCm: b,
    vibrationRotationCouplingPerCm: ((-6 * b * b) / omega) * (1 + a1),
    centrifugalDistortionPerCm: (4 * b ** 3) / omega ** 2,
    levelShiftPerCm: (b / 8) * (3 * a2 - 1.75 * a1 ** 2),
    correctedWavenumberPerCm:
      omega *
      (1 +
        (ratio / 4) *
          (25 * a4 - 47.5 * a1 * a3 - 16.75 * a2 ** 2 + (459 / 8) * a1 ** 2 * a2 - (1155 / 64) * a1 ** 4)),
    correctedRotationalConstantPerCm:
      b * (1 + (ratio / 2) * (15 + 14 * a1 - 9 * a2 + 15 * a3 - 23 * a1 * a2 + 10.5 * (a1 ** 2 + a1 ** 3))),
  };
  for (const key of Object.keys(perCm) as (keyof typeof perCm)[]) perCm[key] *= HARTREE_IN_WAVENUMBERS;
  const newtonPerMetre = forceConstant * FORCE_CONSTANT_IN_NEWTON_PER_METRE;
  return {
    equilibriumDistance: equilibrium,
    forceConstant,
    forceConstantMillidynePerAngstrom: newtonPerMetre / 100,
    forceConstantNewtonPerMetre: newtonPerMetre,
    ...perCm,
  };
}
