import type { Termination } from '../termination';
import {
  type BoundStates,
  boundStates,
  integrateProduct,
  integrationWeights,
  radialEquation,
} from './radial-equation';
import { FOURTH_POWER, intervalsFor, radialGrid } from './radial-grid';
import { type RadialCurve, radialRange } from './radial-range';

export interface FranckCondonOptions {
  /** J of both levels; default 0. For Λ > 0 see `VibrationalOptions` */
  readonly rotation?: number;
  /** most levels of each curve, from the lowest; default 60 */
  readonly mostLevels?: number;
  /** most levels of the initial curve, where fewer are wanted */
  readonly mostInitial?: number;
  /** wanted uncertainty of a factor; default 1e-6 */
  readonly tolerance?: number;
  /** outer end of the range, bohr; default 200 equilibrium distances */
  readonly outermost?: number;
  /** transition moment in e·bohr at a distance in bohr; for bands beyond the Condon approximation */
  readonly transitionMoment?: (distance: number) => number;
}

export interface FranckCondonFactors {
  /** |⟨v′|v″⟩|², one row for each level v″ of the initial curve, one column for each v′ of the final curve */
  readonly factors: readonly (readonly number[])[];
  /** |⟨v′|μ(r)|v″⟩|² in e²·bohr², same order; undefined without a transition moment */
  readonly strengths: readonly (readonly number[])[] | undefined;
  /**
   * sum of each row: 1 less what goes to the continuum of the final curve and to levels that were not asked for
   */
  readonly sums: readonly number[];
  /** largest change of an extrapolated factor with the last halving of the grid */
  readonly uncertainty: number;
  readonly termination: Termination;
}

const MOST_LEVELS = 60;
const TOLERANCE = 1e-6;
/** Phase a step of the first grid, radian; waves converge as its fourth power, which an extrapolation removes. */
const FIRST_PHASE = 0.2;
const HALVINGS = 4;

/**
 * Overlaps between the bound levels of two curves of one molecule, both solved for on one grid.
 *
 * Source: E. U. Condon, Phys. Rev. 32, 858 (1928).
 *
 * @param mass - reduced mass, electron masses
 */
export function franckCondonFactors(
  initial: RadialCurve,
  final: RadialCurve,
  mass: number,
  options: FranckCondonOptions = {},
): FranckCondonFactors {
  const { rotation = 0, mostLevels = MOST_LEVELS, tolerance = TOLERANCE, transitionMoment } = options;
  const ranges = [initial, final].map((curve) => radialRange(curve, mass, options.outermost));
  const scale = Math.min(...ranges.map(({ centre }) => centre));
  const from = Math.min(...ranges.map((range) => range.from));
  const to = Math.max(...ranges.map((range) => range.to));
  // each phase belongs to the map scaled by its own centre; with the smaller one the map is stretched at most so much
  const phase = Math.max(...ranges.map((range) => (range.phase * range.centre) / scale));
  let intervals = intervalsFor(scale, from, to, phase, FIRST_PHASE);

  const solve = (coarser?: SolvedOnGrid) => {
    const grid = radialGrid(scale, from, to, intervals);
    const statesOf = (curve: RadialCurve, most: number, guesses: BoundStates | undefined) =>
      boundStates(
        radialEquation(grid, (r) => curve.energyAt(r) - curve.limit, mass, rotation),
        0,
        most,
        0,
        guesses?.states.map(({ energy }) => energy),
      );
    const rows = statesOf(initial, Math.min(mostLevels, options.mostInitial ?? mostLevels), coarser?.rows);
    const columns = statesOf(final, mostLevels, coarser?.columns);
    const squares = (f: (distance: number) => number): Matrix => {
      const weights = integrationWeights(grid, f);
      return rows.states.map((row) =>
        columns.states.map((column) => integrateProduct(row, column, weights) ** 2),
      );
    };
    return {
      rows,
      columns,
      factors: squares(() => 1),
      strengths: transitionMoment && squares(transitionMoment),
      isComplete: rows.isComplete && columns.isComplete,
    };
  };

  let current = solve();
  let { factors, strengths } = current;
  let uncertainty = Number.POSITIVE_INFINITY;
  let termination: Termination = { kind: 'iterationLimit', limit: HALVINGS };
  for (let halving = 0; halving < HALVINGS && termination.kind !== 'converged'; halving++) {
    intervals *= 2;
    const finer = solve(current);
    const extrapolated = extrapolate(current.factors, finer.factors);
    uncertainty = halving > 0 ? largestChange(factors, extrapolated) : Number.POSITIVE_INFINITY;
    factors = extrapolated;
    strengths = finer.strengths && extrapolate(current.strengths, finer.strengths);
    current = finer;
    if (uncertainty <= tolerance && finer.isComplete) termination = { kind: 'converged' };
  }
  return {
    factors,
    strengths,
    sums: factors.map((row) => row.reduce((sum, factor) => sum + factor, 0)),
    uncertainty,
    termination,
  };
}

type Matrix = readonly (readonly number[])[];

interface SolvedOnGrid {
  readonly rows: BoundStates;
  readonly columns: BoundStates;
}

/** Richardson's extrapolation; what the coarser grid lacks stays as it is. */
function extrapolate(coarse: Matrix | undefined, fine: Matrix): Matrix {
  return fine.map((row, i) =>
    row.map((value, j) => value + (value - (coarse?.[i]?.[j] ?? value)) / FOURTH_POWER),
  );
}

/** Infinite where the number of levels changed. */
function largestChange(before: Matrix, after: Matrix): number {
  if (before.length !== after.length || before[0]?.length !== after[0]?.length)
    return Number.POSITIVE_INFINITY;
  return Math.max(0, ...after.flatMap((row, i) => row.map((factor, j) => Math.abs(factor - before[i][j]))));
}
