import { describe, expect, it } from 'vitest';
import type { PointResult, SinglesResult } from '#engine';
import {
  type CurveOptions,
  correlationCurves,
  energyCurves,
  positions,
} from '../../../../app/renderer/charts/curves';
import { HARTREE_IN_EV } from '../../../../engine/constants';
import { sampleResults } from '../../../support/sample-results';

const { study, points } = sampleResults(['RHF', 'CIS', 'CISD', 'FCI']);
const asComputed: CurveOptions = {
  energyUnit: 'hartree',
  energyReference: 'absolute',
  lengthUnit: 'angstrom',
};
const curveOf = (label: string, options: Partial<CurveOptions> = {}, of: typeof points = points) =>
  energyCurves(study, of, { ...asComputed, ...options }).curves.find((curve) => curve.label === label)!;
const energy = (point: PointResult, level: string): number =>
  (point.levels[level] as { energy: number }).energy;

/** The level marked as not converged at one point. */
const unconvergedAt = (index: number, level: string): typeof points =>
  points.map((point, other) =>
    other === index
      ? {
          ...point,
          levels: { ...point.levels, [level]: { ...point.levels[level]!, converged: false } as never },
        }
      : point,
  );

describe('curves of a chart', () => {
  it('have the energies of the results, one entry a point', () => {
    expect(curveOf('FCI').values).toEqual(points.map((point) => energy(point, 'FCI')));
    expect(curveOf('CIS triplet 1').isExcited).toBe(true);
  });

  it('follow states where the whole scan is known', () => {
    const places = points.map((_, k) => (k < 20 ? 0 : 1));
    const curves = { CIS: [{ name: '1 ¹Σu⁺', states: places }] };
    const followed = curveOf('CIS 1 ¹Σu⁺', { curves });
    expect(followed.values).toEqual(
      points.map((point, k) => (point.levels.CIS as SinglesResult).states[places[k]!]!.energy),
    );
    expect(followed.isExcited).toBe(true);
    expect(curveOf('CIS triplet 1', { curves })).toBeUndefined();
  });

  it('have nothing where a point has not arrived', () => {
    const { curves } = energyCurves(study, [points[0], undefined, points[2]], asComputed);
    expect(curves[0]?.values.map((value) => value === null)).toEqual([false, true, false]);
  });

  it('touch zero at their own minimum, and at their far end', () => {
    expect(Math.min(...(curveOf('RHF', { energyReference: 'ownMinimum' }).values as number[]))).toBe(0);
    expect(curveOf('CISD', { energyReference: 'farEnd' }).values.at(-1)).toBe(0);
  });

  it('keep excitations when measured from a minimum: excited states share the ground state’s', () => {
    const above = curveOf('CIS singlet 1', { energyReference: 'ownMinimum', energyUnit: 'electronvolt' });
    const ground = curveOf('RHF', { energyReference: 'ownMinimum', energyUnit: 'electronvolt' });
    const point = points[5]!;
    const singlet = (point.levels.CIS as SinglesResult).states.find(({ spin }) => spin === 'singlet')!;
    expect(above.values[5]! - ground.values[5]!).toBeCloseTo(
      (singlet.energy - energy(point, 'RHF')) * HARTREE_IN_EV,
      10,
    );
  });

  it('take no minimum and no far end from points that have not converged', () => {
    const lowest = points.findIndex(
      (point) => energy(point, 'FCI') === Math.min(...points.map((other) => energy(other, 'FCI'))),
    );
    const values = curveOf('FCI', { energyReference: 'ownMinimum' }, unconvergedAt(lowest, 'FCI')).values;
    expect(values[lowest]).toBeLessThan(0);
    const farEnd = { ...asComputed, energyReference: 'farEnd' } as const;
    const { curves, missing } = energyCurves(study, unconvergedAt(points.length - 1, 'FCI'), farEnd);
    expect(curves.map(({ level }) => level)).not.toContain('FCI');
    expect(missing).toEqual([{ level: 'FCI', reason: 'its far end has not converged' }]);
  });

  it('of correlation are those of correlated levels alone: CIS has none', () => {
    const curves = correlationCurves(study, points, 'hartree');
    expect(curves.map(({ label }) => label)).toEqual(['CISD', 'FCI']);
    expect(curves[1]?.values[9]).toBeCloseTo(energy(points[9]!, 'FCI') - energy(points[9]!, 'RHF'), 12);
  });

  it('stand at the coordinates of the study, in the unit of the axis', () => {
    expect(positions(study, points, 'angstrom')[3]).toBe(points[3]?.coordinate);
    expect(positions(study, points, 'bohr')[3]).toBeCloseTo(points[3]!.coordinate! / 0.529177210544, 12);
    const angle = { ...study, scan: { coordinate: { angle: [1, 0, 2] as const }, values: [90] } };
    expect(positions(angle, [{ ...points[0]!, coordinate: 90 }], 'bohr')).toEqual([90]);
  });
});
