import { EngineError } from '../errors';
import type { BasisRequest } from './basis-request';
import type { BasisSet } from './basis-set';
import { elementMissing } from './element-missing';
import { evenTemperedBasisSet, explicitBasisSet } from './explicit-basis';
import { findBasisSet } from './library-index';
import { parseMolssiBasis } from './molssi-import';

/**
 * The basis set that a study asks for, for the elements of its molecule.
 *
 * @param symbols - of the molecule's atoms; repeats do no harm
 * @param options - `fileText`: content of the file that a `{ file }` request names, which the caller reads
 * @throws EngineError `basis.unknown`, `.elementMissing`, `.scaleFactor`, `.shell`, `.file`
 */
export function resolveBasis(
  request: BasisRequest,
  symbols: readonly string[],
  options: { readonly fileText?: string | undefined } = {},
): BasisSet {
  if (typeof request === 'string') return findBasisSet(request, symbols);
  if ('file' in request) return onlyElements(basisFromFile(request.file, options.fileText), symbols);
  if ('scaleFactors' in request) return findBasisSet(request.name, symbols, request.scaleFactors);
  if ('optimiseScale' in request) return findBasisSet(request.name, symbols);
  if ('shells' in request) {
    return onlyElements(explicitBasisSet(request.name, request.shells, request.harmonics), symbols);
  }
  return onlyElements(evenTemperedBasisSet(request.name, request.evenTempered, request.harmonics), symbols);
}

function basisFromFile(file: string, text: string | undefined): BasisSet {
  if (text !== undefined) return parseMolssiBasis(text, file);
  throw new EngineError(
    'basis.file',
    `The basis file ${file} could not be read.`,
    'Check that it stands beside the study under this name.',
    { file },
    'basis.file',
  );
}

/** @throws EngineError `basis.elementMissing` */
function onlyElements(basisSet: BasisSet, symbols: readonly string[]): BasisSet {
  const elements = [...new Set(symbols)].map((symbol) => {
    if (!Object.hasOwn(basisSet.elements, symbol)) {
      throw elementMissing(basisSet.name, symbol, Object.keys(basisSet.elements));
    }
    return [symbol, basisSet.elements[symbol]] as const;
  });
  return { ...basisSet, elements: Object.fromEntries(elements) };
}
