import { type ExcitedState, HARTREE_IN_EV, type LevelFindings, type StudyResults } from '#engine';
import { coordinateText } from '../calculation/coordinate-text';
import { formula } from '../study/formula';
import { depthReference, fragmentsText } from '../study/fragments-text';
import { counted } from './wording';

/** More excited states than this would hide everything else; the results file has them all. */
const MOST_STATES = 6;

/**
 * What a level's curve gives beyond its minimum and levels, a line each: other minima, levels with rotation,
 * isotopologues, excited states and fits. The results file and the report have all numbers.
 */
export function curveTexts(level: string, results: StudyResults): readonly string[] {
  const findings = results.findings[level];
  if (!findings) return [];
  return [
    ...otherMinima(findings, results),
    ...rotatingTexts(findings),
    ...isotopologueTexts(findings, results),
    ...stateTexts(findings, level, results),
    ...fitTexts(findings),
  ];
}

function otherMinima({ minimum }: LevelFindings, { study }: StudyResults): readonly string[] {
  if (minimum.kind !== 'found') return [];
  return (minimum.others ?? []).map(
    ({ equilibriumDistance, energy }) =>
      `another minimum of ${energy.toFixed(6)} hartree at ` +
      coordinateText(study, Number(equilibriumDistance.toFixed(5))),
  );
}

function rotatingTexts({ vibration }: LevelFindings): readonly string[] {
  if (vibration?.kind !== 'found') return [];
  return (vibration.rotating ?? []).map(({ rotation, levels, quasiBound }) => {
    const behind = quasiBound.length > 0 ? `, ${quasiBound.length} behind the centrifugal barrier` : '';
    return `J = ${rotation}: ${counted(levels.length, 'bound vibrational level')}${behind}`;
  });
}

function isotopologueTexts(
  { isotopologues = [] }: LevelFindings,
  { study }: StudyResults,
): readonly string[] {
  const { atoms, charge } = study.molecule;
  return isotopologues.map(({ massNumbers, vibration }) => {
    const name = formula({
      atoms: atoms.map((atom, index) => ({ ...atom, isotope: massNumbers[index] })),
      charge,
    });
    if (vibration.kind === 'none') return `${name}: ${vibration.reason}`;
    const { zeroPointPerCm, d0, boundLevels } = vibration;
    const dissociation = d0 === undefined ? '' : `, D₀ = ${(d0 * HARTREE_IN_EV).toFixed(4)} eV`;
    return (
      `${name}: G(0) = ${zeroPointPerCm.toFixed(2)} cm⁻¹${dissociation}, ` +
      counted(boundLevels, 'bound vibrational level')
    );
  });
}

function stateTexts(
  { excitedStates = [] }: LevelFindings,
  level: string,
  { study, curves }: StudyResults,
): readonly string[] {
  const texts = excitedStates.flatMap(({ curve, minimum, adiabatic, vertical, ...limit }) => {
    const parts = [
      ...(minimum.kind === 'found' && adiabatic
        ? [
            `Tₑ = ${inEv(adiabatic.value)}, minimum at ` +
              coordinateText(study, Number(minimum.equilibriumDistance.toFixed(5))),
          ]
        : []),
      ...(vertical ? [`vertical excitation ${inEv(vertical.energy.value)}`] : []),
      ...limitParts(limit, study),
    ];
    const name = curves?.[level]?.[curve]?.name ?? `state ${curve + 1}`;
    return parts.length > 0 ? [`${name}: ${parts.join(', ')}`] : [];
  });
  const more = texts.length - MOST_STATES;
  return more > 1 ? [...texts.slice(0, MOST_STATES), `${more} more states, in the results file`] : texts;
}

/** What the curve tends to, with the depth of its well against that; without a well only where it is known. */
function limitParts(
  { wellDepth, dissociation }: Pick<ExcitedState, 'wellDepth' | 'dissociation'>,
  study: StudyResults['study'],
): readonly string[] {
  if (wellDepth) {
    const place = (x: number) => `its end at ${coordinateText(study, x)}`;
    const limit = depthReference(study.molecule, wellDepth, dissociation, place);
    return [`Dₑ = ${inEv(wellDepth.value)} below ${limit}`];
  }
  return dissociation?.kind === 'found' ? [`tends to ${fragmentsText(study.molecule, dissociation)}`] : [];
}

function fitTexts({ fits }: LevelFindings): readonly string[] {
  const forms = [
    ['Morse', fits?.morse],
    ['extended Rydberg', fits?.extendedRydberg],
  ] as const;
  const texts = forms.flatMap(([name, fit]) =>
    fit ? [`${name} to ${Number(fit.rootMeanSquarePerCm.toPrecision(2))} cm⁻¹`] : [],
  );
  return texts.length > 0 ? [`points fitted by ${texts.join(', ')} (root mean square)`] : [];
}

const inEv = (hartree: number): string => `${(hartree * HARTREE_IN_EV).toFixed(4)} eV`;
