import { DALTON_IN_ELECTRON_MASSES, HARTREE_IN_WAVENUMBERS } from '../constants';
import { franckCondonFactors } from '../curves/franck-condon';
import type { RunControl } from '../termination';
import { diatomicOf } from './diatomic';
import { excitedLimits } from './excited-limits';
import type { ExcitedState, FranckCondon, TransitionMoment, VerticalExcitation } from './further-findings';
import { interpolatedWell } from './interpolated-well';
import { curveThrough, type LevelCurve, type LevelPoints } from './level-curve';
import type { PreparedStudy } from './prepare-study';
import { readWell, type Well } from './read-well';
import type { Dissociation, Estimate, Vibration, WellDepth } from './result';
import { type CurveOfState, curvesOfStates, statesOf } from './state-curves';
import { MOST_SECONDS_A_POINT, type SolvableCurve, vibrationOn, type WithoutLevels } from './vibration';
import { fromLowestLevel, wellDepthOf } from './well-depth';

/** States closer than this, hartree, at every point are partners of one another. */
const DEGENERATE = 1e-7;
/** Further points of a level are computed for its states as long as they take no more than this together, seconds. */
const MOST_SECONDS = 30;
/** Levels of the lowest state that factors are listed for, and of the other state. */
const INITIAL_LEVELS = 6;
const FINAL_LEVELS = 80;

/** The curve that excitations are counted from, and its well if it has one. */
export interface LowestState {
  readonly curve: LevelCurve;
  readonly well: Well | undefined;
  /** absent: not solved for yet */
  readonly vibration?: Vibration | undefined;
}

/** CIS counts from RHF, whose energies its excitations imply. */
export function lowestStateOfSingles(
  prepared: PreparedStudy,
  points: LevelPoints,
  secondsPerPoint: number,
): LowestState {
  const curve = curveThrough(points, (index) => {
    const state = statesOf(points.all()[index], points.level)[0];
    return state && state.energy - state.excitation;
  });
  const { well } =
    secondsPerPoint > MOST_SECONDS_A_POINT
      ? interpolatedWell(curve)
      : readWell(prepared, curve, undefined, secondsPerPoint);
  return { curve, well };
}

/**
 * What is read off the curves of the states above the lowest, each around its own minimum from points computed there
 * (all states of the level come with each), or interpolated where points are dear.
 */
export function excitedStates(
  prepared: PreparedStudy,
  points: LevelPoints,
  lowest: LowestState,
  secondsPerPoint: number,
  control?: RunControl,
): readonly ExcitedState[] {
  const before = points.all().length;
  const isAffordable = () =>
    secondsPerPoint <= MOST_SECONDS_A_POINT &&
    (points.all().length - before) * secondsPerPoint <= MOST_SECONDS;
  const curves = curvesOfStates(points);
  const ground = lowestOf(curves, points, lowest);
  const excited = withoutPartners(curves, ground);
  const vibration =
    lowest.vibration ?? (excited.length > 0 ? vibrationOf(prepared, lowest.well?.solvable) : undefined);
  const limitOf = excitedLimits(prepared, points, control);
  return excited.map((state) =>
    readState(
      prepared,
      points,
      { lowest, vibration, ground, state, dissociation: limitOf(state) },
      isAffordable() ? secondsPerPoint : undefined,
    ),
  );
}

/** The curve that the lowest energy of all belongs to; CIS has none. */
function lowestOf(
  curves: readonly CurveOfState[],
  points: LevelPoints,
  { curve, well }: LowestState,
): CurveOfState | undefined {
  if (points.all().every(({ levels }) => levels[points.level]?.kind !== 'correlated')) return undefined;
  const { scan } = curve;
  const distanceFromBottom = ({ x, energy }: (typeof scan)[number]) => {
    if (energy === undefined) return Number.POSITIVE_INFINITY;
    return well ? Math.abs(x - well.found.x) : energy;
  };
  const nearest = scan.reduce(
    (best, place, k) => (distanceFromBottom(place) < distanceFromBottom(scan[best]) ? k : best),
    0,
  );
  return curves.find(({ followed }) => followed.states[nearest] === 0);
}

/** Of the partners of a degenerate state, the first; of none of them where they are partners of the lowest state. */
function withoutPartners(
  curves: readonly CurveOfState[],
  ground: CurveOfState | undefined,
): readonly CurveOfState[] {
  return curves.filter(
    (state, k) =>
      state !== ground &&
      !(ground && arePartners(ground, state)) &&
      !curves.slice(0, k).some((earlier) => arePartners(earlier, state)),
  );
}

/** States of one spin and term that have one energy wherever both are known. */
function arePartners({ followed: one, curve: a }: CurveOfState, { followed: other, curve: b }: CurveOfState) {
  if (one.spin !== other.spin || termOf(one) !== termOf(other)) return false;
  const gaps = a.scan.flatMap(({ energy }, k) => {
    const beside = b.scan[k].energy;
    return energy === undefined || beside === undefined ? [] : [Math.abs(energy - beside)];
  });
  return gaps.length > 0 && gaps.every((gap) => gap < DEGENERATE);
}

const termOf = ({ symmetry }: CurveOfState['followed']): string => JSON.stringify(symmetry?.term ?? null);

interface Pair {
  readonly lowest: LowestState;
  /** of the lowest state */
  readonly vibration: Vibration | undefined;
  /** the same as a state of the level; undefined for CIS */
  readonly ground: CurveOfState | undefined;
  readonly state: CurveOfState;
  readonly dissociation: Dissociation | undefined;
}

/** @param secondsPerPoint - undefined: no more points may be computed */
function readState(
  prepared: PreparedStudy,
  points: LevelPoints,
  pair: Pair,
  secondsPerPoint: number | undefined,
): ExcitedState {
  const { lowest, state, dissociation } = pair;
  const limit = limitOfLevels(dissociation);
  const { minimum, well, energyUncertainty } =
    secondsPerPoint === undefined
      ? interpolatedWell(state.curve, limit)
      : { ...readWell(prepared, state.curve, limit, secondsPerPoint), energyUncertainty: 0 };
  const threshold = 2 * prepared.study.convergence.energy;
  const adiabatic: Estimate | undefined = well &&
    lowest.well && {
      value: well.found.energy - lowest.well.found.energy,
      uncertainty: threshold + energyUncertainty,
    };
  const wellDepth = well && wellDepthOf(well.found.energy, state.curve, dissociation);
  const vertical = verticalExcitation(points, pair, threshold);
  return {
    curve: state.index,
    minimum: state.isPartial && minimum.kind !== 'found' ? knownInPart(state) : minimum,
    ...(well && { minimumFrom: secondsPerPoint === undefined ? 'interpolated' : 'computed' }),
    ...(well?.constants && { constants: well.constants }),
    ...(vertical && { vertical }),
    ...(adiabatic && { adiabatic }),
    transitionMoments: transitionMoments(points, pair),
    ...(dissociation && { dissociation }),
    ...(wellDepth && { wellDepth }),
    ...vibrationFindings(prepared, pair, solvableOf(state, well), adiabatic, wellDepth),
  };
}

/** The attraction of ions holds infinitely many levels: listed are then those below the end of the curve. */
function limitOfLevels(dissociation: Dissociation | undefined): number | undefined {
  if (dissociation?.kind !== 'found') return undefined;
  const [one, other] = dissociation.fragments;
  return one.charge * other.charge < 0 ? undefined : dissociation.energy;
}

/** A curve that ends inside the range has no limit, nor levels that could be trusted. */
function solvableOf(state: CurveOfState, well: Well | undefined): Well['solvable'] {
  return well?.solvable && state.isPartial ? knownInPart(state) : well?.solvable;
}

function knownInPart({ curve }: CurveOfState): WithoutLevels {
  const known = curve.points();
  if (known.length === 0) return { kind: 'none', reason: 'This state converged at no point.' };
  const [from, to] = [known[0], known[known.length - 1]].map(({ x }) => Number(x.toPrecision(4)));
  return {
    kind: 'none',
    reason: `This state is among those computed from ${from} to ${to} only: ask for more states.`,
  };
}

function verticalExcitation(
  points: LevelPoints,
  { lowest, ground, state }: Pair,
  threshold: number,
): VerticalExcitation | undefined {
  if (!lowest.well) return undefined;
  const { x, uncertainty } = lowest.well.found;
  const above = state.curve.energyAt(x);
  const below = lowest.curve.energyAt(x);
  if (above === undefined || below === undefined) return undefined;
  const index = points.all().findIndex(({ coordinate }) => coordinate === x);
  const moment = momentAt(index, ground, state);
  return {
    coordinate: x,
    energy: { value: above - below, uncertainty: threshold + uncertainty * slopeAt(state.curve, x) },
    ...(moment && { oscillatorStrength: moment.oscillatorStrength, transitionDipole: moment.dipole }),
  };
}

/** Size of the slope, from the points next to x on both sides. */
function slopeAt(curve: LevelCurve, x: number): number {
  const points = curve.points();
  const left = points.findLast((point) => point.x < x) ?? points[0];
  const right = points.find((point) => point.x > x) ?? points[points.length - 1];
  return left.x === right.x ? 0 : Math.abs((right.energy - left.energy) / (right.x - left.x));
}

function transitionMoments(points: LevelPoints, { ground, state }: Pair): readonly TransitionMoment[] {
  return points
    .all()
    .slice(0, points.scanned)
    .flatMap(({ coordinate }, index) => {
      const moment = momentAt(index, ground, state);
      return moment && coordinate !== null ? [{ coordinate, ...moment }] : [];
    });
}

/** Moments of a point are from its lowest state: that must be the one that excitations are counted from. */
function momentAt(
  index: number,
  ground: CurveOfState | undefined,
  state: CurveOfState,
): Omit<TransitionMoment, 'coordinate'> | undefined {
  if (ground && ground.followed.spin !== state.followed.spin) return undefined;
  if (!ground && state.followed.spin !== 'singlet') return undefined;
  const excited = state.stateAt(index);
  const from = ground?.stateAt(index);
  // excitations are counted from the lowest state of the point
  if (!excited?.transitionDipole || (ground && from?.excitation !== 0)) return undefined;
  return {
    dipole: Math.hypot(...excited.transitionDipole),
    oscillatorStrength: excited.oscillatorStrength ?? 0,
  };
}

function vibrationOf({ study }: PreparedStudy, solvable: Well['solvable']): Vibration | undefined {
  const molecule = diatomicOf(study);
  return molecule && solvable && vibrationOn(solvable, molecule);
}

/** Levels of the upper curve and what they have to do with those of the lower one. */
function vibrationFindings(
  prepared: PreparedStudy,
  { lowest, vibration: below }: Pair,
  upper: Well['solvable'],
  adiabatic: Estimate | undefined,
  wellDepth: WellDepth | undefined,
): Pick<ExcitedState, 'vibration' | 'zeroPointToZeroPoint' | 'franckCondon'> {
  const solved = vibrationOf(prepared, upper);
  if (!solved) return {};
  const vibration = fromLowestLevel(solved, wellDepth);
  const lower = lowest.well?.solvable;
  const isComparable = below?.kind === 'found' && lower?.kind === 'found' && adiabatic !== undefined;
  if (vibration.kind === 'none' || upper?.kind !== 'found' || !isComparable) return { vibration };
  const change = (vibration.zeroPointPerCm - below.zeroPointPerCm) / HARTREE_IN_WAVENUMBERS;
  const error = (vibration.interpolationErrorPerCm + below.interpolationErrorPerCm) / HARTREE_IN_WAVENUMBERS;
  const mass = vibration.reducedMassDalton * DALTON_IN_ELECTRON_MASSES;
  return {
    vibration,
    zeroPointToZeroPoint: {
      value: adiabatic.value + change,
      uncertainty: adiabatic.uncertainty + error,
    },
    franckCondon: franckCondon(lower, upper, mass, below.levels.length),
  };
}

function franckCondon(
  lower: SolvableCurve,
  upper: SolvableCurve,
  mass: number,
  lowerLevels: number,
): FranckCondon {
  const { factors, sums, uncertainty, termination } = franckCondonFactors(lower.curve, upper.curve, mass, {
    mostLevels: FINAL_LEVELS,
    mostInitial: Math.min(INITIAL_LEVELS, lowerLevels),
  });
  return {
    factors,
    sums,
    boundLevels: factors[0]?.length ?? 0,
    uncertainty,
    converged: termination.kind === 'converged',
  };
}
