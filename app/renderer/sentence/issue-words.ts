import type { StudyIssue } from '../../contract/requests';

/**
 * An issue in the window's words: there the study is no file, so lines and paths of one are left out; the
 * message stands at its place anyway.
 */
export function issueWords({ place, message }: Pick<StudyIssue, 'place' | 'message'>): string {
  const withoutLine = message.replace(/ \(lines? [\d and]+\)/g, '');
  const withName =
    withoutLine.startsWith(place) && place !== ''
      ? placeName(place) + withoutLine.slice(place.length)
      : withoutLine;
  return withName.charAt(0).toUpperCase() + withName.slice(1);
}

const NAMES: Readonly<Record<string, string>> = {
  'scan.from': 'The start',
  'scan.to': 'The end',
  'scan.count': 'The number of steps',
  'scan.values': 'The list of values',
  'molecule.charge': 'The charge',
  'molecule.multiplicity': 'The multiplicity',
  'molecule.atoms': 'The list of atoms',
  'convergence.energy': 'The energy convergence',
  'scan.coordinate.bonds': 'The list of bonds',
  levels: 'The list of levels',
  states: 'The number of states',
};

function placeName(place: string): string {
  const [, atom, field] = /^molecule\.atoms\[(\d+)\](.*)$/.exec(place) ?? [];
  if (atom !== undefined) return `${ATOM_FIELDS[field ?? ''] ?? 'A value'} of atom ${atom}`;
  const [, value] = /^scan\.values\[(\d+)\]$/.exec(place) ?? [];
  if (value !== undefined) return `Value ${Number(value) + 1} of the list`;
  return NAMES[place] ?? place;
}

const ATOM_FIELDS: Readonly<Record<string, string>> = {
  '.element': 'The element',
  '.isotope': 'The isotope',
  '.ghost': 'The ghost mark',
  '.at': 'The position',
};
