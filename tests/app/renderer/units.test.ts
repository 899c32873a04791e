import { describe, expect, it } from 'vitest';
import { convertLength, ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../../app/renderer/units';

describe('units shown in the window', () => {
  it('converts energies as the CODATA 2022 table of energy equivalents says', () => {
    // P. J. Mohr et al., Rev. Mod. Phys. 97, 025002 (2025): the hartree row, value from memory of the table
    expect(toEnergyUnit(1, 'electronvolt')).toBeCloseTo(27.211386245981, 11);
    expect(toEnergyUnit(1, 'wavenumber')).toBeCloseTo(219474.63136314, 7);
    expect(toEnergyUnit(1, 'kilojoulePerMole')).toBeCloseTo(2625.4996, 4);
    expect(toEnergyUnit(-1.25, 'hartree')).toBe(-1.25);
  });

  it('converts lengths there and back, and leaves equal units bit by bit', () => {
    expect(convertLength(1, 'bohr', 'angstrom')).toBeCloseTo(0.529177210544, 12);
    expect(convertLength(convertLength(0.7743, 'angstrom', 'bohr'), 'bohr', 'angstrom')).toBeCloseTo(
      0.7743,
      14,
    );
    expect(convertLength(0.1 + 0.2, 'angstrom', 'angstrom')).toBe(0.1 + 0.2);
  });

  it('shows as many decimals as resolve a ten-millionth of a hartree', () => {
    for (const unit of Object.keys(ENERGY_UNITS) as EnergyUnit[]) {
      const resolved = 10 ** -ENERGY_UNITS[unit].decimals / ENERGY_UNITS[unit].perHartree;
      expect(resolved).toBeLessThanOrEqual(1e-7);
    }
  });
});
