import type { ScanDraft } from './draft';
import { numberOrText } from './study-text';

/** Ranges to start from when none has been typed: ångström or bohr alike for bonds, degrees for angles. */
const BOND_RANGE = { from: '0.5', to: '5', count: '31' };
const ANGLE_RANGE = { from: '60', to: '180', count: '25' };

/** The scan with the other coordinate; only what is empty is filled in. */
export function withCoordinate(
  scan: ScanDraft,
  coordinate: ScanDraft['coordinate'],
  atoms: number,
): ScanDraft {
  const isEmpty = [scan.from, scan.to, scan.count, scan.values].every((typed) => typed.trim() === '');
  const range = coordinate === 'bonds' ? BOND_RANGE : ANGLE_RANGE;
  return {
    ...scan,
    ...(isEmpty && coordinate !== 'none' && range),
    ...(coordinate === 'bonds' && scan.bonds.length === 0 && atoms > 1 && { bonds: [[0, 1]] as const }),
    coordinate,
  };
}

/** The scan with its values given the other way; they are carried over where that side is still empty. */
export function withSpacing(scan: ScanDraft, spacing: ScanDraft['spacing']): ScanDraft {
  if (spacing === 'listed' && scan.values.trim() === '') {
    const [from, to, count] = [scan.from, scan.to, scan.count].map(numberOrText);
    if (typeof from === 'number' && typeof to === 'number' && Number.isInteger(count) && Number(count) > 1)
      return { ...scan, spacing, values: listed(from, to, Number(count)) };
  }
  if (spacing === 'even' && [scan.from, scan.to, scan.count].every((typed) => typed.trim() === '')) {
    const values = scan.values.split(/[\s,;]+/).filter((part) => part !== '');
    return { ...scan, spacing, from: values[0] ?? '', to: values.at(-1) ?? '', count: String(values.length) };
  }
  return { ...scan, spacing };
}

/** More would be no list that anyone edits. */
const LONGEST_LIST = 200;

const listed = (from: number, to: number, count: number): string =>
  Array.from({ length: Math.min(count, LONGEST_LIST) }, (_, index) =>
    Number((from + ((to - from) * index) / (count - 1)).toPrecision(8)),
  ).join(', ');
