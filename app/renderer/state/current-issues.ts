import type { StudyIssue } from '../../contract/requests';
import type { Check } from './window-state';

/** What is known to be wrong; the verdict before last stays until the new one is there. */
export function currentIssues(check: Check): readonly StudyIssue[] {
  const result = check.kind === 'judged' ? check.result : check.last;
  return result === undefined || result.ok ? [] : result.issues;
}
