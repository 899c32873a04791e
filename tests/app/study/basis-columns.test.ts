import { describe, expect, it } from 'vitest';
import { basisSetLimit, type StudyResults, studyInBasis } from '#engine';
import { pointsJson } from '../../../app/report/points-json';
import { basisColumns } from '../../../app/study/basis-columns';
import { studyCsv } from '../../../app/study/csv';
import { sampleResults } from '../../support/sample-results';

const own = sampleResults(['RHF', 'FCI']);
/** The sample, lower by a part of its correlation energy, as in a larger basis. */
const inBasis = (name: string, shift: number) => {
  const study = studyInBasis({ ...own, basis: { ...own.basis, name } });
  const levels = Object.entries(study.levels).map(([level, { energies, correlation }]) => [
    level,
    {
      energies: energies.map((energy) => energy! - shift * (correlation ? 2 : 1)),
      ...(correlation && { correlation: correlation.map((energy) => energy! - shift) }),
    },
  ]);
  return { ...study, levels: Object.fromEntries(levels) };
};
const furtherBases = [inBasis('cc-pVDZ', 0.01), inBasis('cc-pVTZ', 0.02), inBasis('mine, "2"', 0.03)];
const limit = basisSetLimit(furtherBases);
const results: StudyResults = { ...own, furtherBases, basisSetLimit: limit };

describe('basisColumns', () => {
  it('has every level in every further basis, and in their limit with its uncertainty', () => {
    expect(basisColumns(results).map(({ label }) => label)).toEqual([
      ...['cc-pVDZ', 'cc-pVTZ', 'mine, "2"'].flatMap((name) => [`RHF/${name}`, `FCI/${name}`]),
      'RHF/limit',
      'FCI/limit',
    ]);
    expect(basisColumns(own)).toEqual([]);
  });

  it('tells sets of one name apart', () => {
    const twice = { ...own, furtherBases: [inBasis(own.basis.name, 0.1), inBasis(own.basis.name, 0.2)] };
    expect(basisColumns(twice).map(({ label }) => label)).toContain(`FCI/${own.basis.name} (3)`);
  });

  it('loses no digit of an energy in CSV and JSON', () => {
    if (limit.kind !== 'found') throw new Error(limit.reason);
    const [header = '', ...rows] = studyCsv(results).split('\r\n');
    expect(header).toBe(
      'coordinate,RHF,FCI,RHF/cc-pVDZ,FCI/cc-pVDZ,RHF/cc-pVTZ,FCI/cc-pVTZ,"RHF/mine, ""2""","FCI/mine, ""2""",' +
        'RHF/limit,RHF/limit ±,FCI/limit,FCI/limit ±',
    );
    const { points } = JSON.parse(pointsJson(results));
    expect(points).toHaveLength(own.points.length);
    for (const [index, point] of points.entries()) {
      const cells = rows[index]!.split(',').map(Number);
      const energies = furtherBases.flatMap(({ levels }) => [
        levels.RHF!.energies[index],
        levels.FCI!.energies[index],
      ]);
      expect(cells.slice(3, 9)).toEqual(energies);
      const { value, uncertainty } = limit.levels.FCI!.energies[index]!;
      expect(cells.slice(-2)).toEqual([value, uncertainty]);
      expect(point.energies).toMatchObject({ 'FCI/cc-pVTZ': energies[3], 'FCI/limit': value });
      expect(point.correlationEnergies['FCI/cc-pVDZ']).toBe(furtherBases[0]!.levels.FCI!.correlation![index]);
      expect(point.uncertainties['FCI/limit']).toBe(uncertainty);
    }
  });
});
