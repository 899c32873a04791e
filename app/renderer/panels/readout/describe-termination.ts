import type { LevelResult } from '#engine';

/** Why a level stopped, in plain words. */
export function describeTermination({ termination }: Pick<LevelResult, 'termination'>): string {
  switch (termination.kind) {
    case 'converged':
      return 'converged';
    case 'iterationLimit':
      return `not converged after ${termination.limit} iterations`;
    case 'stagnated':
      return `no progress in ${termination.iterationsWithoutProgress} iterations`;
    case 'notFinite':
      return `${termination.quantity} is no longer a number`;
    case 'cancelled':
      return 'cancelled';
    case 'orbitalsNotConverged':
      return 'built on orbitals that have not converged';
    case 'refused':
      return termination.message;
  }
}
