import type { LengthUnit, Study } from '#engine';
import { scansLength } from '../../charts/curves';
import { formatFixed, formatPlain } from '../../numbers';
import { convertLength, ENERGY_UNITS, type EnergyUnit, LENGTH_UNITS, toEnergyUnit } from '../../units';

/** Numbers of a study as the window shows them now. */
export interface ShownUnits {
  readonly energyUnit: EnergyUnit;
  readonly lengthUnit: LengthUnit;
}

/** A place along the scan, with its unit. */
export type PositionText = (value: number, significant: number) => string;

export const positionText =
  (study: Study, lengthUnit: LengthUnit): PositionText =>
  (value, significant) =>
    scansLength(study)
      ? `${formatPlain(convertLength(value, study.molecule.unit, lengthUnit), significant)} ${LENGTH_UNITS[lengthUnit].symbol}`
      : `${formatPlain(value, significant)}°`;

/** An energy in hartree, with the unit shown. */
export const energyText = (hartree: number, unit: EnergyUnit): string =>
  `${formatFixed(toEnergyUnit(hartree, unit), ENERGY_UNITS[unit].decimals)} ${ENERGY_UNITS[unit].symbol}`;

/** How far an energy may be off, with one digit. */
export const uncertaintyText = (hartree: number, unit: EnergyUnit): string =>
  `± ${formatPlain(toEnergyUnit(hartree, unit), 1)}`;
