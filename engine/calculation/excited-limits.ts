import { SPIN_NAMES } from '../configuration-interaction/spin';
import type { Vector3 } from '../molecule/molecule';
import { type RunControl, UNATTENDED } from '../termination';
import { type FragmentStates, fragmentStates } from './fragment-states';
import type { LevelPoints } from './level-curve';
import { findLevel } from './levels';
import { chargeShares, type Parts, partsOf, type SeparateParts, separateParts } from './parts';
import type { PreparedStudy } from './prepare-study';
import { couplings, type ProductState } from './product-states';
import type { Dissociation, Fragment, PointResult } from './result';
import { closedShellPart, singlesProducts } from './singles-limits';
import { type CurveOfState, statesOf } from './state-curves';

/** Limits nearer to one another than this are one, hartree. */
const SAME_LIMIT = 1e-5;
/** A curve whose end lies further from its limit, but for the attraction of charges, has not reached it, hartree. */
const FAR_ENOUGH = 0.02;

interface Products {
  readonly kind: 'found';
  /** by rising energy; of degenerate levels every combination of components */
  readonly all: readonly ProductState[];
  /** energy below which none is missing */
  readonly completeBelow: number;
}

type NoProducts = Extract<Dissociation, { readonly kind: 'none' }>;

/**
 * What the curves of a level's excited states tend to. At large distance the states of one spin lie in the order of
 * the sums of the fragments' energies, each sum as often as their spins and degeneracies allow; the n-th state goes to
 * the n-th sum. As a scan ends before that distance, the end of the curve must also be near that sum, and
 * nearer than to any other, the attraction of charged fragments allowed for. The fragments' states are computed by
 * full CI, for CIS by RHF and CIS of closed shells, when they are first asked for.
 *
 * @returns undefined where the scan does not part the molecule in two
 */
export function excitedLimits(
  prepared: PreparedStudy,
  points: LevelPoints,
  control: RunControl = UNATTENDED,
): (state: CurveOfState) => Dissociation | undefined {
  const parts = partsOf(prepared);
  const farEnd = farEndOf(points);
  if (!parts || farEnd === undefined) return () => undefined;
  let products: Products | NoProducts | undefined;
  return (state) => {
    products ??= productStates(prepared, points, parts, points.all()[farEnd], control);
    return products.kind === 'none' ? products : assign(products, points, parts, farEnd, state);
  };
}

/** Index of the last point of the scan where the level's states are known. */
function farEndOf(points: LevelPoints): number | undefined {
  const places = points
    .all()
    .slice(0, points.scanned)
    .flatMap((point, index) =>
      point.coordinate !== null && statesOf(point, points.level).length > 0
        ? [{ index, x: point.coordinate }]
        : [],
    );
  return places.length > 0 ? places.reduce((a, b) => (b.x > a.x ? b : a)).index : undefined;
}

function assign(
  { all, completeBelow }: Products,
  points: LevelPoints,
  parts: Parts,
  farEnd: number,
  state: CurveOfState,
): Dissociation {
  const own = state.stateAt(farEnd);
  if (!own) return none('This state is not among those computed at the far end of the range.');
  const multiplicity = SPIN_NAMES.indexOf(own.spin) + 1;
  const ofSpin = all.filter(({ multiplicities }) => multiplicities.includes(multiplicity));
  const rank = statesOf(points.all()[farEnd], points.level)
    .filter(({ spin }) => spin === own.spin)
    .indexOf(own);
  const product = ofSpin[rank];
  if (!product || product.energy > completeBelow - SAME_LIMIT) {
    return none('It lies above the states of the fragments that were computed.');
  }
  const missedBy = ({ energy, attraction }: ProductState) => Math.abs(own.energy - energy - attraction);
  const nearest = ofSpin.reduce((a, b) => (missedBy(b) < missedBy(a) ? b : a));
  if (missedBy(product) > FAR_ENOUGH || Math.abs(nearest.energy - product.energy) > SAME_LIMIT) {
    return none('At the far end of the range its curve has not come near the limit that is due to it.');
  }
  const fragments = parts.map((atoms, part): Fragment => {
    const { multiplicity: spin, energy } = product.states[part];
    const excitation = Math.max(0, energy - product.lowest[part]);
    return {
      atoms,
      charge: product.charges[part],
      multiplicity: spin,
      energy,
      level: points.level,
      excitation,
    };
  });
  return {
    kind: 'found',
    energy: product.energy,
    fragments: [fragments[0], fragments[1]],
    farEndAbove: own.energy - product.energy,
  };
}

function productStates(
  prepared: PreparedStudy,
  points: LevelPoints,
  parts: Parts,
  farEnd: PointResult,
  control: RunControl,
): Products | NoProducts {
  const level = findLevel(points.level, 'levels');
  if (prepared.study.active) {
    return none('The active orbitals chosen for the molecule say nothing of those of its parts.');
  }
  const separate = separateParts(prepared, parts, farEnd.coordinate);
  const distance = distanceBetween(prepared, parts, farEnd.coordinate);
  if (level.kind !== 'correlated') return closedShellProducts(prepared, separate, farEnd, distance, control);
  const { atoms, areEqual } = separate;
  const known = new Map<string, FragmentStates>();
  const statesFor = (part: number, charge: number): FragmentStates => {
    const own = areEqual ? 0 : part;
    const key = `${own} ${charge}`;
    const states = known.get(key) ?? fragmentStates(prepared, atoms[own], charge, level, control);
    known.set(key, states);
    return states;
  };
  const all: ProductState[] = [];
  let completeBelow = Number.POSITIVE_INFINITY;
  for (const charges of chargeShares(prepared.study.molecule.charge ?? 0)) {
    const [one, other] = charges.map((charge, part) => statesFor(part, charge));
    if (one.kind === 'impossible' || other.kind === 'impossible') continue;
    if (one.kind === 'unknown') return none(one.reason);
    if (other.kind === 'unknown') return none(other.reason);
    const lowest = [one.states[0].energy, other.states[0].energy] as const;
    for (const a of one.states) {
      for (const b of other.states) {
        const energy = a.energy + b.energy;
        all.push({
          energy,
          attraction: (charges[0] * charges[1]) / distance,
          multiplicities: couplings(a.multiplicity, b.multiplicity),
          charges,
          states: [a, b],
          lowest,
        });
      }
    }
    if (!one.isComplete) completeBelow = Math.min(completeBelow, one.states.at(-1)!.energy + lowest[1]);
    if (!other.isComplete) completeBelow = Math.min(completeBelow, lowest[0] + other.states.at(-1)!.energy);
  }
  return { kind: 'found', all: all.sort((a, b) => a.energy - b.energy), completeBelow };
}

/** Of CIS, where the RHF determinant that it stands on parts into closed shells. */
function closedShellProducts(
  prepared: PreparedStudy,
  { atoms }: SeparateParts,
  farEnd: PointResult,
  distance: number,
  control: RunControl,
): Products | NoProducts {
  const [state] = statesOf(farEnd, 'CIS');
  const reference = state.energy - state.excitation;
  const { charge = 0 } = prepared.study.molecule;
  for (const charges of chargeShares(charge)) {
    const [one, other] = charges.map((own, part) => closedShellPart(prepared, atoms[part], own, control));
    if (!one || !other) continue;
    const missedBy = reference - one.energy - other.energy - (charges[0] * charges[1]) / distance;
    if (Math.abs(missedBy) <= FAR_ENOUGH)
      return { kind: 'found', ...singlesProducts([one, other], distance) };
  }
  return none('The RHF determinant of CIS does not part into closed shells.');
}

/** Between the centres of the parts' nuclear charges, bohr. */
function distanceBetween(prepared: PreparedStudy, parts: Parts, coordinate: number | null): number {
  const { atoms } = prepared.moleculeAt(coordinate);
  const [one, other] = parts.map((part): Vector3 => {
    const total = part.reduce((sum, index) => sum + atoms[index].nuclearCharge, 0);
    const along = (axis: number) =>
      part.reduce((sum, index) => sum + atoms[index].nuclearCharge * atoms[index].position[axis], 0) / total;
    return [along(0), along(1), along(2)];
  });
  return Math.hypot(...one.map((value, axis) => value - other[axis]));
}

function none(reason: string): NoProducts {
  return { kind: 'none', reason };
}
