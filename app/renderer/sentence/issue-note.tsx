import type { StudyIssue } from '../../contract/requests';
import { issueWords } from './issue-words';
import type { IssuePlace } from './place-issues';

/** The id by which a control of the sentence points at what is wrong with it. */
export const noteId = (place: IssuePlace): string => `note-${place}`;

/** What is wrong at this place and what to do, written into the sentence right behind it. */
export function IssueNote({
  at,
  issues,
}: {
  readonly at?: IssuePlace;
  readonly issues: readonly StudyIssue[];
}) {
  if (issues.length === 0) return null;
  return (
    <span className="note" {...(at !== undefined && { id: noteId(at) })}>
      {issues.map((issue) => (
        <span key={`${issue.code} ${issue.place}`}>
          {issueWords(issue)} <em>{issue.remedy}</em>{' '}
        </span>
      ))}
    </span>
  );
}
