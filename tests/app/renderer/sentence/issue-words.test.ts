import { describe, expect, it } from 'vitest';
import { issueWords } from '../../../../app/renderer/sentence/issue-words';
import { EMPTY_DRAFT } from '../../../../app/renderer/state/draft';
import { draftFromStudy } from '../../../../app/renderer/state/draft-from-study';
import { studyText } from '../../../../app/renderer/state/study-text';
import { parseStudy } from '../../../../app/study/parse-study';
import { sampleStudy } from '../../../support/sample-results';

describe('an issue in the window', () => {
  it('names the field as the window does, without lines of a file', () => {
    const draft = draftFromStudy(sampleStudy);
    const wrong = {
      ...draft,
      scan: { ...draft.scan, from: 'near', count: '1.5' },
      atoms: draft.atoms.map((atom) => ({ ...atom, at: ['0', 'y', '1'] as const })),
    };
    const reading = parseStudy(studyText(wrong).text);
    const words = reading.ok ? [] : reading.issues.map(issueWords);
    expect(words).toEqual([
      expect.stringMatching(/^The position of atom 0 must be three numbers .*; it is \[0,"y",1\]\.$/),
      expect.stringMatching(/^The position of atom 1 must be /),
      expect.stringMatching(/^The start must be a number; it is "near"\.$/),
      expect.stringMatching(/^The number of steps must be a whole number .*; it is 1\.5\.$/),
    ]);
  });

  it('never shows a path or a line for an empty study', () => {
    const reading = parseStudy(studyText(EMPTY_DRAFT).text);
    for (const issue of reading.ok ? [] : reading.issues)
      expect(issueWords(issue)).not.toMatch(/\(line|molecule\.|scan\./);
    expect(reading.ok).toBe(false);
  });

  it('leaves a message alone that does not begin with its place', () => {
    expect(issueWords({ place: 'basis', message: 'There is no basis set “STO-9G”.' })).toBe(
      'There is no basis set “STO-9G”.',
    );
  });
});
