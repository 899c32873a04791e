import type { LevelFindings, StudyResults, Vibration, VibrationalState } from '#engine';
import { type ComparedConstant, comparedConstants } from '../study/compared-constants';
import { fileGroup, type NamedResults } from './named-results';
import type { Citations } from './references';
import { ended } from './sentences';
import { withMinus } from './text-escapes';
import { NO_VALUE, type TableColumn, type TextTable } from './text-table';

/** Levels in the body of the report; where there are more, all of them are in an appendix. */
export const LEVELS_IN_BODY = 20;
const LEVEL_DECIMALS = 2;
const ROTATION_DECIMALS = 4;
const DISTORTION_DIGITS = 3;

/** Constants of every level beside measured ones, with differences. */
export function constantsTable(file: NamedResults, citations: Citations): TextTable | undefined {
  const { name, results } = file;
  const constants = comparedConstants(results);
  const levels = results.study.levels.filter((level) => constants.some(({ byLevel }) => byLevel.has(level)));
  if (levels.length === 0) return undefined;
  const isCompared = constants.some(({ measured }) => measured);
  const rows = constants.map(({ symbol, name: words, unit, decimals, byLevel, measured }) => [
    `${symbol}, ${words} (${unit})`,
    ...levels.map((level) => {
      const value = byLevel.get(level);
      return value === undefined ? '' : withMinus(value.toFixed(decimals));
    }),
    ...(isCompared ? [measured ? withMinus(measured.text) : ''] : []),
    ...(isCompared
      ? levels.map((level) => {
          const value = byLevel.get(level);
          return value === undefined || !measured ? '' : signed(value - measured.value, decimals);
        })
      : []),
  ]);
  return {
    id: name ? `constants-${name}` : 'constants',
    heading: `${isCompared ? 'Constants beside measured ones' : 'Constants'}${name && ` of ${name}`}`,
    columns: [
      { label: 'Constant', content: 'words' },
      ...levels.map((label) => ({ groups: ['Computed'], label })),
      ...(isCompared ? [{ label: 'Measured' }] : []),
      ...(isCompared ? levels.map((label) => ({ groups: ['Computed minus measured'], label })) : []),
    ],
    rows,
    notes: [
      ...(isCompared ? measuredNotes(constants, citations) : notMeasuredNotes(results)),
      ...withoutConstantsNotes(results),
    ],
  };
}

function measuredNotes(constants: readonly ComparedConstant[], citations: Citations): readonly string[] {
  const measured = constants.flatMap((constant) =>
    constant.measured ? [{ ...constant, ...constant.measured }] : [],
  );
  const sources = [...new Set(measured.flatMap(({ sources }) => sources))];
  const recalled = measured.filter(({ isRecalled }) => isRecalled).map(({ symbol }) => symbol);
  const workedOut = measured.flatMap(({ symbol, workedOutFrom }) =>
    workedOutFrom === undefined
      ? []
      : [`${symbol} = ${workedOutFrom === 'ωₑ' ? 'μ(2πcωₑ)²' : workedOutFrom}`],
  );
  const absent = constants.filter(({ whyNotMeasured }) => whyNotMeasured);
  const reasons = [...new Set(absent.map(({ whyNotMeasured }) => whyNotMeasured!))];
  return [
    `Measured values of the electronic ground state: ${sources.map((source) => `${source} ${citations.cite(source)}`).join('; ')}.`,
    ...(workedOut.length > 0 ? [`Worked out from measured constants: ${workedOut.join(', ')}.`] : []),
    ...(recalled.length > 0
      ? [`Recalled and not compared with the source since: ${recalled.join(', ')}.`]
      : []),
    ...reasons.map((reason) => {
      const symbols = absent.flatMap(({ symbol, whyNotMeasured }) =>
        whyNotMeasured === reason ? [symbol] : [],
      );
      return `${NO_VALUE} for ${symbols.join(', ')}: ${reason}.`;
    }),
  ];
}

function withoutConstantsNotes({ study, findings }: StudyResults): readonly string[] {
  return study.levels.flatMap((level) => {
    const reason = findings[level]?.constants?.withoutDiatomic;
    return reason ? [`${level}, spectroscopic constants: ${ended(reason)}`] : [];
  });
}

const notMeasuredNotes = ({ measured }: StudyResults): readonly string[] =>
  measured ? ['No measured constants of this molecule with these isotopes are on file.'] : [];

interface FoundLevels {
  readonly file: NamedResults;
  readonly level: string;
  readonly vibration: FoundVibration;
}
type FoundVibration = Extract<Vibration, { readonly kind: 'found' }>;

/**
 * Vibrational levels of all files: up to `most` from the lowest, and the last.
 *
 * @param most - default: all
 */
export function levelsTable(
  files: readonly NamedResults[],
  most = Number.POSITIVE_INFINITY,
): TextTable | undefined {
  const found = files.flatMap((file) =>
    file.results.study.levels.flatMap((level): FoundLevels[] => {
      const vibration = file.results.findings[level]?.vibration;
      return vibration?.kind === 'found' ? [{ file, level, vibration }] : [];
    }),
  );
  const reasons = files.flatMap(reasonsWithoutLevels);
  if (found.length === 0) return undefined;
  const count = Math.max(...found.map(({ vibration }) => vibration.levels.length));
  // files of earlier versions have no distortions
  const quantities = found.some(({ vibration }) =>
    vibration.levels.some(({ centrifugalDistortionPerCm }) => centrifugalDistortionPerCm !== undefined),
  )
    ? QUANTITIES
    : QUANTITIES.slice(0, 2);
  const cells = (state: VibrationalState | undefined) =>
    quantities.map(({ cell }) => (state ? cell(state) : ''));
  const rows = Array.from({ length: Math.min(count, most) }, (_, v) => [
    String(v),
    ...found.flatMap(({ vibration }) => cells(vibration.levels[v])),
  ]);
  if (count > most) {
    const last = found.flatMap(({ vibration }) =>
      cells(vibration.levels.length > most ? vibration.levels.at(-1) : undefined),
    );
    rows.push(['last', ...last]);
  }
  return {
    id: 'levels',
    heading: count > most ? 'Lowest levels without rotation' : 'Levels without rotation',
    columns: [
      { label: 'v' },
      ...found.flatMap(({ file, level }): TableColumn[] =>
        quantities.map(({ label }) => ({ groups: [...fileGroup(file), level], label })),
      ),
    ],
    rows,
    notes: [
      `${quantities.map(({ meaning }) => meaning).join('; ')}.`,
      ...found.map(
        ({ file, level, vibration }) =>
          `${[...fileGroup(file), level].join(', ')}: ${vibrationText(vibration)}.`,
      ),
      ...reasons,
    ],
  };
}

function reasonsWithoutLevels({ name, results }: NamedResults): readonly string[] {
  return results.study.levels.flatMap((level) => {
    const vibration: LevelFindings['vibration'] = results.findings[level]?.vibration;
    return vibration?.kind === 'none'
      ? [`${[...(name ? [name] : []), level].join(', ')}: no levels. ${vibration.reason}`]
      : [];
  });
}

const QUANTITIES: readonly {
  readonly label: string;
  readonly meaning: string;
  readonly cell: (state: VibrationalState) => string;
}[] = [
  {
    label: 'G (cm⁻¹)',
    meaning: 'G: energy above the minimum of the curve',
    cell: ({ energyPerCm }) => energyPerCm.toFixed(LEVEL_DECIMALS),
  },
  {
    label: 'B (cm⁻¹)',
    meaning: 'B: rotational constant',
    cell: ({ rotationalConstantPerCm }) => rotationalConstantPerCm.toFixed(ROTATION_DECIMALS),
  },
  {
    label: 'D (cm⁻¹)',
    meaning: 'D: centrifugal distortion',
    cell: ({ centrifugalDistortionPerCm: value }) =>
      value === undefined ? '' : withMinus(plainDigits(value, DISTORTION_DIGITS)),
  },
];

/** So many digits, never in powers of ten. */
function plainDigits(value: number, digits: number): string {
  if (value === 0) return '0';
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));
  return value.toFixed(Math.min(decimals, 12));
}

/** How many levels there are and how far they are to be trusted. */
export function vibrationText({
  boundLevels,
  converged,
  interpolationErrorPerCm,
  beyondComputedRange,
}: FoundVibration): string {
  const [firstBeyond] = beyondComputedRange;
  return [
    `${boundLevels} bound ${boundLevels === 1 ? 'level' : 'levels'}`,
    `curve between its points uncertain by at most ${interpolationErrorPerCm.toPrecision(1)} cm⁻¹`,
    ...(firstBeyond === undefined ? [] : [`from v = ${firstBeyond} on partly beyond the computed points`]),
    ...(converged ? [] : ['not converged']),
  ].join('; ');
}

export function signed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return text.startsWith('-') ? withMinus(text) : `+${text}`;
}
