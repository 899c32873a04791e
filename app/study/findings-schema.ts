import { z } from 'zod';
import type {
  Counterpoise,
  CurveFits,
  Dissociation,
  ExcitedState,
  Isotopologue,
  LevelFindings,
  Vibration,
  WellConstants,
  WellDepth,
} from '#engine';

/* The form of what is read off a curve, in a results file. */

/** JSON has no NaN and writes null for it, as the last energy of an iteration that ran away may be. */
export const number = z.union([z.number(), z.null().transform(() => Number.NaN)]);

export const minimum: z.ZodType<LevelFindings['minimum']> = z.discriminatedUnion('kind', [
  z.looseObject({
    kind: z.literal('found'),
    equilibriumDistance: z.number(),
    energy: z.number(),
    uncertainty: z.number(),
    onKink: z.literal(true).exactOptional(),
    others: z
      .array(z.looseObject({ equilibriumDistance: z.number(), energy: z.number(), uncertainty: z.number() }))
      .exactOptional(),
  }),
  z.looseObject({ kind: z.literal('atEdge'), coordinate: z.number() }),
  z.looseObject({ kind: z.literal('several'), near: z.array(z.number()) }),
  z.looseObject({ kind: z.literal('none'), reason: z.string() }),
]);

export const estimate = z.looseObject({ value: z.number(), uncertainty: z.number() });

const diatomicConstants = z.looseObject({
  masses: z.literal('atomic'),
  reducedMassDalton: z.number(),
  harmonicWavenumberPerCm: estimate,
  anharmonicityPerCm: estimate,
  rotationalConstantPerCm: estimate,
  vibrationRotationCouplingPerCm: estimate,
  centrifugalDistortionPerCm: estimate,
});

export const constants: z.ZodType<WellConstants> = z.looseObject({
  equilibriumDistanceAngstrom: estimate,
  forceConstantNewtonPerMetre: estimate,
  diatomic: diatomicConstants.exactOptional(),
  withoutDiatomic: z.string().exactOptional(),
});

const fragment = z.looseObject({
  atoms: z.array(z.number()),
  charge: z.number(),
  multiplicity: z.number(),
  energy: z.number(),
  level: z.string(),
  startedFrom: z.number().exactOptional(),
  correlation: z.number().exactOptional(),
  excitation: z.number().exactOptional(),
});

export const dissociation: z.ZodType<Dissociation> = z.discriminatedUnion('kind', [
  z.looseObject({
    kind: z.literal('found'),
    energy: z.number(),
    fragments: z.tuple([fragment, fragment]),
    farEndAbove: z.number().exactOptional(),
  }),
  z.looseObject({ kind: z.literal('none'), reason: z.string() }),
]);

export const wellDepth: z.ZodType<WellDepth> = z.discriminatedUnion('against', [
  z.looseObject({ value: z.number(), against: z.literal('farEnd'), farEnd: z.number() }),
  z.looseObject({
    value: z.number(),
    against: z.literal('fragments'),
    farEnd: z.number(),
    valueAgainstFarEnd: z.number(),
  }),
]);

const superposition = z.looseObject({ energyInWholeBasis: z.number(), error: z.number() });

export const counterpoise: z.ZodType<Counterpoise> = z.discriminatedUnion('kind', [
  z.looseObject({
    kind: z.literal('found'),
    fragments: z.tuple([superposition, superposition]),
    error: z.number(),
    wellDepth: z.number(),
    alongCurve: z.array(z.number().nullable()).exactOptional(),
  }),
  z.looseObject({ kind: z.literal('none'), reason: z.string() }),
]);

const rotatingLevel = { v: z.number(), energyPerCm: z.number(), uncertaintyPerCm: number };

export const vibration: z.ZodType<Vibration> = z.discriminatedUnion('kind', [
  z.looseObject({
    kind: z.literal('found'),
    levels: z.array(
      z.looseObject({
        ...rotatingLevel,
        rotationalConstantPerCm: z.number(),
        centrifugalDistortionPerCm: z.number().exactOptional(),
      }),
    ),
    rotating: z
      .array(
        z.looseObject({
          rotation: z.number(),
          levels: z.array(z.looseObject(rotatingLevel)),
          quasiBound: z.array(z.looseObject({ ...rotatingLevel, widthPerCm: z.number() })),
          barrierPerCm: z.number().exactOptional(),
          converged: z.boolean(),
        }),
      )
      .exactOptional(),
    zeroPointPerCm: z.number(),
    d0: z.number().exactOptional(),
    boundLevels: z.number(),
    converged: z.boolean(),
    beyondComputedRange: z.array(z.number()),
    interpolationErrorPerCm: z.number(),
    pointsAdded: z.number(),
    reducedMassDalton: z.number(),
  }),
  z.looseObject({
    kind: z.literal('none'),
    reason: z.string(),
    isDoubtful: z.literal(true).exactOptional(),
  }),
]);

export const isotopologue: z.ZodType<Isotopologue> = z.looseObject({
  massNumbers: z.array(z.number()),
  reducedMassDalton: z.number(),
  constants: diatomicConstants.exactOptional(),
  vibration,
});

const fitQuality = {
  rootMeanSquarePerCm: z.number(),
  largestPerCm: z.number(),
  points: z.number(),
  range: z.tuple([z.number(), z.number()]),
};
const fittedForm = {
  ...fitQuality,
  depth: z.number(),
  equilibriumDistanceBohr: z.number(),
  limit: z.number(),
  limitIsFixed: z.boolean(),
};

export const fits: z.ZodType<CurveFits> = z.looseObject({
  morse: z.looseObject({ ...fittedForm, steepnessPerBohr: z.number() }).exactOptional(),
  extendedRydberg: z
    .looseObject({ ...fittedForm, coefficientsInBohr: z.tuple([z.number(), z.number(), z.number()]) })
    .exactOptional(),
  dunham: z
    .looseObject({
      ...fitQuality,
      energy: z.number(),
      equilibriumDistanceBohr: z.number(),
      leading: z.number(),
      coefficients: z.tuple([z.number(), z.number(), z.number(), z.number()]),
    })
    .exactOptional(),
});

export const excitedState: z.ZodType<ExcitedState> = z.looseObject({
  curve: z.number(),
  minimum,
  minimumFrom: z.enum(['computed', 'interpolated']).exactOptional(),
  constants: constants.exactOptional(),
  vertical: z
    .looseObject({
      coordinate: z.number(),
      energy: estimate,
      oscillatorStrength: number.exactOptional(),
      transitionDipole: number.exactOptional(),
    })
    .exactOptional(),
  adiabatic: estimate.exactOptional(),
  zeroPointToZeroPoint: estimate.exactOptional(),
  dissociation: dissociation.exactOptional(),
  wellDepth: wellDepth.exactOptional(),
  transitionMoments: z.array(
    z.looseObject({ coordinate: z.number(), dipole: number, oscillatorStrength: number }),
  ),
  vibration: vibration.exactOptional(),
  franckCondon: z
    .looseObject({
      factors: z.array(z.array(number)),
      sums: z.array(number),
      boundLevels: z.number(),
      uncertainty: number,
      converged: z.boolean(),
    })
    .exactOptional(),
});
