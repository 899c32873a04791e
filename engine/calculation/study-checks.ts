import { EngineError } from '../errors';
import { electronCount } from '../molecule/build-molecule';
import type { Molecule } from '../molecule/molecule';
import { type Level, needsClosedShell } from './levels';

/* What a study is refused for; each throws an EngineError with its place. */

/** Below this, rounding in sums of integrals makes convergence a matter of luck. */
const TIGHTEST_ENERGY_TOLERANCE = 1e-13;
const LOOSEST_ENERGY_TOLERANCE = 1e-4;
/** More states than this of one level are taken for a mistake. */
const MOST_STATES = 50;

export function requireClosedShell(levels: readonly (Level | undefined)[], multiplicity: number): void {
  if (multiplicity === 1) return;
  const wrong = levels.findIndex((level) => level && needsClosedShell(level));
  if (wrong < 0) return;
  const { name } = levels[wrong]!;
  throw new EngineError(
    'level.needsClosedShell',
    `${name} needs all electrons paired, but the multiplicity is ${multiplicity}.`,
    name === 'RHF'
      ? 'Ask for ROHF or UHF instead, or for multiplicity 1 with an even number of electrons.'
      : 'Leave it out, or ask for multiplicity 1 with an even number of electrons.',
    { level: name, multiplicity },
    `levels[${wrong}]`,
  );
}

export function refuseSingles(levels: readonly (Level | undefined)[]): void {
  const singles = levels.find((level) => level?.kind === 'singles');
  if (!singles) return;
  throw new EngineError(
    'study.orbitals',
    `${singles.name} stands on RHF orbitals and is not computed on those of UHF.`,
    `Leave out ${singles.name}, or “orbitals”.`,
    { level: singles.name },
    'orbitals',
  );
}

export function requireFunctions(functionCount: number, molecule: Molecule): void {
  const electrons = electronCount(molecule);
  const [orbitalsNeeded] = electronsBySpin(electrons, molecule.multiplicity);
  if (functionCount >= orbitalsNeeded) return;
  throw new EngineError(
    'basis.tooFewFunctions',
    `The basis has ${functionCount} functions, but ${electrons} electrons need at least ${orbitalsNeeded} orbitals.`,
    'Take a larger basis set, or one made for these elements.',
    { functions: functionCount, orbitalsNeeded },
    'basis',
  );
}

/** Alpha and beta electrons of the highest spin projection. */
export function electronsBySpin(electrons: number, multiplicity: number): readonly [number, number] {
  const alpha = (electrons + multiplicity - 1) / 2;
  return [alpha, electrons - alpha];
}

export function checkLevels(levels: readonly string[]): void {
  if (levels.length === 0) {
    throw new EngineError(
      'level.none',
      'The study names no level.',
      'Name at least one, such as RHF.',
      {},
      'levels',
    );
  }
  const twice = levels.find((level, i) => levels.indexOf(level) !== i);
  if (twice !== undefined) {
    throw new EngineError(
      'level.twice',
      `The level ${twice} is listed twice.`,
      'List each level once.',
      { level: twice },
      `levels[${levels.lastIndexOf(twice)}]`,
    );
  }
}

export function checkStates(states: number): void {
  if (!Number.isInteger(states) || states < 1 || states > MOST_STATES) {
    throw new EngineError(
      'study.states',
      `“states” must be a whole number from 1 to ${MOST_STATES}; it is ${states}.`,
      'Give the number of lowest states wanted of each level.',
      { states },
      'states',
    );
  }
}

export function checkTolerance(tolerance: number): void {
  if (!(tolerance >= TIGHTEST_ENERGY_TOLERANCE && tolerance <= LOOSEST_ENERGY_TOLERANCE)) {
    throw new EngineError(
      'study.convergence',
      `An energy tolerance of ${tolerance} hartree cannot be used.`,
      `Choose one from ${TIGHTEST_ENERGY_TOLERANCE} to ${LOOSEST_ENERGY_TOLERANCE} hartree, or leave it out.`,
      { tolerance },
      'convergence.energy',
    );
  }
}

export function checkReferenceWeight(weight: number | undefined): void {
  if (weight !== undefined && !(weight > 0 && weight < 1)) {
    throw new EngineError(
      'study.referenceWeight',
      `A reference weight of ${weight} is no threshold between 0 and 1.`,
      'Choose one such as 0.9, or leave it out.',
      { weight },
      'findings.referenceWeight',
    );
  }
}
