import type { Study } from '#engine';

/** A scanned coordinate with its unit: `1.2 Å`, `2.4 bohr`, `104.5°`. */
export function coordinateText({ scan, molecule }: Study, coordinate: number): string {
  if (scan && !('bonds' in scan.coordinate)) return `${coordinate}°`;
  return `${coordinate} ${molecule.unit === 'angstrom' ? 'Å' : 'bohr'}`;
}
