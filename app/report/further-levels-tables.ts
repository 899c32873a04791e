import type { Isotopologue, StudyAtom, Vibration } from '#engine';
import { HARTREE_IN_EV } from '#engine';
import { formula } from '../study/formula';
import { fileGroup, type NamedResults } from './named-results';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

const MOST_ROTATING_LEVELS = 8;
const LEVEL_DECIMALS = 2;

/** Levels of the rotating molecule, for the J that the study asks for. */
export function rotationTables(file: NamedResults): readonly TextTable[] {
  return file.results.study.levels.flatMap((level) => {
    const vibration = file.results.findings[level]?.vibration;
    const rotating = vibration?.kind === 'found' ? (vibration.rotating ?? []) : [];
    if (rotating.length === 0) return [];
    const count = Math.max(...rotating.map(({ levels }) => levels.length));
    const shown = Math.min(count, MOST_ROTATING_LEVELS);
    const name = [...fileGroup(file), level].join(', ');
    return [
      {
        id: `rotation-${[...fileGroup(file), level].join('-')}`,
        heading: `Levels with rotation, ${name} (cm⁻¹ above the minimum)`,
        columns: [{ label: 'v' }, ...rotating.map(({ rotation }) => ({ label: `J = ${rotation}` }))],
        rows: [
          ...Array.from({ length: shown }, (_, v) => [
            String(v),
            ...rotating.map(({ levels }) => levels[v]?.energyPerCm.toFixed(LEVEL_DECIMALS) ?? ''),
          ]),
          ['bound', ...rotating.map(({ levels }) => String(levels.length))],
          ...(rotating.some(({ quasiBound }) => quasiBound.length > 0)
            ? [['quasi-bound', ...rotating.map(({ quasiBound }) => String(quasiBound.length))]]
            : []),
        ],
        notes: [
          'J without spin. Bound: number of levels below the limit of the curve.',
          ...(rotating.some(({ quasiBound }) => quasiBound.length > 0)
            ? ['Quasi-bound: above the limit, held back by the centrifugal barrier; they decay.']
            : []),
          ...(count > shown ? ['All levels are in the results file.'] : []),
        ],
      },
    ];
  });
}

/** The same curves with other masses, beside the isotopes of the study. */
export function isotopologuesTable(files: readonly NamedResults[]): TextTable | undefined {
  const rows = files.flatMap((file) =>
    file.results.study.levels.flatMap((level) => {
      const findings = file.results.findings[level];
      const further = findings?.isotopologues ?? [];
      if (!findings || further.length === 0) return [];
      const { atoms, charge } = file.results.study.molecule;
      const own = {
        massNumbers: undefined,
        constants: findings.constants?.diatomic,
        vibration: findings.vibration,
      };
      return [own, ...further].map((one) => [
        [...fileGroup(file), level].join(', '),
        nameOf(atoms, charge, one.massNumbers),
        ...constantCells(one.constants),
        ...vibrationCells(one.vibration),
      ]);
    }),
  );
  if (rows.length === 0) return undefined;
  return {
    id: 'isotopologues',
    heading: 'Isotopologues on the same curve',
    columns: [
      { label: 'Level', content: 'words' },
      { label: 'Molecule', content: 'words' },
      { label: 'μ (dalton)' },
      { label: 'ωₑ (cm⁻¹)' },
      { label: 'ωₑxₑ (cm⁻¹)' },
      { label: 'Bₑ (cm⁻¹)' },
      { label: 'G(0) (cm⁻¹)' },
      { label: 'ΔG(½) (cm⁻¹)' },
      { label: 'D₀ (eV)' },
      { label: 'Bound levels' },
    ],
    rows,
    notes: [],
  };
}

function nameOf(
  atoms: readonly StudyAtom[],
  charge: number,
  massNumbers: readonly number[] | undefined,
): string {
  if (!massNumbers) return formula({ atoms, charge });
  return formula({
    atoms: atoms.map((atom, index) => ({ ...atom, isotope: massNumbers[index] })),
    charge,
  });
}

function constantCells(constants: Isotopologue['constants']): readonly string[] {
  if (!constants) return ['', '', '', ''];
  return [
    constants.reducedMassDalton.toFixed(6),
    constants.harmonicWavenumberPerCm.value.toFixed(LEVEL_DECIMALS),
    constants.anharmonicityPerCm.value.toFixed(LEVEL_DECIMALS),
    constants.rotationalConstantPerCm.value.toFixed(4),
  ];
}

function vibrationCells(vibration: Vibration | undefined): readonly string[] {
  if (vibration?.kind !== 'found') return ['', '', '', ''];
  const [lowest, first] = vibration.levels;
  return [
    vibration.zeroPointPerCm.toFixed(LEVEL_DECIMALS),
    lowest && first ? (first.energyPerCm - lowest.energyPerCm).toFixed(LEVEL_DECIMALS) : '',
    vibration.d0 === undefined ? '' : withMinus((vibration.d0 * HARTREE_IN_EV).toFixed(4)),
    String(vibration.boundLevels),
  ];
}
