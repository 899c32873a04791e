import type { EnergiesInBasis, StudyInBasis } from './basis-comparison';
import type { LevelResult, StudyResults } from './result';

/** What is compared between bases of a study computed in one of them. */
export function studyInBasis(
  results: Pick<StudyResults, 'study' | 'basis' | 'points' | 'findings' | 'cautions'>,
): StudyInBasis {
  const { study, basis, points, findings, cautions } = results;
  const levels = study.levels.map((level) => [
    level,
    energiesInBasis(points.map(({ levels: ofPoint }) => ofPoint[level])),
  ]);
  return { basis, levels: Object.fromEntries(levels), findings, cautions };
}

/**
 * The bases of one study that several results files hold: each file's own one and its further ones, without repeats.
 *
 * @returns undefined where the files differ in more than their bases
 */
export function studiesInBases(all: readonly StudyResults[]): readonly StudyInBasis[] | undefined {
  const [first, ...others] = all.map(({ study }) => sameButBasis(study));
  if (others.some((other) => other !== first)) return undefined;
  const known = new Map<string, StudyInBasis>();
  for (const study of all.flatMap((results) => [studyInBasis(results), ...(results.furtherBases ?? [])])) {
    const { harmonics, shells } = study.basis;
    const numbers = JSON.stringify([harmonics, shells]);
    if (!known.has(numbers)) known.set(numbers, study);
  }
  return [...known.values()];
}

/** All that a study says but its bases, words and what is read off besides. */
function sameButBasis(study: StudyResults['study']): string {
  const { molecule, scan, levels, states, frozenCore, active, orbitals } = study;
  return JSON.stringify([molecule, scan, levels, states, frozenCore, active, orbitals ?? 'restricted']);
}

function energiesInBasis(results: readonly (LevelResult | undefined)[]): EnergiesInBasis {
  const isCorrelated = results.some((result) => result !== undefined && 'correlation' in result);
  return {
    energies: results.map((result) => (result?.converged ? lowestEnergy(result) : null)),
    ...(isCorrelated && {
      correlation: results.map((result) =>
        result?.converged && 'correlation' in result ? result.correlation : null,
      ),
    }),
  };
}

function lowestEnergy(result: LevelResult): number | null {
  if (result.kind === 'singles') return result.states[0]?.energy ?? null;
  return 'energy' in result ? result.energy : null;
}
