import type { StudyIssue } from '../../contract/requests';
import { partOfPlace, type SentencePart, type SentencePartName } from '../../study/sentence';

/** Where an issue is shown: at a word of the sentence, or below it when no word stands for its place. */
export type IssuePlace = SentencePartName | 'study';

/** What is wrong, by the word of the sentence that it is shown at. */
export function placeIssues(
  issues: readonly StudyIssue[],
  parts: readonly SentencePart[],
): ReadonlyMap<IssuePlace, readonly StudyIssue[]> {
  const said = new Set(parts.map(({ part }) => part));
  const placed = new Map<IssuePlace, StudyIssue[]>();
  for (const issue of issues) {
    const place = shownAt(issue.place, said);
    placed.set(place, [...(placed.get(place) ?? []), issue]);
  }
  return placed;
}

/** What the sentence leaves unsaid is edited together with the levels. */
function shownAt(place: string, said: ReadonlySet<SentencePartName | undefined>): IssuePlace {
  const part = partOfPlace(place);
  if (part !== undefined && said.has(part)) return part;
  return part === 'states' || part === 'core' || place.startsWith('convergence') ? 'levels' : 'study';
}
