import type { StudyExplanation } from '#engine';

/** What a study takes in all its bases together. */
export interface WholeStudy {
  /** on one core */
  readonly seconds: number;
  /** of the largest level of any basis, for one point */
  readonly bytes: number;
}

export function wholeStudy(explanation: StudyExplanation): WholeStudy {
  const bases = [explanation, ...(explanation.furtherBases ?? [])];
  return {
    seconds: bases.reduce(
      (sum, { points, pointSeconds, afterwardsSeconds }) => sum + points * pointSeconds + afterwardsSeconds,
      0,
    ),
    bytes: Math.max(0, ...bases.flatMap(({ levels }) => levels.map(({ bytes }) => bytes))),
  };
}

/** Until a program runs and its code is compiled, seconds; fitted to the samples (tests/benchmarks/predictions.ts). */
const START_SECONDS = 1;

/** What `farwell run` takes by the clock on so many cores, seconds. */
export function programSeconds(explanation: StudyExplanation, cores: number): number {
  return START_SECONDS + wholeStudy(explanation).seconds / cores;
}
