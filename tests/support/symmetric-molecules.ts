import type { StudyAtom } from '#engine';
import { atom, type Place } from './studies';

/** Plausible geometries with exactly the symmetry that the name says, in bohr; for tests of symmetry only. */

function around(element: string, count: number, radius: number, height = 0, phase = 0): StudyAtom[] {
  return Array.from({ length: count }, (_, k) => {
    const angle = phase + (2 * Math.PI * k) / count;
    return atom(element, radius * Math.cos(angle), radius * Math.sin(angle), height);
  });
}

const bond = (first: string, second: string, distance: number) => [atom(first), atom(second, 0, 0, distance)];
const all = (element: string, places: readonly Place[]) => places.map(([x, y, z]) => atom(element, x, y, z));

export const hydrogen = bond('H', 'H', 1.4);
export const nitrogen = bond('N', 'N', 2.074);
export const oxygen = bond('O', 'O', 2.282);
export const carbon = bond('C', 'C', 2.348);
export const hydrogenFluoride = bond('F', 'H', 1.733);
export const carbonMonoxide = bond('C', 'O', 2.132);
export const acetylene = [
  ...all('C', [
    [0, 0, 1.137],
    [0, 0, -1.137],
  ]),
  ...all('H', [
    [0, 0, 3.14],
    [0, 0, -3.14],
  ]),
];
export const water = [
  atom('O'),
  ...all('H', [
    [1.43, 0, 1.107],
    [-1.43, 0, 1.107],
  ]),
];
export const ammonia = [atom('N'), ...around('H', 3, 1.772, -0.721)];
export const methane = [
  atom('C'),
  ...all('H', [
    [1.186, 1.186, 1.186],
    [1.186, -1.186, -1.186],
    [-1.186, 1.186, -1.186],
    [-1.186, -1.186, 1.186],
  ]),
];
export const ethylene = [
  ...all('C', [
    [0, 0, 1.265],
    [0, 0, -1.265],
  ]),
  ...all('H', [
    [0, 1.745, 2.33],
    [0, -1.745, 2.33],
    [0, 1.745, -2.33],
    [0, -1.745, -2.33],
  ]),
];
export const allene = [
  ...all('C', [
    [0, 0, 0],
    [0, 0, 2.47],
    [0, 0, -2.47],
  ]),
  ...all('H', [
    [1.75, 0, 3.53],
    [-1.75, 0, 3.53],
    [0, 1.75, -3.53],
    [0, -1.75, -3.53],
  ]),
];
export const benzene = [...around('C', 6, 2.635), ...around('H', 6, 4.69)];
export const boronTrifluoride = [atom('B'), ...around('F', 3, 2.48)];
export const staggeredEthane = [
  ...all('C', [
    [0, 0, 1.45],
    [0, 0, -1.45],
  ]),
  ...around('H', 3, 1.92, 2.19),
  ...around('H', 3, 1.92, -2.19, Math.PI / 3),
];
export const transDiazene = [
  ...all('N', [
    [1.18, 0, 0],
    [-1.18, 0, 0],
  ]),
  ...all('H', [
    [1.75, 1.85, 0],
    [-1.75, -1.85, 0],
  ]),
];
export const twistedPeroxide = [
  ...all('O', [
    [1.37, 0, 0],
    [-1.37, 0, 0],
  ]),
  ...all('H', [
    [1.7, 1.0, 1.46],
    [-1.7, -1.0, 1.46],
  ]),
];
export const formaldehyde = [
  atom('C'),
  atom('O', 0, 0, 2.28),
  ...all('H', [
    [0, 1.77, -1.11],
    [0, -1.77, -1.11],
  ]),
];
export const chiralMethane = [
  atom('C'),
  atom('H', 1.2, 1.2, 1.2),
  atom('F', 1.5, -1.5, -1.5),
  atom('Cl', -1.9, 1.9, -1.9),
  atom('O', -1.6, -1.6, 1.6),
];
/** CHF–CHF with both stereocentres opposite */
export const mesoEthane = [
  ...all('C', [
    [1.4, 0, 0],
    [-1.4, 0, 0],
  ]),
  ...all('F', [
    [2.3, 2.2, 0.8],
    [-2.3, -2.2, -0.8],
  ]),
  ...all('Cl', [
    [2.6, -1.5, 2.6],
    [-2.6, 1.5, -2.6],
  ]),
  ...all('H', [
    [2.1, -1.1, -1.6],
    [-2.1, 1.1, 1.6],
  ]),
];
