import { HARTREE_IN_EV, type LevelFindings, type StudyResults } from '#engine';

/**
 * The numbers of a results file that its report must have, printed with the report's decimals: energies of all
 * levels and states at all points, and what was read off the curves.
 */
export function printedNumbers({ study, points, findings }: StudyResults): readonly string[] {
  const energies = points.flatMap(({ levels }) =>
    study.levels.flatMap((level): readonly number[] => {
      const result = levels[level];
      if (!result?.converged) return [];
      if (result.kind === 'singles') return [];
      return 'energy' in result ? [result.energy] : [];
    }),
  );
  return [...energies.map((energy) => energy.toFixed(6)), ...Object.values(findings).flatMap(ofFindings)];
}

function ofFindings({
  minimum,
  wellDepth,
  constants,
  vibration,
  excitedStates = [],
}: LevelFindings): readonly string[] {
  const { diatomic } = constants ?? {};
  return [
    ...(minimum.kind === 'found' ? [minimum.energy.toFixed(6)] : []),
    ...(wellDepth ? [wellDepth.value.toFixed(6)] : []),
    ...(diatomic
      ? [diatomic.harmonicWavenumberPerCm.value.toFixed(2), diatomic.anharmonicityPerCm.value.toFixed(2)]
      : []),
    ...(vibration?.kind === 'found' ? vibration.levels.map(({ energyPerCm }) => energyPerCm.toFixed(2)) : []),
    ...excitedStates.flatMap((state) => [
      ...[state.vertical?.energy.value, state.adiabatic?.value, state.wellDepth?.value].flatMap((energy) =>
        energy === undefined ? [] : [(energy * HARTREE_IN_EV).toFixed(4)],
      ),
    ]),
  ];
}
