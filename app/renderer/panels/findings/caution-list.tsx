import type { Caution, LengthUnit } from '#engine';
import { groupCautions, neighbourRuns } from '../../charts/cautions';
import type { Run } from '../../state/window-state';
import { positionText } from './shown-units';

interface CautionListProps {
  readonly run: Run;
  /** the level that they concern; absent: those of no single level */
  readonly level?: string;
  readonly lengthUnit: LengthUnit;
}

/** Where curves should not be trusted, why, and what to do about it; nothing where there is no such place. */
export function CautionList({ run, level, lengthUnit }: CautionListProps) {
  const groups = groupCautions(run.points).filter(({ caution }) => caution.level === level);
  const whole = (run.results?.cautions ?? []).filter((caution) => caution.level === level);
  if (groups.length === 0 && whole.length === 0) return null;
  const where = positionText(run.study, lengthUnit);
  const between = (from: string, to: string) => (from === to ? from : `${from} to ${to}`);
  const at = (index: number) => {
    const coordinate = run.points[index]?.coordinate ?? null;
    return coordinate === null ? '' : where(coordinate, 4);
  };
  const list = (
    <ul className="cautions" aria-label={level === undefined ? 'Cautions' : `Cautions about ${level}`}>
      {whole.map((caution) => (
        <CautionItem
          key={`${caution.code} ${caution.message}`}
          caution={caution}
          range={caution.range ? between(where(caution.range[0], 4), where(caution.range[1], 4)) : ''}
        />
      ))}
      {groups.map(({ caution, at: indices }) => (
        <CautionItem
          key={caution.code}
          caution={caution}
          range={neighbourRuns(indices)
            .map(([first, last]) => between(at(first), at(last)))
            .join(', ')}
        />
      ))}
    </ul>
  );
  if (level !== undefined) return list;
  return (
    <section>
      <h3>Cautions</h3>
      {list}
    </section>
  );
}

function CautionItem({ caution, range }: { readonly caution: Caution; readonly range: string }) {
  const { message, meaning, remedy } = caution;
  return (
    <li>
      {[message, meaning].filter((sentence) => sentence !== undefined).join(' ')}{' '}
      {remedy !== undefined && <em>{remedy} </em>}
      {range !== '' && <span className="hint">{range}</span>}
    </li>
  );
}
