import { expect } from 'vitest';

/** A number as a publication prints it. */
export interface PublishedValue {
  /** exactly as printed; its digits set the tolerance */
  readonly printed: string;
  readonly unit?: string;
  /** authors, title or journal, year, table or equation; says "value from memory" where it is */
  readonly source: string;
  /** wider (or narrower) than half the last printed digit; needs `because` */
  readonly tolerance?: number;
  readonly because?: string;
}

/** Half a unit in the last printed digit. */
export function printedTolerance(printed: string): number {
  const match = /^[-+]?\d+(?:\.(\d+))?(?:[eE]([-+]?\d+))?$/.exec(printed);
  if (!match) throw new Error(`not a printed number: ${printed}`);
  return 0.5 * 10 ** (Number(match[2] ?? 0) - (match[1]?.length ?? 0));
}

expect.extend({
  toMatchPublished(actual: number, value: PublishedValue) {
    if (!value.source.trim()) throw new Error('a published value needs its source');
    if (value.tolerance !== undefined && !value.because)
      throw new Error('a tolerance override needs a reason');
    const tolerance = value.tolerance ?? printedTolerance(value.printed) * (1 + 1e-9);
    const difference = Math.abs(actual - Number(value.printed));
    return {
      pass: difference <= tolerance,
      message: () =>
        `expected ${actual} to agree with ${value.printed} ${value.unit ?? ''} within ${tolerance}` +
        ` (difference ${difference})\n  source: ${value.source}`,
    };
  },
});

declare module 'vitest' {
  interface Assertion<T> {
    toMatchPublished(value: PublishedValue): T;
  }
}
