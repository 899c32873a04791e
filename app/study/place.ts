/** Keys and indices from the top of a file down to one value. */
export type Path = readonly (string | number)[];

/** A path as users read it: `molecule.atoms[1].element`; empty for the file as a whole. */
export function placeOf(path: Path): string {
  return path.reduce<string>((place, step) => {
    if (typeof step === 'number') return `${place}[${step}]`;
    if (!/^[\w-]+$/.test(step)) return `${place}[${JSON.stringify(step)}]`;
    return place ? `${place}.${step}` : step;
  }, '');
}
