/**
 * Physical constants, CODATA 2022 recommended values
 * (P. J. Mohr, D. B. Newell, B. N. Taylor, E. Tiesinga, Rev. Mod. Phys. 97, 025002 (2025)).
 */

/** Bohr radius in ångström. */
export const BOHR_IN_ANGSTROM = 0.529177210544;
/** Hartree energy in electronvolt. */
export const HARTREE_IN_EV = 27.211386245981;
/** Hartree energy divided by hc, in cm⁻¹. */
export const HARTREE_IN_WAVENUMBERS = 219474.63136314;
/** Hartree energy times the Avogadro constant, in kJ/mol: 4.3597447222060e-18 J × 6.02214076e23 mol⁻¹. */
export const HARTREE_IN_KJ_PER_MOL = 4.359744722206e-21 * 6.02214076e23;
/** Unified atomic mass unit in electron masses. */
export const DALTON_IN_ELECTRON_MASSES = 1822.888486;
/** One hartree/bohr² in newton per metre: 4.3597447222060e-18 J / (0.529177210544e-10 m)². */
export const FORCE_CONSTANT_IN_NEWTON_PER_METRE = 4.359744722206e-18 / (BOHR_IN_ANGSTROM * 1e-10) ** 2;
/** Atomic unit of electric dipole moment, e·a0, in debye. */
export const DIPOLE_IN_DEBYE = 2.5417464739;
