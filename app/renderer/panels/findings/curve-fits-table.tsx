import type { CurveFits, FitQuality } from '#engine';
import { formatFixed, formatPlain } from '../../numbers';

interface Form {
  readonly name: string;
  readonly formula: string;
  readonly quality: FitQuality;
  readonly parameters: readonly (readonly [string, number])[];
}

/** The curve as closed forms to be used elsewhere, in hartree and bohr; folded until asked for. */
export function CurveFitsTable({ fits }: { readonly fits: CurveFits }) {
  const forms = formsOf(fits);
  if (forms.length === 0) return null;
  return (
    <details>
      <summary>
        Fits <span className="hint">in hartree and bohr</span>
      </summary>
      {forms.map(({ name, formula, quality, parameters }) => (
        <section key={name}>
          <h4>{name}</h4>
          <p className="hint">{formula}</p>
          <dl className="facts">
            {parameters.map(([symbol, value]) => (
              <div key={symbol}>
                <dt>{symbol}</dt>
                <dd>{formatPlain(value, 9)}</dd>
              </div>
            ))}
            <div>
              <dt>
                <abbr
                  title={`Over ${quality.points} points; largest ${formatFixed(quality.largestPerCm, 2)} cm⁻¹`}
                >
                  Root-mean-square residual
                </abbr>
              </dt>
              <dd>{formatFixed(quality.rootMeanSquarePerCm, 2)} cm⁻¹</dd>
            </div>
          </dl>
        </section>
      ))}
    </details>
  );
}

const SUBSCRIPTS = ['₁', '₂', '₃', '₄'];

function formsOf({ morse, extendedRydberg, dunham }: CurveFits): readonly Form[] {
  const numbered = (values: readonly number[]) =>
    values.map((value, index) => [`a${SUBSCRIPTS[index]}`, value] as const);
  return [
    ...(morse
      ? [
          {
            name: 'Morse',
            formula: 'E = L + D[(1 − e^(−a(r − rₑ)))² − 1]',
            quality: morse,
            parameters: [
              ['D', morse.depth],
              ['rₑ', morse.equilibriumDistanceBohr],
              ['a', morse.steepnessPerBohr],
              ['L', morse.limit],
            ] as const,
          },
        ]
      : []),
    ...(extendedRydberg
      ? [
          {
            name: 'Extended Rydberg',
            formula: 'E = L − D(1 + a₁ρ + a₂ρ² + a₃ρ³)e^(−a₁ρ), ρ = r − rₑ',
            quality: extendedRydberg,
            parameters: [
              ['D', extendedRydberg.depth] as const,
              ['rₑ', extendedRydberg.equilibriumDistanceBohr] as const,
              ...numbered(extendedRydberg.coefficientsInBohr),
              ['L', extendedRydberg.limit] as const,
            ],
          },
        ]
      : []),
    ...(dunham
      ? [
          {
            name: 'Dunham',
            formula: 'E = E₀ + a₀ξ²(1 + a₁ξ + a₂ξ² + a₃ξ³ + a₄ξ⁴), ξ = (r − rₑ)/rₑ',
            quality: dunham,
            parameters: [
              ['E₀', dunham.energy] as const,
              ['rₑ', dunham.equilibriumDistanceBohr] as const,
              ['a₀', dunham.leading] as const,
              ...numbered(dunham.coefficients),
            ],
          },
        ]
      : []),
  ];
}
