import type { StudyAtom } from '#engine';
import type { Vector3 } from '../../engine/molecule/molecule';

type Rotation = readonly [Vector3, Vector3, Vector3];

/** A rotation drawn evenly from all (from a random unit quaternion), as rows of its matrix. */
export function randomRotation(random: () => number): Rotation {
  const [u, v, w] = [random(), 2 * Math.PI * random(), 2 * Math.PI * random()];
  const [a, b] = [Math.sqrt(1 - u), Math.sqrt(u)];
  const [x, y, z, s] = [a * Math.sin(v), a * Math.cos(v), b * Math.sin(w), b * Math.cos(w)];
  return [
    [1 - 2 * (y * y + z * z), 2 * (x * y - z * s), 2 * (x * z + y * s)],
    [2 * (x * y + z * s), 1 - 2 * (x * x + z * z), 2 * (y * z - x * s)],
    [2 * (x * z - y * s), 2 * (y * z + x * s), 1 - 2 * (x * x + y * y)],
  ];
}

export function turn(rotation: Rotation, r: Vector3): Vector3 {
  const component = (row: Vector3) => row[0] * r[0] + row[1] * r[1] + row[2] * r[2];
  return [component(rotation[0]), component(rotation[1]), component(rotation[2])];
}

/** The same atoms turned and moved at random. */
export function anywhere(atoms: readonly StudyAtom[], random: () => number): StudyAtom[] {
  const rotation = randomRotation(random);
  const shift = [0, 1, 2].map(() => 4 * random() - 2);
  return atoms.map((atom) => {
    const [x, y, z] = turn(rotation, atom.at);
    return { ...atom, at: [x + shift[0], y + shift[1], z + shift[2]] as const };
  });
}
