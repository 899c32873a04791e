import type { Caution, StudyResults } from '#engine';

interface CautionAt {
  readonly caution: Caution;
  /** undefined for the whole curve, or a single geometry */
  readonly coordinate: number | undefined;
}

/**
 * The cautions of a results file as sentences: those that many points share are said once, with where they hold;
 * where their words differ from point to point, as at the first and as at the last.
 *
 * @param coordinateText - a coordinate of the study as printed, unit included
 */
export function cautionSummary(
  results: StudyResults,
  coordinateText: (coordinate: number) => string,
): readonly string[] {
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
  return [...groups.values()].map((group) => sentenceOf(group, coordinateText));
}

function sentenceOf(group: readonly CautionAt[], coordinateText: (coordinate: number) => string): string {
  const first = group[0]!;
  const last = group.at(-1)!;
  const where = placesText(
    group.flatMap(({ coordinate }) => (coordinate === undefined ? [] : [coordinate])),
    coordinateText,
  );
  const subject = capitalised([first.caution.level, where].filter(Boolean).join(' '));
  const ending =
    last.caution.message !== first.caution.message && last.coordinate !== undefined
      ? ` At ${coordinateText(last.coordinate)}: ${last.caution.message}`
      : '';
  return `${subject ? `${subject}: ` : ''}${first.caution.message}${ending}`;
}

/** `at 2 Å`, `between 2 Å and 4 Å (21 points)` */
function placesText(places: readonly number[], coordinateText: (coordinate: number) => string): string {
  if (places.length === 0) return '';
  const low = Math.min(...places);
  const high = Math.max(...places);
  if (low === high) return `at ${coordinateText(low)}`;
  return `between ${coordinateText(low)} and ${coordinateText(high)} (${places.length} points)`;
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
