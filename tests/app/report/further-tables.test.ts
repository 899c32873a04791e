import { describe, expect, it } from 'vitest';
import type { ExcitedState, LevelFindings, StudyResults } from '#engine';
import { basesTable, limitTable } from '../../../app/report/bases-table';
import { excitedLimitsTable } from '../../../app/report/excited-limits-table';
import { excitedTable, franckCondonTables } from '../../../app/report/excited-tables';
import { fitsTable } from '../../../app/report/fits-table';
import { isotopologuesTable, rotationTables } from '../../../app/report/further-levels-tables';
import { sharedCoordinate } from '../../../app/report/scanned-coordinate';
import { withSpectroscopy } from '../../support/reports';

/** Full CI with further findings. */
function withFindings(further: Partial<LevelFindings>, changes: Partial<StudyResults> = {}): StudyResults {
  const results = withSpectroscopy(3, changes);
  return { ...results, findings: { FCI: { ...results.findings.FCI!, ...further } } };
}

const named = (results: StudyResults) => ({ name: '', results });
const shared = sharedCoordinate([withSpectroscopy(3)], ['']);
const estimate = (value: number) => ({ value, uncertainty: 0.002 });

describe('tables of further levels', () => {
  it('sets the levels of each J side by side, with how many are bound', () => {
    const { vibration } = withSpectroscopy(3).findings.FCI!;
    if (vibration?.kind !== 'found') throw new Error('sample changed');
    const level = (v: number, energyPerCm: number) => ({ v, energyPerCm, uncertaintyPerCm: 1e-4 });
    const rotating = [
      { rotation: 1, levels: [level(0, 1118), level(1, 3110)], quasiBound: [], converged: true },
      {
        rotation: 9,
        levels: [level(0, 6000)],
        quasiBound: [{ ...level(1, 9000), widthPerCm: 1 }],
        converged: true,
      },
    ];
    const [table] = rotationTables(named(withFindings({ vibration: { ...vibration, rotating } })));
    expect(table?.columns.map(({ label }) => label)).toEqual(['v', 'J = 1', 'J = 9']);
    expect(table?.rows).toEqual([
      ['0', '1118.00', '6000.00'],
      ['1', '3110.00', ''],
      ['bound', '2', '1'],
      ['quasi-bound', '0', '1'],
    ]);
  });

  it('sets isotopologues beside the molecule of the study', () => {
    const { constants, vibration } = withSpectroscopy(3).findings.FCI!;
    const deuterated = {
      massNumbers: [1, 2],
      reducedMassDalton: 0.67,
      constants: {
        ...constants!.diatomic!,
        reducedMassDalton: 0.67,
        harmonicWavenumberPerCm: estimate(3800),
      },
      vibration: vibration!,
    };
    const table = isotopologuesTable([named(withFindings({ isotopologues: [deuterated] }))]);
    expect(table?.rows.map((row) => row.slice(0, 4))).toEqual([
      ['FCI', 'H₂', '0.500000', '4300.50'],
      ['FCI', 'HD', '0.670000', '3800.00'],
    ]);
    expect(isotopologuesTable([named(withFindings({}))])).toBeUndefined();
  });
});

describe('tables of excited states', () => {
  const state: ExcitedState = {
    curve: 1,
    minimum: { kind: 'found', equilibriumDistance: 1.29, energy: -0.75, uncertainty: 1e-3 },
    vertical: { coordinate: 0.74, energy: estimate(0.46), oscillatorStrength: 0.27 },
    transitionMoments: [],
    franckCondon: {
      factors: [
        [0.1, 0.2],
        [0.3, 0.05],
      ],
      sums: [0.99, 0.98],
      boundLevels: 30,
      uncertainty: 1e-6,
      converged: true,
    },
  };
  const curves = {
    FCI: [
      { name: '1 ¹Σg⁺', states: [] },
      { name: '1 ¹Σu⁺', states: [] },
    ],
  };
  const results = withFindings({ excitedStates: [state] }, { curves });

  it('names the state, converts to electronvolts, leaves what is not there empty', () => {
    expect(excitedTable([named(results)], shared)?.rows).toEqual([
      ['FCI 1 ¹Σu⁺', '1.290', '', '12.5172', '0.2700', '', '', '', ''],
    ]);
    expect(excitedTable([named(withFindings({}))], shared)).toBeUndefined();
  });

  it('says what each state tends to, how deep its well is against that, and why a limit is not known', () => {
    const part = { charge: 0, multiplicity: 2, energy: -0.5, level: 'FCI' };
    const dissociation = {
      kind: 'found',
      energy: -0.6,
      fragments: [
        { ...part, atoms: [0], excitation: 0 },
        { ...part, atoms: [1], excitation: 0.375 },
      ],
      farEndAbove: -0.01,
    } as const;
    const wellDepth = { value: 0.15, against: 'fragments', farEnd: 4, valueAgainstFarEnd: 0.14 } as const;
    const withoutLimit: ExcitedState = {
      ...state,
      curve: 0,
      dissociation: { kind: 'none', reason: 'Too short a range.' },
      wellDepth: { value: 0.1, against: 'farEnd', farEnd: 4 },
    };
    const excitedStates = [{ ...state, dissociation, wellDepth }, withoutLimit];
    const table = excitedLimitsTable([named(withFindings({ excitedStates }, { curves }))], shared);
    expect(table?.rows).toEqual([
      ['FCI 1 ¹Σu⁺', 'H + H (+10.204 eV)', '−0.2721', '4.0817', 'H + H (+10.204 eV)', ''],
      ['FCI 1 ¹Σg⁺', '', '', '2.7211', '4 Å', ''],
    ]);
    expect(table?.notes.at(-1)).toBe('No limit of FCI 1 ¹Σg⁺: Too short a range.');
    expect(excitedLimitsTable([named(results)], shared)).toBeUndefined();
  });

  it('prints Franck–Condon factors with the sums over all bound levels', () => {
    const [table] = franckCondonTables(named(results));
    expect(table?.rows).toEqual([
      ['0', '0.10000', '0.20000', '0.99000'],
      ['1', '0.30000', '0.05000', '0.98000'],
    ]);
    expect(table?.notes.join()).toContain('30 bound levels');
  });
});

describe('fitsTable', () => {
  it('gives parameters and residuals of each form', () => {
    const quality = { rootMeanSquarePerCm: 123.456, largestPerCm: 300, points: 20, range: [0.5, 4] } as const;
    const morse = {
      ...quality,
      depth: 0.17,
      equilibriumDistanceBohr: 1.4,
      steepnessPerBohr: 1.03,
      limit: -1,
      limitIsFixed: true,
    };
    expect(fitsTable([named(withFindings({ fits: { morse } }))])?.rows).toEqual([
      ['FCI', 'Morse', 'D = 0.17000000, rₑ = 1.4000000, a = 1.0300000, L = −1.0000000', '123', '300', '20'],
    ]);
  });
});

describe('basesTable', () => {
  it('has a row for every basis and one for what they tend to, with its uncertainty', () => {
    const results = withFindings({});
    const basis = { ...results.basis, name: 'cc-pVTZ', functions: 28 };
    const table = basesTable(
      [
        named({
          ...results,
          furtherBases: [{ basis, levels: {}, findings: results.findings, cautions: [] }],
          basisSetLimit: {
            kind: 'found',
            family: 'cc-pVXZ',
            members: [
              { name: 'cc-pVDZ', cardinal: 2 },
              { name: 'cc-pVTZ', cardinal: 3 },
            ],
            levels: {
              FCI: {
                hartreeFock: { formula: 'exponential', cardinals: [2, 3] },
                energies: [],
                curve: {
                  kind: 'found',
                  equilibriumDistance: estimate(0.7412),
                  energy: { value: -1.17445, uncertainty: 0.00012 },
                  constants: results.findings.FCI!.constants!,
                },
              },
            },
          },
        }),
      ],
      shared,
    );
    expect(table?.rows.map((row) => row.slice(0, 5))).toEqual([
      ['FCI', 'STO-3G', '2', '0.74000', '−1.170000'],
      ['FCI', 'cc-pVTZ', '28', '0.74000', '−1.170000'],
      ['FCI', 'limit of cc-pVXZ', '', '0.7412 ± 0.0020', '−1.17445 ± 0.00012'],
    ]);
    expect(table?.notes[0]).toContain('cc-pVDZ, cc-pVTZ');
  });

  it('compares files of one study in several bases, with the limit at each place', () => {
    const inBasis = (name: string, functions: number, shift: number) => {
      const results = withFindings({});
      const points = results.points.map((point) => {
        const full = point.levels.FCI;
        if (full?.kind !== 'correlated') throw new Error('sample changed');
        const correlation = full.correlation - shift;
        return { ...point, levels: { FCI: { ...full, energy: full.energy - shift, correlation } } };
      });
      const study = { ...results.study, basis: name, levels: ['FCI'] };
      const basis = { ...results.basis, name, functions, notes: [name] };
      return { ...results, study, basis: { ...basis, shells: shellsOf(functions) }, points };
    };
    const files = [inBasis('cc-pVDZ', 10, 0), inBasis('cc-pVTZ', 28, 0.01)].map((results, index) => ({
      name: `file ${index}`,
      results,
    }));
    expect(basesTable(files, shared)?.rows.map((row) => row.slice(0, 3))).toEqual([
      ['FCI', 'cc-pVDZ', '10'],
      ['FCI', 'cc-pVTZ', '28'],
    ]);
    const limit = limitTable(files, shared);
    expect(limit?.rows.length).toBeGreaterThan(1);
    expect(limit?.rows[0]?.[2]).toMatch(/^−1\.\d+ ± 0\.\d+$/);
    expect(limitTable(files.slice(0, 1), shared)).toBeUndefined();
  });
});

/** Numbers that tell one basis from another. */
const shellsOf = (functions: number) => ({
  H: [{ angularMomentum: 0, exponents: [functions], coefficients: [1] }],
});
