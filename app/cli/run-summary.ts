import type { Caution, LevelFindings, LevelResult, StudyResults } from '#engine';
import { coordinateText } from '../calculation/coordinate-text';
import { type CautionGroup, cautionGroups } from '../report/caution-summary';
import { ended } from '../report/sentences';
import { comparedConstants } from '../study/compared-constants';
import { basesLines, unconvergedInBases } from './bases-summary';
import { curveTexts } from './curve-summary';
import { EXIT, type ExitCode } from './exit-codes';
import { minimumText } from './minimum-text';
import { counted } from './wording';

/** Constants that the summary shows. */
const SUMMARISED: readonly string[] = ['ωₑ', 'D₀'];
/** More lines of a kind than this would hide everything else; the results file has them all. */
const MOST_LINES = 12;

/** What is said about a finished study, and with which status it ends. */
export function summarise(results: StudyResults): {
  readonly lines: readonly string[];
  readonly exit: ExitCode;
} {
  const unconverged = [...scaleLines(results), ...unconvergedLines(results), ...unconvergedInBases(results)];
  return {
    lines: [...findingsLines(results), ...basesLines(results), ...cautionLines(results), ...unconverged],
    exit: unconverged.length === 0 ? EXIT.done : EXIT.unconverged,
  };
}

/** Points whose scale factors are not the best ones. */
function scaleLines({ points }: StudyResults): readonly string[] {
  const count = points.filter(({ scaleOptimisation }) => scaleOptimisation?.converged === false).length;
  return count === 0 ? [] : [`Scale factors not found at ${counted(count, 'point')}: see the results file.`];
}

/** One line for every point and level that did not converge: where, and why. */
function unconvergedLines({ study, points }: StudyResults): readonly string[] {
  const lines = points.flatMap((point) =>
    Object.entries(point.levels)
      .filter(([, result]) => !result.converged)
      .map(([level, result]) => {
        const place = point.coordinate === null ? '' : ` at ${coordinateText(study, point.coordinate)}`;
        return `${level} did not converge${place}: ${reasonText(result.termination)}.`;
      }),
  );
  const more = lines.length - MOST_LINES;
  return more > 1
    ? [...lines.slice(0, MOST_LINES), `… and ${more} more, marked in the results file.`]
    : lines;
}

function reasonText(termination: LevelResult['termination']): string {
  switch (termination.kind) {
    case 'iterationLimit':
      return `not done after ${counted(termination.limit, 'iteration')}`;
    case 'stagnated':
      return `no progress for ${counted(termination.iterationsWithoutProgress, 'iteration')}`;
    case 'notFinite':
      return `the ${termination.quantity} became infinite or undefined`;
    case 'refused':
      return termination.message.replace(/\.$/, '');
    case 'cancelled':
      return 'it was cancelled';
    // a level whose own iteration converged is unconverged only through its orbitals
    case 'orbitalsNotConverged':
    case 'converged':
      return 'the orbitals that it builds on did not converge';
  }
}

/** What can be read off each level's curve. */
function findingsLines(results: StudyResults): readonly string[] {
  const { study, findings } = results;
  if (!study.scan) return [];
  return study.levels.flatMap((level) => {
    const of = findings[level];
    const texts = of
      ? [
          minimumText(of, study),
          vibrationText(level, results),
          ...curveTexts(level, results),
          onsetText(of, study),
        ]
      : [];
    return texts.flatMap((text) => (text === undefined ? [] : [`${level}: ${text}`]));
  });
}

/** Of diatomic molecules, in a line; the results file and the report have all constants. */
function vibrationText(level: string, results: StudyResults): string | undefined {
  const vibration = results.findings[level]?.vibration;
  if (vibration?.kind !== 'found') return undefined;
  const constants = comparedConstants(results).flatMap(({ symbol, unit, decimals, byLevel, measured }) => {
    const value = byLevel.get(level);
    if (value === undefined || !SUMMARISED.includes(symbol)) return [];
    const beside = measured ? ` (measured ${Number(measured.value.toFixed(decimals))})` : '';
    return [`${symbol} = ${value.toFixed(decimals)} ${unit}${beside}`];
  });
  return [...constants, counted(vibration.boundLevels, 'bound vibrational level')].join(', ');
}

function onsetText({ instabilityOnset }: LevelFindings, study: StudyResults['study']): string | undefined {
  if (instabilityOnset?.kind !== 'found') return undefined;
  const place = coordinateText(study, Number(instabilityOnset.coordinate.toFixed(4)));
  return `becomes unstable towards different orbitals for different spins at ${place}`;
}

/** What to mistrust and where, what that means, and on a line of its own what to do. */
function cautionLines(results: StudyResults): readonly string[] {
  const { study, cautions, furtherBases = [] } = results;
  const places = (coordinate: number) => coordinateText(study, Number(coordinate.toPrecision(5)));
  const isSaid = ({ code, level }: Caution) =>
    cautions.some((other) => other.code === code && other.level === level);
  return [
    ...cautionGroups(results, places).flatMap((group) => groupLines('Caution', group)),
    // only what the study's own basis has not raised
    ...furtherBases.flatMap(({ basis, cautions: inBasis }) =>
      cautionGroups({ cautions: inBasis.filter((caution) => !isSaid(caution)), points: [] }, places).flatMap(
        (group) => groupLines(`Caution in ${basis.name}`, group),
      ),
    ),
  ];
}

function groupLines(head: string, { lead, messages, meaning, remedy }: CautionGroup): readonly string[] {
  const sentences = [...messages, ...(meaning ? [meaning] : [])].map(ended).join(' ');
  return [`${head}: ${lead ? `${lead}: ` : ''}${sentences}`, ...(remedy ? [`  ${remedy}`] : [])];
}
