import { EngineError } from '../errors';
import { requireElement } from '../molecule/elements';
import { diatomicOf } from './diatomic';
import type { Study } from './study';

/**
 * What is wrong with the rotations and isotopologues that a study asks for. They are read off the levels of diatomic
 * molecules: for others a request would be passed over in silence.
 *
 * @param study - with a sound molecule
 */
export function rovibrationalErrors({ molecule, scan, findings }: Study): readonly EngineError[] {
  const { rotation, isotopologues } = findings ?? {};
  if (!rotation && !isotopologues) return [];
  const asked = isotopologues ? 'isotopologues' : 'rotation';
  if (!diatomicOf({ molecule, scan })) {
    return [
      new EngineError(
        'study.notDiatomic',
        `findings.${asked} concerns the levels of a diatomic molecule along its bond; this study has none.`,
        `Leave out “${asked}”, or scan the bond of two atoms.`,
        {},
        `findings.${asked}`,
      ),
    ];
  }
  return (isotopologues ?? []).flatMap((massNumbers, index) => {
    const place = `findings.isotopologues[${index}]`;
    if (massNumbers.length !== molecule.atoms.length) return [wrongLength(massNumbers, place)];
    return massNumbers.flatMap((massNumber, atom) => {
      const { element } = molecule.atoms[atom];
      const known = requireElement(element).isotopes.map((isotope) => isotope.massNumber);
      return known.includes(massNumber)
        ? []
        : [unknownIsotope(element, massNumber, known, `${place}[${atom}]`)];
    });
  });
}

function unknownIsotope(
  element: string,
  massNumber: number,
  known: readonly number[],
  place: string,
): EngineError {
  return new EngineError(
    'molecule.unknownIsotope',
    `${element} has no known isotope of mass number ${massNumber}.`,
    `Choose one of ${known.join(', ')}.`,
    { symbol: element, isotope: massNumber },
    place,
  );
}

function wrongLength(massNumbers: readonly number[], place: string): EngineError {
  return new EngineError(
    'study.isotopologue',
    `An isotopologue needs a mass number for each of the two atoms; ${place} has ${massNumbers.length}.`,
    'Give two, in the order of the atoms, such as [1, 2].',
    { count: massNumbers.length },
    place,
  );
}
