/**
 * Hermite indices (t, u, v) are ordered by degree t + u + v and lexically inside a degree, so that all indices of
 * a range of degrees stand side by side: degree d begins at d(d+1)(d+2)/6.
 */
export function hermiteStart(degree: number): number {
  return (degree * (degree + 1) * (degree + 2)) / 6;
}
