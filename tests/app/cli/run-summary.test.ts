import { describe, expect, it } from 'vitest';
import { type StudyResults, studyInBasis } from '#engine';
import { summarise } from '../../../app/cli/run-summary';
import { hartreeFock, sampleResults } from '../../support/sample-results';

const results = sampleResults();

/** The sample with RHF stopped short at its first `count` points. */
function withUnconverged(count: number): StudyResults {
  const RHF = hartreeFock(-1, { converged: false, termination: { kind: 'iterationLimit', limit: 200 } });
  return {
    ...results,
    points: results.points.map((point, index) =>
      index < count ? { ...point, levels: { ...point.levels, RHF } } : point,
    ),
  };
}

const linesAbout = (about: RegExp, of: StudyResults) =>
  summarise(of).lines.filter((line) => about.test(line));

describe('summarise', () => {
  it('ends with status 0 when everything converged, and with 1 otherwise', () => {
    expect(summarise(results).exit).toBe(0);
    expect(summarise(withUnconverged(1)).exit).toBe(1);
  });

  it('says which level did not converge, where and why', () => {
    expect(linesAbout(/not converge/, results)).toEqual([]);
    expect(linesAbout(/not converge/, withUnconverged(1))).toEqual([
      'RHF did not converge at 0.4 Å: not done after 200 iterations.',
    ]);
  });

  it('tells of a level that was left out because of another one', () => {
    const [point] = results.points;
    const failed = {
      kind: 'failed',
      converged: false,
      termination: { kind: 'orbitalsNotConverged' },
    } as const;
    const lines = linesAbout(/not converge/, {
      ...results,
      points: [{ ...point!, coordinate: null, levels: { FCI: failed } }],
    });
    expect(lines).toEqual(['FCI did not converge: the orbitals that it builds on did not converge.']);
  });

  it('counts the rest of many', () => {
    expect(linesAbout(/not converge/, withUnconverged(37))).toHaveLength(12);
    expect(summarise(withUnconverged(37)).lines.at(-1)).toBe('… and 25 more, marked in the results file.');
  });

  it('gives the minimum of a level with its depth, or says why there is none', () => {
    expect(linesAbout(/^(RHF|CISD|FCI):/, results)).toEqual([
      'RHF: lowest at the end of the range, 0.4 Å: no minimum inside',
      'CISD: no minimum: fewer than five converged points',
      expect.stringMatching(
        /^FCI: minimum of -1\.170000 hartree at 0\.74 Å, 0\.16\d{4} hartree below the curve at 4 Å$/,
      ),
    ]);
  });

  it('says where RHF becomes unstable, and how many points are without their best scale factors', () => {
    const RHF = {
      ...results.findings.RHF!,
      instabilityOnset: { kind: 'found', coordinate: 1.203456, uncertainty: 3e-4 },
    } as const;
    expect(linesAbout(/unstable/, { ...results, findings: { RHF } })).toEqual([
      'RHF: becomes unstable towards different orbitals for different spins at 1.2035 Å',
    ]);
    const scaleOptimisation = {
      level: 'RHF',
      converged: false,
      termination: { kind: 'iterationLimit', limit: 80 },
      iterations: 80,
      residual: 1e-3,
    } as const;
    const points = results.points.map((point, i) => (i < 2 ? { ...point, scaleOptimisation } : point));
    expect(linesAbout(/^Scale/, { ...results, points })).toEqual([
      'Scale factors not found at 2 points: see the results file.',
    ]);
    expect(summarise({ ...results, points }).exit).toBe(1);
  });

  it('has nothing to say about a single point that converged', () => {
    const { scan: _, ...study } = results.study;
    expect(summarise({ ...results, study, points: results.points.slice(0, 1) }).lines).toEqual([]);
  });

  it('writes out the cautions of the whole curve, then those of points once with the range that they cover', () => {
    expect(linesAbout(/^Caution/, { ...results, cautions: [{ code: 'a', message: 'Too coarse.' }] })).toEqual(
      [
        'Caution: Too coarse.',
        expect.stringMatching(
          /^Caution: RHF between 2\.1 Å and 4 Å \(20 points\): The closed-shell solution/,
        ),
      ],
    );
  });

  it('says of a further basis only the cautions that the own one has not', () => {
    const cautions = [{ code: 'a', level: 'FCI', message: 'Too coarse.' }];
    const further = [...cautions, { code: 'b', level: 'FCI', message: 'A kink.', range: [1, 2.0000001] }];
    const inBasis = {
      ...studyInBasis(results),
      basis: { ...results.basis, name: 'cc-pVTZ' },
      cautions: further as StudyResults['cautions'],
    };
    expect(linesAbout(/^Caution in/, { ...results, cautions, furtherBases: [inBasis] })).toEqual([
      'Caution in cc-pVTZ: FCI between 1 Å and 2 Å: A kink.',
    ]);
  });

  it('says of a caution what it means, and below that what to do', () => {
    const cautions = [
      { code: 'a', message: 'It ends early.', meaning: 'It is too short.', remedy: 'Go on.' },
    ];
    const { lines } = summarise({ ...results, cautions });
    const place = lines.indexOf('Caution: It ends early. It is too short.');
    expect(lines[place + 1]).toBe('  Go on.');
  });

  it('gives the depth with counterpoise beside the other, and says where a minimum is no smooth one', () => {
    const { FCI } = results.findings;
    if (FCI?.minimum.kind !== 'found') throw new Error('no minimum');
    const superposition = { energyInWholeBasis: -1, error: 0.001 };
    const counterpoise = {
      kind: 'found',
      fragments: [superposition, superposition],
      error: 0.002,
      wellDepth: 0.123,
    } as const;
    const minimum = { ...FCI.minimum, onKink: true, uncertainty: 0.0123 } as const;
    const [line] = linesAbout(/minimum/, {
      ...results,
      findings: { FCI: { ...FCI, minimum, counterpoise } },
    });
    expect(line).toMatch(/ Å \(no smooth curve there: known to 0.012 Å\), .*, 0.123000 with counterpoise$/);
  });

  it('gives minima in further bases and in their limit, and fails where one of them did not converge', () => {
    const inBasis = {
      ...studyInBasis(results),
      basis: { ...results.basis, name: 'cc-pVTZ' },
    };
    const estimate = { value: -1.17541, uncertainty: 0.00101 };
    const basisSetLimit = {
      kind: 'found',
      family: 'cc-pVXZ',
      members: [],
      levels: {
        FCI: {
          hartreeFock: { formula: 'exponential', cardinals: [2, 3] },
          energies: [],
          curve: {
            kind: 'found',
            equilibriumDistance: { value: 0.74123, uncertainty: 0.001 },
            energy: estimate,
            constants: { equilibriumDistanceAngstrom: estimate, forceConstantNewtonPerMetre: estimate },
            wellDepth: { value: 0.17444, uncertainty: 0.0004 },
          },
        },
      },
    } as const;
    const more = { ...results, furtherBases: [inBasis], basisSetLimit };
    expect(linesAbout(/in cc-pVTZ/, more).length).toBeGreaterThan(0);
    expect(linesAbout(/limit of/, more)).toEqual([
      'FCI in the limit of cc-pVXZ: minimum of -1.1754 ± 0.0010 hartree at 0.7412 Å, 0.17444 ± 0.00040 hartree below separate fragments',
    ]);
    expect(summarise(more).exit).toBe(0);
    const missing = { ...inBasis, levels: { FCI: { energies: [null, -1, null] } } };
    expect(linesAbout(/did not converge/, { ...more, furtherBases: [missing] })).toEqual([
      'FCI did not converge in cc-pVTZ at 2 points.',
    ]);
    expect(summarise({ ...more, furtherBases: [missing] }).exit).toBe(1);
  });
});
