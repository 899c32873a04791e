import type { LevelResult, PointResult, SpinName, StateSymmetry } from '#engine';

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
  /** as in the header of tables: `RHF`, `CIS singlet 1`, `FCI state 2` */
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
}

/**
 * The energies of a study in the order of tables: every level in study order (CIS, which has no ground state
 * of its own, as its singlets and triplets), then the further states of correlated levels.
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
  const statesOf = (result: LevelResult | undefined) => (result?.kind === 'correlated' ? result.states : []);
  const count = Math.max(0, ...results.points.map(({ levels }) => statesOf(levels[level]).length));
  return Array.from({ length: Math.max(0, count - 1) }, (_, index) => ({
    label: `${level} state ${index + 2}`,
    family: `${level}, higher states`,
    level,
    isExcited: true,
    entryAt: ({ levels }) => stateEntry(levels[level], statesOf(levels[level])[index + 1]),
  }));
}

function stateEntry(
  result: LevelResult | undefined,
  state: { readonly energy: number; readonly spin: SpinName; readonly symmetry?: StateSymmetry } | undefined,
): EnergyEntry | undefined {
  if (!result || !state) return undefined;
  const { energy, spin, symmetry } = state;
  return { energy, converged: result.converged, spin, ...(symmetry && { symmetry }) };
}
