import { Matrix, solve } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { FORCE_CONSTANT_IN_NEWTON_PER_METRE, HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import { localExpansion } from '../../../engine/curves/local-expansion';
import {
  expandWell,
  spectroscopicConstants,
  stencilDistances,
  stencilSpacing,
} from '../../../engine/curves/spectroscopic-constants';
import { vibrationalLevels } from '../../../engine/curves/vibrational-levels';
import { seededRandom } from '../../support/random';

type Curve = (r: number) => number;
const morse =
  (depth: number, a: number, re: number): Curve =>
  (r) =>
    depth * ((1 - Math.exp(-a * (r - re))) ** 2 - 1);

/** Expansion as a caller makes it: a rough one first, then the stencil that it suggests. */
function analyse(curve: Curve, near: number, mass: number, noise?: number) {
  const rough = localExpansion(
    [-3, -2, -1, 0, 1, 2, 3].map((k) => curve(near + 0.05 * k)),
    0.05,
  );
  const spacing = stencilSpacing(rough, near);
  const well = expandWell(near, spacing, stencilDistances(near, spacing).map(curve), noise);
  if (!well) throw new Error('no minimum in the stencil');
  return spectroscopicConstants(well, mass);
}

const WELLS = [
  ['hydrogen-like', 0.1744, 1.02764, 1.40201, 918.0764],
  ['nitrogen-like', 0.36, 1.42, 2.07, 12850],
  ['shallow and wide', 0.01, 0.5, 5, 6000],
] as const;

/** Closed forms of a Morse curve (αe: C. L. Pekeris, Phys. Rev. 45, 98 (1934)), cm⁻¹. */
function closedForms(depth: number, a: number, re: number, mass: number) {
  const [omega, anharmonicity, b] = [
    a * Math.sqrt((2 * depth) / mass),
    (a * a) / (2 * mass),
    1 / (2 * mass * re * re),
  ];
  const inHartree = {
    harmonicWavenumberPerCm: omega,
    correctedWavenumberPerCm: omega,
    anharmonicityPerCm: anharmonicity,
    secondAnharmonicityPerCm: 0,
    levelShiftPerCm: 0,
    rotationalConstantPerCm: b,
    vibrationRotationCouplingPerCm: ((6 * b * b) / omega) * (Math.sqrt(anharmonicity / b) - 1),
    centrifugalDistortionPerCm: (4 * b ** 3) / omega ** 2,
  };
  return Object.entries(inHartree).map(
    ([key, value]) => [key as keyof typeof inHartree, value * HARTREE_IN_WAVENUMBERS] as const,
  );
}

/** Coefficients of the polynomial in v + ½ through one value for each level. */
function seriesInVibration(values: readonly number[]): number[] {
  const powers = new Matrix(values.map((_, v) => values.map((__, k) => (v + 0.5) ** k)));
  return solve(powers, Matrix.columnVector(values)).to1DArray();
}

describe('spectroscopicConstants', () => {
  it.each(WELLS)('identity: a %s Morse curve has its closed-form constants', (_, depth, a, re, mass) => {
    const { constants, uncertainties } = analyse(morse(depth, a, re), re + 0.003, mass, 1e-16);
    for (const [key, exact] of closedForms(depth, a, re, mass)) {
      const error = Math.abs(constants[key] - exact);
      // ωeye is a difference of large terms in the sixth derivative
      expect(error, key).toBeLessThan(key === 'secondAnharmonicityPerCm' ? 1e-4 : 1e-6);
      expect(error, key).toBeLessThan(uncertainties[key] + 1e-10);
    }
    expect(Math.abs(constants.equilibriumDistance - re)).toBeLessThan(1e-9);
    expect(constants.forceConstant).toBeCloseTo(2 * depth * a * a, 9);
  });

  it.each(WELLS)(
    'identity: noise of 1e-11 hartree stays small for a %s curve, and the uncertainty covers it',
    (_, depth, a, re, mass) => {
      const random = seededRandom(20);
      for (let run = 0; run < 20; run++) {
        const noisy: Curve = (r) => morse(depth, a, re)(r) + 2e-11 * (random() - 0.5);
        const { constants, uncertainties } = analyse(noisy, re - 0.004, mass);
        for (const [key, exact] of closedForms(depth, a, re, mass)) {
          const error = Math.abs(constants[key] - exact);
          expect(error, key).toBeLessThan(4 * uncertainties[key]);
        }
        expect(uncertainties.harmonicWavenumberPerCm / constants.harmonicWavenumberPerCm).toBeLessThan(1e-6);
        expect(uncertainties.anharmonicityPerCm / constants.anharmonicityPerCm).toBeLessThan(1e-3);
      }
    },
  );

  it('independent: Y00, Y10, Y20, Y30, Y01, Y11 are those of levels solved for, on a curve that is no Morse curve', () => {
    const mass = 5000;
    const curve: Curve = (r) => 0.2 * ((2.5 / r) ** 8 - 2 * (2.5 / r) ** 4);
    const { constants } = analyse(curve, 2.5, mass, 1e-16);
    const { levels } = vibrationalLevels(
      { energyAt: curve, limit: 0, computed: { from: 1, to: 200 } },
      mass,
      { mostLevels: 10, tolerancePerCm: 1e-8 },
    );
    const termValues = levels.map(({ energy }) => (energy + 0.2) * HARTREE_IN_WAVENUMBERS);
    const [y00, y10, y20, y30] = seriesInVibration(termValues);
    const [y01, y11] = seriesInVibration(levels.map((level) => level.rotationalConstantPerCm));
    // what is left is the next order of the series, a factor of (Be/ωe)², about 1e-6, smaller than each term
    expect(Math.abs(constants.levelShiftPerCm - y00)).toBeLessThan(1e-4);
    expect(Math.abs(constants.correctedWavenumberPerCm - y10)).toBeLessThan(2e-4);
    expect(Math.abs(-constants.anharmonicityPerCm - y20)).toBeLessThan(3e-4);
    expect(Math.abs(constants.secondAnharmonicityPerCm - y30)).toBeLessThan(3e-4);
    expect(Math.abs(constants.correctedRotationalConstantPerCm - y01)).toBeLessThan(1e-7);
    expect(Math.abs(-constants.vibrationRotationCouplingPerCm - y11)).toBeLessThan(3e-6);
    // and the corrections are more than that
    expect(Math.abs(constants.harmonicWavenumberPerCm - y10)).toBeGreaterThan(0.05);
    expect(Math.abs(constants.rotationalConstantPerCm - y01)).toBeGreaterThan(4e-5);
  });

  it('identity: isotopologues follow the powers of the reduced mass', () => {
    const [light, heavy] = [900, 3600].map((mass) => analyse(morse(0.17, 1, 1.4), 1.4, mass).constants);
    expect(light.harmonicWavenumberPerCm / heavy.harmonicWavenumberPerCm).toBeCloseTo(2, 10);
    expect(light.anharmonicityPerCm / heavy.anharmonicityPerCm).toBeCloseTo(4, 10);
    expect(light.vibrationRotationCouplingPerCm / heavy.vibrationRotationCouplingPerCm).toBeCloseTo(8, 10);
    expect(light.centrifugalDistortionPerCm / heavy.centrifugalDistortionPerCm).toBeCloseTo(16, 10);
  });

  it('published: the force constant of one atomic unit in N/m', () => {
    expect(FORCE_CONSTANT_IN_NEWTON_PER_METRE).toMatchPublished({
      printed: '1556.893',
      unit: 'N/m',
      source: 'E_h/a0² from CODATA values, value from memory',
    });
  });

  it('identity: a stencil away from the minimum gives no expansion', () => {
    const distances = stencilDistances(4, 0.02);
    expect(expandWell(4, 0.02, distances.map(morse(0.17, 1, 1.4)))).toBeUndefined();
  });
});
