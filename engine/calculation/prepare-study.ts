import type { BasisSet } from '../basis/basis-set';
import { placeBasis } from '../basis/place-basis';
import { resolveBasis } from '../basis/resolve-basis';
import { type ScalableBasis, scalableBasis } from '../basis/scalable-basis';
import { EngineError } from '../errors';
import { buildMolecule, electronCount } from '../molecule/build-molecule';
import type { Molecule } from '../molecule/molecule';
import { checkScan, geometryAt } from '../molecule/scan-coordinate';
import { scanValues } from '../molecule/scan-values';
import { activeWindow, type OrbitalWindow } from './active-space';
import { explainStudy } from './explain-study';
import { frozenOrbitalCount } from './frozen-core';
import { findLevel, type Level, needsClosedShell } from './levels';
import type { CompleteStudy, Study, StudyAtom, StudyMolecule } from './study';

/** A study that has been checked and can be computed point by point. */
export interface PreparedStudy {
  /** with every default filled in */
  readonly study: CompleteStudy;
  readonly levels: readonly Level[];
  /** one a point, in the study's order; a single null without a scan */
  readonly coordinates: readonly (number | null)[];
  readonly basisSet: BasisSet;
  /** where the scale factors of `basisSet` are only what their optimisation starts from */
  readonly scalable?: ScalableBasis;
  readonly electrons: number;
  /** alpha and beta electrons */
  readonly spinElectrons: readonly [number, number];
  readonly functionCount: number;
  /** doubly occupied orbitals below those of the CI */
  readonly frozenOrbitals: number;
  /** orbitals of the CI from there; absent: all */
  readonly activeOrbitals?: number;
  /** bytes that one point may take */
  readonly memoryLimit: number;
  /** the atoms at a value of the scan coordinate, in the study's unit */
  geometryAt(coordinate: number | null): readonly StudyAtom[];
  /** the same in atomic units */
  moleculeAt(coordinate: number | null): Molecule;
}

export type Preparation =
  | { readonly ok: true; readonly prepared: PreparedStudy }
  | { readonly ok: false; readonly errors: readonly EngineError[] };

export interface PrepareOptions {
  /** text of the basis-set file that the study names, where it names one */
  readonly basisFileText?: string | undefined;
  /** bytes that one point may take; a level that needs more is refused. Default 4 GiB */
  readonly memoryLimit?: number | undefined;
}

export const DEFAULT_MEMORY_LIMIT = 4 * 2 ** 30;

const DEFAULT_ENERGY_TOLERANCE = 1e-10;
/** Below this, rounding in sums of integrals makes convergence a matter of luck. */
const TIGHTEST_ENERGY_TOLERANCE = 1e-13;
const LOOSEST_ENERGY_TOLERANCE = 1e-4;
/** More states than this of one level are taken for a mistake. */
const MOST_STATES = 50;

/**
 * Checks a study completely – molecule, every geometry of the scan, basis, levels – and fills its defaults in.
 *
 * @returns the prepared study, or all that is wrong with it, each with its place
 */
export function prepareStudy(study: Study, options: PrepareOptions = {}): Preparation {
  return prepare(study, options);
}

/** A part of a study's molecule as a study without scan, in the basis of the whole. */
export function prepareFragment(
  { study, basisSet, memoryLimit }: PreparedStudy,
  molecule: StudyMolecule,
  level: string,
): Preparation {
  const { scan: _, active: __, ...rest } = study;
  return prepare({ ...rest, molecule, levels: [level], states: 1 }, { memoryLimit }, basisSet);
}

/** @param resolved - the basis set, where it is known already */
function prepare(study: Study, options: PrepareOptions, resolved?: BasisSet): Preparation {
  const errors: EngineError[] = [];
  const collect = <T>(step: () => T): T | undefined => {
    try {
      return step();
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      errors.push(error);
      return undefined;
    }
  };

  const built = buildMolecule(study.molecule);
  if (!built.ok) errors.push(...built.errors);
  const levels = study.levels.map((name, i) => collect(() => findLevel(name, `levels[${i}]`)));
  const states = study.states ?? 1;
  collect(() => checkLevels(study.levels));
  collect(() => checkStates(states));
  collect(() => checkTolerance(study.convergence?.energy ?? DEFAULT_ENERGY_TOLERANCE));
  // What follows needs a sound molecule.
  if (!built.ok) return { ok: false, errors };

  const { molecule } = built;
  const symbols = [...new Set(molecule.atoms.map((atom) => atom.symbol))];
  const basisSet =
    resolved ?? collect(() => resolveBasis(study.basis, symbols, { fileText: options.basisFileText }));
  const scalable = collect(() => scalableBasis(study.basis, symbols));
  const functionCount = basisSet && collect(() => placeBasis(basisSet, molecule).functionCount);
  if (study.orbitals === 'unrestricted') collect(() => refuseSingles(levels));
  collect(() => requireClosedShell(levels, molecule.multiplicity));
  if (functionCount !== undefined) collect(() => requireFunctions(functionCount, molecule));
  const window =
    functionCount === undefined ? undefined : collect(() => windowOf(study, levels, molecule, functionCount));
  if (study.scan) errors.push(...checkScan(study.molecule, study.scan));
  if (errors.length > 0 || !basisSet || functionCount === undefined || !window) return { ok: false, errors };

  const complete: CompleteStudy = {
    ...study,
    molecule: { ...study.molecule, charge: molecule.charge, multiplicity: molecule.multiplicity },
    states,
    frozenCore: study.frozenCore ?? false,
    orbitals: study.orbitals ?? 'restricted',
    convergence: { energy: study.convergence?.energy ?? DEFAULT_ENERGY_TOLERANCE },
  };
  const prepared: PreparedStudy = {
    study: complete,
    levels: levels.filter((level) => level !== undefined),
    coordinates: study.scan ? scanValues(study.scan) : [null],
    basisSet,
    ...(scalable && { scalable }),
    electrons: electronCount(molecule),
    spinElectrons: electronsBySpin(electronCount(molecule), molecule.multiplicity),
    functionCount,
    frozenOrbitals: window.frozen,
    ...(window.active !== undefined && { activeOrbitals: window.active }),
    memoryLimit: options.memoryLimit ?? DEFAULT_MEMORY_LIMIT,
    geometryAt: (coordinate) => geometryOf(complete, coordinate).atoms,
    moleculeAt: (coordinate) => moleculeOf(complete, coordinate),
  };
  errors.push(...checkMemory(prepared));
  return errors.length > 0 ? { ok: false, errors } : { ok: true, prepared };
}

function windowOf(
  study: Study,
  levels: readonly (Level | undefined)[],
  molecule: Molecule,
  functionCount: number,
): OrbitalWindow {
  const { active, frozenCore = false } = study;
  const spinElectrons = electronsBySpin(electronCount(molecule), molecule.multiplicity);
  if (active) {
    const known = levels.filter((level) => level !== undefined);
    return activeWindow(active, spinElectrons, functionCount, frozenCore, known);
  }
  // highly charged ions may have fewer electrons than their cores
  return { frozen: frozenCore ? Math.min(frozenOrbitalCount(molecule), spinElectrons[1]) : 0 };
}

/** Memory is counted before any of it is taken. */
function checkMemory(prepared: PreparedStudy): EngineError[] {
  return explainStudy(prepared).levels.flatMap(({ level, bytes, determinants }, i) => {
    if (bytes <= prepared.memoryLimit) return [];
    const gibibytes = (size: number) => `${(size / 2 ** 30).toFixed(1)} GiB`;
    const count = determinants === undefined ? '' : ` (${determinants.toLocaleString('en-GB')} determinants)`;
    return [
      new EngineError(
        'study.tooLarge',
        `${level}${count} needs about ${gibibytes(bytes)} a point; ${gibibytes(prepared.memoryLimit)} are allowed.`,
        'Choose a lower excitation rank, a smaller basis set, a frozen core or fewer states.',
        { bytes, limit: prepared.memoryLimit },
        `levels[${i}]`,
      ),
    ];
  });
}

function geometryOf(study: Study, coordinate: number | null): StudyMolecule {
  if (coordinate === null || !study.scan) return study.molecule;
  return geometryAt(study.molecule, study.scan.coordinate, coordinate);
}

function moleculeOf(study: Study, coordinate: number | null): Molecule {
  const built = buildMolecule(geometryOf(study, coordinate));
  if (!built.ok) throw built.errors[0];
  return built.molecule;
}

function requireClosedShell(levels: readonly (Level | undefined)[], multiplicity: number): void {
  if (multiplicity === 1) return;
  const wrong = levels.findIndex((level) => level && needsClosedShell(level));
  if (wrong < 0) return;
  const { name } = levels[wrong]!;
  throw new EngineError(
    'level.needsClosedShell',
    `${name} needs all electrons paired, but the multiplicity is ${multiplicity}.`,
    name === 'RHF'
      ? 'Ask for ROHF or UHF instead, or for multiplicity 1 with an even number of electrons.'
      : 'Leave it out, or ask for multiplicity 1 with an even number of electrons.',
    { level: name, multiplicity },
    `levels[${wrong}]`,
  );
}

function refuseSingles(levels: readonly (Level | undefined)[]): void {
  const singles = levels.find((level) => level?.kind === 'singles');
  if (!singles) return;
  throw new EngineError(
    'study.orbitals',
    `${singles.name} stands on RHF orbitals and is not computed on those of UHF.`,
    `Leave out ${singles.name}, or “orbitals”.`,
    { level: singles.name },
    'orbitals',
  );
}

function requireFunctions(functionCount: number, molecule: Molecule): void {
  const electrons = electronCount(molecule);
  const [orbitalsNeeded] = electronsBySpin(electrons, molecule.multiplicity);
  if (functionCount >= orbitalsNeeded) return;
  throw new EngineError(
    'basis.tooFewFunctions',
    `The basis has ${functionCount} functions, but ${electrons} electrons need at least ${orbitalsNeeded} orbitals.`,
    'Take a larger basis set, or one made for these elements.',
    { functions: functionCount, orbitalsNeeded },
    'basis',
  );
}

/** Alpha and beta electrons of the highest spin projection. */
export function electronsBySpin(electrons: number, multiplicity: number): readonly [number, number] {
  const alpha = (electrons + multiplicity - 1) / 2;
  return [alpha, electrons - alpha];
}

function checkLevels(levels: readonly string[]): void {
  if (levels.length === 0) {
    throw new EngineError(
      'level.none',
      'The study names no level.',
      'Name at least one, such as RHF.',
      {},
      'levels',
    );
  }
  const twice = levels.find((level, i) => levels.indexOf(level) !== i);
  if (twice !== undefined) {
    throw new EngineError(
      'level.twice',
      `The level ${twice} is listed twice.`,
      'List each level once.',
      { level: twice },
      `levels[${levels.lastIndexOf(twice)}]`,
    );
  }
}

function checkStates(states: number): void {
  if (!Number.isInteger(states) || states < 1 || states > MOST_STATES) {
    throw new EngineError(
      'study.states',
      `“states” must be a whole number from 1 to ${MOST_STATES}; it is ${states}.`,
      'Give the number of lowest states wanted of each level.',
      { states },
      'states',
    );
  }
}

function checkTolerance(tolerance: number): void {
  if (!(tolerance >= TIGHTEST_ENERGY_TOLERANCE && tolerance <= LOOSEST_ENERGY_TOLERANCE)) {
    throw new EngineError(
      'study.convergence',
      `An energy tolerance of ${tolerance} hartree cannot be used.`,
      `Choose one from ${TIGHTEST_ENERGY_TOLERANCE} to ${LOOSEST_ENERGY_TOLERANCE} hartree, or leave it out.`,
      { tolerance },
      'convergence.energy',
    );
  }
}
