import { BOHR_IN_ANGSTROM, FORCE_CONSTANT_IN_NEWTON_PER_METRE } from '../constants';
import type { CurveMinimum } from '../curves/minimum';
import {
  expandWell,
  type SpectroscopicConstants,
  spectroscopicConstants,
  stencilDistances,
  stencilSpacing,
} from '../curves/spectroscopic-constants';
import { type Diatomic, diatomicOf } from './diatomic';
import type { LevelCurve } from './level-curve';
import type { PreparedStudy } from './prepare-study';
import type { DiatomicConstants, Estimate, WellConstants } from './result';

type FoundMinimum = Extract<CurveMinimum, { readonly kind: 'found' }>;

/** Of a converged energy the noise is this fraction of the threshold, which is on the change of the last step. */
const NOISE_OF_THRESHOLD = 0.1;
/** Study unit; a smooth well's minimum is known a hundred times better, so beyond it there is a kink. */
const LARGEST_USABLE_SHIFT = 1e-4;
/** Of ωe: beyond it the well has no derivatives to speak of, as where two solutions cross in it. */
const LARGEST_USABLE_UNCERTAINTY = 0.05;
/** Rounding alone leaves so much, hartree. */
const SMALLEST_NOISE = 1e-11;

/**
 * Force constant along the scanned bond and, of a diatomic molecule, Dunham's constants, for which further points of
 * the level are computed around its minimum.
 *
 * @param spacing - of the points that the minimum was found from, study unit
 */
export function wellConstants(
  { study }: PreparedStudy,
  curve: LevelCurve,
  minimum: FoundMinimum,
  spacing: number,
): WellConstants {
  const toNewtonPerMetre = FORCE_CONSTANT_IN_NEWTON_PER_METRE / curve.bohrPerUnit ** 2;
  const molecule = minimum.uncertainty <= LARGEST_USABLE_SHIFT ? diatomicOf(study) : undefined;
  const diatomic = molecule && diatomicConstants(molecule, curve, minimum, spacing, study.convergence.energy);
  return {
    equilibriumDistanceAngstrom: estimate(
      minimum.x,
      minimum.uncertainty,
      curve.bohrPerUnit * BOHR_IN_ANGSTROM,
    ),
    forceConstantNewtonPerMetre:
      diatomic?.forceConstantNewtonPerMetre ??
      estimate(minimum.curvature, minimum.curvatureUncertainty, toNewtonPerMetre),
    ...(diatomic && { diatomic: diatomic.constants }),
  };
}

function diatomicConstants(
  molecule: Diatomic,
  curve: LevelCurve,
  { x, expansion }: FoundMinimum,
  spacing: number,
  threshold: number,
): { readonly constants: DiatomicConstants; readonly forceConstantNewtonPerMetre: Estimate } | undefined {
  // a multiple of the spacing around the same centre: the points that are there already serve again
  const toBohr = curve.bohrPerUnit;
  const inBohr = expansion.coefficients.map((coefficient, k) => coefficient / toBohr ** k);
  const multiple = Math.max(1, Math.round(stencilSpacing(inBohr, x * toBohr) / (spacing * toBohr)));
  const energies: number[] = [];
  for (const place of stencilDistances(expansion.centre, multiple * spacing)) {
    const energy = curve.energyAt(place);
    if (energy === undefined) return undefined;
    energies.push(energy);
  }
  const noise = Math.max(SMALLEST_NOISE, NOISE_OF_THRESHOLD * threshold);
  const well = expandWell(expansion.centre * toBohr, multiple * spacing * toBohr, energies, noise);
  if (!well) return undefined;
  const { constants, uncertainties } = spectroscopicConstants(well, molecule.reducedMass);
  const { harmonicWavenumberPerCm: wavenumber } = constants;
  if (!(uncertainties.harmonicWavenumberPerCm <= LARGEST_USABLE_UNCERTAINTY * wavenumber)) return undefined;
  const known = (key: keyof SpectroscopicConstants) => estimate(constants[key], uncertainties[key]);
  return {
    forceConstantNewtonPerMetre: known('forceConstantNewtonPerMetre'),
    constants: {
      masses: 'atomic',
      reducedMassDalton: molecule.reducedMassDalton,
      harmonicWavenumberPerCm: known('harmonicWavenumberPerCm'),
      anharmonicityPerCm: known('anharmonicityPerCm'),
      rotationalConstantPerCm: known('rotationalConstantPerCm'),
      vibrationRotationCouplingPerCm: known('vibrationRotationCouplingPerCm'),
      centrifugalDistortionPerCm: known('centrifugalDistortionPerCm'),
    },
  };
}

function estimate(value: number, uncertainty: number, unit = 1): Estimate {
  return { value: value * unit, uncertainty: uncertainty * unit };
}
