import type { Vector3 } from '../molecule/molecule';

/**
 * One-dimensional integrals of a pair of primitives along each axis,
 * S_ij^e = ∫ (x − A)^i (x − O)^e (x − B)^j exp(−a(x − A)² − b(x − B)²) dx,
 * of which overlap, kinetic energy and moments are sums of products.
 *
 * Source: S. Obara, A. Saika, J. Chem. Phys. 84, 3963 (1986).
 */
export class LineIntegrals {
  private readonly highestMoment: number;
  private readonly rowLength: number;
  private readonly momentLength: number;
  private readonly axisLength: number;
  private readonly values: Float64Array;

  /**
   * @param highestPower - largest i and j
   * @param highestMoment - largest e
   */
  constructor(highestPower: number, highestMoment: number) {
    this.highestMoment = highestMoment;
    this.rowLength = highestPower + 1;
    this.momentLength = this.rowLength ** 2;
    this.axisLength = this.momentLength * (highestMoment + 1);
    this.values = new Float64Array(3 * this.axisLength);
  }

  /** S_ij^moment along axis 0, 1 or 2 */
  at(axis: number, i: number, j: number, moment = 0): number {
    return this.values[axis * this.axisLength + moment * this.momentLength + i * this.rowLength + j];
  }

  /**
   * Computes all integrals up to powers i ≤ firstPower, j ≤ secondPower.
   *
   * @param a - exponent of the first primitive, at `A`; `b` of the second, at `B`; moments are about `origin`
   */
  compute(
    a: number,
    A: Vector3,
    firstPower: number,
    b: number,
    B: Vector3,
    secondPower: number,
    origin: Vector3,
  ): void {
    const { values, rowLength, momentLength, highestMoment } = this;
    const p = a + b;
    const width = 0.5 / p;
    for (let axis = 0; axis < 3; axis++) {
      const separation = A[axis] - B[axis];
      const fromA = (-b / p) * separation;
      const fromB = (a / p) * separation;
      const fromOrigin = A[axis] + fromA - origin[axis];
      const base = axis * this.axisLength;
      for (let e = 0; e <= highestMoment; e++) {
        for (let i = 0; i <= firstPower; i++) {
          for (let j = 0; j <= secondPower; j++) {
            const at = base + e * momentLength + i * rowLength + j;
            let value: number;
            // raised from the integral one lower in i, else in j, else in e; the rest are its neighbours below
            let lowered = 0;
            if (i > 0) {
              const from = at - rowLength;
              if (i > 1) lowered += (i - 1) * values[from - rowLength];
              if (j > 0) lowered += j * values[from - 1];
              if (e > 0) lowered += e * values[from - momentLength];
              value = fromA * values[from] + width * lowered;
            } else if (j > 0) {
              const from = at - 1;
              if (j > 1) lowered += (j - 1) * values[from - 1];
              if (e > 0) lowered += e * values[from - momentLength];
              value = fromB * values[from] + width * lowered;
            } else if (e > 0) {
              const from = at - momentLength;
              if (e > 1) lowered += (e - 1) * values[from - momentLength];
              value = fromOrigin * values[from] + width * lowered;
            } else value = Math.sqrt(Math.PI / p) * Math.exp(-((a * b) / p) * separation * separation);
            values[at] = value;
          }
        }
      }
    }
  }
}
