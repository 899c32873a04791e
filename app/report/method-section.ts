import type { LevelFindings, StudyResults } from '#engine';
import { BOHR_IN_ANGSTROM, DALTON_IN_ELECTRON_MASSES, HARTREE_IN_EV, HARTREE_IN_WAVENUMBERS } from '#engine';
import { type Citations, PAPERS } from './references';
import { capitalised, ended, enumerated, percent } from './sentences';

/** How the numbers of a results file were made, as paragraphs: from what was really run, with the papers cited. */
export function methodParagraphs(results: StudyResults, citations: Citations): readonly string[] {
  return [
    programSentence(results),
    basisSentences(results, citations),
    levelSentences(results, citations),
    correlationSentences(results),
    furtherBasesSentences(results, citations),
    convergenceSentences(results),
    findingsSentences(results, citations),
    constantsSentences(results, citations),
  ].filter(Boolean);
}

function programSentence({ program, points }: StudyResults): string {
  const date = program.date ? ` on ${longDate(program.date)}` : '';
  return `Computed with ${capitalised(program.name)} ${program.version}${date}, at ${points.length} ${points.length === 1 ? 'geometry' : 'geometries'}.`;
}

const MONTHS = 'January February March April May June July August September October November December'.split(
  ' ',
);

/** `1 December 2026` of `2026-12-01`; anything else as it stands. */
function longDate(date: string): string {
  const [, year, month, day] = /^(\d{4})-(\d\d)-(\d\d)/.exec(date) ?? [];
  const name = MONTHS[Number(month) - 1];
  return name ? `${Number(day)} ${name} ${year}` : date;
}

function basisSentences({ basis, study }: StudyResults, citations: Citations): string {
  const highest = Math.max(
    0,
    ...Object.values(basis.shells).flatMap((shells) => shells.map((shell) => shell.angularMomentum)),
  );
  const shape =
    highest < 2
      ? `with s ${highest === 1 ? 'and p ' : ''}functions only`
      : `with ${basis.harmonics === 'spherical' ? 'spherical harmonics' : 'Cartesian Gaussians'} for d functions and beyond`;
  const optimised =
    typeof study.basis === 'object' && 'optimiseScale' in study.basis && study.basis.optimiseScale
      ? 'Scale factors were optimised at every geometry for the lowest Hartree–Fock energy.'
      : '';
  return [
    `Basis set: ${basis.name} ${citations.cite(...basis.citations)}`.trim() +
      `, ${basis.functions} contracted Gaussian functions, ${shape}.`,
    ...basis.notes.map(ended),
    optimised,
    `Integrals over them are analytic ${citations.cite(PAPERS.integrals)}; electron-repulsion integrals are left out by the Schwarz bound only ${citations.cite(PAPERS.screening)}.`,
  ]
    .filter(Boolean)
    .join(' ');
}

function furtherBasesSentences(
  { furtherBases = [], basisSetLimit }: StudyResults,
  citations: Citations,
): string {
  if (furtherBases.length === 0) return '';
  const bases = furtherBases.map(
    ({ basis }) => `${basis.name} ${citations.cite(...basis.citations)}, ${basis.functions} functions`,
  );
  const limits = basisSetLimit?.kind === 'found' ? Object.values(basisSetLimit.levels) : [];
  const formulas = limits.flatMap(({ hartreeFock, correlation }) => [
    hartreeFock.formula,
    ...(correlation ? [correlation.formula] : []),
  ]);
  const papers = [...new Set(formulas)].map((formula) => PAPERS[formula]);
  return [
    `The same study was computed in ${enumerated(bases)}.`,
    ...(papers.length > 0
      ? [
          `Hartree–Fock and correlation energies were extrapolated each by its own formula ${citations.cite(...papers)}.`,
        ]
      : []),
  ].join(' ');
}

function levelSentences({ study }: StudyResults, citations: Citations): string {
  const { levels, orbitals, molecule, states } = study;
  const has = (level: string) => levels.includes(level);
  const isOpen = molecule.multiplicity > 1;
  const ciLevels = levels.filter((level) => level === 'FCI' || /^CISD/.test(level));
  const base = orbitals === 'unrestricted' ? 'UHF orbitals' : isOpen ? 'ROHF orbitals' : 'RHF orbitals';
  return [
    ...(has('RHF') || (!isOpen && levels.some((level) => level !== 'UHF'))
      ? [
          `Restricted Hartree–Fock (RHF) ${citations.cite(PAPERS.restricted)}, converged by direct inversion in the iterative subspace ${citations.cite(PAPERS.acceleration)}; its stability was tested, and instabilities of its own kind were followed to a minimum ${citations.cite(PAPERS.stability)}.`,
        ]
      : []),
    ...(has('ROHF') || (isOpen && ciLevels.length > 0)
      ? [`Restricted open-shell Hartree–Fock (ROHF) ${citations.cite(PAPERS.restrictedOpen)}.`]
      : []),
    ...(has('UHF') || orbitals === 'unrestricted'
      ? [`Unrestricted Hartree–Fock (UHF) ${citations.cite(PAPERS.unrestricted)}.`]
      : []),
    ...(has('MP2')
      ? [
          `Second-order perturbation theory (MP2) ${citations.cite(PAPERS.secondOrder)} on ${isOpen ? 'UHF' : 'RHF'}.`,
        ]
      : []),
    ...(has('CIS')
      ? [
          `Single excitations (CIS) ${citations.cite(PAPERS.singles)}, ${states === 1 ? 'the lowest state' : `the ${states} lowest states`} of each spin.`,
        ]
      : []),
    ...(ciLevels.length > 0
      ? [
          `Configuration interaction over ${base}: ${enumerated(ciLevels.map(ciMeaning))}, by determinants ${citations.cite(PAPERS.determinants)} and iterative diagonalisation ${citations.cite(PAPERS.iterativeRoots)}, ${states === 1 ? 'the lowest state' : `the ${states} lowest states`}. Correlation energies are relative to ${isOpen ? 'ROHF' : 'RHF'}.`,
        ]
      : []),
  ].join(' ');
}

const EXCITATIONS = ['', 'single', 'double', 'triple', 'quadruple', 'fivefold', 'sixfold'];

function ciMeaning(level: string): string {
  if (level === 'FCI') return 'all determinants (full CI, FCI)';
  const rank = { CISD: 2, CISDT: 3, CISDTQ: 4, CISDTQ5: 5, CISDTQ56: 6 }[level];
  return rank === undefined ? level : `up to ${EXCITATIONS[rank]} excitations (${level})`;
}

function correlationSentences({ study: { active, frozenCore, levels } }: StudyResults): string {
  if (levels.every((level) => /HF$/.test(level))) return '';
  if (active)
    return `${active.electrons} electrons in ${active.orbitals} orbitals around the Fermi level were active in CI; all orbitals below stayed doubly occupied.`;
  return frozenCore
    ? 'The noble-gas cores stayed doubly occupied (frozen core).'
    : 'All electrons were correlated.';
}

function convergenceSentences({ study, points }: StudyResults): string {
  const unconverged = points.filter(({ levels }) =>
    Object.values(levels).some(({ converged }) => !converged),
  ).length;
  return [
    `Energies were converged to ${scientific(study.convergence.energy)} hartree.`,
    points.length > 1
      ? 'Every point was also started from the orbitals of its neighbours, and the lowest solution kept.'
      : '',
    unconverged > 0
      ? `At ${unconverged} of ${points.length} points some level did not converge; these numbers are not used.`
      : 'Every level converged at every point.',
  ]
    .filter(Boolean)
    .join(' ');
}

/** `10⁻¹⁰` of 1e-10 */
function scientific(value: number): string {
  const [mantissa = '', exponent = '0'] = value.toExponential().split('e');
  const raised = exponent
    .replace('+', '')
    .replace(/[-\d]/g, (sign) => (sign === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.charAt(Number(sign))));
  return `${mantissa === '1' ? '' : `${mantissa}·`}10${raised}`;
}

/** How what is in the tables of findings was found, as far as there is any. */
function findingsSentences(results: StudyResults, citations: Citations): string {
  const all = Object.values(results.findings);
  const isAny = (test: (one: LevelFindings) => unknown) => all.some(test);
  const cis = results.curves;
  return [
    ...(isAny(({ minimum }) => minimum.kind === 'found')
      ? [
          'Minima come from polynomials through further points computed closely around them, not from the points of the scan.',
        ]
      : []),
    ...(isAny(({ constants }) => constants?.diatomic)
      ? [`Spectroscopic constants come from derivatives at the minimum ${citations.cite(PAPERS.dunham)}.`]
      : []),
    ...(isAny(({ wellDepth }) => wellDepth?.against === 'fragments')
      ? [
          'Well depths are against separate fragments at the same level and in their own basis functions: of all ways to share charge and spin the lowest; open shells by ROHF where the molecule has RHF.',
        ]
      : []),
    ...(isAny(({ excitedStates }) =>
      excitedStates?.some(({ dissociation }) => dissociation?.kind === 'found'),
    )
      ? [
          'Limits of excited states are sums of energies of states of the separate fragments by full CI, for CIS by CIS and orbital energies of closed shells: the n-th state of a spin at the end of the scan has the n-th sum that couples to this spin, provided that it has come within 0.02 hartree of it and of no other nearer, but for the attraction of ions.',
        ]
      : []),
    ...(isAny(({ counterpoise }) => counterpoise?.kind === 'found')
      ? [
          `The superposition error of the basis was estimated by the counterpoise scheme ${citations.cite(PAPERS.counterpoise)}.`,
        ]
      : []),
    ...(isAny(({ vibration }) => vibration?.kind === 'found')
      ? [
          `Vibrational levels solve the radial Schrödinger equation ${citations.cite(PAPERS.radialRatios, PAPERS.radialCorrection)} on a rational interpolant ${citations.cite(PAPERS.interpolant)} of the computed points, continued beyond them to the limit.`,
        ]
      : []),
    ...(isAny(({ referenceWeight }) => referenceWeight)
      ? [
          `A single determinant is said to describe a state as long as its weight is at least ${percent(all.find(({ referenceWeight }) => referenceWeight)?.referenceWeight?.threshold ?? 0)}.`,
        ]
      : []),
    ...(isAny(({ fits }) => fits?.morse)
      ? [
          `Closed forms were fitted by least squares with equal weights: Morse ${citations.cite(PAPERS.morse)} and extended Rydberg ${citations.cite(PAPERS.extendedRydberg)}.`,
        ]
      : []),
    ...(isAny(({ excitedStates }) => excitedStates?.some(({ franckCondon }) => franckCondon))
      ? [
          `Franck–Condon factors are squared overlaps of the radial functions ${citations.cite(PAPERS.condon)}.`,
        ]
      : []),
    ...(cis && Object.keys(cis).length > 0
      ? [
          'States were joined along the scan by spin and symmetry where they have labels, else by overlap and energy.',
        ]
      : []),
  ].join(' ');
}

function constantsSentences({ findings }: StudyResults, citations: Citations): string {
  const masses = new Set(
    Object.values(findings).flatMap(({ constants }) => constants?.diatomic?.reducedMassDalton ?? []),
  );
  const [reducedMass] = masses;
  return [
    `Constants: CODATA 2022 ${citations.cite(PAPERS.constants)}, 1 hartree = ${HARTREE_IN_EV} eV = ${HARTREE_IN_WAVENUMBERS} cm⁻¹, 1 bohr = ${BOHR_IN_ANGSTROM} Å${reducedMass === undefined ? '' : `, 1 dalton = ${DALTON_IN_ELECTRON_MASSES} electron masses`}.`,
    ...(reducedMass === undefined
      ? []
      : [`Masses are those of neutral atoms; reduced mass ${Number(reducedMass.toPrecision(10))} dalton.`]),
  ].join(' ');
}
