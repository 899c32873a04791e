import { placedBasis } from './gaussian-integrals';

/** Source of the integrals of both molecules below. */
export const SZABO_OSTLUND =
  'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989), sections 3.5.2 and 3.5.3 (value from memory)';

/**
 * 1s of STO-3G for ζ = 1 as Szabo and Ostlund, eq. (3.221), print and use it: six digits, not normalised again, which
 * shows in the fourth decimal of (11|11) of HeH+.
 */
const EXPONENTS = [2.22766, 0.405771, 0.109818];
const COEFFICIENTS = [0.154329, 0.535328, 0.444635];

function diatomic(
  distance: number,
  first: { readonly charge: number; readonly zeta: number },
  second: { readonly charge: number; readonly zeta: number },
) {
  const positions = [[0, 0, 0] as const, [0, 0, distance] as const];
  const atoms = [first, second];
  return {
    basis: placedBasis(
      atoms.map(({ zeta }, i) => ({
        centre: positions[i],
        l: 0,
        exponents: EXPONENTS.map((exponent) => exponent * zeta ** 2),
        coefficients: COEFFICIENTS,
        keepNorm: true,
      })),
    ),
    nuclei: atoms.map(({ charge }, i) => ({ charge, position: positions[i] })),
  };
}

/** H2 at 1.4 bohr, STO-3G with ζ = 1.24. */
export const hydrogenMolecule = diatomic(1.4, { charge: 1, zeta: 1.24 }, { charge: 1, zeta: 1.24 });

/** HeH+ at 1.4632 bohr, STO-3G with ζ = 2.0925 (He, first) and 1.24 (H). */
export const heliumHydride = diatomic(1.4632, { charge: 2, zeta: 2.0925 }, { charge: 1, zeta: 1.24 });
