import type { LevelFindings, MeasuredConstant, MeasuredQuantity, StudyResults } from '#engine';
import { HARTREE_IN_EV, HARTREE_IN_WAVENUMBERS } from '../../engine/constants';

/** A constant of a diatomic molecule, of every level that has it, beside its measured value. */
export interface ComparedConstant {
  readonly symbol: string;
  readonly name: string;
  readonly unit: 'Å' | 'cm⁻¹' | 'eV' | 'N/m';
  /** decimals to be printed */
  readonly decimals: number;
  readonly byLevel: ReadonlyMap<string, number>;
  /** of the ground state, in `unit`; absent where none is known */
  readonly measured?: MeasuredValue;
}

export interface MeasuredValue {
  readonly value: number;
  readonly source: string;
}

type Kind = Pick<ComparedConstant, 'symbol' | 'name' | 'unit' | 'decimals'> & {
  readonly quantity?: MeasuredQuantity;
  readonly of: (findings: LevelFindings) => number | undefined;
};

const KINDS: readonly Kind[] = [
  {
    symbol: 'rₑ',
    name: 'equilibrium distance',
    unit: 'Å',
    decimals: 5,
    quantity: 'equilibriumDistance',
    of: ({ constants }) => constants?.equilibriumDistanceAngstrom.value,
  },
  {
    symbol: 'ωₑ',
    name: 'harmonic wavenumber',
    unit: 'cm⁻¹',
    decimals: 2,
    quantity: 'harmonicWavenumber',
    of: ({ constants }) => constants?.diatomic?.harmonicWavenumberPerCm.value,
  },
  {
    symbol: 'ωₑxₑ',
    name: 'anharmonicity',
    unit: 'cm⁻¹',
    decimals: 2,
    quantity: 'anharmonicity',
    of: ({ constants }) => constants?.diatomic?.anharmonicityPerCm.value,
  },
  {
    symbol: 'Bₑ',
    name: 'rotational constant',
    unit: 'cm⁻¹',
    decimals: 4,
    quantity: 'rotationalConstant',
    of: ({ constants }) => constants?.diatomic?.rotationalConstantPerCm.value,
  },
  {
    symbol: 'αₑ',
    name: 'vibration–rotation coupling',
    unit: 'cm⁻¹',
    decimals: 4,
    quantity: 'vibrationRotationCoupling',
    of: ({ constants }) => constants?.diatomic?.vibrationRotationCouplingPerCm.value,
  },
  {
    symbol: 'D̄ₑ',
    name: 'centrifugal distortion',
    unit: 'cm⁻¹',
    decimals: 6,
    quantity: 'centrifugalDistortion',
    of: ({ constants }) => constants?.diatomic?.centrifugalDistortionPerCm.value,
  },
  {
    symbol: 'k',
    name: 'force constant',
    unit: 'N/m',
    decimals: 1,
    of: ({ constants }) => constants?.forceConstantNewtonPerMetre.value,
  },
  {
    symbol: 'G(0)',
    name: 'zero-point energy',
    unit: 'cm⁻¹',
    decimals: 2,
    quantity: 'zeroPointEnergy',
    of: ({ vibration }) => (vibration?.kind === 'found' ? vibration.zeroPointPerCm : undefined),
  },
  {
    symbol: 'ΔG(½)',
    name: 'first vibrational interval',
    unit: 'cm⁻¹',
    decimals: 2,
    quantity: 'firstInterval',
    of: ({ vibration }) => {
      if (vibration?.kind !== 'found') return undefined;
      const [lowest, first] = vibration.levels;
      return lowest && first && first.energyPerCm - lowest.energyPerCm;
    },
  },
  {
    symbol: 'B₀',
    name: 'rotational constant of the lowest level',
    unit: 'cm⁻¹',
    decimals: 4,
    quantity: 'lowestRotationalConstant',
    of: ({ vibration }) =>
      vibration?.kind === 'found' ? vibration.levels[0]?.rotationalConstantPerCm : undefined,
  },
  {
    symbol: 'Dₑ',
    name: 'well depth',
    unit: 'eV',
    decimals: 4,
    of: ({ wellDepth }) => wellDepth && wellDepth.value * HARTREE_IN_EV,
  },
  {
    symbol: 'D₀',
    name: 'dissociation energy from the lowest level',
    unit: 'eV',
    decimals: 4,
    quantity: 'dissociationEnergy',
    of: ({ vibration }) =>
      vibration?.kind === 'found' && vibration.d0 !== undefined ? vibration.d0 * HARTREE_IN_EV : undefined,
  },
];

const MEGAHERTZ_IN_WAVENUMBERS = 1 / 29979.2458;
const EV_IN_WAVENUMBERS = HARTREE_IN_WAVENUMBERS / HARTREE_IN_EV;

/** The constants that any level has; empty where no minimum was found. */
export function comparedConstants({ study, findings, measured }: StudyResults): readonly ComparedConstant[] {
  if (study.levels.every((level) => !findings[level]?.constants)) return [];
  const ground = measured?.find(({ isGroundState }) => isGroundState)?.constants ?? [];
  return KINDS.flatMap(({ quantity, of, ...kind }): ComparedConstant[] => {
    const byLevel = new Map(
      study.levels.flatMap((level) => {
        const value = findings[level] && of(findings[level]);
        return value === undefined ? [] : [[level, value] as const];
      }),
    );
    if (byLevel.size === 0) return [];
    const known = quantity && ground.find((constant) => constant.quantity === quantity);
    const value = known && inUnit(known, kind.unit);
    return [
      {
        ...kind,
        byLevel,
        ...(known && value !== undefined && { measured: { value, source: known.source } }),
      },
    ];
  });
}

function inUnit({ value, unit }: MeasuredConstant, wanted: ComparedConstant['unit']): number | undefined {
  if (unit === wanted) return value;
  const wavenumber = {
    'cm⁻¹': value,
    MHz: value * MEGAHERTZ_IN_WAVENUMBERS,
    eV: value * EV_IN_WAVENUMBERS,
    Å: undefined,
  }[unit];
  if (wavenumber === undefined) return undefined;
  if (wanted === 'cm⁻¹') return wavenumber;
  return wanted === 'eV' ? wavenumber / EV_IN_WAVENUMBERS : undefined;
}
