import type { CurveFits, FitQuality } from '#engine';
import { fileGroup, type NamedResults } from './named-results';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

const DIGITS = 8;

/** The curves in closed forms, with how well these fit. */
export function fitsTable(files: readonly NamedResults[]): TextTable | undefined {
  const rows = files.flatMap((file) =>
    file.results.study.levels.flatMap((level) => {
      const fits = file.results.findings[level]?.fits;
      return fits ? formsOf(fits).map((form) => [[...fileGroup(file), level].join(', '), ...form]) : [];
    }),
  );
  if (rows.length === 0) return undefined;
  return {
    id: 'fits',
    heading: 'The curves in closed form',
    columns: [
      { label: 'Level', content: 'words' },
      { label: 'Form', content: 'words' },
      { label: 'Parameters (hartree, bohr)', content: 'words' },
      { groups: ['Residuals (cm⁻¹)'], label: 'root mean square' },
      { groups: ['Residuals (cm⁻¹)'], label: 'largest' },
      { label: 'Points' },
    ],
    rows,
    notes: [
      'Morse: E(r) = L + D[(1 − e^(−a(r − rₑ)))² − 1]. Extended Rydberg: E(r) = L − D(1 + a₁ρ + a₂ρ² + a₃ρ³)e^(−a₁ρ), ρ = r − rₑ. Dunham: E(r) = E₀ + a₀ξ²(1 + a₁ξ + a₂ξ² + a₃ξ³ + a₄ξ⁴), ξ = (r − rₑ)/rₑ, good near rₑ only. Residuals are those at the points that each form was fitted to.',
    ],
  };
}

function formsOf({ morse, extendedRydberg, dunham }: CurveFits): readonly (readonly string[])[] {
  return [
    ...(morse
      ? [
          form(
            'Morse',
            {
              D: morse.depth,
              rₑ: morse.equilibriumDistanceBohr,
              a: morse.steepnessPerBohr,
              L: morse.limit,
            },
            morse,
          ),
        ]
      : []),
    ...(extendedRydberg
      ? [
          form(
            'Extended Rydberg',
            {
              D: extendedRydberg.depth,
              rₑ: extendedRydberg.equilibriumDistanceBohr,
              ...numbered(extendedRydberg.coefficientsInBohr),
              L: extendedRydberg.limit,
            },
            extendedRydberg,
          ),
        ]
      : []),
    ...(dunham
      ? [
          form(
            'Dunham',
            {
              'E₀': dunham.energy,
              rₑ: dunham.equilibriumDistanceBohr,
              'a₀': dunham.leading,
              ...numbered(dunham.coefficients),
            },
            dunham,
          ),
        ]
      : []),
  ];
}

function form(
  name: string,
  parameters: Readonly<Record<string, number>>,
  { rootMeanSquarePerCm, largestPerCm, points }: FitQuality,
): readonly string[] {
  return [
    name,
    Object.entries(parameters)
      .map(([symbol, value]) => `${symbol} = ${withMinus(value.toPrecision(DIGITS))}`)
      .join(', '),
    threeDigits(rootMeanSquarePerCm),
    threeDigits(largestPerCm),
    String(points),
  ];
}

/** Never in powers of ten. */
const threeDigits = (value: number): string => String(Number(value.toPrecision(3)));

const numbered = (coefficients: readonly number[]): Readonly<Record<string, number>> =>
  Object.fromEntries(coefficients.map((value, index) => [`a${'₁₂₃₄'.charAt(index)}`, value]));
