import { describe, expect, it } from 'vitest';
import {
  type CorrelatedState,
  computePoint,
  type FollowedState,
  followStates,
  type LeadingDeterminant,
  type PointResult,
  type SpinName,
  type StateSymmetry,
  type Study,
} from '#engine';
import { seededRandom } from '../../support/random';
import { correlated as correlatedResult, samplePoint } from '../../support/sample-results';
import { atom, prepare, study } from '../../support/studies';

interface ModelState {
  readonly energy: number;
  readonly spin?: SpinName;
  readonly symmetry?: StateSymmetry;
  /** amplitudes of the configurations 0 → 1, 0 → 2, … */
  readonly character?: readonly number[];
}

function modelState({ energy, spin = 'singlet', symmetry, character = [] }: ModelState): CorrelatedState {
  const leading = character.map(
    (coefficient, k): LeadingDeterminant => ({
      coefficient,
      weight: coefficient ** 2,
      alpha: [k + 1],
      beta: [k + 1],
    }),
  );
  const [plain] = correlatedResult(energy, 0).states;
  return { ...plain!, spin, leading, ...(symmetry && { symmetry }) };
}

function modelPoint(coordinate: number, states: readonly ModelState[]): PointResult {
  const all = states.map(modelState).sort((a, b) => a.energy - b.energy);
  return {
    ...samplePoint(1),
    coordinate,
    levels: { FCI: correlatedResult(all[0]!.energy, 0, { states: all }) },
  };
}

const grid = (from: number, to: number, count: number): number[] =>
  Array.from({ length: count }, (_, k) => from + ((to - from) * k) / (count - 1));

const scanOf = (coordinates: readonly number[], statesAt: (x: number) => readonly ModelState[]) =>
  coordinates.map((x) => modelPoint(x, statesAt(x)));

const statesOf = (point: PointResult, level: string): readonly { readonly energy: number }[] => {
  const result = point.levels[level];
  return result?.kind === 'correlated' || result?.kind === 'singles' ? result.states : [];
};

const energiesOf = (points: readonly PointResult[], { states }: FollowedState, level = 'FCI') =>
  states.map((place, k) => (place === null ? null : statesOf(points[k]!, level)[place]!.energy));

const followedEnergies = (points: readonly PointResult[]) =>
  followStates(points, 'FCI').map((curve) => energiesOf(points, curve));

/** Eigenpairs of [[x, v], [v, 1 − x]]. */
function coupled(x: number, v: number): readonly [ModelState, ModelState] {
  const angle = Math.atan2(2 * v, 2 * x - 1) / 2;
  const root = Math.hypot(x - 0.5, v);
  return [
    { energy: 0.5 - root, character: [Math.sin(angle), -Math.cos(angle)] },
    { energy: 0.5 + root, character: [Math.cos(angle), Math.sin(angle)] },
  ];
}

const A1 = { irrep: 'A1' };
const B1 = { irrep: 'B1' };
const coordinates = grid(0, 1, 12);

describe('followStates', () => {
  it('identity: states of different symmetry cross, each on its straight line', () => {
    const points = scanOf(coordinates, (x) => [
      { energy: x, symmetry: A1 },
      { energy: 1 - x, symmetry: B1 },
    ]);
    const [first, second] = followStates(points, 'FCI');
    expect(first).toMatchObject({ spin: 'singlet', symmetry: A1, number: 1 });
    expect(second).toMatchObject({ spin: 'singlet', symmetry: B1, number: 1 });
    expect(energiesOf(points, first!)).toEqual(coordinates);
    expect(energiesOf(points, second!)).toEqual(coordinates.map((x) => 1 - x));
  });

  it('identity: states of different spin cross too', () => {
    const points = scanOf(coordinates, (x) => [
      { energy: x, spin: 'triplet' },
      { energy: 1 - x, spin: 'singlet' },
    ]);
    expect(followStates(points, 'FCI').map(({ spin }) => spin)).toEqual(['singlet', 'triplet']);
    expect(followedEnergies(points)[1]).toEqual(coordinates);
  });

  it.each([0.2, 1e-3, 1e-7])(
    'identity: states of one symmetry keep their order however narrow the gap, ±%d',
    (v) => {
      const points = scanOf(coordinates, (x) => coupled(x, v).map((state) => ({ ...state, symmetry: A1 })));
      expect(followStates(points, 'FCI').map(({ states }) => states)).toEqual([
        coordinates.map(() => 0),
        coordinates.map(() => 1),
      ]);
    },
  );

  it('identity: without labels states that keep their determinants cross', () => {
    const points = scanOf(coordinates, (x) => [
      { energy: x, character: [0.9, 0.1, 0] },
      { energy: 1 - x, character: [0, 0.1, 0.95] },
      { energy: 0.3 + 0.2 * x * x, character: [0.1, -0.9, 0.1] },
    ]);
    const curves = followedEnergies(points);
    expect(curves).toHaveLength(3);
    expect(curves).toContainEqual(coordinates);
    expect(curves).toContainEqual(coordinates.map((x) => 1 - x));
    expect(curves).toContainEqual(coordinates.map((x) => 0.3 + 0.2 * x * x));
  });

  it('identity: without labels and determinants smooth energies are followed through a crossing', () => {
    const points = scanOf(coordinates, (x) => [{ energy: x + x * x }, { energy: 1 - x }]);
    expect(followedEnergies(points)).toContainEqual(coordinates.map((x) => x + x * x));
  });

  it('identity: without labels an avoided crossing that the points resolve keeps the order', () => {
    const fine = grid(0, 1, 41);
    const points = scanOf(fine, (x) => coupled(x, 0.2));
    expect(followStates(points, 'FCI').map(({ states }) => new Set(states).size)).toEqual([1, 1]);
  });

  it('identity: neither the order of states in the lists nor that of the points changes the curves', () => {
    const random = seededRandom(5);
    const terms = Array.from({ length: 12 }, () => [random(), random() - 0.5, random() - 0.5] as const);
    const lines = terms.map(([constant, slope, bend], k) => ({
      at: (x: number) => constant + slope * x + bend * x * x,
      spin: (['singlet', 'triplet'] as const)[k % 2]!,
      symmetry: k % 3 === 0 ? undefined : [A1, B1][(k >> 1) % 2],
      character: Array.from({ length: 12 }, (_, i) => (i === k ? 0.9 : 0.05 * Math.sin(i + 3 * k))),
    }));

    const points = scanOf(grid(0, 1, 25), (x) =>
      lines.map(({ at, spin, symmetry, character }) => ({
        energy: at(x),
        spin,
        character,
        ...(symmetry && { symmetry }),
      })),
    );
    const shuffled = points.map((point) => {
      const result = point.levels.FCI!;
      if (result.kind !== 'correlated') throw new Error('not a CI');
      const states = result.states
        .map((state) => ({ state, key: random() }))
        .sort((a, b) => a.key - b.key)
        .map(({ state }) => state);
      return { ...point, levels: { FCI: { ...result, states } } };
    });
    const plain = followedEnergies(points);
    expect(plain).toHaveLength(12);
    expect(followedEnergies(shuffled)).toEqual(plain);
    const order = points.map((_, k) => (7 * k + 3) % points.length);
    const mixed = followedEnergies(order.map((k) => points[k]!));
    expect(mixed).toEqual(plain.map((energies) => order.map((k) => energies[k]!)));
  });

  it('identity: a state that leaves those computed ends its curve, and one that enters begins its own', () => {
    const statesAt = (x: number): ModelState[] => [
      { energy: -1, symmetry: A1 },
      { energy: x, symmetry: B1, character: [1, 0, 0] },
      { energy: 1 - x, character: [0, 1, 0] },
    ];
    const points = scanOf(coordinates, (x) =>
      statesAt(x)
        .sort((a, b) => a.energy - b.energy)
        .slice(0, 2),
    );
    const curves = followStates(points, 'FCI');
    expect(curves.map(({ symmetry }) => symmetry)).toEqual([undefined, A1, B1]);
    expect(energiesOf(points, curves[0]!)).toEqual(coordinates.map((x) => (x > 0.5 ? 1 - x : null)));
    expect(energiesOf(points, curves[2]!)).toEqual(coordinates.map((x) => (x < 0.5 ? x : null)));
  });

  it('identity: the highest of a symmetry leaves and comes back as the same curve', () => {
    const points = coordinates.map((x, k) =>
      modelPoint(x, [
        { energy: 0, symmetry: A1 },
        ...(k > 3 && k < 7 ? [] : [{ energy: 1 + 0.1 * x, symmetry: A1 }]),
      ]),
    );
    const curves = followedEnergies(points);
    expect(curves).toHaveLength(2);
    expect(curves[1]).toEqual(coordinates.map((x, k) => (k > 3 && k < 7 ? null : 1 + 0.1 * x)));
  });

  it('identity: the partners of a degenerate pair stay apart, whichever is the lower by rounding', () => {
    const random = seededRandom(3);
    const pi = (irrep: string) => ({ irrep, term: { lambda: 1, inversion: 'u' } }) as const;
    const points = scanOf(coordinates, (x) =>
      ['B2u', 'B3u'].map((irrep) => ({ energy: x + 1e-12 * random(), symmetry: pi(irrep) })),
    );
    for (const { symmetry, states } of followStates(points, 'FCI')) {
      const irreps = states.map((place, k) => {
        const result = points[k]!.levels.FCI!;
        return result.kind === 'correlated' ? result.states[place!]!.symmetry?.irrep : undefined;
      });
      expect(new Set(irreps)).toEqual(new Set([symmetry!.irrep]));
    }
  });

  it('identity: a point without labels, or of another point group, takes part in the curves of its neighbours', () => {
    const model = (x: number): ModelState[] => [
      { energy: x, symmetry: A1, character: [1, 0] },
      { energy: 1 - x, symmetry: B1, character: [0, 1] },
    ];
    const bare = ({ symmetry: _, ...state }: ModelState): ModelState => state;
    const other = { irrep: 'Ag' };
    for (const k of [0, 5, 6, 11]) {
      const points = scanOf(coordinates, model).map((point, index) =>
        index === k ? modelPoint(coordinates[k]!, model(coordinates[k]!).map(bare)) : point,
      );
      expect(followedEnergies(points)).toEqual([coordinates, coordinates.map((x) => 1 - x)]);
      const higher = points.map((point, index) =>
        index === k
          ? {
              ...modelPoint(
                coordinates[k]!,
                model(coordinates[k]!).map((state) => ({ ...state, symmetry: other })),
              ),
              symmetry: { pointGroup: 'D2h' as const },
            }
          : point,
      );
      expect(followedEnergies(higher)).toEqual([coordinates, coordinates.map((x) => 1 - x)]);
    }
  });

  it('identity: a single point gives one curve a state, a level without states none', () => {
    const points = [modelPoint(1, [{ energy: 0 }, { energy: 1, spin: 'triplet' }, { energy: 2 }])];
    expect(followStates(points, 'FCI')).toEqual([
      { spin: 'singlet', number: 1, states: [0] },
      { spin: 'singlet', number: 2, states: [2] },
      { spin: 'triplet', number: 1, states: [1] },
    ]);
    expect(followStates(points, 'RHF')).toEqual([]);
    expect(followStates([samplePoint(1)], 'RHF')).toEqual([]);
    expect(followStates([], 'FCI')).toEqual([]);
  });

  it('identity: energies that are no numbers belong to no curve', () => {
    const points = scanOf(coordinates, (x) => [{ energy: x === 0 ? Number.NaN : x }, { energy: 2 }]);
    expect(
      followStates(points, 'FCI')
        .map(({ states }) => states.filter((place) => place === null).length)
        .sort(),
    ).toEqual([0, 1]);
  });
});

function scanned(request: Study): readonly PointResult[] {
  const prepared = prepare(request);
  return prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
}

/** Largest third difference along four neighbouring points of a curve. */
function roughness(energies: readonly (number | null)[]): number {
  const jumps = energies.slice(3).map((e3, k) => {
    const [e0, e1, e2] = energies.slice(k, k + 3);
    return e0 == null || e1 == null || e2 == null || e3 === null ? 0 : Math.abs(e3 - 3 * e2 + 3 * e1 - e0);
  });
  return Math.max(0, ...jumps);
}

const bonds = (
  from: number,
  to: number,
  count: number,
  scannedBonds: readonly (readonly [number, number])[] = [[0, 1]],
) => ({ scan: { coordinate: { bonds: scannedBonds }, from, to, count } });

/** The curves of real scans, as energies, beside the states in order of energy. */
function real(request: Study, level: string) {
  const points = scanned(request);
  const energies = (list: readonly PointResult[]) =>
    followStates(list, level).map((curve) => ({ ...curve, energies: energiesOf(list, curve, level) }));
  const byOrder = statesOf(points[0]!, level).map((_, k) =>
    points.map((point) => statesOf(point, level)[k]?.energy ?? null),
  );
  return { curves: energies(points), unlabelled: energies(points.map(withoutLabels)), byOrder };
}

function withoutLabels(point: PointResult): PointResult {
  const bare = <T extends { readonly symmetry?: StateSymmetry }>({ symmetry: _, ...state }: T) => state;
  const levels = Object.entries(point.levels).map(([name, result]): [string, typeof result] => {
    if (result.kind === 'correlated') return [name, { ...result, states: result.states.map(bare) }];
    if (result.kind === 'singles') return [name, { ...result, states: result.states.map(bare) }];
    return [name, result];
  });
  return { ...point, levels: Object.fromEntries(levels) };
}

const largest = (curves: readonly { readonly energies: readonly (number | null)[] }[]) =>
  Math.max(...curves.map(({ energies }) => roughness(energies)));
const texts = (curves: readonly { readonly energies: readonly (number | null)[] }[]) =>
  curves.map(({ energies }) => energies.join()).sort();

describe('followStates of real scans', () => {
  it.each([
    [
      'LiH, CIS',
      study([atom('Li'), atom('H', 0, 0, 3)], { levels: ['RHF', 'CIS'], states: 8, ...bonds(2, 8, 61) }),
      'CIS',
    ],
    [
      'BeH2, full CI',
      study([atom('Be'), atom('H', 0, 0, 2.5), atom('H', 0, 0, -2.5)], {
        levels: ['RHF', 'FCI'],
        states: 6,
        ...bonds(2, 4.4, 25, [
          [0, 1],
          [0, 2],
        ]),
      }),
      'FCI',
    ],
  ] as const)(
    'independent: %s – curves are smooth where states in order of energy have kinks, and overlap alone finds the same',
    (_, request, level) => {
      const { curves, unlabelled, byOrder } = real(request, level);
      expect(4 * largest(curves)).toBeLessThan(largest(byOrder.map((energies) => ({ energies }))));
      expect(texts(unlabelled)).toEqual(texts(curves));
    },
  );

  it('independent: H2, full CI – crossings are followed, and the avoided one of ¹Σg⁺ is not', () => {
    const request = study([atom('H'), atom('H', 0, 0, 2)], {
      basis: '6-31G',
      levels: ['RHF', 'FCI'],
      states: 8,
      ...bonds(1.4, 6, 47),
    });
    const { curves, unlabelled, byOrder } = real(request, 'FCI');
    const isAvoiding = ({ spin, symmetry, number }: FollowedState) =>
      spin === 'singlet' && symmetry?.irrep === 'Ag' && number > 1;
    const avoiding = curves.filter(isAvoiding);
    const others = curves.filter((curve) => !isAvoiding(curve));
    expect(avoiding).toHaveLength(2);
    expect(others).toHaveLength(6);
    expect(largest(others)).toBeLessThan(2.5e-3);
    expect(Math.min(...byOrder.slice(3).map(roughness))).toBeGreaterThan(5e-3);
    const [lower, upper] = avoiding;
    lower!.energies.forEach((energy, k) => {
      expect(energy!).toBeLessThan(upper!.energies[k]!);
    });
    // without labels the states keep their determinants through a gap narrower than the step
    expect(texts(unlabelled)).toEqual(expect.arrayContaining(texts(others)));
    expect(texts(unlabelled)).not.toEqual(texts(curves));
  });
});
