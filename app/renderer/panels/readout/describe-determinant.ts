import type { LeadingDeterminant } from '#engine';

/**
 * A determinant by what it changes of the reference (the lowest orbitals filled): "2² → 5²" moves a pair,
 * "2↑ → 5↑" one electron of spin up; orbitals are counted from 0, as in the results file.
 */
export function describeDeterminant({ alpha, beta }: Pick<LeadingDeterminant, 'alpha' | 'beta'>): string {
  const up = moved(alpha);
  const down = moved(beta);
  if (up.holes.length === 0 && down.holes.length === 0) return 'reference';
  return `${orbitals(up.holes, down.holes)} → ${orbitals(up.particles, down.particles)}`;
}

function moved(occupied: readonly number[]) {
  const reference = Array.from({ length: occupied.length }, (_, orbital) => orbital);
  return {
    holes: reference.filter((orbital) => !occupied.includes(orbital)),
    particles: occupied.filter((orbital) => orbital >= occupied.length),
  };
}

function orbitals(up: readonly number[], down: readonly number[]): string {
  const all = [...new Set([...up, ...down])].sort((a, b) => a - b);
  return all
    .map((orbital) => {
      const isUp = up.includes(orbital);
      return isUp && down.includes(orbital) ? `${orbital}²` : `${orbital}${isUp ? '↑' : '↓'}`;
    })
    .join(' ');
}
