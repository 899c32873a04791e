import { EngineError } from '../errors';
import { nearestOf } from '../text-distance';
import type { BasisSet } from './basis-set';
import split321 from './library/3-21g.json';
import split431 from './library/4-31g.json';
import split631 from './library/6-31g.json';
import split631TwoStars from './library/6-31g-2star.json';
import split631OneStar from './library/6-31g-star.json';
import split631Diffuse from './library/6-31ppg-2star.json';
import split6311 from './library/6-311g.json';
import augmentedDoubleZeta from './library/aug-cc-pvdz.json';
import correlationConsistentDoubleZeta from './library/cc-pvdz.json';
import correlationConsistentQuadrupleZeta from './library/cc-pvqz.json';
import correlationConsistentTripleZeta from './library/cc-pvtz.json';
import dunningHayDoubleZeta from './library/dz-dunning-hay.json';
import dunningHaySplitValence from './library/sv-dunning-hay.json';
import { loadPublishedSet, type PublishedSet } from './published-set';
import { type ScaleFactorRequest, STANDARD_SCALE_FACTORS } from './scale-factors';
import { STO_SIZES, stoNgBasisSet } from './sto-ng';

/** A basis set that can be had by its name. */
export interface BasisSetEntry {
  readonly name: string;
  readonly description: string;
  /** symbols, by atomic number */
  readonly elements: readonly string[];
}

const PUBLISHED = [
  split321,
  split431,
  split631,
  split631OneStar,
  split631TwoStars,
  split631Diffuse,
  split6311,
  dunningHaySplitValence,
  dunningHayDoubleZeta,
  correlationConsistentDoubleZeta,
  augmentedDoubleZeta,
  correlationConsistentTripleZeta,
  correlationConsistentQuadrupleZeta,
] as readonly PublishedSet[];

/** Every basis set that has a name, small ones first. */
export function listBasisSets(): BasisSetEntry[] {
  return [
    ...STO_SIZES.map((n) => ({
      name: stoName(n),
      description: `minimal: each Slater function as ${n} ${n === 1 ? 'Gaussian' : 'Gaussians'}, by our own fit`,
      elements: Object.keys(STANDARD_SCALE_FACTORS),
    })),
    ...PUBLISHED.map(({ name, description, elements }) => ({
      name,
      description,
      elements: Object.keys(elements),
    })),
  ];
}

/**
 * A basis set by its name, for the elements asked for.
 *
 * @param name - case and outer spaces do not matter; `6-31G(d)` is `6-31G*`, and so on
 * @param scaleFactors - Slater exponents by element and shell, for STO-nG
 * @throws EngineError `basis.unknown` with the nearest name, `basis.elementMissing`, `basis.scaleFactor`
 */
export function findBasisSet(
  name: string,
  symbols: readonly string[],
  scaleFactors?: ScaleFactorRequest,
): BasisSet {
  const wanted = plain(name);
  const gaussians = slaterFitSize(name);
  if (gaussians !== undefined) return stoNgBasisSet(gaussians, symbols, scaleFactors);
  const published = PUBLISHED.find((set) =>
    [set.name, ...set.aliases].some((known) => plain(known) === wanted),
  );
  if (published === undefined) throw unknownBasis(name);
  if (scaleFactors !== undefined) throw notScalable(published.name);
  return loadPublishedSet(published, symbols);
}

/** n, if the name is that of an STO-nG set. */
export function slaterFitSize(name: string): number | undefined {
  return STO_SIZES.find((n) => plain(stoName(n)) === plain(name));
}

function stoName(gaussians: number): string {
  return `STO-${gaussians}G`;
}

function plain(name: string): string {
  return name.trim().toLowerCase();
}

function unknownBasis(name: string): EngineError<'basis.unknown'> {
  const known = [...STO_SIZES.map(stoName), ...PUBLISHED.flatMap((set) => [set.name, ...set.aliases])];
  const nearest = nearestOf(name, known);
  return new EngineError(
    'basis.unknown',
    `There is no basis set “${name.length > 40 ? `${name.slice(0, 40)}…` : name}”.`,
    nearest === undefined
      ? `Choose one of ${listBasisSets()
          .map((entry) => entry.name)
          .join(', ')}.`
      : `Write “${nearest}” if that is meant.`,
    nearest === undefined ? { name } : { name, nearest },
    'basis',
  );
}

function notScalable(name: string): EngineError<'basis.scaleFactor'> {
  return new EngineError(
    'basis.scaleFactor',
    `Slater exponents can be set for STO-nG only, not for ${name}.`,
    'Choose STO-3G or another STO-nG set, or leave "scaleFactors" out.',
    { symbol: '', shell: '' },
    'basis.scaleFactors',
  );
}
