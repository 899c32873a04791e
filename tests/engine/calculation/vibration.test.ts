import { beforeAll, describe, expect, it } from 'vitest';
import { computePoint, HARTREE_IN_WAVENUMBERS, type PreparedStudy } from '#engine';
import { diatomicOf } from '../../../engine/calculation/diatomic';
import { type LevelCurve, levelPoints, lowestCurve } from '../../../engine/calculation/level-curve';
import type { Vibration } from '../../../engine/calculation/result';
import { solvableCurve, vibrationOn } from '../../../engine/calculation/vibration';
import { describeWell } from '../../../engine/calculation/well-constants';
import { findCurveMinimum } from '../../../engine/curves/minimum';
import { compute, correlated, prepare, study } from '../../support/studies';

/*
 * H2 by full CI in 7 s and 2 p functions an atom. Without d and higher functions the well is some 650 cm⁻¹ too
 * shallow and 0.003 bohr too wide; its shape, and so the levels above the lowest, are right to some 10 cm⁻¹. The
 * tolerances say that.
 */
const SPACING = 0.04;
const BECAUSE = 's and p functions only';
const BASIS = {
  name: 's and p',
  evenTempered: {
    H: [
      { angularMomentum: 0, smallest: 0.04, ratio: 3.1, count: 7 },
      { angularMomentum: 1, smallest: 0.3, ratio: 3.5, count: 2 },
    ],
  },
};
const DISTANCES = [0.5, 0.6, 0.7, 0.85, 1, 1.2, 1.4, 1.7, 2, 2.4, 2.8, 3.3, 4, 5, 6, 7.5, 9, 11];
const HUBER_HERZBERG = 'K. P. Huber, G. Herzberg, Constants of Diatomic Molecules (1979)';

type Isotopes = readonly [number, number];

function hydrogen([first, second]: Isotopes): PreparedStudy {
  const atoms = [
    { element: 'H', at: [0, 0, 0], isotope: first },
    { element: 'H', at: [0, 0, 1.4], isotope: second },
  ] as const;
  const scan = { coordinate: { bonds: [[0, 1]] }, values: DISTANCES } as const;
  return prepare(study(atoms, { basis: BASIS, levels: ['FCI'], scan }));
}

interface Row {
  readonly of: string;
  readonly isotopes: Isotopes;
  readonly printed: string;
}

type Minimum = Extract<ReturnType<typeof findCurveMinimum>, { kind: 'found' }>;

let curve: LevelCurve;
let minimum: Minimum;
let limit: number;

beforeAll(() => {
  const prepared = hydrogen([1, 1]);
  const computed = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate));
  const carries = computed.map(({ carry }) => carry);
  curve = lowestCurve(
    levelPoints(
      prepared,
      'FCI',
      computed.map(({ result }) => result),
      carries,
    ),
  );
  const found = findCurveMinimum(curve.scan, curve.energyAt, SPACING);
  if (found.kind !== 'found') throw new Error(found.kind);
  minimum = found;
  const molecule = { unit: 'bohr', atoms: [{ element: 'H', at: [0, 0, 0] }], multiplicity: 2 } as const;
  limit = 2 * correlated(compute({ ...study([]), basis: BASIS, levels: ['FCI'], molecule })).energy;
  // computes the points of the stencil and of the levels, which serve all tests
  constantsOf([1, 1]);
  levelsOf([1, 1]);
}, 300_000);

/** The curve is the same for all isotopologues: nothing is computed again. */
function levelsOf(isotopes: Isotopes): Extract<Vibration, { kind: 'found' }> {
  const molecule = diatomicOf(hydrogen(isotopes).study)!;
  const vibration = vibrationOn(solvableCurve(curve, minimum.energy, limit, 0), molecule);
  if (vibration.kind !== 'found') throw new Error(vibration.reason);
  return vibration;
}

const constantsOf = (isotopes: Isotopes) =>
  describeWell(hydrogen(isotopes), curve, minimum, SPACING).constants.diatomic!;

describe('levels and constants of H2 in s and p functions', () => {
  it('published: equilibrium distance', () => {
    const source = 'K. Pachucki, Phys. Rev. A 82, 032509 (2010), value from memory';
    expect(minimum.x).toMatchPublished({ printed: '1.4011', source, tolerance: 0.005, because: BECAUSE });
  });

  it('published: well depth, from below', () => {
    const depth = (limit - minimum.energy) * HARTREE_IN_WAVENUMBERS;
    const source = 'W. Kolos, L. Wolniewicz, J. Chem. Phys. 41, 3663 (1964)';
    expect(depth).toMatchPublished({
      printed: '38292.7',
      unit: 'cm⁻¹',
      source,
      tolerance: 750,
      because: BECAUSE,
    });
    expect(depth).toBeLessThan(38292.7);
  });

  it.each<Row>([
    { of: 'H2', isotopes: [1, 1], printed: '4401.213' },
    { of: 'HD', isotopes: [1, 2], printed: '3813.15' },
    { of: 'D2', isotopes: [2, 2], printed: '3115.5' },
  ])('published: harmonic wavenumber of $of', ({ isotopes, printed }) => {
    const { value, uncertainty } = constantsOf(isotopes).harmonicWavenumberPerCm;
    expect(value).toMatchPublished({
      printed,
      unit: 'cm⁻¹',
      source: HUBER_HERZBERG,
      tolerance: 20,
      because: BECAUSE,
    });
    expect(uncertainty).toBeLessThan(0.01);
  });

  it.each<Row>([
    { of: 'H2', isotopes: [1, 1], printed: '36112.5927' },
    { of: 'D2', isotopes: [2, 2], printed: '36746.1623' },
  ] as const)(
    'published: dissociation energy of $of in the Born–Oppenheimer approximation, from below',
    (row) => {
      const { levels, converged } = levelsOf(row.isotopes);
      const d0 = (limit - minimum.energy) * HARTREE_IN_WAVENUMBERS - levels[0]!.energyPerCm;
      expect(converged).toBe(true);
      expect(d0).toMatchPublished({
        printed: row.printed,
        unit: 'cm⁻¹',
        source: 'K. Piszczatowski et al., J. Chem. Theory Comput. 5, 3039 (2009), value from memory',
        tolerance: 750,
        because: BECAUSE,
      });
      expect(d0).toBeLessThan(Number(row.printed));
    },
  );

  it.each([
    { v: 1, printed: '4161.166122' },
    { v: 2, printed: '8087.002830' },
    { v: 3, printed: '11782.391163' },
    { v: 4, printed: '15250.366057' },
  ])('published: term value of v = $v of H2 above the lowest level', ({ v, printed }) => {
    const { levels } = levelsOf([1, 1]);
    expect(levels[v]!.energyPerCm - levels[0]!.energyPerCm).toMatchPublished({
      printed,
      unit: 'cm⁻¹',
      source: 'E. Roueff et al., Astron. Astrophys. 630, A58 (2019), level energies',
      tolerance: 25,
      because: `${BECAUSE}; the print is beyond the Born–Oppenheimer approximation`,
    });
  });

  it('published: number of bound levels of H2, HD and D2 without rotation', () => {
    const source = 'L. Wolniewicz, J. Chem. Phys. 103, 1792 (1995), value from memory';
    expect(levelsOf([1, 1]).boundLevels).toMatchPublished({ printed: '15', source });
    const because = 'the highest level is bound by a few cm⁻¹ only, and the well lacks more';
    expect(levelsOf([1, 2]).boundLevels).toMatchPublished({ printed: '18', source, tolerance: 1, because });
    expect(levelsOf([2, 2]).boundLevels).toMatchPublished({ printed: '22', source, tolerance: 1, because });
  });

  it('identity: harmonic wavenumbers of isotopologues stand as the roots of the inverse reduced masses', () => {
    const [light, heavy] = [constantsOf([1, 1]), constantsOf([2, 2])];
    const ratio = Math.sqrt(heavy.reducedMassDalton / light.reducedMassDalton);
    expect(light.harmonicWavenumberPerCm.value / heavy.harmonicWavenumberPerCm.value).toBeCloseTo(ratio, 10);
  });
});
