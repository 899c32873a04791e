import { describe, expect, it } from 'vitest';
import type { Study, StudyAtom, StudyScan } from '#engine';
import { partOfPlace, sentenceParts, studySentence } from '../../../app/study/sentence';

const atoms = (symbols: string): StudyAtom[] =>
  symbols.split(' ').map((element) => ({ element, at: [0, 0, 0] }));

function study(symbols: string, scan: StudyScan | undefined, rest: Partial<Study> = {}): Study {
  return {
    format: 'farwell/study',
    version: 1,
    molecule: { unit: 'angstrom', atoms: atoms(symbols) },
    scan,
    basis: 'STO-3G',
    levels: ['RHF'],
    ...rest,
  };
}

const bonds = (...pairs: [number, number][]): StudyScan => ({
  coordinate: { bonds: pairs },
  from: 0.5,
  to: 3,
  count: 26,
});
const head = (symbols: string, scan: StudyScan) => studySentence(study(symbols, scan)).split(' from ')[0];

describe('studySentence', () => {
  it('says a study as one sentence', () => {
    const heh = study(
      'He H',
      { coordinate: { bonds: [[0, 1]] }, from: 0.4, to: 6, count: 40 },
      { molecule: { unit: 'angstrom', atoms: atoms('He H'), charge: 1 }, levels: ['RHF', 'CISD', 'FCI'] },
    );
    expect(studySentence(heh)).toBe(
      'Pull the He–H bond of HeH⁺ from 0.4 to 6 Å in 40 steps, in STO-3G, with RHF, CISD and FCI.',
    );
  });

  it('names further bases after the own one', () => {
    const inBases = study('H H', undefined, {
      basis: 'cc-pVDZ',
      findings: { bases: ['cc-pVTZ', { name: 'STO-3G', scaleFactors: { H: { '1s': 1.2 } } }] },
    });
    expect(studySentence(inBases)).toBe(
      'Compute H₂ at the geometry given, in cc-pVDZ, also in cc-pVTZ and STO-3G with chosen scale factors, with RHF.',
    );
  });

  it.each([
    ['O H H', bonds([0, 1], [0, 2]), 'Pull both O–H bonds of H₂O together'],
    ['O H H', bonds([0, 1]), 'Pull one O–H bond of H₂O'],
    ['N H H H', bonds([0, 1], [0, 2], [0, 3]), 'Pull all three N–H bonds of NH₃ together'],
    ['N H H H', bonds([0, 1], [0, 2]), 'Pull two N–H bonds of NH₃ together'],
    ['C O H H', bonds([0, 1]), 'Pull the C–O bond of CH₂O'],
    ['H C N', bonds([1, 0], [1, 2]), 'Pull the C–H bond and the C–N bond of CHN together'],
    ['H H H', bonds([0, 1]), 'Pull one H–H bond of H₃'],
    ['H H', bonds([0, 7]), 'Pull the H–atom 7 bond of H₂'],
  ])('counts the bonds of %s', (symbols, scan, expected) => {
    expect(head(symbols, scan)).toBe(expected);
  });

  it('says angles, dihedral angles and lists of values', () => {
    expect(
      studySentence(study('O H H', { coordinate: { angle: [1, 0, 2] }, from: 80, to: 140, count: 13 })),
    ).toBe('Bend the H–O–H angle of H₂O from 80 to 140° in 13 steps, in STO-3G, with RHF.');
    expect(
      studySentence(
        study('O O H H', { coordinate: { dihedral: [2, 0, 1, 3] }, from: -180, to: 180, count: 37 }),
      ),
    ).toBe('Turn the H–O–O–H dihedral angle of H₂O₂ from −180 to 180° in 37 steps, in STO-3G, with RHF.');
    const listed = (values: number[]) =>
      studySentence(study('H H', { coordinate: { bonds: [[0, 1]] }, values }));
    expect(listed([2, 0.7, 1])).toBe(
      'Pull the H–H bond of H₂ from 0.7 to 2 Å at 3 chosen values, in STO-3G, with RHF.',
    );
    expect(listed([0.7])).toBe('Pull the H–H bond of H₂ to 0.7 Å, in STO-3G, with RHF.');
  });

  it('says a single point, spin, states, frozen core, ghosts and the unit where they matter', () => {
    const rest: Partial<Study> = {
      molecule: { unit: 'bohr', atoms: atoms('O O'), multiplicity: 3 },
      states: 3,
      frozenCore: true,
    };
    expect(studySentence(study('', undefined, rest))).toBe(
      'Compute triplet O₂ at the geometry given, in STO-3G, with RHF, three states of each, core frozen.',
    );
    const active = { electrons: 8, orbitals: 6 };
    expect(studySentence(study('', undefined, { ...rest, frozenCore: false, active }))).toContain(
      'three states of each, 8 electrons in 6 orbitals active.',
    );
    expect(studySentence(study('', undefined, { ...rest, orbitals: 'unrestricted' }))).toContain(
      'core frozen, on UHF orbitals.',
    );
    expect(studySentence(study('', undefined, { ...rest, orbitals: 'restricted' }))).toContain(
      'core frozen.',
    );
    expect(studySentence(study('', bonds([0, 1]), rest))).toContain(
      'the O–O bond of triplet O₂ from 0.5 to 3 bohr in 26 steps',
    );
    const ghosted = {
      unit: 'angstrom',
      atoms: [...atoms('He'), { ...atoms('H')[0]!, ghost: true }],
    } as const;
    expect(studySentence(study('', undefined, { molecule: ghosted }))).toContain(
      'Compute He with ghost H at',
    );
  });

  it.each<[Study['basis'], string]>([
    ['6-31G', 'in 6-31G,'],
    [{ name: 'STO-3G', scaleFactors: {} }, 'in STO-3G with chosen scale factors,'],
    [{ name: 'STO-3G', optimiseScale: true }, 'in STO-3G with scale factors optimised,'],
    [{ name: 'STO-3G', optimiseScale: false }, 'in STO-3G,'],
    [{ name: 'STO-3G', scaleFactors: {}, optimiseScale: true }, 'in STO-3G with scale factors optimised,'],
    [{ name: 'my set', shells: {} }, 'in the basis set “my set”,'],
    [{ name: 'even-tempered', evenTempered: {} }, 'in an even-tempered basis set,'],
    [{ file: 'sets/mine.json' }, 'in the basis set of sets/mine.json,'],
  ])('says the basis set %j', (basis, expected) => {
    expect(studySentence(study('H H', undefined, { basis }))).toContain(expected);
  });
});

describe('sentenceParts', () => {
  const full = study('O H H', bonds([0, 1], [0, 2]), { states: 2, frozenCore: true });

  it('joins to the sentence', () => {
    expect(
      sentenceParts(full)
        .map(({ text }) => text)
        .join(''),
    ).toBe(studySentence(full));
  });

  it('gives every value of the study its word, found again from its place', () => {
    const parts = sentenceParts(full).filter(({ part }) => part);
    expect(parts.map(({ part, text }) => [part, text])).toEqual([
      ['bonds', 'both O–H bonds'],
      ['molecule', 'H₂O'],
      ['from', '0.5'],
      ['to', '3'],
      ['steps', '26'],
      ['basis', 'STO-3G'],
      ['levels', 'RHF'],
      ['states', 'two states of each'],
      ['core', 'core frozen'],
    ]);
    for (const { part, place } of parts) expect(partOfPlace(place!)).toBe(part);
  });
});

describe('partOfPlace', () => {
  it.each([
    ['molecule.atoms[1].element', 'molecule'],
    ['scan.coordinate.bonds[0][1]', 'bonds'],
    ['scan', 'bonds'],
    ['scan.from', 'from'],
    ['scan.values[3]', 'steps'],
    ['basis.shells.H[0]', 'basis'],
    ['levels[2]', 'levels'],
    ['levelsX', undefined],
    ['title', undefined],
    ['line 7', undefined],
    ['', undefined],
  ])('puts “%s” at %s', (place, part) => {
    expect(partOfPlace(place)).toBe(part);
  });
});
