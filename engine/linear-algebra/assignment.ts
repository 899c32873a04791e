/**
 * The cheapest way to give every row a column of its own, found exactly by shortest augmenting paths in O(n³).
 *
 * After H. W. Kuhn, Nav. Res. Logist. Q. 2, 83 (1955), with potentials as in R. Jonker, A. Volgenant, Computing 38,
 * 325 (1987).
 *
 * @param costs - n×n row-major, finite
 * @returns column of every row
 */
export function cheapestAssignment(costs: Float64Array, n: number): Int32Array {
  // place n stands for the row that is being placed and the column that it starts from
  const rowPotential = new Float64Array(n + 1);
  const columnPotential = new Float64Array(n + 1);
  const rowOf = new Int32Array(n + 1).fill(-1);
  const previous = new Int32Array(n + 1);
  for (let row = 0; row < n; row++) {
    const shortest = new Float64Array(n + 1).fill(Number.POSITIVE_INFINITY);
    const isReached = new Uint8Array(n + 1);
    rowOf[n] = row;
    let column = n;
    while (rowOf[column] >= 0) {
      isReached[column] = 1;
      const from = rowOf[column];
      let nearest = -1;
      for (let next = 0; next < n; next++) {
        if (isReached[next]) continue;
        const length = costs[from * n + next] - rowPotential[from] - columnPotential[next];
        if (length < shortest[next]) {
          shortest[next] = length;
          previous[next] = column;
        }
        if (nearest < 0 || shortest[next] < shortest[nearest]) nearest = next;
      }
      const step = shortest[nearest];
      for (let next = 0; next <= n; next++) {
        if (isReached[next]) {
          rowPotential[rowOf[next]] += step;
          columnPotential[next] -= step;
        } else {
          shortest[next] -= step;
        }
      }
      column = nearest;
    }
    while (column !== n) {
      rowOf[column] = rowOf[previous[column]];
      column = previous[column];
    }
  }
  const columnOf = new Int32Array(n);
  for (let column = 0; column < n; column++) columnOf[rowOf[column]] = column;
  return columnOf;
}
