import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { type CurveMinimum, findCurveMinimum } from '../curves/minimum';
import type { RunControl } from '../termination';
import { counterpoise } from './counterpoise';
import { diatomicOf } from './diatomic';
import { explainStudy } from './explain-study';
import { findInstabilityOnset } from './find-onset';
import { dissociationLimit } from './fragments';
import { type LevelCurve, levelCurve } from './level-curve';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import type { Dissociation, LevelFindings, PointResult, WellDepth } from './result';
import { vibrationOf } from './vibration';
import { wellConstants } from './well-constants';

/** Spacing of the points computed around a minimum: fine against a well's width, coarse against energy noise. */
const SPACING_ANGSTROM = 0.02;
const SPACING_BOHR = 0.04;

/**
 * All that is read off one level's curve: its minimum with the constants of the well, the limit of separate
 * fragments and the depth against it, where asked for the superposition error, vibrational levels; of RHF also where
 * it becomes unstable. Computes the further points of that level that it needs itself.
 *
 * @param level - name of one of the study's levels
 * @param points - the study's computed points
 * @param left - what each of them left for its neighbours
 */
export function findLevelMinimum(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  left: readonly (PointCarry | undefined)[] = [],
  control?: RunControl,
): LevelFindings {
  const { study } = prepared;
  const findings = curveFindings(prepared, level, points, left, control);
  const superposition = study.findings?.counterpoise && counterpoise(prepared, level, findings, control);
  return {
    ...findings,
    ...(superposition && { counterpoise: superposition }),
    ...(level === 'RHF' &&
      study.scan && { instabilityOnset: findInstabilityOnset(prepared, points, control) }),
  };
}

function curveFindings(
  prepared: PreparedStudy,
  level: string,
  points: readonly PointResult[],
  left: readonly (PointCarry | undefined)[],
  control: RunControl | undefined,
): LevelFindings {
  const { scan, molecule } = prepared.study;
  if (!scan) return none('A single point has no curve.');
  if (!('bonds' in scan.coordinate)) return none('Minima are read off for scans of a bond length only.');
  if (prepared.levels.find((candidate) => candidate.name === level)?.kind === 'singles') {
    return none('CIS gives excited states only; its ground state is RHF.');
  }
  const curve = levelCurve(prepared, level, points, left, control);
  const farEnd = curve.points().at(-1);
  const dissociation = dissociationLimit(prepared, level, farEnd, control);
  const limit = dissociation && { dissociation };
  const spacing = molecule.unit === 'bohr' ? SPACING_BOHR : SPACING_ANGSTROM;
  const minimum = findCurveMinimum(curve.scan, curve.energyAt, spacing);
  if (minimum.kind !== 'found') return { minimum: withoutMinimum(minimum), ...limit };
  const { x, energy, uncertainty } = minimum;
  const wellDepth = wellDepthOf(energy, curve, dissociation);
  const constants = wellConstants(prepared, curve, minimum, spacing);
  return {
    minimum: { kind: 'found', equilibriumDistance: x, energy, uncertainty },
    constants,
    ...limit,
    ...(wellDepth && { wellDepth }),
    ...vibrationFindings(prepared, curve, energy, dissociation, wellDepth),
  };
}

function none(reason: string): LevelFindings {
  return { minimum: { kind: 'none', reason } };
}

function withoutMinimum(minimum: Exclude<CurveMinimum, { kind: 'found' }>): LevelFindings['minimum'] {
  return minimum.kind === 'atEdge' ? { kind: 'atEdge', coordinate: minimum.x } : minimum;
}

function wellDepthOf(
  minimum: number,
  curve: LevelCurve,
  dissociation: Dissociation | undefined,
): WellDepth | undefined {
  if (dissociation?.kind === 'found') {
    const farEnd = curve.points().at(-1)!;
    return {
      value: dissociation.energy - minimum,
      against: 'fragments',
      farEnd: farEnd.x,
      valueAgainstFarEnd: farEnd.energy - minimum,
    };
  }
  const last = curve.scan.reduce((a, b) => (b.x > a.x ? b : a));
  if (last.energy === undefined) return undefined;
  return { value: last.energy - minimum, against: 'farEnd', farEnd: last.x };
}

function vibrationFindings(
  prepared: PreparedStudy,
  curve: LevelCurve,
  minimum: number,
  dissociation: Dissociation | undefined,
  wellDepth: WellDepth | undefined,
): Pick<LevelFindings, 'vibration'> {
  const molecule = diatomicOf(prepared.study);
  if (!molecule) return {};
  const seconds = explainStudy(prepared).levels.find(({ level }) => level === curve.level)?.seconds ?? 0;
  const limit = dissociation?.kind === 'found' ? dissociation.energy : undefined;
  const vibration = vibrationOf(molecule, curve, minimum, limit, seconds);
  if (vibration.kind !== 'found' || !wellDepth) return { vibration };
  const d0 = wellDepth.value - vibration.zeroPointPerCm / HARTREE_IN_WAVENUMBERS;
  return { vibration: { ...vibration, d0 } };
}
