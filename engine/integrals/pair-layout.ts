import { type CartesianPowers, cartesianComponents, cartesianCount } from './cartesian-components';
import { type ProductExpansion, productExpansion } from './product-expansion';

/**
 * Which Hermite terms a kind of shell pair keeps, and where they stand. A pair's integrals are a sum over *factors*
 * (groups of Hermite terms of one degree that share their dependence on the exponents); each factor owns a column
 * for every Hermite index of its degree.
 */
export interface PairLayout {
  /** small consecutive number, for tables over pairs of layouts */
  readonly id: number;
  /** highest degree, the sum of both angular momenta */
  readonly degree: number;
  readonly factorDegrees: readonly number[];
  readonly columnStart: readonly number[];
  readonly columnCount: number;
  /** factor that each column belongs to */
  readonly columnFactor: readonly number[];
  /** Hermite index (t, u, v) of each column */
  readonly columnPowers: readonly CartesianPowers[];
  readonly expansion: ProductExpansion;
  /** for each factor of the full expansion: the factor of this layout that takes its terms, −1 for none */
  readonly targetFactor: readonly number[];
  /** the pair has one primitive, so that all factors of one degree were merged into one of value 1 */
  readonly isMerged: boolean;
}

const layouts = new Map<string, PairLayout>();

/**
 * @param isMerged - for pairs with a single primitive product: exponents go into the columns, and one factor a
 * degree remains
 * @param isConcentric - both shells on one centre: only terms without A − B remain
 */
export function pairLayout(
  firstL: number,
  secondL: number,
  isMerged: boolean,
  isConcentric: boolean,
): PairLayout {
  const key = `${firstL} ${secondL} ${isMerged} ${isConcentric}`;
  let layout = layouts.get(key);
  if (!layout) {
    layout = buildLayout(layouts.size, firstL, secondL, isMerged, isConcentric);
    layouts.set(key, layout);
  }
  return layout;
}

function buildLayout(
  id: number,
  firstL: number,
  secondL: number,
  isMerged: boolean,
  isConcentric: boolean,
): PairLayout {
  const expansion = productExpansion(firstL, secondL);
  const factorDegrees: number[] = [];
  const targetFactor = expansion.factors.map(({ degree, firstPower, secondPower }) => {
    if (isConcentric && firstPower + secondPower > 0) return -1;
    if (!isMerged || factorDegrees.at(-1) !== degree) factorDegrees.push(degree);
    return factorDegrees.length - 1;
  });
  const columnStart: number[] = [];
  const columnFactor: number[] = [];
  const columnPowers: CartesianPowers[] = [];
  factorDegrees.forEach((degree, factor) => {
    columnStart.push(columnPowers.length);
    for (const powers of cartesianComponents(degree)) {
      columnFactor.push(factor);
      columnPowers.push(powers);
    }
  });
  return {
    id,
    degree: firstL + secondL,
    factorDegrees,
    columnStart,
    columnCount: columnPowers.length,
    columnFactor,
    columnPowers,
    expansion,
    targetFactor,
    isMerged,
  };
}

/** Column of this layout for a column of the full expansion, −1 for none; one entry a full column. */
export function columnMap(layout: PairLayout): Int32Array {
  const { expansion, targetFactor, columnStart } = layout;
  const map = new Int32Array(expansion.columnCount).fill(-1);
  expansion.factors.forEach(({ degree }, factor) => {
    const target = targetFactor[factor];
    if (target < 0) return;
    for (let i = 0; i < cartesianCount(degree); i++) {
      map[expansion.columnStart[factor] + i] = columnStart[target] + i;
    }
  });
  return map;
}
