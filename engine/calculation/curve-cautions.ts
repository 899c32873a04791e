import { findLevel } from './levels';
import type { PreparedStudy } from './prepare-study';
import type { Caution, LevelFindings, PointResult } from './result';
import { wellCautions } from './well-cautions';

/** A far end of RHF or ROHF higher above its fragments than this, hartree, is a wrong limit and not a rest of binding. */
const WRONG_LIMIT = 0.005;
/** A far end off its fragments by more than this share of the well depth is said. */
const LARGE_SHARE = 0.02;

/** What to mistrust about depths, limits and minima, from what was read off the curves. */
export function curveCautions(
  prepared: PreparedStudy,
  points: readonly PointResult[],
  findings: Readonly<Record<string, LevelFindings>>,
): readonly Caution[] {
  const { scan } = prepared.study;
  if (!scan || !('bonds' in scan.coordinate)) return [];
  const coordinates = points.flatMap(({ coordinate }) => (coordinate === null ? [] : [coordinate]));
  const farEnd = Math.max(...coordinates);
  return [
    ...Object.entries(findings).flatMap(([level, found]) => [
      ...wellCautions(level, found, prepared.study.molecule.unit),
      ...levelCautions(level, found, farEnd),
    ]),
    depthCaution(findings),
  ];
}

function levelCautions(
  level: string,
  { minimum, dissociation, wellDepth }: LevelFindings,
  farEnd: number,
): Caution[] {
  if (minimum.kind === 'atEdge') {
    return [
      {
        code: 'minimum.atEdge',
        level,
        message:
          `The lowest computed point of ${level} is at the edge of the range, so no minimum can be read ` +
          'off. Widen the range there.',
      },
    ];
  }
  if (dissociation?.kind !== 'found' || dissociation.farEndAbove === undefined || !wellDepth) return [];
  const above = dissociation.farEndAbove;
  const share = Math.abs(above) / Math.abs(wellDepth.value);
  if (share <= LARGE_SHARE) return [];
  const size = `${Math.abs(above).toFixed(4)} hartree, ${(100 * share).toFixed(0)} % of the well depth,`;
  const range = [farEnd, farEnd] as const;
  const { kind, name } = findLevel(level, 'levels');
  if (above > WRONG_LIMIT && kind === 'hartreeFock' && name !== 'UHF') {
    return [
      {
        code: 'limit.wrong',
        level,
        range,
        message:
          `The far end of the ${level} curve lies ${size} above the separate fragments: it keeps electrons paired ` +
          'that belong to different fragments. Its long-range part is no dissociation curve; use its well only.',
      },
    ];
  }
  const isSizeConsistent = kind === 'hartreeFock' || level === 'MP2' || level === 'FCI';
  if (above > 0 && !isSizeConsistent) {
    return [
      {
        code: 'sizeConsistency.large',
        level,
        range,
        message:
          `The far end of the ${level} curve lies ${size} above the separate fragments: the level is not ` +
          'size-consistent, and its energies of separate and of joined fragments are not comparable to that extent.',
      },
    ];
  }
  return [
    {
      code: 'range.short',
      level,
      range,
      message:
        `The far end of the ${level} curve is ${size} off the energy of the separate fragments: it has not reached ` +
        'its limit, or tends to another one. High vibrational levels rest on how the curve is continued there.',
    },
  ];
}

/** What depths are taken against, and what they must not be used for. */
function depthCaution(findings: Readonly<Record<string, LevelFindings>>): Caution {
  const depths = Object.entries(findings).flatMap(([level, { wellDepth }]) =>
    wellDepth ? [{ level, against: wellDepth.against }] : [],
  );
  const atFarEnd = depths.filter(({ against }) => against === 'farEnd');
  const safety = 'Where safety depends on a bond strength, use measured data.';
  if (depths.length > 0 && atFarEnd.length === 0) {
    return {
      code: 'depth.fragments',
      message:
        'Well depths are taken against separate fragments, each with its own basis functions only; in small bases ' +
        `that makes them too large. ${safety}`,
    };
  }
  const which = atFarEnd.length < depths.length ? ` of ${atFarEnd.map(({ level }) => level).join(', ')}` : '';
  return {
    code: 'depth.farEnd',
    message: `Well depths${which} are taken against the last computed distance, not against separate fragments. ${safety}`,
  };
}
