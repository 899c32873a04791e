import { describe, expect, it } from 'vitest';
import { type CorrelatedState, computePoint, findLevelMinimum, type StudyResults } from '#engine';
import { parseResults } from '../../../app/study/parse-results';
import { atom, prepare, study } from '../../support/studies';

const STATE: CorrelatedState = {
  energy: -2.85,
  excitation: 0,
  spin: 'singlet',
  sSquared: 0,
  referenceWeight: 0.98,
  residual: 1e-9,
  dipole: [0, 0, 1.5],
  naturalOccupations: [1.97, 0.03],
  leading: [{ coefficient: 0.99, weight: 0.98, alpha: [0], beta: [0] }],
};
const { residual: _, leading: __, excitation: ___, ...lowest } = STATE;

/** Every kind of level result, finding and caution once. */
const RESULTS: StudyResults = {
  format: 'farwell/results',
  version: 1,
  study: {
    format: 'farwell/study',
    version: 1,
    molecule: {
      unit: 'angstrom',
      atoms: [
        { element: 'He', at: [0, 0, 0] },
        { element: 'H', at: [0, 0, 0.7743] },
      ],
      charge: 1,
      multiplicity: 1,
    },
    scan: { coordinate: { bonds: [[0, 1]] }, values: [0.7743] },
    basis: 'STO-3G',
    levels: ['RHF', 'CIS', 'CISD', 'FCI'],
    states: 1,
    frozenCore: false,
    convergence: { energy: 1e-10 },
  },
  program: { name: 'farwell', version: '0.1.0' },
  basis: {
    name: 'STO-3G',
    harmonics: 'spherical',
    functions: 2,
    shells: { H: [{ angularMomentum: 0, exponents: [3.4], coefficients: [1] }] },
    citations: ['a paper'],
    notes: [],
  },
  points: [
    {
      coordinate: 0.7743,
      atoms: [
        { element: 'He', at: [0, 0, 0] },
        { element: 'H', at: [0, 0, 0.7743], isotope: 2 },
      ],
      nuclearRepulsion: 1.3668,
      levels: {
        RHF: {
          kind: 'hartreeFock',
          energy: -2.84,
          converged: true,
          termination: { kind: 'converged' },
          iterations: 9,
          orbitalEnergies: [-1.6, -0.1],
          dipole: [0, 0, 1.5],
          stability: { singlet: 0.5, triplet: 0.4 },
        },
        CIS: {
          kind: 'singles',
          converged: true,
          termination: { kind: 'converged' },
          states: [
            {
              energy: -1.9,
              excitation: 0.94,
              spin: 'triplet',
              oscillatorStrength: 0,
              transitionDipole: [0, 0, 0],
              leading: [{ from: 0, to: 1, weight: 1 }],
            },
          ],
        },
        CISD: {
          kind: 'failed',
          converged: false,
          termination: { kind: 'refused', message: 'Not enough orbitals.' },
        },
        FCI: {
          kind: 'correlated',
          ...lowest,
          correlation: -0.01,
          converged: false,
          termination: { kind: 'iterationLimit', limit: 60 },
          iterations: 60,
          determinants: 4,
          states: [STATE],
        },
      },
      cautions: [{ code: 'rhf.unstable', message: 'A lower solution exists.', level: 'RHF' }],
    },
  ],
  findings: {
    RHF: {
      minimum: { kind: 'found', equilibriumDistance: 0.77, energy: -2.84, uncertainty: 1e-6 },
      wellDepth: { value: 0.1, against: 'farEnd', farEnd: 6 },
    },
    CIS: { minimum: { kind: 'none', reason: 'no ground state' } },
    CISD: { minimum: { kind: 'several', near: [1, 2] } },
    FCI: { minimum: { kind: 'atEdge', coordinate: 6 } },
  },
  curves: { FCI: [{ name: '1 ¹Σ⁺', states: [0] }], CIS: [{ name: '1 ¹Σ⁺', states: [null] }] },
  cautions: [{ code: 'basis.small', message: 'The basis set is minimal.' }],
};

/** A copy with one change. */
function changed(change: (results: Record<string, never>) => void): string {
  const copy = structuredClone(RESULTS) as unknown as Record<string, never>;
  change(copy);
  return JSON.stringify(copy);
}

function issues(text: string) {
  const reading = parseResults(text);
  return reading.ok ? [] : reading.issues.map(({ code, place }) => `${code} at ${place}`);
}

describe('parseResults', () => {
  it('reads results as they are', () => {
    expect(parseResults(JSON.stringify(RESULTS))).toEqual({ ok: true, results: RESULTS });
  });

  it('opens files of earlier versions, whose states are not joined to curves', () => {
    const { curves: _curves, ...earlier } = RESULTS;
    expect(parseResults(JSON.stringify(earlier))).toEqual({ ok: true, results: earlier });
  });

  it('reads computed levels as they are: parts of energies, natural orbitals, the loss of the reference', () => {
    const prepared = prepare({
      ...study([atom('H'), atom('H', 0, 0, 1.4)], { levels: ['RHF', 'MP2', 'CISD'], states: 3 }),
      scan: { coordinate: { bonds: [[0, 1]] }, values: [1.4, 6] },
    });
    const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
    const { referenceWeight } = findLevelMinimum(prepared, 'CISD', points);
    expect(referenceWeight?.kind).toBe('found');
    expect(points[0]!.levels.CISD).toHaveProperty('correlationParts');
    expect(points[0]!.levels.CISD).toHaveProperty('naturalOrbitals');
    const results = {
      ...RESULTS,
      points,
      findings: { CISD: { ...RESULTS.findings.CISD, referenceWeight: referenceWeight! } },
    } as StudyResults;
    const text = JSON.stringify(results);
    expect(parseResults(text)).toEqual({ ok: true, results: JSON.parse(text) });
    const damaged = text.replace('"byRank":[', '"byRank":[7,');
    expect(parseResults(damaged)).toMatchObject({
      ok: false,
      issues: [{ place: 'points[0].levels.CISD.correlationParts.byRank[0]' }],
    });
  });

  it('keeps keys that a later version may have added', () => {
    const reading = parseResults(changed((results) => Object.assign(results, { remark: 'new' })));
    expect(reading).toMatchObject({ ok: true, results: { remark: 'new' } });
  });

  it('reads a number that JSON could not hold back as not a number', () => {
    const reading = parseResults(
      changed((results: { points?: { levels: { RHF: { energy: number } } }[] }) => {
        results.points![0]!.levels.RHF.energy = Number.NaN;
      }),
    );
    if (!reading.ok) throw new Error('refused');
    expect(reading.results.points[0]?.levels.RHF).toMatchObject({ energy: Number.NaN });
  });

  it('names the places that are missing or of the wrong kind', () => {
    expect(
      issues(
        changed(
          (results: {
            points?: { levels: { RHF: { energy: unknown } } }[];
            basis?: { functions: unknown };
          }) => {
            results.points![0]!.levels.RHF.energy = '-2.84';
            delete results.basis!.functions;
          },
        ),
      ),
    ).toEqual(['results.form at basis.functions', 'results.form at points[0].levels.RHF.energy']);
    expect(issues(changed((results: { points?: unknown }) => delete results.points))).toEqual([
      'results.form at points',
    ]);
  });

  it('checks the study inside as a study', () => {
    expect(
      issues(
        changed((results: { study?: { levels: string[] } }) => {
          results.study!.levels = ['RHX'];
        }),
      ),
    ).toEqual(['results.form at study.levels[0]']);
  });

  it('refuses files that are cut off, of another kind or of another version', () => {
    expect(issues(JSON.stringify(RESULTS).slice(0, -10))).toEqual(['json.syntax at ']);
    expect(issues('')).toEqual(['json.syntax at ']);
    expect(issues('null')).toEqual(['results.format at format']);
    expect(issues(JSON.stringify(RESULTS.study))).toEqual(['results.format at format']);
    expect(issues(JSON.stringify({ ...RESULTS, version: 2 }))).toEqual(['results.version at version']);
  });

  it('lets no key of the file become a prototype', () => {
    const text = JSON.stringify(RESULTS).replace('"version":1', '"version":1,"__proto__":{"polluted":true}');
    const reading = parseResults(text);
    if (!reading.ok) throw new Error('refused');
    expect('polluted' in reading.results).toBe(false);
    expect('polluted' in {}).toBe(false);
  });
});
