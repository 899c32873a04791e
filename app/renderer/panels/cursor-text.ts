import type { LengthUnit } from '#engine';
import { positions, scansLength } from '../charts/curves';
import { formatFixed, formatPlain } from '../numbers';
import type { Run } from '../state/window-state';
import { ENERGY_UNITS, type EnergyUnit, LENGTH_UNITS, toEnergyUnit } from '../units';

/** The cursor for the ear: where it is and what every level has there. */
export function cursorText(run: Run, index: number, energyUnit: EnergyUnit, lengthUnit: LengthUnit): string {
  const point = run.points[index];
  if (point === undefined) return 'not computed';
  const position = positions(run.study, run.points, lengthUnit)[index] ?? null;
  const where =
    position === null
      ? 'geometry as given'
      : `${formatPlain(position, 7)} ${scansLength(run.study) ? LENGTH_UNITS[lengthUnit].symbol : '°'}`;
  const energies = run.study.levels.flatMap((level) => {
    const result = point.levels[level];
    if (result === undefined || !('energy' in result)) return [];
    const { name, decimals } = ENERGY_UNITS[energyUnit];
    const energy = `${level} ${formatFixed(toEnergyUnit(result.energy, energyUnit), decimals)} ${name}`;
    return [result.converged ? energy : `${energy}, not converged`];
  });
  return [where, ...energies].join('; ');
}

/** The computed point closest to a place on the axis. */
export function nearestIndex(x: readonly (number | null)[], picked: number): number | undefined {
  let nearest: { readonly index: number; readonly distance: number } | undefined;
  for (const [index, position] of x.entries()) {
    if (position === null) continue;
    const distance = Math.abs(position - picked);
    if (nearest === undefined || distance < nearest.distance) nearest = { index, distance };
  }
  return nearest?.index;
}
