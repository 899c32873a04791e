import { BOHR_IN_ANGSTROM, FORCE_CONSTANT_IN_NEWTON_PER_METRE } from '../constants';
import type { EnergyPoint } from '../curves/curve-tails';
import type { LowestMinimum } from '../curves/minimum';
import {
  expandWell,
  type SpectroscopicConstants,
  spectroscopicConstants,
  stencilDistances,
  stencilSpacing,
  type WellExpansion,
} from '../curves/spectroscopic-constants';
import { type Diatomic, diatomicOf } from './diatomic';
import type { LevelCurve } from './level-curve';
import type { PreparedStudy } from './prepare-study';
import type { DiatomicConstants, Estimate, WellConstants } from './result';

/** Of a converged energy the noise is this fraction of the threshold, which is on the change of the last step. */
const NOISE_OF_THRESHOLD = 0.1;
/** Study unit; a smooth well's minimum is known a hundred times better, so beyond it there is a kink. */
const LARGEST_USABLE_SHIFT = 1e-4;
/** Of ωe: beyond it the well has no derivatives to speak of, as where two solutions cross in it. */
const LARGEST_USABLE_UNCERTAINTY = 0.05;
/** Rounding alone leaves so much, hartree. */
const SMALLEST_NOISE = 1e-11;

/** The Taylor series of a well with the points that it comes from. */
export interface ExpandedWell {
  readonly expansion: WellExpansion;
  readonly stencil: readonly EnergyPoint[];
}

/** Whether the energies around a minimum lie on no smooth curve. */
export function isKinked({ uncertainty }: LowestMinimum, { withoutDiatomic }: WellConstants): boolean {
  return uncertainty > LARGEST_USABLE_SHIFT || withoutDiatomic === NOT_SMOOTH;
}

export interface DescribedWell {
  readonly constants: WellConstants;
  /** diatomic molecules, where the derivatives are good */
  readonly expanded?: ExpandedWell;
}

/**
 * Force constant along the scanned bond and, of a diatomic molecule, Dunham's constants, for which further points of
 * the level are computed around its minimum.
 *
 * @param spacing - of the points that the minimum was found from, study unit
 */
export function describeWell(
  { study }: PreparedStudy,
  curve: LevelCurve,
  minimum: LowestMinimum,
  spacing: number,
): DescribedWell {
  const toNewtonPerMetre = FORCE_CONSTANT_IN_NEWTON_PER_METRE / curve.bohrPerUnit ** 2;
  const molecule = diatomicOf(study);
  const equilibriumDistanceAngstrom = estimate(
    minimum.x,
    minimum.uncertainty,
    curve.bohrPerUnit * BOHR_IN_ANGSTROM,
  );
  const roughly: WellConstants = {
    equilibriumDistanceAngstrom,
    forceConstantNewtonPerMetre: estimate(minimum.curvature, minimum.curvatureUncertainty, toNewtonPerMetre),
  };
  if (!molecule) return { constants: roughly };
  const expanded = expandedWell(curve, minimum, spacing, study.convergence.energy);
  if (typeof expanded === 'string') return { constants: { ...roughly, withoutDiatomic: expanded } };
  const { constants, uncertainties } = spectroscopicConstants(expanded.expansion, molecule.reducedMass);
  const { harmonicWavenumberPerCm: wavenumber } = constants;
  if (!(uncertainties.harmonicWavenumberPerCm <= LARGEST_USABLE_UNCERTAINTY * wavenumber)) {
    return { constants: { ...roughly, withoutDiatomic: NOT_SMOOTH } };
  }
  return {
    constants: {
      equilibriumDistanceAngstrom,
      forceConstantNewtonPerMetre: estimate(
        constants.forceConstantNewtonPerMetre,
        uncertainties.forceConstantNewtonPerMetre,
      ),
      diatomic: diatomicConstants(expanded.expansion, molecule),
    },
    expanded,
  };
}

const NOT_SMOOTH =
  'The energies around the minimum do not lie on one smooth curve: it has a kink, or they are too noisy for derivatives.';
const NOT_KNOWN = 'Not all points around the minimum are known: one did not converge, or has no such state.';

/** @returns why there is none, where the minimum is too uncertain or a point is not known */
function expandedWell(
  curve: LevelCurve,
  { x, expansion, uncertainty }: LowestMinimum,
  spacing: number,
  threshold: number,
): ExpandedWell | string {
  if (!(uncertainty <= LARGEST_USABLE_SHIFT)) return NOT_SMOOTH;
  // a multiple of the spacing around the same centre: the points that are there already serve again
  const toBohr = curve.bohrPerUnit;
  const inBohr = expansion.coefficients.map((coefficient, k) => coefficient / toBohr ** k);
  const multiple = Math.max(1, Math.round(stencilSpacing(inBohr, x * toBohr) / (spacing * toBohr)));
  const stencil: EnergyPoint[] = [];
  for (const place of stencilDistances(expansion.centre, multiple * spacing)) {
    const energy = curve.energyAt(place);
    if (energy === undefined) return NOT_KNOWN;
    stencil.push({ distance: place * toBohr, energy });
  }
  const noise = Math.max(SMALLEST_NOISE, NOISE_OF_THRESHOLD * threshold);
  const energies = stencil.map(({ energy }) => energy);
  const well = expandWell(expansion.centre * toBohr, multiple * spacing * toBohr, energies, noise);
  return well ? { expansion: well, stencil } : NOT_SMOOTH;
}

/** Leading terms of Dunham's series for one pair of masses. */
export function diatomicConstants(
  expansion: WellExpansion,
  { reducedMass, reducedMassDalton }: Pick<Diatomic, 'reducedMass' | 'reducedMassDalton'>,
): DiatomicConstants {
  const { constants, uncertainties } = spectroscopicConstants(expansion, reducedMass);
  const known = (key: keyof SpectroscopicConstants) => estimate(constants[key], uncertainties[key]);
  return {
    masses: 'atomic',
    reducedMassDalton,
    harmonicWavenumberPerCm: known('harmonicWavenumberPerCm'),
    anharmonicityPerCm: known('anharmonicityPerCm'),
    rotationalConstantPerCm: known('rotationalConstantPerCm'),
    vibrationRotationCouplingPerCm: known('vibrationRotationCouplingPerCm'),
    centrifugalDistortionPerCm: known('centrifugalDistortionPerCm'),
  };
}

function estimate(value: number, uncertainty: number, unit = 1): Estimate {
  return { value: value * unit, uncertainty: uncertainty * unit };
}
