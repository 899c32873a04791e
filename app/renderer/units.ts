import type { LengthUnit } from '#engine';
import {
  BOHR_IN_ANGSTROM,
  HARTREE_IN_EV,
  HARTREE_IN_KJ_PER_MOL,
  HARTREE_IN_WAVENUMBERS,
} from '../../engine/constants';

/** How energies are shown; the files are always in hartree. */
export type EnergyUnit = 'hartree' | 'electronvolt' | 'kilojoulePerMole' | 'wavenumber';

interface EnergyUnitDescription {
  readonly symbol: string;
  /** for the ear and for menus */
  readonly name: string;
  readonly perHartree: number;
  /** decimals in tables: all resolve about 1e-8 hartree except wavenumbers, where 0.01 cm⁻¹ is 5e-8 hartree */
  readonly decimals: number;
}

export const ENERGY_UNITS: Readonly<Record<EnergyUnit, EnergyUnitDescription>> = {
  hartree: { symbol: 'Eₕ', name: 'hartree', perHartree: 1, decimals: 8 },
  electronvolt: { symbol: 'eV', name: 'electronvolt', perHartree: HARTREE_IN_EV, decimals: 6 },
  kilojoulePerMole: { symbol: 'kJ/mol', name: 'kJ/mol', perHartree: HARTREE_IN_KJ_PER_MOL, decimals: 4 },
  wavenumber: { symbol: 'cm⁻¹', name: 'wavenumbers', perHartree: HARTREE_IN_WAVENUMBERS, decimals: 2 },
};

/** Energy in hartree → the unit shown. */
export const toEnergyUnit = (hartree: number, unit: EnergyUnit): number =>
  hartree * ENERGY_UNITS[unit].perHartree;

export const LENGTH_UNITS: Readonly<
  Record<LengthUnit, { readonly symbol: string; readonly perBohr: number }>
> = {
  angstrom: { symbol: 'Å', perBohr: BOHR_IN_ANGSTROM },
  bohr: { symbol: 'a₀', perBohr: 1 },
};

/** Length in one unit → another; equal units leave the double untouched. */
export const convertLength = (length: number, from: LengthUnit, to: LengthUnit): number =>
  from === to ? length : (length / LENGTH_UNITS[from].perBohr) * LENGTH_UNITS[to].perBohr;
