import { EngineError } from '../errors';
import type { Level } from './levels';
import type { ActiveSpace } from './study';

/** Which orbitals CI moves electrons among. */
export interface OrbitalWindow {
  /** orbitals below, kept doubly occupied */
  readonly frozen: number;
  /** orbitals used, from the first one above; absent: all that there are */
  readonly active?: number;
}

/**
 * The window of a study that names its active electrons and orbitals. Orbitals stand in the order of the reference –
 * doubly occupied by rising energy, then singly occupied, then empty by rising energy. All electrons but the active
 * ones fill the lowest; the next `orbitals` are active, so that they lie around the Fermi level; the rest stay empty.
 *
 * @param spinElectrons - alpha and beta electrons of the molecule
 * @throws EngineError `study.active`
 */
export function activeWindow(
  { electrons, orbitals }: ActiveSpace,
  [alpha, beta]: readonly [number, number],
  functionCount: number,
  frozenCore: boolean,
  levels: readonly Level[],
): OrbitalWindow {
  const refuse = (message: string, remedy: string, place = 'active') =>
    new EngineError('study.active', message, remedy, { electrons, orbitals }, place);
  const total = alpha + beta;
  if (frozenCore) {
    throw refuse(
      '“active” and “frozenCore” both say which orbitals are frozen.',
      'Leave one of them out: with “active” all electrons but the active ones are frozen.',
    );
  }
  const perturbation = levels.find((level) => level.kind === 'perturbation');
  if (perturbation) {
    throw refuse(
      `${perturbation.name} uses all orbitals and has no active ones.`,
      `Leave out ${perturbation.name}, or “active”.`,
    );
  }
  if (electrons > total) {
    throw refuse(
      `${electrons} active electrons are more than the molecule has: ${total}.`,
      `Choose at most ${total}.`,
      'active.electrons',
    );
  }
  const frozen = (total - electrons) / 2;
  if (!Number.isInteger(frozen) || frozen > beta) {
    const least = alpha - beta;
    throw refuse(
      `${electrons} active electrons of ${total} leave electrons that do not fill orbitals in pairs.`,
      `Choose ${least}, ${least + 2}, … of them: unpaired electrons are always active.`,
      'active.electrons',
    );
  }
  const needed = alpha - frozen;
  const available = functionCount - frozen;
  if (orbitals < needed || orbitals > available) {
    throw refuse(
      `${orbitals} active orbitals for ${electrons} electrons are too ${orbitals < needed ? 'few' : 'many'} here.`,
      `Choose from ${needed} to ${available}.`,
      'active.orbitals',
    );
  }
  return { frozen, active: orbitals };
}
