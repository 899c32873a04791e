import type { StudyIssue } from '../../contract/requests';
import type { BasisDraft, FindingsDraft, ScanDraft, StudyDraft } from './draft';

/** A draft as study text, and what could not even be put into one. */
export interface StudyText {
  readonly text: string;
  /** found here, because the study text has no place for them */
  readonly issues: readonly StudyIssue[];
}

/**
 * The study file's text of a draft. A field that does not read as a number goes in as the text that was
 * typed, so that the study's one checker finds it and names its place.
 */
export function studyText(draft: StudyDraft): StudyText {
  const basis = basisValue(draft.basis);
  const study = {
    format: 'farwell/study',
    version: 1,
    ...(draft.title !== '' && { title: draft.title }),
    ...(draft.notes !== '' && { notes: draft.notes }),
    molecule: {
      unit: draft.unit,
      atoms: draft.atoms.map(({ element, at, isotope, ghost }) => ({
        element: element.trim(),
        at: at.map(numberOrText),
        ...(isotope.trim() !== '' && { isotope: numberOrText(isotope) }),
        ...(ghost && { ghost: true }),
      })),
      ...(draft.charge.trim() !== '' && { charge: numberOrText(draft.charge) }),
      ...(draft.multiplicity.trim() !== '' && { multiplicity: numberOrText(draft.multiplicity) }),
    },
    ...(draft.scan.coordinate !== 'none' && { scan: scanValue(draft.scan) }),
    basis: basis.value,
    levels: draft.levels,
    ...(draft.states.trim() !== '' && { states: numberOrText(draft.states) }),
    frozenCore: draft.frozenCore,
    ...(draft.active && {
      active: {
        electrons: numberOrText(draft.active.electrons),
        orbitals: numberOrText(draft.active.orbitals),
      },
    }),
    ...(draft.orbitals !== 'restricted' && { orbitals: draft.orbitals }),
    ...(draft.energyConvergence.trim() !== '' && {
      convergence: { energy: numberOrText(draft.energyConvergence) },
    }),
    ...withFindings(draft.findings),
  };
  return { text: `${JSON.stringify(study, undefined, 2)}\n`, issues: basis.issues };
}

/** Plain decimal notation only: what `Number` reads beyond it (0x10, "Infinity", blanks) is not a quantity. */
const DECIMAL_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** What was typed as a number where it is one; a true minus sign counts. */
export function numberOrText(typed: string): number | string {
  const plain = typed.trim().replace('−', '-');
  const value = Number(plain);
  return DECIMAL_NUMBER.test(plain) && Number.isFinite(value) ? value : typed.trim();
}

const listed = (typed: string, separator: RegExp): readonly string[] =>
  typed.split(separator).filter((part) => part.trim() !== '');

/** Nothing where nothing was asked for. */
function withFindings(draft: FindingsDraft): { readonly findings?: unknown } {
  const { referenceWeight, rotation, isotopologues, counterpoise, bases, kept } = draft;
  const findings = {
    ...(referenceWeight.trim() !== '' && { referenceWeight: numberOrText(referenceWeight) }),
    ...(rotation.trim() !== '' && { rotation: listed(rotation, /[\s,;]+/).map(numberOrText) }),
    ...(isotopologues.trim() !== '' && {
      isotopologues: listed(isotopologues, /[,;\n]/).map((molecule) =>
        listed(molecule, /\s+/).map(numberOrText),
      ),
    }),
    ...(counterpoise && { counterpoise }),
    ...(bases.trim() !== '' && { bases: listed(bases, /[,;\n]/).map((name) => name.trim()) }),
    ...kept,
  };
  return Object.keys(findings).length === 0 ? {} : { findings };
}

function scanValue(scan: ScanDraft): unknown {
  const coordinate =
    scan.coordinate === 'bonds'
      ? { bonds: scan.bonds }
      : scan.coordinate === 'angle'
        ? { angle: scan.angle }
        : { dihedral: scan.dihedral };
  if (scan.spacing === 'listed')
    return {
      coordinate,
      values: listed(scan.values, /[\s,;]+/).map(numberOrText),
    };
  return {
    coordinate,
    from: numberOrText(scan.from),
    to: numberOrText(scan.to),
    count: numberOrText(scan.count),
  };
}

function basisValue(basis: BasisDraft): { readonly value: unknown; readonly issues: readonly StudyIssue[] } {
  if (basis.kind === 'named') return { value: basis.name, issues: [] };
  try {
    return { value: JSON.parse(basis.custom), issues: [] };
  } catch (error) {
    return {
      value: basis.custom,
      issues: [
        {
          code: 'basis.notJson',
          place: 'basis',
          message: `The basis set's text is not JSON: ${error instanceof Error ? error.message : String(error)}.`,
          remedy: 'Correct it, or choose a basis set by its name.',
        },
      ],
    };
  }
}
