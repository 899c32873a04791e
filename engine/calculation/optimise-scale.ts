import type { BasisSet } from '../basis/basis-set';
import { placeBasis } from '../basis/place-basis';
import type { ScalableBasis, ScaleFactors } from '../basis/scalable-basis';
import { STANDARD_SCALE_FACTORS } from '../basis/scale-factors';
import type { SlaterShell } from '../basis/slater-fit';
import type { Molecule } from '../molecule/molecule';
import { determinantEnergy } from '../self-consistent-field/determinant-energy';
import type { RunControl } from '../termination';
import { carryOf, type OccupiedOrbitals, type PointCarry, solveMeanFields } from './mean-fields';
import { molecularIntegrals } from './molecular-integrals';
import type { PreparedStudy } from './prepare-study';
import { minimiseQuasiNewton, type SmoothFunction } from './quasi-newton';
import type { ScaleOptimisation } from './result';

/*
 * Slater exponents of lowest Hartree–Fock energy. The variables are the logarithms of the factors, one for every
 * element and shell: atoms of one element, ghosts too, share theirs.
 */

/** Largest derivative dE/d(ln ζ), hartree; in an atom of kinetic energy T this keeps −V/T − 2 below 1e-7/T. */
const GRADIENT_TOLERANCE = 1e-7;
const ITERATIONS = 80;
/** In ln ζ. */
const LONGEST_STEP = 0.2;
/**
 * Spacing of the differences in ln ζ. Their error h⁴E⁽⁵⁾/30, with E⁽⁵⁾ ≈ 30 times the kinetic energy, and rounding,
 * 1e-15·E/h, both stay below the tolerance for the cores up to argon.
 */
const DIFFERENCE_STEP = 4e-3;
/**
 * Changes of single factors that are tried before the search: a function far from all electrons has no slope to
 * follow, however much it could lower the energy.
 */
const PROBES = [0.25, 0.5, 2];
/** Starts whose energies differ by less, hartree, are as good as each other. */
const DISTINCT_ENERGY = 1e-9;
/** Relative rounding noise of a converged energy. */
const ENERGY_NOISE = 1e-13;
/** A factor this many times larger or smaller than the standard one no longer describes its shell. */
export const SCALE_LIMIT = 12;

export interface OptimisedScale {
  readonly factors: ScaleFactors;
  readonly basisSet: BasisSet;
  readonly outcome: ScaleOptimisation;
  /** orbitals at the optimum, with its factors */
  readonly carry: PointCarry;
}

/**
 * Finds the factors of lowest energy of UHF where the study has that level, else of RHF (open shells: ROHF). The
 * search starts from whatever is lowest of the study's factors, the same with one of them changed much, and the
 * factors of a neighbouring point. It ends in the minimum next to that start: a lower one, in which a valence shell
 * has become one of the core, may exist elsewhere (LiH has one).
 *
 * Since the energy is stationary in the orbitals, its first derivative needs no new orbitals: they are carried to
 * the displaced factors and made orthonormal again.
 */
export function optimiseScale(
  prepared: PreparedStudy,
  scalable: ScalableBasis,
  molecule: Molecule,
  guess: PointCarry | undefined,
  control: RunControl,
): OptimisedScale {
  const energy = new ScaledEnergy(prepared, scalable, molecule, guess, control);
  const given = energy.logarithms(scalable.start);
  const carried = guess?.scaleFactors && energy.logarithms(guess.scaleFactors);
  const probes = given.flatMap((_, i) =>
    PROBES.map((factor) => given.map((value, j) => (j === i ? value + Math.log(factor) : value))),
  );
  const start = [given, ...probes, ...(carried ? [carried] : [])].reduce((best, x) =>
    energy.value(x) < energy.value(best) - DISTINCT_ENERGY ? x : best,
  );
  const centre = energy.logarithms(STANDARD_SCALE_FACTORS);
  const reach = Math.log(SCALE_LIMIT);
  const lowest = centre.map((value, i) => Math.min(value - reach, given[i]));
  const highest = centre.map((value, i) => Math.max(value + reach, given[i]));
  const { x, residual, iterations, termination } = minimiseQuasiNewton(energy, start, {
    gradientTolerance: GRADIENT_TOLERANCE,
    maximumIterations: ITERATIONS,
    longestStep: LONGEST_STEP,
    noise: ENERGY_NOISE,
    lowest,
    highest,
    control,
    stage: 'scale factors',
  });
  const atLimit = energy.shells.filter((_, i) => x[i] <= lowest[i] || x[i] >= highest[i]);
  const factors = energy.factors(x);
  return {
    factors,
    basisSet: scalable.with(factors),
    outcome: {
      level: energy.level,
      converged: termination.kind === 'converged' && atLimit.length === 0,
      termination,
      iterations,
      residual,
      ...(atLimit.length > 0 && { atLimit: atLimit.map(({ symbol, shell }) => `${symbol} ${shell}`) }),
    },
    carry: { ...energy.carry, scaleFactors: factors },
  };
}

interface ScaledShell {
  readonly symbol: string;
  readonly shell: SlaterShell;
}

/** Hartree–Fock energy as a function of ln ζ. Each evaluation starts from the orbitals of the one before. */
class ScaledEnergy implements SmoothFunction {
  readonly shells: readonly ScaledShell[];
  readonly level: ScaleOptimisation['level'];
  carry: PointCarry;
  private readonly orbitals = new Map<string, { energy: number; occupied: OccupiedOrbitals | undefined }>();

  constructor(
    private readonly prepared: PreparedStudy,
    private readonly scalable: ScalableBasis,
    private readonly molecule: Molecule,
    guess: PointCarry | undefined,
    private readonly control: RunControl,
  ) {
    this.shells = Object.entries(scalable.start).flatMap(([symbol, factors]) =>
      (Object.keys(factors) as SlaterShell[]).map((shell) => ({ symbol, shell })),
    );
    const unrestricted = prepared.levels.some((level) => level.name === 'UHF');
    this.level = unrestricted ? 'UHF' : molecule.multiplicity === 1 ? 'RHF' : 'ROHF';
    this.carry = guess ?? {};
  }

  logarithms(factors: ScaleFactors): number[] {
    return this.shells.map(({ symbol, shell }) => Math.log(factors[symbol][shell]!));
  }

  factors(x: readonly number[]): ScaleFactors {
    const factors: Record<string, Partial<Record<SlaterShell, number>>> = {};
    for (const [i, { symbol, shell }] of this.shells.entries()) {
      factors[symbol] = { ...factors[symbol], [shell]: Math.exp(x[i]) };
    }
    return factors;
  }

  value(x: readonly number[]): number {
    return this.solve(x).energy;
  }

  derivatives(x: readonly number[]) {
    const { energy, occupied } = this.solve(x);
    if (!occupied) return { gradient: x.map(() => Number.NaN), curvature: x.map(() => 1) };
    const h = DIFFERENCE_STEP;
    const gradient: number[] = [];
    const curvature: number[] = [];
    for (const i of x.keys()) {
      const [below2, below, above, above2] = [-2, -1, 1, 2].map((steps) =>
        this.carriedEnergy(
          x.map((value, j) => (j === i ? value + steps * h : value)),
          occupied,
        ),
      );
      gradient.push((8 * (above - below) - (above2 - below2)) / (12 * h));
      curvature.push((above - 2 * energy + below) / (h * h));
    }
    return { gradient, curvature };
  }

  private problemAt(x: readonly number[]) {
    const basis = placeBasis(this.scalable.with(this.factors(x)), this.molecule);
    return { basis, problem: molecularIntegrals(this.molecule, basis).problem };
  }

  private solve(x: readonly number[]) {
    const known = this.orbitals.get(x.join());
    if (known) return known;
    const { basis, problem } = this.problemAt(x);
    const levels = this.prepared.levels.filter((level) => level.name === this.level);
    const fields = solveMeanFields(
      this.prepared,
      this.molecule,
      basis,
      problem,
      levels,
      this.carry,
      this.control,
    );
    const carry = carryOf(this.prepared, fields);
    const occupied = this.level === 'UHF' ? carry?.unrestricted : carry?.restricted;
    const { energy } = this.level === 'UHF' ? fields.unrestricted! : fields.reference;
    if (occupied) this.carry = { ...this.carry, ...carry };
    // an energy that has not converged would steer the search
    const solved = { energy: occupied ? energy : Number.POSITIVE_INFINITY, occupied };
    this.orbitals.set(x.join(), solved);
    return solved;
  }

  /** Energy at x of orbitals found nearby. */
  private carriedEnergy(x: readonly number[], occupied: OccupiedOrbitals): number {
    const energy = determinantEnergy(this.problemAt(x).problem, { kind: 'occupiedOrbitals', ...occupied });
    return energy ?? Number.NaN;
  }
}
