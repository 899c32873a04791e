import type { Estimate, ExcitedState } from '#engine';
import { HARTREE_IN_EV } from '#engine';
import { coordinateCell } from './findings-table';
import { fileGroup, type NamedResults } from './named-results';
import { coordinateScale, type ScannedCoordinate } from './scanned-coordinate';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

/** Levels of the lower and of the upper curve that are printed; all are in the results file. */
const LOWER_LEVELS = 4;
const UPPER_LEVELS = 10;
const EV_DECIMALS = 4;
const STRENGTH_DECIMALS = 4;
const FACTOR_DECIMALS = 5;
const SMALLEST_FACTOR = 10 ** -FACTOR_DECIMALS;

/** What was read off the curves of states above the lowest, a row a state. */
export function excitedTable(
  files: readonly NamedResults[],
  shared: ScannedCoordinate,
): TextTable | undefined {
  const rows = files.flatMap((file) => {
    const scale = coordinateScale(file.results, shared);
    return namedStates(file).map(({ title, state }) => [
      title,
      ...minimumCells(state, scale),
      electronvolts(state.vertical?.energy),
      state.vertical?.oscillatorStrength?.toFixed(STRENGTH_DECIMALS) ?? '',
      state.vertical?.transitionDipole?.toFixed(STRENGTH_DECIMALS) ?? '',
      electronvolts(state.adiabatic),
      electronvolts(state.zeroPointToZeroPoint),
      state.vibration?.kind === 'found' ? String(state.vibration.boundLevels) : '',
    ]);
  });
  if (rows.length === 0) return undefined;
  return {
    id: 'excited',
    heading: 'Read off the curves of higher states',
    columns: [
      { label: 'State', content: 'words' },
      { label: `Minimum (${shared.unit})` },
      { label: 'ωₑ (cm⁻¹)' },
      { groups: ['Vertical'], label: 'Energy (eV)' },
      { groups: ['Vertical'], label: 'f' },
      { groups: ['Vertical'], label: '|μ| (e·bohr)' },
      { label: 'Tₑ (eV)' },
      { label: 'T₀ (eV)' },
      { label: 'Bound levels' },
    ],
    rows,
    notes: [
      'Vertical: at the minimum of the lowest state, of CIS at that of RHF; f: oscillator strength in the length form; |μ|: length of the transition dipole moment. Tₑ: from minimum to minimum; T₀: from lowest level to lowest level. Transition moments along the scan are in the results file.',
    ],
  };
}

/** Franck–Condon factors of the transitions between the levels of the lowest state and of each excited one. */
export function franckCondonTables(file: NamedResults): readonly TextTable[] {
  return namedStates(file).flatMap(({ title, level, state: { curve, franckCondon } }) => {
    const factors = franckCondon?.factors ?? [];
    const count = Math.min(UPPER_LEVELS, factors[0]?.length ?? 0);
    // between wells far apart nothing is left of what is printed
    if (!franckCondon || !factors.some((row) => row.some((factor) => factor >= SMALLEST_FACTOR))) return [];
    const upper = Array.from({ length: count }, (_, v) => v);
    return [
      {
        id: ['franck-condon', ...fileGroup(file), level, String(curve + 1)].join('-'),
        heading: `Franck–Condon factors, ${title}`,
        columns: [
          { label: 'v″' },
          ...upper.map((v) => ({ groups: ['v′'], label: String(v) })),
          { label: 'all bound v′' },
        ],
        rows: factors
          .slice(0, LOWER_LEVELS)
          .map((row, v) => [
            String(v),
            ...upper.map((w) => row[w]?.toFixed(FACTOR_DECIMALS) ?? ''),
            franckCondon.sums[v]?.toFixed(FACTOR_DECIMALS) ?? '',
          ]),
        notes: [
          `v″ of the lowest state, v′ of the excited one, which has ${franckCondon.boundLevels} bound levels${franckCondon.converged ? '' : '; not converged'}.`,
        ],
      },
    ];
  });
}

/** An excited state as tables name it. */
export interface NamedState {
  /** with the file where there are several, and the level: `FCI 1 ¹Σu⁺` */
  readonly title: string;
  readonly level: string;
  readonly state: ExcitedState;
}

/** The excited states of a file, in the order of its levels. */
export function namedStates(file: NamedResults): readonly NamedState[] {
  const { study, findings, curves } = file.results;
  return study.levels.flatMap((level) =>
    (findings[level]?.excitedStates ?? []).map((state) => {
      const name = curves?.[level]?.[state.curve]?.name ?? `state ${state.curve + 1}`;
      return { title: [...fileGroup(file), `${level} ${name}`].join(', '), level, state };
    }),
  );
}

function minimumCells({ minimum, constants }: ExcitedState, scale: number): readonly string[] {
  return [
    minimum.kind === 'found'
      ? coordinateCell({ value: minimum.equilibriumDistance, uncertainty: minimum.uncertainty }, scale)
      : 'none',
    constants?.diatomic?.harmonicWavenumberPerCm.value.toFixed(1) ?? '',
  ];
}

const electronvolts = (energy: Estimate | undefined): string =>
  energy ? withMinus((energy.value * HARTREE_IN_EV).toFixed(EV_DECIMALS)) : '';
