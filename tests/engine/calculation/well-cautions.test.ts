import { describe, expect, it } from 'vitest';
import type { DiatomicConstants, LevelFindings, Vibration, WellConstants } from '#engine';
import { wellCautions } from '../../../engine/calculation/well-cautions';

const MINIMUM = { kind: 'found', equilibriumDistance: 1.4, energy: -2, uncertainty: 1e-6 } as const;
const codesOf = (findings: Partial<LevelFindings>) =>
  wellCautions('FCI', { minimum: MINIMUM, ...findings }, 'bohr').map(({ code }) => code);
const estimate = (value: number) => ({ value, uncertainty: 0 });

function constants(wavenumber: number, anharmonicity: number): WellConstants {
  const diatomic: DiatomicConstants = {
    masses: 'atomic',
    reducedMassDalton: 1,
    harmonicWavenumberPerCm: estimate(wavenumber),
    anharmonicityPerCm: estimate(anharmonicity),
    rotationalConstantPerCm: estimate(1),
    vibrationRotationCouplingPerCm: estimate(0.1),
    centrifugalDistortionPerCm: estimate(1e-4),
  };
  return {
    equilibriumDistanceAngstrom: estimate(0.74),
    forceConstantNewtonPerMetre: estimate(500),
    diatomic,
  };
}

const levels = (interpolationErrorPerCm: number): Vibration => ({
  kind: 'found',
  levels: [],
  zeroPointPerCm: 1,
  boundLevels: 1,
  converged: true,
  beyondComputedRange: [],
  interpolationErrorPerCm,
  pointsAdded: 0,
  reducedMassDalton: 1,
});

describe('wellCautions', () => {
  it('identity: a sound well, and a curve without one, raise nothing', () => {
    const wellDepth = { value: 0.17, against: 'farEnd', farEnd: 9 } as const;
    expect(codesOf({ wellDepth, constants: constants(4400, 121), vibration: levels(0.01) })).toEqual([]);
    expect(codesOf({ minimum: { kind: 'atEdge', coordinate: 1 }, vibration: levels(10) })).toEqual([]);
  });

  it('identity: of several minima all are named, with how much higher they lie', () => {
    const others = [{ equilibriumDistance: 3.25, energy: -1.5, uncertainty: 1e-6 }];
    const [caution] = wellCautions('FCI', { minimum: { ...MINIMUM, others } }, 'bohr');
    expect(caution).toMatchObject({ code: 'minimum.several', numbers: [{ value: 0.5, unit: 'hartree' }] });
    expect(caution!.message).toContain('2 minima: the lowest at 1.4 bohr, higher ones at 3.25 bohr');
  });

  it('identity: a negative depth is a well above its limit', () => {
    const wellDepth = { value: -0.1, against: 'farEnd', farEnd: 9 } as const;
    expect(codesOf({ wellDepth })).toEqual(['minimum.aboveLimit']);
  });

  it('identity: constants of a well that is all anharmonicity are doubted', () => {
    expect(codesOf({ constants: constants(38.7, 40.2) })).toEqual(['constants.shallow']);
  });

  it('identity: a poor interpolation is said, and what it leaves out too', () => {
    expect(codesOf({ vibration: levels(7) })).toEqual(['curve.interpolation']);
    expect(codesOf({ vibration: { kind: 'none', reason: 'A kink.', isDoubtful: true } })).toEqual([
      'curve.interpolation',
    ]);
    expect(codesOf({ vibration: { kind: 'none', reason: 'Too shallow.' } })).toEqual([]);
  });
});
