import { type RunControl, UNATTENDED } from '../termination';
import { explainStudy } from './explain-study';
import { fragmentEnergy } from './fragment-energy';
import { findLevel } from './levels';
import type { PreparedStudy } from './prepare-study';
import type { Counterpoise, Fragment, FragmentSuperposition, LevelFindings } from './result';

/** The error is followed along the curve where all its points together take no longer, seconds as estimated. */
const LARGEST_COST_OF_CURVE = 30;

/**
 * Basis-set superposition error of the two parts that a scanned bond leaves, by the counterpoise scheme: each part in
 * its own functions less the same state of it among the functions of the whole molecule, which are left on the other
 * part's places without nuclei and electrons. The parts do not change their shape along the scan, so that their energy
 * in their own functions is that of the dissociation limit.
 *
 * @param findings - the level's minimum, limit and well depth
 * @returns undefined without a minimum
 *
 * Source: S. F. Boys, F. Bernardi, Mol. Phys. 19, 553 (1970).
 */
export function counterpoise(
  prepared: PreparedStudy,
  level: string,
  { minimum, dissociation, wellDepth }: Pick<LevelFindings, 'minimum' | 'dissociation' | 'wellDepth'>,
  control: RunControl = UNATTENDED,
): Counterpoise | undefined {
  if (minimum.kind !== 'found') return undefined;
  if (prepared.scalable) {
    return none(
      'With scale factors of its own at every geometry, the molecule shares no basis with its parts.',
    );
  }
  if (!dissociation || !wellDepth) {
    return none('The superposition error is that of the two parts which the scan of a single bond leaves.');
  }
  if (dissociation.kind === 'none') return none(dissociation.reason);
  const { fragments } = dissociation;
  const atMinimum = superpositions(prepared, fragments, minimum.equilibriumDistance, control);
  if (!atMinimum) return none('A part did not converge in the basis of the whole molecule.');
  const error = sumOf(atMinimum);
  const seconds = explainStudy(prepared).levels.find((explained) => explained.level === level)?.seconds ?? 0;
  const isCheap = seconds * fragments.length * prepared.coordinates.length <= LARGEST_COST_OF_CURVE;
  return {
    kind: 'found',
    fragments: atMinimum,
    error,
    wellDepth: wellDepth.value - error,
    ...(isCheap && {
      alongCurve: prepared.coordinates.map((coordinate) => {
        const here = superpositions(prepared, fragments, coordinate, control);
        return here ? sumOf(here) : null;
      }),
    }),
  };
}

function none(reason: string): Counterpoise {
  return { kind: 'none', reason };
}

type Superpositions = readonly [FragmentSuperposition, FragmentSuperposition];

const sumOf = ([first, second]: Superpositions): number => first.error + second.error;

/** @returns undefined where a part does not converge, and once the run is cancelled */
function superpositions(
  prepared: PreparedStudy,
  [first, second]: readonly [Fragment, Fragment],
  coordinate: number | null,
  control: RunControl,
): Superpositions | undefined {
  const one = superposition(prepared, first, coordinate, control);
  if (!one) return undefined;
  const other = areMirrored(prepared, first, second)
    ? one
    : superposition(prepared, second, coordinate, control);
  return other && [one, other];
}

/** The two atoms of a homonuclear molecule in one state each see the same functions. */
function areMirrored({ study }: PreparedStudy, first: Fragment, second: Fragment): boolean {
  const { atoms } = study.molecule;
  const stateOf = ({ charge, multiplicity, startedFrom, level }: Fragment) =>
    JSON.stringify([charge, multiplicity, startedFrom, level]);
  return atoms.length === 2 && atoms[0].element === atoms[1].element && stateOf(first) === stateOf(second);
}

function superposition(
  prepared: PreparedStudy,
  { atoms, charge, multiplicity, startedFrom, level, energy }: Fragment,
  coordinate: number | null,
  control: RunControl,
): FragmentSuperposition | undefined {
  if (control.isCancelled()) return undefined;
  const places = prepared
    .geometryAt(coordinate)
    .map((atom, index) => (atoms.includes(index) ? atom : { ...atom, ghost: true }));
  const whole = fragmentEnergy(
    prepared,
    places,
    charge,
    startedFrom ?? multiplicity,
    findLevel(level, 'levels'),
    control,
  );
  if (!whole?.isConverged) return undefined;
  return { energyInWholeBasis: whole.energy, error: energy - whole.energy };
}
