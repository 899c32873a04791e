/**
 * The least number of insertions, deletions, replacements and swaps of neighbours that turn one text into the
 * other (optimal string alignment).
 *
 * Source: F. J. Damerau, Commun. ACM 7, 171 (1964); recurrence of R. A. Wagner, M. J. Fischer, J. ACM 21, 168 (1974).
 */
export function editDistance(first: string, second: string): number {
  const a = [...first];
  const b = [...second];
  let beforePrevious: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const replaced = previous[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      const swapped =
        i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]
          ? beforePrevious[j - 2] + 1
          : Number.POSITIVE_INFINITY;
      current.push(Math.min(replaced, swapped, previous[j] + 1, current[j - 1] + 1));
    }
    beforePrevious = previous;
    previous = current;
  }
  return previous[b.length];
}

/** Longer words are not compared: the cost is the product of the lengths, and nobody mistypes them. */
const LONGEST_WORD = 64;

/**
 * The candidate that someone who wrote `word` most likely meant, disregarding case.
 *
 * @returns the first nearest candidate, or undefined if more than half of the word would have to change
 */
export function nearestOf(word: string, candidates: Iterable<string>): string | undefined {
  if (word.length > LONGEST_WORD) return undefined;
  const lower = word.trim().toLowerCase();
  let nearest: string | undefined;
  let smallest = Math.max(1, Math.floor(lower.length / 2)) + 1;
  for (const candidate of candidates) {
    const distance = editDistance(lower, candidate.toLowerCase());
    if (distance < smallest) {
      smallest = distance;
      nearest = candidate;
    }
  }
  return nearest;
}
