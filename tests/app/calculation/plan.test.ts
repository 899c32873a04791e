import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { FinishedPoint } from '../../../app/calculation/messages';
import { planRuns, runLengthOf } from '../../../app/calculation/plan';
import { helium } from '../../support/end-to-end-studies';
import { prepare } from '../../support/studies';

const RUN_LENGTH = 4;

const finishedPoint = (index: number): FinishedPoint => ({
  result: { coordinate: index, atoms: [], nuclearRepulsion: 0, levels: {}, cautions: [] },
  carry: { restricted: { alpha: Float64Array.of(index), beta: Float64Array.of(index), energy: 0 } },
});
const finishedAt = (indices: readonly number[]) =>
  new Map(indices.map((index) => [index, finishedPoint(index)]));

describe('planRuns', () => {
  it('cuts a scan into runs of the same length, the last one shorter', () => {
    const runs = planRuns(2 * RUN_LENGTH + 1, new Map(), RUN_LENGTH);
    expect(runs.map(({ indices }) => indices.length)).toEqual([RUN_LENGTH, RUN_LENGTH, 1]);
    expect(runs.every(({ guess }) => guess === undefined)).toBe(true);
  });

  it('goes on inside a run from the orbitals of the last finished point', () => {
    const [run] = planRuns(RUN_LENGTH, finishedAt([0, 1]), RUN_LENGTH);
    expect(run?.indices[0]).toBe(2);
    expect(run?.guess?.restricted?.alpha).toEqual(Float64Array.of(1));
  });

  it('does not hand orbitals from one run to the next', () => {
    const [run] = planRuns(2 * RUN_LENGTH, finishedAt([...Array(RUN_LENGTH).keys()]), RUN_LENGTH);
    expect(run).toEqual({
      indices: Array.from({ length: RUN_LENGTH }, (_, i) => RUN_LENGTH + i),
      guess: undefined,
    });
  });

  it('leaves out nothing and repeats nothing, and each point has the same predecessor as in an unbroken run', () => {
    const scan = fc
      .integer({ min: 1, max: 40 })
      .chain((points) =>
        fc.tuple(
          fc.constant(points),
          fc.uniqueArray(fc.nat({ max: points - 1 })),
          fc.integer({ min: 1, max: 5 }),
        ),
      );
    fc.assert(
      fc.property(scan, ([points, finished, length]) => {
        const runs = planRuns(points, finishedAt(finished), length);
        const planned = runs.flatMap(({ indices }) => indices);
        expect([...planned, ...finished].sort((a, b) => a - b)).toEqual([...Array(points).keys()]);
        for (const { indices, guess } of runs) {
          indices.forEach((index, position) => {
            const predecessor = position === 0 ? guess?.restricted?.alpha[0] : indices[position - 1];
            expect(predecessor).toBe(index % length === 0 ? undefined : index - 1);
          });
        }
      }),
      { seed: 20261201 },
    );
  });
});

describe('runLengthOf', () => {
  it('makes all points independent, but not those whose basis is optimised', () => {
    expect(runLengthOf(prepare(helium))).toBe(1);
    const optimised = prepare({ ...helium, basis: { name: 'STO-3G', optimiseScale: true } });
    expect(runLengthOf(optimised)).toBeGreaterThan(1);
  });
});
