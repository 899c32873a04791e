import type { BasisSetLimit, Estimate, StudyInBasis, StudyResults } from '#engine';
import { coordinateText } from '../calculation/coordinate-text';
import { minimumText } from './minimum-text';
import { counted } from './wording';

/** What a study gives in its further bases, and what all of them tend to. */
export function basesLines({ study, furtherBases = [], basisSetLimit }: StudyResults): readonly string[] {
  if (!study.scan) return [];
  return [
    ...furtherBases.flatMap(({ basis, findings }) =>
      study.levels.flatMap((level) => {
        const text = findings[level] && minimumText(findings[level], study);
        return text === undefined ? [] : [`${level} in ${basis.name}: ${text}`];
      }),
    ),
    ...(basisSetLimit ? limitLines(basisSetLimit, study) : []),
  ];
}

/** How many energies are missing in further bases, by basis. */
export function unconvergedInBases({ furtherBases = [] }: StudyResults): readonly string[] {
  return furtherBases.flatMap(({ basis, levels }: StudyInBasis) =>
    Object.entries(levels).flatMap(([level, { energies }]) => {
      const missing = energies.filter((energy) => energy === null).length;
      return missing === 0
        ? []
        : [`${level} did not converge in ${basis.name} at ${counted(missing, 'point')}.`];
    }),
  );
}

function limitLines(limit: BasisSetLimit, study: StudyResults['study']): readonly string[] {
  if (limit.kind === 'none') return [`No basis-set limit: ${limit.reason}`];
  return Object.entries(limit.levels).flatMap(([level, { curve }]) => {
    if (curve?.kind !== 'found') return [];
    const { equilibriumDistance: place, energy, wellDepth } = curve;
    const distance = coordinateText(study, Number(place.value.toFixed(4)));
    const depth = wellDepth ? `, ${estimateText(wellDepth)} hartree below separate fragments` : '';
    return [
      `${level} in the limit of ${limit.family}: minimum of ${estimateText(energy)} hartree at ${distance}${depth}`,
    ];
  });
}

/** `1.1753 ± 0.0010`: to two digits of the uncertainty */
function estimateText({ value, uncertainty }: Estimate): string {
  const decimals = Math.min(10, Math.max(0, 1 - Math.floor(Math.log10(uncertainty || 1e-10))));
  return `${value.toFixed(decimals)} ± ${uncertainty.toFixed(decimals)}`;
}
