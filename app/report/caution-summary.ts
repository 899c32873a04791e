import type { Caution, StudyResults } from '#engine';

/**
 * The cautions of a results file as sentences: those that many points share are said once, with where they hold.
 *
 * @param coordinateText - a coordinate of the study as printed, unit included
 */
export function cautionSummary(
  results: StudyResults,
  coordinateText: (coordinate: number) => string,
): readonly string[] {
  const groups = new Map<string, { readonly caution: Caution; readonly places: number[] }>();
  const add = (caution: Caution, place?: number) => {
    const key = `${caution.code} ${caution.level ?? ''}`;
    const group = groups.get(key) ?? { caution, places: [] };
    if (place !== undefined) group.places.push(place);
    groups.set(key, group);
  };
  for (const caution of results.cautions) add(caution);
  for (const { coordinate, cautions } of results.points) {
    for (const caution of cautions) add(caution, coordinate ?? undefined);
  }
  return [...groups.values()].map(({ caution, places }) => {
    const subject = caution.level
      ? `${caution.level}${placesText(places, coordinateText)}`
      : placesText(places, coordinateText).trim();
    return subject ? `${capitalised(subject)}: ${caution.message}` : caution.message;
  });
}

/** ` at 2 Å`, ` from 2 Å to 4 Å (21 points)` */
function placesText(places: readonly number[], coordinateText: (coordinate: number) => string): string {
  if (places.length === 0) return '';
  const low = Math.min(...places);
  const high = Math.max(...places);
  if (low === high) return ` at ${coordinateText(low)}`;
  return ` between ${coordinateText(low)} and ${coordinateText(high)} (${places.length} points)`;
}

const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
