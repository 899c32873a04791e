import type { Study } from '#engine';

/** A scanned coordinate with its unit: `1.2 Å`, `2.4 bohr`, `104.5°`. */
export function coordinateText({ scan, molecule }: Study, coordinate: number): string {
  // evenly spaced values carry the rounding of their division: 1.0999999999999999 is meant as 1.1
  const value = Number(coordinate.toPrecision(8));
  if (scan && !('bonds' in scan.coordinate)) return `${value}°`;
  return `${value} ${molecule.unit === 'angstrom' ? 'Å' : 'bohr'}`;
}
