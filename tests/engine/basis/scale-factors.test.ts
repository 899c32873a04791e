import { describe, expect, it } from 'vitest';
import { mergeScaleFactors, STANDARD_SCALE_FACTORS } from '../../../engine/basis/scale-factors';
import { ELEMENTS } from '../../../engine/molecule/elements';

const refusal = (request: Record<string, Record<string, number>>) => {
  try {
    mergeScaleFactors(request);
  } catch (error) {
    return error as { code: string; place: string; message: string; remedy: string };
  }
  throw new Error('not refused');
};

describe('STANDARD_SCALE_FACTORS', () => {
  it.each([
    ['H', '1s', '1.24'],
    ['He', '1s', '1.69'],
    ['Li', '1s', '2.69'],
    ['Li', '2sp', '0.80'],
    ['Be', '2sp', '1.15'],
    ['B', '2sp', '1.50'],
    ['C', '1s', '5.67'],
    ['C', '2sp', '1.72'],
    ['N', '2sp', '1.95'],
    ['O', '2sp', '2.25'],
    ['F', '2sp', '2.55'],
    ['Ne', '2sp', '2.88'],
    ['Na', '3sp', '1.75'],
    ['Cl', '2sp', '6.26'],
    ['Cl', '3sp', '2.10'],
    ['Ar', '3sp', '2.33'],
  ] as const)('published: %s %s', (symbol, shell, printed) => {
    expect(STANDARD_SCALE_FACTORS[symbol][shell]).toMatchPublished({
      printed,
      unit: 'bohr⁻¹',
      source:
        'Hehre, Stewart, Pople, J. Chem. Phys. 51, 2657 (1969) and Hehre, Ditchfield, Stewart, Pople, ' +
        'J. Chem. Phys. 52, 2769 (1970), standard molecular exponents; value from memory',
    });
  });

  it('identity: each element from H to Ar has the shells that its electrons fill', () => {
    expect(Object.keys(STANDARD_SCALE_FACTORS)).toEqual(ELEMENTS.map((element) => element.symbol));
    for (const { symbol, atomicNumber } of ELEMENTS) {
      const expected = ['1s', '2sp', '3sp'].slice(0, atomicNumber <= 2 ? 1 : atomicNumber <= 10 ? 2 : 3);
      expect(Object.keys(STANDARD_SCALE_FACTORS[symbol])).toEqual(expected);
    }
  });
});

describe('mergeScaleFactors', () => {
  it('identity: what the study gives takes the place of the standard, the rest stays', () => {
    const merged = mergeScaleFactors({ C: { '2sp': 1.6 } });
    expect(merged.C).toEqual({ '1s': 5.67, '2sp': 1.6 });
    expect({ ...merged, C: STANDARD_SCALE_FACTORS.C }).toEqual(STANDARD_SCALE_FACTORS);
  });

  it.each([
    [{ Xx: { '1s': 1 } }, 'basis.scaleFactors.Xx'],
    [
      JSON.parse('{"__proto__": {"1s": 1}}') as Record<string, Record<string, number>>,
      'basis.scaleFactors.__proto__',
    ],
    [{ H: { '2sp': 1 } }, 'basis.scaleFactors.H.2sp'],
    [{ H: { toString: 1 } }, 'basis.scaleFactors.H.toString'],
    [{ He: { '1s': 0 } }, 'basis.scaleFactors.He.1s'],
    [{ He: { '1s': -1.7 } }, 'basis.scaleFactors.He.1s'],
    [{ He: { '1s': Number.NaN } }, 'basis.scaleFactors.He.1s'],
    [{ He: { '1s': Number.POSITIVE_INFINITY } }, 'basis.scaleFactors.He.1s'],
    [{ He: { '1s': 1e200 } }, 'basis.scaleFactors.He.1s'],
  ])('identity: %j is refused at its place', (request, place) => {
    const error = refusal(request as unknown as Record<string, Record<string, number>>);
    expect(error.code).toBe('basis.scaleFactor');
    expect(error.place).toBe(place);
    expect(error.remedy).not.toBe('');
  });
});
