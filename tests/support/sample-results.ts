import type {
  CompleteStudy,
  CorrelatedResult,
  CorrelatedState,
  HartreeFockResult,
  PointResult,
  SinglesResult,
  StudyResults,
} from '#engine';

/*
 * Results for tests of what is built on results (tables, figures, windows). The curves are Morse functions with
 * plausible shapes: no calculation, so nothing in them may serve as a check of the engine.
 */

const converged = { kind: 'converged' } as const;
const WELL_DEPTH = 0.17;
const STEEPNESS_PER_ANGSTROM = 1.95;
const EQUILIBRIUM_ANGSTROM = 0.74;

const morse = (distance: number): number =>
  WELL_DEPTH * ((1 - Math.exp(-STEEPNESS_PER_ANGSTROM * (distance - EQUILIBRIUM_ANGSTROM))) ** 2 - 1);
/** grows from dynamic to static correlation as the bond breaks */
const correlationAt = (distance: number): number => -0.02 - 0.25 / (1 + Math.exp(-2.2 * (distance - 2.2)));

const fullEnergy = (distance: number): number => -1 + morse(distance);

export function hartreeFock(energy: number, options: Partial<HartreeFockResult> = {}): HartreeFockResult {
  return {
    kind: 'hartreeFock',
    energy,
    converged: true,
    termination: converged,
    iterations: 8,
    orbitalEnergies: [-0.58, 0.67],
    dipole: [0, 0, 0],
    ...options,
  };
}

export function correlated(
  energy: number,
  correlation: number,
  options: Partial<CorrelatedResult> = {},
): CorrelatedResult {
  const state: CorrelatedState = {
    energy,
    excitation: 0,
    spin: 'singlet',
    sSquared: 0,
    referenceWeight: 0.98,
    residual: 1e-9,
    dipole: [0, 0, 0],
    naturalOccupations: [1.97, 0.03],
    leading: [],
  };
  return {
    kind: 'correlated',
    energy,
    correlation,
    converged: true,
    termination: converged,
    iterations: 5,
    determinants: 4,
    referenceWeight: 0.98,
    sSquared: 0,
    spin: 'singlet',
    naturalOccupations: [1.97, 0.03],
    dipole: [0, 0, 0],
    states: [state],
    ...options,
  };
}

export function singles(
  energies: readonly { readonly spin: 'singlet' | 'triplet'; readonly energy: number }[],
): SinglesResult {
  return {
    kind: 'singles',
    converged: true,
    termination: converged,
    states: energies.map(({ spin, energy }) => ({
      energy,
      excitation: energy + 1.1,
      spin,
      oscillatorStrength: spin === 'singlet' ? 0.6 : 0,
      transitionDipole: [0, 0, 1],
      leading: [{ from: 0, to: 1, weight: 1 }],
    })),
  };
}

/** One point of the sample curve; `distance` in ångström. */
export function samplePoint(
  distance: number,
  levels: readonly string[] = ['RHF', 'CISD', 'FCI'],
): PointResult {
  const full = fullEnergy(distance);
  const correlation = correlationAt(distance);
  const all: PointResult['levels'] = {
    RHF: hartreeFock(full - correlation),
    CIS: singles([
      { spin: 'triplet', energy: full + 0.55 * Math.exp(-0.9 * (distance - 0.74)) },
      { spin: 'singlet', energy: full + 0.4 + 0.5 * Math.exp(-0.9 * (distance - 0.74)) },
    ]),
    CISD: correlated(full - 0.04 * correlation - 0.0004, 0.96 * correlation - 0.0004),
    FCI: correlated(full, correlation),
  };
  return {
    coordinate: distance,
    atoms: [
      { element: 'H', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, distance] },
    ],
    nuclearRepulsion: 0.529177210544 / distance,
    levels: Object.fromEntries(levels.map((level) => [level, all[level]!])),
    cautions:
      distance > 2
        ? [
            {
              code: 'rhf.unstable',
              level: 'RHF',
              message:
                'The closed-shell solution is not the lowest one here: breaking the spin pairing lowers the energy.',
            },
          ]
        : [],
  };
}

export const sampleStudy: CompleteStudy = {
  format: 'farwell/study',
  version: 1,
  title: 'Two hydrogen atoms come together',
  molecule: {
    unit: 'angstrom',
    atoms: [
      { element: 'H', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 0.74] },
    ],
    charge: 0,
    multiplicity: 1,
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 0.4, to: 4, count: 37 },
  basis: 'STO-3G',
  levels: ['RHF', 'CISD', 'FCI'],
  states: 1,
  frozenCore: false,
  convergence: { energy: 1e-10 },
};

/** A whole results file of the sample curve. */
export function sampleResults(levels: readonly string[] = ['RHF', 'CISD', 'FCI']): StudyResults {
  const points = Array.from({ length: 37 }, (_, index) => samplePoint((4 + index) / 10, levels));
  const found = (equilibriumDistance: number) => ({
    minimum: {
      kind: 'found',
      equilibriumDistance,
      energy: fullEnergy(equilibriumDistance),
      uncertainty: 1e-5,
    } as const,
  });
  return {
    format: 'farwell/results',
    version: 1,
    study: { ...sampleStudy, levels },
    program: { name: 'farwell', version: '0.1.0' },
    basis: {
      name: 'STO-3G',
      harmonics: 'spherical',
      functions: 2,
      shells: {
        H: [
          {
            angularMomentum: 0,
            exponents: [3.42525091, 0.62391373, 0.1688554],
            coefficients: [0.15432897, 0.53532814, 0.44463454],
          },
        ],
      },
      citations: ['W. J. Hehre, R. F. Stewart, J. A. Pople, J. Chem. Phys. 51, 2657 (1969)'],
      notes: [],
    },
    points,
    findings: {
      FCI: {
        ...found(EQUILIBRIUM_ANGSTROM),
        wellDepth: { value: fullEnergy(4) - fullEnergy(EQUILIBRIUM_ANGSTROM), against: 'farEnd', farEnd: 4 },
      },
      CISD: { minimum: { kind: 'none', reason: 'fewer than five converged points' } },
      RHF: { minimum: { kind: 'atEdge', coordinate: 0.4 } },
    },
    cautions: [],
  };
}
