import { alignedTable } from '../../app/cli/wording';
import type { Measurement } from './measure';

/** A line each: what was measured, our rate, the yardstick's, how many times faster, and what the yardstick is. */
export function measurementTable(measured: readonly Measurement[]): string {
  const numbers = alignedTable([
    ['', 'ours', 'yardstick', 'ratio', 'in'],
    ...measured.map(({ name, ours, yardstick, unit }) => [
      name,
      significant(ours),
      significant(yardstick),
      significant(ours / yardstick),
      unit,
    ]),
  ]).split('\n');
  return numbers
    .map((line, i) => (i === 0 ? line : `${line}   against ${measured[i - 1]?.against}`))
    .join('\n');
}

function significant(value: number): string {
  return value.toLocaleString('en-GB', { maximumSignificantDigits: 3 });
}
