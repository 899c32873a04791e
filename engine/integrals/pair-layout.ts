import { type CartesianPowers, cartesianComponents, cartesianCount } from './cartesian-components';
import { type ProductExpansion, productExpansion } from './product-expansion';

/** One pair of shells of a pair of blocks. */
export interface LayoutMember {
  readonly expansion: ProductExpansion;
  /** for each factor of the full expansion: the factor of the layout that takes its terms, −1 for none */
  readonly targetFactor: readonly number[];
  /** column of the layout for each column of the full expansion, −1 for none */
  readonly targetColumn: Int32Array;
}

/**
 * Which Hermite terms a kind of pair keeps, and where they stand. A pair's integrals are a sum over *factors*
 * (groups of Hermite terms of one degree that share their dependence on the exponents and belong to one pair of
 * shells); each factor owns a column for every Hermite index of its degree.
 */
export interface PairLayout {
  /** small consecutive number, for tables over pairs of layouts */
  readonly id: number;
  /** highest degree, the largest sum of two angular momenta */
  readonly degree: number;
  /** rising, so that factors which multiply the same Hermite integrals stand side by side */
  readonly factorDegrees: readonly number[];
  readonly columnStart: readonly number[];
  readonly columnCount: number;
  /** factor that each column belongs to */
  readonly columnFactor: readonly number[];
  /** Hermite index (t, u, v) of each column */
  readonly columnPowers: readonly CartesianPowers[];
  readonly members: readonly LayoutMember[];
  /** the pair has one primitive, so that all factors of one degree were merged into one */
  readonly isMerged: boolean;
}

const layouts = new Map<string, PairLayout>();

/**
 * @param momenta - angular momenta of each pair of shells
 * @param isMerged - for pairs with a single primitive product: exponents and coefficients go into the columns, and
 * one factor a degree remains for all pairs of shells
 * @param isConcentric - both blocks on one centre: only terms without A − B remain
 */
export function pairLayout(
  momenta: readonly (readonly [number, number])[],
  isMerged: boolean,
  isConcentric: boolean,
): PairLayout {
  const key = `${momenta.join(' ')} ${isMerged} ${isConcentric}`;
  let layout = layouts.get(key);
  if (!layout) {
    layout = buildLayout(layouts.size, momenta, isMerged, isConcentric);
    layouts.set(key, layout);
  }
  return layout;
}

function buildLayout(
  id: number,
  momenta: readonly (readonly [number, number])[],
  isMerged: boolean,
  isConcentric: boolean,
): PairLayout {
  const degree = Math.max(...momenta.map(([first, second]) => first + second));
  const members = momenta.map(([first, second]) => {
    const expansion = productExpansion(first, second);
    return {
      expansion,
      targetFactor: expansion.factors.map(() => -1),
      targetColumn: new Int32Array(expansion.columnCount).fill(-1),
    };
  });
  const factorDegrees: number[] = [];
  for (let wanted = 0; wanted <= degree; wanted++) {
    for (const { expansion, targetFactor } of members) {
      expansion.factors.forEach((factor, source) => {
        if (factor.degree !== wanted) return;
        if (isConcentric && factor.firstPower + factor.secondPower > 0) return;
        if (!isMerged || factorDegrees.at(-1) !== wanted) factorDegrees.push(wanted);
        targetFactor[source] = factorDegrees.length - 1;
      });
    }
  }
  const columnStart: number[] = [];
  const columnFactor: number[] = [];
  const columnPowers: CartesianPowers[] = [];
  factorDegrees.forEach((factorDegree, factor) => {
    columnStart.push(columnPowers.length);
    for (const powers of cartesianComponents(factorDegree)) {
      columnFactor.push(factor);
      columnPowers.push(powers);
    }
  });
  for (const { expansion, targetFactor, targetColumn } of members) {
    expansion.factors.forEach((factor, source) => {
      const target = targetFactor[source];
      if (target < 0) return;
      for (let i = 0; i < cartesianCount(factor.degree); i++) {
        targetColumn[expansion.columnStart[source] + i] = columnStart[target] + i;
      }
    });
  }
  return {
    id,
    degree,
    factorDegrees,
    columnStart,
    columnCount: columnPowers.length,
    columnFactor,
    columnPowers,
    members,
    isMerged,
  };
}
