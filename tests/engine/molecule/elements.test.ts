import { describe, expect, it } from 'vitest';
import {
  ELEMENTS,
  findElement,
  isotopeMassDalton,
  mostAbundantIsotope,
  nearestSymbol,
  requireElement,
} from '../../../engine/molecule/elements';

describe('ELEMENTS', () => {
  it('identity: are H to Ar in the order of their numbers', () => {
    expect(ELEMENTS.map(({ symbol }) => symbol).join(' ')).toBe(
      'H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar',
    );
    expect(ELEMENTS.map(({ atomicNumber }) => atomicNumber)).toEqual(
      Array.from({ length: 18 }, (_, i) => i + 1),
    );
  });

  it('published: their most abundant isotopes are those of the periodic table', () => {
    // IUPAC, Isotopic compositions of the elements; from memory
    expect(ELEMENTS.map((element) => mostAbundantIsotope(element).massNumber)).toEqual([
      1, 4, 7, 9, 11, 12, 14, 16, 19, 20, 23, 24, 27, 28, 31, 32, 35, 40,
    ]);
  });

  it('identity: abundances of an element add up to 1', () => {
    for (const { isotopes } of ELEMENTS) {
      expect(isotopes.reduce((sum, { abundance = 0 }) => sum + abundance, 0)).toBeCloseTo(1, 9);
    }
  });
});

describe('isotopeMassDalton', () => {
  it.each([
    ['H', 1, '1.007825031898'],
    ['H', 2, '2.014101777844'],
    ['H', 3, '3.01604928132'],
    ['He', 3, '3.01602932197'],
    ['He', 4, '4.00260325413'],
    ['Li', 6, '6.01512288742'],
    ['Li', 7, '7.01600343426'],
    ['Be', 9, '9.012183062'],
    ['B', 11, '11.009305166', 4.5e-7],
    ['C', 12, '12.000000000000'],
    ['C', 13, '13.00335483534'],
    ['N', 14, '14.00307400425'],
    ['O', 16, '15.99491461926'],
    ['O', 18, '17.99915961214'],
    ['F', 19, '18.99840316207'],
    ['Na', 23, '22.98976928195'],
    ['S', 36, '35.967080692'],
    ['Cl', 37, '36.965902573'],
    ['Ar', 40, '39.96238312204'],
  ] as [string, number, string, number?][])(
    'published: %s-%i',
    (symbol, massNumber, printed, tolerance = 3e-8) => {
      expect(isotopeMassDalton(symbol, massNumber)).toMatchPublished({
        printed,
        unit: 'Da',
        source: 'M. Wang et al., Chinese Phys. C 45, 030003 (2021) (AME2020), Table I',
        tolerance,
        because:
          'the package carries the evaluation of 2012; this covers its standard uncertainty for these nuclides',
      });
    },
  );

  it('identity: without a mass number it is the most abundant isotope', () => {
    expect(isotopeMassDalton('Cl')).toBe(isotopeMassDalton('Cl', 35));
  });

  it('identity: refuses an isotope that is not known and lists those that are', () => {
    expect(() => isotopeMassDalton('H', 9, 'molecule.atoms[0].isotope')).toThrow(
      expect.objectContaining({
        code: 'molecule.unknownIsotope',
        place: 'molecule.atoms[0].isotope',
        message: 'Hydrogen has no known isotope of mass number 9.',
        remedy: expect.stringContaining('1, 2, 3'),
      }),
    );
  });
});

describe('requireElement', () => {
  it('identity: takes proper symbols only', () => {
    expect(findElement('He')?.atomicNumber).toBe(2);
    for (const symbol of ['he', 'HE', ' He', 'Fe', 'D', '', '__proto__', 'constructor']) {
      expect(findElement(symbol)).toBeUndefined();
    }
  });

  it.each([
    ['he', 'He'],
    ['HE', 'He'],
    ['helium', 'He'],
    ['Lithium', 'Li'],
    ['D', 'H'],
    ['t', 'H'],
    ['Hx', 'H'],
    ['Fe', undefined],
    ['Q', undefined],
    ['', undefined],
  ])('identity: for “%s” it suggests %s', (text, symbol) => {
    expect(nearestSymbol(text)).toBe(symbol);
  });

  it('identity: tells deuterium, heavy elements and nonsense apart', () => {
    const refusal = (symbol: string) => {
      try {
        requireElement(symbol, 'there');
      } catch (error) {
        return error as Error & { remedy: string };
      }
      throw new Error('accepted');
    };
    expect(refusal('D').remedy).toBe('Write "H" with "isotope": 2.');
    expect(refusal('Fe').message).toBe('Fe is heavier than argon.');
    expect(refusal('he')).toMatchObject({
      code: 'molecule.unknownElement',
      place: 'there',
      message: 'There is no element “he”.',
      remedy: 'Write "He" if that is meant; elements from H to Ar can be used.',
      details: { symbol: 'he', nearest: 'He' },
    });
  });
});
