import { elementsAndIsotopes } from 'chemical-elements';
import { EngineError } from '../errors';

/** One nuclide of an element. */
export interface Isotope {
  readonly massNumber: number;
  /** of the neutral atom, in dalton */
  readonly massDalton: number;
  /** fraction in natural samples; absent for nuclides that do not occur in them */
  readonly abundance?: number;
}

export interface Element {
  readonly symbol: string;
  /** English, capitalised */
  readonly name: string;
  readonly atomicNumber: number;
  /** by rising mass number */
  readonly isotopes: readonly Isotope[];
}

/** Hydrogen to argon: as far as the basis sets reach. */
export const HEAVIEST_ATOMIC_NUMBER = 18;

/**
 * H to Ar by atomic number − 1.
 *
 * Source: package `chemical-elements`, which carries the atomic masses and isotopic abundances published by NIST
 * (atomic mass evaluation of 2012, abundances of 2009/2013).
 */
export const ELEMENTS: readonly Element[] = elementsAndIsotopes
  .slice(0, HEAVIEST_ATOMIC_NUMBER)
  .map(({ symbol, name, number, isotopes }) => ({
    symbol,
    name,
    atomicNumber: number,
    isotopes: isotopes.map(({ nominal, mass, abundance }) => ({
      massNumber: nominal,
      massDalton: mass,
      ...(abundance === undefined ? {} : { abundance }),
    })),
  }));

const bySymbol: ReadonlyMap<string, Element> = new Map(ELEMENTS.map((element) => [element.symbol, element]));

/** Names of hydrogen's isotopes that people write as if they were elements. */
const HYDROGEN_ISOTOPES: ReadonlyMap<string, number> = new Map([
  ['D', 2],
  ['T', 3],
]);

/** @returns the element with exactly this symbol, or undefined */
export function findElement(symbol: string): Element | undefined {
  return bySymbol.get(symbol);
}

/**
 * @param place - where the symbol stands in the study, for the error
 * @throws EngineError `molecule.unknownElement` with the symbol most likely meant
 */
export function requireElement(symbol: string, place = ''): Element {
  const element = findElement(symbol);
  if (element) return element;
  const isotope = HYDROGEN_ISOTOPES.get(symbol);
  const nearest = nearestSymbol(symbol);
  throw new EngineError(
    'molecule.unknownElement',
    isHeavierElement(symbol) ? `${symbol} is heavier than argon.` : `There is no element “${symbol}”.`,
    isotope
      ? `Write "H" with "isotope": ${isotope}.`
      : nearest
        ? `Write "${nearest}" if that is meant; elements from H to Ar can be used.`
        : 'Use an element from H to Ar, by its symbol.',
    nearest ? { symbol, nearest } : { symbol },
    place,
  );
}

/** The symbol that someone who wrote `text` most likely meant: other case, full name, D or T, same first letter. */
export function nearestSymbol(text: string): string | undefined {
  const lower = text.trim().toLowerCase();
  const isMeant = (symbol: string) => symbol.toLowerCase() === lower;
  const exact = ELEMENTS.find(({ symbol, name }) => isMeant(symbol) || name.toLowerCase() === lower);
  if (exact) return exact.symbol;
  if ([...HYDROGEN_ISOTOPES.keys()].some(isMeant)) return 'H';
  if (isHeavierElement(text)) return undefined;
  return ELEMENTS.find(({ symbol }) => symbol.toLowerCase() === lower.slice(0, 1))?.symbol;
}

function isHeavierElement(symbol: string): boolean {
  return elementsAndIsotopes.some(
    (element) => element.symbol === symbol && element.number > HEAVIEST_ATOMIC_NUMBER,
  );
}

/** The isotope found most often in natural samples. */
export function mostAbundantIsotope(element: Element): Isotope {
  return element.isotopes.reduce((best, isotope) =>
    (isotope.abundance ?? 0) > (best.abundance ?? 0) ? isotope : best,
  );
}

/**
 * Mass of an atom.
 *
 * @param massNumber - absent: the most abundant isotope
 * @param place - where the isotope stands in the study, for the error
 * @returns in dalton
 * @throws EngineError `molecule.unknownElement`, `molecule.unknownIsotope`
 */
export function isotopeMassDalton(symbol: string, massNumber?: number, place = ''): number {
  const element = requireElement(symbol, place);
  if (massNumber === undefined) return mostAbundantIsotope(element).massDalton;
  const isotope = element.isotopes.find((candidate) => candidate.massNumber === massNumber);
  if (isotope) return isotope.massDalton;
  const known = element.isotopes.map((candidate) => candidate.massNumber).join(', ');
  throw new EngineError(
    'molecule.unknownIsotope',
    `${element.name} has no known isotope of mass number ${massNumber}.`,
    `Choose one of ${known}, or leave "isotope" out for the most abundant one.`,
    { symbol, isotope: massNumber },
    place,
  );
}
