import { describe, expect, it } from 'vitest';
import { basisSetLimitOfCurves, computePoint } from '#engine';
import { dissociationLimit } from '../../../engine/calculation/fragments';
import { FORCE_CONSTANT_IN_NEWTON_PER_METRE } from '../../../engine/constants';
import { correlationLimit, hartreeFockLimit } from '../../../engine/curves/basis-extrapolation';
import { atom, prepare, study } from '../../support/studies';

const VALUES = [1, 1.2, 1.4, 1.6, 2, 3, 8];
const CARDINALS = [2, 3];

/** s functions under the names of a family, which is all that it is recognised by: small, and the same laws hold. */
const small = (name: string, count: number) => ({
  name,
  evenTempered: { H: [{ angularMomentum: 0, smallest: 0.12, ratio: 4, count }] },
});

const prepared = prepare(
  study([atom('H'), atom('H', 0, 0, 1.4)], {
    levels: ['RHF', 'FCI'],
    scan: { coordinate: { bonds: [[0, 1]] }, values: VALUES },
    basis: small('cc-pVTZ', 4),
    findings: { bases: [small('cc-pVDZ', 3)] },
  }),
);
const bases = [prepared, ...prepared.furtherBases];

/** Only the limits of separate fragments are asked of the findings, and what is given in the largest basis. */
function limitOf(level: string) {
  const curves = bases.map((inBasis) => {
    const computed = inBasis.coordinates.map((x) => computePoint(inBasis, x, { levels: [level] }));
    const dissociation = dissociationLimit(inBasis, level, { x: 8, energy: 0 });
    return {
      points: computed.map(({ result }) => result),
      left: computed.map(({ carry }) => carry),
      findings: {
        minimum: { kind: 'none', reason: '' } as const,
        ...(dissociation && { dissociation }),
      },
    };
  });
  const limit = basisSetLimitOfCurves(prepared, level, curves);
  if (limit?.curve?.kind !== 'found') throw new Error('no limit');
  const apart = curves.map(({ findings: { dissociation } }) =>
    dissociation?.kind === 'found' ? dissociation.energy : Number.NaN,
  );
  return { ...limit, curve: limit.curve, apart };
}

/** Hartree–Fock and correlation energy extrapolated by themselves, from points computed here. */
function extrapolatedAt(x: number): number {
  const parts = [...bases].reverse().map((inBasis, k) => {
    const point = computePoint(inBasis, x).result.levels.FCI;
    if (point?.kind !== 'correlated') throw new Error('not computed');
    const { energy, correlation } = point;
    return { cardinal: CARDINALS[k]!, meanField: energy - correlation, correlation };
  });
  const meanField = hartreeFockLimit(parts.map(({ cardinal, meanField: energy }) => ({ cardinal, energy })));
  const correlation = correlationLimit(
    parts.map(({ cardinal, correlation: energy }) => ({ cardinal, energy })),
  );
  return (meanField?.energy ?? Number.NaN) + (correlation?.energy ?? Number.NaN);
}

describe('basisSetLimitOfCurves', () => {
  const { energies, curve, apart } = limitOf('FCI');

  it('identity: at every point it is the sum of the limits of both parts', () => {
    for (const [k, x] of VALUES.entries()) expect(energies[k]?.value).toBeCloseTo(extrapolatedAt(x), 10);
  });

  it('independent: minimum and force constant by differences of energies extrapolated one by one', () => {
    const place = curve.equilibriumDistance.value;
    const step = 0.02;
    const [before, lowest, after] = [-step, 0, step].map((shift) => extrapolatedAt(place + shift));
    const curvature = (before! + after! - 2 * lowest!) / step ** 2;
    expect(curve.energy.value).toBeCloseTo(lowest!, 8);
    // but for the cubic term
    expect((after! - before!) / (2 * step) / curvature).toBeCloseTo(0, 3);
    const { forceConstantNewtonPerMetre, diatomic } = curve.constants;
    expect(forceConstantNewtonPerMetre.value / FORCE_CONSTANT_IN_NEWTON_PER_METRE / curvature).toBeCloseTo(
      1,
      2,
    );
    for (const estimate of [curve.energy, curve.equilibriumDistance, diatomic?.harmonicWavenumberPerCm]) {
      expect(estimate?.uncertainty).toBeGreaterThan(0);
    }
  });

  it('identity: the depth is against fragments that are extrapolated too', () => {
    // one electron each: there is nothing but a Hartree–Fock part
    const atoms = hartreeFockLimit(CARDINALS.map((cardinal, k) => ({ cardinal, energy: apart.at(-1 - k)! })));
    expect(curve.wellDepth?.value).toBeCloseTo((atoms?.energy ?? 0) - curve.energy.value, 7);
  });

  it('identity: a Hartree–Fock level has no correlation to extrapolate', () => {
    const { hartreeFock, correlation } = limitOf('RHF');
    expect(hartreeFock).toEqual({ formula: 'exponential', cardinals: CARDINALS });
    expect(correlation).toBeUndefined();
  });
});
