import type { SpinName } from '../configuration-interaction/spin';
import { cheapestAssignment } from '../linear-algebra/assignment';
import type { StateSymmetry } from '../symmetry/state-symmetry';
import type { PointResult } from './result';
import { matchOrbitals, type OrbitalMatch, type StateComponent, stateOverlap } from './state-overlap';

/*
 * States of a scan joined to curves.
 *
 * States of one spin and one symmetry do not cross along one coordinate (J. von Neumann, E. P. Wigner, Phys. Z. 30,
 * 467 (1929)): where both are known, curves are adiabatic, the nth state of its kind at every point, whatever its
 * character changes to at an avoided crossing. States that lack a label, and states of mixed spin, are matched from
 * point to point by overlap and energy; those are followed through an avoided crossing that is narrower than the step,
 * as through a crossing.
 */

/** One state along a scan. */
export interface FollowedState {
  readonly spin: SpinName;
  /** absent where no state of the curve has a label */
  readonly symmetry?: StateSymmetry;
  /** counted from 1 within spin and symmetry, by energy where the curves begin */
  readonly number: number;
  /** place of the state in its level's list at every point; null where it is not among those computed */
  readonly states: readonly (number | null)[];
}

/** Most that a deviation from the extrapolated energy weighs; an overlap of nothing weighs 1. */
const ENERGY_WEIGHT = 0.5;
/** Deviation, hartree, that weighs half of it. */
const ENERGY_SCALE = 0.05;
/** Overlap where it is not known. */
const UNKNOWN_OVERLAP = 0.5;
/** States that would cost this much to join are not joined: without any overlap none are, with half of it all. */
const TOO_FAR = 1;
/** More than any set of allowed matches costs. */
const FORBIDDEN = 1e6;
/** Points that an energy is extrapolated from. */
const EXTRAPOLATION_POINTS = 3;

interface StateAtPoint {
  readonly point: number;
  /** in the level's list */
  readonly place: number;
  readonly coordinate: number;
  readonly energy: number;
  readonly spin: SpinName;
  readonly symmetry?: StateSymmetry;
  /** of spin and symmetry together */
  readonly kind: string;
  /** costs more than all the rest, and is seldom asked for */
  components(): readonly StateComponent[];
}

/** States joined so far, by rising coordinate, and what is known of them. */
interface Chain {
  readonly states: StateAtPoint[];
  spin: SpinName;
  symmetry?: StateSymmetry;
}

/**
 * Joins the states of a CI level, or of CIS, to curves.
 *
 * @param points - in any order: they are followed by rising coordinate
 * @param read - keeps what it has read, for calls with the same points and some more
 * @returns by kind, then number; empty for levels without states
 */
export function followStates(
  points: readonly PointResult[],
  level: string,
  read = stateReader(level),
): readonly FollowedState[] {
  const group = commonestGroup(points);
  const byPoint = points.map((point, index) => read(point, index, groupOf(point) === group));
  const alongScan = byPoint
    .filter(({ length }) => length > 0)
    .sort(([a], [b]) => a.coordinate - b.coordinate);
  const chains = areAllLabelled(alongScan) ? chainsOfKinds(alongScan) : chainStates(points, alongScan, level);
  const ordered = [...groupBy(chains, kindOf)].flatMap(([, ofKind]) =>
    isOrdered(ofKind[0]) ? adiabatic(ofKind) : ofKind,
  );
  const kinds = [...groupBy(ordered, kindOf)].sort(([a], [b]) => (a < b ? -1 : 1));
  return kinds.flatMap(([, ofKind]) =>
    ofKind.sort(byBeginning).map(({ states, spin, symmetry }, index) => ({
      spin,
      ...(symmetry && { symmetry }),
      number: index + 1,
      states: placesOf(states, points.length),
    })),
  );
}

/** Labels of different groups are not comparable: only those of the group that most points have are used. */
function commonestGroup(points: readonly PointResult[]): string | undefined {
  const groups = [...groupBy(points, groupOf)];
  return groups.reduce((most, next) => (next[1].length > most[1].length ? next : most), groups[0])?.[0];
}

const groupOf = ({ symmetry }: PointResult): string => `${symmetry?.pointGroup} ${symmetry?.linear}`;

/**
 * Where a followed state stands at a point beside those that it was followed along, if the kind of all states is known
 * there and at those: the states of a kind go by their energy, whatever points there are.
 *
 * @param alongPoints - that it was followed along
 * @returns undefined where it takes following
 */
export function placesByKind(
  alongPoints: readonly PointResult[],
  read: StateReader,
): (followed: FollowedState, point: PointResult, index: number) => number | null | undefined {
  const group = commonestGroup(alongPoints);
  const along = alongPoints
    .map((point, index) => read(point, index, groupOf(point) === group))
    .filter(({ length }) => length > 0);
  if (!areAllLabelled(along)) return () => undefined;
  return ({ spin, symmetry, number }, point, index) => {
    const states = read(point, index, groupOf(point) === group);
    if (along.length === 0 || states.length === 0 || !areAllLabelled([along[0], states])) return undefined;
    const kind = kindOf({ spin, ...(symmetry && { symmetry }) });
    const ofKind = states.filter((state) => state.kind === kind).sort(byEnergy);
    return ofKind[number - 1]?.place ?? null;
  };
}

type StateReader = (point: PointResult, index: number, hasLabels: boolean) => readonly StateAtPoint[];

/** Reads the states of every point once. */
export function stateReader(level: string): StateReader {
  const known: { readonly hasLabels: boolean; readonly states: readonly StateAtPoint[] }[] = [];
  return (point, index, hasLabels) => {
    if (known[index]?.hasLabels !== hasLabels) {
      // an iteration that ran away leaves no number
      const states = statesAt(point, index, level, hasLabels).filter(({ energy }) => Number.isFinite(energy));
      known[index] = { hasLabels, states };
    }
    return known[index].states;
  };
}

function statesAt(point: PointResult, index: number, level: string, hasLabels: boolean): StateAtPoint[] {
  const result = point.levels[level];
  const common = { point: index, coordinate: point.coordinate ?? 0 };
  const kindWith = (spin: SpinName, symmetry: StateSymmetry | undefined) => {
    const known = { spin, ...(hasLabels && symmetry && { symmetry }) };
    return { ...known, kind: kindOf(known) };
  };
  switch (result?.kind) {
    case 'correlated':
      return result.states.map(({ energy, spin, symmetry, leading }, place) => ({
        ...common,
        place,
        energy,
        ...kindWith(spin, symmetry),
        components: () => leading,
      }));
    case 'singles':
      return result.states.map(({ energy, spin, symmetry, leading }, place) => ({
        ...common,
        place,
        energy,
        ...kindWith(spin, symmetry),
        // an electron and the hole that it left: the same spin function for every pair
        components: once(() =>
          leading.map(({ from, to, weight }) => ({
            coefficient: Math.sqrt(weight),
            alpha: [from],
            beta: [to],
          })),
        ),
      }));
    default:
      return [];
  }
}

function once<T>(make: () => T): () => T {
  let made: T | undefined;
  return () => {
    made ??= make();
    return made;
  };
}

/** Whether the kind of every state is known alike: then no state can belong to a curve of another kind. */
function areAllLabelled(alongScan: readonly (readonly StateAtPoint[])[]): boolean {
  const hasTerm = alongScan[0]?.[0].symmetry?.term !== undefined;
  return alongScan.every((states) =>
    states.every(
      ({ spin, symmetry }) =>
        spin !== 'mixed' && symmetry !== undefined && (symmetry.term !== undefined) === hasTerm,
    ),
  );
}

/** The states of every kind together: they are shared out by energy, whichever of them would be matched. */
function chainsOfKinds(alongScan: readonly (readonly StateAtPoint[])[]): readonly Chain[] {
  return [...groupBy(alongScan.flat(), ({ kind }) => kind)].map(([, states]) => ({
    states,
    spin: states[0].spin,
    ...(states[0].symmetry && { symmetry: states[0].symmetry }),
  }));
}

function chainStates(
  points: readonly PointResult[],
  alongScan: readonly (readonly StateAtPoint[])[],
  level: string,
): readonly Chain[] {
  const chains: Chain[] = [];
  for (const states of alongScan) {
    const here = points[states[0].point];
    const matches = new Map<number, OrbitalMatch>();
    const matchFrom = (point: number): OrbitalMatch => {
      const known = matches.get(point) ?? matchOrbitals(points[point], here, level);
      matches.set(point, known);
      return known;
    };
    const chainOf = assign(chains, states, (chain, state) =>
      isCompatible(chain, state)
        ? joiningCost(chain, state, matchFrom(chain.states.at(-1)!.point))
        : FORBIDDEN,
    );
    states.forEach((state, k) => {
      const chain = chainOf[k];
      if (!chain) {
        chains.push({
          states: [state],
          spin: state.spin,
          ...(state.symmetry && { symmetry: state.symmetry }),
        });
        return;
      }
      chain.states.push(state);
      if (chain.spin === 'mixed') chain.spin = state.spin;
      if (!chain.symmetry?.term && state.symmetry) chain.symmetry = state.symmetry;
    });
  }
  return chains;
}

/** The chain of every state; undefined where the state is better the first of its own. */
function assign(
  chains: readonly Chain[],
  states: readonly StateAtPoint[],
  cost: (chain: Chain, state: StateAtPoint) => number,
): readonly (Chain | undefined)[] {
  const n = chains.length + states.length;
  const costs = new Float64Array(n * n);
  // beyond the states, places for chains that end; beyond the chains, places for states that begin
  for (let row = 0; row < n; row++) {
    for (let column = 0; column < n; column++) {
      const isChain = row < chains.length;
      const isState = column < states.length;
      if (isChain && isState) costs[row * n + column] = cost(chains[row], states[column]);
      else if (isChain || isState) costs[row * n + column] = TOO_FAR / 2;
    }
  }
  const columnOf = cheapestAssignment(costs, n);
  return states.map((_, k) => chains[columnOf.indexOf(k)]);
}

/** Whether what is known of the spin and symmetry of both is the same. */
function isCompatible({ spin, symmetry }: Chain, state: StateAtPoint): boolean {
  if (spin !== state.spin && spin !== 'mixed' && state.spin !== 'mixed') return false;
  if (!symmetry || !state.symmetry) return true;
  return symmetry.term && state.symmetry.term
    ? symmetryKey(symmetry) === symmetryKey(state.symmetry)
    : symmetry.irrep === state.symmetry.irrep;
}

function joiningCost(chain: Chain, state: StateAtPoint, match: OrbitalMatch): number {
  const overlap = stateOverlap(chain.states.at(-1)!.components(), state.components(), match);
  const deviation = Math.abs(extrapolated(chain, state.coordinate) - state.energy);
  return 1 - (overlap ?? UNKNOWN_OVERLAP) + (ENERGY_WEIGHT * deviation) / (deviation + ENERGY_SCALE);
}

/** Of the polynomial through the last energies. */
function extrapolated({ states }: Chain, coordinate: number): number {
  const last = states.slice(-EXTRAPOLATION_POINTS);
  return last.reduce((sum, { coordinate: x, energy }) => {
    const others = last.filter((other) => other.coordinate !== x);
    return (
      sum +
      others.reduce(
        (part, other) => (part * (coordinate - other.coordinate)) / (x - other.coordinate),
        energy,
      )
    );
  }, 0);
}

const isOrdered = ({ spin, symmetry }: Chain): boolean => spin !== 'mixed' && symmetry !== undefined;

/** The same states shared out anew: the lowest of every point to the first curve, the next to the second. */
function adiabatic(chains: readonly Chain[]): Chain[] {
  const byPoint = [
    ...groupBy(
      chains.flatMap(({ states }) => states),
      ({ point }) => point,
    ),
  ].map(([, states]) => states.sort(byEnergy));
  return Array.from({ length: Math.max(...byPoint.map(({ length }) => length)) }, (_, rank) => ({
    ...chains[0],
    states: byPoint.flatMap((states) => states[rank] ?? []).sort((a, b) => a.coordinate - b.coordinate),
  }));
}

const byEnergy = (a: StateAtPoint, b: StateAtPoint): number => a.energy - b.energy || a.place - b.place;

/** The kind that curves are counted within. */
const kindOf = ({ spin, symmetry }: Pick<Chain, 'spin' | 'symmetry'>): string =>
  `${spin} ${symmetry ? symmetryKey(symmetry) : ''}`;

const symmetryKey = ({ irrep, term }: StateSymmetry): string =>
  `${irrep} ${term ? `${term.lambda}${term.inversion ?? ''}${term.reflection ?? ''}` : ''}`;

const byBeginning = ({ states: [a] }: Chain, { states: [b] }: Chain): number =>
  a.coordinate - b.coordinate || a.energy - b.energy || a.place - b.place;

function placesOf(states: readonly StateAtPoint[], points: number): readonly (number | null)[] {
  const places = new Array<number | null>(points).fill(null);
  for (const { point, place } of states) places[point] = place;
  return places;
}

function groupBy<T, K>(items: readonly T[], keyOf: (item: T) => K): Map<K, T[]> {
  const groups = new Map<K, T[]>();
  for (const item of items) {
    const key = keyOf(item);
    const group = groups.get(key);
    if (group) group.push(item);
    else groups.set(key, [item]);
  }
  return groups;
}
