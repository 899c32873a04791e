import type { StudyIssue } from '../../contract/requests';
import { Check } from '../controls/check';
import { LabelledField } from '../controls/labelled-field';
import type { StudyDraft } from '../state/draft';
import { LEVELS, withLevel } from '../state/levels';
import { CorrelatedEditor } from './correlated-editor';

interface LevelsEditorProps {
  readonly draft: StudyDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

/** Which levels the curve is computed at, how many states of each, and how closely. */
export function LevelsEditor({ draft, issues, onEdit }: LevelsEditorProps) {
  const unknown = draft.levels.filter((level) => !LEVELS.some(({ name }) => name === level));
  const toggle = (level: string, isWanted: boolean) =>
    onEdit((current) => ({ ...current, levels: withLevel(current.levels, level, isWanted) }));
  return (
    <div className="levelsEditor">
      <fieldset>
        <legend className="visuallyHidden">Levels computed</legend>
        {LEVELS.map(({ name, description }) => (
          <Check
            key={name}
            isChecked={draft.levels.includes(name)}
            onChange={(isWanted) => toggle(name, isWanted)}
          >
            <strong>{name}</strong> <span className="hint">{description}</span>
          </Check>
        ))}
        {unknown.map((level) => (
          <Check key={level} isChecked onChange={() => toggle(level, false)}>
            <strong>{level}</strong>
          </Check>
        ))}
      </fieldset>
      <CorrelatedEditor {...{ draft, issues, onEdit }} />
      <div className="fieldRow">
        <LabelledField
          label="Lowest states of each CI level"
          value={draft.states}
          isWrong={issues.some(({ place }) => place === 'states')}
          onChange={(states) => onEdit((current) => ({ ...current, states }))}
        />
        <LabelledField
          label="Energies converged to, hartree"
          placeholder="usual"
          value={draft.energyConvergence}
          isWrong={issues.some(({ place }) => place.startsWith('convergence'))}
          onChange={(energyConvergence) => onEdit((current) => ({ ...current, energyConvergence }))}
        />
      </div>
    </div>
  );
}
