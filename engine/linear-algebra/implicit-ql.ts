import { SweepQueue } from './column-rotations';

/** The iteration for one eigenvalue went on beyond `MOST_SWEEPS`; not known to happen for finite matrices. */
export class EigenvaluesNotConverged extends Error {
  override readonly name = 'EigenvaluesNotConverged';
}

/** Sweeps for one eigenvalue; two or three are usual. */
const MOST_SWEEPS = 60;
/** An off-diagonal element this small beside its diagonal neighbours is zero. */
const NEGLIGIBLE = Number.EPSILON;

/**
 * Implicit QL sweeps until the tridiagonal matrix is diagonal, in place; `columns` are rotated along.
 *
 * @param offDiagonal - element i stands beside the diagonal elements i − 1 and i
 */
export function diagonaliseTridiagonal(
  diagonal: Float64Array,
  offDiagonal: Float64Array,
  columns: Float64Array,
  n: number,
): void {
  const d = diagonal;
  const e = new Float64Array(n);
  e.set(offDiagonal.subarray(1));
  const sweeps = new SweepQueue(n);
  for (let l = 0; l < n; l++) {
    for (let count = 0; ; count++) {
      let m = l;
      while (m < n - 1 && Math.abs(e[m]) > NEGLIGIBLE * (Math.abs(d[m]) + Math.abs(d[m + 1]))) m++;
      if (m === l) break;
      if (count === MOST_SWEEPS) {
        throw new EigenvaluesNotConverged(`eigenvalue ${l} of ${n} after ${count} sweeps`);
      }
      if (!sweeps.hasRoomFor(m - l)) sweeps.applyTo(columns);
      sweepOnce(d, e, l, m, sweeps);
    }
  }
  sweeps.applyTo(columns);
}

/** One sweep over the unreduced block l … m, chasing the bulge upwards from m; less if the block splits on the way. */
function sweepOnce(d: Float64Array, e: Float64Array, l: number, m: number, sweeps: SweepQueue): void {
  sweeps.begin(m);
  const slope = (d[l + 1] - d[l]) / (2 * e[l]);
  const root = Math.hypot(slope, 1);
  // d(m) less the shift, the eigenvalue of the leading 2×2 block nearer to d(l)
  let g = d[m] - d[l] + e[l] / (slope + (slope < 0 ? -root : root));
  let s = 1;
  let c = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i--) {
    const f = s * e[i];
    const b = c * e[i];
    const r = Math.sqrt(f * f + g * g);
    e[i + 1] = r;
    if (r === 0) {
      d[i + 1] -= p;
      e[m] = 0;
      return;
    }
    s = f / r;
    c = g / r;
    g = d[i + 1] - p;
    const t = (d[i] - g) * s + 2 * c * b;
    p = s * t;
    d[i + 1] = g + p;
    g = c * t - b;
    sweeps.add(c, s);
  }
  d[l] -= p;
  e[l] = g;
  e[m] = 0;
}
