import { cartesianComponents, cartesianCount, cartesianIndex } from './cartesian-components';

/**
 * One group of Hermite terms of a product of two primitives: all of one degree, multiplied by the common factor
 * (−b/p)^firstPower · (a/p)^secondPower · (1/2p)^widthPower, the only place where exponents enter.
 */
export interface ExpansionFactor {
  readonly degree: number;
  readonly firstPower: number;
  readonly secondPower: number;
  readonly widthPower: number;
}

/** coefficient · X^x Y^y Z^z, with (X, Y, Z) = A − B, at one function product and one column of the expansion */
export interface ExpansionTerm {
  readonly product: number;
  readonly column: number;
  readonly coefficient: number;
  readonly powers: readonly [number, number, number];
}

/** Expansion of all Cartesian products of two shells in Hermite Gaussians, exponents and geometry kept apart. */
export interface ProductExpansion {
  readonly factors: readonly ExpansionFactor[];
  /** first column of each factor; its columns are the Hermite indices of its degree in order */
  readonly columnStart: readonly number[];
  readonly columnCount: number;
  readonly terms: readonly ExpansionTerm[];
}

interface LineTerm {
  readonly degree: number;
  readonly first: number;
  readonly second: number;
  readonly coefficient: number;
}

/** by both angular momenta */
const cache: ProductExpansion[][] = [];

/**
 * Hermite expansion of (x − A)^a (x − B)^b … exp(−a r_A² − b r_B²), symbolically in the exponents.
 *
 * With P − A = −(b/p)(A − B) and P − B = (a/p)(A − B), the recursion
 * E_t^(i+1,j) = E_(t−1)^(ij)/2p + (P − A) E_t^(ij) + (t + 1) E_(t+1)^(ij) makes each coefficient a sum of integers
 * times (−b/p)^M (a/p)^N (1/2p)^k X^(M+N). Terms that share M, N and degree share their exponent dependence, so that
 * contraction over primitives can be done on Hermite integrals before any function product is formed.
 *
 * Source: recursion: L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26, 218 (1978); contraction before
 * transformation: P. M. W. Gill, J. A. Pople, Int. J. Quantum Chem. 40, 753 (1991).
 */
export function productExpansion(firstL: number, secondL: number): ProductExpansion {
  cache[firstL] ??= [];
  cache[firstL][secondL] ??= buildExpansion(firstL, secondL);
  return cache[firstL][secondL];
}

function buildExpansion(firstL: number, secondL: number): ProductExpansion {
  const total = firstL + secondL;
  const factors: ExpansionFactor[] = [];
  const columnStart: number[] = [];
  const factorOf = new Map<string, number>();
  let columnCount = 0;
  for (let degree = 0; degree <= total; degree++) {
    for (let first = 0; first <= firstL; first++) {
      for (let second = 0; second <= secondL; second++) {
        const rest = total - degree - first - second;
        if (rest < 0 || rest % 2 === 1) continue;
        factorOf.set(`${degree} ${first} ${second}`, factors.length);
        factors.push({ degree, firstPower: first, secondPower: second, widthPower: degree + rest / 2 });
        columnStart.push(columnCount);
        columnCount += cartesianCount(degree);
      }
    }
  }

  const secondComponents = cartesianComponents(secondL);
  const terms: ExpansionTerm[] = [];
  cartesianComponents(firstL).forEach((a, i) => {
    secondComponents.forEach((b, j) => {
      const product = i * secondComponents.length + j;
      const sums = new Map<string, ExpansionTerm>();
      for (const x of lineTerms(a[0], b[0])) {
        for (const y of lineTerms(a[1], b[1])) {
          for (const z of lineTerms(a[2], b[2])) {
            const first = x.first + y.first + z.first;
            const second = x.second + y.second + z.second;
            const factor = factorOf.get(`${x.degree + y.degree + z.degree} ${first} ${second}`)!;
            const column = columnStart[factor] + cartesianIndex(y.degree, z.degree);
            const powers = [x.first + x.second, y.first + y.second, z.first + z.second] as const;
            const place = `${column} ${powers.join(' ')}`;
            const coefficient =
              x.coefficient * y.coefficient * z.coefficient + (sums.get(place)?.coefficient ?? 0);
            sums.set(place, { product, column, coefficient, powers });
          }
        }
      }
      terms.push(...sums.values());
    });
  });
  return { factors, columnStart, columnCount, terms };
}

/** E_t^(ij) in one dimension as integer coefficients of (P − A)^first (P − B)^second, the rest powers of 1/2p. */
function lineTerms(i: number, j: number): readonly LineTerm[] {
  let terms: readonly LineTerm[] = [{ degree: 0, first: 0, second: 0, coefficient: 1 }];
  for (let step = 0; step < i + j; step++) {
    const raisesFirst = step < i;
    const sums = new Map<string, LineTerm>();
    const add = (degree: number, first: number, second: number, coefficient: number) => {
      if (degree < 0 || coefficient === 0) return;
      const place = `${degree} ${first} ${second}`;
      const sum = coefficient + (sums.get(place)?.coefficient ?? 0);
      sums.set(place, { degree, first, second, coefficient: sum });
    };
    for (const { degree, first, second, coefficient } of terms) {
      add(degree + 1, first, second, coefficient);
      add(degree, raisesFirst ? first + 1 : first, raisesFirst ? second : second + 1, coefficient);
      add(degree - 1, first, second, degree * coefficient);
    }
    terms = [...sums.values()];
  }
  return terms;
}
