import type { StudyIssue } from '../../contract/requests';
import { LabelledField } from '../controls/labelled-field';
import { Segmented } from '../controls/segmented';
import type { ActiveDraft, StudyDraft } from '../state/draft';

interface CorrelatedEditorProps {
  readonly draft: StudyDraft;
  readonly issues: readonly StudyIssue[];
  readonly onEdit: (change: (draft: StudyDraft) => StudyDraft) => void;
}

type Correlated = 'all' | 'valence' | 'active';

/** To start from: the two electrons of a bond in its bonding and its antibonding orbital. */
const BOND_SPACE: ActiveDraft = { electrons: '2', orbitals: '2' };

/** Which electrons CI and MP2 correlate, and in which orbitals. */
export function CorrelatedEditor({ draft, issues, onEdit }: CorrelatedEditorProps) {
  const choose = (correlated: Correlated) =>
    onEdit(({ active = BOND_SPACE, ...current }) => ({
      ...current,
      frozenCore: correlated === 'valence',
      ...(correlated === 'active' && { active }),
    }));
  const editActive = (change: Partial<ActiveDraft>) =>
    onEdit((current) => ({ ...current, active: { ...BOND_SPACE, ...current.active, ...change } }));
  const isWrong = (place: string) => issues.some((issue) => issue.place === place);
  return (
    <div className="correlatedEditor">
      <Segmented
        isLabelShown
        label="Electrons correlated"
        options={[
          { key: 'all', text: 'All' },
          { key: 'valence', text: 'Core frozen' },
          { key: 'active', text: 'Active space' },
        ]}
        chosen={draft.active ? 'active' : draft.frozenCore ? 'valence' : 'all'}
        onChoose={choose}
      />
      {draft.active && (
        <div className="fieldRow">
          <LabelledField
            label="Active electrons"
            value={draft.active.electrons}
            isWrong={isWrong('active.electrons')}
            onChange={(electrons) => editActive({ electrons })}
          />
          <LabelledField
            label="Active orbitals"
            value={draft.active.orbitals}
            isWrong={isWrong('active.orbitals')}
            onChange={(orbitals) => editActive({ orbitals })}
          />
        </div>
      )}
      <Segmented
        isLabelShown
        label="Orbitals of CI"
        options={[
          { key: 'restricted', text: 'RHF or ROHF' },
          { key: 'unrestricted', text: 'UHF' },
        ]}
        chosen={draft.orbitals}
        onChoose={(orbitals) => onEdit((current) => ({ ...current, orbitals }))}
      />
    </div>
  );
}
