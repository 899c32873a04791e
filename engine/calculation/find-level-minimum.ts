import type { RunControl } from '../termination';
import { counterpoise } from './counterpoise';
import { curveFits } from './curve-fits';
import { type Diatomic, diatomicOf, isotopologueOf } from './diatomic';
import { excitedStates, type LowestState, lowestStateOfSingles } from './excited-states';
import { explainStudy } from './explain-study';
import { findInstabilityOnset } from './find-onset';
import { findReferenceWeight } from './find-reference-weight';
import { dissociationLimit } from './fragments';
import type { Isotopologue } from './further-findings';
import { type LevelPoints, levelPoints, lowestCurve } from './level-curve';
import type { PointCarry } from './mean-fields';
import type { PreparedStudy } from './prepare-study';
import { readWell, type Well } from './read-well';
import type { LevelFindings, PointResult, WellDepth } from './result';
import type { CompleteStudy } from './study';
import { vibrationOn } from './vibration';
import { diatomicConstants } from './well-constants';
import { fromLowestLevel, wellDepthOf } from './well-depth';

/**
 * All that is read off one level's curve: its minimum with the constants of the well, the limit of separate
 * fragments and the depth against it, where asked for the superposition error, vibrational levels; of RHF also where
 * it becomes unstable, of CI where its reference loses weight. Computes the further points of that level that it needs itself.
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
    ...(study.scan &&
      prepared.levels.some(({ name, kind }) => name === level && kind === 'correlated') && {
        referenceWeight: findReferenceWeight(prepared, level, points, left, control),
      }),
  };
}

function curveFindings(
  prepared: PreparedStudy,
  level: string,
  computed: readonly PointResult[],
  left: readonly (PointCarry | undefined)[],
  control: RunControl | undefined,
): LevelFindings {
  const { study } = prepared;
  if (!study.scan) return none('A single point has no curve.');
  if (!('bonds' in study.scan.coordinate)) {
    return none('Minima are read off for scans of a bond length only.');
  }
  const points = levelPoints(prepared, level, computed, left, control);
  const seconds = explainStudy(prepared).levels.find((explained) => explained.level === level)?.seconds ?? 0;
  if (prepared.levels.find(({ name }) => name === level)?.kind === 'singles') {
    const lowest = lowestStateOfSingles(prepared, points, seconds);
    return {
      ...none('CIS gives excited states only; its ground state is RHF.'),
      ...excitedFindings(prepared, points, lowest, seconds, control),
    };
  }
  const curve = lowestCurve(points);
  const farEnd = curve.points().at(-1);
  const dissociation = dissociationLimit(prepared, level, farEnd, control);
  const limit = dissociation?.kind === 'found' ? dissociation.energy : undefined;
  const { minimum, well } = readWell(prepared, curve, limit, seconds);
  const wellDepth = well && wellDepthOf(well.found.energy, curve, dissociation);
  const vibrations = well && vibrationFindings(study, computed, level, well, wellDepth);
  return {
    minimum,
    ...(dissociation && { dissociation }),
    ...(wellDepth && { wellDepth }),
    ...(well?.constants && { constants: well.constants }),
    ...(well && { fits: curveFits(curve, dissociation, wellDepth, well.expanded) }),
    ...vibrations,
    ...excitedFindings(prepared, points, { curve, well, vibration: vibrations?.vibration }, seconds, control),
  };
}

function excitedFindings(
  prepared: PreparedStudy,
  points: LevelPoints,
  lowest: LowestState,
  seconds: number,
  control: RunControl | undefined,
): Pick<LevelFindings, 'excitedStates'> {
  const states = excitedStates(prepared, points, lowest, seconds, control);
  return states.length > 0 ? { excitedStates: states } : {};
}

function none(reason: string): LevelFindings {
  return { minimum: { kind: 'none', reason } };
}

/** Levels of the isotopes of the study and of those that it asks for besides. */
function vibrationFindings(
  study: CompleteStudy,
  computed: readonly PointResult[],
  level: string,
  { found, solvable, expanded }: Well,
  wellDepth: WellDepth | undefined,
): Pick<LevelFindings, 'vibration' | 'isotopologues'> {
  const molecule = diatomicOf(study);
  if (!molecule || !solvable) return {};
  const { rotation = [], isotopologues = [] } = study.findings ?? {};
  const rotations = [...new Set(rotation)].filter((value) => value > 0).sort((a, b) => a - b);
  const lambda = lambdaNear(found.x, computed, level);
  const vibrationWith = (masses: Diatomic) =>
    fromLowestLevel(vibrationOn(solvable, masses, rotations, lambda), wellDepth);
  const others = isotopologues.flatMap((massNumbers): Isotopologue[] => {
    const masses = isotopologueOf(study, massNumbers);
    if (!masses) return [];
    return [
      {
        massNumbers,
        reducedMassDalton: masses.reducedMassDalton,
        ...(expanded && { constants: diatomicConstants(expanded.expansion, masses) }),
        vibration: vibrationWith(masses),
      },
    ];
  });
  return { vibration: vibrationWith(molecule), ...(others.length > 0 && { isotopologues: others }) };
}

/** Λ of the lowest state at the point nearest to a place; 0 where it is not known. */
function lambdaNear(x: number, computed: readonly PointResult[], level: string): number {
  const distance = ({ coordinate }: PointResult) => Math.abs((coordinate ?? Number.NaN) - x);
  const nearest = computed.reduce((a, b) => (distance(b) < distance(a) ? b : a));
  const result = nearest.levels[level];
  return (result && 'symmetry' in result && result.symmetry?.term?.lambda) || 0;
}
