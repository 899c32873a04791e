import { describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { comparabilityNotes } from '../../../app/report/comparability';
import { sampleResults } from '../../support/sample-results';

const first = sampleResults();
const notesWith = (changes: Partial<StudyResults>) =>
  comparabilityNotes([
    { name: 'a', results: first },
    { name: 'b', results: { ...first, ...changes } },
  ]);

describe('comparabilityNotes', () => {
  it('has nothing to say of one study, nor of two that differ in nothing', () => {
    expect(comparabilityNotes([{ name: '', results: first }])).toEqual([]);
    expect(notesWith({})).toEqual([]);
  });

  it('says that energies of different molecules are not comparable', () => {
    const molecule = { ...first.study.molecule, charge: 1 };
    const [note] = notesWith({ study: { ...first.study, molecule } });
    expect(note).toContain('different molecules (a: H₂; b: H₂⁺)');
    expect(note).toContain('not comparable');
  });

  it('says what different bases, cores and levels mean', () => {
    expect(notesWith({ basis: { ...first.basis, name: '6-31G', functions: 4 } })).toEqual([
      expect.stringContaining('Basis sets differ (a: STO-3G, 2 functions; b: 6-31G, 4 functions)'),
    ]);
    expect(notesWith({ study: { ...first.study, frozenCore: true } })).toEqual([
      expect.stringContaining('Different electrons are correlated (a: all; b: core frozen)'),
    ]);
    expect(notesWith({ study: { ...first.study, levels: ['RHF'] } })).toEqual([
      'Not every level is in every file: CISD not in b; FCI not in b.',
    ]);
  });
});
