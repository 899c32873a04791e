import type { LevelFindings, MeasuredConstant, MeasuredQuantity, StudyResults } from '#engine';
import {
  DALTON_IN_ELECTRON_MASSES,
  FORCE_CONSTANT_IN_NEWTON_PER_METRE,
  HARTREE_IN_EV,
  HARTREE_IN_WAVENUMBERS,
} from '../../engine/constants';

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
  /** why there is none, where measured constants of this molecule are on file */
  readonly whyNotMeasured?: string;
}

export interface MeasuredValue {
  readonly value: number;
  /** with the digits, and the uncertainty, of the print; a converted or derived value rounded as computed ones are */
  readonly text: string;
  /** all of them in one text */
  readonly source: string;
  readonly sources: readonly string[];
  /** the number was recalled and has not been compared with the source */
  readonly isRecalled: boolean;
  /** of what measured constants it was worked out, where it is not measured itself */
  readonly workedOutFrom?: string;
}

type MeasuredGround = ReadonlyMap<MeasuredQuantity, MeasuredConstant>;

type Kind = Pick<ComparedConstant, 'symbol' | 'name' | 'unit' | 'decimals'> & {
  readonly quantity?: MeasuredQuantity;
  /** how it follows from what is measured, where it is no measured quantity itself */
  readonly workOut?: (ground: MeasuredGround, reducedMassDalton: number) => WorkedOut | string;
  readonly of: (findings: LevelFindings) => number | undefined;
};

interface WorkedOut {
  readonly value: number;
  readonly constants: readonly MeasuredConstant[];
  /** `ωₑ` */
  readonly from: string;
}

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
    workOut: forceConstantFrom,
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
    workOut: wellDepthFrom,
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
  const withConstants = study.levels.flatMap((level) => findings[level]?.constants ?? []);
  if (withConstants.length === 0) return [];
  const reducedMassDalton = withConstants.find(({ diatomic }) => diatomic)?.diatomic?.reducedMassDalton;
  const constants = measured?.find(({ isGroundState }) => isGroundState)?.constants ?? [];
  // of two sources of one quantity the first named is the better one
  const ground: MeasuredGround = new Map(constants.map((one) => [one.quantity, one] as const).reverse());
  return KINDS.flatMap((kind): ComparedConstant[] => {
    const { symbol, name, unit, decimals } = kind;
    const byLevel = new Map(
      study.levels.flatMap((level) => {
        const value = findings[level] && kind.of(findings[level]);
        return value === undefined ? [] : [[level, value] as const];
      }),
    );
    if (byLevel.size === 0) return [];
    const beside = ground.size === 0 ? undefined : measuredValue(kind, ground, reducedMassDalton);
    return [
      {
        ...{ symbol, name, unit, decimals, byLevel },
        ...(typeof beside === 'string' && { whyNotMeasured: beside }),
        ...(typeof beside === 'object' && { measured: beside }),
      },
    ];
  });
}

/** The measured value, or why there is none. */
function measuredValue(
  { quantity, workOut, unit, decimals }: Kind,
  ground: MeasuredGround,
  reducedMassDalton: number | undefined,
): MeasuredValue | string {
  const known = quantity && ground.get(quantity);
  const value = known && inUnit(known, unit);
  if (known && value !== undefined) {
    const { source, status, printed } = known;
    const isPlain = known.unit === unit && !/e/i.test(printed);
    const text = isPlain ? printed.replace(/[[\]]/g, '') : rounded(value, decimals);
    return { value, text, source, sources: [source], isRecalled: status === 'memory' };
  }
  if (!workOut) return 'no value on file';
  if (reducedMassDalton === undefined) return 'no value on file to work it out from';
  const found = workOut(ground, reducedMassDalton);
  if (typeof found === 'string') return found;
  const sources = [...new Set(found.constants.map(({ source }) => source))];
  return {
    value: found.value,
    text: rounded(found.value, decimals),
    source: sources.join('; '),
    sources,
    isRecalled: found.constants.some(({ status }) => status === 'memory'),
    workedOutFrom: found.from,
  };
}

const rounded = (value: number, decimals: number): string => String(Number(value.toFixed(decimals)));

/** k = μ(2πcωₑ)²: not measured by itself, but the same statement as ωₑ. */
function forceConstantFrom(ground: MeasuredGround, reducedMassDalton: number): WorkedOut | string {
  const harmonic = ground.get('harmonicWavenumber');
  if (!harmonic) return 'not measured by itself, and no ωₑ on file that it follows from';
  const frequency = (inUnit(harmonic, 'cm⁻¹') ?? Number.NaN) / HARTREE_IN_WAVENUMBERS;
  const value =
    reducedMassDalton * DALTON_IN_ELECTRON_MASSES * frequency ** 2 * FORCE_CONSTANT_IN_NEWTON_PER_METRE;
  return { value, constants: [harmonic], from: 'ωₑ' };
}

/** Dₑ = D₀ + G(0): the depth of a curve cannot be measured, D₀ can. */
function wellDepthFrom(ground: MeasuredGround): WorkedOut | string {
  const dissociation = ground.get('dissociationEnergy');
  if (!dissociation) return 'not measured by itself, and no D₀ on file that it follows from';
  const zeroPoint = ground.get('zeroPointEnergy');
  const harmonic = ground.get('harmonicWavenumber');
  const anharmonicity = ground.get('anharmonicity');
  const depth = (zeroPointPerCm: number) =>
    (inUnit(dissociation, 'eV') ?? Number.NaN) + zeroPointPerCm / EV_IN_WAVENUMBERS;
  if (zeroPoint) {
    const value = depth(inUnit(zeroPoint, 'cm⁻¹') ?? Number.NaN);
    return { value, constants: [dissociation, zeroPoint], from: 'D₀ + G(0)' };
  }
  if (!harmonic || !anharmonicity)
    return 'not measured by itself, and no zero-point energy on file to add to D₀';
  const zeroPointPerCm =
    (inUnit(harmonic, 'cm⁻¹') ?? Number.NaN) / 2 - (inUnit(anharmonicity, 'cm⁻¹') ?? Number.NaN) / 4;
  return {
    value: depth(zeroPointPerCm),
    constants: [dissociation, harmonic, anharmonicity],
    from: 'D₀ + ωₑ/2 − ωₑxₑ/4',
  };
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
