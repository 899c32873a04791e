import { planMotions } from '../molecule/scan-motion';
import type { PreparedStudy } from './prepare-study';
import type { StudyAtom } from './study';

/** Charges of the parts differ from an even share by at most this. */
const LARGEST_CHARGE_SHIFT = 1;

/** Indices of the atoms on either side of a scanned bond. */
export type Parts = readonly [readonly number[], readonly number[]];

/** The atoms of either side of the one scanned bond; undefined for other scans, and with ghosts, which have no side. */
export function partsOf({ study }: PreparedStudy): Parts | undefined {
  const { molecule, scan } = study;
  if (!scan || !('bonds' in scan.coordinate) || scan.coordinate.bonds.length !== 1) return undefined;
  if (molecule.atoms.some(({ ghost }) => ghost)) return undefined;
  const { moved } = planMotions(molecule, scan.coordinate).motions[0];
  const indices = molecule.atoms.map((_, index) => index);
  return [indices.filter((index) => !moved.has(index)), indices.filter((index) => moved.has(index))];
}

/** The ways to share a charge between two parts. */
export function chargeShares(charge: number): readonly (readonly [number, number])[] {
  // + 0 makes 0 of −0
  const from = Math.ceil(charge / 2 - LARGEST_CHARGE_SHIFT) + 0;
  const count = Math.floor(charge / 2 + LARGEST_CHARGE_SHIFT) - from + 1;
  return Array.from({ length: count }, (_, k) => [from + k, charge - from - k] as const);
}

export interface SeparateParts {
  /** of each part, as the scan places them, in the study's unit */
  readonly atoms: readonly (readonly StudyAtom[])[];
  /** both are single atoms of one element, so that what holds of one holds of the other */
  readonly areEqual: boolean;
}

/** @param coordinate - of the scan, where the parts have their geometry from */
export function separateParts(
  prepared: PreparedStudy,
  parts: Parts,
  coordinate: number | null,
): SeparateParts {
  const all = prepared.geometryAt(coordinate);
  const atoms = parts.map((part) => part.map((index) => all[index]));
  return {
    atoms,
    areEqual: parts.every((part) => part.length === 1) && atoms[0][0].element === atoms[1][0].element,
  };
}
