import { describe, expect, it } from 'vitest';
import { type CorrelatedResult, computePoint, type Study } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { molecularIntegrals } from '../../../engine/calculation/molecular-integrals';
import { wantsNaturalOrbitals } from '../../../engine/calculation/natural-orbitals';
import { congruence, dot, multiplyLeftTransposed } from '../../../engine/linear-algebra/dense';
import { atom, compute, correlated, prepare, study, waterAtoms } from '../../support/studies';

/** The density that natural orbitals and their occupations make, over the basis functions. */
function densityOf({ naturalOrbitals, naturalOccupations }: CorrelatedResult): Float64Array {
  const rows = naturalOrbitals!.coefficients;
  const flat = Float64Array.from(rows.flat());
  const scaled = Float64Array.from(
    rows.flatMap((row, k) => row.map((value) => value * naturalOccupations[k]!)),
  );
  return multiplyLeftTransposed(flat, scaled, rows[0]!.length, rows.length, rows[0]!.length);
}

const open = (atoms: Study['molecule']['atoms'], multiplicity: number, changes: Partial<Study>): Study => ({
  ...study(atoms, changes),
  molecule: { unit: 'bohr', atoms, multiplicity },
});
const CASES: readonly (readonly [string, Study])[] = [
  ['water', study(waterAtoms(2, 104), { levels: ['CISD'] })],
  ['frozen core', study(waterAtoms(2, 104), { levels: ['CISD'], frozenCore: true })],
  ['active orbitals', study(waterAtoms(2, 104), { levels: ['CISD'], active: { electrons: 4, orbitals: 4 } })],
  ['OH', open([atom('O'), atom('H', 0, 0, 2)], 2, { levels: ['CISD'] })],
  [
    'OH on UHF orbitals',
    open([atom('O'), atom('H', 0, 0, 2.6)], 2, {
      levels: ['CISD'],
      orbitals: 'unrestricted',
      frozenCore: true,
    }),
  ],
];

describe('naturalOrbitals', () => {
  it.each(CASES)(
    'identity: %s: orthonormal, and with their occupations the density of the state',
    (_, request) => {
      const prepared = prepare(request);
      const result = correlated(computePoint(prepared, null).result, 'CISD');
      const molecule = prepared.moleculeAt(null);
      const { problem, kinetic, dipole } = molecularIntegrals(
        molecule,
        placeBasis(prepared.basisSet, molecule),
      );
      const { coefficients } = result.naturalOrbitals!;
      const count = coefficients.length;
      const n = problem.functionCount;
      expect(count).toBe(result.naturalOccupations.length);

      const columns = Float64Array.from(
        { length: n * count },
        (_, i) => coefficients[i % count]![Math.trunc(i / count)]!,
      );
      congruence(problem.overlap, columns, n, count).forEach((value, place) => {
        expect(Math.abs(value - Number(place % (count + 1) === 0))).toBeLessThan(1e-10);
      });
      const density = densityOf(result);
      expect(Math.abs(dot(density, problem.overlap) - prepared.electrons)).toBeLessThan(1e-10);
      expect(Math.abs(dot(density, kinetic) - result.energyParts!.kinetic)).toBeLessThan(1e-9);
      const moment = molecule.atoms.reduce(
        (sum, { nuclearCharge, position }) => sum + nuclearCharge * position[2],
        0,
      );
      expect(Math.abs(moment - dot(density, dipole[2]!) - result.dipole[2])).toBeLessThan(1e-9);
      // the sign is fixed
      for (const orbital of coefficients) {
        expect(Math.max(...orbital)).toBeGreaterThan(-Math.min(...orbital) - 1e-12);
      }
    },
  );

  it('identity: labels of a linear molecule, π pairs apart, in any orientation', () => {
    const request = (at: readonly [number, number, number]) =>
      study([atom('Li'), atom('H', ...at)], { levels: ['FCI'], frozenCore: true, basis: '6-31G' });
    const along = correlated(compute(request([0, 0, 3])));
    const { symmetries } = along.naturalOrbitals!;
    expect(symmetries!.slice(0, 4)).toEqual(['1σ', '2σ', '3σ', '4σ']);
    expect(symmetries!.filter((label) => label === '1π')).toHaveLength(2);
    // σ of H and Li s functions and of one p each; π in pairs
    expect(symmetries!.filter((label) => label?.endsWith('σ'))).toHaveLength(7);
    const turned = correlated(compute(request([2, 1, 2])));
    expect(turned.naturalOrbitals!.symmetries).toEqual(symmetries);
    // each π orbital of the pair along z lies in one plane of functions
    const pi = along.naturalOrbitals!.coefficients[symmetries!.indexOf('1π')]!;
    expect(pi.filter((value) => Math.abs(value) > 1e-8)).toHaveLength(2);
  });

  it('identity: none over orbitals without symmetry', () => {
    const [, , , , request] = CASES.map(([, each]) => each);
    expect(correlated(compute(request!), 'CISD').naturalOrbitals).not.toHaveProperty('symmetries');
  });
});

describe('wantsNaturalOrbitals', () => {
  it('identity: as the study says, else where they are few numbers', () => {
    const scan = (count: number) => ({ coordinate: { bonds: [[0, 1]] }, from: 1, to: 2, count }) as const;
    const wants = (count: number, changes: Partial<Study> = {}) =>
      wantsNaturalOrbitals(
        prepare(
          study([atom('Li'), atom('H', 0, 0, 3)], {
            levels: ['RHF', 'CISD'],
            basis: '6-31G',
            scan: scan(count),
            ...changes,
          }),
        ),
      );
    // 11² functions × points × levels
    expect(wants(495)).toBe(true);
    expect(wants(496)).toBe(false);
    expect(wants(300, { levels: ['CISD', 'FCI'] })).toBe(false);
    expect(wants(496, { findings: { naturalOrbitals: true } })).toBe(true);
    expect(wants(2, { findings: { naturalOrbitals: false } })).toBe(false);
  });
});
