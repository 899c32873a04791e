import { HARTREE_IN_EV } from '#engine';
import { depthReference, fragmentsText } from '../study/fragments-text';
import { type NamedState, namedStates } from './excited-tables';
import type { NamedResults } from './named-results';
import { coordinateScale, coordinateText, type ScannedCoordinate } from './scanned-coordinate';
import { ended } from './sentences';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

const EV_DECIMALS = 4;

/** What the curve of each excited state tends to and how deep its well is against that, a row a state. */
export function excitedLimitsTable(
  files: readonly NamedResults[],
  shared: ScannedCoordinate,
): TextTable | undefined {
  const states = files
    .flatMap((file) => namedStates(file).map((named) => ({ file, named })))
    .filter(({ named: { state } }) => state.dissociation ?? state.wellDepth);
  if (states.length === 0) return undefined;
  return {
    id: 'excited-limits',
    heading: 'Limits of higher states',
    columns: [
      { label: 'State', content: 'words' },
      { label: 'Tends to', content: 'words' },
      { label: 'Last point above (eV)' },
      { label: 'Dₑ (eV)' },
      { label: 'Dₑ is against', content: 'words' },
      { label: 'D₀ (eV)' },
    ],
    rows: states.map(({ file, named: { title, state } }) => {
      const { molecule } = file.results.study;
      const { dissociation, wellDepth, vibration } = state;
      const scale = coordinateScale(file.results, shared);
      const isFound = dissociation?.kind === 'found';
      return [
        title,
        isFound ? fragmentsText(molecule, dissociation) : '',
        electronvolts(isFound ? dissociation.farEndAbove : undefined),
        electronvolts(wellDepth?.value),
        wellDepth
          ? depthReference(molecule, wellDepth, dissociation, (x) => coordinateText(x * scale, shared.unit))
          : '',
        electronvolts(vibration?.kind === 'found' ? vibration.d0 : undefined),
      ];
    }),
    notes: [
      'In brackets, how far a fragment lies above its lowest state; last point: of the scan, above that sum. Dₑ: depth of the well; D₀: the same from its lowest level, against the same limit; the attraction of ions holds levels without end, of which those below the end of the curve are counted.',
      ...reasonsOf(states.map(({ named }) => named)),
    ],
  };
}

/** Each reason once, with the states that it holds for. */
function reasonsOf(states: readonly NamedState[]): readonly string[] {
  const byReason = new Map<string, string[]>();
  for (const { title, state } of states) {
    if (state.dissociation?.kind !== 'none') continue;
    const { reason } = state.dissociation;
    byReason.set(reason, [...(byReason.get(reason) ?? []), title]);
  }
  return [...byReason].map(([reason, titles]) => `No limit of ${titles.join(', ')}: ${ended(reason)}`);
}

const electronvolts = (energy: number | undefined): string =>
  energy === undefined ? '' : withMinus((energy * HARTREE_IN_EV).toFixed(EV_DECIMALS));
