import { describe, expect, it } from 'vitest';
import { planFigure } from '../../../app/report/figure-plan';
import { withSpectroscopy } from '../../support/reports';
import { hartreeFock, sampleResults } from '../../support/sample-results';

const plannedOf = (...args: Parameters<typeof planFigure>) => {
  const planned = planFigure(...args);
  if (!('plan' in planned)) throw new Error(planned.reason);
  return planned.plan;
};

describe('planFigure', () => {
  it('draws every level above and the correlated ones below', () => {
    const plan = plannedOf([sampleResults()], ['h2']);
    expect(plan.energies.curves).toHaveLength(3);
    expect(plan.correlation?.curves).toHaveLength(2);
    expect(plan.legend.map(({ label }) => label)).toEqual(['RHF', 'CISD', 'FCI']);
    expect(plan.coordinateTitle).toBe('H–H distance (Å)');
  });

  it('gives CIS no place among the correlation energies, and no markers', () => {
    const plan = plannedOf([sampleResults(['RHF', 'CIS'])], ['h2']);
    expect(plan.correlation).toBeUndefined();
    expect(plan.legend.map(({ label }) => label)).toEqual(['RHF', 'CIS singlets', 'CIS triplets']);
    const excited = plan.energies.curves.filter((curve) => curve.isExcited);
    expect(excited.map(({ marked }) => marked.length)).toEqual([0, 0]);
    expect(excited[0]?.style.dash).not.toEqual(excited[1]?.style.dash);
  });

  it('sees to it that no two levels look alike in grey', () => {
    const levels = ['RHF', 'CISD', 'CISDT', 'CISDTQ', 'FCI'];
    const sample = sampleResults();
    const full = sample.points.map((point) => ({
      ...point,
      levels: { ...point.levels, CISDT: point.levels.CISD!, CISDTQ: point.levels.CISD! },
    }));
    const plan = plannedOf([{ ...sample, study: { ...sample.study, levels }, points: full }], ['h2']);
    const looks = plan.legend.map(({ style }) => `${style.shape} ${style.dash}`);
    expect(new Set(looks).size).toBe(levels.length);
  });

  it('keeps an unconverged point as a point, without a marker, and says what its cross means', () => {
    const sample = sampleResults(['RHF', 'FCI']);
    const points = sample.points.map((point, index) =>
      index === 5
        ? { ...point, levels: { ...point.levels, RHF: hartreeFock(-99, { converged: false }) } }
        : point,
    );
    const plan = plannedOf([{ ...sample, points }], ['h2']);
    const [rhf] = plan.energies.curves;
    expect(rhf?.points.filter((point) => !point.converged)).toEqual([{ x: 0.9, y: -99, converged: false }]);
    expect(rhf?.marked.every(({ converged }) => converged)).toBe(true);
    expect(plan.energies.range[0]).toBeGreaterThan(-2);
    expect(plan.key.join(' ')).toContain('not converged');
  });

  it('marks the minima that the findings have, on the curve they belong to', () => {
    const plan = plannedOf([sampleResults()], ['h2']);
    const minima = plan.energies.curves.map(({ minimum }) => minimum?.x);
    expect(minima).toEqual([undefined, undefined, 0.74]);
    expect(plan.correlation?.curves.every(({ minimum }) => minimum === undefined)).toBe(true);
  });

  it('draws every curve through its minimum, which a coarse scan would miss, without a marker there', () => {
    const full = plannedOf([withSpectroscopy(3)], ['h2']).energies.curves[0]!;
    expect(full.points).toContainEqual({ x: 0.74, y: full.minimum?.y, converged: true });
    expect(full.marked.map(({ x }) => x)).not.toContain(0.74);
  });

  it('draws vibrational levels between the two branches of their curve', () => {
    const plan = plannedOf([withSpectroscopy(5)], ['h2']);
    const { lines = [], every } = plan.levels ?? {};
    expect([lines.length, every]).toEqual([5, 1]);
    for (const [index, { from, to, y }] of lines.entries()) {
      expect(from).toBeLessThan(0.74);
      expect(to).toBeGreaterThan(0.74);
      expect(y).toBeGreaterThan(lines[index - 1]?.y ?? plan.energies.curves[0]!.minimum!.y);
    }
    expect(plan.key).toContain('Thin lines: the vibrational levels of FCI.');
    expect(plannedOf([withSpectroscopy(5), sampleResults()], ['a', 'b']).levels).toBeUndefined();
  });

  it('lets the repulsive wall leave the frame rather than flatten the well', () => {
    const sample = sampleResults(['RHF']);
    const wall = { ...sample.points[0]!, coordinate: 0.05, levels: { RHF: hartreeFock(12) } };
    const plan = plannedOf([{ ...sample, points: [wall, ...sample.points] }], ['h2']);
    expect(plan.energies.range[1]).toBeLessThan(0);
    expect(plan.coordinateRange[0]).toBeLessThan(0.05);
  });

  it('compares different molecules above their minima, and the same molecule absolutely', () => {
    const first = sampleResults();
    const molecule = { ...first.study.molecule, charge: 1 };
    const other = { ...first, study: { ...first.study, molecule } };
    expect(plannedOf([first, first], ['a', 'b']).energies.title).toBe('Energy (hartree)');
    const compared = plannedOf([first, other], ['a', 'b']);
    expect(compared.energies.title).toBe('Energy above minimum (hartree)');
    for (const { points } of compared.energies.curves) {
      const lowest = Math.min(...points.map(({ y }) => y));
      expect(lowest).toBeGreaterThanOrEqual(0);
      expect(lowest).toBeLessThan(0.01);
    }
    expect(compared.legend.map(({ label }) => label)).toEqual(['a', 'b', 'RHF', 'CISD', 'FCI']);
  });

  it('has a reason instead of a plan for a single geometry', () => {
    const { scan, ...study } = sampleResults().study;
    expect(scan).toBeDefined();
    const single = {
      ...sampleResults(),
      study,
      points: [{ ...sampleResults().points[0]!, coordinate: null }],
    };
    expect(planFigure([single], ['h2'])).toEqual({ reason: 'A single geometry has no curve to draw.' });
  });

  it('draws a curve of one point, and one where nothing converged', () => {
    const sample = sampleResults(['RHF']);
    const onePoint = plannedOf([{ ...sample, points: sample.points.slice(0, 1) }], ['h2']);
    expect(onePoint.energies.range[1]).toBeGreaterThan(onePoint.energies.range[0]);
    const bad = sample.points.map((point) => ({
      ...point,
      levels: { RHF: hartreeFock(-1, { converged: false }) },
    }));
    const unconverged = plannedOf([{ ...sample, points: bad }], ['h2']);
    expect(unconverged.energies.range.every(Number.isFinite)).toBe(true);
  });
});
