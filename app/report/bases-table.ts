import {
  type Estimate,
  type LevelFindings,
  type LimitCurve,
  basisSetLimit as limitOf,
  type StudyResults,
  studiesInBases,
} from '#engine';
import { chosenPoints } from './chosen-points';
import { coordinateCell } from './findings-table';
import { fileGroup, type NamedResults } from './named-results';
import { coordinateScale, coordinateText, type ScannedCoordinate } from './scanned-coordinate';
import { ended } from './sentences';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

const ENERGY_DECIMALS = 6;

/** The findings of a study in each of its bases and in the limit that they tend to; a row a level and basis. */
export function basesTable(files: readonly NamedResults[], shared: ScannedCoordinate): TextTable | undefined {
  const compared = studiesCompared(files);
  if (compared.length === 0) return undefined;
  return {
    id: 'bases',
    heading: 'The same study in several bases',
    columns: [
      { label: 'Level', content: 'words' },
      { label: 'Basis', content: 'words' },
      { label: 'Functions' },
      { label: `Minimum (${shared.unit})` },
      { label: 'Energy there (hartree)' },
      { label: 'Well depth (hartree)' },
      { label: 'ωₑ (cm⁻¹)' },
    ],
    rows: compared.flatMap((file) => rowsOf(file, coordinateScale(file.results, shared))),
    notes: compared.flatMap(({ results }) => notesOf(results)),
  };
}

/** Energies that a systematic family of bases tends to, at some places from the minimum outwards. */
export function limitTable(files: readonly NamedResults[], shared: ScannedCoordinate): TextTable | undefined {
  const rows = studiesCompared(files).flatMap((file) => {
    const { study, points, basisSetLimit: limit } = file.results;
    if (limit?.kind !== 'found') return [];
    const scale = coordinateScale(file.results, shared);
    return study.levels.flatMap((level) =>
      chosenPoints(file.results).flatMap((point) => {
        const energy = limit.levels[level]?.energies[points.indexOf(point)];
        const place =
          point.coordinate === null ? 'as given' : coordinateText(point.coordinate * scale, '').trim();
        return energy ? [[[...fileGroup(file), level].join(', '), place, withSpread(energy)]] : [];
      }),
    );
  });
  if (rows.length === 0) return undefined;
  return {
    id: 'limit',
    heading: 'Energies in the limit of the basis',
    columns: [
      { label: 'Level', content: 'words' },
      { label: shared.unit ? `${shared.label} (${shared.unit})` : shared.label },
      { label: 'Energy (hartree)' },
    ],
    rows,
    notes: [],
  };
}

/** Studies that were run in several bases, or whose files differ in nothing but their bases. */
function studiesCompared(files: readonly NamedResults[]): readonly NamedResults[] {
  const inBases = files.filter(({ results }) => (results.furtherBases ?? []).length > 0);
  const [first] = files;
  if (inBases.length > 0 || first === undefined || files.length === 1) return inBases;
  const [study, ...furtherBases] = studiesInBases(files.map(({ results }) => results)) ?? [];
  if (study === undefined || furtherBases.length === 0) return [];
  const { basis, findings } = study;
  const basisSetLimit = limitOf([study, ...furtherBases]);
  return [{ name: '', results: { ...first.results, basis, findings, furtherBases, basisSetLimit } }];
}

function rowsOf(file: NamedResults, scale: number): readonly (readonly string[])[] {
  const { study, basis, findings, furtherBases = [], basisSetLimit } = file.results;
  return study.levels.flatMap((level) => {
    const name = [...fileGroup(file), level].join(', ');
    const limit = basisSetLimit?.kind === 'found' ? basisSetLimit.levels[level]?.curve : undefined;
    return [
      ...[{ basis, findings }, ...furtherBases].flatMap((one) => {
        const found = one.findings[level];
        return found && level !== 'CIS'
          ? [[name, one.basis.name, String(one.basis.functions), ...findingCells(found, scale)]]
          : [];
      }),
      ...(limit && basisSetLimit?.kind === 'found'
        ? [[name, `limit of ${basisSetLimit.family}`, '', ...limitCells(limit, scale)]]
        : []),
    ];
  });
}

function findingCells({ minimum, wellDepth, constants }: LevelFindings, scale: number): readonly string[] {
  return [
    ...(minimum.kind === 'found'
      ? [
          coordinateCell({ value: minimum.equilibriumDistance, uncertainty: minimum.uncertainty }, scale),
          withMinus(minimum.energy.toFixed(ENERGY_DECIMALS)),
        ]
      : ['none', '']),
    wellDepth ? withMinus(wellDepth.value.toFixed(ENERGY_DECIMALS)) : '',
    constants?.diatomic?.harmonicWavenumberPerCm.value.toFixed(1) ?? '',
  ];
}

function limitCells(limit: LimitCurve, scale: number): readonly string[] {
  if (limit.kind === 'none') return ['none', '', '', ''];
  const { equilibriumDistance, energy, wellDepth, constants } = limit;
  return [
    withSpread({
      value: equilibriumDistance.value * scale,
      uncertainty: equilibriumDistance.uncertainty * scale,
    }),
    withSpread(energy),
    wellDepth ? withSpread(wellDepth) : '',
    constants.diatomic ? withSpread(constants.diatomic.harmonicWavenumberPerCm) : '',
  ];
}

/** `0.7413 ± 0.0002`: two digits of the uncertainty. */
function withSpread({ value, uncertainty }: Estimate): string {
  const decimals = Math.min(
    ENERGY_DECIMALS,
    Math.max(0, 1 - Math.floor(Math.log10(Math.max(uncertainty, 10 ** -ENERGY_DECIMALS)))),
  );
  return `${withMinus(value.toFixed(decimals))} ± ${uncertainty.toFixed(decimals)}`;
}

function notesOf({ basisSetLimit, study }: StudyResults): readonly string[] {
  if (!basisSetLimit) return [];
  if (basisSetLimit.kind === 'none') return [`No basis-set limit: ${ended(basisSetLimit.reason)}`];
  const reasons = study.levels.flatMap((level) => {
    const curve = basisSetLimit.levels[level]?.curve;
    return curve?.kind === 'none' ? [`${level}, limit: ${ended(curve.reason)}`] : [];
  });
  return [
    `Limit: Hartree–Fock and correlation energy extrapolated by themselves from ${basisSetLimit.members.map(({ name }) => name).join(', ')}; after ± half the spread of the formulas in use, and at least what extrapolation added to Hartree–Fock, of correlated levels a third of it.`,
    ...reasons,
  ];
}
