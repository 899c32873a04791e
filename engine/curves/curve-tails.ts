/** A computed point of a curve. */
export interface EnergyPoint {
  /** bohr */
  readonly distance: number;
  /** hartree */
  readonly energy: number;
}

/** How a curve goes on inside its first point. */
export interface InnerTail {
  /**
   * `repulsion`: A + B/r through the first two points, the form that nuclear repulsion gives a curve towards the
   * united atom; `constant`: the first energy, where the curve does not rise inwards
   */
  readonly form: 'repulsion' | 'constant';
  readonly energyAt: (distance: number) => number;
}

/** How a curve goes on beyond its last point. */
export interface OuterTail {
  /**
   * `inversePower`: limit + C/r^n; `exponential`: limit + A·exp(−br), both through the last two points; `constant`:
   * the last energy, where no limit is given or the last points do not approach it
   */
  readonly form: 'inversePower' | 'exponential' | 'constant';
  /** n, or b in bohr⁻¹; undefined for `constant` */
  readonly rate: number | undefined;
  /** energy at infinite distance, hartree */
  readonly limit: number;
  /**
   * given limit minus the last energy where the curve does not approach that limit (it is not this curve's: a
   * size-consistency error, or wrong fragments), hartree; 0 otherwise
   */
  readonly limitMissedBy: number;
  readonly energyAt: (distance: number) => number;
}

/** @param points - by rising distance, at least two */
export function innerTail(points: readonly EnergyPoint[]): InnerTail {
  const [first, second] = points;
  const strength = (first.energy - second.energy) / (1 / first.distance - 1 / second.distance);
  if (!(strength > 0)) return { form: 'constant', energyAt: () => first.energy };
  return {
    form: 'repulsion',
    energyAt: (r) => first.energy + strength * (1 / r - 1 / first.distance),
  };
}

/**
 * Of the two forms the one that better predicts the third last point is taken: dispersion and induction fall as inverse
 * powers, while a small basis or RHF may leave only overlap, which falls exponentially.
 *
 * @param points - by rising distance, at least three
 * @param limit - hartree; absent: the last energy
 */
export function outerTail(points: readonly EnergyPoint[], limit?: number): OuterTail {
  const [third, second, last] = points.slice(-3);
  const constant = (missedBy: number): OuterTail => ({
    form: 'constant',
    rate: undefined,
    limit: last.energy,
    limitMissedBy: missedBy,
    energyAt: () => last.energy,
  });
  if (limit === undefined) return constant(0);
  const gap = last.energy - limit;
  const quotient = (second.energy - limit) / gap;
  // the gap must shrink outwards and keep its sign
  if (!(quotient > 1)) return constant(limit - last.energy);

  const power = Math.log(quotient) / Math.log(last.distance / second.distance);
  const decay = Math.log(quotient) / (last.distance - second.distance);
  const forms = [
    {
      form: 'inversePower',
      rate: power,
      energyAt: (r: number) => limit + gap * (last.distance / r) ** power,
    },
    {
      form: 'exponential',
      rate: decay,
      energyAt: (r: number) => limit + gap * Math.exp(-decay * (r - last.distance)),
    },
  ] as const;
  const miss = (tail: (typeof forms)[number]) => Math.abs(tail.energyAt(third.distance) - third.energy);
  const [inverse, exponential] = forms;
  const better = miss(inverse) <= miss(exponential) ? inverse : exponential;
  return { ...better, limit, limitMissedBy: 0 };
}
