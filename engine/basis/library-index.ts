import { EngineError } from '../errors';
import { nearestOf } from '../text-distance';
import type { BasisSet } from './basis-set';
import { type ScaleFactorRequest, STANDARD_SCALE_FACTORS } from './scale-factors';
import { stoNgBasisSet } from './sto-ng';

/** What the program can name without a study. */
export interface BasisSetEntry {
  readonly name: string;
  readonly description: string;
  /** symbols, by atomic number */
  readonly elements: readonly string[];
}

const STO_SIZES = [1, 2, 3, 4, 5, 6];

export function listBasisSets(): BasisSetEntry[] {
  return STO_SIZES.map((n) => ({
    name: `STO-${n}G`,
    description: `minimal: each Slater function as ${n} ${n === 1 ? 'Gaussian' : 'Gaussians'}, fitted here`,
    elements: Object.keys(STANDARD_SCALE_FACTORS),
  }));
}

/**
 * A basis set by name, for the elements asked for.
 *
 * @param name - case and outer spaces do not matter
 * @param scaleFactors - Slater exponents by element and shell, for STO-nG
 * @throws EngineError `basis.unknown` with the nearest name, `basis.elementMissing`, `basis.scaleFactor`
 */
export function findBasisSet(
  name: string,
  symbols: readonly string[],
  scaleFactors?: ScaleFactorRequest,
): BasisSet {
  const wanted = name.trim().toLowerCase();
  const sto = /^sto-([1-6])g$/.exec(wanted);
  if (sto) return stoNgBasisSet(Number(sto[1]), symbols, scaleFactors);
  const nearest = nearestOf(
    wanted,
    listBasisSets().map((entry) => entry.name),
  );
  throw new EngineError(
    'basis.unknown',
    `There is no basis set “${name}”.`,
    nearest === undefined
      ? '`farwell basis` lists the basis sets.'
      : `Write ${nearest} if that is meant; \`farwell basis\` lists all.`,
    nearest === undefined ? { name } : { name, nearest },
    'basis',
  );
}
