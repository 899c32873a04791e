import { describe, expect, it } from 'vitest';
import { computePoint, findLevelMinimum, studyCautions } from '#engine';
import { atom, prepare, study } from '../../support/studies';

const bond = (values: readonly number[]) => ({ scan: { coordinate: { bonds: [[0, 1]] }, values } }) as const;
const H2 = [atom('H'), atom('H', 0, 0, 1.4)];

function codesOf(...[atoms, changes]: Parameters<typeof study>) {
  const prepared = prepare(study(atoms, changes));
  const points = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate).result);
  const findings = Object.fromEntries(
    prepared.study.levels.map((level) => [level, findLevelMinimum(prepared, level, points)]),
  );
  return studyCautions(prepared, points, [], findings)
    .filter(({ code }) => /^(limit|range|sizeConsistency|minimum|depth|safety)/.test(code))
    .map(({ code, level }) => (level ? `${code} ${level}` : code));
}

describe('studyCautions of whole curves', () => {
  it('identity: RHF of H2 tends to a wrong limit, full CI does not', () => {
    const levels = ['RHF', 'FCI'];
    expect(codesOf(H2, { levels, ...bond([1, 1.2, 1.4, 1.6, 2, 4, 12]) })).toEqual([
      'limit.wrong RHF',
      'range.shortForLevels RHF',
      'range.shortForLevels FCI',
      'depth.fragments',
      'safety.measuredData',
    ]);
  });

  it('identity: a curve that ends while it still binds is too short', () => {
    expect(codesOf(H2, { levels: ['FCI'], ...bond([1, 1.2, 1.4, 1.6, 2, 2.5]) })).toEqual([
      'range.short FCI',
      'range.shortForLevels FCI',
      'depth.fragments',
      'safety.measuredData',
    ]);
  });

  it('identity: a curve without its minimum has it at the edge', () => {
    expect(codesOf(H2, { levels: ['FCI'], ...bond([2, 3, 4]) })).toEqual(['minimum.atEdge FCI']);
  });

  it('identity: CISD of N2 is not size-consistent', () => {
    const atoms = [atom('N'), atom('N', 0, 0, 2.1)];
    const values = [1.9, 2, 2.1, 2.2, 2.3, 2.5, 4, 8];
    expect(codesOf(atoms, { levels: ['CISD'], frozenCore: true, ...bond(values) })).toEqual([
      'sizeConsistency.large CISD',
      'depth.fragments',
      'safety.measuredData',
    ]);
  }, 60_000);
});
