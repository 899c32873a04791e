import { findLevel } from './levels';
import type { PreparedStudy } from './prepare-study';
import { number, type RaisedCaution } from './raised-caution';
import type { LevelFindings, PointResult, Vibration } from './result';
import { wellCautions } from './well-cautions';

/** A far end of RHF or ROHF higher above its fragments than this, hartree, is a wrong limit and not a rest of binding. */
const WRONG_LIMIT = 0.005;
/** A far end off its fragments by more than this share of the well depth is said. */
const LARGE_SHARE = 0.02;

/** What to mistrust about depths, limits, minima and levels, from what was read off the curves. */
export function curveCautions(
  prepared: PreparedStudy,
  points: readonly PointResult[],
  findings: Readonly<Record<string, LevelFindings>>,
): readonly RaisedCaution[] {
  const { scan, molecule } = prepared.study;
  if (!scan || !('bonds' in scan.coordinate)) return [];
  const coordinates = points.flatMap(({ coordinate }) => (coordinate === null ? [] : [coordinate]));
  const farEnd = Math.max(...coordinates);
  const symbol = molecule.unit === 'bohr' ? 'bohr' : 'Å';
  return [
    ...Object.entries(findings).flatMap(([level, found]) => [
      ...edgeCautions(level, found, symbol),
      ...wellCautions(level, found, molecule.unit),
      ...limitCautions(level, found, farEnd),
      ...rangeCautions(level, found.vibration, [Math.min(...coordinates), farEnd]),
    ]),
    ...depthCautions(findings),
  ];
}

function edgeCautions(level: string, { minimum }: LevelFindings, unit: string): RaisedCaution[] {
  if (minimum.kind !== 'atEdge') return [];
  return [
    {
      code: 'minimum.atEdge',
      level,
      message: `The lowest computed point of ${level} is at the edge of the range.`,
      meaning: 'No minimum can be read off, nor a depth or constants.',
      remedy: 'Widen the range there.',
      numbers: [number('lowest point', minimum.coordinate, unit)],
    },
  ];
}

/** Whether the far end of a curve is where its separate fragments are. */
function limitCautions(
  level: string,
  { dissociation, wellDepth }: LevelFindings,
  farEnd: number,
): RaisedCaution[] {
  if (dissociation?.kind !== 'found' || dissociation.farEndAbove === undefined || !wellDepth) return [];
  const above = dissociation.farEndAbove;
  const share = Math.abs(above) / Math.abs(wellDepth.value);
  if (share <= LARGE_SHARE) return [];
  const size = `${Math.abs(above).toFixed(4)} hartree, ${(100 * share).toFixed(0)} % of the well depth,`;
  const common = {
    level,
    range: [farEnd, farEnd] as const,
    numbers: [
      number('far end above the separate fragments', above, 'hartree'),
      number('share of the well depth', share),
      number('bound of the share', LARGE_SHARE),
    ],
  };
  const { kind, name } = findLevel(level, 'levels');
  if (above > WRONG_LIMIT && kind === 'hartreeFock' && name !== 'UHF') {
    return [
      {
        ...common,
        code: 'limit.wrong',
        message:
          `The far end of the ${level} curve lies ${size} above the separate fragments: it keeps electrons paired ` +
          'that belong to different fragments.',
        meaning:
          'Its long-range part is no dissociation curve, and levels high in the well are not those of the molecule.',
        remedy: 'Use its well only; for the whole curve take UHF or full CI.',
      },
    ];
  }
  const isSizeConsistent = kind === 'hartreeFock' || level === 'MP2' || level === 'FCI';
  if (above > 0 && !isSizeConsistent) {
    return [
      {
        ...common,
        code: 'sizeConsistency.large',
        message: `The far end of the ${level} curve lies ${size} above the separate fragments: the level is not size-consistent.`,
        meaning:
          'Its energies of separate and of joined fragments are not comparable to that extent, so its depth is too small.',
        remedy: 'Quote the depth with this error, or take full CI or a higher excitation rank.',
      },
    ];
  }
  return [
    {
      ...common,
      code: 'range.short',
      message:
        `The far end of the ${level} curve is ${size} off the energy of the separate fragments: it has not reached ` +
        'its limit, or tends to another one.',
      meaning: 'High vibrational levels rest on how the curve is continued there.',
      remedy: 'Scan to a larger distance.',
    },
  ];
}

/** Whether the levels quoted lie within the distances computed. */
function rangeCautions(
  level: string,
  vibration: Vibration | undefined,
  range: readonly [number, number],
): RaisedCaution[] {
  if (vibration?.kind !== 'found' || vibration.beyondComputedRange.length === 0) return [];
  const { beyondComputedRange: beyond, boundLevels } = vibration;
  return [
    {
      code: 'range.shortForLevels',
      level,
      range,
      message: `${beyond.length} of ${boundLevels} vibrational levels of ${level} reach beyond the computed distances, the lowest of them v = ${Math.min(...beyond)}.`,
      meaning: 'These levels rest on how the curve is continued there, not on computed points.',
      remedy: 'Widen the range on both sides, or quote the levels below only.',
      numbers: [
        number('lowest quantum number beyond', Math.min(...beyond)),
        number('levels beyond', beyond.length),
        number('bound levels', boundLevels),
      ],
    },
  ];
}

/** What depths are taken against, and what they must not be used for. */
function depthCautions(findings: Readonly<Record<string, LevelFindings>>): RaisedCaution[] {
  const depths = Object.entries(findings).flatMap(([level, { wellDepth, counterpoise }]) =>
    wellDepth ? [{ level, against: wellDepth.against, counterpoise }] : [],
  );
  if (depths.length === 0) return [];
  const atFarEnd = depths.filter(({ against }) => against === 'farEnd').map(({ level }) => level);
  const errors = depths.flatMap(({ level, counterpoise }) =>
    counterpoise?.kind === 'found'
      ? [number(`superposition error of ${level}`, counterpoise.error, 'hartree')]
      : [],
  );
  return [
    ...(atFarEnd.length > 0
      ? [
          {
            code: 'depth.farEnd',
            message:
              `Well depths${atFarEnd.length < depths.length ? ` of ${atFarEnd.join(', ')}` : ''} are taken against ` +
              'the last computed distance, not against separate fragments.',
            meaning: 'What still binds there, and what a level gets wrong there, is part of them.',
            remedy:
              'Scan a single bond that parts the molecule in two, so that its fragments can be computed.',
          },
        ]
      : []),
    ...(atFarEnd.length < depths.length
      ? [
          {
            code: 'depth.fragments',
            message:
              'Well depths are taken against separate fragments, each with its own basis functions only.',
            meaning: 'In small bases that makes them too large.',
            remedy:
              errors.length > 0
                ? 'Compare them with those corrected by counterpoise, given beside.'
                : 'Ask for the counterpoise correction ("findings": { "counterpoise": true }) or take a larger basis.',
            ...(errors.length > 0 && { numbers: errors }),
          },
        ]
      : []),
    {
      code: 'safety.measuredData',
      message: 'These bond strengths are computed.',
      meaning: 'They hold for this basis and level, not for what a vessel or a reaction will do.',
      remedy:
        'Where safety depends on a bond strength, use measured data, local rules and qualified judgement.',
    },
  ];
}
