import type { Caution, LengthUnit } from '#engine';
import { groupCautions, neighbourRuns } from '../../charts/cautions';
import type { Run } from '../../state/window-state';
import { positionText } from './shown-units';

/** Where the curves should not be trusted, why, and what to do about it. */
export function CautionList({ run, lengthUnit }: { readonly run: Run; readonly lengthUnit: LengthUnit }) {
  const groups = groupCautions(run.points);
  const whole = run.results?.cautions ?? [];
  if (groups.length === 0 && whole.length === 0) return null;
  const where = positionText(run.study, lengthUnit);
  const at = (index: number) => {
    const coordinate = run.points[index]?.coordinate ?? null;
    return coordinate === null ? '' : where(coordinate, 4);
  };
  return (
    <section>
      <h3>Cautions</h3>
      <ul className="cautions">
        {whole.map((caution) => (
          <CautionItem
            key={`${caution.code} ${caution.level} ${caution.message}`}
            caution={caution}
            range={caution.range ? caution.range.map((place) => where(place, 4)).join(' to ') : ''}
          />
        ))}
        {groups.map(({ caution, at: indices }) => (
          <CautionItem
            key={`${caution.code} ${caution.level}`}
            caution={caution}
            range={neighbourRuns(indices)
              .map(([first, last]) => (first === last ? at(first) : `${at(first)} to ${at(last)}`))
              .join(', ')}
          />
        ))}
      </ul>
    </section>
  );
}

function CautionItem({ caution, range }: { readonly caution: Caution; readonly range: string }) {
  const { level, message, meaning, remedy } = caution;
  return (
    <li>
      {level === undefined ? '' : <strong>{level}: </strong>}
      {[message, meaning].filter((sentence) => sentence !== undefined).join(' ')}{' '}
      {remedy !== undefined && <em>{remedy} </em>}
      {range !== '' && <span className="hint">{range}</span>}
    </li>
  );
}
