import type { PublishedValue } from '../support/published';

/** A row of a publication, ready for `toMatchPublished`. */
export interface PublishedRow extends PublishedValue {
  readonly system: string;
  readonly quantity: string;
  /** what a reader of the row should know; never a reason to change the print */
  readonly note?: string;
}
