import { BOHR_IN_ANGSTROM } from '../constants';
import {
  expandWell,
  spectroscopicConstants,
  stencilDistances,
  type WellExpansion,
} from '../curves/spectroscopic-constants';
import type { RunControl } from '../termination';
import type { LevelLimit, LimitCurve } from './basis-comparison';
import { type ChosenMember, chooseFamily, formulasOf } from './basis-set-limit';
import { type Diatomic, diatomicOf } from './diatomic';
import {
  type ExtrapolationPlan,
  type ExtrapolationVariant,
  extrapolate,
  extrapolateBy,
  type MemberEnergy,
  planExtrapolation,
  spreadOf,
  variantsOf,
} from './extrapolation';
import { curveThrough, type LevelCurve, levelPoints, lowestCurve } from './level-curve';
import { findLevel } from './levels';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import { minimumSpacing, readWell, type Well } from './read-well';
import type { DiatomicConstants, Estimate, LevelFindings, LevelResult, PointResult } from './result';
import { diatomicConstants } from './well-constants';

/** A level computed in one basis of a study. */
export interface CurveInBasis {
  readonly points: readonly PointResult[];
  /** what each of them left for its neighbours */
  readonly left: readonly (PointCarry | undefined)[];
  readonly findings: LevelFindings;
}

/**
 * What a level's curves in bases of one family tend to, with the minimum and the constants of the extrapolated curve,
 * for which points are computed around that minimum in every member.
 *
 * @param curves - in the study's own basis and the further ones
 * @returns undefined where the bases have no limit, or no point is known in every member
 */
export function basisSetLimitOfCurves(
  prepared: PreparedStudy,
  level: string,
  curves: readonly CurveInBasis[],
  control?: RunControl,
): LevelLimit | undefined {
  const bases = [prepared, ...prepared.furtherBases];
  const family = chooseFamily(bases.map(({ basisSet }) => basisSet.name));
  if (!family) return undefined;
  const members = family.members.map((member) =>
    memberCurve(bases[member.index], member, level, curves[member.index], control),
  );
  const placeAt = (x: number) => members.map(({ at }) => at(x));
  const atomsApart = fragmentEnergies(members);
  const scan = prepared.coordinates.flatMap((x) => (x === null ? [] : [{ x, place: placeAt(x) }]));
  const plan = planExtrapolation([...scan.map(({ place }) => place), ...(atomsApart ? [atomsApart] : [])]);
  if (!plan) return undefined;
  const variants = variantsOf(plan);
  const curveBy = (variant: ExtrapolationVariant): LevelCurve => {
    const places = scan.map(({ x, place }) => ({ x, energy: extrapolateBy(variant, place) }));
    return {
      level,
      bohrPerUnit: members[0].bohrPerUnit,
      scan: places,
      points: () => places.flatMap(({ x, energy }) => (energy === undefined ? [] : [{ x, energy }])),
      energyAt: (x) => extrapolateBy(variant, placeAt(x)),
    };
  };
  return {
    ...formulasOf(plan),
    energies: scan.map(({ place }) => extrapolate(plan, place) ?? null),
    curve: readLimit(prepared, variants.map(curveBy), {
      plan,
      largest: members[members.length - 1].findings,
      apart: variants.map((variant) => atomsApart && extrapolateBy(variant, atomsApart)),
    }),
  };
}

interface MemberCurve {
  readonly cardinal: number;
  readonly bohrPerUnit: number;
  readonly findings: LevelFindings;
  readonly isCorrelated: boolean;
  at(x: number): MemberEnergy;
}

function memberCurve(
  prepared: PreparedStudy,
  { cardinal }: ChosenMember,
  level: string,
  { points: computed, left, findings }: CurveInBasis,
  control: RunControl | undefined,
): MemberCurve {
  const points = levelPoints(prepared, level, computed, left, control);
  const total = lowestCurve(points);
  const isCorrelated = findLevel(level, 'levels').kind !== 'hartreeFock';
  const correlation = curveThrough(points, (index) => correlationOf(points.all()[index].levels[level]));
  return {
    cardinal,
    bohrPerUnit: points.bohrPerUnit,
    findings,
    isCorrelated,
    at: (x) => ({
      cardinal,
      energy: total.energyAt(x),
      ...(isCorrelated && { correlation: correlation.energyAt(x) }),
    }),
  };
}

function correlationOf(result: LevelResult | undefined): number | undefined {
  return result?.converged && 'correlation' in result ? result.correlation : undefined;
}

/** The separate fragments in every member; undefined where the members do not agree on which they are. */
function fragmentEnergies(members: readonly MemberCurve[]): readonly MemberEnergy[] | undefined {
  const limits = members.flatMap(({ cardinal, isCorrelated, findings: { dissociation } }) => {
    if (dissociation?.kind !== 'found') return [];
    const { energy, fragments } = dissociation;
    const states = fragments.map(({ charge, multiplicity, level }) => [charge, multiplicity, level]);
    const correlation = fragments.reduce((sum, fragment) => sum + (fragment.correlation ?? 0), 0);
    return [{ states: JSON.stringify(states), cardinal, energy, ...(isCorrelated && { correlation }) }];
  });
  const agree = limits.every(({ states }) => states === limits[0].states);
  return limits.length === members.length && agree ? limits : undefined;
}

interface Comparison {
  readonly plan: ExtrapolationPlan;
  /** findings in the largest basis */
  readonly largest: LevelFindings;
  /** of the separate fragments, by each formula */
  readonly apart: readonly (number | undefined)[];
}

/** @param curves - by each combination of formulas, the result's first */
function readLimit(
  prepared: PreparedStudy,
  curves: readonly LevelCurve[],
  { plan, largest, apart }: Comparison,
): LimitCurve {
  const { minimum, well } = readWell(prepared, curves[0], undefined, Number.POSITIVE_INFINITY);
  if (!well?.constants || minimum.kind !== 'found') {
    return {
      kind: 'none',
      reason:
        minimum.kind === 'none' ? minimum.reason : 'The extrapolated curve has no minimum within the range.',
    };
  }
  const widen = widening(plan);
  const shapes = curves.map((curve) => wellBy(curve, well, minimumSpacing(prepared.study)));
  const { equilibriumDistance, uncertainty, energy } = minimum;
  const toBohr = curves[0].bohrPerUnit;
  const ofLargest = largest.minimum.kind === 'found' ? largest.minimum : undefined;
  const distance = widen(
    { value: equilibriumDistance, uncertainty },
    shapes.map((shape) => shape && shape.equilibrium / toBohr),
    ofLargest?.equilibriumDistance,
  );
  const depths = shapes.map((shape, k) =>
    shape && apart[k] !== undefined ? apart[k] - shape.energy : undefined,
  );
  const [depth] = depths;
  const { constants } = well;
  const molecule = diatomicOf(prepared.study);
  return {
    kind: 'found',
    equilibriumDistance: distance,
    energy: widen(
      { value: energy, uncertainty: 0 },
      shapes.map((shape) => shape?.energy),
      ofLargest?.energy,
    ),
    constants: {
      equilibriumDistanceAngstrom: {
        value: constants.equilibriumDistanceAngstrom.value,
        uncertainty: distance.uncertainty * toBohr * BOHR_IN_ANGSTROM,
      },
      forceConstantNewtonPerMetre: widen(
        constants.forceConstantNewtonPerMetre,
        shapes.map(
          (shape) => shape && spectroscopicConstants(shape, 1).constants.forceConstantNewtonPerMetre,
        ),
        largest.constants?.forceConstantNewtonPerMetre.value,
      ),
      ...(constants.diatomic &&
        molecule && { diatomic: widenedConstants(widen, constants.diatomic, shapes, molecule, largest) }),
      ...(constants.withoutDiatomic && { withoutDiatomic: constants.withoutDiatomic }),
    },
    ...(depth !== undefined && {
      wellDepth: widen({ value: depth, uncertainty: 0 }, depths, largest.wellDepth?.value),
    }),
  };
}

/** The well of another combination of formulas, from the points of the first one's. */
function wellBy(curve: LevelCurve, { found, expanded }: Well, spacing: number): WellExpansion | undefined {
  const toBohr = curve.bohrPerUnit;
  const distances =
    expanded?.stencil.map(({ distance }) => distance) ??
    stencilDistances(found.expansion.centre * toBohr, spacing * toBohr);
  const energies = distances.map((distance) => curve.energyAt(distance / toBohr));
  if (energies.some((energy) => energy === undefined)) return undefined;
  const centre = distances[(distances.length - 1) / 2];
  return expandWell(centre, distances[1] - distances[0], energies as number[]);
}

/** An estimate whose uncertainty also covers what the formulas differ by. */
type Widen = (
  own: Estimate,
  byFormula: readonly (number | undefined)[],
  inLargest: number | undefined,
) => Estimate;

function widening(plan: ExtrapolationPlan): Widen {
  return ({ value, uncertainty }, byFormula, inLargest) => {
    const spread = spreadOf(plan, byFormula, inLargest ?? byFormula[0])?.uncertainty ?? 0;
    return { value, uncertainty: uncertainty + spread };
  };
}

function widenedConstants(
  widen: Widen,
  constants: DiatomicConstants,
  shapes: readonly (WellExpansion | undefined)[],
  molecule: Diatomic,
  { constants: largest }: LevelFindings,
): DiatomicConstants {
  const byFormula = shapes.map((shape) => shape && diatomicConstants(shape, molecule));
  const keys = [
    'harmonicWavenumberPerCm',
    'anharmonicityPerCm',
    'rotationalConstantPerCm',
    'vibrationRotationCouplingPerCm',
    'centrifugalDistortionPerCm',
  ] as const;
  const estimates = keys.map((key) => [
    key,
    widen(
      constants[key],
      byFormula.map((one) => one?.[key].value),
      largest?.diatomic?.[key].value,
    ),
  ]);
  return { ...constants, ...Object.fromEntries(estimates) };
}
