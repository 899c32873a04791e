import { describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { Citations } from '../../../app/report/references';
import { constantsTable, levelsTable } from '../../../app/report/spectroscopy-tables';
import { withSpectroscopy } from '../../support/reports';
import { sampleResults } from '../../support/sample-results';

const named = (results: StudyResults) => ({ name: '', results });
const measured = [
  {
    state: 'X ¹Σg⁺',
    isGroundState: true,
    constants: [
      {
        quantity: 'harmonicWavenumber',
        printed: '[4401.21]',
        value: 4401.21,
        unit: 'cm⁻¹',
        source: 'A book; volume 2',
        status: 'memory',
      },
    ],
  },
] as const;

describe('constantsTable', () => {
  it('sets measured values beside computed ones, with the difference, the source and what was only recalled', () => {
    const citations = new Citations();
    const table = constantsTable(named(withSpectroscopy(3, { measured })), citations);
    const row = table?.rows.find(([head]) => head?.startsWith('ωₑ,'));
    expect(row?.slice(1)).toEqual(['4300.50', '4401.21', '−100.71']);
    expect(table?.notes[0]).toContain('A book; volume 2 [1]');
    expect(table?.notes).toContain('Recalled and not compared with the source since: ωₑ, k.');
    expect(citations.list).toEqual(['A book; volume 2']);
  });

  it('leaves a cell without a measured value empty, and says why', () => {
    const table = constantsTable(named(withSpectroscopy(3, { measured })), new Citations());
    const row = (symbol: string) => table?.rows.find(([head]) => head?.startsWith(`${symbol},`))?.slice(1);
    expect(row('Bₑ')).toEqual(['59.0000', '', '']);
    const notes = table?.notes.join('\n');
    expect(notes).toMatch(/– for rₑ, .*Bₑ, .*: no value on file\./);
    expect(notes).toContain('– for Dₑ: not measured by itself, and no D₀ on file that it follows from.');
    // worked out, since it says the same as ωₑ
    expect(row('k')).toEqual(['555.0', '570.6', '−15.6']);
    expect(notes).toContain('k = μ(2πcωₑ)²');
  });

  it('says that nothing measured is on file, and nothing of the kind for molecules of more atoms', () => {
    const notes = (changes: Partial<StudyResults>) =>
      constantsTable(named(withSpectroscopy(3, changes)), new Citations())?.notes;
    expect(notes({ measured: [] })).toEqual([
      'No measured constants of this molecule with these isotopes are on file.',
    ]);
    expect(notes({})).toEqual([]);
  });

  it('is absent where no minimum was found', () => {
    expect(constantsTable(named(sampleResults(['RHF'])), new Citations())).toBeUndefined();
  });
});

describe('levelsTable', () => {
  it('lists as many levels as asked for and the last, or all', () => {
    const rows = (most?: number) => levelsTable([named(withSpectroscopy(15))], most)?.rows;
    expect(rows()).toHaveLength(15);
    expect(rows(10)).toHaveLength(11);
    expect(rows(10)?.at(-1)).toEqual(['last', '29000.00', '46.0000']);
  });

  it('says how many levels there are and how far they are to be trusted', () => {
    const notes = levelsTable([named(withSpectroscopy(15))])?.notes.join(' ');
    expect(notes).toContain('15 bound levels');
    expect(notes).toContain('from v = 14 on partly beyond the computed points');
  });

  it('has no column for distortions where no level has one, else with digits and no powers of ten', () => {
    const results = withSpectroscopy(2);
    expect(levelsTable([named(results)])?.columns).toHaveLength(3);
    const FCI = results.findings.FCI!;
    if (FCI.vibration?.kind !== 'found') throw new Error('sample changed');
    const levels = FCI.vibration.levels.map((level) => ({ ...level, centrifugalDistortionPerCm: 4.56e-7 }));
    const table = levelsTable([
      named({ ...results, findings: { FCI: { ...FCI, vibration: { ...FCI.vibration, levels } } } }),
    ]);
    expect(table?.rows[0]).toEqual(['0', '1000.00', '60.0000', '0.000000456']);
  });
});
