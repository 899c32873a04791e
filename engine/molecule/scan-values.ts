import { EngineError } from '../errors';

/** More points than this are taken for a mistake. */
export const MOST_SCAN_POINTS = 10_000;

/** Significant digits of evenly spaced values: as many as any double holds exactly. */
const SCAN_DIGITS = 15;

/** The scanned values as a study gives them. */
export type ScanRange =
  | { readonly from: number; readonly to: number; readonly count: number }
  | { readonly values: readonly number[] };

/**
 * The values of a scan, in the order in which the study gives them: `from` to `to` evenly spaced with both ends
 * exact, or the list as it stands (it may rise, fall or jump).
 *
 * @throws EngineError `scan.count` for fewer than 2 evenly spaced points, an empty list or more than
 * `MOST_SCAN_POINTS` of either; `scan.value` for a number that is not finite, a range without width or a value
 * listed twice
 */
export function scanValues(range: ScanRange): readonly number[] {
  return 'values' in range ? listedValues(range.values) : spacedValues(range);
}

function spacedValues({ from, to, count }: Extract<ScanRange, { count: number }>): readonly number[] {
  if (!Number.isFinite(from)) throw notFinite(from, 'scan.from');
  if (!Number.isFinite(to)) throw notFinite(to, 'scan.to');
  if (!Number.isInteger(count) || count < 2 || count > MOST_SCAN_POINTS) {
    throw new EngineError(
      'scan.count',
      `A scan cannot have ${count} points.`,
      `Choose a whole number from 2 to ${MOST_SCAN_POINTS}.`,
      { count },
      'scan.count',
    );
  }
  if (from === to) {
    throw new EngineError(
      'scan.value',
      `The scan starts and ends at ${from}.`,
      'Choose different values for "from" and "to", or leave the scan out for one point.',
      { value: from },
      'scan.to',
    );
  }
  const last = count - 1;
  // round numbers stay round: 0.4 to 5 in 24 gives 0.8, not 0.7999999999999999
  const rounded = (value: number) => Number(value.toPrecision(SCAN_DIGITS));
  return Array.from({ length: count }, (_, i) =>
    i === 0 ? from : i === last ? to : rounded((from * (last - i) + to * i) / last),
  );
}

function listedValues(values: readonly number[]): readonly number[] {
  if (values.length === 0 || values.length > MOST_SCAN_POINTS) {
    throw new EngineError(
      'scan.count',
      `The scan lists ${values.length} values.`,
      `List 1 to ${MOST_SCAN_POINTS} values.`,
      { count: values.length },
      'scan.values',
    );
  }
  const seen = new Set<number>();
  values.forEach((value, index) => {
    const place = `scan.values[${index}]`;
    if (!Number.isFinite(value)) throw notFinite(value, place);
    if (seen.has(value)) {
      throw new EngineError(
        'scan.value',
        `The scan lists ${value} twice.`,
        'Remove one of them.',
        { value },
        place,
      );
    }
    seen.add(value);
  });
  return values;
}

function notFinite(value: number, place: string): EngineError {
  return new EngineError(
    'scan.value',
    `The scan asks for ${value}.`,
    'Give a finite number.',
    { value },
    place,
  );
}
