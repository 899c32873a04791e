import { number, type RaisedCaution } from './raised-caution';
import type { LevelFindings, Vibration, WellConstants } from './result';
import type { LengthUnit } from './study';

/** cm⁻¹; a curve known no better between its points moves levels by more than is printed of them. */
const UNCERTAIN_LEVELS = 1;
/** Of H2 it is 0.03; a Morse curve at 0.25 has its first interval halved and holds two levels. */
const LARGE_ANHARMONICITY = 0.25;

/** What to mistrust about a well and its levels: other minima, kinks, a poor interpolation, a well above its limit. */
export function wellCautions(
  level: string,
  findings: LevelFindings,
  unit: LengthUnit,
): readonly RaisedCaution[] {
  const { minimum, wellDepth, vibration } = findings;
  if (minimum.kind !== 'found') return [];
  const symbol = unit === 'bohr' ? 'bohr' : 'Å';
  const { others = [], equilibriumDistance, uncertainty, onKink } = minimum;
  const place = `${round(equilibriumDistance)} ${symbol}`;
  const at = { level, range: [equilibriumDistance, equilibriumDistance] } as const;
  return [
    ...(others.length === 0
      ? []
      : [
          {
            code: 'minimum.several',
            level,
            message:
              `The ${level} curve has ${others.length + 1} minima: the lowest at ${place}, higher ones at ` +
              `${others.map((other) => `${round(other.equilibriumDistance)} ${symbol}`).join(', ')}.`,
            meaning: 'Depth, constants and levels are those of the lowest minimum.',
            remedy: 'For another one, narrow the range of the scan to it.',
            numbers: others.map((other) => ({
              name: `energy above the lowest minimum at ${round(other.equilibriumDistance)} ${symbol}`,
              value: other.energy - minimum.energy,
              unit: 'hartree',
            })),
          },
        ]),
    ...(onKink
      ? [
          {
            ...at,
            code: 'curve.kink',
            message: findings.constants?.withoutDiatomic ?? `The ${level} curve is not smooth at ${place}.`,
            meaning: `The equilibrium distance of ${level} is known to ${round(uncertainty)} ${symbol} only, and derivatives there mean little.`,
            remedy:
              'Look for another solution or state that crosses there, or tighten the convergence threshold.',
            numbers: [number('uncertainty of the equilibrium distance', uncertainty, symbol)],
          },
        ]
      : []),
    ...(wellDepth && wellDepth.value < 0
      ? [
          {
            ...at,
            code: 'minimum.aboveLimit',
            message:
              `The minimum of ${level} at ${place} lies ${(-wellDepth.value).toFixed(4)} hartree above ` +
              `${wellDepth.against === 'fragments' ? 'the separate fragments' : 'the last computed distance'}.`,
            meaning:
              'The molecule is held by a barrier only: it has no bound levels, and its depth is negative.',
            remedy: 'Take the height of the barrier, not the depth, for its stability.',
            numbers: [number('well depth', wellDepth.value, 'hartree')],
          },
        ]
      : []),
    ...shallowCautions(level, findings.constants),
    ...levelCautions(level, vibration),
  ];
}

/** A series in powers of the displacement says nothing where one quantum takes the molecule to the top of its well. */
function shallowCautions(level: string, constants: WellConstants | undefined): readonly RaisedCaution[] {
  if (!constants?.diatomic) return [];
  const { harmonicWavenumberPerCm: harmonic, anharmonicityPerCm: anharmonic } = constants.diatomic;
  const share = Math.abs(anharmonic.value / harmonic.value);
  if (share <= LARGE_ANHARMONICITY) return [];
  return [
    {
      code: 'constants.shallow',
      level,
      message: `The anharmonicity of ${level}, ${anharmonic.value.toPrecision(4)} cm⁻¹, is ${Math.round(100 * share)} % of its wavenumber.`,
      meaning:
        'The well is too shallow for constants: they are derivatives at the minimum, and no levels follow from them.',
      remedy: 'Use the levels, which are computed on the whole curve.',
      numbers: [number('ωₑxₑ/ωₑ', share, ''), number('bound', LARGE_ANHARMONICITY, '')],
    },
  ];
}

function levelCautions(level: string, vibration: Vibration | undefined): readonly RaisedCaution[] {
  if (vibration?.kind === 'none' && vibration.isDoubtful) {
    return [
      {
        code: 'curve.interpolation',
        level,
        message: `No vibrational levels of ${level} are given. ${vibration.reason}`,
        meaning: 'Levels on a guessed curve would be guesses.',
        remedy: 'Compute more points in the well.',
      },
    ];
  }
  if (vibration?.kind !== 'found') return [];
  const { interpolationErrorPerCm: error } = vibration;
  if (error <= UNCERTAIN_LEVELS) return [];
  return [
    {
      code: 'curve.interpolation',
      level,
      message: `Between its points the ${level} curve is known to ${error.toPrecision(2)} cm⁻¹ only.`,
      meaning: 'Vibrational levels and what follows from them may be off by as much.',
      remedy: 'Compute more points in the well.',
      numbers: [
        number('largest error between points', error, 'cm⁻¹'),
        number('bound', UNCERTAIN_LEVELS, 'cm⁻¹'),
      ],
    },
  ];
}

const round = (value: number): number => Number(value.toPrecision(5));
