import { z } from 'zod';
import type {
  Caution,
  LevelFindings,
  LevelResult,
  MeasuredQuantity,
  MeasuredState,
  PointResult,
  StudyResults,
} from '#engine';
import { basisDescription, basisSetLimit, studyInBasis } from './basis-comparison-schema';
import {
  constants,
  counterpoise,
  dissociation,
  excitedState,
  fits,
  isotopologue,
  minimum,
  number,
  vibration,
  wellDepth,
} from './findings-schema';
import { studySchema } from './schema';

/*
 * The form of a results file: enough to open a file that someone else wrote without a surprise further on. Keys
 * that a later version may add are kept.
 */

const numbers = z.array(number);
const vector = z.tuple([number, number, number]);

const iterationEnds = [
  z.looseObject({ kind: z.literal('converged') }),
  z.looseObject({ kind: z.literal('iterationLimit'), limit: z.number() }),
  z.looseObject({ kind: z.literal('stagnated'), iterationsWithoutProgress: z.number() }),
  z.looseObject({ kind: z.literal('notFinite'), quantity: z.string() }),
  z.looseObject({ kind: z.literal('cancelled') }),
] as const;
const levelEnds = [...iterationEnds, z.looseObject({ kind: z.literal('orbitalsNotConverged') })] as const;
const termination = z.discriminatedUnion('kind', iterationEnds);
const levelTermination = z.discriminatedUnion('kind', levelEnds);

const spin = z.enum(['singlet', 'doublet', 'triplet', 'quartet', 'quintet', 'sextet', 'septet', 'mixed']);

const stateSymmetry = z.looseObject({
  irrep: z.string(),
  term: z
    .looseObject({
      lambda: z.number(),
      inversion: z.enum(['g', 'u']).exactOptional(),
      reflection: z.enum(['+', '-']).exactOptional(),
    })
    .exactOptional(),
});
const orbitalLabels = z.array(z.string().nullable());

const divided = { mulliken: numbers, loewdin: numbers };
const charges = z.looseObject({ ...divided, spin: z.looseObject(divided).exactOptional() });

const energyParts = z.looseObject({
  kinetic: number,
  nuclearAttraction: number,
  electronRepulsion: number,
  coulomb: number,
  exchangeCorrelation: number,
  exchange: number.exactOptional(),
  correlation: number.exactOptional(),
  nuclearRepulsion: number,
  virialRatio: number,
});

/** Something that does not exist, and why. */
const none = z.looseObject({ kind: z.literal('none'), reason: z.string() });

const unpairedElectrons = z.looseObject({ linear: number, quadratic: number, quartic: number });

const correlationParts = z.looseObject({
  total: number,
  byRank: z.array(z.looseObject({ weight: number, energy: number })),
  projected: z.discriminatedUnion('kind', [
    z.looseObject({
      kind: z.literal('found'),
      singles: z.array(z.looseObject({ orbital: z.number(), energy: number })),
      pairs: z.array(
        z.looseObject({
          orbitals: z.tuple([z.number(), z.number()]),
          energy: number,
          sameSpin: number,
        }),
      ),
    }),
    none,
  ]),
});

const sizeCorrections = z.looseObject({
  davidson: number,
  renormalised: number,
  davidsonSilver: number.exactOptional(),
  pople: number.exactOptional(),
  duchDiercksen: number.exactOptional(),
  meissner: number,
});

const hartreeFock = z.looseObject({
  kind: z.literal('hartreeFock'),
  energy: number,
  converged: z.boolean(),
  termination,
  iterations: z.number(),
  orbitalEnergies: z.union([numbers, z.looseObject({ alpha: numbers, beta: numbers })]),
  orbitalSymmetries: z
    .union([orbitalLabels, z.looseObject({ alpha: orbitalLabels, beta: orbitalLabels })])
    .exactOptional(),
  symmetry: stateSymmetry.exactOptional(),
  dipole: vector,
  energyParts: energyParts.exactOptional(),
  sSquared: number.exactOptional(),
  stability: z
    .union([z.looseObject({ singlet: number, triplet: number }), z.looseObject({ own: number })])
    .exactOptional(),
  charges: charges.exactOptional(),
});

const perturbation = z.looseObject({
  kind: z.literal('perturbation'),
  energy: number,
  correlation: number,
  reference: z.enum(['RHF', 'UHF']),
  sameSpin: number,
  oppositeSpin: number,
  energyParts: none.exactOptional(),
  converged: z.boolean(),
  termination: levelTermination,
});

const singles = z.looseObject({
  kind: z.literal('singles'),
  converged: z.boolean(),
  termination: levelTermination,
  states: z.array(
    z.looseObject({
      energy: number,
      excitation: number,
      spin: z.enum(['singlet', 'triplet']),
      symmetry: stateSymmetry.exactOptional(),
      oscillatorStrength: number,
      transitionDipole: vector,
      leading: z.array(z.looseObject({ from: z.number(), to: z.number(), weight: number })),
      naturalOccupations: numbers.exactOptional(),
      unpairedElectrons: unpairedElectrons.exactOptional(),
      dipole: vector.exactOptional(),
      energyParts: energyParts.exactOptional(),
    }),
  ),
});

const correlatedState = z.looseObject({
  energy: number,
  excitation: number,
  spin,
  symmetry: stateSymmetry.exactOptional(),
  sSquared: number,
  referenceWeight: number,
  residual: number,
  oscillatorStrength: number.exactOptional(),
  transitionDipole: vector.exactOptional(),
  dipole: vector,
  charges: charges.exactOptional(),
  naturalOccupations: numbers,
  unpairedElectrons: unpairedElectrons.exactOptional(),
  leading: z.array(
    z.looseObject({
      coefficient: number,
      weight: number,
      alpha: z.array(z.number()),
      beta: z.array(z.number()),
    }),
  ),
  configurations: z
    .array(
      z.looseObject({
        weight: number,
        doublyOccupied: z.array(z.number()),
        singlyOccupied: z.array(z.number()),
      }),
    )
    .exactOptional(),
});

const correlated = z.looseObject({
  kind: z.literal('correlated'),
  energy: number,
  correlation: number,
  converged: z.boolean(),
  termination: levelTermination,
  iterations: z.number(),
  determinants: z.number(),
  referenceWeight: number,
  reference: z.literal('UHF').exactOptional(),
  sSquared: number,
  spin,
  symmetry: stateSymmetry.exactOptional(),
  naturalOccupations: numbers,
  naturalOrbitals: z
    .looseObject({ coefficients: z.array(numbers), symmetries: orbitalLabels.exactOptional() })
    .exactOptional(),
  unpairedElectrons: unpairedElectrons.exactOptional(),
  correlationParts: correlationParts.exactOptional(),
  dipole: vector,
  energyParts: energyParts.exactOptional(),
  davidsonCorrected: number.exactOptional(),
  sizeCorrections: sizeCorrections.exactOptional(),
  states: z.array(correlatedState),
});

const failed = z.looseObject({
  kind: z.literal('failed'),
  converged: z.literal(false),
  termination: z.discriminatedUnion('kind', [
    ...levelEnds,
    z.looseObject({ kind: z.literal('refused'), message: z.string() }),
  ]),
});

const level: z.ZodType<LevelResult> = z.discriminatedUnion('kind', [
  hartreeFock,
  perturbation,
  singles,
  correlated,
  failed,
]);

const cautions: z.ZodType<readonly Caution[]> = z.array(
  z.looseObject({
    code: z.string(),
    message: z.string(),
    meaning: z.string().exactOptional(),
    remedy: z.string().exactOptional(),
    numbers: z.array(z.looseObject({ name: z.string(), value: number, unit: z.string() })).exactOptional(),
    level: z.string().exactOptional(),
    range: z.tuple([z.number(), z.number()]).exactOptional(),
  }),
);

const point: z.ZodType<PointResult> = z.looseObject({
  coordinate: z.number().nullable(),
  atoms: z.array(
    z.looseObject({
      element: z.string(),
      at: z.tuple([z.number(), z.number(), z.number()]),
      isotope: z.number().optional(),
      ghost: z.boolean().optional(),
    }),
  ),
  nuclearRepulsion: z.number(),
  scaleFactors: z.record(z.string(), z.record(z.string(), z.number())).exactOptional(),
  scaleOptimisation: z
    .looseObject({
      level: z.enum(['RHF', 'ROHF', 'UHF']),
      converged: z.boolean(),
      termination,
      iterations: z.number(),
      residual: number,
      atLimit: z.array(z.string()).exactOptional(),
    })
    .exactOptional(),
  symmetry: z
    .looseObject({
      pointGroup: z.enum(['C1', 'Ci', 'Cs', 'C2', 'C2v', 'C2h', 'D2', 'D2h']),
      linear: z.enum(['C∞v', 'D∞h']).exactOptional(),
    })
    .exactOptional(),
  levels: z.record(z.string(), level),
  cautions,
});

const weightCrossings = {
  threshold: z.number(),
  crossings: z.array(
    z.looseObject({
      coordinate: z.number(),
      uncertainty: z.number(),
      direction: z.enum(['falling', 'rising']),
    }),
  ),
};

const findings: z.ZodType<LevelFindings> = z.looseObject({
  minimum,
  constants: constants.exactOptional(),
  dissociation: dissociation.exactOptional(),
  wellDepth: wellDepth.exactOptional(),
  counterpoise: counterpoise.exactOptional(),
  vibration: vibration.exactOptional(),
  isotopologues: z.array(isotopologue).exactOptional(),
  fits: fits.exactOptional(),
  excitedStates: z.array(excitedState).exactOptional(),
  instabilityOnset: z
    .discriminatedUnion('kind', [
      z.looseObject({ kind: z.literal('found'), coordinate: z.number(), uncertainty: z.number() }),
      none,
    ])
    .exactOptional(),
  referenceWeight: z
    .discriminatedUnion('kind', [
      z.looseObject({
        kind: z.literal('found'),
        ...weightCrossings,
        coordinate: z.number(),
        uncertainty: z.number(),
      }),
      z.looseObject({ kind: z.literal('none'), ...weightCrossings, reason: z.string() }),
    ])
    .exactOptional(),
});

const measuredState: z.ZodType<MeasuredState> = z.looseObject({
  state: z.string(),
  isGroundState: z.boolean(),
  constants: z.array(
    z.looseObject({
      quantity: z.custom<MeasuredQuantity>((value) => typeof value === 'string'),
      printed: z.string(),
      value: z.number(),
      unit: z.enum(['cm⁻¹', 'Å', 'eV', 'MHz']),
      source: z.string(),
      status: z.enum(['seen', 'memory']),
      note: z.string().exactOptional(),
    }),
  ),
});

/** The study as run has its defaults filled in. */
const completeStudy = z.intersection(
  studySchema,
  z.looseObject({
    molecule: z.looseObject({ charge: z.number(), multiplicity: z.number() }),
    states: z.number(),
    frozenCore: z.boolean(),
    convergence: z.looseObject({ energy: z.number() }),
  }),
);

/** @see StudyResults */
export const resultsSchema: z.ZodType<StudyResults> = z.looseObject({
  format: z.literal('farwell/results'),
  version: z.literal(1),
  study: completeStudy,
  program: z.looseObject({
    name: z.literal('farwell'),
    version: z.string(),
    date: z.string().exactOptional(),
  }),
  basis: basisDescription,
  points: z.array(point),
  findings: z.record(z.string(), findings),
  curves: z
    .record(z.string(), z.array(z.looseObject({ name: z.string(), states: z.array(z.number().nullable()) })))
    .exactOptional(),
  furtherBases: z.array(studyInBasis(findings, cautions)).exactOptional(),
  basisSetLimit: basisSetLimit.exactOptional(),
  measured: z.array(measuredState).exactOptional(),
  cautions,
});
