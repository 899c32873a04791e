import type { StudyResults } from '#engine';

/** Results of a report with what tells them apart from the others in it. */
export interface NamedResults {
  /** of the file; empty where it is the only one */
  readonly name: string;
  readonly results: StudyResults;
}

/** Heads above the columns of a file: none where it is the only one. */
export const fileGroup = ({ name }: NamedResults): readonly string[] => (name ? [name] : []);
