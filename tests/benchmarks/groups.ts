import { curvePoints } from './curve-points';
import type { Measurement } from './measure';
import { wholeRuns } from './whole-runs';

export interface BenchmarkGroup {
  readonly name: string;
  measure(): readonly Measurement[] | Promise<readonly Measurement[]>;
}

export const GROUPS: readonly BenchmarkGroup[] = [
  { name: 'curve points', measure: curvePoints },
  { name: 'whole runs', measure: wholeRuns },
];
