/** Between −1 and 1 and always the same: the fractional parts of k²·√2 follow no pattern of a basis. */
export function arbitraryNumbers(count: number): Float64Array {
  const numbers = new Float64Array(count);
  for (let k = 0; k < count; k++) numbers[k] = 2 * ((((k + 1) ** 2 % 1e6) * Math.SQRT2) % 1) - 1;
  return numbers;
}
