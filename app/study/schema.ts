import { z } from 'zod';
import type {
  BasisRequest,
  ScanCoordinate,
  ShellDefinition,
  Study,
  StudyAtom,
  StudyMolecule,
  StudyScan,
} from '#engine';
import {
  closed,
  countingNumber,
  hasKey,
  type IssueParams,
  integer,
  isFiniteNumber,
  leaf,
  list,
  name,
  number,
  oneOf,
  text,
  wholeNumber,
  yesOrNo,
} from './schema-fields';

/*
 * The form of a study file. Whether elements, basis sets and levels exist, are within bounds and fit together is
 * for the engine to say.
 */

/** Level names of the field, whether or not this version computes them: a typo must not look like a missing method. */
export const LEVEL_NAMES = [
  'RHF',
  'UHF',
  'ROHF',
  'MP2',
  'CIS',
  'CISD',
  'CISDT',
  'CISDTQ',
  'CISDTQ5',
  'CISDTQ56',
  'FCI',
] as const;

const atom: z.ZodType<StudyAtom> = closed({
  element: leaf<string>(
    'an element symbol such as "He"',
    (value) => typeof value === 'string' && value.length <= 50,
  ),
  at: leaf<[number, number, number]>(
    'three numbers [x, y, z]',
    (value) => Array.isArray(value) && value.length === 3 && value.every(isFiniteNumber),
  ),
  isotope: countingNumber.optional(),
  ghost: yesOrNo.optional(),
});

const molecule: z.ZodType<StudyMolecule> = closed({
  unit: leaf<'angstrom' | 'bohr'>(
    '"angstrom" or "bohr"',
    (value) => value === 'angstrom' || value === 'bohr',
  ),
  atoms: list(atom, 'atoms', 100),
  charge: integer.optional(),
  multiplicity: countingNumber.optional(),
});

const isIndex = (value: unknown): value is number => Number.isInteger(value) && (value as number) >= 0;

/** A list of different atom numbers, such as the two ends of a bond. */
function atomIndices<T>(count: number, example: string) {
  return leaf<T>(
    `${count} different atom numbers counted from 0, such as ${example}`,
    (value) =>
      Array.isArray(value) && value.length === count && value.every(isIndex) && new Set(value).size === count,
  );
}

const COORDINATES = ['bonds', 'angle', 'dihedral'];
const bonds = closed({ bonds: list(atomIndices<[number, number]>(2, '[0, 1]'), 'bonds', 100) }, COORDINATES);
const angle = closed({ angle: atomIndices<[number, number, number]>(3, '[1, 0, 2]') }, COORDINATES);
const dihedral = closed(
  { dihedral: atomIndices<[number, number, number, number]>(4, '[0, 1, 2, 3]') },
  COORDINATES,
);
const coordinate = oneOf<ScanCoordinate>((value) => {
  if (hasKey(value, 'bonds')) return bonds;
  if (hasKey(value, 'angle')) return angle;
  return hasKey(value, 'dihedral') ? dihedral : bonds;
});

const MOST_POINTS = 10_000;
const scanKeys = ['coordinate', 'from', 'to', 'count', 'values'];
const spaced = closed({ coordinate, from: number, to: number, count: wholeNumber(2, MOST_POINTS) }, scanKeys);
const listed = closed({ coordinate, values: list(number, 'values', MOST_POINTS) }, scanKeys);
const scan = oneOf<StudyScan>((value) => {
  if (!hasKey(value, 'values')) return spaced;
  if (!hasKey(value, 'from', 'to', 'count')) return listed;
  return z.custom<StudyScan>(() => false, {
    error: 'must have either "values" or "from", "to" and "count", not both',
  });
});

const harmonics = leaf<'spherical' | 'cartesian'>(
  '"spherical" or "cartesian"',
  (value) => value === 'spherical' || value === 'cartesian',
);
const shell: z.ZodType<ShellDefinition> = closed({
  angularMomentum: number,
  exponents: list(number, 'exponents', 100),
  coefficients: list(number, 'coefficients', 100),
});
const evenTemperedShell = closed({
  angularMomentum: number,
  smallest: number,
  ratio: number,
  count: number,
});

/** A value for every element symbol. */
function byElement<T>(item: z.ZodType<T>) {
  return z.record(z.string(), item, { error: 'must be an object with element symbols as keys' });
}

const BASIS_KEYS = ['name', 'scaleFactors', 'optimiseScale', 'shells', 'evenTempered', 'harmonics', 'file'];
const basisForms = {
  scaleFactors: closed(
    {
      name,
      scaleFactors: byElement(
        z.record(z.string(), number, { error: 'must be an object such as { "1s": 1.24 }' }),
      ),
      optimiseScale: yesOrNo.optional(),
    },
    BASIS_KEYS,
  ),
  optimiseScale: closed({ name, optimiseScale: yesOrNo }, BASIS_KEYS),
  shells: closed(
    { name, shells: byElement(list(shell, 'shells', 100)), harmonics: harmonics.optional() },
    BASIS_KEYS,
  ),
  evenTempered: closed(
    { name, evenTempered: byElement(list(evenTemperedShell, 'shells', 20)), harmonics: harmonics.optional() },
    BASIS_KEYS,
  ),
  file: closed({ file: name }, BASIS_KEYS),
};
/** An object that spells out no basis set: a misspelt key says it all, else the lack of one is the issue. */
const formlessBasis = closed(
  { name: z.unknown().optional(), harmonics: z.unknown().optional() },
  BASIS_KEYS,
).refine(() => false, {
  error:
    'must have "scaleFactors", "optimiseScale", "shells", "evenTempered" or "file", or be the name alone',
  when: ({ issues }) => issues.length === 0,
});
const basis = oneOf<BasisRequest>((value) => {
  if (typeof value === 'string') return name;
  const form = (['scaleFactors', 'optimiseScale', 'shells', 'evenTempered', 'file'] as const).find((key) =>
    hasKey(value, key),
  );
  if (form) return basisForms[form];
  if (typeof value === 'object' && value !== null && !Array.isArray(value)) {
    return formlessBasis as unknown as z.ZodType<BasisRequest>;
  }
  return z.custom<BasisRequest>(() => false, { error: 'must be the name of a basis set or an object { … }' });
});

const levelParams: IssueParams = { code: 'level.unknown', known: LEVEL_NAMES };
const level = z.custom<string>((value) => (LEVEL_NAMES as readonly unknown[]).includes(value), {
  error: `must be one of ${LEVEL_NAMES.join(', ')}`,
  params: { ...levelParams },
});

/** Beyond this no bound level of a molecule is left. */
const HIGHEST_ROTATION = 1000;
const MOST_ROTATIONS = 50;
const MOST_ISOTOPOLOGUES = 50;
const MOST_FURTHER_BASES = 10;
const findings = closed({
  referenceWeight: number.optional(),
  naturalOrbitals: yesOrNo.optional(),
  rotation: list(wholeNumber(0, HIGHEST_ROTATION), 'rotational quantum numbers', MOST_ROTATIONS).optional(),
  isotopologues: list(
    leaf<number[]>(
      'a mass number for every atom, such as [1, 2]',
      (value) => Array.isArray(value) && value.every((item) => Number.isSafeInteger(item) && item > 0),
    ),
    'isotopologues',
    MOST_ISOTOPOLOGUES,
  ).optional(),
  counterpoise: yesOrNo.optional(),
  bases: list(basis, 'bases', MOST_FURTHER_BASES).optional(),
});

/** @see Study */
export const studySchema: z.ZodType<Study> = closed({
  format: z.literal('farwell/study'),
  version: z.literal(1),
  title: text(200).optional(),
  notes: text(20_000).optional(),
  molecule,
  scan: scan.optional(),
  basis,
  levels: list(level, 'levels', 20),
  states: countingNumber.optional(),
  frozenCore: yesOrNo.optional(),
  active: closed({ electrons: countingNumber, orbitals: countingNumber }).optional(),
  orbitals: leaf<'restricted' | 'unrestricted'>(
    '"restricted" or "unrestricted"',
    (value) => value === 'restricted' || value === 'unrestricted',
  ).optional(),
  convergence: closed({ energy: number.optional() }).optional(),
  findings: findings.optional(),
});
