import { familyPlace } from '../basis/basis-family';
import type { BasisFamilyMember, BasisSetLimit, LevelLimit, StudyInBasis } from './basis-comparison';
import { type ExtrapolationPlan, extrapolate, planExtrapolation } from './extrapolation';
import { findLevel } from './levels';
import type { Estimate } from './result';

/** A member of the family that is extrapolated, with its place among the studies given. */
export interface ChosenMember extends BasisFamilyMember {
  readonly index: number;
}

/**
 * What a study in bases of one systematic family tends to at each of its points. Of several families the one with the
 * most members is taken.
 *
 * @param studies - the same study, each in another basis
 */
export function basisSetLimit(studies: readonly StudyInBasis[]): BasisSetLimit {
  const chosen = chooseFamily(studies.map(({ basis }) => basis.name));
  if (!chosen) return { kind: 'none', reason: noFamily(studies.map(({ basis }) => basis.name)) };
  const { family, members } = chosen;
  const levels = Object.keys(studies[members[0].index].levels).flatMap((level): [string, LevelLimit][] => {
    const limit = levelLimit(studies, members, level);
    return limit ? [[level, limit]] : [];
  });
  return {
    kind: 'found',
    family,
    members: members.map(({ name, cardinal }) => ({ name, cardinal })),
    levels: Object.fromEntries(levels),
  };
}

/** The family with the most members, by rising cardinal number; undefined where no two sets belong together. */
export function chooseFamily(
  names: readonly string[],
): { readonly family: string; readonly members: readonly ChosenMember[] } | undefined {
  const families = new Map<string, ChosenMember[]>();
  for (const [index, name] of names.entries()) {
    const place = familyPlace(name);
    if (!place) continue;
    const members = families.get(place.family) ?? [];
    const isNew = members.every(({ cardinal }) => cardinal !== place.cardinal);
    if (isNew) families.set(place.family, [...members, { name, cardinal: place.cardinal, index }]);
  }
  const [largest] = [...families].sort(([, a], [, b]) => b.length - a.length);
  if (!largest || largest[1].length < 2) return undefined;
  const [family, members] = largest;
  return { family, members: members.sort((a, b) => a.cardinal - b.cardinal) };
}

function noFamily(names: readonly string[]): string {
  const needed =
    'Two or more sets of one family, as cc-pVDZ, cc-pVTZ and cc-pVQZ, are needed to tell a limit.';
  const outside = names.filter((name) => !familyPlace(name));
  if (outside.length === 0) return needed;
  const what = outside.length === 1 ? 'is no member' : 'are no members';
  return `${outside.join(', ')} ${what} of a systematic family. ${needed}`;
}

/** Undefined for CIS, and where no point is known in every member. */
function levelLimit(
  studies: readonly StudyInBasis[],
  members: readonly ChosenMember[],
  level: string,
): LevelLimit | undefined {
  if (findLevel(level, 'levels').kind === 'singles') return undefined;
  const known = members.map(({ index }) => studies[index].levels[level]);
  const places = known[0].energies.map((_, point) =>
    members.map(({ cardinal }, k) => ({
      cardinal,
      energy: known[k].energies[point] ?? undefined,
      correlation: known[k].correlation && (known[k].correlation[point] ?? undefined),
    })),
  );
  const plan = planExtrapolation(places);
  if (!plan) return undefined;
  return {
    ...formulasOf(plan),
    energies: places.map((place): Estimate | null => extrapolate(plan, place) ?? null),
  };
}

/** The formulas whose energies are given. */
export function formulasOf({
  hartreeFock,
  correlation,
}: ExtrapolationPlan): Pick<LevelLimit, 'hartreeFock' | 'correlation'> {
  return { hartreeFock: hartreeFock[0], ...(correlation && { correlation: correlation[0] }) };
}
