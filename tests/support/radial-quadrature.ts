/**
 * ∫₀^∞ f(r) dr of a smooth function that falls exponentially: trapezoidal rule after r = exp(t − exp(−t))
 * (H. Takahasi, M. Mori, Publ. RIMS 9, 721 (1974)), which converges to rounding.
 */
export function integrateOverRadius(f: (r: number) => number): number {
  const step = 1 / 64;
  let sum = 0;
  for (let k = -5 * 64; k <= 8 * 64; k++) {
    const t = k * step;
    const r = Math.exp(t - Math.exp(-t));
    const weight = r * (1 + Math.exp(-t));
    if (weight > 0) sum += weight * f(r);
  }
  return sum * step;
}
