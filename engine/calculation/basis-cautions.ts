import { shellFunctionCount } from '../basis/place-basis';
import { requireElement } from '../molecule/elements';
import type { PreparedStudy } from './prepare-study';
import { number, type RaisedCaution } from './raised-caution';

/** Sets that are minimal: no more functions on any atom than its occupied shells have. */
export function basisCautions({ basisSet, study }: PreparedStudy): RaisedCaution[] {
  const symbols = [...new Set(study.molecule.atoms.map(({ element }) => element))];
  const counts = symbols.map((symbol) => ({
    symbol,
    functions: basisSet.elements[symbol].reduce(
      (sum, { angularMomentum }) => sum + shellFunctionCount(angularMomentum, basisSet.harmonics),
      0,
    ),
    minimal: minimalFunctions(requireElement(symbol).atomicNumber),
  }));
  if (counts.some(({ functions, minimal }) => functions > minimal)) return [];
  return [
    {
      code: 'basis.minimal',
      message: `${basisSet.name} is a minimal basis: it has no more functions than the atoms have occupied shells.`,
      meaning:
        'It shows how the methods differ; its distances and well depths are not to be compared with measured ones.',
      remedy:
        'For numbers to be compared with measured ones, take a set with polarisation, as 6-31G* or cc-pVTZ.',
      numbers: counts.map(({ symbol, functions }) => number(`functions of ${symbol}`, functions)),
    },
  ];
}

/** 1s; 1s2s2p; 1s2s2p3s3p. */
function minimalFunctions(atomicNumber: number): number {
  if (atomicNumber <= 2) return 1;
  return atomicNumber <= 10 ? 5 : 9;
}
