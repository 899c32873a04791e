import { distance } from 'fastest-levenshtein';

/**
 * The candidate nearest to a misspelt word, case aside, and of those as near the one nearest in length; undefined if
 * none is near enough to be meant.
 */
export function nearest(word: string, candidates: readonly string[]): string | undefined {
  const lower = word.toLowerCase();
  const ranked = candidates
    .map((candidate) => ({
      candidate,
      edits: distance(lower, candidate.toLowerCase()),
      lengthDifference: Math.abs(lower.length - candidate.length),
    }))
    .sort((a, b) => a.edits - b.edits || a.lengthDifference - b.lengthDifference);
  const best = ranked[0];
  // more than half of the letters wrong is another word
  return best && best.edits <= Math.max(lower.length, best.candidate.length) / 2 ? best.candidate : undefined;
}
