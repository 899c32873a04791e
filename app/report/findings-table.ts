import type { LevelFindings, StudyMolecule, StudyResults } from '#engine';
import { fragmentsText } from '../study/fragments-text';
import { coordinateText } from './scanned-coordinate';

/** What was read off the curves, a row a level, as text to be printed. */
export interface FindingsRow {
  readonly file: string;
  readonly level: string;
  readonly minimum: string;
  /** hartree */
  readonly energyAtMinimum: string;
  /** hartree, with what it is against: the far end of the curve or separate fragments */
  readonly depth: string;
  /** where RHF becomes unstable towards different orbitals for different spins */
  readonly onset: string;
}

export const FINDINGS_HEADINGS = [
  'Level',
  'Minimum',
  'Energy there (hartree)',
  'Well depth (hartree)',
  'Onset of instability',
] as const;

const ENERGY_DECIMALS = 6;
const FEWEST_DISTANCE_DECIMALS = 2;
const MOST_DISTANCE_DECIMALS = 6;

export function findingsRows(results: StudyResults, file: string, unit: string): readonly FindingsRow[] {
  return results.study.levels.flatMap((level): FindingsRow[] => {
    const findings = results.findings[level];
    // its curves are excited states only
    if (!findings || level === 'CIS') return [];
    const { minimum, wellDepth, instabilityOnset } = findings;
    return [
      {
        file,
        level,
        minimum: minimumText(minimum, unit),
        energyAtMinimum: minimum.kind === 'found' ? minimum.energy.toFixed(ENERGY_DECIMALS) : '',
        depth: wellDepth
          ? `${wellDepth.value.toFixed(ENERGY_DECIMALS)} (${depthLimitText(results.study.molecule, findings, unit)})`
          : '',
        onset:
          instabilityOnset?.kind === 'found'
            ? `${withUncertainty(instabilityOnset.coordinate, instabilityOnset.uncertainty)} ${unit}`
            : '',
      },
    ];
  });
}

function depthLimitText(
  molecule: StudyMolecule,
  { wellDepth, dissociation }: LevelFindings,
  unit: string,
): string {
  if (wellDepth?.against === 'fragments' && dissociation?.kind === 'found') {
    return `against ${fragmentsText(molecule, dissociation)}`;
  }
  return wellDepth ? `at ${coordinateText(wellDepth.farEnd, unit)}` : '';
}

/** As many decimals as the uncertainty leaves. */
function withUncertainty(coordinate: number, uncertainty: number): string {
  const digits = Math.ceil(-Math.log10(Math.max(uncertainty, Number.MIN_VALUE)));
  return coordinate.toFixed(Math.min(MOST_DISTANCE_DECIMALS, Math.max(FEWEST_DISTANCE_DECIMALS, digits)));
}

function minimumText(minimum: LevelFindings['minimum'], unit: string): string {
  switch (minimum.kind) {
    case 'found':
      return `${withUncertainty(minimum.equilibriumDistance, minimum.uncertainty)} ${unit}`;
    case 'atEdge':
      return `lowest at the edge of the range, ${coordinateText(minimum.coordinate, unit)}`;
    case 'several':
      return `several, near ${minimum.near.map((place) => coordinateText(place, unit)).join(', ')}`;
    case 'none':
      return `none: ${minimum.reason}`;
  }
}
