import type { CorrelatedResult, PointResult } from '#engine';
import { chosenPoints } from './chosen-points';
import type { NamedResults } from './named-results';
import { type Citations, PAPERS } from './references';
import { coordinateScale, coordinateText, type ScannedCoordinate } from './scanned-coordinate';
import { percent } from './sentences';
import { withMinus } from './text-escapes';
import type { TableColumn, TextTable } from './text-table';

const ENERGY_DECIMALS = 6;
const SHARE_DECIMALS = 4;
const MOST_PAIRS = 8;
const MOST_CONFIGURATIONS = 4;
const SMALL_WEIGHT = 0.01;
/** Pairs that give less than this share of the largest one are drawn together. */
const SMALL_PAIR = 0.01;
const HALF = 0.5;
const RANKS = ['Reference', 'Singles', 'Doubles', 'Triples', 'Quadruples', 'Fivefold', 'Sixfold'];

interface Quantity {
  readonly label: string;
  readonly of: (result: CorrelatedResult) => number | undefined;
  readonly decimals: number;
}

const QUANTITIES: readonly Quantity[] = [
  { label: 'Correlation (hartree)', of: ({ correlation }) => correlation, decimals: ENERGY_DECIMALS },
  {
    label: 'Davidson correction (hartree)',
    of: ({ energy, davidsonCorrected, referenceWeight }) =>
      davidsonCorrected === undefined || referenceWeight < HALF ? undefined : davidsonCorrected - energy,
    decimals: ENERGY_DECIMALS,
  },
  { label: 'Reference weight', of: ({ referenceWeight }) => referenceWeight, decimals: SHARE_DECIMALS },
  {
    label: 'Unpaired electrons',
    of: ({ unpairedElectrons }) => unpairedElectrons?.quartic,
    decimals: SHARE_DECIMALS,
  },
];

/** How much of the energy is correlation and of which kind, at some places from the minimum outwards. */
export function correlationTables(
  file: NamedResults,
  shared: ScannedCoordinate,
  citations: Citations,
): readonly TextTable[] {
  const { results } = file;
  const points = chosenPoints(results);
  const levels = results.study.levels.filter((level) => points.some((point) => correlatedAt(point, level)));
  if (levels.length === 0) return [];
  const scale = coordinateScale(results, shared);
  const placeOf = ({ coordinate }: PointResult) =>
    coordinate === null ? 'as given' : coordinateText(coordinate * scale, '').trim();
  const place: TableColumn = { label: shared.unit ? `${shared.label} (${shared.unit})` : shared.label };
  const idOf = (id: string) => (file.name ? `${id}-${file.name}` : id);
  const ofFile = file.name && ` of ${file.name}`;
  const columns = levels.flatMap((level) =>
    QUANTITIES.filter(({ of }) =>
      points.some((point) => quantityOf(of, correlatedAt(point, level)) !== undefined),
    ).map((quantity) => ({ level, quantity })),
  );
  const overview: TextTable = {
    id: idOf('correlation'),
    heading: `Correlation energies, weights, unpaired electrons${ofFile}`,
    columns: [place, ...columns.map(({ level, quantity }) => ({ groups: [level], label: quantity.label }))],
    rows: points.map((point) => [
      placeOf(point),
      ...columns.map(({ level, quantity: { of, decimals } }) => {
        const value = quantityOf(of, correlatedAt(point, level));
        return value === undefined ? '' : withMinus(value.toFixed(decimals));
      }),
    ]),
    notes: [
      ...(columns.some(({ quantity }) => quantity.label.startsWith('Davidson'))
        ? [
            `The correction of Langhoff and Davidson ${citations.cite(PAPERS.sizeCorrection)} is not variational, not contained in the other numbers, and left out where the reference has less than half of the weight.`,
          ]
        : []),
      ...(columns.some(({ quantity }) => quantity.label.startsWith('Unpaired'))
        ? [
            `Effectively unpaired electrons: Σ n²(2 − n)² over the natural occupations n ${citations.cite(PAPERS.unpaired)}.`,
          ]
        : []),
    ],
  };
  // of the largest expansion: the others are parts of it
  const largest = levels.at(-1)!;
  return [
    overview,
    ...ranksTable(points, largest, placeOf, place, idOf('ranks'), ofFile),
    ...pairsTable(points, largest, placeOf, place, idOf('pairs'), ofFile),
    ...configurationsTable(points, largest, placeOf, place, idOf('configurations'), ofFile),
  ];
}

const quantityOf = (of: Quantity['of'], result: CorrelatedResult | undefined) => result && of(result);

function correlatedAt(point: PointResult, level: string): CorrelatedResult | undefined {
  const result = point.levels[level];
  return result?.kind === 'correlated' && result.converged ? result : undefined;
}

function ranksTable(
  points: readonly PointResult[],
  level: string,
  placeOf: (point: PointResult) => string,
  place: TableColumn,
  id: string,
  ofFile: string,
): readonly TextTable[] {
  const parts = points.flatMap((point) => {
    const found = correlatedAt(point, level)?.correlationParts;
    return found ? [{ point, ...found }] : [];
  });
  if (parts.length === 0) return [];
  const count = Math.max(...parts.map(({ byRank }) => byRank.length));
  const ranks = Array.from({ length: count }, (_, rank) => rank);
  const label = (rank: number) => RANKS[rank] ?? `${rank}-fold`;
  return [
    {
      id,
      heading: `Correlation of ${level}${ofFile} by excitation rank`,
      columns: [
        place,
        ...ranks.slice(1).map((rank) => ({ groups: ['Energy (hartree)'], label: label(rank) })),
        { groups: ['Energy (hartree)'], label: 'Together' },
        ...ranks.map((rank) => ({ groups: ['Weight'], label: label(rank) })),
      ],
      rows: parts.map(({ point, byRank, total }) => [
        placeOf(point),
        ...ranks.slice(1).map((rank) => cell(byRank[rank]?.energy, ENERGY_DECIMALS)),
        cell(total, ENERGY_DECIMALS),
        ...ranks.map((rank) => cell(byRank[rank]?.weight, SHARE_DECIMALS)),
      ]),
      notes: [
        'Energy of a rank: how much the energy changes when the determinants of that rank are added to those of all lower ones, with the coefficients that they have in the whole.',
      ],
    },
  ];
}

function pairsTable(
  points: readonly PointResult[],
  level: string,
  placeOf: (point: PointResult) => string,
  place: TableColumn,
  id: string,
  ofFile: string,
): readonly TextTable[] {
  // orbitals of the minimum keep their numbers and meaning only near it
  const [point] = points;
  const result = point && correlatedAt(point, level);
  const projected = result?.correlationParts?.projected;
  if (!point || !result || projected?.kind !== 'found' || projected.pairs.length < 2) return [];
  const pairs = projected.pairs.toSorted((a, b) => a.energy - b.energy);
  const largest = Math.max(...pairs.map(({ energy }) => Math.abs(energy)));
  const shown = pairs.slice(0, MOST_PAIRS).filter(({ energy }) => Math.abs(energy) >= SMALL_PAIR * largest);
  const rest = pairs.filter((pair) => !shown.includes(pair));
  const singles = projected.singles.reduce((sum, { energy }) => sum + energy, 0);
  const total = pairs.reduce((sum, { energy }) => sum + energy, singles);
  const row = (label: string, energy: number, sameSpin: number | undefined) => [
    label,
    cell(energy, ENERGY_DECIMALS),
    cell(sameSpin, ENERGY_DECIMALS),
    total === 0 ? '' : percent(energy / total),
  ];
  return [
    {
      id,
      heading: `Correlation of ${level}${ofFile} by pairs of orbitals, ${place.label} ${placeOf(point)}`,
      columns: [
        { label: 'Excited from', content: 'words' },
        { label: 'Energy (hartree)' },
        { label: 'of equal spins' },
        { label: 'Share' },
      ],
      rows: [
        ...shown.map(({ orbitals: [first, second], energy, sameSpin }) =>
          row(
            first === second
              ? `${orbitalName(point, first)}²`
              : `${orbitalName(point, first)} and ${orbitalName(point, second)}`,
            energy,
            sameSpin,
          ),
        ),
        ...(rest.length > 0
          ? [
              row(
                `${rest.length} further ${rest.length === 1 ? 'pair' : 'pairs'}`,
                rest.reduce((sum, { energy }) => sum + energy, 0),
                rest.reduce((sum, { sameSpin }) => sum + sameSpin, 0),
              ),
            ]
          : []),
        ...(Math.abs(singles) >= 10 ** -ENERGY_DECIMALS
          ? [row('single excitations', singles, undefined)]
          : []),
        row('together', total, undefined),
      ],
      notes: [
        'Projected on the reference determinant, so that singles and pairs alone add up to the whole. Orbitals without a label go by number, from #1.',
      ],
    },
  ];
}

function configurationsTable(
  points: readonly PointResult[],
  level: string,
  placeOf: (point: PointResult) => string,
  place: TableColumn,
  id: string,
  ofFile: string,
): readonly TextTable[] {
  const rows = [...new Set([points[0], points.at(-1)])].flatMap((point) => {
    const [lowest] = (point && correlatedAt(point, level)?.states) ?? [];
    return (lowest?.configurations ?? [])
      .filter(({ weight }) => weight >= SMALL_WEIGHT)
      .slice(0, MOST_CONFIGURATIONS)
      .map(({ weight, doublyOccupied, singlyOccupied }) => [
        placeOf(point!),
        [
          ...doublyOccupied.map((orbital) => `${orbitalName(point!, orbital)}²`),
          ...singlyOccupied.map((orbital) => `${orbitalName(point!, orbital)}¹`),
        ].join(' '),
        cell(weight, SHARE_DECIMALS),
      ]);
  });
  if (rows.length === 0) return [];
  return [
    {
      id,
      heading: `Leading configurations of ${level}${ofFile}, lowest state`,
      columns: [place, { label: 'Occupied', content: 'words' }, { label: 'Weight' }],
      rows,
      notes: [],
    },
  ];
}

/** As labelled by symmetry, else by number from 1. */
function orbitalName({ levels }: PointResult, orbital: number): string {
  const field = levels.RHF ?? levels.ROHF;
  const labels = field?.kind === 'hartreeFock' ? field.orbitalSymmetries : undefined;
  const label = Array.isArray(labels) ? (labels[orbital] as string | null | undefined) : undefined;
  return label ?? `#${orbital + 1}`;
}

function cell(value: number | undefined, decimals: number): string {
  return value === undefined ? '' : withMinus(value.toFixed(decimals));
}
