import { describe, expect, it } from 'vitest';
import { studyForWording } from '../../../../app/renderer/sentence/draft-study';
import { EMPTY_DRAFT } from '../../../../app/renderer/state/draft';
import { draftFromStudy } from '../../../../app/renderer/state/draft-from-study';
import { sentenceParts, studySentence } from '../../../../app/study/sentence';
import { sampleStudy } from '../../../support/sample-results';

const draft = draftFromStudy(sampleStudy);

describe('the sentence of a draft', () => {
  it('reads as the study’s own, but for the numbers that are typed in place', () => {
    const words = sentenceParts(studyForWording(draft)).filter(
      ({ part }) => !['from', 'to', 'steps'].includes(part!),
    );
    const own = sentenceParts(sampleStudy).filter(({ part }) => !['from', 'to', 'steps'].includes(part!));
    expect(words).toEqual(own);
  });

  it('is a sentence whatever has been typed', () => {
    const broken = [
      EMPTY_DRAFT,
      { ...draft, charge: 'x', states: '-', levels: [] },
      { ...draft, scan: { ...draft.scan, bonds: [[0, 9]] as const } },
      { ...draft, scan: { ...draft.scan, spacing: 'listed' as const, values: 'a, b' } },
      { ...draft, scan: { ...draft.scan, coordinate: 'dihedral' as const } },
      ...['', '{', '3', '{"name": 4}', '{"name": "x", "evenTempered": 1}'].map((custom) => ({
        ...draft,
        basis: { kind: 'custom' as const, name: '', custom },
      })),
    ];
    for (const typed of broken) expect(studySentence(studyForWording(typed))).toMatch(/^\p{Lu}.*\.$/u);
  });
});
