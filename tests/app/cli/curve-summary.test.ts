import { describe, expect, it } from 'vitest';
import type { LevelFindings, StudyResults, Vibration } from '#engine';
import { curveTexts } from '../../../app/cli/curve-summary';
import { sampleResults } from '../../support/sample-results';

const results = sampleResults();
const textsOf = (findings: Partial<LevelFindings>, curves?: StudyResults['curves']) =>
  curveTexts('FCI', {
    ...results,
    ...(curves && { curves }),
    findings: { FCI: { minimum: { kind: 'none', reason: '' }, ...findings } },
  });
const vibration = (changes: Partial<Extract<Vibration, { kind: 'found' }>> = {}): Vibration => ({
  kind: 'found',
  levels: [],
  zeroPointPerCm: 1500.25,
  d0: 0.1,
  boundLevels: 12,
  converged: true,
  beyondComputedRange: [],
  interpolationErrorPerCm: 0.001,
  pointsAdded: 0,
  reducedMassDalton: 0.8,
  ...changes,
});
const LEVEL = { v: 0, energyPerCm: 2000, uncertaintyPerCm: 0 };

describe('curveTexts', () => {
  it('is silent of what a curve does not have', () => {
    expect(textsOf({})).toEqual([]);
    expect(curveTexts('FCI', { ...results, findings: {} })).toEqual([]);
  });

  it('lists higher minima', () => {
    const others = [{ equilibriumDistance: 2.5, energy: -1, uncertainty: 0 }];
    const minimum = { kind: 'found', equilibriumDistance: 1, energy: -2, uncertainty: 0, others } as const;
    expect(textsOf({ minimum })).toEqual(['another minimum of -1.000000 hartree at 2.5 Å']);
  });

  it('counts levels with rotation, those behind the barrier by themselves', () => {
    const rotating = [
      { rotation: 5, levels: [LEVEL, LEVEL], quasiBound: [], converged: true },
      {
        rotation: 20,
        levels: [LEVEL],
        quasiBound: [{ ...LEVEL, widthPerCm: 1 }],
        barrierPerCm: 1,
        converged: true,
      },
    ];
    expect(textsOf({ vibration: vibration({ rotating }) })).toEqual([
      'J = 5: 2 bound vibrational levels',
      'J = 20: 1 bound vibrational level, 1 behind the centrifugal barrier',
    ]);
  });

  it('names isotopologues by their formula', () => {
    const isotopologues = [{ massNumbers: [2, 1], reducedMassDalton: 0.8, vibration: vibration() }];
    expect(textsOf({ isotopologues })).toEqual([
      'HD: G(0) = 1500.25 cm⁻¹, D₀ = 2.7211 eV, 12 bound vibrational levels',
    ]);
  });

  it('gives excited states with their excitation energies, and counts the rest of many', () => {
    const minimum = { kind: 'found', equilibriumDistance: 1.25, energy: -1, uncertainty: 0 } as const;
    const energy = { value: 0.5, uncertainty: 0 };
    const state = {
      curve: 1,
      minimum,
      adiabatic: { value: 0.4, uncertainty: 0 },
      vertical: { coordinate: 0.7, energy },
      transitionMoments: [],
    };
    const curves = {
      FCI: [
        { name: '1 ¹Σg⁺', states: [] },
        { name: '1 ¹Σu⁺', states: [] },
      ],
    };
    expect(textsOf({ excitedStates: [state] }, curves)).toEqual([
      '1 ¹Σu⁺: Tₑ = 10.8846 eV, minimum at 1.25 Å, vertical excitation 13.6057 eV',
    ]);
    const depth = { value: 0.1, against: 'farEnd', farEnd: 4 } as const;
    expect(textsOf({ excitedStates: [{ ...state, wellDepth: depth }] }, curves)).toEqual([
      expect.stringMatching(/, Dₑ = 2\.7211 eV below its end at 4 Å$/),
    ]);
    const many = textsOf({ excitedStates: new Array(9).fill(state) }, curves);
    expect(many).toHaveLength(7);
    expect(many.at(-1)).toBe('3 more states, in the results file');
  });

  it('says how well fits describe the points', () => {
    const fit = {
      depth: 0.1,
      equilibriumDistanceBohr: 1.4,
      limit: -1,
      limitIsFixed: true,
      rootMeanSquarePerCm: 123.4,
      largestPerCm: 200,
      points: 20,
      range: [0.5, 4],
    } as const;
    const fits = {
      morse: { ...fit, steepnessPerBohr: 1 },
      extendedRydberg: { ...fit, rootMeanSquarePerCm: 5.67, coefficientsInBohr: [1, 0, 0] },
    } as const;
    expect(textsOf({ fits })).toEqual([
      'points fitted by Morse to 120 cm⁻¹, extended Rydberg to 5.7 cm⁻¹ (root mean square)',
    ]);
  });
});
