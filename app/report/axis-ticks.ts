const MINUS = '\u2212';

export interface Ticks {
  readonly values: readonly number[];
  readonly labels: readonly string[];
  readonly decimals: number;
}

/** Round numbers inside a range, about `wanted` of them, 1, 2 or 5 times a power of ten apart. */
export function axisTicks(low: number, high: number, wanted: number): Ticks {
  const roughStep = (high - low) / wanted;
  const power = 10 ** Math.floor(Math.log10(roughStep));
  const step = power * ([1, 2, 5].find((multiple) => multiple * power >= roughStep * 0.999) ?? 10);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  // a tolerance for range ends that are themselves round numbers
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  const values = Array.from({ length: last - first + 1 }, (_, index) => (first + index) * step);
  return { values, labels: values.map((value) => tickLabel(value, decimals)), decimals };
}

/** With a true minus sign, and no sign on zero. */
export function tickLabel(value: number, decimals: number): string {
  const digits = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(digits) !== 0 ? MINUS + digits : digits;
}
