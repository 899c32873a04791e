import type { TextTable } from './text-table';

/** A report as its parts in order; each format sets them in its own way. Texts are plain, citations as `[1]`. */
export interface ReportDocument {
  /** fits the bar of a window */
  readonly title: string;
  readonly heading: string;
  readonly blocks: readonly ReportBlock[];
}

export type ReportBlock =
  | { readonly kind: 'section'; readonly heading: string }
  | { readonly kind: 'paragraph'; readonly text: string; readonly tone?: 'title' | 'note' }
  /** the place of the figure */
  | { readonly kind: 'figure'; readonly caption: string }
  | { readonly kind: 'table'; readonly table: TextTable }
  | { readonly kind: 'list'; readonly items: readonly ListItem[] }
  /** numbered from 1 as they are cited */
  | { readonly kind: 'references'; readonly references: readonly string[] };

export interface ListItem {
  /** set off at the beginning: which file, level, range it is about */
  readonly lead: string;
  readonly text: string;
}

/** The tables of a report in order. */
export const tablesOf = ({ blocks }: ReportDocument): readonly TextTable[] =>
  blocks.flatMap((block) => (block.kind === 'table' ? [block.table] : []));
