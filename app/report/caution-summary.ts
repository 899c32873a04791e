import type { Caution, StudyResults } from '#engine';
import type { ListItem } from './report-document';
import { capitalised, ended } from './sentences';

interface CautionAt {
  readonly caution: Caution;
  /** undefined for the whole curve, or a single geometry */
  readonly coordinate: number | undefined;
}

/** One thing to mistrust, with where it holds. */
export interface CautionGroup {
  /** level and places, as `RHF between 2 Å and 4 Å (21 points)`; empty where it concerns everything */
  readonly lead: string;
  /** what is the case: where the words differ from point to point, at the first and at the last */
  readonly messages: readonly string[];
  readonly meaning?: string;
  readonly remedy?: string;
}

/**
 * The cautions of a results file, first those of the whole curve; those that many points share are said once.
 *
 * @param coordinateText - a coordinate of the study as printed, unit included
 */
export function cautionGroups(
  results: Pick<StudyResults, 'cautions' | 'points'>,
  coordinateText: (coordinate: number) => string,
): readonly CautionGroup[] {
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
  return [...groups.values()].map((group) => groupOf(group, coordinateText));
}

/** The same as the report lists them, each with what it means and what to do. */
export function cautionSummary(
  results: StudyResults,
  coordinateText: (coordinate: number) => string,
): readonly ListItem[] {
  return cautionGroups(results, coordinateText).map(({ lead, messages, meaning, remedy }) => ({
    lead: capitalised(lead),
    text: [...messages, ...(meaning ? [meaning] : []), ...(remedy ? [remedy] : [])].map(ended).join(' '),
  }));
}

function groupOf(group: readonly CautionAt[], coordinateText: (coordinate: number) => string): CautionGroup {
  const first = group[0]!;
  const last = group.at(-1)!;
  const { level, range, message, meaning, remedy } = first.caution;
  const places = group.flatMap(({ coordinate }) => (coordinate === undefined ? [] : [coordinate]));
  const where = placesText(places.length > 0 ? places : (range ?? []), places.length, coordinateText);
  const changed =
    last.caution.message !== message && last.coordinate !== undefined
      ? [`At ${coordinateText(last.coordinate)}: ${last.caution.message}`]
      : [];
  return {
    lead: [level, where].filter(Boolean).join(' '),
    messages: [message, ...changed],
    ...(meaning && { meaning }),
    ...(remedy && { remedy }),
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
