import { describe, expect, it } from 'vitest';
import type { LevelFindings, StudyResults } from '#engine';
import { findingsTable } from '../../../app/report/findings-table';
import { sharedCoordinate } from '../../../app/report/scanned-coordinate';
import { sampleResults } from '../../support/sample-results';

const tableOf = (results: StudyResults) =>
  findingsTable([{ name: '', results }], sharedCoordinate([results], ['']));

/** The finding whose label begins so, of full CI with these findings. */
function cell(label: string, findings: LevelFindings): string | undefined {
  const results = sampleResults(['FCI']);
  const row = tableOf({ ...results, findings: { FCI: findings } })?.rows.find(([head]) =>
    head?.startsWith(label),
  );
  return row?.[1];
}

const found = (uncertainty: number) =>
  ({ kind: 'found', equilibriumDistance: 0.741234567, energy: -1.17, uncertainty }) as const;

describe('findingsTable', () => {
  it('prints as many digits of a distance as its uncertainty covers', () => {
    const minimum = (uncertainty: number) => cell('Minimum (Å)', { minimum: found(uncertainty) });
    expect(minimum(1e-4)).toBe('0.7412');
    expect(minimum(2e-6)).toBe('0.741235');
    expect(minimum(0)).toBe('0.741235');
    expect(minimum(0.3)).toBe('0.74');
  });

  it('says in words where there is no single minimum, and why below the table', () => {
    expect(cell('Minimum', { minimum: { kind: 'several', near: [0.7, 2.1] } })).toBe(
      'several, near 0.7 Å, 2.1 Å',
    );
    expect(cell('Minimum', { minimum: { kind: 'atEdge', coordinate: 4 } })).toBe('at the edge, 4 Å');
    const results = sampleResults(['FCI']);
    const minimum = { kind: 'none', reason: 'too few points' } as const;
    const table = tableOf({ ...results, findings: { FCI: { minimum } } });
    expect(table?.rows[0]).toEqual(['Minimum (Å)', 'none']);
    expect(table?.notes).toEqual(['FCI, minimum: too few points.']);
  });

  it('gives onsets with the digits that they are sure of, and leaves out rows without any', () => {
    const minimum = found(1e-5);
    expect(
      cell('RHF unstable', {
        minimum,
        instabilityOnset: { kind: 'found', coordinate: 1.20348, uncertainty: 3e-4 },
      }),
    ).toBe('1.2035');
    expect(
      cell('Reference weight below 90 % from (Å)', {
        minimum,
        referenceWeight: {
          kind: 'found',
          threshold: 0.9,
          crossings: [],
          coordinate: 2.1,
          uncertainty: 1e-3,
        },
      }),
    ).toBe('2.100');
    expect(
      cell('RHF unstable', { minimum, instabilityOnset: { kind: 'none', reason: 'stable' } }),
    ).toBeUndefined();
  });

  it('names what a depth is against: the far end, or the fragments', () => {
    expect(cell('Well depth is against', sampleResults().findings.FCI!)).toBe('4 Å');
    const fragment = { charge: 0, multiplicity: 2, energy: -0.5, level: 'ROHF' };
    expect(
      cell('Well depth is against', {
        minimum: found(1e-5),
        wellDepth: { value: 0.17, against: 'fragments', farEnd: 4, valueAgainstFarEnd: 0.169 },
        dissociation: {
          kind: 'found',
          energy: -1,
          fragments: [
            { ...fragment, atoms: [0] },
            { ...fragment, atoms: [1] },
          ],
        },
      }),
    ).toBe('H + H');
  });

  it('converts lengths to the unit of the report', () => {
    const results = sampleResults(['FCI']);
    const molecule = { ...results.study.molecule, unit: 'bohr' as const };
    const inBohr = { ...results, study: { ...results.study, molecule } };
    const table = findingsTable(
      [
        { name: 'a', results },
        { name: 'b', results: inBohr },
      ],
      sharedCoordinate([results, inBohr], ['a', 'b']),
    );
    expect(table?.columns.map(({ groups, label }) => [...(groups ?? []), label].join())).toEqual([
      'Finding',
      'a,FCI',
      'b,FCI',
    ]);
    expect(table?.rows[0]).toEqual(['Minimum (Å)', '0.74000', '0.391591']);
  });
});
