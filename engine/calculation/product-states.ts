import type { FragmentState } from './fragment-states';

/** A state of both fragments at infinite distance. */
export interface ProductState {
  readonly energy: number;
  /** what the charges of the fragments add at the far end of the scan, hartree */
  readonly attraction: number;
  /** 2S + 1 that its spins couple to */
  readonly multiplicities: readonly number[];
  readonly charges: readonly [number, number];
  readonly states: readonly [FragmentState, FragmentState];
  /** of each fragment with this charge */
  readonly lowest: readonly [number, number];
}

/** 2S + 1 from |S₁ − S₂| to S₁ + S₂. */
export function couplings(one: number, other: number): readonly number[] {
  const smallest = Math.min(one, other);
  return Array.from({ length: smallest }, (_, k) => Math.abs(one - other) + 1 + 2 * k);
}
