import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseStudy } from '../../../app/study/parse-study';

const STUDY = {
  format: 'farwell/study',
  version: 1,
  molecule: {
    unit: 'angstrom',
    atoms: [
      { element: 'He', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 0.7743], isotope: 2 },
    ],
    charge: 1,
  },
  scan: { coordinate: { bonds: [[0, 1]] }, from: 0.4, to: 6, count: 40 },
  basis: 'STO-3G',
  levels: ['RHF', 'CISD', 'FCI'],
};

/** Issues of the study with some of its top-level keys replaced; undefined removes one. */
function issuesWith(change: Record<string, unknown>) {
  const reading = parseStudy(JSON.stringify({ ...STUDY, ...change }, null, 1));
  return reading.ok ? [] : reading.issues;
}

/** Line of a piece of text that the changed study has only once. */
function lineOf(change: Record<string, unknown>, piece: string): number {
  const lines = JSON.stringify({ ...STUDY, ...change }, null, 1).split('\n');
  return lines.findIndex((line) => line.includes(piece)) + 1;
}

const brief = (change: Record<string, unknown>) =>
  issuesWith(change).map(({ code, place }) => `${code} at ${place}`);

describe('parseStudy', () => {
  it('reads a study as it is', () => {
    expect(parseStudy(JSON.stringify(STUDY))).toEqual({ ok: true, study: STUDY });
  });

  it('reads every form of scan coordinate and basis set', () => {
    const range = { from: 1, to: 2, count: 3 };
    const shell = { angularMomentum: 0, exponents: [3.4, 0.6], coefficients: [0.2, 0.9] };
    const changes = [
      { scan: { coordinate: { angle: [1, 0, 2] }, ...range } },
      { scan: { coordinate: { dihedral: [0, 1, 2, 3] }, values: [10, 5, 90] } },
      { scan: undefined },
      { basis: { name: 'STO-3G', scaleFactors: { He: { '1s': 2.0925 } } } },
      { basis: { name: 'STO-3G', optimiseScale: true } },
      { basis: { name: 'STO-3G', scaleFactors: { He: { '1s': 2 } }, optimiseScale: true } },
      { basis: { name: 'my set', shells: { H: [shell] }, harmonics: 'cartesian' } },
      {
        basis: {
          name: 'even',
          evenTempered: { H: [{ angularMomentum: 0, smallest: 0.03, ratio: 2.6, count: 9 }] },
        },
      },
      { basis: { file: 'sets/mine.json' } },
      { title: 'a', notes: 'b', states: 3, frozenCore: true, convergence: { energy: 1e-9 } },
      { active: { electrons: 8, orbitals: 8 } },
      { orbitals: 'unrestricted' },
      { orbitals: 'restricted' },
      { findings: { referenceWeight: 0.8, naturalOrbitals: true } },
    ];
    for (const change of changes) expect(brief(change)).toEqual([]);
  });

  it('refuses what active orbitals do not have', () => {
    for (const active of [
      { electrons: 8 },
      { electrons: 0, orbitals: 4 },
      { electrons: 2, orbitals: 2, roots: 1 },
    ]) {
      expect(brief({ active })).toHaveLength(1);
    }
  });

  it('refuses orbitals that are neither restricted nor unrestricted', () => {
    expect(brief({ orbitals: 'UHF' })).toHaveLength(1);
  });

  it('refuses findings that are not what they must be', () => {
    expect(brief({ findings: { referenceWeight: '90 %' } })).toEqual([
      'study.value at findings.referenceWeight',
    ]);
    expect(brief({ findings: { naturalOrbitals: 1 } })).toEqual(['study.value at findings.naturalOrbitals']);
  });

  it('says place, expectation, value and line of a wrong value', () => {
    const change = { scan: { ...STUDY.scan, count: 1.5 } };
    const line = lineOf(change, '"count"');
    expect(issuesWith(change)).toEqual([
      {
        code: 'study.value',
        place: 'scan.count',
        message: `scan.count must be a whole number from 2 to 10 000; it is 1.5 (line ${line}).`,
        remedy: 'Change the value there.',
      },
    ]);
  });

  it('names the key that a misspelt one was meant to be, and does not call that one missing', () => {
    const { levels, ...rest } = STUDY;
    const reading = parseStudy(JSON.stringify({ ...rest, levles: levels }));
    expect(reading).toEqual({
      ok: false,
      issues: [
        {
          code: 'study.unknownKey',
          place: 'levles',
          message: 'levles is not a key of a study (line 1).',
          remedy: 'Write “levels” if that is meant, or remove it.',
        },
      ],
    });
  });

  it('refuses unknown keys everywhere', () => {
    const [first, second] = STUDY.molecule.atoms;
    expect(
      brief({ molecule: { ...STUDY.molecule, spin: 1, atoms: [{ ...first, ghsot: true }, second] } }),
    ).toEqual(['study.unknownKey at molecule.atoms[0].ghsot', 'study.unknownKey at molecule.spin']);
    expect(brief({ scan: { ...STUDY.scan, step: 1 } })).toEqual(['study.unknownKey at scan.step']);
    expect(brief({ scan: { ...STUDY.scan, coordinate: { bond: [[0, 1]] } } })).toEqual([
      'study.unknownKey at scan.coordinate.bond',
    ]);
    expect(brief({ basis: { name: 'STO-3G', scaleFactor: {} } })).toEqual([
      'study.unknownKey at basis.scaleFactor',
    ]);
    expect(brief({ basis: { name: 'STO-3G' } })).toEqual(['study.value at basis']);
    expect(brief({ convergence: { enrgy: 1 } })).toEqual(['study.unknownKey at convergence.enrgy']);
    expect(issuesWith({ findings: { referenceWieght: 0.8 } })).toMatchObject([
      {
        place: 'findings.referenceWieght',
        remedy: 'Write “referenceWeight” if that is meant, or remove it.',
      },
    ]);
  });

  it('collects all issues of a file', () => {
    expect(
      brief({
        molecule: { unit: 'nm', atoms: [{ element: 3, at: [0, 0] }] },
        basis: 7,
        levels: [],
        states: 0,
      }),
    ).toEqual([
      'study.value at molecule.unit',
      'study.value at molecule.atoms[0].element',
      'study.value at molecule.atoms[0].at',
      'study.value at basis',
      'study.value at levels',
      'study.value at states',
    ]);
  });

  it('says what is missing and what it must be', () => {
    const change = { basis: undefined, scan: { coordinate: { bonds: [[0, 1]] }, from: 1, to: 2 } };
    expect(issuesWith(change).map(({ message, remedy }) => `${message} ${remedy}`)).toEqual([
      `scan.count is missing (line ${lineOf(change, '"scan"')}). Add it: it must be a whole number from 2 to 10 000.`,
      'basis is missing (line 1). Add it: it must be the name of a basis set or an object { … }.',
    ]);
  });

  it('suggests the level that a misspelt one was meant to be', () => {
    const change = { levels: ['rhf', 'CSID', 'QQQQ'] };
    const line = lineOf(change, '"rhf"');
    expect(issuesWith(change).map(({ message, remedy }) => `${message} ${remedy}`)).toEqual([
      `There is no level "rhf" (line ${line}). Write "RHF" if that is meant.`,
      `There is no level "CSID" (line ${line + 1}). Write "CISD" if that is meant.`,
      `There is no level "QQQQ" (line ${line + 2}). Choose from RHF, UHF, ROHF, MP2, CIS, CISD, CISDT, CISDTQ, CISDTQ5, CISDTQ56, FCI.`,
    ]);
  });

  it('refuses a scan with both a list and a range, too many points, or a bond from an atom to itself', () => {
    expect(brief({ scan: { ...STUDY.scan, values: [1, 2] } })).toEqual(['study.value at scan']);
    expect(brief({ scan: { ...STUDY.scan, count: 1_000_000 } })).toEqual(['study.value at scan.count']);
    expect(brief({ scan: { ...STUDY.scan, coordinate: { bonds: [[0, 0]] } } })).toEqual([
      'study.value at scan.coordinate.bonds[0]',
    ]);
  });

  it('refuses other files as a whole', () => {
    expect(brief({ format: 'farwell/results' })).toEqual(['study.format at format']);
    expect(brief({ format: undefined })).toEqual(['study.format at format']);
    expect(brief({ version: 2 })).toEqual(['study.version at version']);
    for (const text of ['null', '3', '[]', '"farwell/study"']) {
      expect(parseStudy(text)).toMatchObject({ ok: false, issues: [{ code: 'study.format' }] });
    }
  });

  it('stops listing issues where a list would help nobody', () => {
    expect(issuesWith({ levels: Array(5000).fill('x') }).length).toBeLessThanOrEqual(50);
  });

  it('answers anything that JSON can hold with issues that are sentences, never an exception', () => {
    const anywhere = fc.constantFrom(
      'molecule',
      'scan',
      'basis',
      'levels',
      'states',
      'title',
      'convergence',
      'extra',
    );
    fc.assert(
      fc.property(anywhere, fc.jsonValue(), (key, value) => {
        const reading = parseStudy(JSON.stringify({ ...STUDY, [key]: value }));
        if (reading.ok) return;
        expect(reading.issues.length).toBeGreaterThan(0);
        for (const { message, remedy } of reading.issues) {
          expect(message).toMatch(/^\S.*\.$/su);
          expect(message).not.toMatch(/Invalid input|undefined/);
          expect(remedy).toMatch(/^[A-Z].*\.$/su);
        }
      }),
      { seed: 20261201, numRuns: 300 },
    );
  });
});
