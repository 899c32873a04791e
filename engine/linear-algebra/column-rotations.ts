/** Room for so many full sweeps; they wait, so that a row is read once for all of them. */
const SWEEPS_TOGETHER = 16;

/** Rotations of neighbouring columns, in the order in which they are to be applied. */
export class SweepQueue {
  readonly #cosines: Float64Array;
  readonly #sines: Float64Array;
  /** of every sweep: the higher column of its first rotation, and where its rotations start */
  readonly #first: number[] = [];
  readonly #start: number[] = [];
  #count = 0;

  constructor(readonly size: number) {
    this.#cosines = new Float64Array(SWEEPS_TOGETHER * size);
    this.#sines = new Float64Array(SWEEPS_TOGETHER * size);
  }

  hasRoomFor(rotations: number): boolean {
    return this.#count + rotations <= this.#cosines.length;
  }

  /** The first rotation of the sweep will be of columns (m − 1, m), the next of (m − 2, m − 1), and so on. */
  begin(m: number): void {
    this.#first.push(m);
    this.#start.push(this.#count);
  }

  add(cosine: number, sine: number): void {
    this.#cosines[this.#count] = cosine;
    this.#sines[this.#count++] = sine;
  }

  /** Applies all rotations to every row of an n×n matrix, and empties the queue. */
  applyTo(columns: Float64Array): void {
    const n = this.size;
    const first = Int32Array.from(this.#first);
    const start = Int32Array.from([...this.#start, this.#count]);
    let row = 0;
    for (; row + 4 <= n; row += 4)
      rotateFourRows(columns, row * n, n, first, start, this.#cosines, this.#sines);
    for (; row < n; row++) rotateRow(columns, row * n, first, start, this.#cosines, this.#sines);
    this.#first.length = 0;
    this.#start.length = 0;
    this.#count = 0;
  }
}

/** The element between two rotations is carried along the row. */
function rotateRow(
  z: Float64Array,
  row: number,
  first: Int32Array,
  start: Int32Array,
  cosines: Float64Array,
  sines: Float64Array,
): void {
  for (let sweep = 0; sweep < first.length; sweep++) {
    let place = row + first[sweep];
    let carry = z[place];
    for (let r = start[sweep]; r < start[sweep + 1]; r++) {
      const element = z[place - 1];
      z[place--] = sines[r] * element + cosines[r] * carry;
      carry = cosines[r] * element - sines[r] * carry;
    }
    z[place] = carry;
  }
}

/** The same for four rows `length` apart, because each rotation waits for the one before. */
function rotateFourRows(
  z: Float64Array,
  row: number,
  length: number,
  first: Int32Array,
  start: Int32Array,
  cosines: Float64Array,
  sines: Float64Array,
): void {
  for (let sweep = 0; sweep < first.length; sweep++) {
    let a = row + first[sweep];
    let b = a + length;
    let c = b + length;
    let d = c + length;
    let carryA = z[a];
    let carryB = z[b];
    let carryC = z[c];
    let carryD = z[d];
    for (let r = start[sweep]; r < start[sweep + 1]; r++) {
      const cosine = cosines[r];
      const sine = sines[r];
      const nextA = z[a - 1];
      const nextB = z[b - 1];
      const nextC = z[c - 1];
      const nextD = z[d - 1];
      z[a--] = sine * nextA + cosine * carryA;
      z[b--] = sine * nextB + cosine * carryB;
      z[c--] = sine * nextC + cosine * carryC;
      z[d--] = sine * nextD + cosine * carryD;
      carryA = cosine * nextA - sine * carryA;
      carryB = cosine * nextB - sine * carryB;
      carryC = cosine * nextC - sine * carryC;
      carryD = cosine * nextD - sine * carryD;
    }
    z[a] = carryA;
    z[b] = carryB;
    z[c] = carryC;
    z[d] = carryD;
  }
}
