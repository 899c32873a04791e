/** One line of the benchmark: our rate beside a yardstick measured in the same run. */
export interface Measurement {
  readonly name: string;
  readonly ours: number;
  readonly yardstick: number;
  /** of both rates */
  readonly unit: string;
  /** what the yardstick is */
  readonly against: string;
}

/** Calls a second, after a warm-up, over at least `seconds`. */
export function callsPerSecond(work: () => void, seconds = 0.7, warmUpSeconds = 0.2): number {
  const warmUntil = performance.now() + 1000 * warmUpSeconds;
  do work();
  while (performance.now() < warmUntil);
  const start = performance.now();
  let calls = 0;
  do {
    work();
    calls++;
  } while (performance.now() - start < 1000 * seconds);
  return (1000 * calls) / (performance.now() - start);
}

/** Seconds of the fastest of several calls: what else the machine does only ever makes a call slower. */
export function fastestCall(work: () => void, seconds = 1.5): number {
  const until = performance.now() + 1000 * seconds;
  let fastest = Number.POSITIVE_INFINITY;
  do {
    const began = performance.now();
    work();
    fastest = Math.min(fastest, performance.now() - began);
  } while (performance.now() < until);
  return fastest / 1000;
}
