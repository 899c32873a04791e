import { expect, it } from 'vitest';
import { pointsJson } from '../../../app/report/points-json';
import { hartreeFock, sampleResults } from '../../support/sample-results';

it('has every energy with all its digits, under the names of the CSV, and null for what did not converge', () => {
  const results = sampleResults();
  const [first, ...others] = results.points;
  const levels = { ...first!.levels, RHF: hartreeFock(-1, { converged: false }) };
  const read = JSON.parse(pointsJson({ ...results, points: [{ ...first!, levels }, ...others] }));
  expect(read).toMatchObject({
    format: 'farwell/points',
    version: 1,
    coordinate: { name: 'H–H distance', unit: 'angstrom' },
    energyUnit: 'hartree',
  });
  expect(read.points).toHaveLength(37);
  const full = first!.levels.FCI;
  if (full?.kind !== 'correlated') throw new Error('sample changed');
  expect(read.points[0]).toMatchObject({
    coordinate: 0.4,
    energies: { RHF: null, FCI: full.energy },
    correlationEnergies: { FCI: full.correlation },
  });
  expect(Object.keys(read.points[0].correlationEnergies)).toEqual(['CISD', 'FCI']);
});
