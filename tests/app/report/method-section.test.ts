import { describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { methodParagraphs } from '../../../app/report/method-section';
import { Citations } from '../../../app/report/references';
import { withSpectroscopy } from '../../support/reports';
import { hartreeFock, sampleResults } from '../../support/sample-results';

const methodOf = (results: StudyResults, citations = new Citations()) =>
  methodParagraphs(results, citations).join('\n');
const withStudy = (changes: Partial<StudyResults['study']>) => {
  const results = sampleResults();
  return { ...results, study: { ...results.study, ...changes } };
};

describe('methodParagraphs', () => {
  it('names the program, the day, the basis with its paper, and the threshold', () => {
    const citations = new Citations();
    const results = sampleResults();
    const method = methodOf({ ...results, program: { ...results.program, date: '2026-12-01' } }, citations);
    expect(method).toContain('Computed with Farwell 0.1.0 on 1 December 2026, at 37 geometries.');
    expect(method).toContain(
      'Basis set: STO-3G [1], 2 contracted Gaussian functions, with s functions only.',
    );
    expect(citations.list[0]).toBe('W. J. Hehre, R. F. Stewart, J. A. Pople, J. Chem. Phys. 51, 2657 (1969)');
    expect(method).toContain('converged to 10⁻¹⁰ hartree');
    expect(methodOf(results)).toContain('Computed with Farwell 0.1.0, at 37');
  });

  it('says what each level is, and nothing of levels that were not run', () => {
    const method = methodOf(withStudy({ levels: ['RHF', 'CISDT', 'FCI'], states: 2 }));
    expect(method).toContain('up to triple excitations (CISDT) and all determinants (full CI, FCI)');
    expect(method).toContain('the 2 lowest states');
    expect(method).not.toMatch(/UHF|MP2|CIS\)/);
    const open = withStudy({
      levels: ['UHF', 'MP2'],
      molecule: { ...sampleResults().study.molecule, multiplicity: 3 },
    });
    expect(methodOf(open)).toContain('Second-order perturbation theory');
    expect(methodOf(open)).not.toMatch(/RHF|Configuration interaction/);
  });

  it('says which electrons are correlated', () => {
    expect(methodOf(withStudy({}))).toContain('All electrons were correlated.');
    expect(methodOf(withStudy({ frozenCore: true }))).toContain('frozen core');
    expect(methodOf(withStudy({ active: { electrons: 8, orbitals: 6 } }))).toContain(
      '8 electrons in 6 orbitals',
    );
    expect(methodOf(withStudy({ levels: ['RHF'] }))).not.toContain('correlated');
  });

  it('says so where a level did not converge', () => {
    const results = sampleResults(['RHF']);
    const [first, ...others] = results.points;
    const bad = { ...first!, levels: { RHF: hartreeFock(-1, { converged: false }) } };
    expect(methodOf({ ...results, points: [bad, ...others] })).toContain(
      'At 1 of 37 points some level did not',
    );
    expect(methodOf(results)).toContain('Every level converged at every point.');
  });

  it('explains findings that there are, with the masses, and no others', () => {
    const method = methodOf(withSpectroscopy(3));
    expect(method).toContain('Vibrational levels solve the radial Schrödinger equation');
    expect(method).toContain('reduced mass 0.5 dalton');
    expect(methodOf(sampleResults())).not.toMatch(/Schrödinger|reduced mass|Morse|counterpoise/);
  });

  it('cites the papers of further bases and of the formulas that the limit comes from', () => {
    const citations = new Citations();
    const results = sampleResults();
    const method = methodOf(
      {
        ...results,
        furtherBases: [
          {
            basis: { ...results.basis, name: 'big', citations: ['A big paper'] },
            levels: {},
            findings: {},
            cautions: [],
          },
        ],
        basisSetLimit: {
          kind: 'found',
          family: 'f',
          members: [],
          levels: { RHF: { hartreeFock: { formula: 'exponential', cardinals: [2, 3] }, energies: [] } },
        },
      },
      citations,
    );
    expect(method).toMatch(/computed in big \[\d+\], 2 functions\./);
    expect(citations.list).toContain('A big paper');
    expect(citations.list).toContain('A. Halkier et al., Chem. Phys. Lett. 302, 437 (1999)');
    expect(citations.list.join()).not.toContain('Feller');
  });

  it('cites every reference that it brings, from 1 on', () => {
    const citations = new Citations();
    const method = methodOf(withSpectroscopy(3), citations);
    const cited = [...method.matchAll(/\[([\d, –]+)\]/g)].flatMap(([, numbers]) =>
      numbers!.split(', ').flatMap((part) => part.split('–').map(Number)),
    );
    expect(new Set(cited).size).toBeGreaterThan(5);
    expect(Math.max(...cited)).toBe(citations.list.length);
  });
});
