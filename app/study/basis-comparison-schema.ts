import { z } from 'zod';
import type { BasisDescription, BasisSetLimit, Caution, LevelFindings, StudyInBasis } from '#engine';
import { constants, estimate } from './findings-schema';

/* The form of what a results file holds of further bases. */

export const basisDescription: z.ZodType<BasisDescription> = z.looseObject({
  name: z.string(),
  harmonics: z.enum(['spherical', 'cartesian']),
  functions: z.number(),
  shells: z.record(
    z.string(),
    z.array(
      z.looseObject({
        angularMomentum: z.number(),
        exponents: z.array(z.number()),
        coefficients: z.array(z.number()),
      }),
    ),
  ),
  citations: z.array(z.string()),
  notes: z.array(z.string()),
});

const atEachPoint = z.array(z.number().nullable());

export function studyInBasis(
  findings: z.ZodType<LevelFindings>,
  cautions: z.ZodType<readonly Caution[]>,
): z.ZodType<StudyInBasis> {
  return z.looseObject({
    basis: basisDescription,
    levels: z.record(
      z.string(),
      z.looseObject({ energies: atEachPoint, correlation: atEachPoint.exactOptional() }),
    ),
    findings: z.record(z.string(), findings),
    cautions,
  });
}

const limitFormula = z.looseObject({
  formula: z.enum([
    'exponentialThreePoint',
    'exponential',
    'exponentialRoot',
    'inverseCube',
    'inverseFourth',
  ]),
  cardinals: z.array(z.number()),
});

export const basisSetLimit: z.ZodType<BasisSetLimit> = z.discriminatedUnion('kind', [
  z.looseObject({
    kind: z.literal('found'),
    family: z.string(),
    members: z.array(z.looseObject({ name: z.string(), cardinal: z.number() })),
    levels: z.record(
      z.string(),
      z.looseObject({
        hartreeFock: limitFormula,
        correlation: limitFormula.exactOptional(),
        energies: z.array(estimate.nullable()),
        curve: z
          .discriminatedUnion('kind', [
            z.looseObject({
              kind: z.literal('found'),
              equilibriumDistance: estimate,
              energy: estimate,
              constants,
              wellDepth: estimate.exactOptional(),
            }),
            z.looseObject({ kind: z.literal('none'), reason: z.string() }),
          ])
          .exactOptional(),
      }),
    ),
  }),
  z.looseObject({ kind: z.literal('none'), reason: z.string() }),
]);
