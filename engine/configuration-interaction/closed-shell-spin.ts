import type { DeterminantSpace } from './determinant-space';

/** Whether `applyClosedShellSpinSquared` knows the space: at most double excitations of a closed shell. */
export function isClosedShellSpace({ alpha, beta, maximumRank }: DeterminantSpace): boolean {
  return alpha === beta && maximumRank === 2;
}

/**
 * product ← S²·vector over single and double excitations of a closed shell, by the open shells that they leave.
 *
 * With y, x the single excitations of beta and alpha spin, U(ia, jb) those of both (beta first), and D double ones of one
 * spin, amplitudes of a†a aᵢ and a†a aᵢ a†b aⱼ on the reference:
 *
 *   y′ = y − x,  x′ = x − y,
 *   U′(ia, jb) = 2U(ia, jb) − U(ib, ja) − U(ja, ib) − Dα(ia, jb) − Dβ(ia, jb),
 *   D′(ia, jb) = 2D(ia, jb) − U(ia, jb) − U(jb, ia) + U(ib, ja) + U(ja, ib).
 */
export function applyClosedShellSpinSquared(
  space: DeterminantSpace,
  vector: Float64Array,
  product: Float64Array,
): void {
  const { alpha, rows, orbitalCount } = space;
  const o = alpha.electrons;
  const v = orbitalCount - o;
  const [, firstSingle, firstDouble] = alpha.rankStart;
  const betaSingle = (single: number) => rows.start[firstSingle + single];
  const mixed = (beta: number, single: number) => betaSingle(beta) + firstSingle + single;
  product[0] = 0;
  for (let single = 0; single < o * v; single++) {
    const [ofAlpha, ofBeta] = [firstSingle + single, betaSingle(single)];
    product[ofAlpha] = vector[ofAlpha] - vector[ofBeta];
    product[ofBeta] = vector[ofBeta] - vector[ofAlpha];
  }
  for (let i = 0; i < o; i++) {
    for (let a = 0; a < v; a++) {
      for (let j = 0; j < o; j++) {
        for (let b = 0; b < v; b++) {
          const place = mixed(i * v + a, j * v + b);
          product[place] =
            2 * vector[place] - vector[mixed(i * v + b, j * v + a)] - vector[mixed(j * v + a, i * v + b)];
        }
      }
    }
  }
  if (alpha.maximumRank < 2) return;
  // the sign of a determinant doubly excited in one spin is opposite to that of one excited in both
  let inAlpha = firstDouble;
  let inBeta = rows.start[firstDouble];
  for (let j = 1; j < o; j++) {
    for (let i = 0; i < j; i++) {
      for (let b = 1; b < v; b++) {
        for (let a = 0; a < b; a++, inAlpha++, inBeta++) {
          const [ia, jb, ib, ja] = [i * v + a, j * v + b, i * v + b, j * v + a];
          const ofBoth = vector[inAlpha] + vector[inBeta];
          product[mixed(ia, jb)] += ofBoth;
          product[mixed(jb, ia)] += ofBoth;
          product[mixed(ib, ja)] -= ofBoth;
          product[mixed(ja, ib)] -= ofBoth;
          const sum =
            vector[mixed(ia, jb)] + vector[mixed(jb, ia)] - vector[mixed(ib, ja)] - vector[mixed(ja, ib)];
          product[inAlpha] = 2 * vector[inAlpha] + sum;
          product[inBeta] = 2 * vector[inBeta] + sum;
        }
      }
    }
  }
}
