import type { Study } from './study';

/** Below this weight of the reference a single determinant no longer describes the state; studies may say otherwise. */
export const LOW_REFERENCE_WEIGHT = 0.9;

export function lowReferenceWeight({ findings }: Pick<Study, 'findings'>): number {
  return findings?.referenceWeight ?? LOW_REFERENCE_WEIGHT;
}
