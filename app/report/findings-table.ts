import type { Estimate, LevelFindings, StudyResults } from '#engine';
import { depthReference } from '../study/fragments-text';
import { fileGroup, type NamedResults } from './named-results';
import { coordinateScale, coordinateText, type ScannedCoordinate } from './scanned-coordinate';
import { ended, percent } from './sentences';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

const ENERGY_DECIMALS = 6;
const FEWEST_DISTANCE_DECIMALS = 2;
const MOST_DISTANCE_DECIMALS = 6;

/** A level of a file with what was read off its curve. */
interface ReadLevel {
  readonly level: string;
  readonly results: StudyResults;
  readonly findings: LevelFindings;
  /** its own lengths → those of the report */
  readonly scale: number;
  readonly unit: string;
}

interface FindingsRow {
  readonly label: (unit: string, levels: readonly ReadLevel[]) => string;
  /** empty where there is nothing of the kind */
  readonly cell: (level: ReadLevel) => string;
}

const ROWS: readonly FindingsRow[] = [
  {
    label: (unit) => `Minimum (${unit})`,
    cell: ({ findings: { minimum }, scale, unit }) => {
      switch (minimum.kind) {
        case 'found':
          return coordinateCell(
            { value: minimum.equilibriumDistance, uncertainty: minimum.uncertainty },
            scale,
          );
        case 'atEdge':
          return `at the edge, ${coordinateText(minimum.coordinate * scale, unit)}`;
        case 'several':
          return `several, near ${minimum.near.map((place) => coordinateText(place * scale, unit)).join(', ')}`;
        case 'none':
          return 'none';
      }
    },
  },
  {
    label: (unit) => `Higher minima (${unit})`,
    cell: ({ findings: { minimum }, scale }) =>
      minimum.kind === 'found'
        ? (minimum.others ?? [])
            .map(({ equilibriumDistance: value, uncertainty }) =>
              coordinateCell({ value, uncertainty }, scale),
            )
            .join(', ')
        : '',
  },
  {
    label: () => 'Energy there (hartree)',
    cell: ({ findings: { minimum } }) => (minimum.kind === 'found' ? energyCell(minimum.energy) : ''),
  },
  {
    label: () => 'Well depth (hartree)',
    cell: ({ findings: { wellDepth } }) => (wellDepth ? energyCell(wellDepth.value) : ''),
  },
  {
    label: () => 'Well depth is against',
    cell: ({ findings: { wellDepth, dissociation }, results, scale, unit }) => {
      if (!wellDepth) return '';
      return depthReference(results.study.molecule, wellDepth, dissociation, (x) =>
        coordinateText(x * scale, unit),
      );
    },
  },
  {
    label: () => 'Last point above separate fragments (hartree)',
    cell: ({ findings: { dissociation } }) =>
      dissociation?.kind === 'found' && dissociation.farEndAbove !== undefined
        ? energyCell(dissociation.farEndAbove)
        : '',
  },
  {
    label: () => 'Counterpoise error (hartree)',
    cell: ({ findings: { counterpoise } }) =>
      counterpoise?.kind === 'found' ? energyCell(counterpoise.error) : '',
  },
  {
    label: () => 'Well depth less that error (hartree)',
    cell: ({ findings: { counterpoise } }) =>
      counterpoise?.kind === 'found' ? energyCell(counterpoise.wellDepth) : '',
  },
  {
    label: (unit) => `RHF unstable from (${unit})`,
    cell: ({ findings: { instabilityOnset: onset }, scale }) =>
      onset?.kind === 'found'
        ? coordinateCell({ value: onset.coordinate, uncertainty: onset.uncertainty }, scale)
        : '',
  },
  {
    label: (unit, levels) => {
      const threshold = levels.find(({ findings }) => findings.referenceWeight)?.findings.referenceWeight
        ?.threshold;
      return `Reference weight below ${percent(threshold ?? 0)} from (${unit})`;
    },
    cell: ({ findings: { referenceWeight: weight }, scale }) =>
      weight?.kind === 'found'
        ? coordinateCell({ value: weight.coordinate, uncertainty: weight.uncertainty }, scale)
        : '',
  },
];

/** What was read off the curves, a column a level; undefined where nothing could be. */
export function findingsTable(
  files: readonly NamedResults[],
  shared: ScannedCoordinate,
): TextTable | undefined {
  const columns = files.flatMap((file) => {
    const { results } = file;
    return results.study.levels.flatMap((level) => {
      const findings = results.findings[level];
      // the curves of CIS are excited states only
      if (!findings || level === 'CIS') return [];
      const scale = coordinateScale(results, shared);
      return [{ file, read: { level, results, findings, scale, unit: shared.unit } }];
    });
  });
  if (columns.length === 0) return undefined;
  const rows = ROWS.map(({ label, cell }) => [
    label(
      shared.unit,
      columns.map(({ read }) => read),
    ),
    ...columns.map(({ read }) => cell(read)),
  ]).filter(([, ...cells]) => cells.some((cell) => cell !== ''));
  return {
    id: 'findings',
    heading: 'Read off the curves',
    columns: [
      { label: 'Finding', content: 'words' },
      ...columns.map(({ file, read }) => ({ groups: fileGroup(file), label: read.level })),
    ],
    rows,
    notes: columns.flatMap(({ file, read }) =>
      notesOf(read).map((note) => `${file.name && `${file.name}, `}${note}`),
    ),
  };
}

function notesOf({ level, findings }: ReadLevel): readonly string[] {
  const { minimum, dissociation, counterpoise } = findings;
  return [
    ...(minimum.kind === 'none' ? [`${level}, minimum: ${ended(minimum.reason)}`] : []),
    ...(minimum.kind === 'found' && minimum.onKink
      ? [
          `${level}, minimum: the energies around it lie on no smooth curve, so that it is less sure than others.`,
        ]
      : []),
    ...(dissociation?.kind === 'none' ? [`${level}, separate fragments: ${ended(dissociation.reason)}`] : []),
    ...(counterpoise?.kind === 'none' ? [`${level}, counterpoise: ${ended(counterpoise.reason)}`] : []),
  ];
}

const energyCell = (energy: number): string => withMinus(energy.toFixed(ENERGY_DECIMALS));

/** With as many decimals as the uncertainty leaves. */
export function coordinateCell({ value, uncertainty }: Estimate, scale: number): string {
  const digits = Math.ceil(-Math.log10(Math.max(uncertainty * scale, Number.MIN_VALUE)));
  const decimals = Math.min(MOST_DISTANCE_DECIMALS, Math.max(FEWEST_DISTANCE_DECIMALS, digits));
  return withMinus((value * scale).toFixed(decimals));
}
