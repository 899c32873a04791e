import { curvePoints } from './curve-points';
import { electronRepulsion } from './electron-repulsion';
import type { Measurement } from './measure';
import { wholeRuns } from './whole-runs';

export interface BenchmarkGroup {
  readonly name: string;
  measure(): readonly Measurement[] | Promise<readonly Measurement[]>;
}

export const GROUPS: readonly BenchmarkGroup[] = [
  { name: 'electron repulsion', measure: electronRepulsion },
  { name: 'curve points', measure: curvePoints },
  { name: 'whole runs', measure: wholeRuns },
];
