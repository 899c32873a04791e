import type { LevelFindings, StudyResults } from '#engine';
import { coordinateText } from '../calculation/coordinate-text';
import { depthReference } from '../study/fragments-text';

/** Where a level has its minimum and how deep it is; undefined where there is nothing to say. */
export function minimumText(findings: LevelFindings, study: StudyResults['study']): string | undefined {
  const { minimum } = findings;
  switch (minimum.kind) {
    case 'found': {
      const distance = coordinateText(study, Number(minimum.equilibriumDistance.toFixed(5)));
      const kink = minimum.onKink
        ? ` (no smooth curve there: known to ${coordinateText(study, Number(minimum.uncertainty.toPrecision(2)))})`
        : '';
      return `minimum of ${minimum.energy.toFixed(6)} hartree at ${distance}${kink}${depthText(findings, study)}`;
    }
    case 'atEdge':
      return `lowest at the end of the range, ${coordinateText(study, minimum.coordinate)}: no minimum inside`;
    case 'several':
      return `several minima, near ${minimum.near.map((value) => coordinateText(study, value)).join(' and ')}`;
    case 'none':
      return study.scan && 'bonds' in study.scan.coordinate
        ? `no minimum: ${minimum.reason.replace(/\.$/, '')}`
        : undefined;
  }
}

function depthText(
  { wellDepth, dissociation, counterpoise }: LevelFindings,
  study: StudyResults['study'],
): string {
  if (!wellDepth) return '';
  const below = depthReference(
    study.molecule,
    wellDepth,
    dissociation,
    (x) => `the curve at ${coordinateText(study, x)}`,
  );
  const corrected =
    counterpoise?.kind === 'found' ? `, ${counterpoise.wellDepth.toFixed(6)} with counterpoise` : '';
  return `, ${wellDepth.value.toFixed(6)} hartree below ${below}${corrected}`;
}
