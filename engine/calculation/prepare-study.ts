import type { BasisSet } from '../basis/basis-set';
import { placeBasis } from '../basis/place-basis';
import { resolveBasis } from '../basis/resolve-basis';
import { type ScalableBasis, scalableBasis } from '../basis/scalable-basis';
import { EngineError } from '../errors';
import { buildMolecule, electronCount } from '../molecule/build-molecule';
import { findElement } from '../molecule/elements';
import type { Molecule } from '../molecule/molecule';
import { checkScan, geometryAt } from '../molecule/scan-coordinate';
import { scanValues } from '../molecule/scan-values';
import { activeWindow, type OrbitalWindow } from './active-space';
import { rovibrationalErrors } from './check-isotopologues';
import { explainStudy } from './explain-study';
import { frozenOrbitalCount } from './frozen-core';
import { findLevel, type Level } from './levels';
import { furtherBasisErrors } from './prepare-bases';
import type { CompleteStudy, Study, StudyAtom, StudyMolecule } from './study';
import {
  checkLevels,
  checkReferenceWeight,
  checkStates,
  checkTolerance,
  electronsBySpin,
  refuseSingles,
  requireClosedShell,
  requireFunctions,
} from './study-checks';

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
  /** the same study in each of the further bases that it asks for */
  readonly furtherBases: readonly PreparedStudy[];
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

/**
 * Checks a study completely – molecule, every geometry of the scan, basis sets, levels – and fills its defaults in.
 *
 * @returns the prepared study, or all that is wrong with it, each with its place
 */
export function prepareStudy(study: Study, options: PrepareOptions = {}): Preparation {
  const { bases = [], ...findings } = study.findings ?? {};
  const own = prepare(study, options);
  const further = bases.map((basis) => prepare({ ...study, basis, findings }, options));
  const errors = [
    ...(own.ok ? rovibrationalErrors(own.prepared.study) : own.errors),
    ...furtherBasisErrors(bases, own, further),
  ];
  if (!own.ok || errors.length > 0) return { ok: false, errors };
  const furtherBases = further.flatMap((inBasis) => (inBasis.ok ? [inBasis.prepared] : []));
  return { ok: true, prepared: { ...own.prepared, furtherBases } };
}

/** A part of a study's molecule as a study without scan, in the basis of the whole. */
export function prepareFragment(
  { study, basisSet, memoryLimit }: PreparedStudy,
  molecule: StudyMolecule,
  level: string,
  states = 1,
): Preparation {
  const { scan: _, active: __, ...rest } = study;
  return prepare({ ...rest, molecule, levels: [level], states }, { memoryLimit }, basisSet);
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
  const molecule = built.ok ? built.molecule : undefined;
  if (!built.ok) errors.push(...built.errors);
  const levels = study.levels.map((name, i) => collect(() => findLevel(name, `levels[${i}]`)));
  const states = study.states ?? 1;
  collect(() => checkLevels(study.levels));
  collect(() => checkStates(states));
  collect(() => checkTolerance(study.convergence?.energy ?? DEFAULT_ENERGY_TOLERANCE));
  collect(() => checkReferenceWeight(study.findings?.referenceWeight));
  const symbols = knownSymbols(study.molecule);
  const basisSet =
    resolved ?? collect(() => resolveBasis(study.basis, symbols, { fileText: options.basisFileText }));
  const scalable = collect(() => scalableBasis(study.basis, symbols));
  if (study.orbitals === 'unrestricted') collect(() => refuseSingles(levels));
  if (molecule) collect(() => requireClosedShell(levels, molecule.multiplicity));
  const { scan } = study;
  if (scan) {
    const places = withoutElectrons(study.molecule);
    if (buildMolecule(places).ok) errors.push(...checkScan(places, scan));
    else collect(() => scanValues(scan));
  }
  // what follows needs the electrons of the molecule and its functions
  if (!molecule || !basisSet) return { ok: false, errors };
  const functionCount = collect(() => placeBasis(basisSet, molecule).functionCount);
  if (functionCount !== undefined) collect(() => requireFunctions(functionCount, molecule));
  const window =
    functionCount === undefined ? undefined : collect(() => windowOf(study, levels, molecule, functionCount));
  if (errors.length > 0 || functionCount === undefined || !window) return { ok: false, errors };

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
    furtherBases: [],
    geometryAt: (coordinate) => geometryOf(complete, coordinate).atoms,
    moleculeAt: (coordinate) => moleculeOf(complete, coordinate),
  };
  errors.push(...checkMemory(prepared));
  return errors.length > 0 ? { ok: false, errors } : { ok: true, prepared };
}

/** Elements that exist, whatever else is wrong with the molecule. */
function knownSymbols({ atoms }: StudyMolecule): readonly string[] {
  return [...new Set(atoms.flatMap(({ element }) => findElement(element)?.symbol ?? []))];
}

/** The molecule without what the electrons are counted from: sound where its elements and places are. */
function withoutElectrons({ unit, atoms }: StudyMolecule): StudyMolecule {
  return { unit, atoms: atoms.map(({ element, at, ghost }) => ({ element, at, ghost })) };
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
