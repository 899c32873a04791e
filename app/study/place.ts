/** Keys and indices from the top of a file down to one value. */
export type Path = readonly (string | number)[];

/** Longer keys are cut in what users read. */
const LONGEST_KEY = 60;

/** A path as users read it: `molecule.atoms[1].element`; empty for the file as a whole. */
export function placeOf(path: Path): string {
  return path.reduce<string>((place, step) => {
    if (typeof step === 'number') return `${place}[${step}]`;
    const key = step.length > LONGEST_KEY ? `${step.slice(0, LONGEST_KEY - 1)}…` : step;
    if (!/^[\w…-]+$/.test(key)) return `${place}[${JSON.stringify(key)}]`;
    return place ? `${place}.${key}` : key;
  }, '');
}
