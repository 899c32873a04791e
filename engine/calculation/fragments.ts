import { type RunControl, UNATTENDED } from '../termination';
import { type FragmentEnergy, fragmentEnergy } from './fragment-energy';
import { findLevel, type Level } from './levels';
import { chargeShares, type Parts, partsOf, separateParts } from './parts';
import type { PreparedStudy } from './prepare-study';
import type { Dissociation, Fragment } from './result';

/**
 * Fragments whose Hartree–Fock energies together lie this far above the lowest, hartree, are not computed at a
 * correlated level: correlation shifts neither an electron affinity nor a spin splitting of light atoms by as much.
 */
const WORTH_CORRELATING = 0.3;

/** A way to share charge and spin between the two parts. */
interface Channel {
  readonly charges: readonly [number, number];
  readonly multiplicities: readonly [number, number];
}

/**
 * The lowest energy of the two parts that a scanned bond leaves, computed apart at the level of the curve.
 *
 * Tried are charges up to one off an even share and, of each part, its two lowest multiplicities as far as they
 * couple to that of the molecule. Symmetry in space is not asked about.
 *
 * @param farEnd - energy and place of the last point of the curve; the parts are those of that geometry
 */
export function dissociationLimit(
  prepared: PreparedStudy,
  levelName: string,
  farEnd: { readonly x: number; readonly energy: number } | undefined,
  control: RunControl = UNATTENDED,
): Dissociation | undefined {
  const parts = partsOf(prepared);
  if (!parts) return undefined;
  const level = findLevel(levelName, 'levels');
  if (prepared.study.active && level.kind === 'correlated') {
    return none('The active orbitals chosen for the molecule say nothing of those of its parts.');
  }
  const compute = fragmentComputer(
    prepared,
    parts,
    farEnd?.x ?? prepared.coordinates.at(-1) ?? null,
    control,
  );
  const isMeanField = level.kind === 'hartreeFock';
  const screening = isMeanField ? level : findLevel('RHF', 'levels');
  const screened = channelsOf(prepared, parts).flatMap((channel) => {
    const pair = pairOf(channel, (part, charge, multiplicity) =>
      compute(part, charge, multiplicity, screening),
    );
    return pair ? [{ channel, pair, energy: sumOf(pair) }] : [];
  });
  if (screened.length === 0) return none('The basis has no room for the electrons of the fragments.');
  const lowest = Math.min(...screened.map(({ energy }) => energy));
  const pairs = isMeanField
    ? screened.map(({ pair }) => pair)
    : screened
        .filter(({ energy }) => energy <= lowest + WORTH_CORRELATING)
        .flatMap(({ channel }) => {
          const pair = pairOf(channel, (part, charge, multiplicity) =>
            compute(part, charge, multiplicity, level),
          );
          return pair ? [pair] : [];
        });
  if (pairs.length === 0) return none(`The fragments cannot be computed at ${levelName}.`);
  const best = pairs.reduce((a, b) => (sumOf(b) < sumOf(a) ? b : a));
  if (best.some(({ isConverged }) => !isConverged)) return none('A fragment did not converge.');
  const fragments = best.map(
    ({ isConverged: _, ...fragment }, part): Fragment => ({ atoms: parts[part], ...fragment }),
  );
  const energy = sumOf(best);
  return {
    kind: 'found',
    energy,
    fragments: [fragments[0], fragments[1]],
    ...(farEnd && { farEndAbove: farEnd.energy - energy }),
  };
}

function none(reason: string): Dissociation {
  return { kind: 'none', reason };
}

const sumOf = (pair: readonly FragmentEnergy[]): number => pair[0].energy + pair[1].energy;

function channelsOf(prepared: PreparedStudy, parts: Parts): Channel[] {
  const { charge, multiplicity } = prepared.study.molecule;
  const { atoms } = prepared.moleculeAt(prepared.coordinates[0]);
  const nuclearCharges = parts.map((part) =>
    part.reduce((sum, index) => sum + atoms[index].nuclearCharge, 0),
  );
  const channels: Channel[] = [];
  for (const charges of chargeShares(charge)) {
    const [one, other] = charges.map((value, part) => multiplicitiesOf(nuclearCharges[part] - value));
    for (const a of one) {
      for (const b of other) {
        const couples = multiplicity >= Math.abs(a - b) + 1 && multiplicity <= a + b - 1;
        if (couples) channels.push({ charges, multiplicities: [a, b] });
      }
    }
  }
  return channels;
}

/** The two lowest 2S + 1 that so many electrons can have. */
function multiplicitiesOf(electrons: number): readonly number[] {
  if (electrons < 0) return [];
  const lowest = (electrons % 2) + 1;
  return electrons < 2 ? [lowest] : [lowest, lowest + 2];
}

function pairOf(
  { charges, multiplicities }: Channel,
  compute: (part: number, charge: number, multiplicity: number) => FragmentEnergy | undefined,
): readonly FragmentEnergy[] | undefined {
  const pair: FragmentEnergy[] = [];
  for (const part of [0, 1]) {
    const fragment = compute(part, charges[part], multiplicities[part]);
    if (!fragment) return undefined;
    pair.push(fragment);
  }
  return pair;
}

/** Computes each state of a fragment once; two equal atoms are one fragment. */
function fragmentComputer(prepared: PreparedStudy, parts: Parts, farEnd: number | null, control: RunControl) {
  const { atoms, areEqual } = separateParts(prepared, parts, farEnd);
  const known = new Map<string, FragmentEnergy | undefined>();
  return (part: number, charge: number, multiplicity: number, level: Level): FragmentEnergy | undefined => {
    const own = areEqual ? 0 : part;
    const key = `${own} ${charge} ${multiplicity} ${level.name}`;
    if (!known.has(key)) {
      known.set(key, fragmentEnergy(prepared, atoms[own], charge, multiplicity, level, control));
    }
    return known.get(key);
  };
}
