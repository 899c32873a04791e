import type { Caution, StudyResults } from '#engine';
import type { ListItem } from './report-document';
import { capitalised, ended } from './sentences';

interface CautionAt {
  readonly caution: Caution;
  /** undefined for the whole curve, or a single geometry */
  readonly coordinate: number | undefined;
}

/**
 * The cautions of a results file, each with what it means and what to do: those that many points share are said once,
 * with where they hold; where their words differ from point to point, as at the first and as at the last.
 *
 * @param coordinateText - a coordinate of the study as printed, unit included
 */
export function cautionSummary(
  results: StudyResults,
  coordinateText: (coordinate: number) => string,
): readonly ListItem[] {
  const all: CautionAt[] = [
    ...results.cautions.map((caution) => ({ caution, coordinate: undefined })),
    ...results.points.flatMap(({ coordinate, cautions }) =>
      cautions.map((caution) => ({ caution, coordinate: coordinate ?? undefined })),
    ),
  ];
  const groups = new Map<string, CautionAt[]>();
  for (const one of all) {
    const { code, level, message } = one.caution;
    // several crossings of one curve are several things to say
    const key = [code, level, one.coordinate === undefined && message].join(' ');
    groups.set(key, [...(groups.get(key) ?? []), one]);
  }
  return [...groups.values()].map((group) => itemOf(group, coordinateText));
}

function itemOf(group: readonly CautionAt[], coordinateText: (coordinate: number) => string): ListItem {
  const first = group[0]!;
  const last = group.at(-1)!;
  const { level, range, message, meaning, remedy } = first.caution;
  const places = group.flatMap(({ coordinate }) => (coordinate === undefined ? [] : [coordinate]));
  const where = placesText(places.length > 0 ? places : (range ?? []), places.length, coordinateText);
  const changed =
    last.caution.message !== message && last.coordinate !== undefined
      ? [`At ${coordinateText(last.coordinate)}: ${last.caution.message}`]
      : [];
  const sentences = [message, ...changed, ...(meaning ? [meaning] : []), ...(remedy ? [remedy] : [])];
  return {
    lead: capitalised([level, where].filter(Boolean).join(' ')),
    text: sentences.map(ended).join(' '),
  };
}

/** `at 2 Å`, `between 2 Å and 4 Å (21 points)` */
function placesText(
  places: readonly number[],
  points: number,
  coordinateText: (coordinate: number) => string,
): string {
  if (places.length === 0) return '';
  const low = Math.min(...places);
  const high = Math.max(...places);
  if (low === high) return `at ${coordinateText(low)}`;
  return `between ${coordinateText(low)} and ${coordinateText(high)}${points > 1 ? ` (${points} points)` : ''}`;
}
