import {
  type BasisLimit,
  CORRELATION_LEAST_FRACTION,
  correlationLimit,
  HARTREE_FOCK_LEAST_FRACTION,
  hartreeFockLimit,
} from '../curves/basis-extrapolation';
import type { LimitFormula } from './basis-comparison';
import type { Estimate } from './result';

/** A level at one geometry in one basis of a family. */
export interface MemberEnergy {
  readonly cardinal: number;
  /** total, hartree; undefined where the level did not converge */
  readonly energy: number | undefined;
  /** the part of it beyond Hartree–Fock; undefined for Hartree–Fock levels */
  readonly correlation?: number | undefined;
}

/**
 * The formulas that can be used at every point of a curve, the first being the result: a curve that changed its formula
 * on the way would have steps.
 */
export interface ExtrapolationPlan {
  readonly hartreeFock: readonly LimitFormula[];
  /** absent for Hartree–Fock levels */
  readonly correlation?: readonly LimitFormula[];
  /**
   * least uncertainty as a fraction of what extrapolation added to the largest basis; of correlated levels, whose energies
   * gain mostly correlation from it, that of the correlation
   */
  readonly leastFraction: number;
}

/** @returns undefined where no point is known in every basis */
export function planExtrapolation(
  places: readonly (readonly MemberEnergy[])[],
): ExtrapolationPlan | undefined {
  const limits = places.flatMap((members) => partLimits(members) ?? []);
  if (limits.length === 0) return undefined;
  const correlation = limits.flatMap((limit) => limit.correlation ?? []);
  return {
    hartreeFock: sharedFormulas(limits.map((limit) => limit.hartreeFock)),
    ...(correlation.length > 0 && { correlation: sharedFormulas(correlation) }),
    leastFraction: correlation.length > 0 ? CORRELATION_LEAST_FRACTION : HARTREE_FOCK_LEAST_FRACTION,
  };
}

/** A level's energy in the limit, by the first formulas of the plan. */
export function extrapolate(plan: ExtrapolationPlan, members: readonly MemberEnergy[]): Estimate | undefined {
  const values = variantsOf(plan).map((variant) => extrapolateBy(variant, members));
  const largest = members.reduce((a, b) => (b.cardinal > a.cardinal ? b : a)).energy;
  return spreadOf(plan, values, largest);
}

/** One formula for each part of the energy. */
export interface ExtrapolationVariant {
  readonly hartreeFock: LimitFormula;
  readonly correlation?: LimitFormula;
}

/** All ways to combine the formulas of a plan, the result's first. */
export function variantsOf({ hartreeFock, correlation }: ExtrapolationPlan): readonly ExtrapolationVariant[] {
  return hartreeFock.flatMap((first): ExtrapolationVariant[] =>
    correlation
      ? correlation.map((second) => ({ hartreeFock: first, correlation: second }))
      : [{ hartreeFock: first }],
  );
}

/** @returns undefined where a member did not converge, or the formula cannot be used */
export function extrapolateBy(
  { hartreeFock, correlation }: ExtrapolationVariant,
  members: readonly MemberEnergy[],
): number | undefined {
  const limits = partLimits(members);
  if (!limits) return undefined;
  const meanField = energyBy(limits.hartreeFock, hartreeFock);
  if (!correlation || !limits.correlation || meanField === undefined) return meanField;
  const beyond = energyBy(limits.correlation, correlation);
  return beyond === undefined ? undefined : meanField + beyond;
}

/**
 * The first value, half the spread of all being its uncertainty, and never less than a fraction of what extrapolation
 * added.
 *
 * @param largest - the same number in the largest basis
 */
export function spreadOf(
  { leastFraction }: ExtrapolationPlan,
  values: readonly (number | undefined)[],
  largest: number | undefined,
): Estimate | undefined {
  const [value] = values;
  if (value === undefined || largest === undefined) return undefined;
  const known = values.filter((other) => other !== undefined);
  const half = (Math.max(...known) - Math.min(...known)) / 2;
  return { value, uncertainty: Math.max(half, leastFraction * Math.abs(value - largest)) };
}

function partLimits(
  members: readonly MemberEnergy[],
): { readonly hartreeFock: BasisLimit; readonly correlation?: BasisLimit } | undefined {
  const parts = members.flatMap(({ cardinal, energy, correlation }) =>
    energy === undefined ? [] : [{ cardinal, meanField: energy - (correlation ?? 0), correlation }],
  );
  if (parts.length < members.length) return undefined;
  const hartreeFock = hartreeFockLimit(
    parts.map(({ cardinal, meanField }) => ({ cardinal, energy: meanField })),
  );
  const correlation = correlationLimit(
    parts.flatMap(({ cardinal, correlation: energy }) =>
      energy === undefined ? [] : [{ cardinal, energy }],
    ),
  );
  return hartreeFock && { hartreeFock, ...(correlation && { correlation }) };
}

const keyOf = ({ formula, cardinals }: LimitFormula): string => `${formula} ${cardinals.join()}`;

function sharedFormulas(limits: readonly BasisLimit[]): readonly LimitFormula[] {
  return limits[0].variants
    .filter((variant) =>
      limits.every(({ variants }) => variants.some((other) => keyOf(other) === keyOf(variant))),
    )
    .map(({ formula, cardinals }) => ({ formula, cardinals }));
}

function energyBy({ variants }: BasisLimit, formula: LimitFormula): number | undefined {
  return variants.find((variant) => keyOf(variant) === keyOf(formula))?.energy;
}
