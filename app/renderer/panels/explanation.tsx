import type { StudyExplanation } from '#engine';
import { wholeStudy } from '../../study/whole-study';
import { formatBytes, formatDuration, formatFixed } from '../numbers';
import { useWindowState } from '../state/window-context';
import type { Check } from '../state/window-state';

/** What the study asks of the machine, in one line, before it is computed. */
export function Explanation({ check }: { readonly check: Check }) {
  const workers = useWindowState(({ catalogue }) => catalogue.program?.workers ?? 1);
  const result = check.kind === 'judged' ? check.result : check.last;
  if (result === undefined || !result.ok) return <p className="explanation">&nbsp;</p>;
  return <p className="explanation">{explanationText(result.explanation, workers)}</p>;
}

export function explanationText(explanation: StudyExplanation, workers: number): string {
  const { electrons, functions, frozenOrbitals, activeOrbitals, points, levels } = explanation;
  const { furtherBases = [] } = explanation;
  const determinants = levels.flatMap(({ level, determinants: count }) =>
    count === undefined ? [] : [`${level} ${formatFixed(count, 0)}`],
  );
  const { seconds: onOneCore, bytes } = wholeStudy(explanation);
  const seconds = onOneCore / workers;
  return [
    plural(electrons, 'electron'),
    plural(functions, 'basis function'),
    ...furtherBases.map((basis) => `${plural(basis.functions, 'function')} in ${basis.name}`),
    ...(frozenOrbitals > 0 ? [plural(frozenOrbitals, 'frozen orbital')] : []),
    ...(activeOrbitals !== undefined ? [plural(activeOrbitals, 'active orbital')] : []),
    plural(points, 'point'),
    ...(determinants.length > 0 ? [`determinants ${determinants.join(', ')}`] : []),
    `${seconds < 1 ? '' : 'about '}${formatDuration(seconds)}, ${formatBytes(bytes)}`,
  ].join(' · ');
}

const plural = (count: number, noun: string): string =>
  `${formatFixed(count, 0)} ${noun}${count === 1 ? '' : 's'}`;
