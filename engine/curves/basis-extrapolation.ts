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
  /** half the spread of the variants, hartree; never less than a tenth of the last step of the extrapolation */
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
/** Least uncertainty as a fraction of what extrapolation added to the largest basis. */
const LEAST_FRACTION = 0.1;

/**
 * Basis-set limit of Hartree–Fock energies. With three consecutive sets E_X = E + A·exp(−bX) with b fitted
 * (D. Feller, J. Chem. Phys. 96, 6104 (1992)); with two, b fixed. The other variants only serve the uncertainty.
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
  return limitOf(large, threePoint ? [threePoint, ...twoPoint] : twoPoint);
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
  return limitOf(large, small ? [...variants, variant('inverseCube', medium, small, cube)] : variants);
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

function limitOf(large: FamilyMember, variants: readonly LimitVariant[]): BasisLimit {
  const energies = variants.map(({ energy }) => energy);
  const [energy] = energies;
  const spread = Math.max(...energies) - Math.min(...energies);
  return {
    energy,
    uncertainty: Math.max(spread / 2, LEAST_FRACTION * Math.abs(energy - large.energy)),
    variants,
  };
}
