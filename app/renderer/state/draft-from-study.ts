import type { Study, StudyScan } from '#engine';
import { type BasisDraft, EMPTY_DRAFT, type FindingsDraft, type ScanDraft, type StudyDraft } from './draft';

/** A study laid out for editing. */
export function draftFromStudy(study: Study): StudyDraft {
  const { molecule } = study;
  return {
    title: study.title ?? '',
    notes: study.notes ?? '',
    unit: molecule.unit,
    atoms: molecule.atoms.map(({ element, at, isotope, ghost }) => ({
      element,
      at: [String(at[0]), String(at[1]), String(at[2])],
      isotope: optionalNumber(isotope),
      ghost: ghost ?? false,
    })),
    charge: String(molecule.charge ?? 0),
    multiplicity: optionalNumber(molecule.multiplicity),
    scan: study.scan === undefined ? EMPTY_DRAFT.scan : scanDraft(study.scan),
    basis: basisDraft(study.basis),
    levels: study.levels,
    states: String(study.states ?? 1),
    frozenCore: study.frozenCore ?? false,
    ...(study.active && {
      active: { electrons: String(study.active.electrons), orbitals: String(study.active.orbitals) },
    }),
    orbitals: study.orbitals ?? 'restricted',
    energyConvergence: optionalNumber(study.convergence?.energy),
    findings: findingsDraft(study.findings),
  };
}

const optionalNumber = (value: number | undefined): string => (value === undefined ? '' : String(value));

function scanDraft(scan: StudyScan): ScanDraft {
  const range =
    'values' in scan
      ? ({ spacing: 'listed', values: scan.values.join(', ') } as const)
      : ({
          spacing: 'even',
          from: String(scan.from),
          to: String(scan.to),
          count: String(scan.count),
        } as const);
  const { coordinate } = scan;
  if ('bonds' in coordinate)
    return { ...EMPTY_DRAFT.scan, ...range, coordinate: 'bonds', bonds: coordinate.bonds };
  if ('angle' in coordinate)
    return { ...EMPTY_DRAFT.scan, ...range, coordinate: 'angle', angle: coordinate.angle };
  return { ...EMPTY_DRAFT.scan, ...range, coordinate: 'dihedral', dihedral: coordinate.dihedral };
}

function findingsDraft({
  referenceWeight,
  rotation = [],
  isotopologues = [],
  counterpoise = false,
  bases,
  ...kept
}: NonNullable<Study['findings']> = {}): FindingsDraft {
  const isNamed = bases?.every((basis) => typeof basis === 'string') ?? true;
  return {
    referenceWeight: optionalNumber(referenceWeight),
    rotation: rotation.join(', '),
    isotopologues: isotopologues.map((massNumbers) => massNumbers.join(' ')).join(', '),
    counterpoise,
    bases: isNamed ? (bases ?? []).join(', ') : '',
    kept: isNamed ? kept : { ...kept, bases },
  };
}

const basisDraft = (basis: Study['basis']): BasisDraft =>
  typeof basis === 'string'
    ? { kind: 'named', name: basis, custom: '' }
    : { kind: 'custom', name: EMPTY_DRAFT.basis.name, custom: JSON.stringify(basis, undefined, 2) };
