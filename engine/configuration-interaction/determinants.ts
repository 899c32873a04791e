/**
 * Determinants as bit strings.
 *
 * The occupation of the spatial orbitals by electrons of one spin is a string of bits, 32 orbitals to a word:
 * bit p & 31 of word p >> 5. Words rather than one number, because JavaScript's integers with bit operations
 * have 32 bits; two words serve 64 orbitals, and nothing below depends on how many there are.
 *
 * A determinant is the product of creation operators, the alpha electrons in rising order of orbitals, then the
 * beta electrons in rising order, applied to the vacuum. Every sign in this folder follows from that order.
 */
export type OccupationString = Int32Array;

export interface Determinant {
  readonly alpha: OccupationString;
  readonly beta: OccupationString;
}

/** How many 32-bit words a string over so many orbitals takes. */
export function wordsOf(orbitalCount: number): number {
  return Math.max(1, Math.ceil(orbitalCount / 32));
}

/** The string in which exactly the listed orbitals are occupied. */
export function occupationString(orbitalCount: number, occupied: Iterable<number>): OccupationString {
  const string = new Int32Array(wordsOf(orbitalCount));
  for (const p of occupied) string[p >> 5] |= 1 << (p & 31);
  return string;
}

export function isOccupied(string: OccupationString, p: number): boolean {
  return ((string[p >> 5] >>> (p & 31)) & 1) === 1;
}

/** How many bits of a word are set (sums within 2, 4, then 8 bits, added by one product). */
export function countBits(word: number): number {
  word -= (word >>> 1) & 0x55555555;
  word = (word & 0x33333333) + ((word >>> 2) & 0x33333333);
  return Math.imul((word + (word >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}

/** Orbitals of the set bits, rising. */
export function occupiedOrbitals(string: OccupationString): number[] {
  const orbitals: number[] = [];
  for (let w = 0; w < string.length; w++) {
    for (let rest = string[w]; rest !== 0; rest &= rest - 1) orbitals.push(32 * w + lowestBit(rest));
  }
  return orbitals;
}

/** Orbitals occupied in `first` and not in `second`, rising. */
export function orbitalsOnlyIn(first: OccupationString, second: OccupationString): number[] {
  return occupiedOrbitals(first.map((word, w) => word & ~second[w]));
}

/** The lowest orbital occupied in `first` and not in `second`; −1 where there is none. Allocates nothing. */
export function firstOrbitalOnlyIn(first: OccupationString, second: OccupationString): number {
  for (let w = 0; w < first.length; w++) {
    const word = first[w] & ~second[w];
    if (word !== 0) return 32 * w + lowestBit(word);
  }
  return -1;
}

/** In how many orbitals occupied in one string is the other empty? Strings of equal electron count. */
export function replacementsBetween(first: OccupationString, second: OccupationString): number {
  let differing = 0;
  for (let w = 0; w < first.length; w++) differing += countBits(first[w] ^ second[w]);
  return differing / 2;
}

/** Place of the lowest set bit of a word that is not zero. */
export function lowestBit(word: number): number {
  return 31 - Math.clz32(word & -word);
}

/** Moves an electron: orbital `from` becomes empty, `to` occupied. In place. */
export function moveElectron(string: OccupationString, from: number, to: number): void {
  string[from >> 5] &= ~(1 << (from & 31));
  string[to >> 5] |= 1 << (to & 31);
}

/**
 * Sign of a†(to)·a(from) on a string with `from` occupied and `to` empty (or the same orbital): −1 to the number
 * of electrons strictly between the two orbitals.
 */
export function replacementPhase(string: OccupationString, from: number, to: number): 1 | -1 {
  const low = Math.min(from, to) + 1;
  const high = Math.max(from, to);
  let between = 0;
  for (let w = low >> 5; w <= high >> 5 && w < string.length; w++) {
    let word = string[w];
    if (w === low >> 5) word &= -1 << (low & 31);
    if (w === high >> 5) word &= ~(-1 << (high & 31));
    between += countBits(word);
  }
  return between % 2 === 0 ? 1 : -1;
}
