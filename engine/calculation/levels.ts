import { EngineError } from '../errors';

/** What a level needs and what kind of numbers it gives. */
export type Level =
  | { readonly kind: 'hartreeFock'; readonly name: 'RHF' | 'UHF' | 'ROHF' }
  | { readonly kind: 'perturbation'; readonly name: 'MP2' }
  | { readonly kind: 'singles'; readonly name: 'CIS' }
  | {
      readonly kind: 'correlated';
      readonly name: string;
      /** highest excitation rank; Infinity for full CI */
      readonly maximumRank: number;
    };

const LEVELS: readonly Level[] = [
  { kind: 'hartreeFock', name: 'RHF' },
  { kind: 'hartreeFock', name: 'UHF' },
  { kind: 'hartreeFock', name: 'ROHF' },
  { kind: 'perturbation', name: 'MP2' },
  { kind: 'singles', name: 'CIS' },
  { kind: 'correlated', name: 'CISD', maximumRank: 2 },
  { kind: 'correlated', name: 'CISDT', maximumRank: 3 },
  { kind: 'correlated', name: 'CISDTQ', maximumRank: 4 },
  { kind: 'correlated', name: 'CISDTQ5', maximumRank: 5 },
  { kind: 'correlated', name: 'CISDTQ56', maximumRank: 6 },
  { kind: 'correlated', name: 'FCI', maximumRank: Number.POSITIVE_INFINITY },
];

/** Levels that exist for paired electrons only. */
export function needsClosedShell(level: Level): boolean {
  return level.name === 'RHF' || level.kind === 'singles';
}

/** Names of all levels, cheapest first. */
export const LEVEL_NAMES: readonly string[] = LEVELS.map((level) => level.name);

/**
 * The level of a name.
 *
 * @param place - where in the study the name stands
 * @throws EngineError `level.unknown`
 */
export function findLevel(name: string, place: string): Level {
  const level = LEVELS.find((candidate) => candidate.name === name);
  if (level) return level;
  throw new EngineError(
    'level.unknown',
    `There is no level “${name}” in this version.`,
    `Choose from ${LEVEL_NAMES.join(', ')}.`,
    { level: name },
    place,
  );
}
