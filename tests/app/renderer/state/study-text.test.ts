import { describe, expect, it } from 'vitest';
import { EMPTY_DRAFT, type StudyDraft } from '../../../../app/renderer/state/draft';
import { draftFromStudy } from '../../../../app/renderer/state/draft-from-study';
import { numberOrText, studyText } from '../../../../app/renderer/state/study-text';
import { parseStudy } from '../../../../app/study/parse-study';
import { sampleStudy } from '../../../support/sample-results';

const edited = (change: Partial<StudyDraft>): StudyDraft => ({ ...draftFromStudy(sampleStudy), ...change });
const parsed = (draft: StudyDraft) => parseStudy(studyText(draft).text);

describe('a study in the window', () => {
  it('comes back unchanged through its draft and its text', () => {
    expect(parsed(draftFromStudy(sampleStudy))).toEqual({ ok: true, study: sampleStudy });
  });

  it.each([
    ['listed values', { scan: { coordinate: { bonds: [[0, 1]] }, values: [0.5, 0.74, 2] } }],
    ['an angle', { scan: { coordinate: { angle: [1, 0, 2] }, from: 60, to: 180, count: 7 } }],
    ['a dihedral', { scan: { coordinate: { dihedral: [2, 0, 1, 3] }, from: 0, to: 180, count: 7 } }],
    ['no scan', { scan: undefined }],
    [
      'own shells',
      { basis: { name: 'mine', shells: { H: [{ angularMomentum: 0, exponents: [1], coefficients: [1] }] } } },
    ],
    ['notes and a frozen core', { notes: 'two\nlines', frozenCore: true, states: 3 }],
    ['orbitals of each spin', { orbitals: 'unrestricted' }],
    ['an active space', { active: { electrons: 2, orbitals: 4 } }],
    [
      'findings asked for',
      {
        findings: {
          rotation: [0, 5],
          isotopologues: [
            [1, 2],
            [2, 2],
          ],
          counterpoise: true,
          referenceWeight: 0.8,
          bases: ['cc-pVDZ', 'cc-pVTZ'],
        },
      },
    ],
    [
      'further basis sets that are not names',
      { findings: { naturalOrbitals: true, bases: ['cc-pVDZ', { name: 'STO-3G', optimiseScale: true }] } },
    ],
    [
      'an isotope and a ghost',
      {
        molecule: {
          unit: 'bohr',
          atoms: [
            { element: 'H', at: [0, 0, 0], isotope: 2 },
            { element: 'H', at: [0, 0, 1.4], ghost: true },
          ],
          charge: 0,
          multiplicity: 2,
        },
      },
    ],
  ] as const)('comes back unchanged with %s', (_, change) => {
    const { scan: _scan, ...rest } = sampleStudy;
    const study = 'scan' in change && change.scan === undefined ? rest : { ...sampleStudy, ...change };
    expect(parsed(draftFromStudy(study as typeof sampleStudy))).toEqual({ ok: true, study });
  });

  it('hands what is not a number to the checker as it was typed, which names its place', () => {
    const draft = draftFromStudy(sampleStudy);
    const reading = parsed(edited({ scan: { ...draft.scan, to: 'six', count: '' } }));
    expect(reading.ok ? [] : reading.issues.map(({ place }) => place)).toEqual(['scan.to', 'scan.count']);
    expect(reading.ok ? '' : reading.issues[0]?.message).toContain('"six"');
  });

  it('names the place in an active space too', () => {
    const reading = parsed(edited({ active: { electrons: 'two', orbitals: '4' } }));
    expect(reading.ok ? [] : reading.issues.map(({ place }) => place)).toEqual(['active.electrons']);
  });

  it('reports a basis set that is not JSON at the basis', () => {
    const { issues } = studyText(edited({ basis: { kind: 'custom', name: '', custom: '{ "name": ' } }));
    expect(issues.map(({ place }) => place)).toEqual(['basis']);
  });

  it('takes decimal notation only, with either minus', () => {
    expect(['0.4', '−1', '+2', '1e-10', '.5', ' 3 '].map(numberOrText)).toEqual([0.4, -1, 2, 1e-10, 0.5, 3]);
    expect(['0x10', 'Infinity', '1e999', '1,5', '', '--1'].map(numberOrText)).toEqual([
      '0x10',
      'Infinity',
      '1e999',
      '1,5',
      '',
      '--1',
    ]);
  });

  it('leaves optional fields that are empty to their defaults', () => {
    const text = studyText({ ...EMPTY_DRAFT, charge: '', states: ' ' }).text;
    expect(JSON.parse(text)).not.toHaveProperty('states');
    expect(JSON.parse(text).molecule).toEqual({ unit: 'angstrom', atoms: [] });
  });
});
