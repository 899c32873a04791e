import { HARTREE_IN_WAVENUMBERS } from '../constants';
import type { Termination } from '../termination';
import {
  barrierWidth,
  type CentrifugalBarrier,
  centrifugalBarrier,
  levelsBehindBarrier,
} from './centrifugal-barrier';
import {
  boundStates,
  integrateProduct,
  integrationWeights,
  type RadialEquation,
  type RadialState,
  radialEquation,
} from './radial-equation';
import { FOURTH_POWER, intervalsFor, type RadialGrid, radialGrid } from './radial-grid';
import { type RadialCurve, radialRange } from './radial-range';

export interface VibrationalOptions {
  /** J; default 0. For a state with Λ > 0 give √(J(J + 1) − Λ² + ¼) − ½, which need not be whole */
  readonly rotation?: number;
  /** how closely levels must be converged in grid and range, cm⁻¹ */
  readonly tolerancePerCm?: number;
  /** most levels to compute, from the lowest; default 400, more than any curve but that of two ions has */
  readonly mostLevels?: number;
  /** outer end of the range, bohr; default 200 equilibrium distances */
  readonly outermost?: number;
}

export interface VibrationalLevel {
  /** v */
  readonly quantumNumber: number;
  /** hartree, with the curve's zero */
  readonly energy: number;
  /** limit of the curve minus the level */
  readonly bindingPerCm: number;
  /** ⟨1/(2μr²)⟩ */
  readonly rotationalConstantPerCm: number;
  /** from the last refinement of the grid, and from the wave's tail at the ends of the range */
  readonly uncertaintyPerCm: number;
  /** whether `uncertaintyPerCm` is within the tolerance */
  readonly converged: boolean;
  /**
   * ⟨|V − limit|⟩ over distances beyond the computed points, and the same about the first point's energy inside
   * them: how much of the level rests on extrapolation
   */
  readonly extrapolatedPerCm: number;
}

/** A level above the limit that a barrier holds back: it decays, so that its energy is not sharp. */
export interface QuasiBoundLevel extends VibrationalLevel {
  /** semiclassical, see `barrierWidth` */
  readonly widthPerCm: number;
}

export interface VibrationalLevels {
  /** electron masses */
  readonly reducedMass: number;
  readonly rotation: number;
  /** from the lowest; those below the limit only */
  readonly levels: readonly VibrationalLevel[];
  /** above the limit; without rotation none are sought */
  readonly quasiBound: readonly QuasiBoundLevel[];
  /** top of the centrifugal barrier, hartree, with the curve's zero; undefined where there is none */
  readonly barrier: number | undefined;
  /** number of bound levels, also where fewer were asked for */
  readonly boundLevels: number;
  /** lowest level above the curve's minimum (the curve without rotation), cm⁻¹; undefined without a level */
  readonly zeroPointPerCm: number | undefined;
  /** limit minus lowest level, cm⁻¹ */
  readonly dissociationPerCm: number | undefined;
  /** how the refinement of the grid ended */
  readonly termination: Termination;
  /** every level listed is converged in grid and range (of those behind a barrier: but for their width) */
  readonly converged: boolean;
  /** quantum numbers of levels of which more than the tolerance rests on extrapolation of the curve */
  readonly beyondComputedRange: readonly number[];
}

/** Levels are to be right to 0.01 cm⁻¹ of the curve as given; asked for with some room. */
export const LEVEL_TOLERANCE_PER_CM = 1e-3;
/** Phase a step on the first grid, radian. */
const FIRST_PHASE = 0.4;
const MOST_LEVELS = 400;
/** The grid is halved at most so often; three times are usual. */
const HALVINGS = 6;
/** After the two halvings that an uncertainty needs, no grid gets finer than this. */
const MOST_INTERVALS = 130_000;

/**
 * All bound levels of a diatomic molecule on a curve, and with rotation also those that its barrier holds. Isotopologues
 * differ by the mass alone.
 *
 * Each grid is half as wide as the one before; the O(h⁴) error is removed by Richardson's extrapolation from two
 * grids, and the change between two extrapolations is the uncertainty. Where three grids show that the error does fall as
 * h⁴, the O(h⁶) error is removed from two extrapolations too, and what that changes is the uncertainty; on a curve
 * with a kink, where its tail sets in, it does not.
 *
 * @param curve - with a minimum inside its computed distances
 * @param mass - reduced mass, electron masses
 */
export function vibrationalLevels(
  curve: RadialCurve,
  mass: number,
  options: VibrationalOptions = {},
): VibrationalLevels {
  const { rotation = 0, tolerancePerCm = LEVEL_TOLERANCE_PER_CM, mostLevels = MOST_LEVELS } = options;
  const range = radialRange(curve, mass, options.outermost);
  const solve = (intervals: number, guesses?: readonly number[]): GridSolution => {
    const grid = radialGrid(range.centre, range.from, range.to, intervals);
    // counted from the limit, so that total energies of hundreds of hartree do not eat digits
    const equation = radialEquation(grid, (r) => curve.energyAt(r) - curve.limit, mass, rotation);
    const bound = boundStates(equation, 0, mostLevels, 0, guesses);
    const barrier = rotation > 0 ? centrifugalBarrier(equation, range.centre) : undefined;
    const held = barrier && levelsBehindBarrier(equation, barrier, mostLevels, bound.count, guesses);
    const states = [...bound.states, ...(held?.states ?? [])];
    const inverseMoment = integrationWeights(grid, (r) => 1 / (2 * mass * r * r));
    return {
      boundCount: bound.count,
      states,
      isComplete: bound.isComplete && (held?.isComplete ?? true),
      equation,
      barrier,
      rotationalConstants: states.map((state) => integrateProduct(state, state, inverseMoment)),
    };
  };
  const tolerance = tolerancePerCm / HARTREE_IN_WAVENUMBERS;

  let intervals = intervalsFor(range.centre, range.from, range.to, range.phase, FIRST_PHASE);
  let grid = solve(intervals);
  let coarser: GridSolution | undefined;
  let extrapolated: readonly Extrapolated[] = [];
  let best: readonly Extrapolated[] = [];
  let change: readonly number[] = [];
  let termination: Termination = { kind: 'iterationLimit', limit: HALVINGS };
  for (let halving = 0; halving < HALVINGS; halving++) {
    intervals *= 2;
    if (halving >= 2 && intervals > MOST_INTERVALS) break;
    const finer = solve(intervals, expectedOnNext(grid, extrapolated));
    const next = extrapolate(grid, finer);
    best = next.map((level, v) =>
      fallsAsFourthPower([coarser, grid, finer], v) ? richardson(extrapolated[v], level, SIXTH_POWER) : level,
    );
    change = next.map((level, v) => {
      const before = best[v] === level ? extrapolated[v] : best[v];
      return before ? Math.abs(level.energy - before.energy) : Number.POSITIVE_INFINITY;
    });
    [coarser, grid, extrapolated] = [grid, finer, next];
    if (!finer.isComplete) {
      termination = { kind: 'stagnated', iterationsWithoutProgress: 1 };
      break;
    }
    if (next.length === finer.states.length && change.every((value) => value <= tolerance)) {
      termination = { kind: 'converged' };
      break;
    }
  }
  const beyond = extrapolationWeights(curve, grid.equation.grid);
  const all = best.map(({ energy, rotationalConstant }, v): VibrationalLevel => {
    const state = grid.states[v];
    // the wave of a level behind a barrier does not reach the end of the grid
    const beyondEnds = v < grid.boundCount ? endError(grid.equation, state, mass) : 0;
    const uncertainty = change[v] + beyondEnds;
    return {
      quantumNumber: v,
      energy: curve.limit + energy,
      bindingPerCm: -energy * HARTREE_IN_WAVENUMBERS,
      rotationalConstantPerCm: rotationalConstant * HARTREE_IN_WAVENUMBERS,
      uncertaintyPerCm: uncertainty * HARTREE_IN_WAVENUMBERS,
      converged: uncertainty <= tolerance,
      extrapolatedPerCm: integrateProduct(state, state, beyond) * HARTREE_IN_WAVENUMBERS,
    };
  });
  const levels = all.slice(0, grid.boundCount);
  const { barrier } = grid;
  return {
    reducedMass: mass,
    rotation,
    levels,
    quasiBound: all.slice(grid.boundCount).map((level) => ({
      ...level,
      widthPerCm:
        barrierWidth(grid.equation, grid.states[level.quantumNumber], mass) * HARTREE_IN_WAVENUMBERS,
    })),
    barrier: barrier && curve.limit + barrier.top,
    boundLevels: grid.boundCount,
    zeroPointPerCm: levels[0] && (levels[0].energy - range.lowest) * HARTREE_IN_WAVENUMBERS,
    dissociationPerCm: levels[0]?.bindingPerCm,
    termination,
    converged: termination.kind === 'converged' && all.every((level) => level.converged),
    beyondComputedRange: levels
      .filter((level) => level.extrapolatedPerCm > tolerancePerCm)
      .map((level) => level.quantumNumber),
  };
}

interface GridSolution {
  readonly equation: RadialEquation;
  readonly barrier: CentrifugalBarrier | undefined;
  /** number of bound levels, also where fewer were asked for */
  readonly boundCount: number;
  /** bound, then those behind the barrier: the index is the vibrational quantum number */
  readonly states: readonly RadialState[];
  readonly isComplete: boolean;
  readonly rotationalConstants: readonly number[];
}

interface Extrapolated {
  readonly energy: number;
  readonly rotationalConstant: number;
}

/** Levels on a grid half as wide: of the error that the extrapolation shows, a sixteenth is left. */
function expectedOnNext({ states }: GridSolution, extrapolated: readonly Extrapolated[]): readonly number[] {
  return states.map(({ energy }, v) => {
    const limit = extrapolated[v]?.energy ?? energy;
    return limit + (energy - limit) / 16;
  });
}

/** By how much halving the grid divides an error of its sixth power, less one. */
const SIXTH_POWER = 63;
/** How near to 16 the ratio of two changes must be for the error to fall as h⁴. */
const RATIO_RANGE = [15, 17] as const;

function fallsAsFourthPower(grids: readonly (GridSolution | undefined)[], v: number): boolean {
  const [first, second, third] = grids.map((grid) => grid?.states[v]?.energy ?? Number.NaN);
  const ratio = (first - second) / (second - third);
  return ratio > RATIO_RANGE[0] && ratio < RATIO_RANGE[1];
}

/** Of the levels that both grids have. */
function extrapolate(coarse: GridSolution, fine: GridSolution): Extrapolated[] {
  const levelsOf = ({ states, rotationalConstants }: GridSolution) =>
    states.map(({ energy }, v): Extrapolated => ({ energy, rotationalConstant: rotationalConstants[v] }));
  const coarseLevels = levelsOf(coarse);
  return levelsOf(fine)
    .slice(0, coarseLevels.length)
    .map((level, v) => richardson(coarseLevels[v], level, FOURTH_POWER));
}

function richardson(coarse: Extrapolated, fine: Extrapolated, divisor: number): Extrapolated {
  return {
    energy: fine.energy + (fine.energy - coarse.energy) / divisor,
    rotationalConstant:
      fine.rotationalConstant + (fine.rotationalConstant - coarse.rotationalConstant) / divisor,
  };
}

/**
 * What the walls at the ends of the grid add to a level, to first order. A wall where the free wave would be A
 * raises the level by A²κ/μ; the wave against it falls to zero with slope −2κA, so that is (slope)²/(4κμ).
 */
function endError(
  { grid, potential }: RadialEquation,
  { energy, amplitude, support }: RadialState,
  mass: number,
): number {
  const last = potential.length - 1;
  const amplitudeAt = (i: number) => amplitude[i - support[0]] ?? 0;
  // the wave vanishes one step beyond the last point of each end
  const wall = (end: number, next: number): number => {
    const slope = amplitudeAt(end) / (grid.distances[next] - grid.distances[end]);
    if (slope === 0) return 0;
    const decay = Math.sqrt(2 * mass * Math.max(0, potential[end] - energy));
    return slope ** 2 / (4 * decay * mass);
  };
  return wall(0, 1) + wall(last, last - 1);
}

/** Of |V − limit| beyond the computed points, and of the same about the first point's energy inside them. */
function extrapolationWeights({ energyAt, limit, computed }: RadialCurve, grid: RadialGrid): Float64Array {
  const first = energyAt(computed.from);
  return integrationWeights(grid, (r) => {
    if (r < computed.from) return Math.abs(energyAt(r) - first);
    return r > computed.to ? Math.abs(energyAt(r) - limit) : 0;
  });
}
