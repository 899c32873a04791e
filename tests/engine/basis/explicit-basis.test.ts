import { describe, expect, it } from 'vitest';
import type { EvenTemperedShells } from '../../../engine/basis/basis-request';
import type { ShellDefinition } from '../../../engine/basis/contracted-gaussian';
import {
  evenTemperedBasisSet,
  explicitBasisSet,
  LARGEST_EVEN_TEMPERED_COUNT,
} from '../../../engine/basis/explicit-basis';

const good: ShellDefinition = { angularMomentum: 0, exponents: [3.4, 0.6], coefficients: [0.2, 0.9] };
const progression: EvenTemperedShells = { angularMomentum: 1, smallest: 0.03, ratio: 2.6, count: 9 };

describe('explicitBasisSet', () => {
  it('identity: shells are taken as they are, spherical unless said otherwise', () => {
    const set = explicitBasisSet('my set', { H: [good], He: [] });
    expect(set).toMatchObject({ name: 'my set', harmonics: 'spherical', elements: { H: [good], He: [] } });
    expect(explicitBasisSet('my set', { H: [good] }, 'cartesian').harmonics).toBe('cartesian');
  });

  it.each<[Partial<ShellDefinition>, string]>([
    [{ angularMomentum: -1 }, 'angularMomentum'],
    [{ angularMomentum: 0.5 }, 'angularMomentum'],
    [{ angularMomentum: 5 }, 'angularMomentum'],
    [{ angularMomentum: Number.NaN }, 'angularMomentum'],
    [{ exponents: [], coefficients: [] }, 'exponents'],
    [{ exponents: [3.4] }, 'coefficients'],
    [{ exponents: [3.4, 0] }, 'exponents[1]'],
    [{ exponents: [-3.4, 0.6] }, 'exponents[0]'],
    [{ exponents: [3.4, Number.NaN] }, 'exponents[1]'],
    [{ exponents: [Number.POSITIVE_INFINITY, 0.6] }, 'exponents[0]'],
    [{ exponents: [1e300, 0.6] }, 'exponents[0]'],
    [{ coefficients: [0.2, Number.NaN] }, 'coefficients[1]'],
    [{ coefficients: [Number.NEGATIVE_INFINITY, 1] }, 'coefficients[0]'],
    [{ coefficients: [0, 0] }, 'coefficients'],
    [{ exponents: [0.6, 0.6], coefficients: [1, -1] }, 'coefficients'],
  ])('identity: a shell with %j is refused at its place', (change, field) => {
    const shells = { H: [good, { ...good, ...change }] };
    expect(() => explicitBasisSet('my set', shells)).toThrow(
      expect.objectContaining({
        code: 'basis.shell',
        place: `basis.shells.H[1].${field}`,
        details: { symbol: 'H', shell: 1 },
      }),
    );
  });

  it('identity: an element that does not exist is refused at its place', () => {
    for (const symbol of ['Hx', '__proto__', 'constructor']) {
      const shells = JSON.parse(`{"${symbol}": []}`) as Record<string, ShellDefinition[]>;
      expect(() => explicitBasisSet('my set', shells)).toThrow(
        expect.objectContaining({ code: 'molecule.unknownElement', place: `basis.shells.${symbol}` }),
      );
    }
  });
});

describe('evenTemperedBasisSet', () => {
  it('identity: single primitives with exponents smallest·ratio^k', () => {
    const { elements } = evenTemperedBasisSet('even-tempered', { H: [progression] });
    expect(elements.H).toHaveLength(9);
    expect(elements.H[0]).toEqual({ angularMomentum: 1, exponents: [0.03], coefficients: [1] });
    for (let k = 1; k < 9; k++) {
      expect(elements.H[k].exponents[0] / elements.H[k - 1].exponents[0]).toBeCloseTo(2.6, 13);
    }
  });

  it.each<[Partial<EvenTemperedShells>, string]>([
    [{ angularMomentum: 7 }, 'angularMomentum'],
    [{ smallest: 0 }, 'smallest'],
    [{ smallest: Number.NaN }, 'smallest'],
    [{ ratio: 1 }, 'ratio'],
    [{ ratio: -2 }, 'ratio'],
    [{ ratio: Number.NaN }, 'ratio'],
    [{ ratio: Number.POSITIVE_INFINITY }, 'count'],
    [{ count: 0 }, 'count'],
    [{ count: 2.5 }, 'count'],
    [{ count: LARGEST_EVEN_TEMPERED_COUNT + 1, ratio: 1.01 }, 'count'],
    [{ ratio: 30, count: 50 }, 'count'],
  ])('identity: a progression with %j is refused at its place', (change, field) => {
    const shells = { He: [{ ...progression, ...change }] };
    expect(() => evenTemperedBasisSet('even-tempered', shells)).toThrow(
      expect.objectContaining({ code: 'basis.shell', place: `basis.evenTempered.He[0].${field}` }),
    );
  });

  it('identity: as many exponents as the cap allows', () => {
    const shells = { H: [{ ...progression, ratio: 1.1, count: LARGEST_EVEN_TEMPERED_COUNT }] };
    expect(evenTemperedBasisSet('even-tempered', shells).elements.H).toHaveLength(
      LARGEST_EVEN_TEMPERED_COUNT,
    );
  });
});
