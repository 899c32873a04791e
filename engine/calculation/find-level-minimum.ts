import { type CurvePoint, findCurveMinimum } from '../curves/minimum';
import type { RunControl } from '../termination';
import { computePoint } from './compute-point';
import { findInstabilityOnset } from './find-onset';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { LevelFindings, LevelResult, PointResult } from './result';

/** Spacing of the points computed around a minimum: fine against a well's width, coarse against energy noise. */
const SPACING_ANGSTROM = 0.02;
const SPACING_BOHR = 0.04;

/**
 * Equilibrium distance, energy there and depth against the far end of one level's curve; of RHF also where it becomes
 * unstable. Computes some ten more points of that level itself.
 *
 * @param level - name of one of the study's levels
 * @param points - the study's computed points
 */
export function findLevelMinimum(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  control?: RunControl,
): LevelFindings {
  const findings = minimumFindings(prepared, level, points, control);
  if (level !== 'RHF' || !prepared.study.scan) return findings;
  return { ...findings, instabilityOnset: findInstabilityOnset(prepared, points, control) };
}

function minimumFindings(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  control: RunControl | undefined,
): LevelFindings {
  const { scan, molecule } = prepared.study;
  if (!scan) return none('A single point has no curve.');
  if (!('bonds' in scan.coordinate)) return none('Minima are read off for scans of a bond length only.');
  if (prepared.levels.find((candidate) => candidate.name === level)?.kind === 'singles') {
    return none('CIS gives excited states only; its ground state is RHF.');
  }
  const curve: CurvePoint[] = points.map((point) => ({
    x: point.coordinate ?? Number.NaN,
    energy: groundEnergy(point.levels[level]),
  }));
  let guess: PointCarry | undefined;
  const energyAt = (x: number): number | undefined => {
    if (control?.isCancelled()) return undefined;
    const { result, carry } = computePoint(prepared, x, { guess, levels: [level], control });
    guess = carry ?? guess;
    return groundEnergy(result.levels[level]);
  };
  const minimum = findCurveMinimum(
    curve,
    energyAt,
    molecule.unit === 'bohr' ? SPACING_BOHR : SPACING_ANGSTROM,
  );
  switch (minimum.kind) {
    case 'found': {
      const { x, energy, uncertainty } = minimum;
      const far = curve.reduce((a, b) => (b.x > a.x ? b : a));
      return {
        minimum: { kind: 'found', equilibriumDistance: x, energy, uncertainty },
        ...(far.energy !== undefined && {
          wellDepth: { value: far.energy - energy, against: 'farEnd' as const, farEnd: far.x },
        }),
      };
    }
    case 'atEdge':
      return { minimum: { kind: 'atEdge', coordinate: minimum.x } };
    case 'several':
    case 'none':
      return { minimum };
  }
}

function none(reason: string): LevelFindings {
  return { minimum: { kind: 'none', reason } };
}

/** Energy of the lowest state where it can be trusted. */
function groundEnergy(result: LevelResult | undefined): number | undefined {
  if (!result?.converged) return undefined;
  return 'energy' in result ? result.energy : undefined;
}
