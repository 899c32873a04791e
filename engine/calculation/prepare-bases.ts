import type { BasisRequest } from '../basis/basis-request';
import type { BasisSet } from '../basis/basis-set';
import { EngineError } from '../errors';

/** A basis that a study is prepared in, or what is wrong with that. */
type InBasis =
  | { readonly ok: true; readonly prepared: { readonly basisSet: BasisSet } }
  | { readonly ok: false; readonly errors: readonly EngineError[] };

/**
 * What is wrong with the further bases of a study, with places below `findings.bases`; what is wrong with the study
 * in any basis is left out.
 *
 * @param own - the study in its own basis
 * @param further - in each further one, in the order of `requests`
 */
export function furtherBasisErrors(
  requests: readonly BasisRequest[],
  own: InBasis,
  further: readonly InBasis[],
): readonly EngineError[] {
  const ownErrors = own.ok ? [] : own.errors;
  return further.flatMap((inBasis, index): EngineError[] => {
    const place = `findings.bases[${index}]`;
    const request = requests[index];
    if (typeof request !== 'string' && 'file' in request) return [fromFile(request.file, place)];
    if (inBasis.ok) {
      const isKnown = [own, ...further.slice(0, index)].some(
        (before) => before.ok && isSame(before.prepared.basisSet, inBasis.prepared.basisSet),
      );
      return isKnown ? [givenTwice(inBasis.prepared.basisSet.name, place)] : [];
    }
    return inBasis.errors
      .filter((error) => isOfBasis(error) || !ownErrors.some((other) => sameWords(error, other)))
      .map((error) => movedTo(place, error));
  });
}

function isSame(one: BasisSet, other: BasisSet): boolean {
  const content = ({ harmonics, elements }: BasisSet) => JSON.stringify([harmonics, elements]);
  return content(one) === content(other);
}

const isOfBasis = ({ place }: EngineError): boolean => /^basis\b/.test(place);

function sameWords(one: EngineError, other: EngineError): boolean {
  return one.message === other.message && one.place === other.place;
}

function movedTo(place: string, error: EngineError): EngineError {
  const { code, message, remedy, details } = error;
  const inside = isOfBasis(error) ? error.place.slice('basis'.length) : '';
  return new EngineError(code, message, remedy, details, `${place}${inside}`);
}

function fromFile(file: string, place: string): EngineError {
  return new EngineError(
    'basis.file',
    `A further basis is not read from a file, as “${file}”.`,
    'Write its shells into the study, or make it the "basis" of the study.',
    { file },
    place,
  );
}

function givenTwice(name: string, place: string): EngineError {
  return new EngineError(
    'basis.twice',
    `The basis set ${name} is given twice.`,
    'Leave it out here: the "basis" of the study is compared with the others anyway.',
    { name },
    place,
  );
}
