import type { StudyResults, Vibration } from '#engine';
import { comparedConstants } from '../study/compared-constants';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

/** Levels printed from the lowest; the last follows. */
const FIRST_LEVELS = 10;
const LEVEL_DECIMALS = 2;
const ROTATION_DECIMALS = 4;

/**
 * Constants beside measured ones, and vibrational levels.
 *
 * @param file - name to tell several files apart, else empty
 */
export function spectroscopyTables(results: StudyResults, file: string): readonly TextTable[] {
  const of = file ? ` of ${file}` : '';
  return [...constantsTable(results, of), ...levelsTable(results, of)];
}

function constantsTable(results: StudyResults, of: string): readonly TextTable[] {
  const constants = comparedConstants(results);
  const levels = results.study.levels.filter((level) => constants.some(({ byLevel }) => byLevel.has(level)));
  if (levels.length === 0) return [];
  const isMeasured = constants.some(({ measured }) => measured);
  const rows = constants.map(({ symbol, name, unit, decimals, byLevel, measured }) => [
    `${symbol}, ${name} (${unit})`,
    ...levels.map((level) => {
      const value = byLevel.get(level);
      if (value === undefined) return '';
      const difference = measured ? ` (${signed(value - measured.value, decimals)})` : '';
      return withMinus(value.toFixed(decimals)) + difference;
    }),
    ...(isMeasured
      ? [measured ? withMinus(String(Number(measured.value.toFixed(decimals)))) : 'not known']
      : []),
  ]);
  const sources = [...new Set(constants.flatMap(({ measured }) => measured?.source ?? []))];
  return [
    {
      heading: `Constants${of}`,
      columns: ['Constant', ...levels, ...(isMeasured ? ['Measured'] : [])],
      rows,
      notes: [
        ...(isMeasured
          ? [`In brackets: computed minus measured. Measured values: ${sources.join('; ')}.`]
          : results.measured
            ? ['No measured constants of this molecule are on file.']
            : []),
      ],
    },
  ];
}

function levelsTable({ study, findings }: StudyResults, of: string): readonly TextTable[] {
  const found = study.levels.flatMap((level) => {
    const vibration = findings[level]?.vibration;
    return vibration?.kind === 'found' ? [{ level, vibration }] : [];
  });
  if (found.length === 0) return [];
  const most = Math.max(...found.map(({ vibration }) => vibration.levels.length));
  const rows = Array.from({ length: Math.min(most, FIRST_LEVELS) }, (_, v) => [
    String(v),
    ...found.flatMap(({ vibration }) => levelCells(vibration.levels[v])),
  ]);
  const hasMore = most > FIRST_LEVELS;
  const last = found.flatMap(({ vibration }) => {
    const state = vibration.levels.length > FIRST_LEVELS ? vibration.levels.at(-1) : undefined;
    const [energy = '', rotation = ''] = levelCells(state);
    return [state ? `v = ${state.v}: ${energy}` : '', rotation];
  });
  return [
    {
      heading: `Vibrational levels${of}`,
      columns: ['v', ...found.flatMap(({ level }) => [`${level}, G (cm⁻¹)`, `${level}, B (cm⁻¹)`])],
      rows: hasMore ? [...rows, ['last', ...last]] : rows,
      notes: [
        'G: energy above the minimum of the curve, without rotation; B: rotational constant of the level.',
        ...found.map(({ level, vibration }) => `${level}: ${vibrationText(vibration)}`),
      ],
    },
  ];
}

function levelCells(state: Found['levels'][number] | undefined): readonly [string, string] {
  if (!state) return ['', ''];
  return [
    state.energyPerCm.toFixed(LEVEL_DECIMALS),
    state.rotationalConstantPerCm.toFixed(ROTATION_DECIMALS),
  ];
}

type Found = Extract<Vibration, { readonly kind: 'found' }>;

/** How many levels there are and how far they are to be trusted. */
export function vibrationText({
  boundLevels,
  converged,
  interpolationErrorPerCm,
  beyondComputedRange,
}: Found): string {
  const [firstBeyond] = beyondComputedRange;
  return [
    `${boundLevels} bound ${boundLevels === 1 ? 'level' : 'levels'}`,
    `curve between its points uncertain by at most ${interpolationErrorPerCm.toPrecision(1)} cm⁻¹`,
    ...(firstBeyond === undefined ? [] : [`from v = ${firstBeyond} on partly beyond the computed points`]),
    ...(converged ? [] : ['not converged']),
  ].join('; ');
}

function signed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return text.startsWith('-') ? withMinus(text) : `+${text}`;
}
