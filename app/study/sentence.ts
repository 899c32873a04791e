import type { BasisRequest, ScanCoordinate, Study, StudyAtom, StudyScan } from '#engine';
import { atomLabel, formula } from './formula';

export type SentencePartName =
  | 'molecule'
  | 'bonds'
  | 'from'
  | 'to'
  | 'steps'
  | 'basis'
  | 'levels'
  | 'states'
  | 'core';

/** A piece of the study sentence: plain words, or a word that stands for a value of the study. */
export interface SentencePart {
  readonly text: string;
  readonly part?: SentencePartName;
  /** of the value in the study */
  readonly place?: string;
}

/** The study as one sentence: “Pull the He–H bond of HeH⁺ from 0.4 to 6 Å in 40 steps, in STO-3G, with RHF and FCI.” */
export function studySentence(study: Study): string {
  return sentenceParts(study)
    .map(({ text }) => text)
    .join('');
}

/** The study sentence in pieces, so that a window can let each value be edited and show an issue at its word. */
export function sentenceParts(study: Study): readonly SentencePart[] {
  const { molecule, scan, levels, states = 1, frozenCore, active, orbitals } = study;
  const furtherBases = study.findings?.bases ?? [];
  const moleculePart = value('molecule', 'molecule', moleculeText(study));
  return [
    ...(scan
      ? [
          plain(`${verb(scan.coordinate)} `),
          value('bonds', 'scan.coordinate', coordinateText(scan.coordinate, molecule.atoms)),
          plain(' of '),
          moleculePart,
          ...('bonds' in scan.coordinate && scan.coordinate.bonds.length > 1 ? [plain(' together')] : []),
          plain(' '),
          ...rangeParts(scan, 'bonds' in scan.coordinate ? (molecule.unit === 'bohr' ? ' bohr' : ' Å') : '°'),
        ]
      : [plain('Compute '), moleculePart, plain(' at '), value('bonds', 'scan', 'the geometry given')]),
    plain(', in '),
    value('basis', 'basis', basisText(study.basis)),
    ...(furtherBases.length > 0 ? [plain(`, also in ${enumerate(furtherBases.map(basisText))}`)] : []),
    plain(', with '),
    value('levels', 'levels', enumerate(levels)),
    ...(states > 1 ? [plain(', '), value('states', 'states', `${numeral(states)} states of each`)] : []),
    ...(frozenCore ? [plain(', '), value('core', 'frozenCore', 'core frozen')] : []),
    ...(active
      ? [
          plain(', '),
          value('core', 'active', `${active.electrons} electrons in ${active.orbitals} orbitals active`),
        ]
      : []),
    ...(orbitals === 'unrestricted' ? [plain(', '), value('core', 'orbitals', 'on UHF orbitals')] : []),
    plain('.'),
  ];
}

/** The word of the sentence that an issue's place belongs to; undefined for what the sentence does not say. */
export function partOfPlace(place: string): SentencePartName | undefined {
  const isWithin = (outer: string) =>
    place === outer || ['.', '['].some((next) => place.startsWith(outer + next));
  return PLACES.find(([outer]) => isWithin(outer))?.[1];
}

/** Longer places before those that contain them. */
const PLACES: readonly (readonly [string, SentencePartName])[] = [
  ['molecule', 'molecule'],
  ['scan.from', 'from'],
  ['scan.to', 'to'],
  ['scan.count', 'steps'],
  ['scan.values', 'steps'],
  ['scan', 'bonds'],
  ['basis', 'basis'],
  ['levels', 'levels'],
  ['states', 'states'],
  ['frozenCore', 'core'],
  ['active', 'core'],
  ['orbitals', 'core'],
];

function plain(text: string): SentencePart {
  return { text };
}

function value(part: SentencePartName, place: string, text: string): SentencePart {
  return { text, part, place };
}

function verb(coordinate: ScanCoordinate): string {
  if ('bonds' in coordinate) return 'Pull';
  return 'angle' in coordinate ? 'Bend' : 'Turn';
}

const SPIN_WORDS = ['singlet', 'doublet', 'triplet', 'quartet', 'quintet', 'sextet', 'septet'];

/** The lowest multiplicities, 1 and 2, go without saying; ghosts are named, since the formula leaves them out. */
function moleculeText({ molecule }: Study): string {
  const { multiplicity = 1, atoms } = molecule;
  const spin = multiplicity < 3 ? '' : `${SPIN_WORDS[multiplicity - 1] ?? `multiplicity-${multiplicity}`} `;
  const ghosts = atoms.filter((atom) => atom.ghost).map(({ element }) => element);
  return `${spin}${formula(molecule)}${ghosts.length > 0 ? ` with ghost ${enumerate(ghosts)}` : ''}`;
}

function coordinateText(coordinate: ScanCoordinate, atoms: readonly StudyAtom[]): string {
  const label = (index: number) => {
    const atom = atoms[index];
    return atom ? atomLabel(atom) : `atom ${index}`;
  };
  if ('angle' in coordinate) return `the ${coordinate.angle.map(label).join('–')} angle`;
  if ('dihedral' in coordinate) return `the ${coordinate.dihedral.map(label).join('–')} dihedral angle`;
  return bondsText(coordinate.bonds, atoms, label);
}

function bondsText(
  bonds: readonly (readonly [number, number])[],
  atoms: readonly StudyAtom[],
  label: (index: number) => string,
): string {
  const kinds = new Map<string, { readonly name: string; count: number; readonly possible: number }>();
  for (const [a, b] of bonds) {
    const [first, second] = [label(a), label(b)];
    const key = [first, second].sort().join();
    const kind = kinds.get(key);
    if (kind) {
      kind.count++;
      continue;
    }
    const alike = (name: string) => atoms.filter((atom) => atomLabel(atom) === name).length;
    const possible =
      first === second ? (alike(first) * (alike(first) - 1)) / 2 : alike(first) * alike(second);
    kinds.set(key, { name: `${first}–${second}`, count: 1, possible });
  }
  return enumerate(
    [...kinds.values()].map(
      ({ name, count, possible }) =>
        `${bondCount(count, possible)} ${name} ${count === 1 ? 'bond' : 'bonds'}`,
    ),
  );
}

/** “the” only pair of such atoms, “both” or “all three” of them, or “one” or “two” of more. */
function bondCount(count: number, possible: number): string {
  if (count < possible) return numeral(count);
  if (count === 1) return 'the';
  return count === 2 ? 'both' : `all ${numeral(count)}`;
}

function rangeParts(scan: StudyScan, unit: string): readonly SentencePart[] {
  if (!('values' in scan)) {
    return [
      plain('from '),
      value('from', 'scan.from', numberText(scan.from)),
      plain(' to '),
      value('to', 'scan.to', numberText(scan.to)),
      plain(`${unit} in `),
      value('steps', 'scan.count', String(scan.count)),
      plain(' steps'),
    ];
  }
  if (scan.values.length === 1) {
    return [plain('to '), value('steps', 'scan.values', numberText(scan.values[0]!)), plain(unit)];
  }
  return [
    plain('from '),
    value('from', 'scan.values', numberText(Math.min(...scan.values))),
    plain(' to '),
    value('to', 'scan.values', numberText(Math.max(...scan.values))),
    plain(`${unit} at `),
    value('steps', 'scan.values', String(scan.values.length)),
    plain(' chosen values'),
  ];
}

function basisText(basis: BasisRequest): string {
  if (typeof basis === 'string') return basis;
  if ('file' in basis) return `the basis set of ${basis.file}`;
  if ('optimiseScale' in basis && basis.optimiseScale) return `${basis.name} with scale factors optimised`;
  if ('scaleFactors' in basis) return `${basis.name} with chosen scale factors`;
  if ('optimiseScale' in basis) return basis.name;
  if ('evenTempered' in basis && basis.name.toLowerCase() === 'even-tempered')
    return 'an even-tempered basis set';
  return `the basis set “${basis.name}”`;
}

/** “RHF, CISD and FCI” */
function enumerate(items: readonly string[]): string {
  return items.length < 2 ? items.join() : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}

/** Small counts as words. */
function numeral(count: number): string {
  return (
    ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'][count] ?? String(count)
  );
}

function numberText(number: number): string {
  return String(number).replace('-', '−');
}
