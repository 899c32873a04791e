import type { LevelResult, PointResult, SpinName, StateCurve, StateSymmetry, StudyResults } from '#engine';

/** The energy of one state of one level at one point. */
export interface EnergyEntry {
  /** hartree; the last value of the iteration where it did not converge */
  readonly energy: number;
  readonly converged: boolean;
  /** energy minus the RHF energy; lowest states of correlated levels only */
  readonly correlation?: number;
  readonly spin?: SpinName;
  readonly symmetry?: StateSymmetry;
}

/** One energy that a study gives at every point: the lowest state of a level, or a further one. */
export interface EnergyColumn {
  /** as in the header of tables: `RHF`, `CIS 1 ¹Σu⁺`; where states are not followed `CIS singlet 1`, `FCI state 2` */
  readonly label: string;
  /** what it shares with others of its kind: `RHF`, `CIS singlets`, `FCI, higher states` */
  readonly family: string;
  readonly level: string;
  readonly isExcited: boolean;
  /** undefined where the level has no number at that point */
  readonly entryAt: (point: PointResult) => EnergyEntry | undefined;
}

/** What is needed of results; a computation under way has it too. */
export interface EnergyTable {
  readonly study: { readonly levels: readonly string[] };
  readonly points: readonly PointResult[];
  /** absent as long as the scan is not complete: states are then taken by order of energy */
  readonly curves?: StudyResults['curves'];
}

/**
 * The energies of a study in the order of tables: every level in study order (CIS, which has no ground state
 * of its own, as its singlets and triplets), then the further states of correlated levels. The column of a level is its
 * lowest state at every point; every other column is one state along the scan.
 */
export function energyColumns(results: EnergyTable): readonly EnergyColumn[] {
  const { levels } = results.study;
  return [
    ...levels.flatMap((level) => (level === 'CIS' ? singlesColumns(results, level) : [lowestState(level)])),
    ...levels.flatMap((level) => furtherStates(results, level)),
  ];
}

function lowestState(level: string): EnergyColumn {
  return {
    label: level,
    family: level,
    level,
    isExcited: false,
    entryAt: ({ levels }) => {
      const result = levels[level];
      if (result?.kind === 'hartreeFock') return { energy: result.energy, converged: result.converged };
      if (result?.kind === 'perturbation') {
        const { energy, converged, correlation } = result;
        return { energy, converged, correlation };
      }
      if (result?.kind !== 'correlated') return undefined;
      const { energy, converged, correlation, spin, symmetry } = result;
      return { energy, converged, correlation, spin, ...(symmetry && { symmetry }) };
    },
  };
}

function singlesColumns(results: EnergyTable, level: string): EnergyColumn[] {
  const curves = results.curves?.[level];
  if (curves) {
    const columns = curves.map((curve) => ({ curve, spin: spinOf(results.points, level, curve) }));
    return (['singlet', 'triplet'] as const).flatMap((spin) =>
      columns
        .filter((column) => column.spin === spin)
        .map(({ curve }) => curveColumn(results, level, curve, `${level} ${spin}s`)),
    );
  }
  return (['singlet', 'triplet'] as const).flatMap((spin) => {
    const ofSpin = (result: LevelResult | undefined) =>
      result?.kind === 'singles' ? result.states.filter((state) => state.spin === spin) : [];
    const count = Math.max(0, ...results.points.map(({ levels }) => ofSpin(levels[level]).length));
    return Array.from({ length: count }, (_, index) => ({
      label: `${level} ${spin} ${index + 1}`,
      family: `${level} ${spin}s`,
      level,
      isExcited: true,
      entryAt: ({ levels }: PointResult) => stateEntry(levels[level], ofSpin(levels[level])[index]),
    }));
  });
}

function furtherStates(results: EnergyTable, level: string): EnergyColumn[] {
  if (level === 'CIS') return [];
  const curves = results.curves?.[level];
  if (curves) {
    return curves
      .filter(({ states }) => states.some((place) => place !== null && place > 0))
      .map((curve) => curveColumn(results, level, curve, `${level}, higher states`));
  }
  const count = Math.max(0, ...results.points.map(({ levels }) => statesOf(levels[level]).length));
  return Array.from({ length: Math.max(0, count - 1) }, (_, index) => ({
    label: `${level} state ${index + 2}`,
    family: `${level}, higher states`,
    level,
    isExcited: true,
    entryAt: ({ levels }) => stateEntry(levels[level], statesOf(levels[level])[index + 1]),
  }));
}

/** One state along the scan, even where it is the lowest of its level for a part of it. */
function curveColumn(
  { points }: EnergyTable,
  level: string,
  { name, states }: StateCurve,
  family: string,
): EnergyColumn {
  const placeAt = new Map(points.map((point, index) => [point, states[index]]));
  return {
    label: `${level} ${name}`,
    family,
    level,
    isExcited: true,
    entryAt: (point) => {
      const place = placeAt.get(point);
      const result = point.levels[level];
      return place == null ? undefined : stateEntry(result, statesOf(result)[place]);
    },
  };
}

function spinOf(points: readonly PointResult[], level: string, { states }: StateCurve): SpinName | undefined {
  const index = states.findIndex((place) => place !== null);
  const place = states[index];
  return place == null ? undefined : statesOf(points[index]?.levels[level])[place]?.spin;
}

const statesOf = (result: LevelResult | undefined) =>
  result?.kind === 'correlated' || result?.kind === 'singles' ? result.states : [];

function stateEntry(
  result: LevelResult | undefined,
  state: { readonly energy: number; readonly spin: SpinName; readonly symmetry?: StateSymmetry } | undefined,
): EnergyEntry | undefined {
  if (!result || !state) return undefined;
  const { energy, spin, symmetry } = state;
  return { energy, converged: result.converged, spin, ...(symmetry && { symmetry }) };
}
