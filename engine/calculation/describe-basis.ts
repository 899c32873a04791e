import type { BasisSet } from '../basis/basis-set';
import { findBasisSet, listBasisSets } from '../basis/library-index';
import { placeBasis, shellFunctionCount } from '../basis/place-basis';
import type { PreparedStudy } from './prepare-study';
import type { BasisDescription } from './result';

/** The basis of a study as the results file records it. */
export function describeBasisUsed(prepared: PreparedStudy): BasisDescription {
  const molecule = prepared.moleculeAt(prepared.coordinates[0]);
  const description = describe(prepared.basisSet, placeBasis(prepared.basisSet, molecule).functionCount);
  if (!prepared.scalable) return description;
  return {
    ...description,
    notes: [
      ...description.notes,
      'Scale factors are optimised at every point, which names its own; the shells here have those that the search starts from.',
    ],
  };
}

/**
 * A basis set from the library, for all elements that it has; `functions` counts one atom of each.
 *
 * @throws EngineError `basis.unknown`
 */
export function describeBasis(name: string): BasisDescription {
  const { name: fullName } = findBasisSet(name, []);
  const entry = listBasisSets().find((candidate) => candidate.name === fullName);
  const basisSet = findBasisSet(fullName, entry?.elements ?? []);
  const functions = Object.values(basisSet.elements)
    .flat()
    .reduce((sum, shell) => sum + shellFunctionCount(shell.angularMomentum, basisSet.harmonics), 0);
  return describe(basisSet, functions);
}

function describe(basisSet: BasisSet, functions: number): BasisDescription {
  return {
    name: basisSet.name,
    harmonics: basisSet.harmonics,
    functions,
    shells: basisSet.elements,
    citations: basisSet.citations.map((citation) => citation.text),
    notes: basisSet.notes,
  };
}
