import type { BasisRequest, ScanCoordinate, Study, StudyScan } from '#engine';
import type { StudyDraft } from '../state/draft';
import { numberOrText } from '../state/study-text';

/**
 * A draft as near to a study as it reads, for wording only: what is typed wrong is left out or stands as it
 * was typed, so that the sentence can be written while its values are being corrected.
 */
export function studyForWording(draft: StudyDraft): Study {
  return {
    format: 'farwell/study',
    version: 1,
    molecule: {
      unit: draft.unit,
      atoms: draft.atoms.map(({ element, isotope, ghost }) => ({
        element: element.trim() || '?',
        at: [0, 0, 0],
        isotope: wholeNumber(isotope),
        ghost,
      })),
      charge: wholeNumber(draft.charge),
      multiplicity: wholeNumber(draft.multiplicity),
    },
    ...(draft.scan.coordinate !== 'none' && { scan: scanForWording(draft.scan) }),
    basis: basisForWording(draft.basis),
    levels: draft.levels.length === 0 ? ['no level'] : draft.levels,
    states: wholeNumber(draft.states),
    frozenCore: draft.frozenCore,
    ...(draft.active && {
      active: {
        electrons: wholeNumber(draft.active.electrons) ?? Number.NaN,
        orbitals: wholeNumber(draft.active.orbitals) ?? Number.NaN,
      },
    }),
    orbitals: draft.orbitals,
  };
}

function wholeNumber(typed: string): number | undefined {
  const value = numberOrText(typed);
  return typeof value === 'number' && Number.isInteger(value) ? value : undefined;
}

function scanForWording(scan: StudyDraft['scan']): StudyScan {
  const coordinate: ScanCoordinate =
    scan.coordinate === 'angle'
      ? { angle: scan.angle }
      : scan.coordinate === 'dihedral'
        ? { dihedral: scan.dihedral }
        : { bonds: scan.bonds };
  if (scan.spacing === 'listed') return { coordinate, values: listedNumbers(scan.values) };
  // the sentence's controls show the text typed for these
  return { coordinate, from: Number.NaN, to: Number.NaN, count: Number.NaN };
}

/** At least two, so that the sentence always says how many there are. */
function listedNumbers(typed: string): readonly number[] {
  const values = typed
    .split(/[\s,;]+/)
    .map(numberOrText)
    .filter((value) => typeof value === 'number');
  return values.length > 1 ? values : [...values, Number.NaN, Number.NaN].slice(0, 2);
}

const UNNAMED: BasisRequest = { name: 'own numbers', shells: {} };

function basisForWording(basis: StudyDraft['basis']): BasisRequest {
  if (basis.kind === 'named') return basis.name;
  try {
    const value: unknown = JSON.parse(basis.custom);
    return typeof value === 'object' && value !== null && 'name' in value && typeof value.name === 'string'
      ? (value as BasisRequest)
      : UNNAMED;
  } catch {
    return UNNAMED;
  }
}
