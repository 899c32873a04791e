/** An energy, or any part of one, in a basis of a systematic family. */
export interface FamilyMember {
  /** X: 2 for double zeta, 3 for triple, … */
  readonly cardinal: number;
  /** hartree */
  readonly energy: number;
}

export interface BasisLimit {
  /** hartree */
  readonly energy: number;
  /** half the spread of the variants, hartree; never less than the least fraction of what extrapolation added */
  readonly uncertainty: number;
  /** every formula that could be used, the first being the result */
  readonly variants: readonly LimitVariant[];
}

export interface LimitVariant {
  readonly formula:
    | 'exponentialThreePoint'
    | 'exponential'
    | 'exponentialRoot'
    | 'inverseCube'
    | 'inverseFourth';
  /** cardinal numbers used */
  readonly cardinals: readonly number[];
  /** hartree */
  readonly energy: number;
}

/** Decay of the Hartree–Fock error with X: A. Halkier et al., Chem. Phys. Lett. 302, 437 (1999), value from memory. */
const HARTREE_FOCK_DECAY = 1.63;
/** The same with √X: A. Karton, J. M. L. Martin, Theor. Chem. Acc. 115, 330 (2006), value from memory. */
const HARTREE_FOCK_ROOT_DECAY = 9;
/**
 * Least uncertainty of Hartree–Fock energies as a fraction of what extrapolation added to the largest basis: the limits
 * of He and of H2 are off the numerical Hartree–Fock energies by up to 0.88 of it.
 */
export const HARTREE_FOCK_LEAST_FRACTION = 1;
/** The same of correlation energies: those of He and H2 are off the near-exact ones by up to 0.27 of it. */
export const CORRELATION_LEAST_FRACTION = 1 / 3;

/**
 * Basis-set limit of Hartree–Fock energies: E_X = E + A·exp(−bX) from the two largest sets with b fixed. The other
 * variants only serve the uncertainty, among them b fitted to three consecutive sets (D. Feller, J. Chem. Phys. 96, 6104
 * (1992)): the step from a double-zeta set is larger than the exponential has it, so that from it such a fit falls
 * short – of H2 at 1.4 bohr by twice as much as the two larger sets alone, of He likewise.
 *
 * @param members - any order; the largest two or three are used
 * @returns undefined with fewer than two distinct cardinal numbers
 */
export function hartreeFockLimit(members: readonly FamilyMember[]): BasisLimit | undefined {
  const sorted = byFallingCardinal(members);
  if (sorted.length < 2) return undefined;
  const [large, medium, small] = sorted;
  const twoPoint = [
    variant('exponential', large, medium, (x) => Math.exp(-HARTREE_FOCK_DECAY * x)),
    variant(
      'exponentialRoot',
      large,
      medium,
      (x) => (x + 1) * Math.exp(-HARTREE_FOCK_ROOT_DECAY * Math.sqrt(x)),
    ),
  ];
  const threePoint = small && exponentialThreePoint(large, medium, small);
  return limitOf(large, threePoint ? [...twoPoint, threePoint] : twoPoint, HARTREE_FOCK_LEAST_FRACTION);
}

/**
 * Basis-set limit of correlation energies: E_X = E + A·X⁻³ from the two largest sets (T. Helgaker, W. Klopper, H. Koch,
 * J. Noga, J. Chem. Phys. 106, 9639 (1997)). The uncertainty also looks at (X + ½)⁻⁴ (J. M. L. Martin, Chem. Phys.
 * Lett. 259, 669 (1996)) and at the pair one step smaller.
 *
 * @param members - correlation energies, not total ones; any order
 * @returns undefined with fewer than two distinct cardinal numbers
 */
export function correlationLimit(members: readonly FamilyMember[]): BasisLimit | undefined {
  const sorted = byFallingCardinal(members);
  if (sorted.length < 2) return undefined;
  const [large, medium, small] = sorted;
  const cube = (x: number) => x ** -3;
  const variants = [
    variant('inverseCube', large, medium, cube),
    variant('inverseFourth', large, medium, (x) => (x + 0.5) ** -4),
  ];
  const all = small ? [...variants, variant('inverseCube', medium, small, cube)] : variants;
  return limitOf(large, all, CORRELATION_LEAST_FRACTION);
}

function byFallingCardinal(members: readonly FamilyMember[]): FamilyMember[] {
  const distinct = new Map(members.map((member) => [member.cardinal, member]));
  return [...distinct.values()].sort((a, b) => b.cardinal - a.cardinal);
}

/** E from E_X = E + A·f(X) at two cardinal numbers. */
function variant(
  formula: LimitVariant['formula'],
  large: FamilyMember,
  small: FamilyMember,
  f: (cardinal: number) => number,
): LimitVariant {
  const [fLarge, fSmall] = [f(large.cardinal), f(small.cardinal)];
  return {
    formula,
    cardinals: [small.cardinal, large.cardinal],
    energy: large.energy + ((large.energy - small.energy) * fLarge) / (fSmall - fLarge),
  };
}

/** Needs consecutive sets whose steps shrink in one direction. */
function exponentialThreePoint(
  large: FamilyMember,
  medium: FamilyMember,
  small: FamilyMember,
): LimitVariant | undefined {
  const isConsecutive = large.cardinal - medium.cardinal === 1 && medium.cardinal - small.cardinal === 1;
  const ratio = (large.energy - medium.energy) / (medium.energy - small.energy);
  if (!isConsecutive || !(ratio > 0 && ratio < 1)) return undefined;
  return {
    formula: 'exponentialThreePoint',
    cardinals: [small.cardinal, medium.cardinal, large.cardinal],
    energy: large.energy + ((large.energy - medium.energy) * ratio) / (1 - ratio),
  };
}

function limitOf(large: FamilyMember, variants: readonly LimitVariant[], leastFraction: number): BasisLimit {
  const energies = variants.map(({ energy }) => energy);
  const [energy] = energies;
  const spread = Math.max(...energies) - Math.min(...energies);
  return {
    energy,
    uncertainty: Math.max(spread / 2, leastFraction * Math.abs(energy - large.energy)),
    variants,
  };
}
