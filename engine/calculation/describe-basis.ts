import { placeBasis, shellFunctionCount } from '../basis/place-basis';
import type { BasisSet } from '../basis/basis-set';
import type { PreparedStudy } from './prepare-study';
import type { BasisDescription } from './result';

/** The basis of a study as the results file records it. */
export function describeBasisUsed(prepared: PreparedStudy): BasisDescription {
  const molecule = prepared.moleculeAt(prepared.coordinates[0]);
  return describe(prepared.basisSet, placeBasis(prepared.basisSet, molecule).functionCount);
}

/** A basis set by itself: `functions` counts one atom of each element. */
export function describeBasisSet(basisSet: BasisSet): BasisDescription {
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
