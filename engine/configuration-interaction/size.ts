import { kernelForm } from '../kernels/form';
import { davidsonVectorCount } from '../linear-algebra/davidson';
import { wordsOf } from './determinants';
import { FEW_DETERMINANTS } from './hamiltonian-product';
import { countSameSpinEntries, countSingleReplacements } from './replacements';
import { highestRank } from './string-space';

/**
 * Guess vectors for so many states, at most. Those beyond the states are guards: they keep a state from being
 * missed whose symmetry or spin the lowest guesses lack.
 */
export function guessLimit(states: number): number {
  return 2 * states + 4;
}

/** Vectors without symmetry that are pursued beside the guesses, at most. */
export const PROBES = 2;

/** Beyond so many determinants, handling the vectors costs more time than the steps that a collapse loses. */
const LARGE = 100_000;

/**
 * Basis vectors of the eigensolver: room for several steps of every state before it must collapse.
 *
 * @param dimension - length of a vector
 */
export function basisVectorLimit(states: number, dimension: number): number {
  return guessLimit(states) + 4 * (PROBES + states) + (dimension > LARGE ? 0 : 12);
}

/** Basis vectors with which a guard is looked at where memory is short: it, and a new direction. */
export const GUARD_BASIS = 2;

/**
 * Basis vectors for so many vectors in all, at least one more than the states.
 *
 * @returns undefined where there is room for as many as are of use
 */
export function basisVectorsWithin(vectors: number, states: number, dimension: number): number | undefined {
  const useful = basisVectorLimit(states, dimension);
  if (vectors >= davidsonVectorCount(useful)) return undefined;
  let count = states + 1;
  while (count + 1 < useful && davidsonVectorCount(count + 1) <= vectors) count++;
  return count;
}

/** Vectors that the eigensolver holds at most; `basisVectors` where they are fewer than are of use. */
export function vectorsHeld(states: number, dimension: number, basisVectors: number | undefined): number {
  return basisVectors === undefined
    ? states + davidsonVectorCount(basisVectorLimit(states, dimension))
    : Math.max(davidsonVectorCount(basisVectors), states + davidsonVectorCount(GUARD_BASIS));
}

/**
 * Number of determinants up to an excitation rank, counted in spin orbitals against the lowest determinant.
 *
 * @param rankLimit - Infinity, or at least the number of electrons, for full CI
 * @returns exact; the nearest double where there are more than 2⁵³
 */
export function countDeterminants(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
): number {
  const alpha = countStrings(orbitalCount, alphaElectrons, rankLimit);
  const beta = countStrings(orbitalCount, betaElectrons, rankLimit);
  let total = 0n;
  alpha.forEach((alphaCount, alphaRank) => {
    beta.forEach((betaCount, betaRank) => {
      if (alphaRank + betaRank <= rankLimit) total += alphaCount * betaCount;
    });
  });
  return Number(total);
}

/** Strings of each rank. */
function countStrings(orbitalCount: number, electrons: number, rankLimit: number): bigint[] {
  const ranks = highestRank(orbitalCount, electrons, rankLimit) + 1;
  return Array.from({ length: ranks }, (_, k) => choose(electrons, k) * choose(orbitalCount - electrons, k));
}

function choose(n: number, k: number): bigint {
  let value = 1n;
  for (let i = 1; i <= k; i++) value = (value * BigInt(n - k + i)) / BigInt(i);
  return value;
}

/**
 * Whether the fast form of products with H is `prepareClosedShellProduct`, over amplitudes of single and double
 * excitations, rather than lists over determinants.
 */
export function goesByAmplitudes(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
  spinsDiffer: boolean,
): boolean {
  if (isTwoElectrons(alphaElectrons, betaElectrons, rankLimit, spinsDiffer)) return false;
  const ofOneSpin = highestRank(orbitalCount, alphaElectrons, rankLimit);
  return !spinsDiffer && alphaElectrons === betaElectrons && Math.min(rankLimit, 2 * ofOneSpin) === 2;
}

/** Full CI of one alpha and one beta electron, whose fast form is `prepareTwoElectronProduct`, over the integrals as they stand. */
export function isTwoElectrons(
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
  spinsDiffer: boolean,
): boolean {
  return !spinsDiffer && alphaElectrons === 1 && betaElectrons === 1 && rankLimit >= 2;
}

/** Matrices over orbitals that `prepareTwoElectronProduct` takes. */
const TWO_ELECTRON_MATRICES = 10;

/** Numbers in the tables of `prepareClosedShellProduct` and in the room for one product, without symmetry. */
function amplitudeNumbers(orbitalCount: number, holes: number): number {
  const particles = orbitalCount - holes;
  const singles = holes * particles;
  const [ofHoles, ofParticles] = [holes, particles].map((count) => [
    (count * (count + 1)) / 2,
    (count * (count - 1)) / 2,
  ]);
  const among = (pairs: readonly number[]) => pairs[0] ** 2 + pairs[1] ** 2;
  const tables =
    among(ofHoles) + among(ofParticles) + 2 * singles ** 2 + singles * (holes ** 2 + particles ** 2);
  // seven matrices over singles; amplitudes and results over pairs, those of one spin once more
  const room =
    7 * singles ** 2 + 2 * (ofHoles[0] * (ofParticles[0] + ofParticles[1]) + ofHoles[1] * ofParticles[1]);
  return tables + room;
}

/** Per replacement: two orders of a pair or target, a source and a sign; in kernels' lists eight bytes and sixteen. */
const BYTES_PER_REPLACEMENT = 2 * (4 + 4 + 1) + 8 + 16;
/** Column and value, twice while the lists are cut to length, and once in kernels' lists. */
const BYTES_PER_SAME_SPIN_ENTRY = 3 * (4 + 8);
/** In kernels' lists, where the entries of a string stand. */
const BYTES_PER_STRING = 4 * (4 + 8 * 4);
/** Vectors beside the eigensolver's, in which products are formed in place: the diagonal, whole and by sectors. */
export const WORKING_VECTORS = 2;

/**
 * Upper bound of the memory that `solveConfigurationInteraction` takes, in bytes; integrals not included. Within the
 * limit as far as that can be: with few vectors, the eigensolver takes longer.
 *
 * @param spinsDiffer - beta electrons have orbitals of their own
 */
export function configurationInteractionBytes(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
  states: number,
  spinsDiffer = false,
  memoryLimit = Number.POSITIVE_INFINITY,
): number {
  const determinants = countDeterminants(orbitalCount, alphaElectrons, betaElectrons, rankLimit);
  const lists = listBytes(orbitalCount, alphaElectrons, betaElectrons, rankLimit, spinsDiffer);
  // a sector may be short enough for more vectors
  const numbers = [determinants, Math.min(determinants, LARGE)].map(
    (length) => length * davidsonVectorCount(basisVectorLimit(states, length)),
  );
  const useful = lists + 8 * (Math.max(...numbers) + WORKING_VECTORS * determinants);
  if (useful <= memoryLimit) return useful;
  const vectors = (memoryLimit - lists) / (8 * determinants) - WORKING_VECTORS;
  const held = vectorsHeld(states, determinants, basisVectorsWithin(vectors, states, determinants));
  return Math.min(useful, lists + 8 * (held + WORKING_VECTORS) * determinants);
}

/** Of the lists that describe strings and the Hamiltonian, in bytes. */
export function listBytes(
  orbitalCount: number,
  alphaElectrons: number,
  betaElectrons: number,
  rankLimit: number,
  spinsDiffer: boolean,
): number {
  const determinants = countDeterminants(orbitalCount, alphaElectrons, betaElectrons, rankLimit);
  const isFast = kernelForm() === 'fast';
  const matrix = determinants <= FEW_DETERMINANTS ? 8 * determinants ** 2 : 0;
  if (isFast && isTwoElectrons(alphaElectrons, betaElectrons, rankLimit, spinsDiffer)) {
    return matrix + 8 * TWO_ELECTRON_MATRICES * determinants;
  }
  const spins =
    alphaElectrons === betaElectrons && !spinsDiffer ? [alphaElectrons] : [alphaElectrons, betaElectrons];
  const pairs = (orbitalCount * (orbitalCount + 1)) / 2;
  const byAmplitudes =
    isFast && goesByAmplitudes(orbitalCount, alphaElectrons, betaElectrons, rankLimit, spinsDiffer);
  // for lists over determinants, integrals stand in the kernels' memory with both signs
  let bytes =
    matrix + (byAmplitudes ? 8 * amplitudeNumbers(orbitalCount, alphaElectrons) : 16 * pairs * pairs);
  for (const electrons of spins) {
    const virtuals = orbitalCount - electrons;
    const strings = countStrings(orbitalCount, electrons, rankLimit).map(Number);
    const count = strings.reduce((sum, ofRank) => sum + ofRank, 0);
    bytes += count * (4 * wordsOf(orbitalCount) + 4 * orbitalCount + BYTES_PER_STRING);
    if (byAmplitudes) continue;
    bytes += BYTES_PER_REPLACEMENT * countSingleReplacements(electrons, virtuals, strings);
    bytes += BYTES_PER_SAME_SPIN_ENTRY * countSameSpinEntries(electrons, virtuals, strings);
  }
  return bytes;
}
