import type { Vector3 } from './molecule';

export function add(a: Vector3, b: Vector3): Vector3 {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}

export function subtract(a: Vector3, b: Vector3): Vector3 {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function scale(a: Vector3, factor: number): Vector3 {
  return [a[0] * factor, a[1] * factor, a[2] * factor];
}

export function dot(a: Vector3, b: Vector3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross(a: Vector3, b: Vector3): Vector3 {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function length(a: Vector3): number {
  return Math.hypot(a[0], a[1], a[2]);
}

export function distance(a: Vector3, b: Vector3): number {
  return length(subtract(a, b));
}

/** Angle at the tip of two vectors in radians, 0 … π; accurate near both ends, where an arccosine is not. */
export function angleBetween(a: Vector3, b: Vector3): number {
  return Math.atan2(length(cross(a, b)), dot(a, b));
}

/**
 * Rotates a vector about an axis through the origin, counter-clockwise seen against the axis.
 *
 * @param axis - of length 1
 * @param angle - in radians
 *
 * Source: O. Rodrigues, J. Math. Pures Appl. 5, 380 (1840).
 */
export function rotate(a: Vector3, axis: Vector3, angle: number): Vector3 {
  const cosine = Math.cos(angle);
  const along = scale(axis, dot(axis, a) * (1 - cosine));
  return add(add(scale(a, cosine), scale(cross(axis, a), Math.sin(angle))), along);
}
