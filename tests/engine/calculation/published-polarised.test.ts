import { describe, expect, it } from 'vitest';
import { POLARISED_631_ENERGIES } from '../../reference-data/szabo-ostlund';
import { STANDARD_GEOMETRIES } from '../../support/standard-geometries';
import { compute, hartreeFock, study } from '../../support/studies';

describe('RHF with polarisation functions at the standard geometries', () => {
  it.each(POLARISED_631_ENERGIES)('published: $system, $basis, total energy', ({ basis, ...row }) => {
    const geometry = STANDARD_GEOMETRIES[row.system];
    if (!geometry) throw new Error(`no standard geometry of ${row.system}`);
    const result = hartreeFock(compute(study(geometry.atoms, { basis })));
    expect(result.converged).toBe(true);
    expect(result.energy).toMatchPublished(row);
  });
});
