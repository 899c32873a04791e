/** A table of words and numbers to be set in any format. */
export interface TextTable {
  readonly heading: string;
  readonly columns: readonly string[];
  /** minus signs are true ones; an empty cell means that there is no value */
  readonly rows: readonly (readonly string[])[];
  /** sentences below it */
  readonly notes: readonly string[];
}
