import { describe, expect, it } from 'vitest';
import type { PointResult, SpinName, StateSymmetry } from '#engine';
import { crossingCautions, stateCurves } from '../../../app/calculation/state-curves';
import { correlated, samplePoint } from '../../support/sample-results';

interface ModelState {
  readonly energy: number;
  readonly spin?: SpinName;
  readonly symmetry?: StateSymmetry;
}

function point(coordinate: number | null, states: readonly ModelState[]): PointResult {
  const [plain] = correlated(0, 0).states;
  const all = states.map((state) => ({ ...plain!, ...state })).sort((a, b) => a.energy - b.energy);
  return {
    ...samplePoint(1),
    coordinate,
    levels: { FCI: correlated(all[0]!.energy, 0, { states: all }) },
  };
}

const sigma = { irrep: 'Ag', term: { lambda: 0, inversion: 'g', reflection: '+' } } as const;
const pi = (irrep: string) => ({ irrep, term: { lambda: 1, inversion: 'u' } }) as const;
const crossing = [0, 1, 2, 3].map((x) =>
  point(x, [
    { energy: x, symmetry: sigma },
    { energy: 2.6 - x, symmetry: pi('B2u'), spin: 'triplet' },
    { energy: 2.6 - x, symmetry: pi('B3u'), spin: 'triplet' },
  ]),
);

describe('stateCurves', () => {
  it('names every curve so that no two names are the same, and says where its state stands', () => {
    expect(stateCurves(['RHF', 'FCI'], crossing)).toEqual({
      FCI: [
        { name: '1 ¹Σg⁺', states: [0, 0, 2, 2] },
        { name: '1 ³Πu (B₂u)', states: [1, 1, 0, 0] },
        { name: '1 ³Πu (B₃u)', states: [2, 2, 1, 1] },
      ],
    });
  });

  it('has nothing for levels that list no states', () => {
    expect(stateCurves(['RHF'], [samplePoint(1)])).toEqual({});
  });
});

describe('crossingCautions', () => {
  const cautionsOf = (points: readonly PointResult[]) =>
    crossingCautions(points, stateCurves(['FCI'], points));

  it('says between which points the lowest state gives way to which', () => {
    const [lowest] = cautionsOf(crossing);
    expect(lowest).toMatchObject({ code: 'state.crossing', level: 'FCI', range: [1, 2] });
    expect(lowest?.message).toContain(
      'Between 1 and 2 the lowest state of FCI changes from 1 ¹Σg⁺ to 1 ³Πu (B₂u)',
    );
  });

  it('says the same of points in another order', () => {
    const mixed = [2, 0, 3, 1].map((k) => crossing[k]!);
    expect(cautionsOf(mixed)).toEqual(cautionsOf(crossing));
  });

  it('says it too where the other state is not among those computed', () => {
    const lowestOnly = [0, 1, 2, 3].map((x) =>
      point(x, [x < 1.3 ? { energy: x, symmetry: sigma } : { energy: 2.6 - x, symmetry: { irrep: 'B1u' } }]),
    );
    expect(cautionsOf(lowestOnly)).toHaveLength(1);
    expect(cautionsOf(lowestOnly)[0]).toMatchObject({ range: [1, 2] });
  });

  it('names pairs of higher states that cross, with the whole range', () => {
    const above = [0, 1, 2, 3, 4].map((x) =>
      point(x, [
        { energy: -5, symmetry: sigma },
        { energy: x, spin: 'triplet' },
        { energy: 1.4, spin: 'singlet', symmetry: { irrep: 'B1u' } },
        { energy: 2.4, spin: 'singlet', symmetry: { irrep: 'B2g' } },
      ]),
    );
    const cautions = cautionsOf(above);
    expect(cautions).toHaveLength(1);
    expect(cautions[0]).toMatchObject({ code: 'state.crossing', range: [1, 3] });
    expect(cautions[0]?.message).toContain('1 ¹B₁u and triplet 1; 1 ¹B₂g and triplet 1');
  });

  it('says nothing of states that do not cross, are degenerate, did not converge, or of a single geometry', () => {
    expect(cautionsOf(crossing.slice(0, 2))).toEqual([]);
    const degenerate = [0, 1, 2].map((x) =>
      point(x, [
        { energy: 1e-9 * x, symmetry: sigma },
        { energy: 1e-9, symmetry: { irrep: 'B1u' } },
      ]),
    );
    expect(cautionsOf(degenerate)).toEqual([]);
    const unconverged = crossing.map(({ levels, ...rest }) => ({
      ...rest,
      levels: { FCI: { ...levels.FCI!, converged: false } as typeof levels.FCI & object },
    }));
    expect(cautionsOf(unconverged)).toEqual([]);
    expect(cautionsOf([point(null, [{ energy: 0 }, { energy: 1 }])])).toEqual([]);
  });
});
