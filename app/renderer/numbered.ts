/** Items with the number by which everything here counts them, from 0: what React may tell them apart by. */
export const numbered = <T>(items: readonly T[]): readonly { readonly number: number; readonly item: T }[] =>
  items.map((item, number) => ({ number, item }));
